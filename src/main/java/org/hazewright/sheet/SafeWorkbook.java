package org.hazewright.sheet;

import java.io.IOException;
import java.io.InputStream;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Enumeration;
import java.util.Locale;
import java.util.zip.ZipEntry;
import java.util.zip.ZipException;
import java.util.zip.ZipFile;
import org.apache.poi.openxml4j.exceptions.InvalidFormatException;
import org.apache.poi.openxml4j.opc.OPCPackage;
import org.apache.poi.openxml4j.util.ZipSecureFile;
import org.apache.poi.ss.usermodel.Cell;
import org.apache.poi.ss.usermodel.CellType;
import org.apache.poi.ss.usermodel.Row;
import org.apache.poi.ss.usermodel.Sheet;
import org.apache.poi.util.IOUtils;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;
import org.hazewright.files.FileRefusal;

/**
 * Opens a workbook that somebody else may have made, within a memory bound: what could run, reach out or burst is refused before
 * anything is parsed.
 *
 * <p>Refused: what is no .xlsx, files above {@value #MOST_BYTES} bytes, archives that unpack to more than the caller's bound (counted while
 * unpacking, not as declared), more than {@value #MOST_PARTS} parts, macros, links to other workbooks, embedded programs, document type
 * declarations (entities that multiply).
 */
final class SafeWorkbook {
    static final long MOST_BYTES = 20_000_000;
    static final int MOST_PARTS = 2_000;

    /** Unpacked bytes of a sheet that was filled in: ours have below a megabyte; parsing takes some ten times as much memory. */
    static final long SHEET = 16_000_000;

    /** Unpacked bytes of a logbook: some ten thousand batches. */
    static final long LOGBOOK = 64_000_000;

    static {
        ZipSecureFile.setMinInflateRatio(0.002);
        ZipSecureFile.setMaxEntrySize(LOGBOOK);
        IOUtils.setByteArrayMaxOverride((int) LOGBOOK);
    }

    private SafeWorkbook() {}

    static XSSFWorkbook open(Path file, long mostUnpacked) {
        check(file, mostUnpacked);
        try (InputStream in = Files.newInputStream(file)) {
            XSSFWorkbook workbook = new XSSFWorkbook(OPCPackage.open(in));
            // A page whose part is not found is passed over in silence, and would be gone when the workbook is written.
            if (workbook.getNumberOfSheets()
                    < workbook.getCTWorkbook().getSheets().sizeOfSheetArray())
                throw new IOException("a page is missing");
            readEveryCell(workbook);
            return workbook;
        } catch (IOException | InvalidFormatException | RuntimeException e) {
            throw refusal(
                    file,
                    "The workbook is damaged and could not be read. Open it in a spreadsheet program, save it anew as .xlsx, and"
                            + " try again.",
                    e);
        }
    }

    /** Cells that are not what they say, a number of letters or a text that is nowhere, show only when they are asked. */
    private static void readEveryCell(XSSFWorkbook workbook) {
        for (Sheet sheet : workbook)
            for (Row row : sheet)
                for (Cell cell : row) {
                    boolean formula = cell.getCellType() == CellType.FORMULA;
                    switch (formula ? cell.getCachedFormulaResultType() : cell.getCellType()) {
                        case NUMERIC -> cell.getNumericCellValue();
                        case STRING -> cell.getStringCellValue();
                        case BOOLEAN -> cell.getBooleanCellValue();
                        default -> {}
                    }
                }
    }

    static FileRefusal refusal(Path file, String complaint) {
        return refusal(file, complaint, null);
    }

    private static FileRefusal refusal(Path file, String complaint, Exception cause) {
        return new FileRefusal(file.toString(), 0, 0, complaint, cause);
    }

    private static void check(Path file, long mostUnpacked) {
        if (Files.isDirectory(file)) throw refusal(file, "This is a folder; name a workbook in it.");
        if (!Files.isRegularFile(file)) throw refusal(file, "There is no such file.");
        try {
            if (Files.size(file) > MOST_BYTES)
                throw refusal(file, "The file is larger than 20 MB; a workbook of this kind is far smaller.");
            head(file);
            archive(file, mostUnpacked);
        } catch (ZipException e) {
            throw refusal(
                    file,
                    "The workbook is damaged: its archive cannot be unpacked. Take the version before it, or save it anew"
                            + " as .xlsx.",
                    e);
        } catch (IOException e) {
            throw refusal(file, "The file could not be read; look whether its disk and its permissions allow it.", e);
        }
    }

    private static void head(Path file) throws IOException {
        byte[] head;
        try (InputStream in = Files.newInputStream(file)) {
            head = in.readNBytes(8);
        }
        if (head.length >= 4 && (head[0] & 0xff) == 0xd0 && (head[1] & 0xff) == 0xcf)
            throw refusal(
                    file,
                    "This is an old workbook (.xls) or one with a password; save it as .xlsx without a password, and try"
                            + " again.");
        if (head.length < 4 || head[0] != 'P' || head[1] != 'K')
            throw refusal(file, "This is not a workbook (.xlsx); save it as .xlsx, or name another file.");
    }

    private static void archive(Path file, long mostUnpacked) throws IOException {
        long unpacked = 0;
        int parts = 0;
        boolean workbook = false;
        byte[] buffer = new byte[1 << 16];
        try (ZipFile zip = new ZipFile(file.toFile())) {
            Enumeration<? extends ZipEntry> entries = zip.entries();
            while (entries.hasMoreElements()) {
                ZipEntry entry = entries.nextElement();
                if (++parts > MOST_PARTS)
                    throw refusal(file, "The workbook has more than " + MOST_PARTS + " parts; it is not one of ours.");
                String name = entry.getName().toLowerCase(Locale.ROOT);
                workbook |= name.equals("xl/workbook.xml");
                refusePart(file, name);
                try (InputStream in = zip.getInputStream(entry)) {
                    boolean first = true;
                    for (int n = in.read(buffer); n > 0; n = in.read(buffer)) {
                        unpacked += n;
                        if (unpacked > mostUnpacked)
                            throw refusal(
                                    file,
                                    "The workbook unpacks to more than " + mostUnpacked / 1_000_000
                                            + " MB, far more than one of ours; it was not opened.");
                        if (first && isXml(name)) refuseDoctype(file, buffer, n);
                        first = false;
                    }
                }
            }
        }
        if (!workbook)
            throw refusal(
                    file, "This is an archive but not a workbook (.xlsx); save it as .xlsx, or name another file.");
    }

    private static boolean isXml(String name) {
        return name.endsWith(".xml") || name.endsWith(".rels") || name.endsWith(".vml");
    }

    private static void refusePart(Path file, String name) {
        if (name.contains("vbaproject") || name.startsWith("xl/macrosheets/"))
            throw refusal(file, "The workbook holds macros; save it as a plain .xlsx without them, and try again.");
        if (name.startsWith("xl/externallinks/"))
            throw refusal(
                    file,
                    "The workbook is linked to other workbooks; replace those links by their values, and try again.");
        if (name.startsWith("xl/embeddings/") || name.startsWith("xl/activex/"))
            throw refusal(file, "The workbook holds embedded files or controls; take them out, and try again.");
    }

    private static void refuseDoctype(Path file, byte[] buffer, int n) {
        String head = new String(buffer, 0, Math.min(n, 4096), StandardCharsets.ISO_8859_1);
        if (head.contains("<!DOCTYPE"))
            throw refusal(file, "The workbook holds a document type declaration, which no spreadsheet program writes.");
    }
}
