package org.hazewright.hard;

import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.LinkedHashMap;
import java.util.Map;
import java.util.concurrent.ConcurrentHashMap;
import java.util.zip.Deflater;
import java.util.zip.ZipEntry;
import java.util.zip.ZipInputStream;
import java.util.zip.ZipOutputStream;

/** A workbook taken apart, so that a change reaches what its parts say and is not lost in the packing. */
final class Parts {
    private static final Map<Path, Map<String, byte[]>> TAKEN_APART = new ConcurrentHashMap<>();

    private Parts() {}

    /** The workbook with the part named on the first line of {@code bytes} replaced by the rest; bytes of an archive as they are. */
    static byte[] replaced(Path workbook, byte[] bytes) {
        if (bytes.length > 1 && bytes[0] == 'P' && bytes[1] == 'K') return bytes;
        int end = 0;
        while (end < bytes.length && bytes[end] != '\n') end++;
        String name = new String(bytes, 0, end, StandardCharsets.ISO_8859_1);
        if (name.isEmpty() || name.length() > 200) name = "xl/workbook.xml";
        Map<String, byte[]> parts = new LinkedHashMap<>(TAKEN_APART.computeIfAbsent(workbook, Parts::of));
        parts.put(name, end < bytes.length ? java.util.Arrays.copyOfRange(bytes, end + 1, bytes.length) : new byte[0]);
        return packed(parts);
    }

    static Map<String, byte[]> of(Path workbook) {
        Map<String, byte[]> parts = new LinkedHashMap<>();
        try (ZipInputStream zip = new ZipInputStream(Files.newInputStream(workbook))) {
            for (ZipEntry e = zip.getNextEntry(); e != null; e = zip.getNextEntry())
                parts.put(e.getName(), zip.readAllBytes());
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
        return parts;
    }

    static byte[] packed(Map<String, byte[]> parts) {
        ByteArrayOutputStream out = new ByteArrayOutputStream();
        try (ZipOutputStream zip = new ZipOutputStream(out)) {
            zip.setLevel(Deflater.BEST_SPEED);
            for (Map.Entry<String, byte[]> part : parts.entrySet()) {
                zip.putNextEntry(new ZipEntry(part.getKey()));
                zip.write(part.getValue());
                zip.closeEntry();
            }
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
        return out.toByteArray();
    }
}
