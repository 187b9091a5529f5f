package org.hazewright.files;

import org.hazewright.brief.Point;

/** Relative half-widths of tolerance, from {@code [tolerance]} or 5 % each, and what a target makes of them. */
record Tolerance(double mua, double musp) {

    static Tolerance read(TomlPage page) {
        if (!page.has("tolerance")) return new Tolerance(0.05, 0.05);
        TomlPage t = page.requireTable("tolerance");
        t.refuseUnknown("mua", "musp");
        return new Tolerance(share(t, "mua", 0.05), share(t, "musp", 0.05));
    }

    private static double share(TomlPage table, String key, double otherwise) {
        double v = table.positive(key, otherwise);
        if (v > 1)
            throw table.refusal(
                    key,
                    "The tolerance " + key + " is " + TomlPage.plain(v)
                            + " and a share: 0.05 is 5 %. It must be at most 1.");
        return v;
    }

    /** Absolute half-width in 1/cm of a target's value: its own tolerance, or the brief's share of it. */
    double perCm(TomlPage target, Point.Quantity quantity, double valuePerCm) {
        String name = quantity == Point.Quantity.MUA ? "mua" : "musp";
        String relative = name + "_tolerance";
        String absolute = name + "_tolerance_per_cm";
        if (target.has(relative) && target.has(absolute))
            throw target.refusal(absolute, "The target gives " + relative + " and " + absolute + "; keep one of them.");
        if (target.has(absolute)) return target.positive(absolute);
        if (valuePerCm == 0)
            throw target.refusal(
                    name + "_per_cm",
                    name + "_per_cm is 0, and a share of 0 leaves no room; give " + absolute
                            + ", the half-width allowed in 1/cm.");
        double share = target.has(relative) ? share(target, relative, 0) : quantity == Point.Quantity.MUA ? mua : musp;
        return share * valuePerCm;
    }
}
