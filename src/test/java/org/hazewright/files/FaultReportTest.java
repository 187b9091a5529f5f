package org.hazewright.files;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class FaultReportTest {
    @TempDir
    private Path folder;

    @Test
    void wordsForThePersonAndTheTraceInAFile() throws IOException {
        String words = FaultReport.of(new IllegalStateException("a count of -1"), folder);
        try (Stream<Path> files = Files.list(folder)) {
            List<Path> kept = files.toList();
            assertEquals(1, kept.size());
            assertTrue(words.contains(kept.get(0).toString()), words);
            assertTrue(Files.readString(kept.get(0)).contains("FaultReportTest.wordsForThePerson"));
        }
        assertFalse(words.contains("IllegalState"), words);
    }

    @Test
    void withoutAFolderToWriteToTheWordsSayWhatHappened() throws IOException {
        Path file = Files.createFile(folder.resolve("not-a-folder"));
        String words = FaultReport.of(new IllegalStateException("a count of -1"), file);
        assertTrue(words.contains("a count of -1") && words.contains("FaultReportTest"), words);
    }
}
