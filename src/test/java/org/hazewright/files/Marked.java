package org.hazewright.files;

import static org.junit.jupiter.api.Assertions.assertAll;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import org.junit.jupiter.api.function.Executable;

/**
 * The text of a broken file with a ▶ where the complaint must point, so that a test says line and column by showing them. Without
 * a ▶ the complaint must be about the file as a whole.
 */
record Marked(String text, int line, int column) {
    private static final String MARK = "▶";

    static Marked of(String marked) {
        int at = marked.indexOf(MARK);
        if (at < 0) return new Marked(marked, 0, 0);
        String before = marked.substring(0, at);
        int line = (int) before.chars().filter(c -> c == '\n').count() + 1;
        return new Marked(marked.replace(MARK, ""), line, at - before.lastIndexOf('\n'));
    }

    /** Writes a file, and the folders it stands in. */
    static Path write(Path file, String text) {
        try {
            Files.createDirectories(file.getParent());
            return Files.write(file, text.getBytes(StandardCharsets.UTF_8)); // half a surrogate pair becomes "?"
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }

    /** Writes the text, reads it by {@code reading}, and holds the refusal to the mark and to the words it must have. */
    FileRefusal refusedAs(Path file, Executable reading, String... words) {
        write(file, text);
        FileRefusal refusal = assertThrows(FileRefusal.class, reading);
        holds(refusal, file, words);
        return refusal;
    }

    void holds(FileRefusal refusal, Path file, String... words) {
        String start = file + (line > 0 ? ":" + line + ":" + column : "") + ": ";
        assertAll(
                refusal.getMessage(),
                () -> assertEquals(file.toString(), refusal.path()),
                () -> assertEquals(line, refusal.line(), "line"),
                () -> assertEquals(column, refusal.column(), "column"),
                () -> assertTrue(refusal.getMessage().startsWith(start), "begins with " + start),
                () -> {
                    for (String word : words)
                        assertTrue(
                                refusal.getMessage().contains(word), "says \"" + word + "\": " + refusal.getMessage());
                });
    }
}
