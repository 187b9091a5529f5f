package org.hazewright.reading;

import org.hazewright.mixture.Budget;
import org.hazewright.mixture.Cause;

/**
 * Absorption said as blood: the total haemoglobin (tetramer) and its oxygenated share that would absorb alike, with standard
 * uncertainties, cause by cause (JCGM 100:2008, eq. 10).
 */
public record HaemoglobinEquivalent(double umolPerL, double uUmolPerL, double saturation, double uSaturation) {

    /** At wavelengths in nm with their µa in 1/cm; the budget covers those wavelengths and may hold others. */
    public static HaemoglobinEquivalent of(Oximeter oximeter, double[] nm, double[] muaPerCm, Budget budget) {
        double[] none = new double[nm.length];
        double[] known = budget.wavelengthsNm();
        Oximeter.Answer planned = oximeter.read(nm, muaPerCm, none);
        double haemoglobin = 0;
        double saturation = 0;
        for (Cause cause : budget.causes()) {
            double[] moved = muaPerCm.clone();
            for (int j = 0; j < nm.length; j++)
                moved[j] += cause.muaPerCm()[java.util.Arrays.binarySearch(known, nm[j])];
            Oximeter.Answer then = oximeter.read(nm, moved, none);
            haemoglobin = Math.hypot(haemoglobin, then.haemoglobinUmolPerL() - planned.haemoglobinUmolPerL());
            saturation = Math.hypot(saturation, then.saturation() - planned.saturation());
        }
        return new HaemoglobinEquivalent(planned.haemoglobinUmolPerL(), haemoglobin, planned.saturation(), saturation);
    }
}
