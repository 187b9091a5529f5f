package org.hazewright.files;

import java.nio.file.Path;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.function.Supplier;
import org.hazewright.brief.Brief;
import org.hazewright.brief.Point;
import org.hazewright.brief.Series;
import org.hazewright.brief.Target;
import org.hazewright.brief.Tissue;
import org.hazewright.brief.Titration;

/**
 * A brief file of several phantoms to a {@link Series}: a grid in {@code [series]}, or one {@code [[phantom]]} after the other.
 *
 * <p>The grid pairs every {@code musp_per_cm} with every {@code mua_per_cm}, each the same at all its wavelengths; its phantoms are
 * called by a letter for µs' and a number for µa: A1, A2, … B1. A {@code [[phantom]]} has a name, and one target's values, or
 * {@code [[phantom.target]]} entries, or a {@code [phantom.tissue]}. A {@code [titration]} says that they are made in one vessel, in
 * that order.
 *
 * <p>A {@code [[target]]} beside the grid or the rows is wanted of every phantom: a quantity or a wavelength that they leave open.
 */
public final class SeriesReader {
    private static final int MOST_PHANTOMS = 400;

    private final TomlPage page;
    private final TextFile text;
    private final String name;
    private final Supplier<Tissue.Spectra> spectra;
    private final Tolerance tolerance;

    /** Wanted of every phantom. */
    private final List<Target> common;

    private SeriesReader(TextFile text, String name, Supplier<Tissue.Spectra> spectra) {
        this.text = text;
        this.page = TomlPage.of(text);
        this.name = name;
        this.spectra = spectra;
        page.requireFormat(FileKind.BRIEF);
        List<String> known = new ArrayList<>(BriefReader.SHARED_KEYS);
        known.addAll(List.of("series", "phantom", "titration", "target"));
        if (page.has("tissue"))
            throw page.refusal(
                    "tissue",
                    "A [tissue] belongs to one phantom; write it as [phantom.tissue] below the [[phantom]] that is to be like it.");
        page.refuseUnknown(known);
        this.tolerance = Tolerance.read(page);
        this.common = TargetReader.read(page, Optional.empty(), spectra, tolerance);
    }

    /** {@code spectra} is asked only for phantoms with a tissue. */
    public static Series read(Path file, Supplier<Tissue.Spectra> spectra) {
        return new SeriesReader(TextFile.read(file), BriefReader.nameOf(file), spectra).series();
    }

    private Series series() {
        if (page.has("series") && page.has("phantom"))
            throw page.refusal("phantom", "The brief has a [series] grid and [[phantom]] entries; keep one of them.");
        List<Brief> phantoms = page.has("series") ? grid(page.requireTable("series")) : rows();
        if (phantoms.isEmpty())
            throw page.at()
                    .refusal(
                            "The brief has no phantoms; add [[phantom]] entries, or a [series] with wavelengths_nm, mua_per_cm and"
                                    + " musp_per_cm. For one phantom use the command design.");
        Optional<Titration> titration = page.table("titration").map(SeriesReader::titration);
        return page.at().of(() -> new Series(name, page.text("title", name), phantoms, titration));
    }

    private List<Brief> grid(TomlPage grid) {
        grid.refuseUnknown(
                "wavelengths_nm", "mua_per_cm", "musp_per_cm", "mua_tolerance_per_cm", "musp_tolerance_per_cm");
        double[] nm = values(grid, "wavelengths_nm", TargetReader.LEAST_NM, TargetReader.MOST_NM);
        double[] mua = grid.has("mua_per_cm") ? values(grid, "mua_per_cm", 0, Double.MAX_VALUE) : new double[0];
        double[] musp = grid.has("musp_per_cm") ? values(grid, "musp_per_cm", 0, Double.MAX_VALUE) : new double[0];
        if (mua.length == 0 && musp.length == 0)
            throw grid.at()
                    .refusal("The grid has neither mua_per_cm nor musp_per_cm; give a list of at least one of them.");
        long count = Math.max(1L, mua.length) * Math.max(1, musp.length);
        if (count > MOST_PHANTOMS)
            throw grid.at()
                    .refusal("The grid has " + count + " phantoms; at most " + MOST_PHANTOMS + " are made together.");
        List<Brief> phantoms = new ArrayList<>();
        for (int row = 0; row < Math.max(1, musp.length); row++)
            for (int column = 0; column < Math.max(1, mua.length); column++) {
                OptionalDouble a = mua.length == 0 ? OptionalDouble.empty() : OptionalDouble.of(mua[column]);
                OptionalDouble s = musp.length == 0 ? OptionalDouble.empty() : OptionalDouble.of(musp[row]);
                double ua = a.isPresent() ? tolerance.perCm(grid, Point.Quantity.MUA, a.getAsDouble()) : 0;
                double us = s.isPresent() ? tolerance.perCm(grid, Point.Quantity.MUSP, s.getAsDouble()) : 0;
                List<Target> targets = new ArrayList<>();
                for (double at : nm) targets.add(grid.at().of(() -> new Target(at, a, s, ua, us, 1)));
                phantoms.add(brief(letters(row) + (column + 1), targets, Optional.empty()));
            }
        return phantoms;
    }

