package org.hazewright.hard;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.DirectoryStream;
import java.nio.file.Files;
import java.nio.file.NoSuchFileException;
import java.nio.file.Path;
import java.nio.file.StandardCopyOption;
import java.nio.file.attribute.FileTime;
import java.time.Duration;
import java.time.Instant;
import java.util.List;
import java.util.Set;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import org.hazewright.cli.OneLine;
import org.hazewright.files.SafeFile;
import org.hazewright.files.ShelfReader;
import org.hazewright.files.WriteFailure;
import org.hazewright.sheet.Logbook;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** Files that vanish while they are read or written, clocks that jump, and what a killed program left, said by the next one. */
@SuppressWarnings("try") // what goes on beside a test is only begun and ended
class FaultsTest {
    @TempDir
    Path folder;

    /** Something done over and over beside the test, until it is closed. */
    private static final class Beside implements AutoCloseable {
        private final Thread thread;
        private volatile boolean stop;

        private interface Deed {
            void once() throws IOException;
        }

        Beside(Deed deed) {
            thread = new Thread(() -> {
                while (!stop)
                    try {
                        deed.once();
                    } catch (IOException gone) {
                        Thread.onSpinWait();
                    }
            });
            thread.start();
        }

        @Override
        public void close() {
            stop = true;
            try {
                thread.join();
            } catch (InterruptedException e) {
                Thread.currentThread().interrupt();
            }
        }
    }

    /** A shelf whose files come and go is read, or refused in words. */
    @Test
    void aShelfThatVanishesWhileItIsRead() throws Exception {
        Path things = folder.resolve("things");
        Seeds.lay(things);
        Path shelf = things.resolve("shelf");
        List<Path> moving = List.of(shelf.resolve("ink-demo.toml"), shelf.resolve("spectra/water-absorption.csv"));
        try (Beside unused = new Beside(() -> {
            for (Path p : moving) {
                Path away = folder.resolve("away");
                Files.move(p, away, StandardCopyOption.ATOMIC_MOVE);
                Files.move(away, p, StandardCopyOption.ATOMIC_MOVE);
            }
        })) {
            for (int k = 0; k < 300; k++) {
                ShelfReader.readLenient(shelf).refusals().forEach(r -> Promise.wellSaid(r.getMessage(), ""));
            }
        }
        assertTrue(ShelfReader.readLenient(shelf).refusals().isEmpty(), "all is back");
    }

    /** Temporary files that another program sweeps too early: written after all, or refused in words; never half. */
    @Test
    void aTemporaryFileThatIsTakenAway() throws Exception {
        Path target = folder.resolve("recipe.toml");
        byte[] old = "# old\n".getBytes(StandardCharsets.UTF_8);
        byte[] fresh = "# fresh\n".repeat(20_000).getBytes(StandardCharsets.UTF_8);
        try (Beside unused = new Beside(() -> {
            try (DirectoryStream<Path> parts = Files.newDirectoryStream(folder, "*.part")) {
                for (Path p : parts) Files.deleteIfExists(p);
            }
        })) {
            for (int k = 0; k < 50; k++) {
                Files.write(target, old);
                try {
                    SafeFile.write(target, fresh, SafeFile.Overwrite.REPLACE);
                    assertArrayEquals(fresh, Files.readAllBytes(target));
                } catch (WriteFailure failure) {
                    Promise.wellSaid(failure.getMessage(), "");
                    assertTrue(failure.getMessage().contains("temporary file"), failure.getMessage());
                    assertArrayEquals(old, Files.readAllBytes(target));
                }
            }
        }
        SafeFile.write(target, fresh, SafeFile.Overwrite.REPLACE);
        assertArrayEquals(fresh, Files.readAllBytes(target));
    }

    /** Leftovers and files from a time that has not come yet, or of long ago: written and recorded as ever. */
    @Test
    void aClockThatJumped() throws Exception {
        Path batch = batch("B1");
        Path book = folder.resolve("logbook.xlsx");
        for (Duration off : new Duration[] {Duration.ofDays(4000), Duration.ofDays(-20_000), Duration.ofSeconds(1)}) {
            FileTime then = FileTime.from(Instant.now().plus(off));
            Path left = Files.writeString(folder.resolve(".B1.batch.toml.1x2y.part"), "half");
            for (Path p : Seeds.files(folder)) Files.setLastModifiedTime(p, then);
            OneLine ran = OneLine.run("batch", "weigh", batch.toString(), "--lot", "1=L" + off.toDays(), "--quiet");
            assertEquals(0, ran.status(), ran.err());
            assertEquals(1, Logbook.batches(book).size());
            assertTrue(Files.readString(batch).contains("L" + off.toDays()));
            assertEquals(
                    off.isNegative(), !Files.exists(left), "old leftovers are swept, one of the future may be at work");
            Files.deleteIfExists(left);
        }
        Promise.nothingHalfWritten(folder);
    }

