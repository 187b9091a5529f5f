package org.hazewright.files;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.TreeMap;
import java.util.function.Supplier;
import org.hazewright.brief.Point;
import org.hazewright.brief.Target;
import org.hazewright.brief.Tissue;

/**
 * The targets of a brief: those of {@code [[target]]}, and those that a {@code [tissue]} gives.
 *
 * <p>At a wavelength of both, each quantity that the target names takes the place of the tissue's; the other stays.
 */
final class TargetReader {
    static final double LEAST_NM = 100;
    static final double MOST_NM = 20_000;

    private TargetReader() {}

    static List<Target> read(
            TomlPage page, Optional<Tissue> tissue, Supplier<Tissue.Spectra> spectra, Tolerance tolerance) {
        TreeMap<Double, Target> byWavelength = new TreeMap<>();
        if (tissue.isPresent()) ofTissue(page.requireTable("tissue"), tissue.get(), spectra, tolerance, byWavelength);
        TreeMap<Double, Place> seen = new TreeMap<>();
        for (TomlPage table : page.tables("target")) {
            Target target = target(table, tolerance);
            Place before = seen.put(target.wavelengthNm(), table.at("wavelength_nm"));
            if (before != null)
                throw table.refusal(
                        "wavelength_nm",
                        "A target at " + TomlPage.plain(target.wavelengthNm()) + " nm stands at line " + before.line()
                                + " already; write both values into one target.");
            byWavelength.merge(target.wavelengthNm(), target, TargetReader::over);
        }
        return new ArrayList<>(byWavelength.values());
    }

    static Target target(TomlPage table, Tolerance tolerance) {
        table.refuseUnknown(
                "wavelength_nm",
                "mua_per_cm",
                "musp_per_cm",
                "mua_tolerance",
                "musp_tolerance",
                "mua_tolerance_per_cm",
                "musp_tolerance_per_cm",
                "weight");
        return values(table, table.within("wavelength_nm", LEAST_NM, MOST_NM), tolerance);
    }

    /** The target that a table's values make at a wavelength in nm. */
    static Target values(TomlPage table, double nm, Tolerance tolerance) {
        OptionalDouble mua = table.maybeNotNegative("mua_per_cm");
        OptionalDouble musp = table.maybeNotNegative("musp_per_cm");
        if (mua.isEmpty() && musp.isEmpty())
            throw table.at()
                    .refusal("The target at " + TomlPage.plain(nm)
                            + " nm wants neither mua_per_cm nor musp_per_cm; give at least one.");
        refuseIdle(table, mua, "mua");
        refuseIdle(table, musp, "musp");
        double muaTolerance = mua.isPresent() ? tolerance.perCm(table, Point.Quantity.MUA, mua.getAsDouble()) : 0;
        double muspTolerance = musp.isPresent() ? tolerance.perCm(table, Point.Quantity.MUSP, musp.getAsDouble()) : 0;
        double weight = table.positive("weight", 1);
        return table.at().of(() -> new Target(nm, mua, musp, muaTolerance, muspTolerance, weight));
    }

    private static void refuseIdle(TomlPage table, OptionalDouble value, String name) {
        for (String key : new String[] {name + "_tolerance", name + "_tolerance_per_cm"})
            if (value.isEmpty() && table.has(key))
                throw table.refusal(
                        key, key + " is given without " + name + "_per_cm; add the value, or take the line out.");
    }

    static Tissue tissue(TomlPage t) {
        t.refuseUnknown(
                "wavelengths_nm",
                "haemoglobin_umol_per_l",
                "saturation",
                "water_fraction",
                "fat_fraction",
                "musp_per_cm_at_500nm",
                "scatter_power");
        double[] nm = t.numbers("wavelengths_nm");
        for (int i = 0; i < nm.length; i++) {
            if (nm[i] < LEAST_NM || nm[i] > MOST_NM)
                throw t.at("wavelengths_nm", i)
                        .refusal("The wavelength " + TomlPage.plain(nm[i]) + " nm must lie between 100 and 20000 nm.");
            for (int j = 0; j < i; j++)
                if (nm[i] == nm[j])
                    throw t.at("wavelengths_nm", i)
                            .refusal("The wavelength " + TomlPage.plain(nm[i]) + " nm stands twice; take one out.");
        }
        double haemoglobin = t.within("haemoglobin_umol_per_l", 0, 5000);
        double saturation = haemoglobin == 0 ? t.within("saturation", 0, 1, 0) : t.within("saturation", 0, 1);
        double water = t.within("water_fraction", 0, 1, 0);
        double fat = t.within("fat_fraction", 0, 1, 0);
        OptionalDouble musp = t.maybePositive("musp_per_cm_at_500nm");
        if (musp.isEmpty() && t.has("scatter_power"))
            throw t.refusal(
                    "scatter_power",
                    "scatter_power is given without musp_per_cm_at_500nm; add that, or take the line out.");
        double power = musp.isPresent() ? t.within("scatter_power", -4, 6) : 0;
        return t.at().of(() -> new Tissue(nm, haemoglobin, saturation, water, fat, musp, power));
    }

    private static void ofTissue(
            TomlPage t,
            Tissue tissue,
            Supplier<Tissue.Spectra> spectra,
            Tolerance tolerance,
            TreeMap<Double, Target> byWavelength) {
        Tissue.Spectra tables = spectra.get();
        for (double nm : tissue.wavelengthsNm()) {
            double mua = t.holding("wavelengths_nm", () -> tissue.muaPerCm(nm, tables));
            if (!(mua > 0))
                throw t.at().refusal("The composition absorbs nothing at " + TomlPage.plain(nm)
                        + " nm; give haemoglobin, water or fat above 0, or write [[target]] entries.");
        }
        t.holding("wavelengths_nm", () -> tissue.targets(tables, tolerance.mua(), tolerance.musp()))
                .forEach(target -> byWavelength.put(target.wavelengthNm(), target));
    }

    /** Each quantity that the explicit target names, and of the other target what it leaves open; they share a wavelength. */
    static Target over(Target other, Target explicit) {
        boolean ownMua = explicit.muaPerCm().isPresent();
        boolean ownMusp = explicit.muspPerCm().isPresent();
        return new Target(
                explicit.wavelengthNm(),
                ownMua ? explicit.muaPerCm() : other.muaPerCm(),
                ownMusp ? explicit.muspPerCm() : other.muspPerCm(),
                ownMua ? explicit.muaTolerancePerCm() : other.muaTolerancePerCm(),
                ownMusp ? explicit.muspTolerancePerCm() : other.muspTolerancePerCm(),
                explicit.weight());
    }
}
