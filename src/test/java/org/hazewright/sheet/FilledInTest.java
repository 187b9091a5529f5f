package org.hazewright.sheet;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.io.OutputStream;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.LocalDate;
import java.util.Optional;
import java.util.function.Consumer;
import java.util.zip.ZipEntry;
import java.util.zip.ZipOutputStream;
import org.apache.poi.ss.usermodel.CellStyle;
import org.apache.poi.ss.usermodel.Row;
import org.apache.poi.xssf.usermodel.XSSFSheet;
import org.hazewright.batch.Batch;
import org.hazewright.bench.Answer;
import org.hazewright.optics.Refusal;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** Sheets as people hand them back: filled in well, filled in oddly, and no sheets at all. */
class FilledInTest {
    @TempDir
    Path folder;

    private Path save(Filled sheet) {
        Path file = folder.resolve("sheet.xlsx");
        try (OutputStream out = Files.newOutputStream(file)) {
            sheet.workbook.write(out);
        } catch (IOException e) {
            throw new java.io.UncheckedIOException(e);
        }
        return file;
    }

    private Path sheet(Consumer<Filled> hands) {
        Filled sheet = Filled.of(Answers.gelatin());
        hands.accept(sheet);
        return save(sheet);
    }

    private static XSSFSheet page(Filled sheet) {
        return sheet.workbook.getSheet("Fill in");
    }

    private String refusal(Consumer<Filled> hands) {
        Path file = sheet(hands);
        String message = assertThrows(Refusal.class, () -> FilledIn.read(file)).getMessage();
        assertFalse(message.contains("Exception"), message);
        return message;
    }

    @Test
    void aFilledInSheetBecomesABatch() {
        Answer a = Answers.gelatin();
        Path file = sheet(s -> {
            s.weigh(0, 0.501);
            s.weigh(2, 230.02);
            s.weighed().get(3).setCellFormula("20.5+5.13");
            s.workbook.getCreationHelper().createFormulaEvaluator().evaluateAll();
            s.cells(Names.OPERATOR).get(0).setCellValue("bench 2");
            s.cells(Names.DATE).get(0).setCellValue(LocalDate.of(2026, 3, 2));
            Filled.beside(s.weighed().get(4), FillInPlan.LOT).setCellValue("L08");
        });
        Batch plan = Batch.open("b", a.recipe(), Optional.of(a.brief()), "", LocalDate.of(2026, 1, 1));
        Batch b = FilledIn.read(file).into(plan, file);
        assertEquals(3, b.weighedCount());
        assertEquals(0.501, b.weighedG().get(0).getAsDouble());
        assertEquals(25.63, b.weighedG().get(3).getAsDouble(), 1e-12, "loads with + between");
        assertEquals("bench 2", b.who());
        assertEquals(LocalDate.of(2026, 3, 2), b.on());
        assertEquals(Optional.of("L08"), b.plan().items().get(2).lot());
        assertEquals(230.02, b.asMade().items().get(0).massG());
        assertEquals(10.214, b.asMade().items().get(2).massG(), "not weighed yet: as planned");
    }

    @ParameterizedTest
    @CsvSource(
            delimiter = '|',
            value = {
                "229,9 | 229.9", // a decimal comma
                "229.9 g | 229.9", // a unit
                "229900 mg | 229.9",
                "0,2299 kg | 0.2299e3",
                "' 229,900 ' | 229.9", // near the plan only as a decimal comma
            })
    void typedTextIsReadWhereItCanBeMeant(String typed, double grams) {
        Path file = sheet(s -> s.weighed().get(2).setCellValue(typed));
        FilledIn read = FilledIn.read(file);
        assertEquals(grams, read.weighedG().get("item:1:water"), 1e-9);
        assertTrue(read.notes().get(0).contains("Fill in!E"), read.notes().get(0));
    }

    @Test
    void everyCellsProblemIsNamedInOneMessage() {
        String message = refusal(s -> {
            s.weighed().get(0).setCellValue("half a gram");
            s.weigh(2, -3);
            s.weigh(3, 25630);
            s.weighed().get(4).setCellValue(true);
            CellStyle date = s.workbook.createCellStyle();
            date.setDataFormat(s.workbook.createDataFormat().getFormat("yyyy-mm-dd"));
            s.weighed().get(5).setCellValue(45000);
            s.weighed().get(5).setCellStyle(date);
            s.cells(Names.DATE).get(0).setCellValue("last Tuesday");
        });
        assertTrue(message.contains("6 cells"), message);
        Filled same = Filled.of(Answers.gelatin());
        for (int n : new int[] {0, 2, 3, 4, 5})
            assertTrue(message.contains("Fill in!" + same.weighed().get(n).getAddress()), n + " in " + message);
        for (String word : new String[] {"half a gram", "-3 g", "another unit", "TRUE", "date", "last Tuesday"})
            assertTrue(message.contains(word), word + " in " + message);
    }

