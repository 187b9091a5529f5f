package org.hazewright.hard;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.google.common.jimfs.Configuration;
import com.google.common.jimfs.Jimfs;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.stream.Stream;
import org.hazewright.files.SafeFile;
import org.hazewright.files.WriteFailure;
import org.junit.jupiter.api.Test;

/** Drives that cannot move a file over another in one step: written all the same, and never both the old and the new one lost. */
class MovesInStepsTest {
    @Test
    void writtenAndReplaced() throws IOException {
        try (MovesInSteps drive = new MovesInSteps(Jimfs.newFileSystem(Configuration.unix()))) {
            Path file = drive.getPath("/lab/bath.recipe.toml");
            for (SafeFile.Overwrite policy : SafeFile.Overwrite.values()) {
                Files.deleteIfExists(file);
                SafeFile.write(file, policy + " one", policy);
                assertEquals(policy + " one", Files.readString(file));
                if (policy == SafeFile.Overwrite.NEVER) continue;
                SafeFile.write(file, policy + " two", policy);
                assertEquals(policy + " two", Files.readString(file));
            }
            assertTrue(drive.asked() > 3, "a move in one step was tried first");
            assertEquals("KEEP_PREVIOUS one", Files.readString(file.resolveSibling("bath.recipe.toml.previous")));
            assertEquals(List.of("bath.recipe.toml", "bath.recipe.toml.previous"), names(file.getParent()));
        }
    }

    /** The old file is gone when the new one does not come: the new one stays where it is, whole, and the message says where. */
    @Test
    void aMoveThatBreaksOffLosesNothing() throws IOException {
        try (MovesInSteps drive = new MovesInSteps(Jimfs.newFileSystem(Configuration.unix()))) {
            Path file = drive.getPath("/lab/b1.batch.toml");
            SafeFile.write(file, "old", SafeFile.Overwrite.REPLACE);
            drive.breakMoves(true);
            WriteFailure failure =
                    assertThrows(WriteFailure.class, () -> SafeFile.write(file, "new", SafeFile.Overwrite.REPLACE));
            assertTrue(failure.getMessage().contains("the disk is full"), failure.getMessage());
            Promise.wellSaid(failure.getMessage(), "");
            assertFalse(Files.exists(file));
            List<String> left = names(file.getParent());
            assertEquals(1, left.size(), left.toString());
            assertTrue(failure.getMessage().contains(left.get(0)), failure.getMessage());
            assertEquals("new", Files.readString(file.resolveSibling(left.get(0))));
            // A file that was not there before is no loss, and nothing is left of it.
            Path fresh = drive.getPath("/lab/b2.batch.toml");
            assertThrows(WriteFailure.class, () -> SafeFile.write(fresh, "new", SafeFile.Overwrite.REPLACE));
            assertEquals(left, names(file.getParent()));
        }
    }

    private static List<String> names(Path folder) throws IOException {
        try (Stream<Path> all = Files.list(folder)) {
            return all.map(p -> p.getFileName().toString()).sorted().toList();
        }
    }
}
