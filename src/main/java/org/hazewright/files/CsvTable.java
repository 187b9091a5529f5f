package org.hazewright.files;

import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Set;
import org.hazewright.optics.Spectrum;
import org.hazewright.shelf.Nearest;

/**
 * A CSV file of numbers: commas between columns, decimal points, {@code #} comment lines, one header row with units in the names.
 *
 * <p>At least one row, at most 200 000 rows and 64 columns; every cell a finite number. Files with semicolons, tabs or decimal
 * commas are refused with the word for what to change, never guessed at.
 */
public final class CsvTable {
    private static final int MOST_ROWS = 200_000;
    private static final int MOST_COLUMNS = 64;

    private final String path;
    private final List<String> header = new ArrayList<>();
    private int headerLine;
    private final List<double[]> rows = new ArrayList<>();
    private final List<Integer> lines = new ArrayList<>();

    private CsvTable(TextFile file) {
        path = file.path();
        int line = 0;
        for (String raw : file.text().split("\n", -1)) {
            line++;
            String text = raw.endsWith("\r") ? raw.substring(0, raw.length() - 1) : raw;
            if (text.isBlank() || text.stripLeading().startsWith("#")) continue;
            if (header.isEmpty()) readHeader(text, line);
            else readRow(text, line);
        }
        if (header.isEmpty())
            throw Place.whole(path)
                    .refusal("The table is empty; it needs a header row with the names of its columns, then numbers.");
        if (rows.isEmpty())
            throw new FileRefusal(path, headerLine, 1, "The table has a header and no rows of numbers below it.");
    }

    public static CsvTable read(Path file) {
        return new CsvTable(TextFile.read(file));
    }

    /** A table that has these columns, in any order, and no others. */
    public static CsvTable read(Path file, List<String> columns) {
        CsvTable table = read(file);
        table.refuseUnknown(columns.toArray(new String[0]));
        for (String name : columns) if (!table.has(name)) throw table.missing(name);
        return table;
    }

    /** A table that came out of something else than a text file, a workbook for one; line n of the text is row n there. */
    public static CsvTable of(String path, String text) {
        return new CsvTable(new TextFile(path, text, new byte[0]));
    }

    static CsvTable of(TextFile file) {
        return new CsvTable(file);
    }

    public String path() {
        return path;
    }

    public List<String> header() {
        return List.copyOf(header);
    }

    public boolean has(String column) {
        return header.contains(column);
    }

    public int rows() {
        return rows.size();
    }

    Place at(int row) {
        return new Place(path, lines.get(row), 1);
    }

    Place atHeader() {
        return new Place(path, headerLine, 1);
    }

    /** The numbers of a column, from top to bottom. */
    public double[] column(String name) {
        int i = header.indexOf(name);
        if (i < 0) throw missing(name);
        return rows.stream().mapToDouble(row -> row[i]).toArray();
    }

    /** Refuses columns other than these. */
    void refuseUnknown(String... known) {
        for (String name : header)
            if (!Arrays.asList(known).contains(name))
                throw atHeader()
                        .refusal("The column " + name + " is not known here." + Meant.by(name, Arrays.asList(known)));
    }

    /** Which one of these columns the table has; none, or more than one, is refused. */
    String oneOf(String... names) {
        List<String> found = Arrays.stream(names).filter(this::has).toList();
        if (found.size() == 1) return found.get(0);
        throw atHeader()
                .refusal("The table has " + (found.isEmpty() ? "none" : found.size()) + " of the columns "
                        + String.join(", ", names) + "; it must have exactly one of them, and the name says the unit.");
    }

    /** Refuses numbers below 0 in a column, by line. */
    void refuseNegative(String column) {
        double[] values = column(column);
        for (int i = 0; i < values.length; i++)
            if (values[i] < 0)
                throw at(i).refusal(
                                column + " is " + TomlPage.plain(values[i]) + " in this row; it must be 0 or above.");
    }

    /** A column over {@code wavelength_nm}, which must be above 0 and ascend from row to row. */
    Spectrum spectrum(String column, String name) {
        double[] nm = column("wavelength_nm");
        double[] values = column(column);
        if (nm.length < 2) throw at(0).refusal("The table has one row; a spectrum needs at least two.");
        for (int i = 0; i < nm.length; i++) {
            if (!(nm[i] > 0))
                throw at(i).refusal("wavelength_nm is " + TomlPage.plain(nm[i]) + " in this row; it must be above 0.");
            if (i > 0 && nm[i] <= nm[i - 1])
                throw at(i).refusal(
                                "wavelength_nm goes from " + TomlPage.plain(nm[i - 1]) + " to " + TomlPage.plain(nm[i])
                                        + "; it must ascend from row to row, each wavelength once. Sort the rows.");
        }
        return atHeader().of(() -> new Spectrum(name, nm, values));
    }

