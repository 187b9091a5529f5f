package org.hazewright.sheet;

import java.io.ByteArrayInputStream;
import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.time.LocalDateTime;
import java.util.Date;
import java.util.Optional;
import java.util.zip.ZipEntry;
import java.util.zip.ZipInputStream;
import java.util.zip.ZipOutputStream;
import org.apache.poi.ooxml.POIXMLProperties.CoreProperties;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;

/**
 * A workbook as bytes that depend on its content only: equal input gives equal bytes, so that a sheet under version control
 * changes when its recipe does. The dates in its properties and in the archive are fixed.
 */
final class FixedBytes {
    private static final LocalDateTime DAY = LocalDateTime.of(2000, 1, 1, 0, 0);

    @SuppressWarnings("JavaUtilDate") // as the library wants it
    private static final Date INSTANT = new Date(946684800000L); // 2000-01-01T00:00Z

    private FixedBytes() {}

    static byte[] of(XSSFWorkbook workbook, String title) {
        CoreProperties core = workbook.getProperties().getCoreProperties();
        core.setCreator("Hazewright");
        core.setTitle(SafeText.of(title));
        core.setCreated(Optional.of(INSTANT));
        core.setModified(Optional.of(INSTANT));
        workbook.getProperties().getExtendedProperties().setApplication("Hazewright");
        try {
            ByteArrayOutputStream raw = new ByteArrayOutputStream(1 << 16);
            workbook.write(raw);
            return withFixedTimes(raw.toByteArray());
        } catch (IOException e) {
            throw new UncheckedIOException("The workbook could not be put together.", e);
        }
    }

    private static byte[] withFixedTimes(byte[] archive) throws IOException {
        ByteArrayOutputStream out = new ByteArrayOutputStream(archive.length);
        try (ZipInputStream in = new ZipInputStream(new ByteArrayInputStream(archive));
                ZipOutputStream zip = new ZipOutputStream(out)) {
            for (ZipEntry entry = in.getNextEntry(); entry != null; entry = in.getNextEntry()) {
                ZipEntry fixed = new ZipEntry(entry.getName());
                fixed.setTimeLocal(DAY);
                zip.putNextEntry(fixed);
                in.transferTo(zip);
                zip.closeEntry();
            }
        }
        return out.toByteArray();
    }
}
