package org.hazewright.sheet;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNull;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.ByteArrayInputStream;
import java.io.IOException;
import java.time.LocalDate;
import java.util.List;
import org.apache.poi.ss.usermodel.CellType;
import org.apache.poi.ss.usermodel.Row;
import org.apache.poi.xssf.usermodel.XSSFSheet;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;
import org.hazewright.bench.Answer;
import org.hazewright.bench.Answering;
import org.hazewright.brief.Brief;
import org.hazewright.files.BriefReader;
import org.hazewright.files.ShelfReader;
import org.hazewright.files.TissueSpectra;
import org.hazewright.reading.Foreseen;
import org.hazewright.reading.Quantity;
import org.hazewright.reading.Reading;
import org.hazewright.reading.SetUp;
import org.junit.jupiter.api.Test;

class ReadingsPageTest {
    private static final LocalDate DAY = LocalDate.of(2026, 3, 2);

    private static Answer answer(String demo) {
        Brief brief = BriefReader.readShipped(demo);
        return Answering.to(brief, ShelfReader.readShipped(), 0, () -> false, share -> {});
    }

    @Test
    void thePageHoldsTheReadings() throws IOException {
        Answer answer = answer("wrist-bath");
        byte[] bytes = RecipeSheet.write(answer, DAY, TissueSpectra::shipped);
        try (XSSFWorkbook book = new XSSFWorkbook(new ByteArrayInputStream(bytes))) {
            XSSFSheet page = book.getSheet("Readings");
            assertEquals(3, page.getDrawingPatriarch().getCharts().size(), "reflectance, phase, time");
            InstrumentReadings readings = InstrumentReadings.of(answer, TissueSpectra::shipped);
            Foreseen beam = readings.foreseen().stream()
                    .filter(f -> f.setUp().kind() == SetUp.Kind.COLLIMATED)
                    .findFirst()
                    .orElseThrow();
            List<Reading> total = beam.readings().stream()
                    .filter(r -> r.quantity() == Quantity.UNSCATTERED_TRANSMITTANCE)
                    .toList();
            Row row = row(page, "unscattered transmittance");
            for (int j = 0; j < 2; j++) {
                assertEquals(total.get(j).value(), row.getCell(2 + 2 * j).getNumericCellValue(), 1e-12);
                assertEquals(total.get(j).u(), row.getCell(3 + 2 * j).getNumericCellValue(), 1e-12);
            }
            assertTrue(row(page, "unscattered transmittance")
                    .getCell(7)
                    .getStringCellValue()
                    .startsWith("doubtful"));
        }
    }

    private static Row row(XSSFSheet page, String what) {
        for (Row r : page)
            if (r.getCell(0) != null
                    && r.getCell(0).getCellType() == CellType.STRING
                    && r.getCell(0).getStringCellValue().equals(what)) return r;
        throw new AssertionError("no row " + what);
    }

    @Test
    void packetsAreNeverFollowedForASheet() {
        InstrumentReadings readings = InstrumentReadings.of(answer("forearm-block"), TissueSpectra::shipped);
        for (Foreseen f : readings.foreseen())
            for (Reading r : f.readings()) assertFalse(r.model().contains("packets"), r.toString());
        assertEquals(2, readings.leftOut().size(), readings.leftOut().toString());
        assertTrue(readings.leftOut().get(0).startsWith("Near probe"));
        assertTrue(
                readings.leftOut().get(1).startsWith("Slab"),
                "transport is the command's, since a sheet must be quick");
    }

    @Test
    void equalInputGivesEqualBytes() {
        Answer answer = answer("bench-slab");
        assertArrayEquals(
                RecipeSheet.write(answer, DAY, TissueSpectra::shipped),
                RecipeSheet.write(answer, DAY, TissueSpectra::shipped));
    }

    /** Tables that cannot be had cost the oximeters, not the sheet. */
    @Test
    void withoutHaemoglobinTables() throws IOException {
        byte[] bytes = RecipeSheet.write(answer("wrist-bath"), DAY, () -> {
            throw new org.hazewright.optics.Refusal("no table");
        });
        try (XSSFWorkbook book = new XSSFWorkbook(new ByteArrayInputStream(bytes))) {
            XSSFSheet page = book.getSheet("Readings");
            assertTrue(row(page, "Not here: Oximeter, two colours: no table").getRowNum() > 10);
        }
    }

    @Test
    void withoutReadingsThereIsNoSuchPage() throws IOException {
        byte[] bytes = RecipeSheet.write(answer("wrist-bath"), DAY);
        try (XSSFWorkbook book = new XSSFWorkbook(new ByteArrayInputStream(bytes))) {
            assertNull(book.getSheet("Readings"));
        }
    }
}
