package org.hazewright.learning;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Random;
import org.hazewright.optics.Refusal;
import org.junit.jupiter.api.Test;

/** What the intervals and tests of a fit promise, held by simulation with fixed seeds. */
class StraightLineTest {
    private static final int RUNS = 4000;

    /** Three standard deviations of a share of 0.05 in {@value #RUNS} runs. */
    private static final double THREE_SIGMA = 3 * Math.sqrt(0.05 * 0.95 / RUNS);

    private static final double[] X = {0, 1, 2, 4, 6, 8};

    @Test
    void intervalsWithoutStatedUncertaintiesCoverNinetyFiveInAHundred() {
        Random random = new Random(20260101);
        int slope = 0;
        int intercept = 0;
        int bends = 0;
        int anyOutlier = 0;
        for (int run = 0; run < RUNS; run++) {
            double[] y = new double[X.length];
            for (int i = 0; i < y.length; i++) y[i] = 0.5 + 3 * X[i] + 0.2 * random.nextGaussian();
            StraightLine line = StraightLine.fit(X, y);
            if (Math.abs(line.slope() - 3) <= line.coverageFactor() * line.uSlope()) slope++;
            if (Math.abs(line.intercept() - 0.5) <= line.coverageFactor() * line.uIntercept()) intercept++;
            if (Linearity.of(X, y, new double[] {1, 1, 1, 1, 1, 1})
                    .orElseThrow()
                    .curved()) bends++;
            if (line.points().stream().anyMatch(StraightLine.FitPoint::outlier)) anyOutlier++;
        }
        assertEquals(0.95, slope / (double) RUNS, THREE_SIGMA);
        assertEquals(0.95, intercept / (double) RUNS, THREE_SIGMA);
        assertEquals(0.05, bends / (double) RUNS, THREE_SIGMA);
        double outliers = anyOutlier / (double) RUNS;
        assertTrue(outliers <= 0.05 + THREE_SIGMA, "Bonferroni bounds the share from above: " + outliers);
        assertTrue(outliers >= 0.03, "and is nearly reached: " + outliers);
    }

    @Test
    void intervalsWithStatedUncertaintiesCoverNinetyFiveInAHundred() {
        double[] u = {0.05, 0.05, 0.1, 0.2, 0.3, 0.4};
        Random random = new Random(20260102);
        int covered = 0;
        int enlarged = 0;
        for (int run = 0; run < RUNS; run++) {
            double[] y = new double[X.length];
            for (int i = 0; i < y.length; i++) y[i] = 3 * X[i] + u[i] * random.nextGaussian();
            StraightLine line = StraightLine.fit(X, y, u);
            if (Math.abs(line.slope() - 3) <= line.coverageFactor() * line.uSlope()) covered++;
            if (line.scattersMoreThanStated()) enlarged++;
        }
        assertEquals(0.05, enlarged / (double) RUNS, THREE_SIGMA);
        // The slope's error does not depend on χ²; the one in twenty that is enlarged covers nearly always: 0.95 · 0.95
        // + 0.05.
        assertEquals(0.9525, covered / (double) RUNS, THREE_SIGMA);
    }

    @Test
    void uncertaintiesThatAreTooSmallAreEnlargedByTheScatter() {
        Random random = new Random(20260103);
        double[] stated = {0.05, 0.05, 0.05, 0.05, 0.05, 0.05};
        int covered = 0;
        for (int run = 0; run < RUNS; run++) {
            double[] y = new double[X.length];
            for (int i = 0; i < y.length; i++)
                y[i] = 3 * X[i] + 0.5 * random.nextGaussian(); // ten times what is stated
            StraightLine line = StraightLine.fit(X, y, stated);
            if (Math.abs(line.slope() - 3) <= line.coverageFactor() * line.uSlope()) covered++;
        }
        assertEquals(0.95, covered / (double) RUNS, THREE_SIGMA);
    }

    @Test
    void anOutlierIsShownAndKept() {
        double[] y = {0.01, 1.02, 1.99, 4.01, 7.5, 8.02};
        StraightLine line = StraightLine.fit(X, y);
        assertEquals(6, line.points().size());
        for (int i = 0; i < 6; i++) assertEquals(i == 4, line.points().get(i).outlier());
        assertTrue(line.slope() > 1.01, "it still pulls the line");
        assertEquals(1, line.points().get(4).slopeWithout(), 0.01);
    }

    @Test
    void pointsOnALineHaveNoScatterNoBendNoOutlier() {
        double[] y = {1, 3, 5, 9, 13, 17};
        StraightLine line = StraightLine.fit(X, y);
        assertEquals(2, line.slope(), 1e-14);
        assertEquals(1, line.intercept(), 1e-14);
        assertFalse(line.points().stream().anyMatch(StraightLine.FitPoint::outlier));
        assertFalse(Linearity.of(X, y, new double[] {1, 1, 1, 1, 1, 1})
                .orElseThrow()
                .curved());
    }

    @Test
    void uAtIsTheInterceptsAtZeroAndLeastAtTheMean() {
        StraightLine line = StraightLine.fit(X, new double[] {0.1, 0.9, 2.2, 3.9, 6.1, 8.0});
        double mean = 21.0 / 6;
        assertEquals(line.uIntercept(), line.uAt(0), 1e-12);
        assertEquals(line.residualScale() / Math.sqrt(6), line.uAt(mean), 1e-12);
        assertTrue(line.uAt(mean) < line.uAt(mean - 1) && line.uAt(mean) < line.uAt(mean + 1));
    }

    @Test
    void refusesWhatCannotBeFitted() {
        assertThrows(Refusal.class, () -> StraightLine.fit(new double[] {1, 2}, new double[] {1, 2}));
        assertThrows(Refusal.class, () -> StraightLine.fit(new double[] {1, 1, 1}, new double[] {1, 2, 3}));
        assertThrows(Refusal.class, () -> StraightLine.fit(X, X, new double[] {1, 1, 1, 0, 1, 1}));
        assertThrows(Refusal.class, () -> StraightLine.fit(X, new double[] {1, 2, 3, 4, Double.NaN, 5}));
        assertTrue(Linearity.of(new double[] {0, 1, 2}, new double[] {0, 1, 3}, new double[] {1, 1, 1})
                .isEmpty());
        assertTrue(Linearity.of(new double[] {0, 0, 1, 1}, new double[] {0, 1, 3, 2}, new double[] {1, 1, 1, 1})
                .isEmpty());
    }
}
