package org.hazewright.optics;

/**
 * Complex refractive index n + ik of a medium at one wavelength, k ≥ 0 for a medium that absorbs.
 *
 * <p>The sign convention is enforced, not repaired: k &lt; 0 is refused, and so is n ≤ 0.
 *
 * @param n real part, above 0, relative to vacuum unless said
 * @param k imaginary part, 0 or above
 */
public record Index(double n, double k) {
    public Index {
        Refusal.positive("Refractive index n", n);
        Refusal.notNegative("Absorption index k", k);
    }

    /** An index that does not absorb. */
    public static Index real(double n) {
        return new Index(n, 0);
    }

    /** Absorption coefficient in 1/cm of the bulk medium at a wavelength in nm in vacuum: 4πk/λ, base e. */
    public double muaPerCm(double wavelengthNm) {
        return 4 * Math.PI * k / wavelengthNm * 1e7;
    }
}
