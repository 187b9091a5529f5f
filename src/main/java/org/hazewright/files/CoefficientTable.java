package org.hazewright.files;

import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.EnumMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.TreeMap;
import java.util.regex.Pattern;
import org.hazewright.brief.Target;
import org.hazewright.learning.MeasuredValue;
import org.hazewright.learning.Quantity;
import org.hazewright.optics.Figures;

/**
 * A table of coefficients over wavelength as people have them: wanted or measured values under the usual headings, per cm or per mm.
 *
 * <p>A heading says quantity and unit: {@code wavelength_nm}, {@code mua_per_cm}, {@code µs' (1/mm)}, {@code u(mua) /cm}, {@code tolerance
 * musp per mm}. One that names no unit is refused unless the caller says which. Columns that mean nothing here are left aside by name in {@link
 * #understood}, so that a person sees what was read before it is used. Cells may be empty. Where columns are parted by semicolons or tabs, numbers
 * may have decimal commas.
 */
public final class CoefficientTable {

    /** What a column holds. */
    private enum Column {
        WAVELENGTH("wavelength"),
        MUA("µa"),
        MUSP("µs'"),
        U_MUA("standard uncertainty of µa"),
        U_MUSP("standard uncertainty of µs'"),
        TOLERANCE_MUA("tolerance of µa"),
        TOLERANCE_MUSP("tolerance of µs'");

        private final String words;

        Column(String words) {
            this.words = words;
        }
    }

    /** One wavelength's values, 1/cm. */
    public record Row(
            double wavelengthNm,
            OptionalDouble mua,
            OptionalDouble musp,
            OptionalDouble uMua,
            OptionalDouble uMusp,
            OptionalDouble muaTolerance,
            OptionalDouble muspTolerance) {}

    private static final Pattern MICROMETRES = Pattern.compile("(^|[^a-z])um($|[^a-z])|micromet|micron");
    private static final Pattern PER_METRE = Pattern.compile("(/ ?|per[ _]?|[^a-zµμ])m($|[^a-z])|per[ _]?met(re|er)");

    private final String path;
    private final Map<Column, Integer> place = new EnumMap<>(Column.class);
    private final Map<Column, Double> toOurs = new EnumMap<>(Column.class);
    private final List<String> understood = new ArrayList<>();
    private final List<Row> rows = new ArrayList<>();
    private final int width;

    private CoefficientTable(String path, List<List<String>> cells, String saidUnit, boolean commas) {
        this.path = path;
        int head = 0;
        while (head < cells.size() && cells.get(head).stream().allMatch(String::isBlank)) head++;
        if (head == cells.size())
            throw Place.whole(path).refusal("The table is empty; it needs a heading row, then numbers.");
        width = cells.get(head).size();
        heading(cells.get(head), head + 1, saidUnit);
        TreeMap<Double, Integer> seen = new TreeMap<>();
        for (int r = head + 1; r < cells.size(); r++) {
            List<String> row = cells.get(r);
            if (row.stream().allMatch(String::isBlank)) continue;
            Row read = row(row, r + 1, commas);
            Integer before = seen.put(read.wavelengthNm(), r + 1);
            if (before != null)
                throw new FileRefusal(
                        path,
                        r + 1,
                        1,
                        Figures.plain(read.wavelengthNm()) + " nm stands in row " + before
                                + " already; keep one of them.");
            rows.add(read);
        }
        if (rows.isEmpty())
            throw new FileRefusal(path, head + 1, 1, "The table has a heading and no rows of numbers below it.");
    }

    /** {@code unit} is cm or mm for headings that name none; null when each must. */
    public static CoefficientTable read(Path file, String unit) {
        TextFile text = TextFile.read(file);
        String[] lines = text.text().split("\n", -1);
        String head = Arrays.stream(lines)
                .filter(l -> !l.isBlank() && !l.stripLeading().startsWith("#"))
                .findFirst()
                .orElse("");
        char between = head.contains(";") ? ';' : head.contains("\t") ? '\t' : ',';
        List<List<String>> cells = new ArrayList<>();
        for (String line : lines)
            cells.add(
                    line.stripLeading().startsWith("#")
                            ? List.of()
                            : Arrays.asList(line.replace("\r", "").split(String.valueOf(between), -1)));
        return new CoefficientTable(text.path(), cells, unit, between != ',');
    }

