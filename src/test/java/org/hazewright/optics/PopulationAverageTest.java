package org.hazewright.optics;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/**
 * Averages over sizes against a plain sum over very many spheres that the test makes itself: the trapezoidal rule in ln D for a log-normal
 * (it converges faster than any power for a Gaussian), the midpoint rule within each bin of a histogram.
 */
class PopulationAverageTest {
    private static final double HOST = 1.33;

    /** {µs, µs', µa} per unit volume fraction in 1/cm from Σ weight · C and the mean cube that the same sum gives. */
    private static double[] summed(double[] diameters, double[] weights, Index m, double nm) {
        double sca = 0;
        double back = 0;
        double abs = 0;
        double cube = 0;
        for (int i = 0; i < diameters.length; i++) {
            double d = diameters[i];
            cube += weights[i] * d * d * d;
            double x = Math.PI * d * HOST / nm;
            if (x < 1e-4 || x > 2e4) continue; // as good as nothing beside the rest
            Efficiencies q = Mie.sphere(x, m.n() / HOST, m.k() / HOST);
            double area = weights[i] * Math.PI * d * d / 4;
            sca += area * q.qSca();
            back += area * q.qSca() * (1 - q.g());
            abs += area * q.qAbs();
        }
        double perCm = 1e7 / (Math.PI / 6 * cube);
        return new double[] {sca * perCm, back * perCm, abs * perCm};
    }

    private static void agrees(double[] sum, PopulationAverage average, double share) {
        assertEquals(sum[0], average.optics().musPerCm(), share * sum[0]);
        assertEquals(sum[1], average.optics().muspPerCm(), share * sum[1]);
        assertEquals(sum[2], average.optics().muaPerCm(), share * sum[2]);
        assertTrue(average.relativeError() <= 1e-6 && average.relativeError() >= 0);
    }

    /** To 2e-6: the 1e-6 that is promised, and as much for the sum. */
    @ParameterizedTest
    @CsvSource({
        "200, 1.6, 1.47, 0, 780",
        "80, 2.2, 1.59, 0.02, 633",
        "1000, 1.05, 1.59, 0, 633",
        "30, 1.3, 2.7, 0, 500",
        "500, 1.8, 1.36, 0.5, 900",
        "20, 3.0, 1.5, 0.001, 700"
    })
    void logNormal(double median, double gsd, double n, double k, double nm) {
        double s = Math.log(gsd);
        int points = 6000;
        double[] d = new double[points];
        double[] w = new double[points];
        for (int i = 0; i < points; i++) {
            // The third moment's weight stands 3 s above the median in s; 13 s either way leave e^-50 out.
            double t = -9 + 22.0 * i / (points - 1);
            d[i] = median * Math.exp(s * t);
            w[i] = Math.exp(-t * t / 2);
        }
        agrees(
                summed(d, w, new Index(n, k), nm),
                new Population(new SizeDistribution.LogNormal(median, gsd)).average(new Index(n, k), HOST, nm),
                2e-6);
    }

    @Test
    void histogram() {
        double[] edges = {0, 150, 200, 400, 900};
        double[] weights = {1, 3, 0, 2};
        int each = 4000;
        double[] d = new double[4 * each];
        double[] w = new double[4 * each];
        for (int b = 0; b < 4; b++)
            for (int i = 0; i < each; i++) {
                d[b * each + i] = Math.max(0.05, edges[b] + (edges[b + 1] - edges[b]) * (i + 0.5) / each);
                w[b * each + i] = weights[b] / 6 / each;
            }
        Population p = new Population(new SizeDistribution.Histogram(edges, weights));
        for (Index m : new Index[] {new Index(1.59, 0), new Index(1.7, 0.05)})
            agrees(summed(d, w, m, 633), p.average(m, HOST, 633), 2e-6);
    }

    /** One size: the efficiencies themselves, N σ with N = 6/(π D³). */
    @Test
    void single() {
        Index m = new Index(1.59, 0.01);
        PopulationAverage a = new Population(new SizeDistribution.Single(500)).average(m, HOST, 633);
        agrees(summed(new double[] {500}, new double[] {1}, m, 633), a, 1e-12);
        assertEquals(1, a.spheres());
        assertEquals(0, a.relativeError());
        assertEquals(
                1 - a.optics().muspPerCm() / a.optics().musPerCm(), a.optics().g());
        assertEquals(0, new ParticleOptics(0, 0, 1).g());
    }

    /** A spectrum at once is what its wavelengths are one by one; asked again it is the same. */
    @Test
    void aSpectrumAtOnce() {
        Population p = new Population(new SizeDistribution.LogNormal(250, 1.5));
        double[] nm = {500, 633, 780, 950};
        List<Index> m = List.of(new Index(1.6, 0), new Index(1.59, 0.001), new Index(1.58, 0), new Index(1.57, 0.1));
        double[] host = {1.34, 1.335, 1.33, 1.325};
        List<ParticleOptics> together = p.spectrum(m, host, nm);
        for (int j = 0; j < nm.length; j++) {
            ParticleOptics alone = new Population(new SizeDistribution.LogNormal(250, 1.5))
                    .perVolumeFraction(m.get(j), host[j], nm[j]);
            assertEquals(alone.muspPerCm(), together.get(j).muspPerCm(), 1e-9 * alone.muspPerCm());
            assertEquals(alone.muaPerCm(), together.get(j).muaPerCm(), 1e-9 * alone.muaPerCm());
        }
        assertEquals(together, p.spectrum(m, host, nm));
        assertThrows(Refusal.class, () -> p.spectrum(m, new double[] {1.33}, nm));
        assertThrows(Refusal.class, () -> p.spectrum(m.subList(0, 2), host, nm));
        assertThrows(Refusal.class, () -> p.average(m.get(0), 0, 500));
        assertThrows(Refusal.class, () -> p.average(m.get(0), 1.33, -1));
        assertThrows(Refusal.class, () -> p.average(new Index(20, 0), 1.33, 500));
    }

