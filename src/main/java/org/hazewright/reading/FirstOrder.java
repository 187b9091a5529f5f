package org.hazewright.reading;

import java.util.function.Function;
import java.util.function.ToDoubleFunction;
import org.hazewright.transport.Medium;

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
        double[] u = curve(medium, spread, m -> new double[] {quantity.applyAsDouble(m)});
        return u == null || !Double.isFinite(u[0]) ? null : (Double) u[0];
    }

    /** The same for every value of a curve. */
    static double[] curve(Medium medium, Spread spread, Function<Medium, double[]> quantity) {
        if (spread == null) return null;
        double[] a = spread.uMuaPerCm() == 0 ? null : slopes(medium, true, quantity);
        double[] s = spread.uMuspPerCm() == 0 ? null : slopes(medium, false, quantity);
        int n = a != null ? a.length : s != null ? s.length : quantity.apply(medium).length;
        double[] u = new double[n];
        for (int i = 0; i < n; i++)
            u[i] = Math.hypot(a == null ? 0 : spread.uMuaPerCm() * a[i], s == null ? 0 : spread.uMuspPerCm() * s[i]);
        return u;
    }

    /** Slope per 1/cm of µa ({@code absorption}) or of µs'. */
    static double slope(Medium medium, boolean absorption, ToDoubleFunction<Medium> quantity) {
        return slopes(medium, absorption, m -> new double[] {quantity.applyAsDouble(m)})[0];
    }

    private static double[] slopes(Medium medium, boolean absorption, Function<Medium, double[]> quantity) {
        double at = absorption ? medium.muaPerCm() : medium.muspPerCm();
        double h = STEP * Math.max(at, LEAST_PER_CM);
        double low = Math.max(0, at - h);
        double[] above = quantity.apply(absorption ? medium.withMua(at + h) : medium.withMusp(at + h));
        double[] below = quantity.apply(absorption ? medium.withMua(low) : medium.withMusp(low));
        double[] slope = new double[above.length];
        for (int i = 0; i < slope.length; i++) slope[i] = (above[i] - below[i]) / (at + h - low);
        return slope;
    }

    /** √(a² + b²); a is null where nothing is known, b is 0 or NaN where there is none. */
    static Double together(Double a, double b) {
        if (!(b > 0)) return a;
        return a == null ? (Double) b : (Double) Math.hypot(a, b);
    }
}
