package org.hazewright.sheet;

import java.io.ByteArrayInputStream;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.util.ArrayList;
import java.util.List;
import org.apache.poi.ss.usermodel.Cell;
import org.apache.poi.ss.usermodel.CellType;
import org.apache.poi.ss.usermodel.CellValue;
import org.apache.poi.ss.usermodel.Row;
import org.apache.poi.ss.util.AreaReference;
import org.apache.poi.ss.util.CellReference;
import org.apache.poi.xssf.usermodel.XSSFFormulaEvaluator;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;
import org.hazewright.bench.Answer;
import org.hazewright.bench.Sensitivity;
import org.hazewright.bench.Steps;
import org.hazewright.bench.Warnings;

/** A written sheet opened again as a person would, found by the names of its cells, filled in and recomputed. */
final class Filled {
    final XSSFWorkbook workbook;
    private XSSFFormulaEvaluator evaluator;

    Filled(byte[] bytes) {
        try {
            workbook = new XSSFWorkbook(new ByteArrayInputStream(bytes));
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }

    static byte[] bytes(Answer a) {
        return RecipeSheet.write(
                a,
                Steps.of(
                        a.recipe(),
                        a.brief().balance(),
                        Sensitivity.of(
                                a.recipe(), a.brief().balance(), a.brief().points())),
                Warnings.of(a.recipe(), java.time.LocalDate.of(2026, 3, 1)));
    }

    static Filled of(Answer a) {
        return new Filled(bytes(a));
    }

    /** Cells of a named range, row by row. */
    List<Cell> cells(String name) {
        AreaReference area =
                new AreaReference(workbook.getName(name).getRefersToFormula(), workbook.getSpreadsheetVersion());
        List<Cell> cells = new ArrayList<>();
        for (CellReference ref : area.getAllReferencedCells()) {
            Row row = workbook.getSheet(ref.getSheetName()).getRow(ref.getRow());
            cells.add(row.getCell(ref.getCol(), Row.MissingCellPolicy.CREATE_NULL_AS_BLANK));
        }
        return cells;
    }

    /** The cells to fill in, one a weighing; rows of the range that only head a group have no key. */
    List<Cell> weighed() {
        return cells(Names.WEIGHED_G).stream()
                .filter(c -> beside(c, FillInPlan.KEY) != null)
                .toList();
    }

    /** The cell of the same row in a column of "Fill in". */
    static Cell beside(Cell cell, int column) {
        return cell.getRow().getCell(column);
    }

    void weigh(int n, double grams) {
        weighed().get(n).setCellValue(grams);
        evaluator = null;
    }

    void type(int n, String text) {
        weighed().get(n).setCellValue(text);
        evaluator = null;
    }

    CellValue value(Cell cell) {
        if (evaluator == null) evaluator = new XSSFFormulaEvaluator(workbook);
        return evaluator.evaluate(cell);
    }

    double number(Cell cell) {
        CellValue v = value(cell);
        if (v.getCellType() != CellType.NUMERIC) throw new AssertionError(where(cell) + " is " + v.formatAsString());
        return v.getNumberValue();
    }

    String word(Cell cell) {
        return value(cell).getStringValue();
    }

    /** µa and µs' as made, in the order of the targets. */
    double[] asMade() {
        return cells(Names.LANDED).stream()
                .mapToDouble(c -> number(beside(c, 4)))
                .toArray();
    }

    List<Cell> formulas() {
        List<Cell> formulas = new ArrayList<>();
        workbook.forEach(sheet -> sheet.forEach(row -> row.forEach(cell -> {
            if (cell.getCellType() == CellType.FORMULA) formulas.add(cell);
        })));
        return formulas;
    }

    static String where(Cell cell) {
        return cell.getSheet().getSheetName() + "!" + cell.getAddress();
    }
}
