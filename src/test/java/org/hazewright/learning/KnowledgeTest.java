package org.hazewright.learning;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.time.LocalDate;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import org.hazewright.learning.DilutionReading.Signal;
import org.hazewright.mixture.DemoIngredients;
import org.hazewright.mixture.MassSpecific;
import org.hazewright.optics.Crowding;
import org.hazewright.optics.Refusal;
import org.hazewright.optics.SizeDistribution;
import org.hazewright.optics.Spectrum;
import org.hazewright.optics.TableIndex;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Lot;
import org.hazewright.shelf.Material;
import org.hazewright.shelf.Part;
import org.hazewright.shelf.Scattering;
import org.hazewright.shelf.Source;
import org.hazewright.shelf.Uncertainty;
import org.junit.jupiter.api.Test;

/** Limits, words and small arithmetic of what is learned, each by hand. */
class KnowledgeTest {
    private static final Ingredient INK = DemoIngredients.ink(0.05);
    private static final Factor FACTOR = Factor.of(INK, Quantity.ABSORPTION);
    private static final LocalDate DAY = LocalDate.of(2026, 1, 5);
    private static final OptionalDouble NO_U = OptionalDouble.empty();

    private static String refused(Runnable r) {
        return assertThrows(Refusal.class, r::run).getMessage();
    }

    // a fitted line

    /** y = 1 + 2x with ± 0.1 at the ends of 0..3: residuals 0.1, −0.1, −0.1, 0.1 lean on nothing. */
    @Test
    void aLineIsReadOffAndItsInterceptJudged() {
        double[] x = {0, 1, 2, 3};
        StraightLine line = StraightLine.fit(x, new double[] {1.1, 2.9, 4.9, 7.1});
        assertEquals(8, line.at(3.5), 1e-12);
        assertFalse(line.interceptIsZero());
        assertEquals(0.04, line.chiSquared(), 1e-12);
        // s² = 0.04/2; u of the intercept √(s² (1/4 + 1.5²/5)); Student's t of 2 degrees of freedom, 97.5 %: 4.303
        // (tables).
        assertEquals(Math.sqrt(0.02 * (0.25 + 0.45)), line.uIntercept(), 1e-12);
        assertEquals(4.303, line.coverageFactor(), 5e-4);
        StraightLine through = StraightLine.fit(x, new double[] {0.4, 1.6, 3.6, 6.4});
        assertEquals(0, through.intercept(), 1e-12);
        assertTrue(through.interceptIsZero());
        assertEquals(1, line.pValue());
        assertFalse(line.scattersMoreThanStated());
        assertTrue(refused(() -> StraightLine.fit(x, new double[3])).contains("4 x and 3 y"));
        assertTrue(refused(() -> StraightLine.fit(x, x, new double[] {1})).contains("1 uncertainties"));
    }

    /** Leaving a point out by hand: the line through the other three. */
    @Test
    void theSlopeWithoutAPoint() {
        double[] x = {0, 1, 2, 3};
        double[] y = {1.1, 2.9, 4.9, 7.1};
        double[] u = {0.1, 0.2, 0.1, 0.3};
        StraightLine line = StraightLine.fit(x, y, u);
        for (int i = 0; i < 4; i++) {
            List<double[]> kept = new ArrayList<>();
            for (int k = 0; k < 4; k++) if (k != i) kept.add(new double[] {x[k], y[k], u[k]});
            StraightLine without = StraightLine.fit(
                    kept.stream().mapToDouble(p -> p[0]).toArray(),
                    kept.stream().mapToDouble(p -> p[1]).toArray(),
                    kept.stream().mapToDouble(p -> p[2]).toArray());
            StraightLine.FitPoint point = line.points().get(i);
            assertEquals(without.slope(), point.slopeWithout(), 1e-12);
            // Externally studentised: the residual from the others' line over its standard error, scale from the
            // others.
            double off = y[i] - without.at(x[i]);
            double scale = without.chiSquared() / without.degreesOfFreedom();
            double plain = Math.sqrt(u[i] * u[i] + plainU(kept, x[i]));
            assertEquals(off / (plain * Math.sqrt(scale)), point.studentised(), 1e-9);
        }
        double leverage = line.points().stream()
                .mapToDouble(StraightLine.FitPoint::leverage)
                .sum();
        assertEquals(2, leverage, 1e-12, "leverages sum to the number of parameters");
    }

