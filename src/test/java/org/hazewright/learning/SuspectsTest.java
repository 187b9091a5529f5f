package org.hazewright.learning;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.time.LocalDate;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Random;
import org.apache.commons.math3.distribution.ChiSquaredDistribution;
import org.hazewright.mixture.Coefficients;
import org.hazewright.mixture.DemoIngredients;
import org.hazewright.mixture.Mixture;
import org.hazewright.shelf.Ingredient;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** What freeing a factor does, against a verdict in which that factor is not known at all, and the words for it. */
class SuspectsTest {
    private static final Ingredient RED = DemoIngredients.dye("red-demo", 8, 2, 0.02);
    private static final Ingredient BLUE = DemoIngredients.dye("blue-demo", 1, 6, 0.02);
    private static final Ingredient EMULSION = DemoIngredients.emulsion(0.03);
    private static final Ingredient WATER = DemoIngredients.water(0.01);
    private static final Mixture MIXTURE = new Mixture(Map.of(RED, 30.0, BLUE, 30.0, EMULSION, 50.0, WATER, 900.0), 22);
    private static final Method METHOD = new Method("slab fit", 0.01, 0.02);

    private static MeasuredBatch batch(Random random, double red, double emulsion, double... nm) {
        List<MeasuredValue> values = new ArrayList<>();
        for (double w : nm) {
            Coefficients at = MIXTURE.at(w);
            double mua = 0;
            for (Coefficients.Share s : at.shares()) mua += s.muaPerCm() * (s.ingredient() == RED ? red : 1);
            double uA = 0.01 * at.muaPerCm();
            double uS = 0.015 * at.muspPerCm();
            values.add(new MeasuredValue(Quantity.ABSORPTION, w, mua + uA * random.nextGaussian(), uA));
            values.add(new MeasuredValue(
                    Quantity.SCATTERING, w, at.muspPerCm() * emulsion + uS * random.nextGaussian(), uS));
        }
        return new MeasuredBatch("B1", LocalDate.of(2026, 3, 2), MIXTURE, List.of(), METHOD, values);
    }

    /** The same knowledge, one factor's uncertainty put so high that its file's figure counts for nothing. */
    private static Factors freed(Factors all, Factor factor) {
        double[][] c = all.covariance();
        int i = all.factors().indexOf(factor);
        for (int k = 0; k < c.length; k++) c[i][k] = c[k][i] = 0;
        c[i][i] = 1e8;
        return new Factors(all.factors(), all.means(), c);
    }

    private static double upper(double chi2, int dof) {
        return 1 - new ChiSquaredDistribution(null, dof).cumulativeProbability(chi2);
    }

    /** A prior of 10⁴ instead of none at all leaves 1e-6 of the fall behind; probabilities follow to as much. */
    @ParameterizedTest
    @ValueSource(longs = {1, 2, 3, 4, 5, 6})
    void freeingAFactorIsNotKnowingIt(long seed) {
        Random random = new Random(seed);
        MeasuredBatch batch =
                batch(random, 1 + 0.1 * random.nextGaussian(), 1 + 0.1 * random.nextGaussian(), 620, 700, 780, 860);
        Factors all = Factors.none().with(batch);
        Verdict v = Verdict.of(all, batch);
        int factors = v.suspects().size();
        assertEquals(6, factors, "three that absorb, one that scatters, two scales");
        double last = Double.POSITIVE_INFINITY;
        for (Suspect s : v.suspects()) {
            assertTrue(s.fall() <= last, "largest fall first");
            last = s.fall();
            Verdict open = Verdict.of(freed(all, s.factor()), batch);
            double size = 1e-4 * Math.max(1, v.chiSquared());
            assertEquals(open.chiSquared(), s.left(), size);
            assertEquals(v.chiSquared() - open.chiSquared(), s.fall(), size);
            assertEquals(upper(s.fall(), 1), s.pFall(), 1e-9);
            // The open verdict counts the freed factor among its tests, whose fall is nothing.
            double least = open.suspects().stream()
                    .filter(o -> !o.factor().equals(s.factor()))
                    .mapToDouble(Suspect::pFall)
                    .min()
                    .orElseThrow();
            double leaning = Math.min(1, (factors - 1) * least);
            double both = Math.min(1, 2 * Math.min(upper(open.chiSquared(), 7), leaning));
            assertEquals(both, s.pLeft(), 2e-3 * both + 1e-9, s.toString());
        }
    }

