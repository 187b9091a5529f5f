package org.hazewright.learning;

import java.util.OptionalDouble;
import org.hazewright.optics.Refusal;

/**
 * One reading of one dilution in a cell, against the cell with diluent alone.
 *
 * @param concentrationGPerMl g of the ingredient in a mL of dilution; 0 for a blank
 * @param pathMm inner length of the cell
 * @param value transmission T/T₀ as a share, or absorbance −log₁₀(T/T₀), as {@code signal} says
 * @param u standard uncertainty of {@code value}, in its unit
 */
public record DilutionReading(
        double concentrationGPerMl, double pathMm, double wavelengthNm, Signal signal, double value, OptionalDouble u) {

    /** What the instrument shows. */
    public enum Signal {
        TRANSMISSION,
        ABSORBANCE
    }

    public DilutionReading {
        Refusal.notNegative("Concentration of a dilution in g/mL", concentrationGPerMl);
        Refusal.positive("Path length of a cell in mm", pathMm);
        Refusal.positive("Wavelength in nm", wavelengthNm);
        String where =
                " at " + Rounded.number(concentrationGPerMl) + " g/mL and " + Rounded.plain(wavelengthNm) + " nm";
        if (signal == Signal.TRANSMISSION && !(value > 0 && value <= 1.5))
            throw new Refusal(
                    "The transmission T/T0" + where + " is " + value + "; it must lie above 0 and at most 1.5"
                            + " (a share of the diluent's, not per cent). A dilution that lets nothing through needs a shorter cell.");
        if (signal == Signal.ABSORBANCE && !(value >= -0.2 && value <= 6))
            throw new Refusal("The absorbance" + where + " is " + value + "; it must lie between -0.2 and 6.");
        u.ifPresent(v -> Refusal.positive("Standard uncertainty of the reading" + where, v));
    }

    /**
     * Grams per mL of a dilution from its mass fraction w (g of ingredient in a g of dilution), volumes adding: w over
     * w/ρ + (1 − w)/ρ_diluent.
     */
    public static double gPerMl(double massFraction, double densityGPerMl, double diluentDensityGPerMl) {
        Refusal.within("Mass fraction of a dilution", massFraction, 0, 1);
        Refusal.positive("Density of the ingredient in g/mL", densityGPerMl);
        Refusal.positive("Density of the diluent in g/mL", diluentDensityGPerMl);
        return massFraction / (massFraction / densityGPerMl + (1 - massFraction) / diluentDensityGPerMl);
    }

    /** What the dilution takes out of the beam beyond the diluent, 1/cm: −ln(T/T₀)/d, or ln 10 times the absorbance over d. */
    public double extinctionPerCm() {
        return (signal == Signal.TRANSMISSION ? -Math.log(value) : Math.log(10) * value) / (pathMm / 10);
    }

    /** Standard uncertainty of {@link #extinctionPerCm}, first order. */
    public OptionalDouble uExtinctionPerCm() {
        if (u.isEmpty()) return u;
        double ofLog = signal == Signal.TRANSMISSION ? u.getAsDouble() / value : Math.log(10) * u.getAsDouble();
        return OptionalDouble.of(ofLog / (pathMm / 10));
    }

    /** Optical depth of the cell, without unit. */
    public double opticalDepth() {
        return extinctionPerCm() * pathMm / 10;
    }
}
