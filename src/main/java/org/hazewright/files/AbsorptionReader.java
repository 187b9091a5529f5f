package org.hazewright.files;

import org.hazewright.optics.Spectrum;
import org.hazewright.shelf.Absorption;

/**
 * The {@code [absorption]} table of an ingredient.
 *
 * <p>The column's name says the basis: {@code mua_per_cm} of the neat ingredient, {@code mua_cm2_per_g}, or {@code
 * epsilon10_l_per_mol_cm}. For the last, a pure substance holds 1/molar mass mol/g, and a solution of {@code mol_per_l} holds
 * mol_per_l/1000/density mol/g.
 */
final class AbsorptionReader {
    private AbsorptionReader() {}

    static Absorption read(TomlPage table, double densityGPerMl, ShelfFolder folder) {
        table.refuseUnknown("table", "albedo", "g", "molar_mass_g_per_mol", "mol_per_l");
        String path = table.text("table");
        CsvTable csv = folder.table(path, table.at("table"));
        csv.refuseUnknown("wavelength_nm", "mua_per_cm", "mua_cm2_per_g", "epsilon10_l_per_mol_cm");
        String column = csv.oneOf("mua_per_cm", "mua_cm2_per_g", "epsilon10_l_per_mol_cm");
        csv.refuseNegative(column);
        Spectrum spectrum = csv.spectrum(column, path);
        double albedo = table.within("albedo", 0, 1, 0);
        double g = table.within("g", -1, 1, 0);
        if (column.equals("epsilon10_l_per_mol_cm")) {
            double molPerG = molPerG(table, densityGPerMl);
            return table.holding("table", () -> Absorption.molar(spectrum, molPerG, albedo, g));
        }
        for (String key : new String[] {"molar_mass_g_per_mol", "mol_per_l"})
            if (table.has(key))
                throw table.refusal(
                        key,
                        "[absorption] " + key + " is for a table with the column epsilon10_l_per_mol_cm; " + path
                                + " has " + column + ". Take the line out.");
        return table.holding(
                "table",
                () -> column.equals("mua_per_cm")
                        ? Absorption.neat(spectrum, densityGPerMl, albedo, g)
                        : Absorption.massSpecific(spectrum, albedo, g));
    }

    private static double molPerG(TomlPage table, double densityGPerMl) {
        double molarMass = table.positive("molar_mass_g_per_mol");
        if (!table.has("mol_per_l")) return 1 / molarMass;
        double molPerG = table.positive("mol_per_l") / 1000 / densityGPerMl;
        if (molPerG * molarMass > 1)
            throw table.refusal(
                    "mol_per_l",
                    "[absorption] mol_per_l gives " + (float) (molPerG * molarMass)
                            + " g of the substance in a gram of the ingredient; it can be at most 1. Is mol_per_l in mol/L, and not mmol/L?");
        return molPerG;
    }
}
