package org.hazewright.brief;

import java.math.BigDecimal;
import java.math.MathContext;
import java.util.OptionalDouble;
import org.hazewright.optics.Refusal;

/**
 * A wanted value at one wavelength (nm): µa or µs' or both, in 1/cm, each with its absolute half-width of tolerance in 1/cm, and
 * a weight.
 */
public record Target(
        double wavelengthNm,
        OptionalDouble muaPerCm,
        OptionalDouble muspPerCm,
        double muaTolerancePerCm,
        double muspTolerancePerCm,
        double weight) {

    public Target {
        Refusal.positive("Wavelength in nm", wavelengthNm);
        if (muaPerCm.isEmpty() && muspPerCm.isEmpty())
            throw new Refusal("The target at " + wavelengthNm
                    + " nm wants neither mua_per_cm nor musp_per_cm; give at least one.");
        muaPerCm.ifPresent(v -> Refusal.notNegative("µa wanted at " + wavelengthNm + " nm in 1/cm", v));
        muspPerCm.ifPresent(v -> Refusal.notNegative("µs' wanted at " + wavelengthNm + " nm in 1/cm", v));
        if (muaPerCm.isPresent())
            Refusal.positive("Tolerance of µa at " + wavelengthNm + " nm in 1/cm", muaTolerancePerCm);
        if (muspPerCm.isPresent())
            Refusal.positive("Tolerance of µs' at " + wavelengthNm + " nm in 1/cm", muspTolerancePerCm);
        Refusal.positive("Weight of the target at " + wavelengthNm + " nm", weight);
    }

    /**
     * The share of a wanted value that a half-width was most likely said as: one of at most four digits that gives it again; empty
     * when there is none.
     */
    public static OptionalDouble shareOf(double halfWidthPerCm, double wantedPerCm) {
        if (!(wantedPerCm > 0)) return OptionalDouble.empty();
        double share = new BigDecimal(halfWidthPerCm / wantedPerCm)
                .round(new MathContext(4))
                .doubleValue();
        boolean same = Math.abs(share * wantedPerCm - halfWidthPerCm) <= 1e-12 * halfWidthPerCm;
        return same && share > 0 && share <= 1 ? OptionalDouble.of(share) : OptionalDouble.empty();
    }
}
