package org.hazewright.transport;

/**
 * Modified Bessel function K₀ of a complex argument with positive real part and |argument| ≤ π/4 or near it.
 *
 * <p>K₀(z) = ∫ exp(−z cosh t) dt over 0 ≤ t &lt; ∞ (Abramowitz &amp; Stegun 1964, 9.6.24) by the trapezoidal rule, which for this
 * integrand converges exponentially; relative error below 1e−12 for |z| ≥ 1e-3.
 */
final class BesselK0 {
    private static final double DEEP = 36;
    double re;
    double im;

    void at(double x, double y) {
        // a phase narrows the strip in which the integrand is regular, and the step with it
        double h = Math.min(0.26, Math.sqrt(0.5 / Math.hypot(x, y))) * (1 - Math.abs(Math.atan2(y, x)) * 2 / Math.PI);
        double twice = 2 * Math.cosh(h);
        double before = Math.cosh(h);
        double now = 1;
        double sumRe = 0.5;
        double sumIm = 0;
        while (true) {
            double next = twice * now - before;
            before = now;
            now = next;
            double s = now - 1;
            if (x * s > DEEP) break;
            double e = Math.exp(-x * s);
            if (y == 0) sumRe += e;
            else {
                sumRe += e * Math.cos(y * s);
                sumIm -= e * Math.sin(y * s);
            }
        }
        double e = h * Math.exp(-x);
        if (y == 0) {
            re = e * sumRe;
            im = 0;
            return;
        }
        double c = e * Math.cos(y);
        double s = -e * Math.sin(y);
        re = c * sumRe - s * sumIm;
        im = c * sumIm + s * sumRe;
    }
}
