package org.hazewright.optics;

/**
 * Complex refractive index n + ik of a medium at one wavelength, k ≥ 0 for a medium that absorbs.
 *
 * <p>The sign convention is enforced, not repaired: k &lt; 0 is refused. Absorption coefficient µa = 4πk/λ.
 */
public record Index(double n, double k) {
    public Index {
        Refusal.positive("Refractive index n", n);
        Refusal.notNegative("Absorption index k", k);
    }

    public static Index real(double n) {
        return new Index(n, 0);
    }

    /** Absorption coefficient in 1/cm of the solid medium at a wavelength in nm: 4πk/λ. */
    public double muaPerCm(double wavelengthNm) {
        return 4 * Math.PI * k / wavelengthNm * 1e7;
    }
}
