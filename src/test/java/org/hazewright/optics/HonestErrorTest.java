package org.hazewright.optics;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import java.util.Random;
import org.junit.jupiter.api.Test;

/**
 * The error that an average over sizes states of itself, against averages over very many spheres by a rule that adapts to nothing:
 * midpoints, equal steps of ln D for a log-normal, four-point Gauss for a bin. The brute average's own error is told by its odd and even
 * spheres; only cases where that is well below the stated error are judged, and most must be.
 *
 * <p>Held: in 98 of 100 cases the true error is below the stated one, and in no case above three times.
 */
class HonestErrorTest {
    private static final double FACTOR = 3;
    private static final double SHARE_ABOVE = 0.02;

    /** Midpoints or Gauss points in all, and where the averages of odd and even ones differ. */
    private record Brute(double mus, double musp, double mua, double uncertain) {}

    private record Case(SizeDistribution sizes, Index particle, double host, double nm) {}

    private interface Draw {
        Case next(Random random);
    }

    private static double between(Random random, double low, double high) {
        return low + (high - low) * random.nextDouble();
    }

    private static double logBetween(Random random, double low, double high) {
        return low * Math.pow(high / low, random.nextDouble());
    }

    private static Brute brute(Case c, int spheres) {
        double[] d = new double[spheres];
        double[] w = new double[spheres];
        if (c.sizes instanceof SizeDistribution.LogNormal l) {
            double s = Math.log(l.geometricStandardDeviation());
            double from = 2 * s * s - 7 * s;
            double h = (4 * s * s + 14 * s) / spheres;
            for (int i = 0; i < spheres; i++) {
                double t = from + (i + 0.37) * h;
                d[i] = l.numberMedianDiameterNm() * Math.exp(t);
                w[i] = h * Math.exp(-t * t / (2 * s * s)) / (s * Math.sqrt(2 * Math.PI));
            }
        } else {
            SizeDistribution.Histogram table = (SizeDistribution.Histogram) c.sizes;
            double[] edges = table.edgesNm();
            double[] weights = table.weights();
            int cells = spheres / weights.length / 4;
            double[] z = {-0.8611363115940526, -0.3399810435848563, 0.3399810435848563, 0.8611363115940526};
            double[] g = {0.3478548451374538, 0.6521451548625461, 0.6521451548625461, 0.3478548451374538};
            for (int i = 0; i < cells * 4 * weights.length; i++) {
                int bin = i / (4 * cells);
                double cell = (edges[bin + 1] - edges[bin]) / cells;
                d[i] = edges[bin] + (i / 4 % cells + 0.5 + z[i % 4] / 2) * cell;
                w[i] = weights[bin] * g[i % 4] / 2 / cells;
            }
            for (int i = cells * 4 * weights.length; i < spheres; i++) d[i] = edges[1];
        }
        double[] x = new double[spheres];
        double[] n = new double[spheres];
        double[] k = new double[spheres];
        for (int i = 0; i < spheres; i++) x[i] = Math.min(2e4, Math.max(1e-4, Math.PI * d[i] * c.host / c.nm));
        Arrays.fill(n, c.particle.n() / c.host);
        Arrays.fill(k, c.particle.k() / c.host);
        double[] sca = new double[spheres];
        double[] abs = new double[spheres];
        double[] g = new double[spheres];
        Mie.spheres(x, n, k, sca, abs, g);
        double[][] sums = new double[2][3];
        for (int i = 0; i < spheres; i++) {
            double area = w[i] * Math.PI / 4 * d[i] * d[i];
            sums[i % 2][0] += area * sca[i];
            sums[i % 2][1] += area * sca[i] * (1 - g[i]);
            sums[i % 2][2] += area * abs[i];
        }
        double uncertain = 0;
        double[] all = new double[3];
        for (int j = 0; j < 3; j++) {
            all[j] = sums[0][j] + sums[1][j];
            if (all[j] > 0 && c.sizes instanceof SizeDistribution.LogNormal)
                uncertain = Math.max(uncertain, Math.abs(sums[0][j] - sums[1][j]) / all[j]);
            all[j] *= 1e7 / (Math.PI / 6 * c.sizes.meanCubedDiameterNm3());
        }
        return new Brute(all[0], all[1], all[2], uncertain);
    }

    private static void hold(int cases, int spheres, double promise, Draw draw) {
        Random random = new Random(20261201);
        int judged = 0;
        int above = 0;
        for (int i = 0; i < cases; i++) {
            Case c = draw.next(random);
            PopulationAverage ours = new Population(c.sizes).average(c.particle, c.host, c.nm);
            assertTrue(ours.relativeError() <= promise, "promised " + promise + ": " + ours + " of " + c);
            Brute brute = brute(c, spheres);
            if (brute.uncertain > 0.2 * ours.relativeError()) continue;
            judged++;
            double error = Math.max(
                    Math.abs(ours.optics().musPerCm() / brute.mus - 1),
                    Math.abs(ours.optics().muspPerCm() / brute.musp - 1));
            if (c.particle.k() > 0)
                error = Math.max(error, Math.abs(ours.optics().muaPerCm() / brute.mua - 1));
            if (error > ours.relativeError()) above++;
            assertTrue(
                    error <= FACTOR * ours.relativeError(),
                    "true error " + error + ", stated " + ours.relativeError() + " of " + c);
        }
        assertTrue(judged >= 0.6 * cases, "judged " + judged + " of " + cases);
        assertTrue(above <= SHARE_ABOVE * cases, above + " of " + cases + " above the stated error");
    }