    /**
     * Hard spheres of one size: µs = φ N ∫ |S|² S(q) dΩ by a plain sum over 20 000 angles, S(q) of Percus and Yevick in the form of their
     * direct correlation function (Wertheim 1963; here as in Ashcroft & Lekner, Phys. Rev. 145, 83, 1966, from memory).
     */
    @Test
    void crowdedSpheresOfOneSize() {
        Index m = new Index(1.59, 0.002);
        double d = 400;
        double nm = 633;
        Population p = new Population(new SizeDistribution.Single(d));
        ParticleOptics dilute = p.perVolumeFraction(m, HOST, nm);
        MieSeries series = MieSeries.of(Math.PI * d * HOST / nm, m.n() / HOST, m.k() / HOST);
        for (double phi : new double[] {0.01, 0.15, 0.4}) {
            double all = 0;
            double mus = 0;
            double musp = 0;
            double[] pattern = new double[2];
            int steps = 20_000;
            for (int i = 0; i < steps; i++) {
                double cos = -1 + 2 * (i + 0.5) / steps;
                series.patterns(cos, pattern);
                double q = 4 * Math.PI * HOST / nm * Math.sqrt((1 - cos) / 2);
                double s = percusYevick(q * d, phi);
                all += pattern[0];
                mus += pattern[0] * s;
                musp += pattern[0] * s * (1 - cos);
            }
            ParticleOptics crowded = p.perVolumeFraction(m, HOST, nm, phi, new Crowding.PercusYevick());
            assertEquals(dilute.musPerCm() * mus / all, crowded.musPerCm(), 1e-5 * crowded.musPerCm());
            assertEquals(dilute.musPerCm() * musp / all, crowded.muspPerCm(), 1e-5 * crowded.muspPerCm());
            assertEquals(dilute.muaPerCm(), crowded.muaPerCm());
        }
        assertEquals(dilute, p.perVolumeFraction(m, HOST, nm, 0, new Crowding.PercusYevick()));
        assertEquals(dilute, p.perVolumeFraction(m, HOST, nm, 0.3, new Crowding.None()));
        ParticleOptics half = p.perVolumeFraction(m, HOST, nm, 0.25, new Crowding.Polynomial(new double[] {-2}, 0.4));
        assertEquals(dilute.musPerCm() / 2, half.musPerCm(), 1e-12 * dilute.musPerCm());
        assertEquals(dilute.muspPerCm() / 2, half.muspPerCm(), 1e-12 * dilute.musPerCm());
        assertEquals(dilute.muaPerCm(), half.muaPerCm());
        assertThrows(Refusal.class, () -> p.perVolumeFraction(m, HOST, nm, 0.46, new Crowding.PercusYevick()));
        assertThrows(Refusal.class, () -> p.perVolumeFraction(m, HOST, nm, 1.2, new Crowding.None()));
    }

    /** 1/S = 1 + 24 φ ∫₀¹ (α + β s + γ s³) sin(κ s)/(κ s) s² ds, κ = q d, summed plainly. */
    private static double percusYevick(double kappa, double phi) {
        double alpha = Math.pow(1 + 2 * phi, 2) / Math.pow(1 - phi, 4);
        double beta = -6 * phi * Math.pow(1 + phi / 2, 2) / Math.pow(1 - phi, 4);
        double gamma = phi / 2 * alpha;
        double sum = 0;
        int steps = 200;
        for (int i = 0; i <= steps; i++) { // Simpson
            double s = (double) i / steps;
            double sinc = kappa * s < 1e-6 ? 1 : Math.sin(kappa * s) / (kappa * s);
            double f = (alpha + beta * s + gamma * s * s * s) * sinc * s * s;
            sum += f * (i == 0 || i == steps ? 1 : i % 2 == 1 ? 4 : 2);
        }
        return 1 / (1 + 24 * phi * sum / (3 * steps));
    }

    /** Sizes at which the average cannot be had are refused in words. */
    @Test
    void tooLargeOrTooSmall() {
        Index m = new Index(1.59, 0);
        for (SizeDistribution sizes : List.of(
                new SizeDistribution.Single(1e7),
                new SizeDistribution.Single(1e-3),
                new SizeDistribution.LogNormal(1e7, 1.5),
                new SizeDistribution.Histogram(new double[] {1, 1e8}, new double[] {1})))
            assertThrows(Refusal.class, () -> new Population(sizes).average(m, HOST, 500), sizes.toString());
    }
}
