package org.hazewright.sheet;

import java.util.Arrays;
import java.util.List;
import org.apache.poi.ss.usermodel.HorizontalAlignment;
import org.apache.poi.ss.util.CellRangeAddress;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;

/** An empty logbook: its pages, their headings and column formats, and the named cells by which they are found again. */
final class LogbookPages {
    static final int FORMAT = 1;
    static final String FORMAT_NAME = "logbook_format";
    static final String BATCHES = "logbook_batches";
    static final String VALUES = "logbook_values";
    static final String LOTS = "logbook_lots";
    static final String CHARTS = "logbook_charts";
    private static final int HEAD = 3;

    /** In pixels, hidden columns included; wider tables would be printed smaller than a person reads. */
    private static final int WIDEST_ON_ONE_PAGE = 1550;

    private LogbookPages() {}

    static XSSFWorkbook create() {
        XSSFWorkbook workbook = new XSSFWorkbook();
        Looks looks = new Looks(workbook);
        Names names = new Names(workbook);
        Page batches = table(
                workbook,
                looks,
                names,
                "Batches",
                BATCHES,
                "Logbook",
                "One row a batch, the newest last. Your own columns, notes, colours and pages stay as they are when a batch is added.",
                LogbookEntry.BATCH_COLUMNS,
                new int[] {104, 80, 116, 74, 70, 84, 120, 156, 156, 52, 60, 230, 150, 80, 64, 120, 130});
        formats(batches, BATCHES, LogbookEntry.BATCH_COLUMNS);
        Page values = table(
                workbook,
                looks,
                names,
                "Values",
                VALUES,
                "Measured values",
                "One row a measured number, in 1/cm, beside what was predicted of the batch as weighed.",
                LogbookEntry.VALUE_COLUMNS,
                new int[] {104, 80, 48, 66, 66, 80, 74, 88, 74, 96, 92, 92, 120, 190, 230});
        formats(values, VALUES, LogbookEntry.VALUE_COLUMNS);
        values.sheet.setColumnHidden(
                LogbookEntry.VALUE_COLUMNS.indexOf(LogbookEntry.KEY), true); // for the program only
        Page lots = table(
                workbook,
                looks,
                names,
                "Lots",
                LOTS,
                "Lots",
                "Where each bottle was used, and measured over predicted where it was in; 1 is as predicted.",
                LogbookLots.COLUMNS,
                new int[] {210, 70, 82, 82, 64, 190, 190});
        formats(lots, LOTS, LogbookLots.COLUMNS);
        Page charts = new Page(workbook.createSheet("Charts"), looks);
        charts.text(0, 0, "Measured over predicted", Face.TITLE);
        charts.height(0, 24);
        charts.text(1, 0, "1 is as predicted. Circles are µa, diamonds are µs'.", Face.QUIET);
        names.give(CHARTS, charts.address(0, 0));
        PrintSetup.onePage(charts.sheet, true);
        Page record = new Page(workbook.createSheet("Format"), looks);
        record.text(0, 0, "format", Face.TEXT);
        record.number(0, 1, FORMAT, Face.TEXT);
        names.give(FORMAT_NAME, record.address(0, 1));
        workbook.setSheetHidden(workbook.getSheetIndex(record.sheet), true);
        LogbookCharts.draw(charts.sheet, values.sheet, lots.sheet, HEAD);
        return workbook;
    }

    private static Page table(
            XSSFWorkbook workbook,
            Looks looks,
            Names names,
            String name,
            String cell,
            String title,
            String sentence,
            List<String> columns,
            int[] widths) {
        Page page = new Page(workbook.createSheet(name), looks);
        page.columns(widths);
        page.text(0, 0, title, Face.TITLE);
        page.height(0, 24);
        boolean wide = Arrays.stream(widths).sum() > WIDEST_ON_ONE_PAGE;
        page.text(1, wide ? 1 : 0, sentence, Face.QUIET); // the first column is printed again on the second page
        for (int c = 0; c < columns.size(); c++) page.text(HEAD, c, columns.get(c), head(face(columns.get(c), cell)));
        page.height(HEAD, 26);
        page.sheet.createFreezePane(1, HEAD + 1);
        page.sheet.setAutoFilter(new CellRangeAddress(HEAD, 20_000, 0, columns.size() - 1));
        names.give(cell, page.address(HEAD, 0));
        PrintSetup.pages(page.sheet, HEAD, wide ? 2 : 1);
        return page;
    }

    /** Formats of whole columns, so that rows added later look alike. */
    private static void formats(Page page, String cell, List<String> columns) {
        for (int c = 0; c < columns.size(); c++) {
            Face face = face(columns.get(c), cell);
            page.sheet.setDefaultColumnStyle(c, page.looks.of(face));
            for (int r : new int[] {0, 1}) { // the title's cells keep their own
                if (page.sheet.getRow(r).getCell(c) == null && c > 0) page.cell(r, c, Face.TEXT);
            }
        }
    }

    /** A heading stands where its column's entries do. */
    private static Face head(Face below) {
        Face head = Face.HEAD.wrap();
        if (below.align() == HorizontalAlignment.RIGHT) return head.right();
        return below.indented() ? head.indent() : head;
    }

    /** {@code page} is the name of its heading cell: what is wanted and measured is text on one page and numbers on another. */
    private static Face face(String column, String page) {
        Face line = Face.TEXT.points(9);
        return switch (column) {
            case LogbookEntry.DATE, "last used" -> line.left().format("yyyy-mm-dd");
            case "first used" -> line.left().indent().format("yyyy-mm-dd");
            case "nm", "corrections", "batches", "values" -> line.right().format("0.##");
            case "volume mL" -> line.right().format("0.0");
            case "worst miss" -> line.right().format("0.00");
            case "chance in 100" -> line.right().format("0.0");
            case "wanted", "± tolerance", "predicted", "± u predicted", "measured", "± u measured" ->
                page.equals(VALUES)
                        ? line.right().format("[>=1]0.000;0.00000")
                        : line.wrap().indent();
            case LogbookEntry.MUA_RATIO, LogbookEntry.MUSP_RATIO -> line.right().format("0.0000");
            // These stand off from the number before them.
            case "verdict", "method", "quantity", "notes" -> line.wrap().indent();
            default -> column.startsWith("mean of") ? line.right().format("0.0000") : line.wrap();
        };
    }
}
