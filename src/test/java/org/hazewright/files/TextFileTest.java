package org.hazewright.files;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.junit.jupiter.api.Assumptions.assumeTrue;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.attribute.PosixFilePermissions;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class TextFileTest {
    @TempDir
    Path folder;

    @Test
    void givesTextWithoutItsByteOrderMarkAndTheHashOfItsBytes() throws IOException {
        Path file = folder.resolve("a.toml");
        Files.write(file, new byte[] {(byte) 0xEF, (byte) 0xBB, (byte) 0xBF, 'a', 'b', 'c'});
        assertEquals("abc", TextFile.read(file).text());
        Files.writeString(file, "abc");
        // FIPS 180-4, SHA-256 example of the one-block message "abc"
        assertEquals(
                "ba7816bf8f01cfea414140de5dae2223b00361a396177a9cb410ff61f20015ad",
                TextFile.read(file).sha256());
    }

    @Test
    void aMissingFileIsRefusedWithTheNearestName() throws IOException {
        Files.writeString(folder.resolve("forearm.brief.toml"), "");
        Path file = folder.resolve("foream.brief.toml");
        FileRefusal refusal = assertThrows(FileRefusal.class, () -> TextFile.read(file));
        assertEquals(file + ": There is no such file. Perhaps forearm.brief.toml is meant.", refusal.getMessage());
        assertEquals(0, refusal.line());
    }

    @Test
    void aMissingFolderIsNamed() {
        Path file = folder.resolve("no").resolve("a.toml");
        assertTrue(refused(file).contains("the folder no does not exist"));
    }

    @Test
    void aFolderIsRefused() {
        assertTrue(refused(folder).contains("This is a folder"));
    }

    @Test
    void anotherEncodingIsRefusedAtItsFirstByte() throws IOException {
        Path file = folder.resolve("latin.toml");
        Files.write(file, "a = 1\nb = \"µm é\"\n".getBytes(StandardCharsets.ISO_8859_1));
        FileRefusal refusal = assertThrows(FileRefusal.class, () -> TextFile.read(file));
        assertEquals(2, refusal.line());
        assertEquals(6, refusal.column());
        assertTrue(refusal.getMessage().contains("Save it as UTF-8"));
    }

    @Test
    void theCharacterThatStandsForAnUnknownOneIsText() throws IOException {
        assertEquals(
                "\uFFFD",
                TextFile.read(Files.writeString(folder.resolve("a.toml"), "\uFFFD"))
                        .text());
    }

    @Test
    void moreThanFourMegabytesAreRefused() throws IOException {
        Path file = folder.resolve("big.csv");
        Files.write(file, new byte[TextFile.MOST_BYTES + 1]);
        assertTrue(refused(file).contains("larger than 4 MB"));
        Files.write(file, "a".repeat(TextFile.MOST_BYTES).getBytes(StandardCharsets.US_ASCII));
        assertEquals(TextFile.MOST_BYTES, TextFile.read(file).text().length());
    }

    @Test
    void aDeviceIsRefusedWithoutBeingRead() {
        Path device = Path.of("/dev/zero");
        assumeTrue(Files.exists(device));
        assertTrue(refused(device).contains("not an ordinary file"));
    }

    @Test
    void aFileThatMayNotBeReadIsRefused() throws IOException {
        Path file = Files.writeString(folder.resolve("locked.toml"), "a = 1");
        assumeTrue(Files.getFileStore(file).supportsFileAttributeView("posix"));
        Files.setPosixFilePermissions(file, PosixFilePermissions.fromString("---------"));
        assumeTrue(!Files.isReadable(file), "an administrator may read everything");
        assertTrue(refused(file).contains("permissions forbid it"));
    }

    private static String refused(Path file) {
        FileRefusal refusal = assertThrows(FileRefusal.class, () -> TextFile.read(file));
        assertTrue(refusal.getMessage().startsWith(file + ": "), refusal.getMessage());
        return refusal.getMessage();
    }
}
