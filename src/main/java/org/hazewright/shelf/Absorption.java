package org.hazewright.shelf;

import org.hazewright.optics.Refusal;
import org.hazewright.optics.Spectrum;

/**
 * Absorption of an ingredient over wavelength, per gram in a millilitre of phantom.
 *
 * <p>{@code table} holds the figures as the file gives them, {@code perTableUnit} turns them into cm²/g (Napierian):
 * a neat coefficient in 1/cm is divided by the ingredient's density in g/mL; a decadic molar absorptivity in L/(mol cm) is
 * multiplied by ln 10 and the moles in a gram, over 1000 mL/L. For a table of extinction {@code albedo} is the share of it that
 * is scattering, with mean cosine {@code g}.
 */
public record Absorption(Spectrum table, Basis basis, double perTableUnit, double albedo, double g) {

    /** What a table of absorption is given per. */
    public enum Basis {
        /** mua_per_cm: of the neat ingredient. */
        NEAT,
        /** mua_cm2_per_g: by mass in the phantom's volume. */
        MASS,
        /** epsilon10_l_per_mol_cm: molar, base 10. */
        MOLAR
    }

    public Absorption {
        Refusal.positive("Scale of an absorption table", perTableUnit);
        Refusal.within("Albedo of an extinction table", albedo, 0, 1);
        Refusal.within("Mean cosine g", g, -1, 1);
        for (double v : table.values())
            if (v < 0)
                throw new Refusal(table.name() + " holds the negative absorption " + v + "; it must be 0 or above.");
    }

    public static Absorption neat(Spectrum muaPerCm, double densityGPerMl, double albedo, double g) {
        return new Absorption(muaPerCm, Basis.NEAT, 1 / densityGPerMl, albedo, g);
    }

    public static Absorption massSpecific(Spectrum muaCm2PerG, double albedo, double g) {
        return new Absorption(muaCm2PerG, Basis.MASS, 1, albedo, g);
    }

    /**
     * From a decadic molar absorptivity in L/(mol cm) and the ingredient's content of the absorbing substance in mol/g:
     * µa = ln 10 · ε · c.
     */
    public static Absorption molar(Spectrum epsilon, double molPerG, double albedo, double g) {
        return new Absorption(epsilon, Basis.MOLAR, Math.log(10) * molPerG * 1000, albedo, g);
    }

    /** What is taken out of the beam, cm²/g: absorbed plus scattered. */
    private double extinctionCm2PerG(double nm) {
        return table.at(nm) * perTableUnit;
    }

    /** Mass-specific absorption, cm²/g. */
    public double kappaCm2PerG(double nm) {
        return (1 - albedo) * extinctionCm2PerG(nm);
    }

    /** Mass-specific scattering of an extinction table, cm²/g. */
    public double scatteredCm2PerG(double nm) {
        return albedo * extinctionCm2PerG(nm);
    }
}
