package org.hazewright.hard;

import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.concurrent.ConcurrentHashMap;
import java.util.stream.Collectors;
import java.util.zip.Deflater;
import java.util.zip.ZipEntry;
import java.util.zip.ZipInputStream;
import java.util.zip.ZipOutputStream;
import org.apache.poi.ss.SpreadsheetVersion;
import org.apache.poi.ss.util.AreaReference;
import org.apache.poi.xssf.usermodel.XSSFCell;
import org.apache.poi.xssf.usermodel.XSSFRow;
import org.apache.poi.xssf.usermodel.XSSFSheet;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;

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

    /** A workbook with nothing but the pages that these names point to: what a reader looks at, and much faster to open. */
    static byte[] pages(Path workbook, List<String> names) throws IOException {
        try (XSSFWorkbook book = new XSSFWorkbook(Files.newInputStream(workbook))) {
            Set<String> kept = names.stream()
                    .map(n -> new AreaReference(book.getName(n).getRefersToFormula(), SpreadsheetVersion.EXCEL2007))
                    .map(a -> a.getFirstCell().getSheetName())
                    .collect(Collectors.toSet());
            for (int k = book.getNumberOfSheets() - 1; k >= 0; k--)
                if (!kept.contains(book.getSheetName(k))) book.removeSheetAt(k);
            return bytes(book);
        }
    }

    /** A workbook of one page with these texts and numbers, as people have them. */
    static byte[] page(List<List<Object>> rows) throws IOException {
        try (XSSFWorkbook book = new XSSFWorkbook()) {
            XSSFSheet sheet = book.createSheet("measured");
            for (List<Object> cells : rows) {
                XSSFRow row = sheet.createRow(sheet.getPhysicalNumberOfRows());
                for (Object value : cells) {
                    XSSFCell cell = row.createCell(row.getPhysicalNumberOfCells());
                    if (value instanceof Number n) cell.setCellValue(n.doubleValue());
                    else cell.setCellValue(value.toString());
                }
            }
            return bytes(book);
        }
    }

    private static byte[] bytes(XSSFWorkbook book) throws IOException {
        ByteArrayOutputStream out = new ByteArrayOutputStream();
        book.write(out);
        return out.toByteArray();
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
