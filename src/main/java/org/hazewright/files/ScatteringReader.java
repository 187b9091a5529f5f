package org.hazewright.files;

import java.util.Optional;
import java.util.function.BiFunction;
import org.hazewright.optics.Crowding;
import org.hazewright.optics.SizeDistribution;
import org.hazewright.optics.Spectrum;
import org.hazewright.shelf.Material;
import org.hazewright.shelf.Scattering;

/** The {@code [scattering]} table of an ingredient: one of the models mie, power and table. */
final class ScatteringReader {
    private ScatteringReader() {}

    /** {@code materials} finds a material by id and the place where it is asked for. */
    static Scattering read(
            TomlPage table, double densityGPerMl, ShelfFolder folder, BiFunction<String, Place, Material> materials) {
        return switch (table.oneOf("model", "mie", "power", "table")) {
            case "mie" -> mie(table, folder, materials);
            case "power" -> power(table);
            default -> tabulated(table, densityGPerMl, folder);
        };
    }

    private static Scattering mie(TomlPage table, ShelfFolder folder, BiFunction<String, Place, Material> materials) {
        table.refuseUnknown(
                "model",
                "magnitude",
                "particle",
                "particle_volume_fraction",
                "crowding",
                "crowding_coefficients",
                "crowding_max_volume_fraction",
                "size");
        Material particle = materials.apply(table.text("particle"), table.at("particle"));
        double fraction = table.positive("particle_volume_fraction");
        Crowding crowding = crowding(table);
        SizeDistribution sizes = sizes(table.requireTable("size"), folder);
        double magnitude = table.positive("magnitude", 1);
        return table.holding(
                "particle_volume_fraction",
                () -> new Scattering.MieParticles(particle, fraction, sizes, crowding, magnitude));
    }

    private static Crowding crowding(TomlPage table) {
        String model = table.oneOf("crowding", "none", "percus-yevick", "polynomial");
        if (model.equals("polynomial")) {
            double[] coefficients = table.numbers("crowding_coefficients");
            double max = table.positive("crowding_max_volume_fraction");
            return table.holding("crowding_coefficients", () -> new Crowding.Polynomial(coefficients, max));
        }
        for (String key : new String[] {"crowding_coefficients", "crowding_max_volume_fraction"})
            if (table.has(key))
                throw table.refusal(
                        key,
                        "[scattering] " + key + " is for crowding = \"polynomial\"; here it is \"" + model
                                + "\". Change one.");
        return model.equals("none") ? new Crowding.None() : new Crowding.PercusYevick();
    }

    private static SizeDistribution sizes(TomlPage size, ShelfFolder folder) {
        switch (size.oneOf("kind", "single", "lognormal", "histogram")) {
            case "single":
                size.refuseUnknown("kind", "diameter_nm");
                double diameter = size.positive("diameter_nm");
                return size.holding("diameter_nm", () -> new SizeDistribution.Single(diameter));
            case "lognormal":
                size.refuseUnknown("kind", "number_median_diameter_nm", "geometric_standard_deviation");
                double median = size.positive("number_median_diameter_nm");
                double gsd = size.positive("geometric_standard_deviation");
                return size.holding("geometric_standard_deviation", () -> new SizeDistribution.LogNormal(median, gsd));
            default:
                size.refuseUnknown("kind", "edges_nm", "weights", "table");
                if (size.has("table")) return histogram(size, folder);
                double[] edges = size.numbers("edges_nm");
                double[] weights = size.numbers("weights");
                return size.holding("edges_nm", () -> new SizeDistribution.Histogram(edges, weights));
        }
    }

    private static SizeDistribution histogram(TomlPage size, ShelfFolder folder) {
        for (String key : new String[] {"edges_nm", "weights"})
            if (size.has(key))
                throw size.refusal(key, "A histogram has a table or " + key + ", not both; take one of them out.");
        return SizeTable.histogram(folder.table(size.text("table"), size.at("table")));
    }

    private static Scattering power(TomlPage table) {
        table.refuseUnknown("model", "magnitude", "musp_cm2_per_g", "at_nm", "exponent", "g", "from_nm", "to_nm");
        double musp = table.positive("musp_cm2_per_g");
        double at = table.positive("at_nm");
        double exponent = table.number("exponent");
        double g = table.number("g");
        double from = table.positive("from_nm", 400);
        double to = table.positive("to_nm", 1100);
        if (from >= to)
            throw table.refusal(
                    "to_nm",
                    "[scattering] to_nm is " + TomlPage.plain(to) + "; it must lie above from_nm, "
                            + TomlPage.plain(from) + ".");
        double magnitude = table.positive("magnitude", 1);
        return table.holding("model", () -> new Scattering.PowerLaw(musp, at, exponent, g, from, to, magnitude));
    }

    private static Scattering tabulated(TomlPage table, double densityGPerMl, ShelfFolder folder) {
        table.refuseUnknown("model", "magnitude", "table");
        String path = table.text("table");
        CsvTable csv = folder.table(path, table.at("table"));
        csv.refuseUnknown("wavelength_nm", "musp_per_cm", "musp_cm2_per_g", "g");
        String column = csv.oneOf("musp_per_cm", "musp_cm2_per_g");
        csv.refuseNegative(column);
        Spectrum musp = csv.spectrum(column, path);
        Optional<Spectrum> g = csv.has("g") ? Optional.of(csv.spectrum("g", path)) : Optional.empty();
        double perUnit = column.equals("musp_per_cm") ? 1 / densityGPerMl : 1;
        double magnitude = table.positive("magnitude", 1);
        return table.holding("table", () -> new Scattering.Tabulated(musp, perUnit, g, magnitude));
    }
}
