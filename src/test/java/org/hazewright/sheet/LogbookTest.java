package org.hazewright.sheet;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.io.InputStream;
import java.io.OutputStream;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.SplittableRandom;
import java.util.stream.Collectors;
import org.apache.poi.ss.usermodel.ClientAnchor;
import org.apache.poi.xssf.usermodel.XSSFCellStyle;
import org.apache.poi.xssf.usermodel.XSSFSheet;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;
import org.hazewright.batch.Batch;
import org.hazewright.batch.Measurement;
import org.hazewright.bench.Answer;
import org.hazewright.learning.MeasuredValue;
import org.hazewright.learning.Method;
import org.hazewright.learning.Quantity;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** A logbook is shared with people, with spreadsheet programs and with the power going out. */
class LogbookTest {
    @TempDir
    Path folder;

    private static Batch batch(String id, LocalDate day) {
        Answer a = Answers.bath();
        Batch b = Batch.open(id, a.recipe(), Optional.of(a.brief()), "bench 2", day);
        for (int n = 0; n < b.weighings().size(); n++)
            b = b.withWeighed(n, b.weighings().get(n).massG());
        return b.withMeasured(new Measurement(
                day,
                new Method("slab fit", 0.02, 0.02),
                "",
                0,
                List.of(
                        new MeasuredValue(Quantity.ABSORPTION, 830, 0.080, 0.001),
                        new MeasuredValue(Quantity.SCATTERING, 830, 7.8, 0.1))));
    }

    private static Logbook.Recorded record(Path logbook, String id, int day) {
        Batch b = batch(id, LocalDate.of(2026, 3, 1).plusDays(day));
        return Logbook.record(logbook, b, logbook.resolveSibling(id + ".batch.toml"));
    }

    private static List<String> ids(Path logbook) {
        return Logbook.batches(logbook).stream()
                .map(r -> r.get(LogbookEntry.BATCH).toString())
                .toList();
    }

    private static XSSFWorkbook open(Path file) throws IOException {
        try (InputStream in = Files.newInputStream(file)) {
            return new XSSFWorkbook(in);
        }
    }

    @Test
    void oneRowABatchHoweverOftenItIsRecorded() throws IOException {
        Path logbook = folder.resolve("logbook.xlsx");
        record(logbook, "b-1", 0);
        record(logbook, "b-2", 3);
        record(logbook, "b-1", 0);
        assertEquals(List.of("b-1", "b-2"), ids(logbook));
        Map<String, Object> row = Logbook.batches(logbook).get(1);
        assertEquals(LocalDate.of(2026, 3, 4), row.get("date"));
        assertEquals("ink-demo K3; lipid-emulsion-20 L07", row.get("lots"));
        assertEquals("weighed, measured", row.get("state"));
        try (XSSFWorkbook w = open(logbook)) {
            assertEquals(4, rows(w.getSheet("Values")), "two values of two batches");
            assertEquals(2, rows(w.getSheet("Lots")));
            XSSFSheet charts = w.getSheet("Charts");
            String shown =
                    charts.getDrawingPatriarch().getCharts().get(0).getCTChart().toString();
            assertTrue(shown.contains("Values!$B$5:$B$8"), "the chart follows the rows");
        }
        assertTrue(Files.exists(folder.resolve("logbook.xlsx.previous")));
    }

    private static int rows(XSSFSheet sheet) {
        int n = 0;
        for (int r = 4; r <= sheet.getLastRowNum(); r++)
            if (sheet.getRow(r) != null
                    && sheet.getRow(r).getCell(0) != null
                    && !sheet.getRow(r).getCell(0).getStringCellValue().isEmpty()) n++;
        return n;
    }

