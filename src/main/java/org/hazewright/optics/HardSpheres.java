package org.hazewright.optics;

/**
 * Hard spheres that cannot overlap scatter together: the Percus–Yevick structure factor.
 *
 * <p>S(q) of equal spheres of diameter d at volume fraction φ, with q d without unit, 0 ≤ φ ≤ 0.45; towards 0.49, where hard
 * spheres begin to freeze (Hoover &amp; Ree, J. Chem. Phys. 49, 3609, 1968), the closed form overstates the peaks of S more and more, and
 * the constructor refuses. S → 1 for φ → 0 and for q d → ∞;
 * S(0) = (1 − φ)⁴/(1 + 2φ)².
 *
 * <p>1/S(q) = 1 + 24 φ ∫₀¹ (α + βs + γs³) s² sin(q d s)/(q d s) ds with α = (1 + 2φ)²/(1 − φ)⁴,
 * β = −6φ(1 + φ/2)²/(1 − φ)⁴, γ = φα/2: Percus &amp; Yevick, Phys. Rev. 110, 1, 1958, solved by Wertheim, Phys. Rev. Lett. 10,
 * 321, 1963, eq. 12.
 */
public record HardSpheres(double volumeFraction) {
    /** The largest φ for which the model is used. */
    public static final double MAX_VOLUME_FRACTION = 0.45;

    public HardSpheres {
        Refusal.notNegative("Volume fraction of particles", volumeFraction);
        if (volumeFraction > MAX_VOLUME_FRACTION)
            throw new Refusal("Volume fraction of particles is " + volumeFraction + ", above " + MAX_VOLUME_FRACTION
                    + ", the limit of the Percus–Yevick model of crowding. Perhaps dilute it, or choose no crowding or a"
                    + " measured polynomial.");
    }

    /** S at q d ≥ 0. */
    public double structureFactor(double qd) {
        double[] f = new double[3];
        moments(qd, f);
        return structureFactor(f[0], f[1], f[2]);
    }

    /** S from the three integrals of {@link #moments}. */
    double structureFactor(double f0, double f1, double f3) {
        double phi = volumeFraction;
        double q = 1 / ((1 - phi) * (1 - phi));
        double alpha = (1 + 2 * phi) * (1 + 2 * phi) * q * q;
        double beta = -6 * phi * (1 + phi / 2) * (1 + phi / 2) * q * q;
        double gamma = phi * alpha / 2;
        return 1 / (1 + 24 * phi * (alpha * f0 + beta * f1 + gamma * f3));
    }

    /** ∫₀¹ s² s^p sin(vs)/(vs) ds for p = 0, 1, 3: the part of S that knows v = q d only. */
    static void moments(double v, double[] out) {
        double v2 = v * v;
        if (v < 2) {
            // power series: the closed forms lose their digits to cancellation here
            double term = 1;
            double f0 = 0;
            double f1 = 0;
            double f3 = 0;
            for (int j = 0; j < 16; j++) {
                f0 += term / (2 * j + 3);
                f1 += term / (2 * j + 4);
                f3 += term / (2 * j + 6);
                term *= -v2 / ((2 * j + 2) * (2 * j + 3));
            }
            out[0] = f0;
            out[1] = f1;
            out[2] = f3;
            return;
        }
        double sin = Math.sin(v);
        double cos = Math.cos(v);
        out[0] = (sin - v * cos) / (v * v2);
        out[1] = (2 * v * sin + (2 - v2) * cos - 2) / (v2 * v2);
        out[2] = (4 * (v2 - 6) * v * sin - (v2 * v2 - 12 * v2 + 24) * cos + 24) / (v2 * v2 * v2);
    }
}
