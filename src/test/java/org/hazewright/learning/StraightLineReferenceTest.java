package org.hazewright.learning;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Random;
import org.apache.commons.math3.stat.regression.OLSMultipleLinearRegression;
import org.apache.commons.math3.stat.regression.SimpleRegression;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** The straight line and its linearity test against standards, certified values and a general statistics library. */
class StraightLineReferenceTest {

    /** ISO/TS 28037:2010, clause 6, example of equal weights (data from memory, results seen). Printed to 3 decimals. */
    @Test
    void equalWeightsOfTheStandard() {
        double[] x = {1, 2, 3, 4, 5, 6};
        double[] y = {3.3, 5.6, 7.1, 9.3, 10.7, 12.1};
        double[] u = {0.5, 0.5, 0.5, 0.5, 0.5, 0.5};
        StraightLine line = StraightLine.fit(x, y, u);
        assertEquals(1.867, line.intercept(), 5e-4);
        assertEquals(1.757, line.slope(), 5e-4);
        assertEquals(0.465, line.uIntercept(), 5e-4);
        assertEquals(0.120, line.uSlope(), 5e-4);
        assertEquals(-0.050, line.covariance(), 5e-4);
        assertEquals(1.665, line.chiSquared(), 5e-4);
        assertEquals(4, line.degreesOfFreedom());
        assertFalse(line.scattersMoreThanStated());
    }

    /** ISO/TS 28037:2010, clause 6, p. 15, example of unequal weights. Printed to 3 decimals. */
    @Test
    void unequalWeightsOfTheStandard() {
        double[] x = {1, 2, 3, 4, 5, 6};
        double[] y = {3.2, 4.3, 7.6, 8.6, 11.7, 12.8};
        double[] u = {0.5, 0.5, 0.5, 1.0, 1.0, 1.0};
        StraightLine line = StraightLine.fit(x, y, u);
        assertEquals(0.885, line.intercept(), 5e-4);
        assertEquals(2.057, line.slope(), 5e-4);
        assertEquals(0.530, line.uIntercept(), 5e-4);
        assertEquals(0.178, line.uSlope(), 5e-4);
        assertEquals(-0.082, line.covariance(), 5e-4);
        assertEquals(4.131, line.chiSquared(), 5e-4);
        // The standard lets the model stand while χ² is below its 95 % point for n − 2 = 4, 9.488.
        assertFalse(line.scattersMoreThanStated());
        assertTrue(line.pValue() > 0.05);
    }

    /**
     * Norris, linear regression, lower difficulty: NIST Statistical Reference Datasets, certified values to 15 digits. Double
     * arithmetic keeps about 12 of the intercept's, which is the small difference of large sums.
     */
    @Test
    void certifiedStraightLine() {
        double[] x = {
            0.2, 337.4, 118.2, 884.6, 10.1, 226.5, 666.3, 996.3, 448.6, 777.0, 558.2, 0.4, 0.6, 775.5, 666.9, 338.0,
                    447.5,
            11.6, 556.0, 228.1, 995.8, 887.6, 120.2, 0.3, 0.3, 556.8, 339.1, 887.2, 999.0, 779.0, 11.1, 118.3, 229.2,
                    669.1,
            448.9, 0.5
        };
        double[] y = {
            0.1, 338.8, 118.1, 888.0, 9.2, 228.1, 668.5, 998.5, 449.1, 778.9, 559.2, 0.3, 0.1, 778.1, 668.8, 339.3,
                    448.9,
            10.8, 557.7, 228.3, 998.0, 888.8, 119.6, 0.3, 0.6, 557.6, 339.3, 888.0, 998.5, 778.9, 10.2, 117.6, 228.9,
                    668.4,
            449.2, 0.2
        };
        StraightLine line = StraightLine.fit(x, y);
        assertEquals(-0.262323073774029, line.intercept(), 1e-11);
        assertEquals(1.00211681802045, line.slope(), 1e-13);
        assertEquals(0.232818234301152, line.uIntercept(), 1e-11);
        assertEquals(0.429796848199937e-3, line.uSlope(), 1e-14);
        assertEquals(0.884796396144373, line.residualScale(), 1e-11);
    }

    /**
     * Pontius, load cell, quadratic regression, lower difficulty: NIST Statistical Reference Datasets. The F of the quadratic term is
     * the square of its certified estimate over its certified standard deviation, −0.316081871345029e−14 / 0.486652849992036e−16.
     */
    @Test
    void certifiedBend() {
        double[] first = {
            .11019, .21956, .32949, .43899, .54803, .65694, .76562, .87487, .98292, 1.09146, 1.20001, 1.30822, 1.41599,
            1.52399, 1.63194, 1.73947, 1.84646, 1.95392, 2.06128, 2.16844
        };
        double[] second = {
            .11052, .22018, .32939, .43886, .54798, .65739, .76596, .87474, .98300, 1.09150, 1.20004, 1.30818, 1.41613,
            1.52408, 1.63159, 1.73965, 1.84696, 1.95445, 2.06177, 2.16829
        };
        double[] x = new double[40];
        double[] y = new double[40];
        double[] w = new double[40];
        for (int i = 0; i < 40; i++) {
            x[i] = 150000.0 * (i % 20 + 1);
            y[i] = i < 20 ? first[i] : second[i - 20];
            w[i] = 1;
        }
        Linearity l = Linearity.of(x, y, w).orElseThrow();
        double t = -0.316081871345029e-14 / 0.486652849992036e-16;
        assertEquals(t * t, l.f(), 1e-8 * t * t);
        assertEquals(37, l.degreesOfFreedom());
        assertTrue(l.curved());
        assertTrue(l.bend() < 0);
    }

