package org.hazewright.hard;

import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.attribute.FileTime;
import java.time.Duration;
import java.time.Instant;
import org.hazewright.files.SafeFile;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** The short form of {@link Killing}. */
class KillingTest {
    @TempDir
    Path folder;

    @Test
    void whatWasAcknowledgedIsThere() throws Exception {
        assertTrue(Killing.run(folder, 2, 1, 1).acknowledged() > 2);
    }

    @Test
    void whatAKilledProgramLeftIsSwept() throws Exception {
        Path old = Files.writeString(folder.resolve(".a.toml.1x2y.part"), "half");
        Path young = Files.writeString(folder.resolve(".a.toml.3x4y.part"), "another program's");
        Path other = Files.writeString(folder.resolve(".b.toml.1x2y.part"), "half");
        for (Path p : new Path[] {old, other})
            Files.setLastModifiedTime(p, FileTime.from(Instant.now().minus(Duration.ofHours(1))));
        SafeFile.write(folder.resolve("a.toml"), "whole", SafeFile.Overwrite.REPLACE);
        assertFalse(Files.exists(old));
        assertTrue(Files.exists(young) && Files.exists(other));
    }

    @Test
    void twoProgramsShareALogbook() throws Exception {
        assertTrue(Killing.run(folder, 2, 2, 2).acknowledged() > 2);
    }
}
