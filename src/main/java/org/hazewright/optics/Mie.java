package org.hazewright.optics;

/**
 * Scattering and absorption efficiencies of one homogeneous sphere of any size: Mie's solution.
 *
 * <p>Size parameter x = πD n_h/λ and relative index m = n + ik of the sphere in a host that does not absorb, k ≥ 0. Domain:
 * 1e-4 ≤ x ≤ 2e4, 0.2 ≤ n ≤ 10, 0 ≤ k ≤ 10 (so |m| ≤ 10√2); outside it a {@link Refusal}. For coefficients and angles see
 * {@link MieSeries}, which also states the equations and their source.
 */
public final class Mie {
    static final double X_MIN = 1e-4;
    static final double X_MAX = 2e4;
    static final double N_MIN = 0.2;
    static final double N_MAX = 10;
    static final double K_MAX = 10;

    /** Added to a denominator that may be 0 exactly; no other denominator is changed by it. */
    static final double OFF_POLE = 1e-150;

    /** Orders above the last one kept where the downward recurrence of ψ(x) begins. */
    static final int BEYOND = 16;

    private Mie() {}

    /** Efficiencies of a sphere of size parameter x and relative index n + ik. */
    public static Efficiencies sphere(double x, double n, double k) {
        return MieSeries.of(x, n, k).efficiencies();
    }

    /**
     * Number of partial waves: x + 4.05 x^(1/3) + 2 (Wiscombe, Appl. Opt. 19, 1505, 1980) and some more, since 1e-10 is
     * wanted here where that rule was made for 1e-8 or so.
     */
    static int orders(double x) {
        return (int) (x + 4.05 * Math.cbrt(x) + 8);
    }

    /** Order above |mx| from which the downward recurrence in y = mx has forgotten where it began. */
    static int startOfDownward(int orders, double absY) {
        return Math.max(orders, (int) (absY + 5 * Math.cbrt(absY))) + BEYOND;
    }

    static void refuseOutsideDomain(double x, double n, double k) {
        if (!(x >= X_MIN && x <= X_MAX))
            throw new Refusal(
                    "Size parameter x = πD n/λ is " + x + "; a sphere can be computed for x from 0.0001 to 20000."
                            + " Check diameter and wavelength: both are in nm.");
        if (!(n >= N_MIN && n <= N_MAX))
            throw new Refusal("Refractive index of the sphere relative to its host is " + n
                    + "; it must lie between 0.2 and 10.");
        if (!(k >= 0 && k <= K_MAX))
            throw new Refusal("Absorption index k of the sphere relative to its host is " + k
                    + "; it must lie between 0 (clear) and 10. In the convention n + ik, k > 0 absorbs.");
    }
}
