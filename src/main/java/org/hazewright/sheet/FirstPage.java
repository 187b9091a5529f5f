package org.hazewright.sheet;

import java.io.IOException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import org.apache.poi.ss.usermodel.Cell;
import org.apache.poi.ss.usermodel.CellType;
import org.apache.poi.ss.usermodel.Row;
import org.apache.poi.xssf.usermodel.XSSFSheet;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;
import org.hazewright.files.CsvTable;

/** The first visible page of somebody's workbook as plain cells of text: for tables of targets, measured values and dilutions. */
public final class FirstPage {
    private static final int MOST_ROWS = 100_000;
    private static final int MOST_COLUMNS = 64;

    private FirstPage() {}

    /** Cells by row from the top; formulas by their last result. */
    public static List<List<String>> cells(Path file) {
        try (XSSFWorkbook workbook = SafeWorkbook.open(file, SafeWorkbook.SHEET)) {
            for (int k = 0; k < workbook.getNumberOfSheets(); k++)
                if (!workbook.isSheetHidden(k) && !workbook.isSheetVeryHidden(k))
                    return cells(file, workbook.getSheetAt(k));
            throw SafeWorkbook.refusal(file, "The workbook has no visible page.");
        } catch (IOException e) {
            throw SafeWorkbook.refusal(file, "The workbook could not be closed again (" + e.getMessage() + ").");
        }
    }

    /** The same as a table of numbers with one heading row. */
    public static CsvTable table(Path file) {
        StringBuilder text = new StringBuilder();
        for (List<String> row : cells(file)) text.append(String.join(",", row)).append('\n');
        return CsvTable.of(file.toString(), text.toString());
    }

    private static List<List<String>> cells(Path file, XSSFSheet sheet) {
        List<List<String>> rows = new ArrayList<>();
        if (sheet.getLastRowNum() >= MOST_ROWS)
            throw SafeWorkbook.refusal(
                    file, "Page \"" + sheet.getSheetName() + "\" has more than " + MOST_ROWS + " rows.");
        int width = 0;
        for (Row row : sheet) width = Math.max(width, row.getLastCellNum());
        width = Math.min(width, MOST_COLUMNS);
        for (int r = 0; r <= sheet.getLastRowNum(); r++) {
            Row row = sheet.getRow(r);
            List<String> cells = new ArrayList<>();
            boolean any = false;
            for (int c = 0; row != null && c < width; c++) {
                String s = text(row.getCell(c));
                any |= !s.isEmpty();
                cells.add(s);
            }
            rows.add(any ? cells : List.of());
        }
        return rows;
    }

    private static String text(Cell cell) {
        if (cell == null) return "";
        CellType type = cell.getCellType() == CellType.FORMULA ? cell.getCachedFormulaResultType() : cell.getCellType();
        return switch (type) {
            case NUMERIC -> Double.toString(cell.getNumericCellValue());
            case STRING ->
                cell.getStringCellValue().replaceAll("[\\p{Cntrl}]", " ").strip();
            case BOOLEAN -> Boolean.toString(cell.getBooleanCellValue());
            case ERROR -> "#error";
            default -> "";
        };
    }
}