    /** Variance of the fitted value at x from stated uncertainties alone. */
    private static double plainU(List<double[]> points, double x) {
        double sw = 0;
        double mx = 0;
        for (double[] p : points) {
            sw += 1 / (p[2] * p[2]);
            mx += p[0] / (p[2] * p[2]);
        }
        mx /= sw;
        double sxx = 0;
        for (double[] p : points) sxx += (p[0] - mx) * (p[0] - mx) / (p[2] * p[2]);
        return 1 / sw + (x - mx) * (x - mx) / sxx;
    }

    // readings

    @Test
    void readingsAtTheirLimits() {
        new DilutionReading(0, 10, 700, Signal.TRANSMISSION, 1.5, NO_U);
        new DilutionReading(0, 10, 700, Signal.ABSORBANCE, -0.2, NO_U);
        new DilutionReading(0, 10, 700, Signal.ABSORBANCE, 6, NO_U);
        assertTrue(refused(() -> new DilutionReading(0, 10, 700, Signal.TRANSMISSION, 1.51, NO_U))
                .contains("at most 1.5"));
        assertTrue(refused(() -> new DilutionReading(0, 10, 700, Signal.ABSORBANCE, -0.21, NO_U))
                .contains("between -0.2 and 6"));
        assertTrue(refused(() -> new DilutionReading(0, 10, 700, Signal.ABSORBANCE, 1, OptionalDouble.of(-0.1)))
                .contains("Standard uncertainty"));
        // 20 g of something of 2 g/mL in 100 g with a diluent of 0.8 g/mL: 10 mL and 100 mL hold 20 g.
        assertEquals(20 / 110.0, DilutionReading.gPerMl(0.2, 2, 0.8), 1e-15);
    }

    /** Albedo 1: all is scattered, and its uncertainty is the albedo's and the extinction's; absorption is none. */
    @Test
    void sharesOfNothingAreExact() {
        Uncertainty all = fit(1, 0.05).uncertainty();
        assertEquals(0, all.absorption());
        assertEquals(Math.hypot(0.02, 0.05), all.scattering(), 1e-9);
        assertEquals(0, all.correlation());
        Uncertainty none = fit(0, 0.05).uncertainty();
        assertEquals(Math.hypot(0.02, 0.05), none.absorption(), 1e-9);
        assertEquals(0, none.scattering());
        assertEquals(0, none.correlation());
        // Half and half: u²(κ)/κ² = 0.02² + (0.05/0.5)² for both, covariance 0.02² − 0.05²/0.25.
        Uncertainty half = fit(0.5, 0.05).uncertainty();
        assertEquals(Math.sqrt(0.0104), half.absorption(), 1e-9);
        assertEquals(Math.sqrt(0.0104), half.scattering(), 1e-9);
        assertEquals((0.0004 - 0.01) / 0.0104, half.correlation(), 1e-6);
    }

    /** Without scatter, 2 % common to all readings. */
    private static DilutionFit fit(double albedo, double uAlbedo) {
        List<DilutionReading> readings = new ArrayList<>();
        for (double nm : new double[] {600, 700})
            for (int i = 1; i <= 5; i++)
                readings.add(new DilutionReading(i * 1e-4, 10, nm, Signal.ABSORBANCE, 0.1 * i, NO_U));
        return new DilutionSeries("demo", 1, albedo, uAlbedo, 0.02, readings).fit();
    }

