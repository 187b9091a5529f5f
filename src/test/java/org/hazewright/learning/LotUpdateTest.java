package org.hazewright.learning;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertSame;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.time.LocalDate;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Random;
import org.apache.commons.math3.stat.regression.OLSMultipleLinearRegression;
import org.hazewright.mixture.DemoIngredients;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Recipe;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Absorption;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Part;
import org.hazewright.shelf.Scattering;
import org.hazewright.shelf.Uncertainty;
import org.junit.jupiter.api.Test;

/** The update of lots from batches: by hand, against a regression library, and by simulation with fixed seeds. */
class LotUpdateTest {
    private static final LocalDate DAY = LocalDate.of(2026, 3, 2);
    private static final Method EXACT = new Method("spectrophotometer", 0, 0);

    private static final Ingredient RED = DemoIngredients.dye("red-demo", 8, 2, 0.05);
    private static final Ingredient BLUE = DemoIngredients.dye("blue-demo", 1, 6, 0.08);
    private static final Ingredient EMULSION = DemoIngredients.emulsion(0.03);
    private static final Ingredient WATER = DemoIngredients.water(0.01);

    private static MeasuredBatch batch(String name, Method method, Mixture m, MeasuredValue... values) {
        return new MeasuredBatch(name, DAY, m, List.of(), method, List.of(values));
    }

    private static MeasuredValue mua(double nm, double perCm, double u) {
        return new MeasuredValue(Quantity.ABSORPTION, nm, perCm, u);
    }

    private static Mixture mixture(double redG, double blueG, double emulsionG) {
        return new Mixture(
                Map.of(RED, redG, BLUE, blueG, EMULSION, emulsionG, WATER, 1000 - redG - blueG - emulsionG), 22);
    }

    /** An ingredient alone whose µa is 0.10 /cm exactly, u = 5 %. */
    private static Ingredient alone() {
        return DemoIngredients.of(
                "alone-demo",
                Part.ABSORBER,
                1,
                new Uncertainty(0.05, 0),
                Optional.of(Absorption.neat(
                        new org.hazewright.optics.Spectrum("alone", new double[] {600, 900}, new double[] {0.1, 0.1}),
                        1,
                        0,
                        0)),
                Optional.empty(),
                DemoIngredients.water(0).index());
    }

    /**
     * By hand: θ ~ N(1, 0.05²) has precision 400; one value 0.110 of share 0.100 with u 0.002 says θ = 1.1 with precision
     * (0.100/0.002)² = 2500. Together 2900: mean (400 + 2750)/2900, u 1/√2900; χ² = 0.010²/(0.005² + 0.002²).
     */
    @Test
    void oneFactorOneValueByHand() {
        Mixture m = new Mixture(Map.of(alone(), 1.0), 22);
        LotUpdate update = LotUpdate.of(Factors.none(), batch("B1", EXACT, m, mua(700, 0.110, 0.002)));
        Factor f = new Factor(Factor.Kind.INGREDIENT, "alone-demo", Quantity.ABSORPTION);
        assertEquals(1, update.before().mean(f));
        assertEquals(0.05, update.before().u(f), 1e-15);
        assertEquals(3150.0 / 2900, update.after().mean(f), 1e-13);
        assertEquals(1 / Math.sqrt(2900), update.after().u(f), 1e-14);
        assertEquals(0.0001 / 0.000029, update.chiSquared(), 1e-10);
        assertEquals(0.100, update.rows().get(0).predictedPerCm(), 1e-15);
        assertEquals(0.005, update.rows().get(0).uPredictedPerCm(), 1e-12);
        // 1.857 standard deviations; normal table: Φ(1.85) = 0.9678, Φ(1.86) = 0.9686.
        assertEquals(2 * (1 - 0.96836), update.pValue(), 1e-4);
        assertTrue(!update.surprising());
    }