    /** A list of numbers in an interval, each once. */
    private static double[] values(TomlPage grid, String key, double low, double high) {
        double[] values = grid.numbers(key);
        if (values.length == 0)
            throw grid.refusal(key, "The list [series] " + key + " is empty; it needs at least one number.");
        for (int i = 0; i < values.length; i++) {
            if (values[i] < low || values[i] > high)
                throw grid.at(key, i)
                        .refusal(TomlPage.plain(values[i]) + " in [series] " + key + " must be " + TomlPage.plain(low)
                                + " or above"
                                + (high < Double.MAX_VALUE ? ", and at most " + TomlPage.plain(high) + "." : "."));
            for (int j = 0; j < i; j++)
                if (values[i] == values[j])
                    throw grid.at(key, i)
                            .refusal(
                                    TomlPage.plain(values[i]) + " stands twice in [series] " + key + "; take one out.");
        }
        return values;
    }

    /** A, B, … Z, AA, AB, … */
    private static String letters(int row) {
        String last = String.valueOf((char) ('A' + row % 26));
        return row < 26 ? last : letters(row / 26 - 1) + last;
    }

    private List<Brief> rows() {
        List<Brief> phantoms = new ArrayList<>();
        Map<String, Place> seen = new HashMap<>();
        List<TomlPage> tables = page.tables("phantom");
        if (tables.size() > MOST_PHANTOMS)
            throw page.refusal(
                    "phantom",
                    "The brief has " + tables.size() + " phantoms; at most " + MOST_PHANTOMS + " are made together.");
        for (TomlPage table : tables) {
            String own = Ids.require(table, "name");
            Place before = seen.put(own, table.at("name"));
            if (before != null)
                throw table.refusal(
                        "name",
                        "A phantom is called \"" + own + "\" at line " + before.line()
                                + " already; give each its own name.");
            phantoms.add(row(table, own));
        }
        return phantoms;
    }

    private Brief row(TomlPage table, String own) {
        if (!table.has("target") && !table.has("tissue")) {
            Target target = TargetReader.target(table.without("name"), tolerance);
            return brief(own, List.of(target), Optional.empty());
        }
        table.refuseUnknown("name", "target", "tissue");
        Optional<Tissue> tissue = table.table("tissue").map(TargetReader::tissue);
        List<Target> targets = TargetReader.read(table, tissue, spectra, tolerance);
        if (targets.isEmpty())
            throw table.at()
                    .refusal("The phantom \"" + own
                            + "\" has no targets; add [[phantom.target]] entries below its name.");
        return brief(own, targets, tissue);
    }

    private Brief brief(String own, List<Target> targets, Optional<Tissue> tissue) {
        String title = page.text("title", name) + ", " + own;
        List<Target> all = new ArrayList<>(targets);
        for (Target shared : common) {
            int at = 0;
            while (at < targets.size() && targets.get(at).wavelengthNm() != shared.wavelengthNm()) at++;
            if (at == targets.size()) all.add(shared);
            else {
                refuseTwice(shared, targets.get(at), own);
                all.set(at, TargetReader.over(shared, targets.get(at)));
            }
        }
        return BriefReader.shared(page, name + "-" + own, title, text.sha256(), all, tissue);
    }

    private void refuseTwice(Target shared, Target own, String phantom) {
        boolean mua = shared.muaPerCm().isPresent() && own.muaPerCm().isPresent();
        boolean musp = shared.muspPerCm().isPresent() && own.muspPerCm().isPresent();
        if (!mua && !musp) return;
        String what = (mua ? "µa" : "µs'") + " at " + TomlPage.plain(own.wavelengthNm()) + " nm";
        throw page.refusal(
                "target",
                "A [[target]] beside the set is wanted of every phantom, and the phantom " + phantom + " has its own "
                        + what + " already; take " + what
                        + " out of one of them, or give the target another wavelength.");
    }

    private static Titration titration(TomlPage table) {
        table.refuseUnknown("keep_musp", "aliquot_ml", "evaporation_g_per_step", "vessel_ml");
        boolean keep = table.flag("keep_musp", false);
        double aliquot = table.has("aliquot_ml") ? table.notNegative("aliquot_ml") : 0;
        double evaporation = table.has("evaporation_g_per_step") ? table.notNegative("evaporation_g_per_step") : 0;
        return table.at().of(() -> new Titration(keep, aliquot, evaporation, table.maybePositive("vessel_ml")));
    }
}
