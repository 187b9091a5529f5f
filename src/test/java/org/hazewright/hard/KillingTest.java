package org.hazewright.hard;

import static org.junit.jupiter.api.Assertions.assertTrue;

import java.nio.file.Path;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** The short form of {@link Killing}. */
class KillingTest {
    @TempDir
    Path folder;

    @Test
    void whatWasAcknowledgedIsThere() throws Exception {
        assertTrue(Killing.run(folder, 2, 1, 1) > 2);
    }

    @Test
    void twoProgramsShareALogbook() throws Exception {
        assertTrue(Killing.run(folder, 2, 2, 2) > 2);
    }
}
