package org.hazewright.sheet;

import java.nio.file.Path;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import org.apache.poi.ss.usermodel.Cell;
import org.apache.poi.ss.usermodel.CellStyle;
import org.apache.poi.ss.usermodel.CellType;
import org.apache.poi.ss.usermodel.DateUtil;
import org.apache.poi.ss.usermodel.Row;
import org.apache.poi.ss.util.CellReference;
import org.apache.poi.xssf.usermodel.XSSFSheet;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;

/**
 * A table of the logbook on a page that people share: found by a named cell of its header row, its columns by their names.
 *
 * <p>A row is found by its key and only cells of our own columns are written; columns, rows above and below, notes and formats that people
 * added stay. A new row takes the formats of the row before it, and what stands below the table moves down. A missing column of ours is
 * added on the right; without its key column the table is refused.
 */
final class LogbookTable {
    private final XSSFWorkbook workbook;
    final XSSFSheet sheet;
    final int headRow;
    private final Map<String, Integer> columns = new LinkedHashMap<>();
    private final Map<String, Integer> rows = new HashMap<>();
    private final String key;
    private final Map<CellStyle, CellStyle> quoted = new HashMap<>();
    private int last;

    private LogbookTable(XSSFWorkbook workbook, XSSFSheet sheet, int headRow, String key) {
        this.workbook = workbook;
        this.sheet = sheet;
        this.headRow = headRow;
        this.key = key;
    }

    static LogbookTable find(XSSFWorkbook workbook, Path file, String name, List<String> names, String key) {
        CellReference at = Names.cell(workbook, name);
        XSSFSheet sheet = at == null ? null : workbook.getSheet(at.getSheetName());
        if (sheet == null)
            throw SafeWorkbook.refusal(
                    file,
                    "This is not a logbook, or a page of it was deleted: the named cell " + name
                            + " is missing. Name another file with --logbook, or take back the previous version beside it.");
        LogbookTable t = new LogbookTable(workbook, sheet, at.getRow(), key);
        t.read(file, names);
        return t;
    }

    private void read(Path file, List<String> names) {
        Row head = sheet.getRow(headRow);
        if (head != null)
            for (Cell c : head)
                if (c.getCellType() == CellType.STRING)
                    columns.putIfAbsent(c.getStringCellValue().strip(), c.getColumnIndex());
        if (!columns.containsKey(key))
            throw SafeWorkbook.refusal(
                    file,
                    "Page \"" + sheet.getSheetName() + "\" has no column \"" + key + "\" in row " + (headRow + 1)
                            + "; give the column its name back.");
        int keyColumn = columns.get(key);
        int right = head.getLastCellNum();
        for (String name : names)
            if (!columns.containsKey(name)) {
                Cell c = head.createCell(right);
                c.setCellValue(name);
                c.setCellStyle(head.getCell(keyColumn).getCellStyle());
                columns.put(name, right++);
            }
        last = headRow;
        for (int r = headRow + 1; r <= sheet.getLastRowNum(); r++) {
            String id = text(sheet.getRow(r), keyColumn);
            if (id.isEmpty()) continue;
            rows.put(id, r);
            last = r;
        }
    }

    /** Last row of the table; the header's when it is empty. */
    int last() {
        return last;
    }

    /** The names of all columns, people's own too, from left to right. */
    List<String> columns() {
        return columns.entrySet().stream()
                .sorted(Map.Entry.comparingByValue())
                .map(Map.Entry::getKey)
                .toList();
    }

    int column(String name) {
        return columns.get(name);
    }

    /** Writes a row over the one of the same key, or after the last; cells that the row does not name are left as they are. */
    void put(Map<String, Object> values) {
        String id = values.get(key).toString();
        Integer at = rows.get(id);
        if (at == null) {
            at = last + 1;
            makeRoom(at);
            rows.put(id, at);
            last = at;
        }
        Row row = sheet.getRow(at);
        if (row == null) row = sheet.createRow(at);
        Row above = at - 1 > headRow ? sheet.getRow(at - 1) : null;
        for (var e : values.entrySet()) {
            Integer column = columns.get(e.getKey());
            if (column != null) set(row, above, column, e.getValue());
        }
        roomFor(row);
    }

