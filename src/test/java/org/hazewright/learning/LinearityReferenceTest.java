package org.hazewright.learning;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.Random;
import org.apache.commons.math3.distribution.FDistribution;
import org.apache.commons.math3.stat.regression.OLSMultipleLinearRegression;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/**
 * The bend of a line against a general regression library (Apache Commons Math 3.6.1): F is the square of the quadratic term over its
 * standard error, and the bend what that term makes at the point where it stands furthest from a line. Both solve the same normal
 * equations; by different algorithms they agree to 1e-9.
 */
class LinearityReferenceTest {
    @ParameterizedTest
    @ValueSource(longs = {1, 2, 3, 4})
    void theQuadraticTermOfAWeightedRegression(long seed) {
        Random random = new Random(seed);
        int n = 4 + random.nextInt(8);
        double[] x = new double[n];
        double[] y = new double[n];
        double[] w = new double[n];
        for (int i = 0; i < n; i++) {
            x[i] = i + random.nextDouble();
            w[i] = 0.5 + random.nextDouble();
            y[i] = 3 + 2 * x[i] + 0.05 * x[i] * x[i] * (seed % 2 == 0 ? 1 : -1) + 0.3 * random.nextGaussian();
        }
        Linearity own = Linearity.of(x, y, w).orElseThrow();
        double[] quadratic = regression(x, y, w, 2);
        assertEquals(n - 3, own.degreesOfFreedom());
        double f = Math.pow(quadratic[0] / quadratic[1], 2);
        assertEquals(f, own.f(), 1e-9 * f);
        double p = 1 - new FDistribution(null, 1, n - 3).cumulativeProbability(f);
        assertEquals(p, own.pValue(), 1e-9);
        // What is left of x² beside a weighted line, at its largest.
        double[] square = new double[n];
        for (int i = 0; i < n; i++) square[i] = x[i] * x[i];
        double largest = 0;
        double[] left = residuals(x, square, w);
        for (double v : left) largest = Math.max(largest, Math.abs(v));
        assertEquals(quadratic[0] * largest, own.bend(), 1e-8 * Math.abs(own.bend()));
    }

    /** Coefficient and standard error of x to the power, by rows multiplied with √w. */
    private static double[] regression(double[] x, double[] y, double[] w, int power) {
        OLSMultipleLinearRegression ols = weighted(x, y, w, power);
        return new double[] {
            ols.estimateRegressionParameters()[power], ols.estimateRegressionParametersStandardErrors()[power]
        };
    }

    private static double[] residuals(double[] x, double[] y, double[] w) {
        double[] r = weighted(x, y, w, 1).estimateResiduals();
        for (int i = 0; i < r.length; i++) r[i] /= Math.sqrt(w[i]);
        return r;
    }

    private static OLSMultipleLinearRegression weighted(double[] x, double[] y, double[] w, int power) {
        double[][] rows = new double[x.length][power + 1];
        double[] right = new double[x.length];
        for (int i = 0; i < x.length; i++) {
            for (int p = 0; p <= power; p++) rows[i][p] = Math.sqrt(w[i]) * Math.pow(x[i], p);
            right[i] = Math.sqrt(w[i]) * y[i];
        }
        OLSMultipleLinearRegression ols = new OLSMultipleLinearRegression();
        ols.setNoIntercept(true);
        ols.newSampleData(right, rows);
        return ols;
    }
}
