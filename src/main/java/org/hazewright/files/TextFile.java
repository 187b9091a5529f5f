package org.hazewright.files;

import java.io.IOException;
import java.io.InputStream;
import java.nio.ByteBuffer;
import java.nio.charset.CharacterCodingException;
import java.nio.charset.CodingErrorAction;
import java.nio.charset.StandardCharsets;
import java.nio.file.AccessDeniedException;
import java.nio.file.Files;
import java.nio.file.NoSuchFileException;
import java.nio.file.Path;
import java.nio.file.attribute.BasicFileAttributes;
import java.security.MessageDigest;
import java.security.NoSuchAlgorithmException;
import java.util.HexFormat;
import java.util.List;
import java.util.stream.Stream;
import org.hazewright.shelf.Nearest;

/**
 * The text of a file, read whole: UTF-8 without its byte order mark, at most 4 MB, from an ordinary file.
 *
 * <p>{@code path} is how messages name it. Missing files, folders, devices, pipes, other encodings and larger files are refused.
 */
record TextFile(String path, String text, byte[] bytes) {
    static final int MOST_BYTES = 4_000_000;

    static TextFile read(Path file) {
        return read(file, file.toString());
    }

    static TextFile read(Path file, String shown) {
        Place whole = Place.whole(shown);
        byte[] bytes = bytes(file, whole);
        if (bytes.length > MOST_BYTES)
            throw whole.refusal(
                    "The file is larger than 4 MB; a text file of this kind is far smaller. Was the right file named?");
        return new TextFile(shown, decoded(bytes, shown), bytes);
    }

    private static byte[] bytes(Path file, Place whole) {
        try {
            BasicFileAttributes is = Files.readAttributes(file, BasicFileAttributes.class);
            if (is.isDirectory()) throw whole.refusal("This is a folder; name a file in it.");
            if (!is.isRegularFile())
                throw whole.refusal("This is a device or a pipe and not an ordinary file; name a text file.");
            try (InputStream in = Files.newInputStream(file)) {
                return in.readNBytes(MOST_BYTES + 1);
            }
        } catch (AccessDeniedException e) {
            throw whole.refusal("The file may not be read; its permissions forbid it. Ask its owner, or copy it.");
        } catch (NoSuchFileException e) {
            throw whole.refusal(missing(file));
        } catch (IOException e) {
            throw whole.refusal("The file could not be read (" + e.getMessage() + ").");
        }
    }

    private static String missing(Path file) {
        Path folder = file.toAbsolutePath().getParent();
        if (folder == null || file.getFileName() == null) return "There is no such file.";
        if (!Files.isDirectory(folder))
            return "There is no such file; the folder " + folder.getFileName() + " does not exist either.";
        try (Stream<Path> entries = Files.list(folder)) {
            List<String> names =
                    entries.limit(2000).map(p -> p.getFileName().toString()).toList();
            return "There is no such file."
                    + Nearest.to(file.getFileName().toString(), names)
                            .map(n -> " Perhaps " + n + " is meant.")
                            .orElse("");
        } catch (IOException e) {
            return "There is no such file.";
        }
    }

    private static String decoded(byte[] bytes, String shown) {
        String text = new String(bytes, StandardCharsets.UTF_8);
        if (text.indexOf('\uFFFD') >= 0) refuseOtherEncodings(bytes, shown); // only then is something perhaps not UTF-8
        return text.startsWith("\uFEFF") ? text.substring(1) : text;
    }

    private static void refuseOtherEncodings(byte[] bytes, String shown) {
        ByteBuffer in = ByteBuffer.wrap(bytes);
        try {
            StandardCharsets.UTF_8
                    .newDecoder()
                    .onMalformedInput(CodingErrorAction.REPORT)
                    .onUnmappableCharacter(CodingErrorAction.REPORT)
                    .decode(in);
        } catch (CharacterCodingException e) {
            // The decoder stops with the buffer at the first byte that is not UTF-8.
            String before = new String(bytes, 0, in.position(), StandardCharsets.UTF_8);
            int line = (int) before.chars().filter(c -> c == '\n').count() + 1;
            int column = before.length() - (before.lastIndexOf('\n') + 1) + 1;
            throw new FileRefusal(
                    shown,
                    line,
                    column,
                    "The file is not UTF-8 text: a byte here belongs to another encoding. Save it as UTF-8 in your editor.");
        }
    }

    /** Of the file's bytes, in lower-case hexadecimal. */
    String sha256() {
        try {
            return HexFormat.of().formatHex(MessageDigest.getInstance("SHA-256").digest(bytes));
        } catch (NoSuchAlgorithmException e) {
            throw new IllegalStateException(e); // every Java platform has SHA-256
        }
    }
}