    /** Makes a row high enough for its wrapped texts; never lower than somebody made it. */
    private void roomFor(Row row) {
        double needed = 0;
        for (Cell c : row)
            if (c.getCellType() == CellType.STRING && c.getCellStyle().getWrapText()) {
                double points =
                        workbook.getFontAt(c.getCellStyle().getFontIndex()).getFontHeightInPoints();
                double width = 0.75 * sheet.getColumnWidthInPixels(c.getColumnIndex());
                needed = Math.max(
                        needed, TextLines.count(c.getStringCellValue(), points, false, width) * points * 1.32 + 2.5);
            }
        if (needed > row.getHeightInPoints()) row.setHeightInPoints((float) Math.min(400, Math.ceil(needed)));
    }

    /** The keys of all rows, in no order. */
    java.util.Set<String> keys() {
        return java.util.Set.copyOf(rows.keySet());
    }

    /** Empties cells of a row. */
    void clear(String id, List<String> names) {
        Row row = sheet.getRow(rows.get(id));
        for (String name : names) {
            Cell c = row.getCell(columns.get(name));
            if (c != null) c.setBlank();
        }
    }

    private void makeRoom(int at) {
        Row there = sheet.getRow(at);
        if (there == null) return;
        for (Cell c : there)
            if (c.getCellType() != CellType.BLANK) {
                sheet.shiftRows(at, sheet.getLastRowNum(), 1, true, false);
                return;
            }
    }

    private void set(Row row, Row above, int column, Object value) {
        Cell cell = row.getCell(column);
        if (cell == null) {
            cell = row.createCell(column);
            Cell model = above == null ? null : above.getCell(column);
            CellStyle style = model == null ? sheet.getColumnStyle(column) : model.getCellStyle();
            if (style.getQuotePrefixed()) style = sheet.getColumnStyle(column);
            cell.setCellStyle(style);
        }
        if (value instanceof Double d) cell.setCellValue(d);
        else if (value instanceof LocalDate day) cell.setCellValue(day);
        else {
            String text = SafeText.of(value.toString());
            if (SafeText.startsFormula(text))
                cell.setCellStyle(quoted.computeIfAbsent(cell.getCellStyle(), this::asText));
            cell.setCellValue(text);
        }
    }

    private CellStyle asText(CellStyle style) {
        CellStyle copy = workbook.createCellStyle();
        copy.cloneStyleFrom(style);
        copy.setQuotePrefixed(true);
        return copy;
    }

    /** Every row as its cells by column: texts, numbers and dates; formulas by their last result. */
    List<Map<String, Object>> all() {
        return all(List.copyOf(columns.keySet()));
    }

    /** The same of some columns only. */
    List<Map<String, Object>> all(List<String> wanted) {
        List<Map<String, Object>> all = new ArrayList<>();
        for (int r = headRow + 1; r <= last; r++) {
            Row row = sheet.getRow(r);
            if (row == null || text(row, columns.get(key)).isEmpty()) continue;
            Map<String, Object> values = new LinkedHashMap<>();
            for (String name : wanted) {
                Object v = value(row.getCell(columns.get(name)));
                if (v != null) values.put(name, v);
            }
            all.add(values);
        }
        return all;
    }

    static Object value(Cell cell) {
        if (cell == null) return null;
        CellType type = cell.getCellType() == CellType.FORMULA ? cell.getCachedFormulaResultType() : cell.getCellType();
        return switch (type) {
            case NUMERIC ->
                DateUtil.isCellDateFormatted(cell)
                        ? cell.getLocalDateTimeCellValue().toLocalDate()
                        : (Object) cell.getNumericCellValue();
            case STRING -> cell.getStringCellValue();
            default -> null;
        };
    }

    private static String text(Row row, int column) {
        Object v = row == null ? null : value(row.getCell(column));
        if (v instanceof Double d) return org.hazewright.optics.Figures.plain(d);
        return v == null ? "" : v.toString().strip();
    }
}
