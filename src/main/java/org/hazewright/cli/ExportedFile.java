package org.hazewright.cli;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Arrays;
import org.hazewright.files.SafeFile;

/** A table that a command writes beside what it prints; one of before is kept, and the person is told. */
final class ExportedFile {
    private ExportedFile() {}

    /** What to add to the line that names the file: where the one of before went; empty when there was none, or the same. */
    static String write(Path file, String text) {
        boolean replaces = Files.isRegularFile(file) && !holds(file, text);
        SafeFile.write(file, text, SafeFile.Overwrite.KEEP_PREVIOUS);
        return replaces ? " (the one before is kept as " + file.getFileName() + ".previous)" : "";
    }

    private static boolean holds(Path file, String text) {
        try {
            return Arrays.equals(Files.readAllBytes(file), text.getBytes(StandardCharsets.UTF_8));
        } catch (IOException unreadable) {
            return false;
        }
    }
}
