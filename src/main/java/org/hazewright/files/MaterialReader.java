package org.hazewright.files;

import java.util.Optional;
import org.hazewright.optics.CauchyIndex;
import org.hazewright.optics.ConstantIndex;
import org.hazewright.optics.IapwsWater;
import org.hazewright.optics.Index;
import org.hazewright.optics.RefractiveIndex;
import org.hazewright.optics.Refusal;
import org.hazewright.optics.ResonanceIndex;
import org.hazewright.optics.TableIndex;
import org.hazewright.optics.ThermoOpticIndex;
import org.hazewright.shelf.Material;

/**
 * A file of {@code materials/}: a refractive index by table or by formula, and its source.
 *
 * <p>Formulas state their validity range in {@code from_nm} and {@code to_nm}; a table's range is its own. Either may say how the
 * index moves with temperature.
 */
final class MaterialReader {
    private MaterialReader() {}

    static Material read(TomlPage page, String id, ShelfFolder folder) {
        page.requireFormat();
        Ids.requireFileName(page, id);
        String name = page.text("name", id);
        RefractiveIndex index = withTemperature(page, index(page, name, folder));
        return new Material(id, name, index, SourceReader.read(page.requireTable("source")));
    }

    private static RefractiveIndex index(TomlPage page, String name, ShelfFolder folder) {
        String form = page.has("form")
                ? page.oneOf("form", "table", "constant", "cauchy", "sellmeier", "pole", "iapws-water")
                : page.has("table")
                        ? "table"
                        : page.oneOf("form", "constant", "cauchy", "sellmeier", "pole", "iapws-water");
        switch (form) {
            case "table":
                known(page, "table");
                return table(page, name, folder);
            case "constant": {
                known(page, "n", "k", "from_nm", "to_nm");
                double n = page.positive("n");
                double k = page.within("k", 0, 1000, 0);
                double from = page.positive("from_nm");
                double to = page.positive("to_nm");
                return page.holding("from_nm", () -> new ConstantIndex(name, n, k, from, to));
            }
            case "cauchy": {
                known(page, "a", "b", "c", "from_nm", "to_nm");
                double a = page.number("a");
                double b = page.number("b", 0);
                double c = page.number("c", 0);
                double from = page.positive("from_nm");
                double to = page.positive("to_nm");
                return checked(page, page.holding("from_nm", () -> new CauchyIndex(name, a, b, c, from, to)));
            }
            case "sellmeier", "pole": {
                known(page, "a", "b", "c", "from_nm", "to_nm");
                double a = page.number("a");
                double[] b = page.numbers("b");
                double[] c = page.numbers("c");
                double from = page.positive("from_nm");
                double to = page.positive("to_nm");
                return checked(
                        page,
                        page.holding(
                                "c",
                                () -> form.equals("pole")
                                        ? ResonanceIndex.pole(name, a, b, c, from, to)
                                        : ResonanceIndex.sellmeier(name, a, b, c, from, to)));
            }
            default: {
                known(page, "from_nm", "to_nm");
                IapwsWater water = new IapwsWater();
                double from = page.within("from_nm", water.fromNm(), water.toNm(), water.fromNm());
                double to = page.within("to_nm", from, water.toNm(), water.toNm());
                return from == water.fromNm() && to == water.toNm() ? water : new Narrowed(name, water, from, to);
            }
        }
    }

    /** An index that says how it moves with temperature, in {@code dn_dt_per_c}, says at what temperature it holds, in {@code at_c}. */
    private static RefractiveIndex withTemperature(TomlPage page, RefractiveIndex index) {
        if (!page.has("dn_dt_per_c") && !page.has("at_c")) return index;
        double dnPerC = page.number("dn_dt_per_c");
        double measuredC = page.number("at_c");
        return page.holding("dn_dt_per_c", () -> new ThermoOpticIndex(index, measuredC, dnPerC));
    }

    private static void known(TomlPage page, String... ofForm) {
        java.util.List<String> all =
                new java.util.ArrayList<>(java.util.List.of("format", "id", "name", "form", "source"));
        all.addAll(java.util.List.of(ofForm));
        if (!page.text("form", "table").equals("iapws-water")) all.addAll(java.util.List.of("dn_dt_per_c", "at_c"));
        page.refuseUnknown(all);
    }

    private static RefractiveIndex table(TomlPage page, String name, ShelfFolder folder) {
        String path = page.text("table");
        CsvTable table = folder.table(path, page.at("table"));
        table.refuseUnknown("wavelength_nm", "n", "k");
        if (table.has("k")) table.refuseNegative("k");
        return page.holding(
                "table",
                () -> new TableIndex(
                        name,
                        table.spectrum("n", path),
                        Optional.of("k")
                                .filter(table::has)
                                .map(k -> table.spectrum(k, path))
                                .orElse(null)));
    }

    /** A formula must give an index over the whole range that it claims; coefficients in the wrong unit do not. */
    private static RefractiveIndex checked(TomlPage page, RefractiveIndex index) {
        for (int i = 0; i <= 20; i++) {
            double nm = Math.min(index.toNm(), index.fromNm() + (index.toNm() - index.fromNm()) * i / 20);
            Index at = page.holding("a", () -> index.at(nm, 20));
            if (at.n() > 20)
                throw page.refusal(
                        "a",
                        "The formula gives n = " + at.n() + " at " + TomlPage.plain(nm)
                                + " nm; check the coefficients' units (cauchy: nm; sellmeier and pole: µm²).");
        }
        return index;
    }

    /** A formula that a file trusts over less than its own range. */
    private record Narrowed(String name, RefractiveIndex whole, double fromNm, double toNm) implements RefractiveIndex {
        @Override
        public Index at(double wavelengthNm, double temperatureC) {
            if (!covers(wavelengthNm))
                throw new Refusal("Refractive index of " + name + " is not known at " + TomlPage.plain(wavelengthNm)
                        + " nm: its file says " + TomlPage.plain(fromNm) + " to " + TomlPage.plain(toNm)
                        + " nm, and nothing is extrapolated.");
            return whole.at(wavelengthNm, temperatureC);
        }
    }
}
