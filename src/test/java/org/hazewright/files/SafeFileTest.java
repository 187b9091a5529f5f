package org.hazewright.files;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.junit.jupiter.api.Assumptions.assumeTrue;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.AccessDeniedException;
import java.nio.file.FileSystemException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.ReadOnlyFileSystemException;
import java.nio.file.attribute.PosixFilePermissions;
import java.util.List;
import java.util.Random;
import java.util.stream.Stream;
import org.hazewright.files.SafeFile.Overwrite;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class SafeFileTest {
    @TempDir
    Path folder;

    @Test
    void writesAndReplacesAndLeavesNothingElseBehind() throws IOException {
        Path file = folder.resolve("new").resolve("deep").resolve("a.toml");
        SafeFile.write(file, "µ = 1\n", Overwrite.NEVER);
        assertEquals("µ = 1\n", Files.readString(file, StandardCharsets.UTF_8));
        SafeFile.write(file, "b = 2\n", Overwrite.REPLACE);
        assertEquals("b = 2\n", Files.readString(file));
        assertEquals(List.of("a.toml"), names(file.getParent()));
    }

    @Test
    void theDefaultPermissionsAreThoseOfAnyNewFileAndStayWhenReplaced() throws IOException {
        assumeTrue(Files.getFileStore(folder).supportsFileAttributeView("posix"));
        Path plain = Files.writeString(folder.resolve("plain"), "");
        Path file = folder.resolve("a.toml");
        SafeFile.write(file, "a", Overwrite.REPLACE);
        assertEquals(Files.getPosixFilePermissions(plain), Files.getPosixFilePermissions(file));
        Files.setPosixFilePermissions(file, PosixFilePermissions.fromString("rw-rw-r--"));
        SafeFile.write(file, "b", Overwrite.REPLACE);
        assertEquals("rw-rw-r--", PosixFilePermissions.toString(Files.getPosixFilePermissions(file)));
    }

    @Test
    void thePreviousVersionIsKeptWhenAskedFor() throws IOException {
        Path file = folder.resolve("a.recipe.toml");
        SafeFile.write(file, "1", Overwrite.KEEP_PREVIOUS);
        assertEquals(List.of("a.recipe.toml"), names(folder));
        SafeFile.write(file, "2", Overwrite.KEEP_PREVIOUS);
        SafeFile.write(file, "3", Overwrite.KEEP_PREVIOUS);
        assertEquals("3", Files.readString(file));
        assertEquals("2", Files.readString(folder.resolve("a.recipe.toml.previous")));
        assertEquals(List.of("a.recipe.toml", "a.recipe.toml.previous"), names(folder));
    }

    @Test
    void aFileThatIsThereStaysWhenAskedFor() throws IOException {
        Path file = Files.writeString(folder.resolve("a.toml"), "mine");
        assertTrue(failure(file, Overwrite.NEVER).contains("is already there and was not touched"));
        assertEquals("mine", Files.readString(file));
    }

    @Test
    void aLinkIsFollowedAndKept() throws IOException {
        Path real = Files.writeString(folder.resolve("real.toml"), "old");
        Path link = link(folder.resolve("link.toml"), real);
        SafeFile.write(link, "new", Overwrite.REPLACE);
        assertTrue(Files.isSymbolicLink(link));
        assertEquals("new", Files.readString(real));
        Path astray = link(folder.resolve("astray.toml"), folder.resolve("nowhere"));
        assertTrue(failure(astray, Overwrite.REPLACE).contains("a link that leads nowhere"));
    }

    @Test
    void foldersDevicesAndPathsThroughFilesAreRefused() throws IOException {
        assertTrue(failure(folder, Overwrite.REPLACE).contains("is a folder"));
        Path file = Files.writeString(folder.resolve("a.toml"), "mine");
        String through = failure(file.resolve("b.toml"), Overwrite.REPLACE);
        assertTrue(through.contains("already there as something else"), through);
        assertEquals(List.of("a.toml"), names(folder));
        Path device = Path.of("/dev/null");
        assumeTrue(Files.exists(device));
        assertTrue(failure(device, Overwrite.REPLACE).contains("a device"));
        assertFalse(Files.isRegularFile(device));
    }

    @Test
    void aTooLongNameIsOneMessage() {
        String message = failure(folder.resolve("x".repeat(400)), Overwrite.REPLACE);
        assertTrue(message.contains("too long"), message);
    }

    @Test
    void aFolderThatLetsNobodyWriteIsOneMessage() throws IOException {
        assumeTrue(Files.getFileStore(folder).supportsFileAttributeView("posix"));
        Path locked = Files.createDirectory(folder.resolve("locked"));
        Files.setPosixFilePermissions(locked, PosixFilePermissions.fromString("r-xr-xr-x"));
        assumeTrue(!Files.isWritable(locked), "an administrator may write everywhere");
        assertTrue(failure(locked.resolve("a"), Overwrite.REPLACE).contains("Choose a folder of your own"));
    }

    @Test
    void whatTheSystemSaysIsSaidPlainly() {
        Path file = folder.resolve("a.toml");
        assertTrue(SafeFile.plain(file, new FileSystemException("a", null, "No space left on device"))
                .contains("the disk is full"));
        assertTrue(
                SafeFile.plain(file, new IOException("No space left on device")).contains("the disk is full"));
        assertTrue(SafeFile.plain(file, new FileSystemException("a", null, "Disk quota exceeded"))
                .contains("the disk is full"));
        assertTrue(SafeFile.plain(file, new FileSystemException("a", null, "Read-only file system"))
                .contains("read-only"));
        assertTrue(SafeFile.plain(file, new ReadOnlyFileSystemException()).contains("read-only"));
        assertTrue(SafeFile.plain(file, new AccessDeniedException("a")).contains("does not let you write"));
        assertTrue(SafeFile.plain(
                        file,
                        new FileSystemException(
                                "a",
                                null,
                                "The process cannot access the file because it is being used by another process"))
                .contains("another program has it open"));
    }

    @Test
    void aWriterKilledAtAnyMomentLeavesOneWholeVersion() throws Exception {
        Path file = folder.resolve("record.toml");
        SafeFile.write(file, KilledWriter.version(0), Overwrite.REPLACE);
        Random random = new Random(20260301);
        for (int round = 0; round < 6; round++) {
            Process writer = new ProcessBuilder(
                            Path.of(System.getProperty("java.home"), "bin", "java")
                                    .toString(),
                            "-cp",
                            System.getProperty("java.class.path"),
                            KilledWriter.class.getName(),
                            file.toString())
                    .redirectErrorStream(true)
                    .start();
            assertEquals('w', writer.getInputStream().read(), "the writer has begun");
            Thread.sleep(random.nextInt(120));
            writer.destroyForcibly().waitFor();
            byte[] found = Files.readAllBytes(file);
            assertEquals(KilledWriter.LENGTH, found.length);
            assertArrayEquals(KilledWriter.version(found[0] - 'a'), found);
        }
    }

    /** Writes a file over and over, each version of one letter only. */
    static final class KilledWriter {
        static final int LENGTH = 300_000;

        static byte[] version(int i) {
            byte[] bytes = new byte[LENGTH];
            java.util.Arrays.fill(bytes, (byte) ('a' + i));
            return bytes;
        }

        public static void main(String[] args) {
            Path file = Path.of(args[0]);
            for (int i = 0; ; i = (i + 1) % 26) {
                SafeFile.write(file, version(i), Overwrite.REPLACE);
                System.out.print('w');
                System.out.flush();
            }
        }
    }

    private static Path link(Path link, Path to) {
        try {
            return Files.createSymbolicLink(link, to);
        } catch (IOException | UnsupportedOperationException e) {
            assumeTrue(false, "this system makes no links");
            return link;
        }
    }

    private static String failure(Path file, Overwrite policy) {
        return assertThrows(WriteFailure.class, () -> SafeFile.write(file, "x", policy))
                .getMessage();
    }

    private static List<String> names(Path of) throws IOException {
        try (Stream<Path> entries = Files.list(of)) {
            return entries.map(p -> p.getFileName().toString()).sorted().toList();
        }
    }
}
