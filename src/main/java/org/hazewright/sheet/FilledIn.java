package org.hazewright.sheet;

import java.io.IOException;
import java.nio.file.Path;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import org.apache.poi.ss.usermodel.Cell;
import org.apache.poi.ss.usermodel.CellType;
import org.apache.poi.ss.usermodel.DateUtil;
import org.apache.poi.ss.usermodel.FormulaError;
import org.apache.poi.ss.usermodel.Row;
import org.apache.poi.ss.util.AreaReference;
import org.apache.poi.ss.util.CellReference;
import org.apache.poi.xssf.usermodel.XSSFName;
import org.apache.poi.xssf.usermodel.XSSFSheet;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;
import org.hazewright.batch.Batch;
import org.hazewright.bench.Weighing;
import org.hazewright.optics.Figures;
import org.hazewright.shelf.Nearest;

/**
 * A recipe sheet read back after the balance: who, when, lots, and grams as weighed.
 *
 * <p>Pages are found by their named cells, so renamed ones are read; rows by their hidden keys, so moved ones are read. Every problem of
 * every cell is named by page and cell in one refusal; nothing is taken over when there is one.
 *
 * @param weighedG by the key of the weighing; what is not filled in is not there
 * @param lots as typed, by the same key
 * @param notes what was read otherwise than it stands, for the person to check
 */
