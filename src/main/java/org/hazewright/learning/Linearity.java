package org.hazewright.learning;

import java.util.Optional;
import org.apache.commons.math3.special.Beta;

/**
 * Whether points bend away from a straight line: F-test of a quadratic term.
 *
 * <p>F = (RSS₁ − RSS₂)/(RSS₂/(n − 3)), RSS₁ of the straight line and RSS₂ with x² added, both weighted; F(1, n − 3) when the line is
 * straight (Draper &amp; Smith, Applied Regression Analysis, 3rd ed., Wiley 1998, ch. 6, from memory). F is the square of the quadratic
 * coefficient over its standard error. The scale of the uncertainties drops out. Level {@link StraightLine#LEVEL}.
 *
 * @param bend largest departure of the quadratic from the straight line within the points, in units of y, signed like the
 *     quadratic term: below 0 the curve flattens towards large x
 */
public record Linearity(double f, int degreesOfFreedom, double pValue, double bend) {

    /** Empty with fewer than 4 points or fewer than 3 different x: nothing is left to tell a bend from scatter. */
    public static Optional<Linearity> of(double[] x, double[] y, double[] weights) {
        int n = x.length;
        if (n < 4 || java.util.Arrays.stream(x).distinct().count() < 3) return Optional.empty();
        double sw = 0;
        double mx = 0;
        double my = 0;
        double scale = 0;
        for (int i = 0; i < n; i++) {
            sw += weights[i];
            mx += weights[i] * x[i];
            my += weights[i] * y[i];
            scale += weights[i] * y[i] * y[i];
        }
        mx /= sw;
        my /= sw;
        double sxx = 0;
        double sxy = 0;
        double sxxx = 0;
        for (int i = 0; i < n; i++) {
            double d = x[i] - mx;
            sxx += weights[i] * d * d;
            sxy += weights[i] * d * (y[i] - my);
            sxxx += weights[i] * d * d * d;
        }
        // q = d² − (Σwd²/Σw) − (Σwd³/Σwd²) d is orthogonal to 1 and d under the weights, so its coefficient stands
        // alone.
        double sqq = 0;
        double sqr = 0;
        double rss = 0;
        double[] q = new double[n];
        for (int i = 0; i < n; i++) {
            double d = x[i] - mx;
            double r = (y[i] - my) - sxy / sxx * d;
            q[i] = d * d - sxx / sw - sxxx / sxx * d;
            sqq += weights[i] * q[i] * q[i];
            sqr += weights[i] * q[i] * r;
            rss += weights[i] * r * r;
        }
        if (rss <= 1e-26 * scale) return Optional.of(new Linearity(0, n - 3, 1, 0)); // on the line to rounding
        double explained = sqr * sqr / sqq;
        double left = Math.max(rss - explained, 1e-28 * scale);
        double f = explained / (left / (n - 3));
        double p = Beta.regularizedBeta((n - 3) / (n - 3 + f), (n - 3) / 2.0, 0.5); // upper tail of F(1, n − 3)
        double largest = 0;
        for (double v : q) largest = Math.max(largest, Math.abs(v));
        return Optional.of(new Linearity(f, n - 3, p, sqr / sqq * largest));
    }

    public boolean curved() {
        return pValue < StraightLine.LEVEL;
    }
}