    /** Weighted least squares is ordinary least squares on rows multiplied by √w: Commons Math solves those by QR. */
    @ParameterizedTest
    @ValueSource(longs = {1, 2, 3, 4, 5, 6, 7, 8})
    void commonsMathOnScaledRows(long seed) {
        Random random = new Random(seed);
        int n = 4 + random.nextInt(10);
        double[] x = new double[n];
        double[] y = new double[n];
        double[] u = new double[n];
        double[] w = new double[n];
        for (int i = 0; i < n; i++) {
            x[i] = random.nextDouble() * 0.02;
            u[i] = Math.exp(random.nextGaussian()) * 0.01;
            w[i] = 1 / (u[i] * u[i]);
            y[i] = 0.03 + 60 * x[i] + u[i] * random.nextGaussian();
        }
        StraightLine line = StraightLine.fit(x, y, u);
        OLSMultipleLinearRegression straight = scaled(x, y, w, 1, -1);
        double[] b = straight.estimateRegressionParameters();
        assertEquals(b[0], line.intercept(), 1e-10);
        assertEquals(b[1], line.slope(), 1e-9);
        double rss = straight.calculateResidualSumOfSquares();
        assertEquals(rss, line.chiSquared(), 1e-9 * rss);
        double perVariance = line.scattersMoreThanStated() ? 1 : (n - 2) / rss;
        double[][] cov = straight.estimateRegressionParametersVariance();
        double error = straight.estimateErrorVariance() * perVariance;
        assertEquals(Math.sqrt(cov[0][0] * error), line.uIntercept(), 1e-9);
        assertEquals(Math.sqrt(cov[1][1] * error), line.uSlope(), 1e-7);
        assertEquals(cov[0][1] * error, line.covariance(), 1e-9);

        OLSMultipleLinearRegression curve = scaled(x, y, w, 2, -1);
        double t = curve.estimateRegressionParameters()[2] / curve.estimateRegressionParametersStandardErrors()[2];
        Linearity l = Linearity.of(x, y, w).orElseThrow();
        assertEquals(t * t, l.f(), 1e-7 * (1 + t * t));
    }

    /** A studentised residual is the t of a shift that only its own point is allowed; the slope without it, that of a fit without it. */
    @ParameterizedTest
    @ValueSource(longs = {11, 12, 13, 14})
    void studentisedResidualsAreTestsOfOnePoint(long seed) {
        Random random = new Random(seed);
        int n = 7;
        double[] x = new double[n];
        double[] y = new double[n];
        double[] u = new double[n];
        double[] w = new double[n];
        for (int i = 0; i < n; i++) {
            x[i] = i + random.nextDouble();
            u[i] = 0.5 + random.nextDouble();
            w[i] = 1 / (u[i] * u[i]);
            y[i] = 1 + 2 * x[i] + u[i] * random.nextGaussian();
        }
        StraightLine line = StraightLine.fit(x, y, u);
        for (int i = 0; i < n; i++) {
            OLSMultipleLinearRegression own = scaled(x, y, w, 1, i);
            double t = own.estimateRegressionParameters()[2] / own.estimateRegressionParametersStandardErrors()[2];
            assertEquals(t, line.points().get(i).studentised(), 1e-9 * (1 + Math.abs(t)));
            assertEquals(
                    own.estimateRegressionParameters()[1], line.points().get(i).slopeWithout(), 1e-10);
        }
        StraightLine plain = StraightLine.fit(x, y);
        SimpleRegression library = new SimpleRegression();
        for (int i = 0; i < n; i++) library.addData(x[i], y[i]);
        assertEquals(library.getSlopeStdErr(), plain.uSlope(), 1e-12);
        assertEquals(library.getInterceptStdErr(), plain.uIntercept(), 1e-12);
    }

    /** Columns 1, x, …, x^degree, and, for {@code marked} ≥ 0, one that is 1 at that row alone; all rows times √w. */
    private static OLSMultipleLinearRegression scaled(double[] x, double[] y, double[] w, int degree, int marked) {
        int columns = degree + 1 + (marked >= 0 ? 1 : 0);
        double[][] rows = new double[x.length][columns];
        double[] rhs = new double[x.length];
        for (int i = 0; i < x.length; i++) {
            double root = Math.sqrt(w[i]);
            for (int k = 0; k <= degree; k++) rows[i][k] = root * Math.pow(x[i], k);
            if (marked == i) rows[i][degree + 1] = root;
            rhs[i] = root * y[i];
        }
        OLSMultipleLinearRegression r = new OLSMultipleLinearRegression();
        r.setNoIntercept(true);
        r.newSampleData(rhs, rows);
        return r;
    }
}