    /** Ratios 1.1 of u 0.01 and 1.0 of u 0.02 average to (1.1/1 + 1.0/4)/(1 + 1/4) = 1.08 with χ² = 0.1²/(0.01² + 0.02²) = 20. */
    @Test
    void aMagnitudeIsAWeightedMean() {
        Ingredient law = DemoIngredients.of(
                "law-demo",
                Part.SCATTERER,
                1,
                new Uncertainty(0, 0.1),
                Optional.empty(),
                Optional.of(new Scattering.PowerLaw(300, 700, 0, 0.7, 400, 1100, 1)),
                Optional.empty());
        assertEquals(1000, MassSpecific.of(law, 600, 22, 1.33, 0).kappaMus(), 1e-9);
        DilutionSeries series = new DilutionSeries("law-demo", 1, 1, 0, 0, List.of(reading(1e-3, 600)));
        DilutionFit fit = new DilutionFit(series, List.of(extinction(600, 1100, 10), extinction(700, 1000, 20)));
        DilutionFit.Magnitude m = fit.magnitudeOf(law, 1.33, 22);
        assertEquals(1.08, m.ratio(), 1e-12);
        assertEquals(20, m.chiSquared(), 1e-6);
        assertEquals(1, m.degreesOfFreedom());
        // The two slopes' own relative uncertainties, in the mean of their squares.
        assertEquals(1.08 * Math.sqrt((Math.pow(10 / 1100.0, 2) + 0.02 * 0.02) / 2), m.u(), 1e-12);
        assertTrue(refused(() -> fit.magnitudeOf(DemoIngredients.dye("clear", 0, 0, 0), 1.33, 22))
                .contains("no extinction at 600 nm"));
        assertTrue(refused(() -> new DilutionFit(series, List.of(extinction(600, 0, 1))))
                .contains("do not fall with concentration"));
    }

    private static DilutionReading reading(double c, double nm) {
        return new DilutionReading(c, 10, nm, Signal.ABSORBANCE, 0.4, NO_U);
    }

    private static Extinction extinction(double nm, double cm2PerG, double u) {
        StraightLine line = new StraightLine(0, cm2PerG, 0.1, u, 0, 0, 1, true, List.of());
        return new Extinction(nm, List.of(), line, Optional.empty(), 1);
    }

    @Test
    void anExtinctionsLargest() {
        StraightLine line = new StraightLine(0, 100, 0.1, 5, 0, 0, 1, true, List.of());
        Extinction e = new Extinction(
                700,
                List.of(reading(1, 700), new DilutionReading(2, 10, 700, Signal.ABSORBANCE, 0.7, NO_U)),
                line,
                Optional.empty(),
                0.25);
        assertEquals(0.7, e.largestAbsorbance(), 1e-12);
        assertEquals(0.25 * 0.7 * Math.log(10), e.largestScatteringDepth(), 1e-12);
        assertEquals(75, e.absorbedCm2PerG(), 1e-12);
        assertEquals(0.05, e.relativeU(), 1e-15);
        assertFalse(e.bends());
    }

    // factors

    @Test
    void impossibleKnowledgeIsRefused() {
        Factor s = Factor.of(INK, Quantity.SCATTERING);
        List<Factor> two = List.of(FACTOR, s);
        double[] ones = {1, 1};
        assertTrue(refused(() -> new Factors(two, new double[] {1}, new double[2][2]))
                .contains("2 factors come with 1"));
        assertTrue(refused(() -> new Factors(List.of(s, s), ones, new double[][] {{1, 0}, {0, 1}}))
                .contains("named twice among ink-demo scattering, ink-demo scattering"));
        assertTrue(refused(() -> new Factors(two, ones, new double[][] {{1, 0}, {0}}))
                .startsWith("Row 2 of a covariance"));
        assertTrue(refused(() -> new Factors(two, new double[] {1, Double.NaN}, new double[][] {{1, 0}, {0, 1}}))
                .contains("ink-demo scattering is NaN"));
        assertTrue(refused(() -> new Factors(two, ones, new double[][] {{1, 0}, {0, -1}}))
                .contains("0 or above"));
        assertTrue(refused(() -> new Factors(two, ones, new double[][] {{0.04, 1e-3}, {1.1e-3, 0.09}}))
                .contains("one way and"));
        assertTrue(refused(() -> new Factors(two, ones, new double[][] {{0.04, 0.07}, {0.07, 0.09}}))
                .contains("not possible"));
        Factors tied = new Factors(two, ones, new double[][] {{0.04, 0.06}, {0.06, 0.09}});
        assertEquals(0.2, tied.u(FACTOR), 1e-15);
        assertTrue(tied.knows(s) && !tied.knows(Factor.of(DemoIngredients.water(0), Quantity.ABSORPTION)));
        Factors one = tied.only(f -> f.equals(s));
        assertEquals(List.of(s), one.factors());
        assertEquals(0.3, one.u(s), 1e-15);
    }

    @Test
    void scalesOfAMethod() {
        Method m = new Method("slab fit", 0.01, 0.02);
        assertEquals(0.01, m.uScale(Quantity.ABSORPTION));
        assertEquals(0.02, m.uScale(Quantity.SCATTERING));
    }

