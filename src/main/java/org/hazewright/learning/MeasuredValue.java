package org.hazewright.learning;

import org.hazewright.optics.Refusal;

/**
 * One measured number of a batch: µa or µs' at a wavelength in nm, 1/cm, with its own standard uncertainty in 1/cm (repeatability
 * and fit; what the method's scale adds is in {@link Method}).
 */
public record MeasuredValue(Quantity quantity, double wavelengthNm, double perCm, double uPerCm) {
    public MeasuredValue {
        Refusal.positive("Wavelength in nm", wavelengthNm);
        String what = "Measured " + quantity.sign() + " at " + Rounded.plain(wavelengthNm) + " nm in 1/cm";
        if (!Double.isFinite(perCm)) throw new Refusal(what + " is " + perCm + "; it must be a number.");
        Refusal.positive(
                "Standard uncertainty of " + what.substring(0, 1).toLowerCase(java.util.Locale.ROOT)
                        + what.substring(1),
                uPerCm);
    }
}