    @Test
    void aDeletedRowAndAnExtraOneAreNamed() {
        String deleted = refusal(s -> {
            Row row = s.weighed().get(4).getRow();
            page(s).removeRow(row);
        });
        assertTrue(deleted.contains("lipid-emulsion-20") && deleted.contains("deleted"), deleted);
        String extra = refusal(s -> {
            Row gap = page(s).getRow(s.weighed().get(5).getRowIndex() + 1);
            if (gap == null) gap = page(s).createRow(s.weighed().get(5).getRowIndex() + 1);
            gap.createCell(FillInPlan.WEIGHED).setCellValue(3.2);
        });
        assertTrue(extra.contains("3.2") && extra.contains("does not have"), extra);
    }

    @Test
    void aRenamedPageIsReadAllTheSame() {
        Path file = sheet(s -> {
            s.weigh(2, 230.5);
            s.workbook.setSheetName(s.workbook.getSheetIndex("Fill in"), "At the balance");
        });
        assertEquals(230.5, FilledIn.read(file).weighedG().get("item:1:water"));
    }

    @Test
    void otherFormatsAndOtherRecipesAreRefused() {
        assertTrue(refusal(s -> s.cells(Names.FORMAT).get(0).setCellValue(0)).contains("older"), "older");
        assertTrue(refusal(s -> s.cells(Names.FORMAT).get(0).setCellValue(9)).contains("newer"), "newer");
        assertTrue(refusal(s -> s.workbook.removeName(s.workbook.getName(Names.FORMAT)))
                .contains("not a recipe sheet"));
        Answer other = Answers.bath();
        Batch bath = Batch.open("b", other.recipe(), Optional.of(other.brief()), "", LocalDate.of(2026, 1, 1));
        Path file = sheet(s -> s.weigh(3, 25));
        String message = assertThrows(Refusal.class, () -> FilledIn.read(file).into(bath, file))
                .getMessage();
        assertTrue(message.contains("another recipe") && message.contains("gelatin-powder"), message);
    }

    @Test
    void whatIsNoWorkbookOfOursIsNotOpened() throws IOException {
        refused("PDF".getBytes(StandardCharsets.UTF_8), "not a workbook");
        refused(new byte[] {(byte) 0xd0, (byte) 0xcf, 0x11, (byte) 0xe0, 0, 0, 0, 0}, "old workbook");
        Path good = sheet(s -> {});
        byte[] bytes = Files.readAllBytes(good);
        refused(java.util.Arrays.copyOf(bytes, bytes.length / 2), "damaged");
        refused(zip("xl/vbaProject.bin", 10), "macros");
        refused(zip("xl/externalLinks/externalLink1.xml", 10), "linked");
        refused(zip("xl/embeddings/object1.bin", 10), "embedded");
        refused(zip("xl/worksheets/sheet1.xml", 400_000_000), "unpacks to more");
        refused(zip("other.txt", 10), "not a workbook");
        refused(text("xl/workbook.xml", "<!DOCTYPE a [<!ENTITY b 'c'>]><workbook/>"), "document type");
    }

    private void refused(byte[] bytes, String word) throws IOException {
        Path file = folder.resolve("other.xlsx");
        Files.write(file, bytes);
        String message = assertThrows(Refusal.class, () -> FilledIn.read(file)).getMessage();
        assertTrue(message.contains(word), message);
    }

    private static byte[] text(String name, String text) throws IOException {
        var out = new java.io.ByteArrayOutputStream();
        try (ZipOutputStream zip = new ZipOutputStream(out)) {
            zip.putNextEntry(new ZipEntry(name));
            zip.write(text.getBytes(StandardCharsets.UTF_8));
        }
        return out.toByteArray();
    }

    /** An archive whose one part is so many zeros. */
    private static byte[] zip(String name, int size) throws IOException {
        var out = new java.io.ByteArrayOutputStream();
        try (ZipOutputStream zip = new ZipOutputStream(out)) {
            zip.putNextEntry(new ZipEntry(name));
            byte[] zeros = new byte[1 << 20];
            for (int left = size; left > 0; left -= zeros.length) zip.write(zeros, 0, Math.min(left, zeros.length));
        }
        return out.toByteArray();
    }

    @Test
    void commasThatCouldMeanEitherAreNotGuessed() {
        assertTrue(TypedNumber.grams("1,234", 50).isEmpty(), "neither is near 50 g");
        assertEquals(1.234, TypedNumber.grams("1,234", 1.2).getAsDouble(), 1e-12);
        assertEquals(1234, TypedNumber.grams("1,234", 1200).getAsDouble(), 1e-9);
        assertEquals(1234.5, TypedNumber.grams("1.234,5", 1).getAsDouble(), 1e-9);
        assertEquals(1234.5, TypedNumber.grams("1,234.5 g", 1).getAsDouble(), 1e-9);
        for (String s : new String[] {"", "g", "1.2.3", "12 lb", "1e3", "NaN", "--2"})
            assertTrue(TypedNumber.grams(s, 1).isEmpty(), s);
    }
}