    /** Two records within one tick of the file system's clock are two records. */
    @Test
    void twoRecordsInOneTick() throws Exception {
        FileTime tick = FileTime.from(Instant.parse("2026-03-02T10:00:00Z"));
        for (String id : new String[] {"B1", "B2", "B3"}) {
            batch(id);
            Files.setLastModifiedTime(folder.resolve("logbook.xlsx"), tick);
        }
        assertEquals(3, Logbook.batches(folder.resolve("logbook.xlsx")).size());
    }

    /** What a killed program left half-written of the logbook is removed by the next record, which says so. */
    @Test
    void theNextStartSaysWhatItFound() throws Exception {
        Path batch = batch("B1");
        Files.writeString(folder.resolve(".logbook.xlsx.1x2y.part"), "half");
        Files.writeString(folder.resolve("~$logbook.xlsx"), "open");
        OneLine waits = OneLine.run("batch", "weigh", batch.toString(), "--lot", "1=L07");
        assertEquals(4, waits.status(), waits.toString());
        assertTrue(waits.err().contains("open in a spreadsheet program"), waits.err());
        Files.delete(folder.resolve("~$logbook.xlsx"));
        OneLine.run("batch", "open", folder.resolve("wrist-bath.recipe.toml").toString(), "--id", "B2", "--no-logbook");
        OneLine next =
                OneLine.run("batch", "weigh", folder.resolve("B2.batch.toml").toString(), "--lot", "1=L08");
        assertEquals(0, next.status(), next.err());
        assertTrue(
                next.out()
                        .contains("logbook.xlsx (with 1 that waited beside it; a write of it had been cut off before;"
                                + " what was half-written is removed, the logbook was whole)"),
                next.out());
        Promise.nothingHalfWritten(folder);
        try (Stream<Path> all = Files.list(folder)) {
            assertFalse(all.anyMatch(p -> p.toString().contains("waiting")));
        }
    }

    /** Two batches whose names differ in letters that not every file name takes wait beside each other. */
    @Test
    void namesAlikeWaitApart() throws Exception {
        batch("B1");
        Files.writeString(folder.resolve("~$logbook.xlsx"), "open");
        String recipe = folder.resolve("wrist-bath.recipe.toml").toString();
        for (String id : new String[] {"Größe", "Gräße", "Gr__e"})
            assertEquals(4, OneLine.run("batch", "open", recipe, "--id", id).status());
        Files.delete(folder.resolve("~$logbook.xlsx"));
        assertEquals(0, OneLine.run("batch", "open", recipe, "--id", "B2").status());
        assertEquals(
                Set.of("B1", "B2", "Größe", "Gräße", "Gr__e"),
                Logbook.batches(folder.resolve("logbook.xlsx")).stream()
                        .map(row -> row.get("batch").toString())
                        .collect(Collectors.toSet()));
    }

    /** A brief, a recipe, a batch or a sheet that is gone by the time it is read. */
    @Test
    void whatIsGoneIsNamed() throws Exception {
        Path batch = batch("B1");
        Path gone = folder.resolve("gone");
        for (String[] line : new String[][] {
            {"design", gone + ".brief.toml"},
            {"predict", gone + ".recipe.toml"},
            {"batch", "show", gone + ".batch.toml"},
            {"batch", "weigh", batch.toString(), "--from", gone + ".xlsx"},
            {"batch", "measure", batch.toString(), "--from", gone + ".csv", "--method", "slab"},
            {"ingredients", "check", gone.toString()},
            {"design", "recipes-demo/wrist-bath.brief.toml", "--ingredients", gone.toString()}
        }) {
            OneLine ran = OneLine.run(line);
            assertEquals(2, ran.status(), String.join(" ", line) + ran);
            Promise.wellSaid(ran.out() + ran.err(), "");
            assertTrue(ran.err().contains("gone"), ran.err());
        }
        Path file = folder.resolve("link");
        try {
            Files.createSymbolicLink(file, gone);
        } catch (IOException | UnsupportedOperationException none) {
            return;
        }
        OneLine ran = OneLine.run("predict", file.toString());
        assertEquals(2, ran.status(), ran.toString());
        Promise.wellSaid(ran.err(), "");
        assertFalse(Files.exists(gone), new NoSuchFileException("nothing is made").getMessage());
    }

    private Path batch(String id) {
        OneLine made =
                OneLine.run("design", "recipes-demo/wrist-bath.brief.toml", "--out", folder.toString(), "--quiet");
        assertEquals(0, made.status(), made.err());
        OneLine opened = OneLine.run(
                "batch", "open", folder.resolve("wrist-bath.recipe.toml").toString(), "--id", id, "--quiet");
        assertEquals(0, opened.status(), opened.err());
        return folder.resolve(id + ".batch.toml");
    }
}