    @Test
    void wordsOfSuspects() {
        Factor ink = Factor.of(BLUE, Quantity.ABSORPTION);
        Factor scale = Factor.of(METHOD, Quantity.SCATTERING);
        assertEquals(
                "blue-demo absorption, 12 % above its file's figure (6 of its standard uncertainties)",
                new Suspect(ink, 9, 0.01, 2, 0.5, 1.12, 0.01, 6).words());
        assertEquals(
                "blue-demo absorption, 12 % below its file's figure (6 of its standard uncertainties)",
                new Suspect(ink, 9, 0.01, 2, 0.5, 0.88, 0.01, -6).words());
        assertEquals(
                "the µs' scale of slab fit, 3 % above true (held to be exact until now)",
                new Suspect(scale, 9, 0.01, 2, 0.5, 1.03, 0.01, Double.POSITIVE_INFINITY).words());
    }

    /** It explains when what is left is likely and the factor can be: 0.05 is likely enough, a negative factor is none. */
    @Test
    void whatExplains() {
        Factor ink = Factor.of(BLUE, Quantity.ABSORPTION);
        assertTrue(new Suspect(ink, 9, 0.01, 2, 0.05, 1.1, 0.01, 1).explains());
        assertFalse(new Suspect(ink, 9, 0.01, 2, 0.049, 1.1, 0.01, 1).explains());
        assertFalse(new Suspect(ink, 9, 0.01, 2, 0.5, 0, 0.01, 1).explains());
    }

    /** One value 1 % high and known to 1 %: off by that over the root of its own uncertainty and the prediction's, squared. */
    @Test
    void sentencesOfEvidence() {
        double mua = MIXTURE.at(740).muaPerCm();
        MeasuredBatch one = new MeasuredBatch(
                "B2",
                LocalDate.of(2026, 3, 2),
                MIXTURE,
                List.of(),
                METHOD,
                List.of(new MeasuredValue(Quantity.ABSORPTION, 740, mua * 1.01, mua * 0.01)));
        Verdict close = Verdict.of(Factors.none(), one);
        double off = 0.01 * mua / Math.hypot(close.rows().get(0).uPredictedPerCm(), 0.01 * mua);
        assertEquals(
                "Measured and predicted agree: one value, off by " + Rounded.number(off)
                        + " standard uncertainties (probability " + Rounded.probability(upper(off * off, 1)) + ").",
                close.sentence());
        Verdict far = Verdict.of(Factors.none(), batch(new Random(3), 1.3, 0.6, 620, 700, 780, 860));
        assertEquals(Verdict.Outcome.NO_SINGLE_FACTOR, far.outcome(), far.sentence());
        Suspect nearest = far.suspects().get(0);
        assertTrue(
                far.sentence()
                        .endsWith("No single ingredient explains it. The nearest, "
                                + nearest.factor().words() + ", leaves χ² " + Rounded.number(nearest.left())
                                + ". Perhaps a slip at the balance, something not recorded, or stated uncertainties that"
                                + " are too small."),
                far.sentence());
        assertTrue(far.sentence().startsWith("Measured and predicted disagree: 8 values, χ² "), far.sentence());
        assertFalse(far.sentence().contains("lean one way"), "χ² alone says it: " + far.sentence());
    }

    /** What a value was predicted to be and how surely: its files' shares in squares, and the scale. */
    @Test
    void rowsSayWhatWasPredicted() {
        MeasuredBatch b = batch(new Random(4), 1, 1, 700);
        Verdict v = Verdict.of(Factors.none(), b);
        Coefficients at = MIXTURE.at(700);
        double square = Math.pow(0.01 * at.muaPerCm(), 2);
        for (Coefficients.Share s : at.shares())
            square += Math.pow(s.muaPerCm() * s.ingredient().uncertainty().absorption(), 2);
        Comparison row = v.rows().get(0);
        assertEquals(at.muaPerCm(), row.predictedPerCm(), 1e-12);
        assertEquals(Math.sqrt(square), row.uPredictedPerCm(), 1e-9);
        double u = 0.01 * at.muaPerCm();
        assertEquals(
                (b.values().get(0).perCm() - at.muaPerCm()) / Math.sqrt(square + u * u),
                row.inStandardUncertainties(),
                1e-9);
        Comparison scattered = v.rows().get(1);
        assertEquals(at.muspPerCm() * Math.hypot(0.03, 0.02), scattered.uPredictedPerCm(), 1e-9);
    }
}