    /** By hand: a method's scale of u 3 % beside θ of u 5 % shares the difference as 9 to 25, and leaves them anticorrelated. */
    @Test
    void aScaleErrorTakesItsShareByHand() {
        Method scaled = new Method("time-resolved fit", 0.03, 0);
        Mixture m = new Mixture(Map.of(alone(), 1.0), 22);
        LotUpdate update = LotUpdate.of(Factors.none(), batch("B1", scaled, m, mua(700, 0.1034, 1e-7)));
        Factor theta = new Factor(Factor.Kind.INGREDIENT, "alone-demo", Quantity.ABSORPTION);
        Factor gamma = Factor.of(scaled, Quantity.ABSORPTION);
        assertEquals(1 + 0.034 * 25 / 34, update.after().mean(theta), 1e-8);
        assertEquals(1 + 0.034 * 9 / 34, update.after().mean(gamma), 1e-8);
        double u = 0.05 * 0.03 / Math.sqrt(0.0034); // both: u² = 0.0025·0.0009/0.0034
        assertEquals(u, update.after().u(theta), 1e-7);
        assertEquals(u, update.after().u(gamma), 1e-7);
        assertEquals(-1, update.after().correlation(theta, gamma), 1e-6);
    }

    /**
     * The posterior is the generalised least-squares solution of data and prior together: rows y/u = (H/u) θ and 1/u₀ = θ/u₀, which
     * Commons Math solves by QR.
     */
    @Test
    void equalsARegressionOfDataAndPriorTogether() {
        Random random = new Random(31);
        List<MeasuredBatch> batches = new ArrayList<>();
        for (int b = 0; b < 3; b++) batches.add(made("B" + b, EXACT, random, 1.04, 0.9));
        LotUpdate update = LotUpdate.of(Factors.none(), batches);

        List<Factor> unknown = List.of(
                Factor.of(RED, Quantity.ABSORPTION), Factor.of(BLUE, Quantity.ABSORPTION),
                Factor.of(WATER, Quantity.ABSORPTION), Factor.of(EMULSION, Quantity.SCATTERING));
        double[] stated = {0.05, 0.08, 0.01, 0.03};
        List<double[]> rows = new ArrayList<>();
        List<Double> rhs = new ArrayList<>();
        for (MeasuredBatch b : batches)
            for (MeasuredValue v : b.values()) {
                double[] row = new double[4];
                b.mixture().at(v.wavelengthNm()).shares().forEach(s -> {
                    int i = unknown.indexOf(Factor.of(s.ingredient(), v.quantity()));
                    if (i >= 0) row[i] = MeasuredBatch.of(s, v.quantity()) / v.uPerCm();
                });
                rows.add(row);
                rhs.add(v.perCm() / v.uPerCm());
            }
        for (int i = 0; i < 4; i++) {
            double[] row = new double[4];
            row[i] = 1 / stated[i];
            rows.add(row);
            rhs.add(1 / stated[i]);
        }
        OLSMultipleLinearRegression library = new OLSMultipleLinearRegression();
        library.setNoIntercept(true);
        library.newSampleData(rhs.stream().mapToDouble(Double::doubleValue).toArray(), rows.toArray(double[][]::new));
        double[] theta = library.estimateRegressionParameters();
        double[][] covariance = library.estimateRegressionParametersVariance();
        for (int i = 0; i < 4; i++) {
            assertEquals(theta[i], update.after().mean(unknown.get(i)), 1e-10);
            assertEquals(Math.sqrt(covariance[i][i]), update.after().u(unknown.get(i)), 1e-11);
            for (int j = 0; j < i; j++)
                assertEquals(
                        covariance[i][j] / Math.sqrt(covariance[i][i] * covariance[j][j]),
                        update.after().correlation(unknown.get(i), unknown.get(j)),
                        1e-8);
        }
        // χ² of the innovation is the least sum of squares of data and prior together.
        assertEquals(library.calculateResidualSumOfSquares(), update.chiSquared(), 1e-8);
    }

