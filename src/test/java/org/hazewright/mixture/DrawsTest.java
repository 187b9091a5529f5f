package org.hazewright.mixture;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Optional;
import java.util.concurrent.ForkJoinPool;
import org.apache.commons.math3.distribution.NormalDistribution;
import org.apache.commons.math3.stat.correlation.PearsonsCorrelation;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Part;
import org.hazewright.shelf.Scattering;
import org.hazewright.shelf.Uncertainty;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** Monte Carlo propagation: repeatable, and equal to first order where the model is nearly linear. */
class DrawsTest {
    private static final double[] NM = {690, 780, 830};
    private static final double CAPACITY_G = 600;
    private static final int COUNT = 200_000;

    /** Weighings as uncertain as the coefficients, so that every branch counts. */
    private static Recipe coarse() {
        Recipe r = RecipeTest.dosed();
        return new Recipe(r.title(), r.base(), 22, 0.05, Optional.empty(), r.stocks(), r.items());
    }

    /**
     * JCGM 101:2008, 8.1: first order and Monte Carlo agree when the model is nearly linear. The standard deviation of N draws is known to
     * 1/√(2N) = 0.16 %; three of those, and 0.3 % for what curves: 5 % of the first load of a stock, squared.
     */
    @Test
    void agreesWithFirstOrder() {
        Recipe r = coarse();
        Budget b = Budget.of(r, NM, CAPACITY_G);
        Draws d = Draws.of(r, NM, CAPACITY_G, COUNT, 1);
        Mixture m = Mixture.of(r);
        for (int j = 0; j < NM.length; j++) {
            double ua = b.uMuaPerCm()[j];
            double us = b.uMuspPerCm()[j];
            assertEquals(ua, d.standardUncertainty(false, j), 0.008 * ua);
            assertEquals(us, d.standardUncertainty(true, j), 0.008 * us);
            assertEquals(m.at(NM[j]).muaPerCm(), d.mean(false, j), 5 * ua / Math.sqrt(COUNT) + 1e-4 * ua);
            assertEquals(m.at(NM[j]).muspPerCm(), d.mean(true, j), 5 * us / Math.sqrt(COUNT) + 1e-4 * us);
            double[] i = d.interval95(true, j);
            assertEquals(2 * 1.959964 * us, i[1] - i[0], 0.012 * 2 * us * 1.96);
        }
    }

    /**
     * JCGM 101:2008, clause 9.2.2: Y = X1 + X2 + X3 + X4, each X normal with mean 0 and standard uncertainty 1: u(y) = 2.00, 95 % interval
     * [−3.92, 3.92] (table 2, from memory; by hand 1.96 · √4). Here the X are what four dyes of 1 /cm and 10 % add, in units of 0.1 /cm.
     * The volume's 0.1 % adds 0.02 % to u. Of 10⁶ draws u is known to 0.07 % and the ends to 0.5 %.
     */
    @Test
    void theAdditiveModelOfTheGuide() {
        Draws d = Draws.of(additive(0.10), new double[] {700}, CAPACITY_G, 1_000_000, 9);
        double mean = d.mean(false, 0);
        assertEquals(4, mean, 4 * 0.2 / 1000);
        assertEquals(2.00, d.standardUncertainty(false, 0) / 0.1, 0.006);
        double[] i = d.interval95(false, 0);
        assertEquals(-3.92, (i[0] - 4) / 0.1, 0.02);
        assertEquals(3.92, (i[1] - 4) / 0.1, 0.02);
        assertEquals(
                2.00, Budget.of(additive(0.10), new double[] {700}, CAPACITY_G).uMuaPerCm()[0] / 0.1, 0.001);
    }

    /** Four dyes that add 1 /cm each at every wavelength, in a clear base of 1000 g; weighed without error. */
    private static Recipe additive(double u) {
        Item[] items = new Item[5];
        // 1 g of each in 1000.0 mL (996 g of a base of density 1): µa of the neat dye 1000 /cm.
        for (int i = 0; i < 4; i++) items[i] = Item.neat(DemoIngredients.dye("dye-" + i, 1000, 1000, u), 1);
        items[4] = Item.neat(
                DemoIngredients.of(
                        "clear-demo",
                        Part.BASE,
                        1,
                        new Uncertainty(0, 0),
                        Optional.empty(),
                        Optional.empty(),
                        DemoIngredients.water(0).index()),
                996);
        return DemoIngredients.recipe(0, items);
    }

    @ParameterizedTest
    @ValueSource(ints = {1, 2, 3})
    void theSameSeedGivesTheSameDrawsOnAnyNumberOfThreads(int threads) throws Exception {
        Draws here = Draws.of(coarse(), NM, CAPACITY_G, 30_001, 5);
        ForkJoinPool pool = new ForkJoinPool(threads);
        try {
            Draws there = pool.submit(() -> Draws.of(coarse(), NM, CAPACITY_G, 30_001, 5))
                    .get();
            for (int j = 0; j < NM.length; j++)
                for (boolean scattering : new boolean[] {false, true}) {
                    assertEquals(here.mean(scattering, j), there.mean(scattering, j));
                    assertEquals(here.standardUncertainty(scattering, j), there.standardUncertainty(scattering, j));
                    assertArrayEquals(here.interval95(scattering, j), there.interval95(scattering, j));
                }
        } finally {
            pool.shutdown();
        }
        Draws other = Draws.of(coarse(), NM, CAPACITY_G, 30_001, 6);
        assertNotEquals(here.mean(false, 0), other.mean(false, 0));
    }

