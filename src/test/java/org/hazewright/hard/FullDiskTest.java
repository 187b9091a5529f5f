package org.hazewright.hard;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.junit.jupiter.api.Assumptions.assumeTrue;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import org.hazewright.cli.OneLine;
import org.hazewright.files.BatchReader;
import org.hazewright.sheet.Logbook;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/**
 * Disks that are full or read-only, as small disks in memory: what was there stays whole, nothing half-written stays, and the message
 * says what to do. Where such a disk cannot be mounted (it needs an administrator on Linux) only the file in the way is tried.
 */
class FullDiskTest {
    @TempDir
    Path folder;

    @Test
    void aFullDisk() throws Exception {
        Path recipe = recipe();
        int full = 0;
        for (int kib = 8; kib <= 200; kib += 16) {
            Path disk = mounted("size=" + kib + "k");
            try {
                Path old = Files.writeString(disk.resolve("wrist-bath.recipe.toml"), "# the one before\n");
                for (int n = 0; n < 6; n++) {
                    String[] lines = n == 0
                            ? new String[] {
                                "design", "recipes-demo/wrist-bath.brief.toml", "--out", disk.toString(), "--quiet"
                            }
                            : new String[] {
                                "batch", "open", recipe.toString(), "--out", disk.toString(), "--id", "B" + n, "--quiet"
                            };
                    OneLine ran = OneLine.run(lines);
                    assertTrue(ran.status() == 0 || ran.status() == 4, ran.toString());
                    if (ran.status() == 4) {
                        full++;
                        assertTrue(ran.err().contains("the disk is full"), ran.err());
                        Promise.wellSaid(ran.err(), "");
                    } else if (n > 0) kept(disk, "B" + n);
                    Promise.nothingHalfWritten(disk);
                }
                assertTrue(Files.size(old) > 0);
                wholeBooks(disk);
            } finally {
                run("umount", disk.toString());
            }
        }
        assertTrue(full > 5, "some disks were full: " + full);
    }

    @Test
    void aReadOnlyDisk() throws Exception {
        Path disk = mounted("ro");
        try {
            OneLine ran =
                    OneLine.run("design", "recipes-demo/wrist-bath.brief.toml", "--out", disk.toString(), "--quiet");
            assertEquals(4, ran.status(), ran.toString());
            assertTrue(ran.err().contains("read-only"), ran.err());
            ran = OneLine.run("batch", "open", recipe().toString(), "--out", disk.toString());
            assertEquals(4, ran.status(), ran.toString());
            Promise.wellSaid(ran.err(), "");
        } finally {
            run("umount", disk.toString());
        }
    }

    @Test
    void aFileInTheWay() throws IOException {
        Path file = Files.writeString(folder.resolve("out"), "mine");
        OneLine ran = OneLine.run("design", "recipes-demo/wrist-bath.brief.toml", "--out", file.toString(), "--quiet");
        assertEquals(4, ran.status(), ran.toString());
        Promise.wellSaid(ran.err(), "");
        assertArrayEquals("mine".getBytes(StandardCharsets.UTF_8), Files.readAllBytes(file));
    }

    /** What was acknowledged is in its own file and in the logbook or beside it. */
    private static void kept(Path disk, String id) {
        assertTrue(Seeds.files(disk).stream().anyMatch(p -> p.toString().endsWith(".batch.toml") && readable(p)));
        List<String> ids = new ArrayList<>();
        for (Path book : Seeds.files(disk))
            if (book.getFileName().toString().matches("logbook\\.(waiting\\..*)?xlsx"))
                Logbook.batches(book).forEach(row -> ids.add(row.get("batch").toString()));
        assertTrue(ids.contains(id), id + " is not among " + ids);
    }

    private static void wholeBooks(Path disk) {
        for (Path book : Seeds.files(disk))
            if (book.getFileName().toString().matches("logbook.*\\.xlsx"))
                assertFalse(Logbook.batches(book).isEmpty());
    }

    private static boolean readable(Path batch) {
        BatchReader.read(batch, Seeds.shelf());
        return true;
    }

    private Path recipe() {
        OneLine ran =
                OneLine.run("design", "recipes-demo/wrist-bath.brief.toml", "--out", folder.toString(), "--quiet");
        assertEquals(0, ran.status(), ran.toString());
        return folder.resolve("wrist-bath.recipe.toml");
    }

    private Path mounted(String options) throws Exception {
        Path disk = Files.createDirectories(folder.resolve("disk"));
        assumeTrue(
                System.getProperty("os.name").startsWith("Linux")
                        && run("mount", "-t", "tmpfs", "-o", options, "tmpfs", disk.toString()) == 0,
                "a disk in memory can be mounted");
        return disk;
    }

    private static int run(String... command) throws InterruptedException {
        try {
            return new ProcessBuilder(command)
                    .redirectErrorStream(true)
                    .redirectOutput(ProcessBuilder.Redirect.DISCARD)
                    .start()
                    .waitFor();
        } catch (IOException notThere) {
            return -1;
        }
    }
}
