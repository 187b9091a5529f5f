package org.hazewright.hard;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import java.io.File;
import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Path;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import org.hazewright.optics.Refusal;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** The short form of {@link Fuzz}: seeds, what was found before, and a few changes, within 512 MiB. */
class EveryDoorTest {
    @TempDir
    Path folder;

    @Test
    void aValueOrOneRefusal() throws IOException, InterruptedException {
        Path things = folder.resolve("with spaces µ");
        Seeds.lay(things);
        Process replay = new ProcessBuilder(
                        Path.of(System.getProperty("java.home"), "bin", "java").toString(),
                        "-Xmx512m",
                        "-Djava.awt.headless=true",
                        "-cp",
                        absoluteClassPath(),
                        Replay.class.getName(),
                        Path.of("src/test/resources/found").toAbsolutePath().toString(),
                        "60",
                        "7")
                .directory(things.toFile())
                .redirectErrorStream(true)
                .start();
        // What libraries say on their own, by logging, counts as well: nothing may stand there.
        String said = new String(replay.getInputStream().readAllBytes(), StandardCharsets.UTF_8);
        assertEquals(0, replay.waitFor(), said);
        assertEquals("", said);
    }

    /** The promise itself can be broken. */
    @Test
    void thePromiseCatches() {
        assertThrows(
                IllegalStateException.class,
                () -> Promise.refusesAtMost(
                        () -> {
                            throw new IllegalStateException();
                        },
                        ""));
        for (String bad : new String[] {"", "x.toml: java.io.IOException", "The value is null.", "See:"})
            assertThrows(
                    AssertionError.class,
                    () -> Promise.refusesAtMost(
                            () -> {
                                throw new Refusal(bad);
                            },
                            ""));
        Promise.refusesAtMost(
                () -> {
                    throw new Refusal("mua_per_cm is -1; it must be 0 or above.");
                },
                "");
    }

    static String absoluteClassPath() {
        return Stream.of(System.getProperty("java.class.path").split(File.pathSeparator))
                .map(p -> Path.of(p).toAbsolutePath().toString())
                .collect(Collectors.joining(File.pathSeparator));
    }
}