    /** Near seeds are strangers: means of 400 draws are not correlated over lags of 1 to 4 (3/√400 = 0.15). */
    @Test
    void nearSeedsAreIndependent() {
        int seeds = 404;
        double[] mean = new double[seeds];
        for (int k = 0; k < seeds; k++)
            mean[k] = Draws.of(additive(0.10), new double[] {700}, CAPACITY_G, 200, 10_000 + k)
                    .mean(false, 0);
        for (int lag = 1; lag <= 4; lag++) {
            double[] a = java.util.Arrays.copyOfRange(mean, 0, seeds - 4);
            double[] b = java.util.Arrays.copyOfRange(mean, lag, seeds - 4 + lag);
            assertEquals(0, new PearsonsCorrelation().correlation(a, b), 0.15, "seeds " + lag + " apart");
        }
    }

    /** 95 % of the draws lie in the interval, to the draw: the order statistics 4999 and 195 000 of 200 000 hold 190 002. */
    @Test
    void theIntervalHoldsNinetyFiveInAHundred() {
        Draws d = Draws.of(coarse(), NM, CAPACITY_G, COUNT, 2);
        double[] i = d.interval95(false, 1);
        double[] low = {Double.NaN, i[0], Double.NaN, Double.NaN, Double.NaN, Double.NaN};
        double[] high = {Double.NaN, i[1], Double.NaN, Double.NaN, Double.NaN, Double.NaN};
        assertEquals(190_002.0 / COUNT, d.shareInside(low, high));
    }

    /** Within tolerance ± 1.5 u of one quantity: the normal share; of two that share a factor fully: the same share, not its square. */
    @Test
    void shareInsideCountsJointly() {
        Recipe r = additive(0.10);
        double[] nm = {650, 800};
        Draws d = Draws.of(r, nm, CAPACITY_G, COUNT, 3);
        double u = Budget.of(r, nm, CAPACITY_G).uMuaPerCm()[0];
        double none = Double.NaN;
        double expected = 1 - 2 * new NormalDistribution(null, 0, 1).cumulativeProbability(-1.5);
        double three = 3 * Math.sqrt(expected * (1 - expected) / COUNT);
        double low = 4 - 1.5 * u;
        double high = 4 + 1.5 * u;
        assertEquals(
                expected,
                d.shareInside(new double[] {low, none, none, none}, new double[] {high, none, none, none}),
                three);
        assertEquals(
                expected,
                d.shareInside(new double[] {low, low, none, none}, new double[] {high, high, none, none}),
                three);
        assertEquals(1, d.shareInside(new double[] {none, none, none, none}, new double[] {none, none, none, none}));
    }

    /** Correlation of an ingredient's two factors shows in how often both miss together. */
    @Test
    void correlatedFactorsMoveTogether() {
        double[] share = new double[3];
        double[] correlations = {-1, 0, 1};
        for (int k = 0; k < 3; k++) {
            Ingredient tied = DemoIngredients.of(
                    "tied-demo",
                    Part.ABSORBER,
                    1,
                    new Uncertainty(0.05, 0.05, correlations[k]),
                    DemoIngredients.dye("x", 8, 8, 0).absorption(),
                    Optional.of(new Scattering.PowerLaw(10, 800, 0, 0.7, 400, 1100, 1)),
                    Optional.empty());
            Recipe r = DemoIngredients.recipe(0, Item.neat(tied, 30), Item.neat(clear(), 470));
            Draws d = Draws.of(r, new double[] {700}, CAPACITY_G, COUNT, 4);
            Coefficients at = Mixture.of(r).at(700);
            double inf = Double.POSITIVE_INFINITY;
            share[k] = d.shareInside(new double[] {at.muaPerCm(), at.muspPerCm()}, new double[] {inf, inf});
        }
        // Both above their middle: never, a quarter, a half of the draws; the volume's 0.1 % blurs the ends by about
        // 0.02/π.
        assertEquals(0, share[0], 0.02);
        assertEquals(0.25, share[1], 0.02);
        assertEquals(0.5, share[2], 0.02);
    }

    private static Ingredient clear() {
        return DemoIngredients.of(
                "clear-demo",
                Part.BASE,
                1,
                new Uncertainty(0, 0),
                Optional.empty(),
                Optional.empty(),
                DemoIngredients.water(0).index());
    }

    @Test
    void refusesTooFewAndTooMany() {
        assertThrows(Refusal.class, () -> Draws.of(coarse(), NM, CAPACITY_G, 10, 1));
        assertThrows(Refusal.class, () -> Draws.of(coarse(), NM, CAPACITY_G, 100_000_000, 1));
        assertTrue(Draws.of(coarse(), NM, CAPACITY_G, 100, 1).count() == 100);
    }
}