    /** A batch with random grams, measured at five wavelengths with 1 %, red and blue off by the given factors. */
    private static MeasuredBatch made(String name, Method method, Random random, double red, double blue) {
        double emulsionG = 30 + 40 * random.nextDouble();
        Mixture m = mixture(20 + 20 * random.nextDouble(), 10 + 30 * random.nextDouble(), emulsionG);
        List<MeasuredValue> values = new ArrayList<>();
        for (double nm : new double[] {620, 680, 740, 800, 860}) {
            double mua = 0;
            for (var s : m.at(nm).shares())
                mua += s.muaPerCm() * (s.ingredient() == RED ? red : s.ingredient() == BLUE ? blue : 1);
            values.add(mua(nm, mua * (1 + 0.01 * random.nextGaussian()), 0.01 * mua));
            double musp = m.at(nm).muspPerCm();
            values.add(
                    new MeasuredValue(Quantity.SCATTERING, nm, musp * (1 + 0.01 * random.nextGaussian()), 0.01 * musp));
        }
        return new MeasuredBatch(name, DAY, m, List.of(), method, values);
    }

    /** Scale errors of two methods are carried along, so that one by one, in any order, and all at once come to the same. */
    @Test
    void orderAndGroupingDoNotMatter() {
        Random random = new Random(77);
        Method one = new Method("time-resolved fit", 0.02, 0.02);
        Method two = new Method("integrating sphere", 0.03, 0.01);
        List<MeasuredBatch> batches = List.of(
                made("B1", one, random, 1.03, 0.95),
                made("B2", two, random, 1.03, 0.95),
                made("B3", one, random, 1.03, 0.95));
        Factors together = LotUpdate.of(Factors.none(), batches).after();
        int[][] orders = {{0, 1, 2}, {0, 2, 1}, {1, 0, 2}, {1, 2, 0}, {2, 0, 1}, {2, 1, 0}};
        for (int[] order : orders) {
            Factors known = Factors.none();
            double chi2 = 0;
            for (int b : order) {
                LotUpdate update = LotUpdate.of(known, batches.get(b));
                known = update.after();
                chi2 += update.chiSquared();
            }
            assertEquals(LotUpdate.of(Factors.none(), batches).chiSquared(), chi2, 1e-8, "innovations add");
            for (Factor f : together.factors()) {
                assertEquals(together.mean(f), known.mean(f), 1e-11);
                assertEquals(together.u(f), known.u(f), 1e-11);
                for (Factor g : together.factors())
                    assertEquals(together.correlation(f, g), known.correlation(f, g), 1e-7);
            }
        }
    }

    /** Uncertainty never grows; factors that no value touches stay as filed. */
    @Test
    void dataOnlyTighten() {
        LotUpdate update = LotUpdate.of(Factors.none(), made("B1", EXACT, new Random(3), 1, 1));
        for (Factor f : update.before().factors())
            assertTrue(update.after().u(f) <= update.before().u(f) * (1 + 1e-12), f.words());
        Factor untouched = Factor.of(EMULSION, Quantity.ABSORPTION); // the emulsion of the demo absorbs nothing
        assertEquals(1, update.after().mean(untouched));
        assertEquals(0.05, update.after().u(untouched), 1e-15);
    }

