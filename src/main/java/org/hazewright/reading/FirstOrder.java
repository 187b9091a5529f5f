package org.hazewright.reading;

import java.util.function.ToDoubleFunction;

/**
 * First-order propagation of u(µa) and u(µs') into a quantity by central differences, the two taken as independent.
 *
 * <p>JCGM 100:2008, eq. 10. The step is a thousandth of the coefficient, or of 0.001 /cm where it is smaller; at µa = 0 the
 * difference is one-sided. Null when no uncertainty is known or the quantity cannot be had beside the medium.
 */
final class FirstOrder {
    private static final double STEP = 1e-3;
    private static final double LEAST_PER_CM = 1e-3;

    private FirstOrder() {}

    static Double u(Medium medium, Spread spread, ToDoubleFunction<Medium> quantity) {
        if (spread == null) return null;
        double a = spread.uMuaPerCm() == 0 ? 0 : spread.uMuaPerCm() * slope(medium, true, quantity);
        double s = spread.uMuspPerCm() == 0 ? 0 : spread.uMuspPerCm() * slope(medium, false, quantity);
        double u = Math.hypot(a, s);
        return Double.isFinite(u) ? u : null;
    }

    /** Slope per 1/cm of µa ({@code absorption}) or of µs'. */
    static double slope(Medium medium, boolean absorption, ToDoubleFunction<Medium> quantity) {
        double at = absorption ? medium.muaPerCm() : medium.muspPerCm();
        double h = STEP * Math.max(at, LEAST_PER_CM);
        double low = Math.max(0, at - h);
        Medium above = absorption ? medium.withMua(at + h) : medium.withMusp(at + h);
        Medium below = absorption ? medium.withMua(low) : medium.withMusp(low);
        return (quantity.applyAsDouble(above) - quantity.applyAsDouble(below)) / (at + h - low);
    }

    /** √(a² + b²); a is null where nothing is known, b is 0 or NaN where there is none. */
    static Double together(Double a, double b) {
        if (!(b > 0)) return a;
        return a == null ? (Double) b : (Double) Math.hypot(a, b);
    }
}
