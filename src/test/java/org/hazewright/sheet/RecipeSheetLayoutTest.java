package org.hazewright.sheet;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNotNull;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.stream.Collectors;
import org.apache.poi.ss.usermodel.Cell;
import org.apache.poi.ss.usermodel.CellType;
import org.apache.poi.ss.usermodel.DataValidation;
import org.apache.poi.ss.usermodel.DataValidationConstraint;
import org.apache.poi.ss.usermodel.PrintSetup;
import org.apache.poi.xssf.usermodel.XSSFChart;
import org.apache.poi.xssf.usermodel.XSSFSheet;
import org.hazewright.bench.Answer;
import org.hazewright.bench.Sensitivity;
import org.hazewright.mixture.Item;
import org.hazewright.shelf.Ingredient;
import org.junit.jupiter.api.Test;
import org.openxmlformats.schemas.drawingml.x2006.chart.CTScatterSer;

/** What stands where: pages, protection, checks on input, charts, and the facts to read it back by. */
class RecipeSheetLayoutTest {
    private final Answer answer = Answers.gelatin();
    private final Filled sheet = Filled.of(answer);

    @Test
    void sheetsComeInTheOrderOfUse() {
        List<String> names = new ArrayList<>();
        sheet.workbook.forEach(s -> names.add(s.getSheetName()));
        assertEquals(List.of("Recipe", "Fill in", "Coefficients", "Steps", "Sources", "Spectra", "Format"), names);
        assertTrue(sheet.workbook.isSheetHidden(6));
        assertEquals(0, sheet.workbook.getActiveSheetIndex());
    }

    @Test
    void recipeIsSetUpForOnePage() {
        XSSFSheet recipe = sheet.workbook.getSheet("Recipe");
        assertTrue(recipe.getFitToPage());
        assertEquals(1, recipe.getPrintSetup().getFitWidth());
        assertEquals(1, recipe.getPrintSetup().getFitHeight());
        assertEquals(PrintSetup.A4_PAPERSIZE, recipe.getPrintSetup().getPaperSize());
        assertFalse(recipe.getPrintSetup().getLandscape());
        assertNotNull(sheet.workbook.getPrintArea(0));
    }

    @Test
    void recipeSaysWhatAPersonNeeds() {
        String page = words("Recipe");
        for (Item i : answer.recipe().items())
            assertTrue(page.contains(i.ingredient().name()) || i.stock().isPresent());
        for (String words : List.of(
                "Forearm oximeter block",
                "262.5 mL",
                "Lands inside every tolerance",
                "ink-demo-1-100",
                "What could move it",
                "ink-demo absorption",
                "What holds it back",
                "a dilution series of your own bottle",
                "Hot liquid",
                "Stains skin",
                "not a medical device",
                "Invented demo lot",
                "Opt. Express 16, 5907")) assertTrue(page.contains(words), words);
        for (Ingredient i : answer.mixture().massesG().keySet())
            assertTrue(words("Sources").contains(i.source().citation()), i.id());
    }

    @Test
    void onlyInputsAreOpenOnFillIn() {
        XSSFSheet fillIn = sheet.workbook.getSheet("Fill in");
        assertTrue(fillIn.getProtect(), "formulas are protected");
        assertFalse(fillIn.getCTWorksheet().getSheetProtection().isSetPassword(), "without a password");
        assertFalse(fillIn.getCTWorksheet().getSheetProtection().isSetHashValue(), "without a password");
        List<Cell> inputs = new ArrayList<>(sheet.weighed());
        for (String name : List.of(Names.BATCH, Names.OPERATOR, Names.DATE, Names.BALANCE))
            inputs.addAll(sheet.cells(name));
        for (Cell c : sheet.weighed()) {
            inputs.add(Filled.beside(c, FillInPlan.LOT));
            inputs.add(Filled.beside(c, FillInPlan.DONE));
        }
        for (Cell c : inputs) {
            assertFalse(c.getCellStyle().getLocked(), Filled.where(c) + " can be filled in");
            assertEquals(CellType.BLANK, c.getCellType(), Filled.where(c));
        }
        for (Cell c : sheet.formulas()) assertTrue(c.getCellStyle().getLocked(), Filled.where(c));
    }

