package org.hazewright.sheet;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.apache.poi.ss.usermodel.Cell;
import org.apache.poi.ss.usermodel.CellType;
import org.hazewright.bench.Answer;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** Texts of files and people stay texts, whatever they begin with and whatever they hold. */
class SheetSafetyTest {

    @ParameterizedTest
    @ValueSource(strings = {"=1+2", "+1", "-1+cmd|' /C x'!A0", "@SUM(A1)", "\t=1", "  =HYPERLINK(\"x\")"})
    void textThatWouldRunStaysText(String evil) {
        Answer a = Answers.silicone(evil, evil, evil);
        Filled sheet = Filled.of(a);
        Filled benign = Filled.of(Answers.silicone("Slab", "part B", "From memory."));
        assertEquals(benign.formulas().size(), sheet.formulas().size(), "no text became a formula");
        int found = 0;
        for (var s : sheet.workbook)
            for (var row : s)
                for (Cell c : row) {
                    if (c.getCellType() != CellType.STRING
                            || !c.getStringCellValue().equals(evil)) continue;
                    found++;
                    assertTrue(c.getCellStyle().getQuotePrefixed(), Filled.where(c) + " is marked as text");
                }
        assertTrue(found >= 4, "title, name, citation and a sentence appear: " + found);
    }

    @Test
    void plainTextIsNotMarked() {
        Filled sheet = Filled.of(Answers.gelatin());
        Cell title = sheet.workbook.getSheet("Recipe").getRow(0).getCell(0);
        assertEquals("Forearm oximeter block", title.getStringCellValue());
        assertFalse(title.getCellStyle().getQuotePrefixed());
    }

    @Test
    void charactersThatAWorkbookCannotHoldAreDropped() {
        assertEquals("ab", SafeText.of("a\u0000\u0007b\u001b"));
        assertEquals("a\nb", SafeText.of("a\rb"));
        assertEquals("x", SafeText.of("x\ud800"));
        assertEquals("µs′ 😀", SafeText.of("µs′ 😀"));
        Filled sheet = Filled.of(Answers.silicone("T\u0001itle\ud800", "part B", "From memory."));
        assertEquals(
                "Title", sheet.workbook.getSheet("Recipe").getRow(0).getCell(0).getStringCellValue());
    }

    @Test
    void longTextIsCutToWhatACellHolds() {
        String cut = SafeText.of("x".repeat(40_000));
        assertEquals(SafeText.LONGEST, cut.length());
        assertTrue(cut.endsWith("…"));
        String face = "😀".repeat(20_000);
        assertFalse(Character.isHighSurrogate(
                SafeText.of(face).charAt(SafeText.of(face).length() - 2)));
        Filled sheet = Filled.of(Answers.silicone("Slab", "part B", "From memory. ".repeat(5000)));
        assertTrue(sheet.formulas().size() > 10);
    }

    @Test
    void nothingReachesOutOfTheWorkbook() throws Exception {
        Filled sheet = Filled.of(Answers.gelatin());
        assertTrue(sheet.workbook.getPackage().getParts().stream()
                .noneMatch(p -> p.getPartName().getName().contains("externalLink")));
        assertFalse(sheet.workbook.isMacroEnabled());
        for (Cell c : sheet.formulas())
            assertFalse(c.getCellFormula().matches(".*\\[\\d+].*|.*\\.xls.*|.*://.*"), Filled.where(c));
    }
}