    @Test
    void whatPeopleAddedStays() throws IOException {
        Path logbook = folder.resolve("logbook.xlsx");
        record(logbook, "b-1", 0);
        try (XSSFWorkbook w = open(logbook)) {
            XSSFSheet s = w.getSheet("Batches");
            w.setSheetName(w.getSheetIndex(s), "Our batches");
            s.shiftRows(0, s.getLastRowNum(), 2);
            int own = s.getRow(5).getLastCellNum();
            s.getRow(5).createCell(own).setCellValue("shelf in the cold room");
            s.getRow(6).createCell(own).setCellValue("B3");
            XSSFCellStyle red = w.createCellStyle();
            red.cloneStyleFrom(s.getRow(6).getCell(2).getCellStyle());
            red.setFillForegroundColor((short) 10);
            red.setFillPattern(org.apache.poi.ss.usermodel.FillPatternType.SOLID_FOREGROUND);
            s.getRow(6).getCell(2).setCellStyle(red);
            ClientAnchor anchor = w.getCreationHelper().createClientAnchor();
            var comment = s.createDrawingPatriarch().createCellComment(anchor);
            comment.setString(w.getCreationHelper().createRichTextString("a bubble at the edge"));
            s.getRow(6).getCell(0).setCellComment(comment);
            s.createRow(8).createCell(0).setCellValue("");
            s.getRow(8).createCell(3).setCellValue("sum of the year");
            XSSFSheet mine = w.createSheet("My own page");
            mine.createRow(0).createCell(0).setCellFormula("'Our batches'!A7");
            try (OutputStream out = Files.newOutputStream(logbook)) {
                w.write(out);
            }
        }
        for (int k = 2; k < 6; k++)
            assertEquals(Optional.empty(), record(logbook, "b-" + k, k).waiting());
        assertEquals(List.of("b-1", "b-2", "b-3", "b-4", "b-5"), ids(logbook));
        try (XSSFWorkbook w = open(logbook)) {
            XSSFSheet s = w.getSheet("Our batches");
            int own = s.getRow(5).getLastCellNum() - 1;
            assertEquals("shelf in the cold room", s.getRow(5).getCell(own).getStringCellValue());
            assertEquals("B3", s.getRow(6).getCell(own).getStringCellValue());
            assertEquals(10, s.getRow(6).getCell(2).getCellStyle().getFillForegroundColor());
            assertEquals(
                    "a bubble at the edge",
                    s.getRow(6).getCell(0).getCellComment().getString().getString());
            assertEquals(
                    "'Our batches'!A7",
                    w.getSheet("My own page").getRow(0).getCell(0).getCellFormula());
            boolean sum = false;
            for (var row : s) for (var c : row) sum |= c.toString().equals("sum of the year");
            assertTrue(sum, "what stood below the table moved down");
        }
    }

    @Test
    void whileItIsOpenElsewhereTheRecordWaitsBesideIt() throws IOException {
        Path logbook = folder.resolve("logbook.xlsx");
        record(logbook, "b-1", 0);
        byte[] before = Files.readAllBytes(logbook);
        for (String lock : new String[] {"~$logbook.xlsx", ".~lock.logbook.xlsx#"}) {
            Path file = Files.createFile(folder.resolve(lock));
            Logbook.Recorded waits = record(logbook, "b-" + (lock.startsWith("~") ? 2 : 3), 2);
            assertTrue(waits.waiting().orElseThrow().contains(lock), waits.toString());
            assertTrue(waits.waiting().get().contains(waits.kept().toString()), "says where the record is");
            assertTrue(Files.exists(waits.kept()));
            Files.delete(file);
        }
        assertEquals(-1, java.util.Arrays.mismatch(before, Files.readAllBytes(logbook)), "not touched");
        Logbook.Recorded later = record(logbook, "b-4", 4);
        assertEquals(2, later.merged());
        assertEquals(Set.of("b-1", "b-2", "b-3", "b-4"), Set.copyOf(ids(logbook)));
        assertFalse(Files.exists(folder.resolve("logbook.waiting.b-2.xlsx")), "taken over and gone");
        try (XSSFWorkbook w = open(logbook)) {
            assertEquals(8, rows(w.getSheet("Values")), "values too");
        }
    }