    /**
     * Truth drawn from what the files say, batches made and measured as they say: 95 % intervals hold the truth 95 times in 100 and the
     * update is surprised 5 times in 100. The making's own errors are drawn with the rest. Three standard deviations of a share.
     */
    @Test
    void coverageAndSurpriseAreAsStated() {
        int runs = 1500;
        Random random = new Random(20260304);
        Method method = new Method("time-resolved fit", 0.02, 0.02);
        Recipe recipe = DemoIngredients.recipe(
                0.3, Item.neat(RED, 12), Item.neat(BLUE, 9), Item.neat(EMULSION, 25), Item.neat(WATER, 454));
        double[] nm = {620, 700, 780, 860};
        List<MeasuredValue> plan = new ArrayList<>();
        Mixture m = Mixture.of(recipe);
        for (double w : nm) {
            plan.add(mua(w, m.at(w).muaPerCm(), 0.01 * m.at(w).muaPerCm()));
            plan.add(new MeasuredValue(
                    Quantity.SCATTERING, w, m.at(w).muspPerCm(), 0.01 * m.at(w).muspPerCm()));
        }
        MeasuredBatch planned = MeasuredBatch.of("plan", DAY, recipe, 220, method, plan);
        assertTrue(planned.making().size() >= 4, "four weighings at least");
        Factor[] watched = {
            Factor.of(RED, Quantity.ABSORPTION),
            Factor.of(BLUE, Quantity.ABSORPTION),
            Factor.of(EMULSION, Quantity.SCATTERING)
        };
        int[] covered = new int[watched.length];
        int surprised = 0;
        for (int run = 0; run < runs; run++) {
            double[] truth = {
                1 + 0.05 * random.nextGaussian(), 1 + 0.08 * random.nextGaussian(), 1 + 0.03 * random.nextGaussian()
            };
            double water = 1 + 0.01 * random.nextGaussian();
            double[] gamma = {1 + 0.02 * random.nextGaussian(), 1 + 0.02 * random.nextGaussian()};
            double[] made = planned.making().stream()
                    .mapToDouble(c -> random.nextGaussian())
                    .toArray();
            List<MeasuredValue> values = new ArrayList<>();
            for (MeasuredValue v : plan) {
                int j = java.util.Arrays.binarySearch(nm, v.wavelengthNm());
                boolean a = v.quantity() == Quantity.ABSORPTION;
                double y = 0;
                for (var s : m.at(v.wavelengthNm()).shares()) {
                    double share = MeasuredBatch.of(s, v.quantity());
                    y += share
                            * (s.ingredient() == RED
                                    ? truth[0]
                                    : s.ingredient() == BLUE
                                            ? truth[1]
                                            : s.ingredient() == EMULSION ? truth[2] : water);
                }
                for (int c = 0; c < made.length; c++)
                    y += made[c]
                            * (a
                                            ? planned.making().get(c).muaPerCm()
                                            : planned.making().get(c).muspPerCm())
                                    [j];
                y = y * gamma[a ? 0 : 1] + v.uPerCm() * random.nextGaussian();
                values.add(new MeasuredValue(v.quantity(), v.wavelengthNm(), y, v.uPerCm()));
            }
            LotUpdate update =
                    LotUpdate.of(Factors.none(), new MeasuredBatch("B", DAY, m, planned.making(), method, values));
            for (int i = 0; i < watched.length; i++)
                if (Math.abs(update.after().mean(watched[i]) - truth[i])
                        <= 1.959964 * update.after().u(watched[i])) covered[i]++;
            if (update.surprising()) surprised++;
        }
        double three = 3 * Math.sqrt(0.05 * 0.95 / runs);
        for (int c : covered) assertEquals(0.95, c / (double) runs, three);
        assertEquals(0.05, surprised / (double) runs, three);
    }

    /** What is learned of one lot in a mixture is tied to the other, and a later batch of one alone helps both. */
    @Test
    void theJointCovarianceIsKeptAndUseful() {
        MeasuredValue value = mua(700, 0, 1e-4);
        Mixture both = mixture(30, 30, 0);
        Mixture redOnly = mixture(60, 0, 0);
        Factors first = LotUpdate.of(
                        Factors.none(),
                        batch("B1", EXACT, both, mua(700, both.at(700).muaPerCm() * 1.03, 1e-4)))
                .after();
        Factor red = Factor.of(RED, Quantity.ABSORPTION);
        Factor blue = Factor.of(BLUE, Quantity.ABSORPTION);
        assertTrue(first.correlation(red, blue) < -0.9);
        double share = redOnly.at(700).muaPerCm();
        Factors second = LotUpdate.of(first, batch("B2", EXACT, redOnly, mua(value.wavelengthNm(), share, 1e-4)))
                .after();
        assertTrue(second.u(blue) < 0.35 * first.u(blue), "blue is learned from a batch that holds none of it");
    }

