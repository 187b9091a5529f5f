package org.hazewright.learning;

import java.util.ArrayList;
import java.util.List;
import org.apache.commons.math3.distribution.NormalDistribution;
import org.apache.commons.math3.distribution.TDistribution;
import org.apache.commons.math3.special.Gamma;
import org.hazewright.optics.Refusal;

/**
 * Weighted straight-line fit y = intercept + slope · x, x without error, with what tells whether to believe it.
 *
 * <p>With a standard uncertainty u for every y the weights are 1/u² and the standard errors follow from them alone (ISO/TS
 * 28037:2010, clause 6). When the residuals then scatter more than u allows (χ² beyond its 95 % point) the standard errors are
 * multiplied by √(χ²/dof) and the interval takes Student's t: u was too small, or the line is not one. Without u all weights
 * are equal and the scatter of the residuals sets the scale. Units are those of x and y. At least 3 points at 2 or more
 * different x.
 *
 * @param uIntercept standard error, scatter included as above
 * @param covariance of intercept and slope, on the same scale
 * @param chiSquared Σ w r²; without u the plain residual sum of squares
 * @param statedUncertainties whether every y came with its u
 */
public record StraightLine(
        double intercept,
        double slope,
        double uIntercept,
        double uSlope,
        double covariance,
        double chiSquared,
        int degreesOfFreedom,
        boolean statedUncertainties,
        List<FitPoint> points) {

    /** Level of every test and complement of every interval in this package. */
    public static final double LEVEL = 0.05;

    /**
     * One point of the fit; none is ever dropped.
     *
     * @param leverage of the point on its own fitted value, 0 to 1
     * @param weightInSlope d slope / d y
     * @param studentised residual over its standard error from a fit without the point; t-distributed with dof − 1. NaN where
     *     the others cannot tell (fewer than 4 points, or a point that alone decides the line)
     * @param outlier |studentised| beyond the two-sided Bonferroni point of {@link #LEVEL} over the number of points
     * @param slopeWithout the slope of a fit without the point
     */
    public record FitPoint(
            double x,
            double y,
            double residual,
            double leverage,
            double weightInSlope,
            double studentised,
            boolean outlier,
            double slopeWithout) {}

    public StraightLine {
        points = List.copyOf(points);
    }

    /** Equal weights. */
    public static StraightLine fit(double[] x, double[] y) {
        double[] w = new double[x.length];
        java.util.Arrays.fill(w, 1);
        return fit(x, y, w, false);
    }

    /** Weights 1/u². */
    public static StraightLine fit(double[] x, double[] y, double[] u) {
        if (u.length != x.length)
            throw new Refusal("A fit has " + x.length + " points and " + u.length + " uncertainties.");
        double[] w = new double[u.length];
        for (int i = 0; i < w.length; i++) {
            Refusal.positive("Standard uncertainty of a value in a straight-line fit", u[i]);
            w[i] = 1 / (u[i] * u[i]);
        }
        return fit(x, y, w, true);
    }

    private static StraightLine fit(double[] x, double[] y, double[] w, boolean stated) {
        int n = x.length;
        if (y.length != n) throw new Refusal("A fit has " + n + " x and " + y.length + " y.");
        if (n < 3)
            throw new Refusal("A straight line with intercept is to go through " + n + " points; it needs at least 3.");
        double sw = 0;
        double mx = 0;
        double my = 0;
        for (int i = 0; i < n; i++) {
            if (!Double.isFinite(x[i]) || !Double.isFinite(y[i]))
                throw new Refusal(
                        "A point of a straight-line fit is (" + x[i] + ", " + y[i] + "); both must be finite.");
            sw += w[i];
            mx += w[i] * x[i];
            my += w[i] * y[i];
        }
        mx /= sw;
        my /= sw;
        double sxx = 0;
        double sxy = 0;
        double spread = 0;
        for (int i = 0; i < n; i++) {
            double d = x[i] - mx;
            sxx += w[i] * d * d;
            sxy += w[i] * d * (y[i] - my);
            spread = Math.max(spread, Math.abs(x[i] - x[0]));
        }
        if (!(spread > 0))
            throw new Refusal(
                    "All points of a straight-line fit have the same x = " + x[0] + "; take at least 2 different.");
        double slope = sxy / sxx;
        double[] r = new double[n];
        double chi2 = 0;
        double scale = 0;
        for (int i = 0; i < n; i++) {
            r[i] = (y[i] - my) - slope * (x[i] - mx);
            chi2 += w[i] * r[i] * r[i];
            scale += w[i] * y[i] * y[i];
        }
        int dof = n - 2;
        double variance = stated ? Math.max(1, inflation(chi2, dof)) : chi2 / dof;
        List<FitPoint> points = new ArrayList<>(n);
        for (int i = 0; i < n; i++)
            points.add(point(x[i], y[i], r[i], w[i], x[i] - mx, sw, sxx, chi2, slope, n, chi2 <= 1e-26 * scale));
        return new StraightLine(
                my - slope * mx,
                slope,
                Math.sqrt(variance * (1 / sw + mx * mx / sxx)),
                Math.sqrt(variance / sxx),
                -variance * mx / sxx,
                chi2,
                dof,
                stated,
                points);
    }

    private static double inflation(double chi2, int dof) {
        return upperTail(chi2, dof) < LEVEL ? chi2 / dof : 1;
    }

    private static FitPoint point(
            double x,
            double y,
            double r,
            double w,
            double d,
            double sw,
            double sxx,
            double chi2,
            double slope,
            int n,
            boolean exact) {
        double leverage = w * (1 / sw + d * d / sxx);
        double free = 1 - leverage;
        double studentised = Double.NaN;
        double without = Double.NaN;
        boolean outlier = false;
        if (free > 1e-12) {
            without = slope - w * d * r / (sxx * free);
            if (n > 3 && exact) studentised = 0;
            else if (n > 3) {
                double others = Math.max(0, chi2 - w * r * r / free) / (n - 3);
                studentised = r * Math.sqrt(w / free / others);
                double limit = new TDistribution(null, n - 3).inverseCumulativeProbability(1 - LEVEL / 2 / n);
                outlier = Math.abs(studentised) > limit;
            }
        }
        return new FitPoint(x, y, r, leverage, w * d / sxx, studentised, outlier, without);
    }

    /** Probability of a χ² at least so large. */
    static double upperTail(double chiSquared, int degreesOfFreedom) {
        if (degreesOfFreedom <= 0) return 1;
        return Gamma.regularizedGammaQ(degreesOfFreedom / 2.0, chiSquared / 2);
    }

    /** √(χ²/dof): about 1 when stated uncertainties are right; without them, the residual standard deviation. */
    public double residualScale() {
        return Math.sqrt(chiSquared / degreesOfFreedom);
    }

    /** Probability of residuals at least so large were the stated uncertainties right; 1 without stated uncertainties. */
    public double pValue() {
        return statedUncertainties ? upperTail(chiSquared, degreesOfFreedom) : 1;
    }

    /** Whether the residuals scatter more than the stated uncertainties allow, so that standard errors were enlarged. */
    public boolean scattersMoreThanStated() {
        return statedUncertainties && pValue() < LEVEL;
    }

    /** What a standard error is multiplied by for a 95 % interval: normal with stated uncertainties, else Student's t. */
    public double coverageFactor() {
        return statedUncertainties && !scattersMoreThanStated()
                ? new NormalDistribution(null, 0, 1).inverseCumulativeProbability(1 - LEVEL / 2)
                : new TDistribution(null, degreesOfFreedom).inverseCumulativeProbability(1 - LEVEL / 2);
    }

    /** Whether the 95 % interval of the intercept holds 0. */
    public boolean interceptIsZero() {
        return Math.abs(intercept) <= coverageFactor() * uIntercept;
    }

    public double at(double x) {
        return intercept + slope * x;
    }

    /** Standard uncertainty of the fitted value at x, the scatter of a new reading not included. */
    public double uAt(double x) {
        return Math.sqrt(Math.max(0, uIntercept * uIntercept + 2 * x * covariance + x * x * uSlope * uSlope));
    }
}