    @Test
    void inputsAreChecked() {
        XSSFSheet fillIn = sheet.workbook.getSheet("Fill in");
        for (Cell c : sheet.weighed()) {
            DataValidation check = fillIn.getDataValidations().stream()
                    .filter(v -> java.util.Arrays.stream(v.getRegions().getCellRangeAddresses())
                            .anyMatch(r -> r.isInRange(c)))
                    .findFirst()
                    .orElseThrow();
            assertEquals(
                    DataValidationConstraint.ValidationType.DECIMAL,
                    check.getValidationConstraint().getValidationType());
            assertEquals(
                    DataValidationConstraint.OperatorType.GREATER_OR_EQUAL,
                    check.getValidationConstraint().getOperator());
            assertEquals("0", check.getValidationConstraint().getFormula1());
            assertEquals(DataValidation.ErrorStyle.STOP, check.getErrorStyle());
        }
    }

    @Test
    void bandsAreThoseOfTheBench() {
        List<Sensitivity> bands = Sensitivity.of(
                answer.recipe(), answer.brief().balance(), answer.brief().points());
        List<Cell> weighed = sheet.weighed();
        assertEquals(bands.size(), weighed.size());
        for (int n = 0; n < bands.size(); n++) {
            assertEquals(
                    bands.get(n).lowG(),
                    Filled.beside(weighed.get(n), FillInPlan.LOW).getNumericCellValue());
            assertEquals(
                    bands.get(n).highG(),
                    Filled.beside(weighed.get(n), FillInPlan.HIGH).getNumericCellValue());
            assertEquals(
                    bands.get(n).weighing().massG(),
                    Filled.beside(weighed.get(n), FillInPlan.PLANNED).getNumericCellValue());
        }
    }

    @Test
    void chartsAreNativeAndTheirLinesExplicit() {
        XSSFSheet recipe = sheet.workbook.getSheet("Recipe");
        List<XSSFChart> charts = recipe.getDrawingPatriarch().getCharts();
        assertEquals(2, charts.size());
        for (XSSFChart chart : charts) {
            List<CTScatterSer> series =
                    chart.getCTChart().getPlotArea().getScatterChartArray(0).getSerList();
            assertEquals(4, series.size());
            for (CTScatterSer s : series) {
                assertTrue(s.getSpPr().isSetLn(), "explicit line");
                assertTrue(s.getXVal().getNumRef().getF().startsWith("Spectra!"));
            }
            CTScatterSer wanted = series.get(3);
            assertEquals(
                    4, wanted.getXVal().getNumRef().getNumCache().getPtCount().getVal());
            assertTrue(wanted.getErrBarsArray(0).getPlus().getNumRef().getF().startsWith("Spectra!"));
            chart.getCTChart()
                    .getPlotArea()
                    .getValAxList()
                    .forEach(axis -> assertTrue(axis.getSpPr().isSetLn()));
        }
    }

    @Test
    void chartsOfABriefWithOneQuantityStillStand() {
        XSSFSheet recipe = Filled.of(Answers.bath()).workbook.getSheet("Recipe");
        assertEquals(2, recipe.getDrawingPatriarch().getCharts().size());
    }

    @Test
    void formatAndKeysStandWhereAReaderFindsThem() {
        assertEquals(1, sheet.cells(Names.FORMAT).get(0).getNumericCellValue());
        List<String> keys = sheet.weighed().stream()
                .map(c -> Filled.beside(c, FillInPlan.KEY).getStringCellValue())
                .toList();
        assertEquals(
                List.of(
                        "stock:ink-demo-1-100:substance",
                        "stock:ink-demo-1-100:diluent",
                        "item:1:water",
                        "item:2:gelatin-powder",
                        "item:3:lipid-emulsion-20",
                        "item:4:ink-demo-1-100"),
                keys);
        String record = words("Format");
        for (String k : keys) assertTrue(record.contains(k), k);
        assertTrue(record.contains("9f9f9f"));
    }

    @Test
    void stocksInHandAreNotMadeAgain() {
        Answer bath = Answers.bath();
        var steps = org.hazewright.bench.Steps.of(
                bath.recipe(), bath.brief().balance(), List.of(), List.of("ink-demo-1-100", "ink-demo-1-1000"));
        Filled made = new Filled(RecipeSheet.write(bath, steps, List.of()));
        assertFalse(words(made, "Recipe").contains("Make first"));
        assertTrue(words(made, "Fill in").contains("is made already"));
        assertTrue(words(Filled.of(bath), "Recipe").contains("Make first"));
    }

    private String words(String name) {
        return words(sheet, name);
    }

    private static String words(Filled of, String name) {
        List<String> words = new ArrayList<>();
        of.workbook
                .getSheet(name)
                .forEach(row -> row.forEach(c -> {
                    if (c.getCellType() == CellType.STRING) words.add(c.getStringCellValue());
                }));
        return words.stream().collect(Collectors.joining("\n"));
    }
}
