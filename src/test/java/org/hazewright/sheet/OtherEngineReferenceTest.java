package org.hazewright.sheet;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.junit.jupiter.api.Assertions.fail;

import java.io.IOException;
import java.io.OutputStream;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;
import java.util.concurrent.TimeUnit;
import java.util.regex.Pattern;
import org.apache.poi.ss.usermodel.Cell;
import org.apache.poi.ss.usermodel.CellType;
import org.apache.poi.xssf.usermodel.XSSFCell;
import org.hazewright.bench.Answer;
import org.junit.jupiter.api.Assumptions;
import org.junit.jupiter.api.BeforeAll;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/**
 * A spreadsheet engine other than the writer computes the same: LibreOffice, from copies that hold no computed values. Skipped
 * where it is not installed (Debian package libreoffice-calc).
 */
class OtherEngineReferenceTest {
    private static final String CSV = "csv:Text - txt - csv (StarCalc):44,34,76,1,,0,false,true,false,false,false,-1";

    @TempDir
    static Path folder;

    /** Each answer with grams filled in, and the same as POI computes it. */
    private static final Map<String, Filled> SHEETS = new TreeMap<>();

    @BeforeAll
    static void recompute() throws Exception {
        Assumptions.assumeTrue(
                installed(), "LibreOffice (soffice) is not installed: sheets were not recomputed by another engine.");
        put("gelatin", Answers.gelatin(), 1.02);
        put("bath", Answers.bath(), 0.97);
        put("slab", Answers.silicone("Slab", "part B", "From memory."), 1);
        List<String> files = new ArrayList<>();
        for (var entry : SHEETS.entrySet()) {
            Path file = folder.resolve(entry.getKey() + ".xlsx");
            for (Cell c : entry.getValue().formulas())
                ((XSSFCell) c).getCTCell().unsetV();
            try (OutputStream out = Files.newOutputStream(file)) {
                entry.getValue().workbook.write(out);
            }
            files.add(file.toString());
        }
        convert(CSV, files);
    }

    private static void put(String name, Answer a, double factor) {
        Filled sheet = Filled.of(a);
        for (int n = 0; n < sheet.weighed().size(); n += 2) {
            double planned =
                    Filled.beside(sheet.weighed().get(n), FillInPlan.PLANNED).getNumericCellValue();
            sheet.weigh(n, planned * factor);
        }
        SHEETS.put(name, sheet);
    }

    @Test
    void everyFormulaAgrees() throws IOException {
        int numbers = 0;
        int words = 0;
        for (var entry : SHEETS.entrySet()) {
            Filled sheet = entry.getValue();
            Map<String, List<List<String>>> tables = new TreeMap<>();
            for (Cell c : sheet.formulas()) {
                String name = c.getSheet().getSheetName();
                if (!tables.containsKey(name)) tables.put(name, table(entry.getKey(), name));
                String theirs = tables.get(name).get(c.getRowIndex()).get(c.getColumnIndex());
                String where = entry.getKey() + " " + Filled.where(c) + " = " + c.getCellFormula();
                if (sheet.value(c).getCellType() == CellType.NUMERIC) {
                    double ours = sheet.number(c);
                    assertEquals(ours, Double.parseDouble(theirs), 1e-9 * Math.max(1e-9, Math.abs(ours)), where);
                    numbers++;
                } else {
                    assertEquals(sheet.word(c), theirs, where);
                    words++;
                }
            }
        }
        assertTrue(numbers > 100 && words > 50, numbers + " numbers and " + words + " words were compared");
    }

    @Test
    void recipePrintsOnOnePage() throws Exception {
        List<String> files = new ArrayList<>();
        for (var entry : SHEETS.entrySet()) {
            var workbook = entry.getValue().workbook;
            for (int k = 1; k < workbook.getNumberOfSheets(); k++) {
                workbook.setSheetHidden(k, true);
                workbook.removePrintArea(k); // a print area is printed even when its sheet is hidden
            }
            Path file = folder.resolve(entry.getKey() + "-page.xlsx");
            try (OutputStream out = Files.newOutputStream(file)) {
                workbook.write(out);
            }
            files.add(file.toString());
        }
        convert("pdf", files);
        for (String name : SHEETS.keySet()) {
            String pdf = Files.readString(folder.resolve(name + "-page.pdf"), StandardCharsets.ISO_8859_1);
            assertEquals(
                    1,
                    Pattern.compile("/Type\\s*/Page\\b(?!s)")
                            .matcher(pdf)
                            .results()
                            .count(),
                    name);
        }
    }

    private static boolean installed() throws InterruptedException {
        try {
            return new ProcessBuilder("soffice", "--version")
                            .redirectErrorStream(true)
                            .redirectOutput(ProcessBuilder.Redirect.DISCARD)
                            .start()
                            .waitFor()
                    == 0;
        } catch (IOException notThere) {
            return false;
        }
    }

    private static void convert(String to, List<String> files) throws Exception {
        List<String> command = new ArrayList<>(List.of(
                "soffice",
                "--headless",
                "-env:UserInstallation=" + folder.resolve("profile").toUri(),
                "--convert-to",
                to,
                "--outdir",
                folder.toString()));
        command.addAll(files);
        Path log = folder.resolve("soffice.log");
        Process p = new ProcessBuilder(command)
                .redirectErrorStream(true)
                .redirectOutput(log.toFile())
                .start();
        if (!p.waitFor(5, TimeUnit.MINUTES)) {
            p.destroyForcibly();
            fail("LibreOffice did not finish: " + Files.readString(log));
        }
        assertEquals(0, p.exitValue(), Files.readString(log));
    }

    private static List<List<String>> table(String file, String sheet) throws IOException {
        List<List<String>> rows = new ArrayList<>();
        String text = Files.readString(folder.resolve(file + "-" + sheet + ".csv"));
        List<String> row = new ArrayList<>();
        StringBuilder field = new StringBuilder();
        boolean quoted = false;
        for (int k = 0; k < text.length(); k++) {
            char c = text.charAt(k);
            if (c == '"') {
                if (quoted && k + 1 < text.length() && text.charAt(k + 1) == '"') field.append(text.charAt(k++));
                else quoted = !quoted;
            } else if (!quoted && (c == ',' || c == '\n')) {
                row.add(field.toString());
                field.setLength(0);
                if (c == '\n') {
                    rows.add(row);
                    row = new ArrayList<>();
                }
            } else field.append(c);
        }
        return rows;
    }
}
