package org.hazewright.brief;

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
            throw new Refusal("The target at " + wavelengthNm + " nm wants neither mua_per_cm nor musp_per_cm; give at least one.");
        muaPerCm.ifPresent(v -> Refusal.notNegative("µa wanted at " + wavelengthNm + " nm in 1/cm", v));
        muspPerCm.ifPresent(v -> Refusal.notNegative("µs' wanted at " + wavelengthNm + " nm in 1/cm", v));
        if (muaPerCm.isPresent()) Refusal.positive("Tolerance of µa at " + wavelengthNm + " nm in 1/cm", muaTolerancePerCm);
        if (muspPerCm.isPresent()) Refusal.positive("Tolerance of µs' at " + wavelengthNm + " nm in 1/cm", muspTolerancePerCm);
        Refusal.positive("Weight of the target at " + wavelengthNm + " nm", weight);
    }
}
