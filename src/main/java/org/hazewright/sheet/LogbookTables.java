package org.hazewright.sheet;

import java.io.IOException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.HashSet;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Set;
import org.apache.poi.ss.usermodel.Row;
import org.apache.poi.xssf.usermodel.XSSFSheet;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;

/**
 * A logbook as plain tables, to be carried on elsewhere: batches, measured values, lots, each with the columns that people added, and the
 * pages that people added.
 *
 * <p>Our columns get names with units in them, in 1/cm, nm and mL; people's keep theirs. Cells are texts, numbers and days; a formula goes
 * out as its last result. Charts and notes on cells do not go out.
 */
public final class LogbookTables {
    private static final Map<String, String> BATCH_NAMES = Map.ofEntries(
            Map.entry("wanted", "wanted_per_cm"),
            Map.entry("predicted as made", "predicted_as_made_per_cm"),
            Map.entry("measured", "measured_per_cm"),
            Map.entry("worst miss", "worst_miss"),
            Map.entry("chance in 100", "chance_in_100"),
            Map.entry("volume mL", "volume_ml"));
    private static final Map<String, String> VALUE_NAMES = Map.ofEntries(
            Map.entry("nm", "wavelength_nm"),
            Map.entry("wanted", "wanted_per_cm"),
            Map.entry("± tolerance", "tolerance_per_cm"),
            Map.entry("predicted", "predicted_per_cm"),
            Map.entry("± u predicted", "u_predicted_per_cm"),
            Map.entry("measured", "measured_per_cm"),
            Map.entry("± u measured", "u_measured_per_cm"),
            Map.entry(LogbookEntry.MUA_RATIO, "measured_over_predicted_mua"),
            Map.entry(LogbookEntry.MUSP_RATIO, "measured_over_predicted_musp"));
    private static final Map<String, String> LOT_NAMES = Map.ofEntries(
            Map.entry(LogbookLots.LOT, "ingredient_and_lot"),
            Map.entry("first used", "first_used"),
            Map.entry("last used", "last_used"),
            Map.entry("mean of " + LogbookEntry.MUA_RATIO, "mean_measured_over_predicted_mua"),
            Map.entry("mean of " + LogbookEntry.MUSP_RATIO, "mean_measured_over_predicted_musp"));

    private LogbookTables() {}

    /**
     * One table.
     *
     * @param name as part of a file's name
     * @param rows the first is the headings; null is an empty cell
     */
    public record Table(String name, List<List<Object>> rows) {}

    /**
     * All tables of a logbook.
     *
     * @param waiting records that wait beside the logbook and are not in the tables
     */
    public record Content(List<Table> tables, List<Path> waiting) {}

    public static Content of(Path logbook) {
        try (XSSFWorkbook workbook = SafeWorkbook.open(logbook, SafeWorkbook.LOGBOOK)) {
            Logbook.requireFormat(workbook, logbook);
            Logbook.Tables ours = new Logbook.Tables(workbook, logbook);
            List<Table> all = new ArrayList<>();
            all.add(table("batches", ours.batches, BATCH_NAMES));
            all.add(table("values", ours.values, VALUE_NAMES));
            all.add(table("lots", ours.lots, LOT_NAMES));
            Set<XSSFSheet> done = new HashSet<>(List.of(ours.batches.sheet, ours.values.sheet, ours.lots.sheet));
            for (String name : List.of(LogbookPages.CHARTS, LogbookPages.FORMAT_NAME)) {
                XSSFSheet page = Logbook.sheetOf(workbook, name);
                if (page != null) done.add(page);
            }
            Set<String> taken = new HashSet<>(List.of("batches", "values", "lots"));
            for (int k = 0; k < workbook.getNumberOfSheets(); k++)
                if (!done.contains(workbook.getSheetAt(k))) page(workbook.getSheetAt(k), taken, all);
            return new Content(all, Logbook.waiting(logbook));
        } catch (IOException e) {
            throw SafeWorkbook.refusal(logbook, "The workbook could not be read to its end (" + e.getMessage() + ").");
        }
    }

    private static Table table(String name, LogbookTable from, Map<String, String> names) {
        List<String> columns = from.columns();
        List<List<Object>> rows = new ArrayList<>();
        rows.add(columns.stream().map(c -> (Object) names.getOrDefault(c, c)).toList());
        for (Map<String, Object> row : from.all()) {
            List<Object> cells = new ArrayList<>();
            for (String c : columns) cells.add(row.get(c));
            rows.add(cells);
        }
        return new Table(name, rows);
    }

    /** A page that somebody added, as it stands; an empty one gives no table. */
    private static void page(XSSFSheet sheet, Set<String> taken, List<Table> all) {
        List<List<Object>> rows = new ArrayList<>();
        int right = 0;
        for (Row row : sheet) right = Math.max(right, row.getLastCellNum());
        for (int r = 0; r <= sheet.getLastRowNum(); r++) {
            Row row = sheet.getRow(r);
            List<Object> cells = new ArrayList<>();
            for (int c = 0; c < right; c++) cells.add(row == null ? null : LogbookTable.value(row.getCell(c)));
            rows.add(cells);
        }
        while (!rows.isEmpty() && rows.get(rows.size() - 1).stream().allMatch(java.util.Objects::isNull))
            rows.remove(rows.size() - 1);
        if (rows.isEmpty()) return;
        String plain = sheet.getSheetName().toLowerCase(Locale.ROOT).replaceAll("[^\\p{L}\\p{N}]+", "-");
        String start = "page-" + plain.replaceAll("^-|-$", "");
        String name = start;
        for (int n = 2; !taken.add(name); n++) name = start + "-" + n;
        all.add(new Table(name, rows));
    }
}