    @Test
    void aStrangersWorkbookIsLeftAloneAndTheRecordKept() throws IOException {
        Path logbook = folder.resolve("logbook.xlsx");
        try (XSSFWorkbook w = new XSSFWorkbook();
                OutputStream out = Files.newOutputStream(logbook)) {
            w.createSheet("accounts");
            w.write(out);
        }
        byte[] before = Files.readAllBytes(logbook);
        Logbook.Recorded r = record(logbook, "b-1", 0);
        assertTrue(r.waiting().orElseThrow().contains("not a logbook"), r.toString());
        assertEquals(-1, java.util.Arrays.mismatch(before, Files.readAllBytes(logbook)));
        assertEquals(List.of("b-1"), ids(r.kept()));
    }

    /** Killed at random moments; -Dlogbook.kills=200 makes it two hundred. */
    @Test
    void everyAcknowledgedBatchSurvivesBeingKilled() throws Exception {
        Path logbook = folder.resolve("logbook.xlsx");
        int kills = Integer.getInteger("logbook.kills", 8);
        SplittableRandom random = new SplittableRandom(5);
        Set<String> acknowledged = new java.util.LinkedHashSet<>();
        for (int k = 0; k < kills; k++) {
            Path said = folder.resolve("said-" + k + ".txt");
            Process p = new ProcessBuilder(
                            Path.of(System.getProperty("java.home"), "bin", "java")
                                    .toString(),
                            "-cp",
                            System.getProperty("java.class.path"),
                            "-Xmx256m",
                            Appender.class.getName(),
                            logbook.toString(),
                            "k" + k)
                    .redirectOutput(said.toFile())
                    .start();
            while (p.isAlive() && !Files.readString(said).startsWith("ready")) Thread.sleep(20);
            assertTrue(p.isAlive(), "it appends until it is killed");
            Thread.sleep(random.nextInt(900));
            p.destroyForcibly().waitFor();
            String text = Files.readString(said);
            text.substring(0, text.lastIndexOf('\n') + 1) // a line that was cut short was not said
                    .lines()
                    .filter(line -> line.startsWith("done "))
                    .forEach(line -> acknowledged.add(line.substring(5)));
        }
        assertTrue(acknowledged.size() >= kills / 2, "appends went through between the kills: " + acknowledged.size());
        record(logbook, "last", 9);
        List<String> held = ids(logbook);
        List<String> lost = new ArrayList<>(acknowledged);
        lost.removeAll(held);
        assertEquals(List.of(), lost);
        assertEquals(held.size(), held.stream().distinct().count());
        try (var all = Files.list(folder)) {
            assertEquals(
                    "",
                    all.map(f -> f.getFileName().toString())
                            .filter(f -> f.endsWith(".part") || f.contains(".waiting."))
                            .collect(Collectors.joining(" ")),
                    "leftovers are swept");
        }
    }

    /** Appends without end and says so after each. */
    static final class Appender {
        public static void main(String[] args) {
            Path logbook = Path.of(args[0]);
            Logbook.record(logbook, entry(args[1] + "-first")); // everything loaded
            System.out.println("ready");
            System.out.println("done " + args[1] + "-first");
            for (int n = 0; ; n++) {
                String id = args[1] + "-" + n;
                Logbook.Recorded r = Logbook.record(logbook, entry(id));
                if (r.waiting().isEmpty()) System.out.println("done " + id);
            }
        }

        private static LogbookEntry entry(String id) {
            Map<String, Object> row = new LinkedHashMap<>();
            row.put(LogbookEntry.BATCH, id);
            row.put(LogbookEntry.DATE, LocalDate.of(2026, 3, 1));
            row.put(LogbookEntry.LOTS, "ink-demo K3");
            Map<String, Object> value = new LinkedHashMap<>(row);
            value.put(LogbookEntry.KEY, id + " / 1");
            value.put(LogbookEntry.MUA_RATIO, 1.01);
            return new LogbookEntry(row, List.of(value));
        }
    }
}