    /** The same of a workbook's cells as text; row n of the list is row n there. */
    public static CoefficientTable of(String path, List<List<String>> cells, String unit) {
        return new CoefficientTable(path, cells, unit, true);
    }

    private void heading(List<String> head, int line, String saidUnit) {
        for (int c = 0; c < head.size(); c++) {
            String raw = head.get(c).strip().replaceAll("^\"|\"$", "");
            if (raw.isEmpty()) continue;
            Optional<Column> column = column(raw);
            if (column.isEmpty()) {
                understood.add("\"" + raw + "\" is left aside");
                continue;
            }
            Integer before = place.put(column.get(), c);
            if (before != null)
                throw new FileRefusal(
                        path,
                        line,
                        1,
                        "Two columns hold the " + column.get().words + ": \""
                                + head.get(before).strip() + "\" and \"" + raw + "\"; keep one, or rename the other.");
            boolean wavelength = column.get() == Column.WAVELENGTH;
            double factor = wavelength ? nanometres(raw) : perCm(raw, line, saidUnit);
            toOurs.put(column.get(), factor);
            understood.add("\"" + raw + "\" is the " + column.get().words
                    + (wavelength
                            ? factor == 1 ? " in nm" : " in µm, times 1000 to nm"
                            : factor == 1
                                    ? " in 1/cm"
                                    : factor == 10 ? " in 1/mm, times 10 to 1/cm" : " in 1/m, divided by 100 to 1/cm"));
        }
        if (!place.containsKey(Column.WAVELENGTH))
            throw new FileRefusal(
                    path,
                    line,
                    1,
                    "No column holds the wavelength; call it wavelength_nm. Found: " + String.join(", ", head));
        if (!place.containsKey(Column.MUA) && !place.containsKey(Column.MUSP))
            throw new FileRefusal(
                    path,
                    line,
                    1,
                    "No column holds µa or µs'; call them mua_per_cm and musp_per_cm (or per_mm). Found: "
                            + String.join(", ", head));
    }

    private static Optional<Column> column(String raw) {
        String s = raw.toLowerCase(Locale.ROOT)
                .replace('μ', 'µ')
                .replace('′', '\'')
                .replace('’', '\'');
        String bare = s.replaceAll("[^a-zµλ'0-9]", "");
        boolean musp = bare.contains("musp")
                || bare.contains("mus'")
                || bare.contains("µs'")
                || bare.contains("us'")
                || bare.contains("reduced")
                || bare.contains("µsp");
        boolean mua = !musp && (bare.contains("mua") || bare.contains("µa") || bare.contains("absorption"));
        boolean tolerance = s.contains("tol");
        boolean u = s.startsWith("u_")
                || s.startsWith("u(")
                || s.startsWith("u ")
                || s.contains("uncert")
                || s.contains("std")
                || s.contains("sigma")
                || s.startsWith("sd")
                || s.contains("±");
        if (musp) return Optional.of(tolerance ? Column.TOLERANCE_MUSP : u ? Column.U_MUSP : Column.MUSP);
        if (mua) return Optional.of(tolerance ? Column.TOLERANCE_MUA : u ? Column.U_MUA : Column.MUA);
        boolean wavelength = s.startsWith("wavelength")
                || s.startsWith("lambda")
                || s.startsWith("λ")
                || s.equals("nm")
                || s.startsWith("wl");
        return wavelength ? Optional.of(Column.WAVELENGTH) : Optional.empty();
    }

    private static double nanometres(String raw) {
        String s = raw.toLowerCase(Locale.ROOT).replace('μ', 'µ');
        return s.contains("µm") || MICROMETRES.matcher(s).find() ? 1000 : 1;
    }

    private double perCm(String raw, int line, String saidUnit) {
        String s = raw.toLowerCase(Locale.ROOT);
        boolean mm = s.contains("mm");
        boolean cm = s.contains("cm");
        if (mm != cm) return mm ? 10 : 1;
        if (!mm && PER_METRE.matcher(s).find()) return 0.01;
        if (!mm && saidUnit != null) return saidUnit.equals("mm") ? 10 : 1;
        throw new FileRefusal(
                path,
                line,
                1,
                "The heading \"" + raw + "\" " + (mm ? "names two units" : "names no unit")
                        + "; a factor of ten hangs on it. Write per cm or per mm into it, or say --table-unit cm (or mm).");
    }

