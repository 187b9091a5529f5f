package org.hazewright.sheet;

import org.apache.poi.xddf.usermodel.chart.AxisPosition;
import org.apache.poi.xssf.usermodel.XSSFChart;
import org.apache.poi.xssf.usermodel.XSSFClientAnchor;
import org.apache.poi.xssf.usermodel.XSSFFormulaEvaluator;
import org.apache.poi.xssf.usermodel.XSSFSheet;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;
import org.hazewright.picture.Palette;

/** A small workbook with one of everything, written to nowhere: what it touches is loaded and needs no loading again. */
final class Readiness {
    private Readiness() {}

    static void load() {
        try (XSSFWorkbook workbook = new XSSFWorkbook()) {
            Page page = new Page(workbook.createSheet("Recipe"), new Looks(workbook));
            new Names(workbook).give(Names.FORMAT, page.address(0, 0));
            page.number(0, 0, 1, Face.TEXT.rule().ground(Palette.MILK));
            page.sentence(1, 0, 2, "text", Face.QUIET);
            page.formula(2, 0, "SUMPRODUCT(A1:A1,INDEX(A1:A1,0,MATCH(1,A1:A1,0)))", Face.TEXT);
            page.formula(3, 0, LandingGauge.formula("A1"), Face.TEXT);
            page.rich(4, 0, LandingGauge.drawn(0, 8, page.looks), Face.TEXT);
            XSSFSheet sheet = page.sheet;
            PrintSetup.onePage(sheet, false);
            XSSFChart chart = sheet.createDrawingPatriarch().createChart(new XSSFClientAnchor(0, 0, 0, 0, 0, 5, 3, 9));
            chart.setTitleText("x");
            chart.createValueAxis(AxisPosition.BOTTOM).setMinimum(0);
            var rule = sheet.getSheetConditionalFormatting().createConditionalFormattingRule("A1>0");
            rule.createFontFormatting().setFontStyle(false, true);
            XSSFFormulaEvaluator.evaluateAllFormulaCells(workbook);
            FixedBytes.of(workbook, "");
        } catch (java.io.IOException | RuntimeException e) {
            // Only a head start: what is wrong here is said where a sheet is really written.
        }
    }
}
