package org.hazewright.sheet;

import org.apache.poi.ss.usermodel.Row;
import org.apache.poi.ss.util.CellRangeAddress;
import org.apache.poi.ss.util.CellReference;
import org.apache.poi.xssf.usermodel.XSSFCell;
import org.apache.poi.xssf.usermodel.XSSFRichTextString;
import org.apache.poi.xssf.usermodel.XSSFRow;
import org.apache.poi.xssf.usermodel.XSSFSheet;

/** One sheet of the workbook while it is written: cells by row and column (from 0), each with its face. */
final class Page {
    /** Points for one line of type, over the size of the type. */
    private static final double LEADING = 1.32;

    /** Highest row that spreadsheet programs accept. */
    private static final double TALLEST_PT = 409;

    final XSSFSheet sheet;
    final Looks looks;

    Page(XSSFSheet sheet, Looks looks) {
        this.sheet = sheet;
        this.looks = looks;
        sheet.setDisplayGridlines(false);
    }

    XSSFCell cell(int row, int column, Face face) {
        Row r = sheet.getRow(row);
        if (r == null) r = sheet.createRow(row);
        XSSFCell cell = (XSSFCell) r.getCell(column);
        if (cell == null) cell = (XSSFCell) r.createCell(column);
        cell.setCellStyle(looks.of(face));
        return cell;
    }

    XSSFCell text(int row, int column, String text, Face face) {
        String safe = SafeText.of(text);
        XSSFCell cell = cell(row, column, face);
        if (SafeText.startsFormula(safe)) cell.setCellStyle(looks.quoted(face));
        cell.setCellValue(safe);
        return cell;
    }

    XSSFCell rich(int row, int column, XSSFRichTextString text, Face face) {
        XSSFCell cell = cell(row, column, face);
        cell.setCellValue(text);
        return cell;
    }

    XSSFCell number(int row, int column, double value, Face face) {
        XSSFCell cell = cell(row, column, face);
        cell.setCellValue(value);
        return cell;
    }

    XSSFCell formula(int row, int column, String formula, Face face) {
        XSSFCell cell = cell(row, column, face);
        cell.setCellFormula(formula);
        return cell;
    }

    /** Joins cells of a row into one and gives all of them the face of the first. */
    void span(int row, int from, int to) {
        if (from == to) return;
        XSSFCell first = sheet.getRow(row).getCell(from);
        for (int c = from + 1; c <= to; c++) {
            XSSFCell cell = sheet.getRow(row).getCell(c);
            if (cell == null) cell = sheet.getRow(row).createCell(c);
            cell.setCellStyle(first.getCellStyle());
        }
        sheet.addMergedRegionUnsafe(new CellRangeAddress(row, row, from, to));
    }

    /** A sentence over several columns, wrapped, in a row as high as it needs. */
    void sentence(int row, int from, int to, String text, Face face) {
        text(row, from, text, face.wrap());
        span(row, from, to);
        roomFor(row, text, face, from, to);
    }

    /** Makes a row at least high enough for a text over these columns. */
    void roomFor(int row, String text, Face face, int from, int to) {
        int lines = TextLines.count(text, face.points(), face.bold(), widthPt(from, to));
        double needed = Math.min(TALLEST_PT, lines * face.points() * LEADING + 2.5);
        XSSFRow r = sheet.getRow(row);
        boolean set = r.getCTRow().getCustomHeight();
        if (!set || r.getHeightInPoints() < needed) r.setHeightInPoints((float) (Math.ceil(needed * 4) / 4));
    }

    void height(int row, double points) {
        Row r = sheet.getRow(row);
        if (r == null) r = sheet.createRow(row);
        r.setHeightInPoints((float) points);
    }

    /** Widths of the columns from 0 on, in pixels at 96 dots an inch. */
    void columns(int... pixels) {
        for (int c = 0; c < pixels.length; c++) sheet.setColumnWidth(c, (int) Math.round((pixels[c] - 5) / 7.0 * 256));
    }

    double widthPt(int from, int to) {
        double px = 0;
        for (int c = from; c <= to; c++) px += sheet.getColumnWidthInPixels(c);
        return px * 0.75;
    }

    /** Address of a cell as formulas on other sheets write it: 'Fill in'!$D$7. */
    String address(int row, int column) {
        return quotedName() + "!" + new CellReference(row, column, true, true).formatAsString();
    }

    String address(int row1, int column1, int row2, int column2) {
        return address(row1, column1) + ":" + new CellReference(row2, column2, true, true).formatAsString();
    }

    private String quotedName() {
        return "'" + sheet.getSheetName() + "'";
    }
}