    private Row row(List<String> cells, int line, boolean commas) {
        for (int c = width; c < cells.size(); c++)
            if (!commas && !cells.get(c).isBlank())
                throw new FileRefusal(
                        path,
                        line,
                        1,
                        "This row has " + cells.size() + " cells and the heading has " + width
                                + ". If a comma stands inside a number, write a decimal point there, or part the columns by"
                                + " semicolons.");
        OptionalDouble nm = number(cells, Column.WAVELENGTH, line, commas);
        if (nm.isEmpty()) throw new FileRefusal(path, line, 1, "The wavelength is empty in this row.");
        if (!(nm.getAsDouble() >= 100 && nm.getAsDouble() <= 20_000))
            throw new FileRefusal(
                    path,
                    line,
                    1,
                    "The wavelength is " + Figures.plain(nm.getAsDouble())
                            + " nm; it must lie between 100 and 20000 nm."
                            + (nm.getAsDouble() >= 0.1 && nm.getAsDouble() <= 20
                                    ? " If it is in µm, write that into the heading: wavelength (µm)."
                                    : ""));
        return new Row(
                nm.getAsDouble(),
                number(cells, Column.MUA, line, commas),
                number(cells, Column.MUSP, line, commas),
                number(cells, Column.U_MUA, line, commas),
                number(cells, Column.U_MUSP, line, commas),
                number(cells, Column.TOLERANCE_MUA, line, commas),
                number(cells, Column.TOLERANCE_MUSP, line, commas));
    }

    private OptionalDouble number(List<String> cells, Column column, int line, boolean commas) {
        Integer c = place.get(column);
        if (c == null || c >= cells.size()) return OptionalDouble.empty();
        String raw = cells.get(c).strip().replaceAll("^\"|\"$", "");
        if (raw.isEmpty() || raw.equals("-") || raw.equals("–")) return OptionalDouble.empty();
        String s = commas && !raw.contains(".") ? raw.replace(',', '.') : raw;
        try {
            double v = Double.parseDouble(s);
            if (!Double.isFinite(v) || v < 0 || s.matches(".*[dDfF]")) throw new NumberFormatException(s);
            return OptionalDouble.of(v * toOurs.get(column));
        } catch (NumberFormatException e) {
            throw new FileRefusal(
                    path,
                    line,
                    1,
                    "The " + column.words + " is \"" + raw
                            + "\" in this row; it must be a number, 0 or above, without a unit.");
        }
    }

    /** What each heading was taken for, in their order. */
    public List<String> understood() {
        return List.copyOf(understood);
    }

    public List<Row> rows() {
        return List.copyOf(rows);
    }

    /** As measured values; one without a stated uncertainty gets this share of itself. */
    public List<MeasuredValue> measured(OptionalDouble share) {
        List<MeasuredValue> values = new ArrayList<>();
        for (Row r : rows) {
            add(values, Quantity.ABSORPTION, r.wavelengthNm(), r.mua(), r.uMua(), share);
            add(values, Quantity.SCATTERING, r.wavelengthNm(), r.musp(), r.uMusp(), share);
        }
        if (values.isEmpty()) throw Place.whole(path).refusal("The table holds no value of µa or µs'.");
        return values;
    }

    private void add(
            List<MeasuredValue> values,
            Quantity q,
            double nm,
            OptionalDouble value,
            OptionalDouble u,
            OptionalDouble share) {
        if (value.isEmpty()) return;
        if (u.isEmpty() && share.isEmpty())
            throw Place.whole(path)
                    .refusal("The measured " + q.sign() + " at " + Figures.plain(nm)
                            + " nm comes without its standard uncertainty; add a column such as u_mua_per_cm, or say --u 0.02 for 2 % of"
                            + " every value.");
        double v = value.getAsDouble();
        values.add(new MeasuredValue(q, nm, v, u.orElse(share.orElse(0) * v)));
    }

    /** As targets; a value without a tolerance of its own gets this share of itself. */
    public List<Target> targets(double muaShare, double muspShare) {
        return rows.stream()
                .filter(r -> r.mua().isPresent() || r.musp().isPresent())
                .map(r -> new Target(
                        r.wavelengthNm(),
                        r.mua(),
                        r.musp(),
                        r.muaTolerance().orElse(muaShare * r.mua().orElse(0)),
                        r.muspTolerance().orElse(muspShare * r.musp().orElse(0)),
                        1))
                .sorted(java.util.Comparator.comparingDouble(Target::wavelengthNm))
                .toList();
    }
}