public record FilledIn(
        String title,
        Optional<String> batchId,
        Optional<String> operator,
        Optional<LocalDate> date,
        Optional<String> balance,
        Map<String, Double> weighedG,
        Map<String, String> lots,
        List<String> notes) {

    /** Beyond this factor from the plan a mass is taken for a slip of unit and refused. */
    private static final double UNBELIEVABLE = 100;

    public FilledIn {
        weighedG = Map.copyOf(weighedG);
        lots = Map.copyOf(lots);
        notes = List.copyOf(notes);
    }

    public static FilledIn read(Path file) {
        try (XSSFWorkbook workbook = SafeWorkbook.open(file, SafeWorkbook.SHEET)) {
            return new Reader(file, workbook).read();
        } catch (IOException e) {
            throw SafeWorkbook.refusal(file, "The workbook could not be closed again (" + e.getMessage() + ").");
        }
    }

    /** The batch with what the sheet holds; a sheet of another recipe is refused. */
    public Batch into(Batch batch, Path file) {
        List<Weighing> weighings = batch.weighings();
        Map<String, Integer> place = new LinkedHashMap<>();
        for (int n = 0; n < weighings.size(); n++) place.put(RecordPage.key(weighings.get(n)), n);
        for (String key : weighedG.keySet())
            if (!place.containsKey(key))
                throw SafeWorkbook.refusal(
                        file,
                        "The sheet is of another recipe (\"" + title + "\"): it weighs " + words(key)
                                + ", which the batch "
                                + batch.id() + " (\"" + batch.plan().title() + "\") does not."
                                + Nearest.to(key, place.keySet())
                                        .map(k -> " Nearest there is " + words(k) + ".")
                                        .orElse(""));
        Batch now = batch;
        for (var e : lots.entrySet()) {
            Weighing w = weighings.get(place.getOrDefault(e.getKey(), 0));
            boolean bottle = w.from().isEmpty() && w.role() != Weighing.Role.STOCK_DILUENT;
            if (bottle && place.containsKey(e.getKey())) now = now.withLot(place.get(e.getKey()), e.getValue());
        }
        for (var e : weighedG.entrySet()) now = now.withWeighed(place.get(e.getKey()), e.getValue());
        for (String note : notes) now = now.withNote(note);
        return now.madeBy(operator.orElse(batch.who()), date.orElse(batch.on()));
    }

    static String words(String key) {
        String[] parts = key.split(":");
        if (parts[0].equals("item")) return parts[2];
        return "the " + (parts[2].equals("substance") ? "substance" : "diluent") + " of stock " + parts[1];
    }

    /** One reading; problems are gathered first and told together. */
    private static final class Reader {
        private final Path file;
        private final XSSFWorkbook workbook;
        private final List<String> problems = new ArrayList<>();
        private final List<String> notes = new ArrayList<>();
        private final Map<String, Double> planned = new LinkedHashMap<>();

        Reader(Path file, XSSFWorkbook workbook) {
            this.file = file;
            this.workbook = workbook;
        }

        FilledIn read() {
            Cell format = named(Names.FORMAT);
            if (format == null)
                throw SafeWorkbook.refusal(
                        file,
                        "This is a workbook but not a recipe sheet: it has no cell named " + Names.FORMAT
                                + ". Fill in the sheet that came with the recipe.");
            format(format);
            XSSFSheet record = (XSSFSheet) format.getSheet();
            String title = plan(record);
            AreaReference weighed = area(Names.WEIGHED_G);
            XSSFSheet page = weighed == null
                    ? null
                    : workbook.getSheet(weighed.getFirstCell().getSheetName());
            if (page == null)
                throw SafeWorkbook.refusal(
                        file,
                        "The page to fill in is gone: the named range " + Names.WEIGHED_G
                                + " is missing. Copy the grams into a fresh sheet of the recipe.");
            Map<String, Double> grams = new LinkedHashMap<>();
            Map<String, String> lots = new HashMap<>();
            rows(page, grams, lots);
            Optional<LocalDate> date = date(named(Names.DATE));
            Optional<String> id = text(named(Names.BATCH));
            Optional<String> who = text(named(Names.OPERATOR));
            Optional<String> balance = text(named(Names.BALANCE));
            if (!problems.isEmpty())
                throw SafeWorkbook.refusal(
                        file,
                        problems.size() == 1
                                ? problems.get(0)
                                : problems.size() + " cells cannot be used, so none was taken over:\n  "
                                        + String.join("\n  ", problems));
            return new FilledIn(title, id, who, date, balance, grams, lots, notes);
        }

        private void format(Cell cell) {
            double number = cell.getCellType() == CellType.NUMERIC ? cell.getNumericCellValue() : Double.NaN;
            if (number == RecordPage.FORMAT) return;
            throw SafeWorkbook.refusal(
                    file,
                    "The sheet has the format " + (Double.isNaN(number) ? "\"" + cell + "\"" : Figures.plain(number))
                            + " and this program reads format " + RecordPage.FORMAT + "; "
                            + (number < RecordPage.FORMAT
                                    ? "it is of an older version: copy the grams into a fresh sheet of the recipe."
                                    : "a newer version of the program is needed."));
        }

        /** Keys and planned grams of the hidden record; its title. */
        private String plan(XSSFSheet record) {
            String title = "";
            boolean table = false;
            for (Row row : record) {
                String first = shown(row.getCell(0));
                if (first.equals("title")) title = shown(row.getCell(1));
                if (table && !first.isEmpty()) {
                    Cell g = row.getCell(5);
                    if (g == null || g.getCellType() != CellType.NUMERIC)
                        throw SafeWorkbook.refusal(
                                file,
                                "The hidden record of the plan was changed (" + where(row, 5)
                                        + "); use a fresh sheet.");
                    planned.put(first, g.getNumericCellValue());
                }
                if (first.equals("weighing")) table = true;
            }
            if (planned.isEmpty())
                throw SafeWorkbook.refusal(
                        file, "The hidden record of the plan is empty; use a fresh sheet of the recipe.");
            return title;
        }

        private void rows(XSSFSheet page, Map<String, Double> grams, Map<String, String> lots) {
            Map<String, Integer> seen = new HashMap<>();
            int end = endOfWeighings(page);
            for (int r = FillInPlan.TABLE + 1; r < end; r++) {
                Row row = page.getRow(r);
                if (row == null) continue;
                String key = shown(row.getCell(FillInPlan.KEY));
                Cell weighed = row.getCell(FillInPlan.WEIGHED);
                if (!planned.containsKey(key)) {
                    if (!blank(weighed))
                        problems.add(
                                where(row, FillInPlan.WEIGHED) + " holds " + quoted(weighed)
                                        + " in a row that the recipe does not have. Clear it; more of something that the recipe has goes into the"
                                        + " grams of its own row, and with anything else in it the batch is no longer this recipe.");
                    continue;
                }
                Integer before = seen.put(key, r);
                if (before != null) {
                    problems.add(where(row, FillInPlan.WEIGHED) + ": the row of " + words(key)
                            + " stands twice, here and in row " + (before + 1) + ". Delete one.");
                    continue;
                }
                mass(weighed, planned.get(key)).ifPresent(g -> grams.put(key, g));
                text(row.getCell(FillInPlan.LOT)).ifPresent(lot -> lots.put(key, lot));
            }
            for (String key : planned.keySet())
                if (!seen.containsKey(key))
                    problems.add("Page \"" + page.getSheetName() + "\": the row of " + words(key)
                            + " was deleted. Undo that, or copy the grams into a fresh sheet; a row without grams counts as not weighed"
                            + " yet.");
        }

        /** The row of the targets' heading, or the last row when it is not found. */
        private int endOfWeighings(XSSFSheet page) {
            AreaReference landed = area(Names.LANDED);
            if (landed != null
                    && page.getSheetName().equals(landed.getFirstCell().getSheetName()))
                return landed.getFirstCell().getRow() - 2;
            return page.getLastRowNum() + 1;
        }

        private OptionalDouble mass(Cell cell, double plannedG) {
            if (blank(cell)) return OptionalDouble.empty();
            CellType type =
                    cell.getCellType() == CellType.FORMULA ? cell.getCachedFormulaResultType() : cell.getCellType();
            double g;
            if (type == CellType.NUMERIC
                    && cell.getCellType() != CellType.FORMULA
                    && DateUtil.isCellDateFormatted(cell)) {
                problems.add(where(cell)
                        + " holds a date; the spreadsheet program took the grams for one. Format the cell as a"
                        + " number and type them again.");
                return OptionalDouble.empty();
            } else if (type == CellType.NUMERIC) g = cell.getNumericCellValue();
            else if (type == CellType.STRING) {
                OptionalDouble typed = TypedNumber.grams(cell.getStringCellValue(), plannedG);
                if (typed.isEmpty()) {
                    problems.add(where(cell) + " holds the text " + quoted(cell)
                            + "; it must be grams, a number such as " + Figures.plain(plannedG) + ".");
                    return typed;
                }
                g = typed.getAsDouble();
                notes.add(where(cell) + " was typed as the text " + quoted(cell) + " and read as " + Figures.plain(g)
                        + " g");
            } else {
                problems.add(where(cell) + " holds " + quoted(cell) + "; it must be grams, a number such as "
                        + Figures.plain(plannedG) + ".");
                return OptionalDouble.empty();
            }
            if (!Double.isFinite(g) || g < 0) {
                problems.add(where(cell) + " is " + Figures.plain(g) + " g; a mass is 0 or above.");
                return OptionalDouble.empty();
            }
            if (g > plannedG * UNBELIEVABLE || g > 0 && g < plannedG / UNBELIEVABLE) {
                problems.add(
                        where(cell) + " is " + Figures.plain(g) + " g and " + Figures.plain(plannedG)
                                + " g were planned; was it typed in another unit? If it is right, record it with batch weigh --item.");
                return OptionalDouble.empty();
            }
            return OptionalDouble.of(g);
        }

        private Optional<LocalDate> date(Cell cell) {
            if (blank(cell)) return Optional.empty();
            if (cell.getCellType() == CellType.NUMERIC && DateUtil.isValidExcelDate(cell.getNumericCellValue())) {
                LocalDate day = cell.getLocalDateTimeCellValue().toLocalDate();
                if (day.getYear() >= 1990 && day.getYear() <= 2200) return Optional.of(day);
            }
            if (cell.getCellType() == CellType.STRING)
                try {
                    return Optional.of(LocalDate.parse(cell.getStringCellValue().strip()));
                } catch (java.time.format.DateTimeParseException e) {
                    problems.add(where(cell) + " holds " + quoted(cell) + "; the date is written 2026-03-02.");
                    return Optional.empty();
                }
            problems.add(where(cell) + " holds " + quoted(cell) + "; the date is written 2026-03-02.");
            return Optional.empty();
        }

        private static Optional<String> text(Cell cell) {
            String s = shown(cell);
            return s.isEmpty() ? Optional.empty() : Optional.of(s);
        }

        private static boolean blank(Cell cell) {
            return cell == null
                    || cell.getCellType() == CellType.BLANK
                    || cell.getCellType() == CellType.STRING
                            && cell.getStringCellValue().isBlank();
        }

        /** A cell's text or number on one line. */
        private static String shown(Cell cell) {
            if (cell == null) return "";
            CellType type =
                    cell.getCellType() == CellType.FORMULA ? cell.getCachedFormulaResultType() : cell.getCellType();
            String s = switch (type) {
                case STRING -> cell.getStringCellValue();
                case NUMERIC -> Figures.plain(cell.getNumericCellValue());
                case BOOLEAN -> cell.getBooleanCellValue() ? "TRUE" : "FALSE";
                case ERROR -> FormulaError.forInt(cell.getErrorCellValue()).getString();
                default -> "";
            };
            return s.replaceAll("\\p{Cntrl}", " ").strip();
        }

        private static String quoted(Cell cell) {
            String s = shown(cell);
            return "\"" + (s.length() > 40 ? s.substring(0, 40) + "…" : s) + "\"";
        }

        private static String where(Cell cell) {
            return where(cell.getRow(), cell.getColumnIndex());
        }

        private static String where(Row row, int column) {
            return row.getSheet().getSheetName() + "!" + new CellReference(row.getRowNum(), column).formatAsString();
        }

        private AreaReference area(String name) {
            XSSFName found = workbook.getName(name);
            if (found == null || found.isDeleted() || found.getRefersToFormula().contains("#REF")) return null;
            return new AreaReference(found.getRefersToFormula(), workbook.getSpreadsheetVersion());
        }

        private Cell named(String name) {
            AreaReference a = area(name);
            if (a == null) return null;
            CellReference at = a.getFirstCell();
            XSSFSheet sheet = workbook.getSheet(at.getSheetName());
            Row row = sheet == null ? null : sheet.getRow(at.getRow());
            return row == null ? null : row.getCell(at.getCol());
        }
    }
}
