package org.hazewright.files;

import java.util.Optional;
import java.util.Set;
import org.hazewright.optics.Spectrum;
import org.hazewright.shelf.Absorption;
import org.hazewright.shelf.Scattering;

/**
 * The {@code [absorption]} table of an ingredient.
 *
 * <p>The column's name says the basis: {@code mua_per_cm} of the neat ingredient, {@code mua_cm2_per_g}, or {@code
 * epsilon10_l_per_mol_cm}. For the last, a pure substance holds 1/molar mass mol/g, and a solution of {@code mol_per_l} holds
 * mol_per_l/1000/density mol/g. {@code magnitude}, with a table or alone, multiplies what particles absorb by their own index.
 */
final class AbsorptionReader {
    private AbsorptionReader() {}

    /** The table's absorption; empty when only the magnitude of the particles' own is given. */
    static Optional<Absorption> read(TomlPage table, double densityGPerMl, ShelfFolder folder) {
        if (table.keys().equals(Set.of("magnitude"))) return Optional.empty();
        table.refuseUnknown("table", "albedo", "g", "molar_mass_g_per_mol", "mol_per_l", "magnitude");
        return Optional.of(ofTable(table, densityGPerMl, folder));
    }

    /** The scattering with the magnitude of its particles' own absorption, where {@code [absorption]} gives one. */
    static Optional<Scattering> magnified(TomlPage table, Optional<Scattering> scattering) {
        if (!table.has("magnitude")) return scattering;
        double magnitude = table.positive("magnitude");
        if (scattering.orElse(null) instanceof Scattering.MieParticles mie)
            return Optional.of(mie.absorbing(magnitude));
        throw table.refusal(
                "magnitude",
                "[absorption] magnitude multiplies what particles absorb by their own index, and there is no [scattering] with"
                        + " model = \"mie\". Take the line out; a table is multiplied in its own numbers.");
    }

    private static Absorption ofTable(TomlPage table, double densityGPerMl, ShelfFolder folder) {
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