    @Test
    void emulsionsKeepTheMillionth() {
        hold(
                150,
                12_000,
                1e-6,
                r -> new Case(
                        new SizeDistribution.LogNormal(between(r, 100, 400), between(r, 1.2, 1.8)),
                        Index.real(between(r, 1.45, 1.50)),
                        between(r, 1.33, 1.40),
                        between(r, 400, 1100)));
    }

    /** Ripples about as far apart as the first spheres: the case where two coarse rules agree by chance. */
    @Test
    void narrowDistributions() {
        hold(
                150,
                12_000,
                1e-6,
                r -> new Case(
                        new SizeDistribution.LogNormal(between(r, 200, 2500), 1 + logBetween(r, 0.001, 0.1)),
                        Index.real(between(r, 1.4, 1.6)),
                        between(r, 1.33, 1.5),
                        between(r, 400, 1100)));
    }

    @Test
    void absorbingParticles() {
        hold(
                100,
                12_000,
                1e-6,
                r -> new Case(
                        new SizeDistribution.LogNormal(logBetween(r, 30, 500), between(r, 1.1, 1.9)),
                        new Index(between(r, 1.3, 2.3), logBetween(r, 0.02, 1)),
                        between(r, 1.33, 1.5),
                        between(r, 400, 1100)));
    }

    /** Absorption in proportion to the volume: the large tail counts for more than it does for scattering. */
    @Test
    void weaklyAbsorbingParticles() {
        hold(
                100,
                12_000,
                1e-6,
                r -> new Case(
                        new SizeDistribution.LogNormal(logBetween(r, 30, 400), between(r, 1.1, 1.9)),
                        new Index(between(r, 1.40, 1.65), logBetween(r, 1e-7, 0.02)),
                        between(r, 1.33, 1.41),
                        between(r, 400, 1100)));
    }

    @Test
    void histograms() {
        hold(100, 12_000, 1e-6, r -> {
            int bins = 1 + r.nextInt(12);
            double[] edges = new double[bins + 1];
            double[] weights = new double[bins];
            edges[0] = between(r, 20, 700);
            for (int i = 0; i < bins; i++) {
                edges[i + 1] = edges[i] + between(r, 10, 160);
                weights[i] = r.nextInt(5) + (i == 0 ? 1 : 0);
            }
            double k = r.nextInt(3) == 0 ? logBetween(r, 1e-4, 1) : 0;
            return new Case(
                    new SizeDistribution.Histogram(edges, weights),
                    new Index(between(r, 1.35, 1.7), k),
                    between(r, 1.33, 1.5),
                    between(r, 400, 1100));
        });
    }

    /** Titania in water or silicone: resonances that no affordable step resolves; nothing is refused, and the error is stated. */
    @Test
    void clearDensePigments() {
        hold(
                12,
                600_000,
                1e-3,
                r -> new Case(
                        new SizeDistribution.LogNormal(between(r, 150, 400), between(r, 1.3, 1.9)),
                        Index.real(2.7),
                        r.nextBoolean() ? 1.33 : 1.41,
                        between(r, 400, 1100)));
    }

    /**
     * The same with a little absorption, as of titania in the blue. A resonance narrower than k absorbs nothing, one that is wider absorbs as
     * much as any other however narrow it is, so µa of a nearly clear population hangs on few spheres and is the worst of the three
     * averages; below k = 1e-4 even the many spheres of this test may miss some.
     */
    @Test
    void weaklyAbsorbingDensePigments() {
        hold(
                16,
                300_000,
                1e-2,
                r -> new Case(
                        new SizeDistribution.LogNormal(between(r, 150, 400), between(r, 1.3, 1.9)),
                        new Index(between(r, 2.2, 2.9), logBetween(r, 1e-4, 1e-1)),
                        r.nextBoolean() ? 1.33 : 1.41,
                        between(r, 400, 1100)));
    }

    /** Crowding of such a pigment is computed on fewer sizes, and still goes to the dilute value when dilute. */
    @Test
    void crowdedDensePigment() {
        Population pigment = new Population(new SizeDistribution.LogNormal(250, 1.6));
        double alone = pigment.perVolumeFraction(Index.real(2.7), 1.41, 633).muspPerCm();
        double dilute = pigment.perVolumeFraction(Index.real(2.7), 1.41, 633, 1e-7, new Crowding.PercusYevick())
                .muspPerCm();
        double crowded = pigment.perVolumeFraction(Index.real(2.7), 1.41, 633, 0.1, new Crowding.PercusYevick())
                .muspPerCm();
        assertEquals(alone, dilute, 1e-5 * alone);
        assertTrue(crowded < 0.98 * alone, "crowded " + crowded + ", alone " + alone);
    }
}