    @Test
    void newFilesStartFromOne() {
        Factors after = LotUpdate.of(Factors.none(), made("B1", EXACT, new Random(9), 1.06, 0.93))
                .after();
        Factors based = after.rebased(id -> id.equals("red-demo") ? "red-demo-l2" : id);
        Factor old = Factor.of(RED, Quantity.ABSORPTION);
        Factor red = new Factor(Factor.Kind.INGREDIENT, "red-demo-l2", Quantity.ABSORPTION);
        Factor blue = Factor.of(BLUE, Quantity.ABSORPTION);
        assertEquals(1, based.mean(red));
        assertEquals(after.u(old) / after.mean(old), based.u(red), 1e-15);
        assertEquals(after.correlation(old, blue), based.correlation(red, blue), 1e-12);
        assertEquals(after.uncertainty(RED).absorption(), based.u(red), 1e-15);
    }

    @Test
    void whatIsFiledIsTheStart() {
        Ingredient tied = DemoIngredients.of(
                "tied-demo",
                Part.ABSORBER,
                1,
                new Uncertainty(0.04, 0.06, -0.5),
                RED.absorption(),
                Optional.of(new Scattering.PowerLaw(10, 800, 1, 0.7, 400, 1100, 1)),
                Optional.empty());
        Factors filed = Factors.asFiled(List.of(tied));
        assertEquals(
                -0.5,
                filed.correlation(Factor.of(tied, Quantity.ABSORPTION), Factor.of(tied, Quantity.SCATTERING)),
                1e-15);
        assertEquals(tied.uncertainty(), filed.uncertainty(tied));
        assertSame(filed, filed.with(tied), "known already");
        assertEquals(
                1,
                filed.only(f -> f.quantity() == Quantity.SCATTERING).factors().size());
    }

    @Test
    void impossibleKnowledgeIsRefused() {
        Factor a = Factor.of(RED, Quantity.ABSORPTION);
        Factor b = Factor.of(BLUE, Quantity.ABSORPTION);
        List<Factor> two = List.of(a, b);
        double[] ones = {1, 1};
        assertThrows(Refusal.class, () -> new Factors(two, ones, new double[][] {{1, 0}, {0, -1}}));
        assertThrows(Refusal.class, () -> new Factors(two, ones, new double[][] {{1, 0.5}, {0.2, 1}}));
        assertThrows(Refusal.class, () -> new Factors(two, ones, new double[][] {{1, 1.2}, {1.2, 1}}));
        assertThrows(Refusal.class, () -> new Factors(List.of(a, a), ones, new double[][] {{1, 0}, {0, 1}}));
        assertThrows(Refusal.class, () -> new Factors(two, new double[] {1}, new double[][] {{1, 0}, {0, 1}}));
        assertThrows(Refusal.class, () -> mua(700, 0.1, 0));
        assertThrows(Refusal.class, () -> batch("B", EXACT, mixture(1, 1, 1)));
        assertThrows(Refusal.class, () -> LotUpdate.of(Factors.none(), List.of()));
    }

    /** A factor of exact knowledge (u = 0) is allowed and does not move. */
    @Test
    void whatIsExactDoesNotMove() {
        Factors known = Factors.asFiled(List.of(DemoIngredients.dye("red-demo", 8, 2, 0)));
        Mixture m = mixture(30, 20, 0);
        LotUpdate update = LotUpdate.of(
                known, batch("B", EXACT, m, mua(700, 1.05 * m.at(700).muaPerCm(), 0.001)));
        Factor red = Factor.of(RED, Quantity.ABSORPTION);
        assertEquals(1, update.after().mean(red));
        assertEquals(0, update.after().u(red));
        assertArrayEquals(
                new double[] {1, 1}, java.util.Arrays.copyOf(update.before().means(), 2));
    }
}