    private FileRefusal missing(String name) {
        return atHeader()
                .refusal("The column " + name + " is missing; the header has " + String.join(", ", header) + "."
                        + Nearest.to(name, header)
                                .map(n -> " Perhaps " + n + " is to be renamed.")
                                .orElse(""));
    }

    private void readHeader(String text, int line) {
        headerLine = line;
        if (!text.contains(",") && text.contains(";"))
            throw new FileRefusal(
                    path,
                    line,
                    text.indexOf(';') + 1,
                    "The columns are parted by semicolons; save the table with"
                            + " commas between columns and decimal points in numbers.");
        if (!text.contains(",") && text.contains("\t"))
            throw new FileRefusal(
                    path,
                    line,
                    text.indexOf('\t') + 1,
                    "The columns are parted by tabs; save the table with commas between columns.");
        String[] names = text.split(",", -1);
        if (names.length > MOST_COLUMNS)
            throw new FileRefusal(
                    path,
                    line,
                    1,
                    "The table has " + names.length + " columns; at most " + MOST_COLUMNS + " are read.");
        Set<String> seen = new LinkedHashSet<>();
        int column = 1;
        for (String raw : names) {
            String name = raw.strip();
            if (name.isEmpty())
                throw new FileRefusal(path, line, column, "A column has no name; the header row names every column.");
            if (isNumber(name))
                throw new FileRefusal(
                        path,
                        line,
                        column,
                        "The first row holds the number " + name
                                + "; it must be a header row with the names of the columns.");
            if (!seen.add(name))
                throw new FileRefusal(
                        path, line, column, "Two columns are called " + name + "; each name stands once.");
            column += raw.length() + 1;
        }
        header.addAll(seen);
    }

    private void readRow(String text, int line) {
        if (text.contains(";"))
            throw new FileRefusal(
                    path,
                    line,
                    text.indexOf(';') + 1,
                    "A semicolon stands in this row; columns are parted by commas"
                            + " and numbers take a decimal point.");
        String[] cells = text.split(",", -1);
        if (cells.length != header.size())
            throw new FileRefusal(
                    path,
                    line,
                    1,
                    "This row has " + cells.length + " cells and the header has " + header.size() + "."
                            + (cells.length > header.size()
                                    ? " If a comma stands inside a number, write a decimal point there."
                                    : " Fill the missing cells, or delete the row."));
        if (rows.size() == MOST_ROWS)
            throw new FileRefusal(path, line, 1, "The table has more than " + MOST_ROWS + " rows; thin it out.");
        double[] row = new double[cells.length];
        int column = 1;
        for (int i = 0; i < cells.length; i++) {
            row[i] = number(cells[i], line, column, header.get(i));
            column += cells[i].length() + 1;
        }
        rows.add(row);
        lines.add(line);
    }

    private double number(String raw, int line, int column, String name) {
        String cell = raw.strip();
        int start = column + (cell.isEmpty() ? 0 : raw.indexOf(cell));
        if (cell.isEmpty())
            throw new FileRefusal(
                    path, line, start, name + " is empty in this row; write a number, or delete the row.");
        if (!isNumber(cell))
            throw new FileRefusal(
                    path,
                    line,
                    start,
                    name + " is \"" + (cell.length() > 40 ? cell.substring(0, 40) + "…" : cell)
                            + "\" in this row; it must be a number such as 0.125 or 1.2e-3, without quotes or units.");
        double value = Double.parseDouble(cell);
        if (!Double.isFinite(value))
            throw new FileRefusal(path, line, start, name + " is " + cell + ", which is too large a number.");
        return value;
    }

    /** Sign, digits with a point somewhere, exponent: what both people and spreadsheets write, and nothing else that Java reads. */
    private static boolean isNumber(String s) {
        int i = sign(s, 0);
        int whole = digits(s, i);
        int end = whole;
        if (end < s.length() && s.charAt(end) == '.') end = digits(s, end + 1);
        if (end - i < 1 || end - i == 1 && whole == i) return false; // no digit at all, or a point alone
        if (end < s.length() && (s.charAt(end) == 'e' || s.charAt(end) == 'E')) {
            int from = sign(s, end + 1);
            end = digits(s, from);
            if (end == from) return false;
        }
        return end == s.length();
    }

    private static int sign(String s, int i) {
        return i < s.length() && (s.charAt(i) == '+' || s.charAt(i) == '-') ? i + 1 : i;
    }

    private static int digits(String s, int i) {
        while (i < s.length() && s.charAt(i) >= '0' && s.charAt(i) <= '9') i++;
        return i;
    }
}
