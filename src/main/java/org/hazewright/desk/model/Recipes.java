package org.hazewright.desk.model;

import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Optional;
import org.hazewright.mixture.Recipe;

/** Small changes of a recipe that are no edits of its grams. */
final class Recipes {
    private Recipes() {}

    /** The recipe as the answer to a brief's file. */
    static Recipe answering(Recipe r, Optional<String> briefSha256) {
        return new Recipe(
                r.title(), r.base(), r.temperatureC(), r.weighingUncertaintyG(), briefSha256, r.stocks(), r.items());
    }

    /** The first of NAME-1, NAME-2, … with an ending that is not there yet. */
    static Path freeName(Path folder, String name, String ending) {
        int n = 1;
        while (Files.exists(folder.resolve(name + "-" + n + ending))) n++;
        return folder.resolve(name + "-" + n + ending);
    }
}
