package org.hazewright.sheet;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.apache.poi.xssf.usermodel.XSSFFormulaEvaluator;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;
import org.junit.jupiter.api.Test;

/** The gauge draws inside as inside and outside as outside, in Java and as a formula alike. */
class LandingGaugeTest {

    @Test
    void pointStandsBetweenTheBracketsExactlyWhenInside() {
        for (double miss = -3; miss <= 3; miss += 0.0078125) {
            String text = LandingGauge.text(miss);
            int point = Math.max(text.indexOf('●'), Math.max(text.indexOf('◄'), text.indexOf('►')));
            assertEquals(LandingGauge.LENGTH, text.length());
            boolean between = point > text.indexOf('[') && point < text.indexOf(']');
            assertEquals(
                    Math.abs(miss) <= 1,
                    between && text.contains("[") && text.contains("]"),
                    "miss " + miss + " " + text);
        }
    }

    @Test
    void drawsTheThreeCases() {
        assertEquals("────[─────●─────]────", LandingGauge.text(0));
        assertEquals("────[─────┼────●]────", LandingGauge.text(1));
        assertEquals("◄───[─────┼─────]────", LandingGauge.text(-7));
    }

    @Test
    void formulaDrawsTheSame() throws Exception {
        try (XSSFWorkbook workbook = new XSSFWorkbook()) {
            var row = workbook.createSheet().createRow(0);
            row.createCell(0);
            row.createCell(1).setCellFormula(LandingGauge.formula("A1"));
            int compared = 0;
            for (double miss = -2.51; miss < 2.5; miss += 0.013) {
                row.getCell(0).setCellValue(miss);
                String drawn = new XSSFFormulaEvaluator(workbook)
                        .evaluate(row.getCell(1))
                        .getStringValue();
                assertEquals(LandingGauge.text(miss), drawn, "miss " + miss);
                compared++;
            }
            assertTrue(compared > 300);
        }
    }
}