    // drift

    private static Drift.Estimate estimate(int day, double factor, double u) {
        return new Drift.Estimate(DAY.plusDays(day), factor, u);
    }

    /** From 1.00 ± 0.05 to 1.06 ± 0.04: a steady lot would move by √(0.05² − 0.04²) = 0.03, so this is two of them. */
    @Test
    void aStepInItsOwnUnits() {
        Drift d = Drift.of(FACTOR, List.of(estimate(0, 1, 0.05), estimate(9, 1.06, 0.04)));
        assertEquals(0.06, d.move(), 1e-12);
        assertEquals(0.03, d.uMove(), 1e-12);
        assertEquals(0.0455, d.pJumps(), 5e-5, "two-sided normal probability of 2 (tables: 0.0455)");
        assertEquals(0.0455, d.pTrend(), 5e-5);
        assertEquals(
                "ink-demo absorption is steady: 6 % up from 2026-01-05 to 2026-01-14 in 1 step, where a steady lot would"
                        + " move by about 3 %.",
                d.sentence());
        Drift down = Drift.of(FACTOR, List.of(estimate(0, 2, 0.05), estimate(9, 1.9, 0.03)));
        assertEquals(0.04 / 2, down.uMove(), 1e-12);
        assertEquals(
                "ink-demo absorption drifts: 5 % down from 2026-01-05 to 2026-01-14 in 1 step, where a steady lot would"
                        + " move by about 2 % (probability 0.012). Measure the bottle again or take a fresh one.",
                down.sentence());
        Drift more = Drift.of(FACTOR, List.of(estimate(0, 1, 0.05), estimate(1, 1.03, 0.04), estimate(2, 1.03, 0.03)));
        assertTrue(more.sentence().contains(" in 2 steps, "), more.sentence());
        // Rounded to the same u: the step is known to a thousandth of it, here 5e-5, so 1e-4 is two of them.
        Drift same = Drift.of(FACTOR, List.of(estimate(0, 1, 0.05), estimate(0, 1.0001, 0.05)));
        assertEquals(0.0455, same.pJumps(), 5e-5);
        assertEquals(0, same.uMove());
    }

    // lots

    /** Particles that absorb anywhere in their range learn their absorption; clear ones have none to learn. */
    @Test
    void particlesThatAbsorbSomewhere() {
        double[] ends = {400, 490, 510, 1000};
        for (double[] k : new double[][] {{0.01, 0, 0, 0}, {0, 0, 0, 0.01}, {0, 0, 0.01, 0}})
            assertEquals(1.1, absorptionLearned(particles(ends, k), 1.1), 1e-12);
        assertEquals(1, absorptionLearned(particles(ends, new double[4]), 1.1));
        assertEquals(1, absorptionLearned(particles(ends, new double[] {0.1, 0.1, 0.1, 0.1}), 1));
    }

    private static double absorptionLearned(Ingredient particles, double factor) {
        Scattering learned = lot().learned(particles, factors(particles, factor))
                .scattering()
                .orElseThrow();
        return ((Scattering.MieParticles) learned).absorptionMagnitude();
    }

    private static Factors factors(Ingredient i, double absorption) {
        return new Factors(
                List.of(Factor.of(i, Quantity.ABSORPTION), Factor.of(i, Quantity.SCATTERING)),
                new double[] {absorption, 1},
                new double[][] {{0.0004, 0}, {0, 0.0009}});
    }

    private static NewLot lot() {
        return new NewLot(
                "demo-l1",
                new Lot("demo", "L1", Optional.empty(), Optional.empty(), Optional.empty()),
                new Source(Source.Basis.INVENTED, ""));
    }

    private static Ingredient particles(double[] nm, double[] k) {
        TableIndex index = new TableIndex(
                "demo", new Spectrum("n", nm, new double[] {1.6, 1.6, 1.6, 1.6}), new Spectrum("k", nm, k));
        Material material = new Material("demo", "demo", index, new Source(Source.Basis.INVENTED, ""));
        return DemoIngredients.of(
                "demo",
                Part.ABSORBER,
                1.5,
                new Uncertainty(0.1, 0.1),
                Optional.empty(),
                Optional.of(new Scattering.MieParticles(
                        material, 1, new SizeDistribution.Single(80), new Crowding.None(), 1)),
                Optional.empty());
    }
}
