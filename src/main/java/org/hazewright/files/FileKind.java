package org.hazewright.files;

import java.util.Locale;
import java.util.Optional;

/** What a file is by the ending of its name, so that one handed over in place of another is told apart from a mistyped one. */
enum FileKind {
    BRIEF(".brief.toml", "a brief"),
    RECIPE(".recipe.toml", "a recipe; the command design makes one of a brief"),
    BATCH(".batch.toml", "a batch; the command batch open makes one of a recipe"),
    SET_UP(".setup.toml", "a set-up of an instrument");

    private final String ending;
    private final String words;

    FileKind(String ending, String words) {
        this.ending = ending;
        this.words = words;
    }

    /** Empty when the name says nothing. */
    static Optional<FileKind> of(String path) {
        String name = path.toLowerCase(Locale.ROOT);
        for (FileKind kind : values()) if (name.endsWith(kind.ending)) return Optional.of(kind);
        return Optional.empty();
    }

    /** Refuses a file whose name says that it is of another kind. */
    void require(Place at) {
        Optional<FileKind> found = of(at.path()).filter(kind -> kind != this);
        if (found.isPresent())
            throw Place.whole(at.path())
                    .refusal("By its name (" + found.get().ending + ") this is "
                            + found.get().words.split(";")[0] + "; what is wanted here is " + words + ".");
    }
}
