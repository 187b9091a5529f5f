package org.hazewright.learning;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.time.LocalDate;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Random;
import java.util.function.ToDoubleFunction;
import org.hazewright.mixture.Coefficients;
import org.hazewright.mixture.DemoIngredients;
import org.hazewright.mixture.Mixture;
import org.hazewright.shelf.Ingredient;
import org.junit.jupiter.api.Test;

/** Verdicts on batches whose truth is known because it was made up. */
class VerdictTest {
    private static final Ingredient RED = DemoIngredients.dye("red-demo", 8, 2, 0.02);
    private static final Ingredient BLUE = DemoIngredients.dye("blue-demo", 1, 6, 0.02);
    private static final Ingredient EMULSION = DemoIngredients.emulsion(0.03);
    private static final Ingredient WATER = DemoIngredients.water(0.01);
    private static final Mixture MIXTURE = new Mixture(Map.of(RED, 30.0, BLUE, 30.0, EMULSION, 50.0, WATER, 900.0), 22);
    private static final Method TRUSTED = new Method("spectrophotometer", 0, 0);
    private static final double[] NM = {620, 660, 700, 740, 780, 820, 860};

    /** µa and µs' at seven wavelengths with 1 % noise, each share times the factor given for it. */
    private static MeasuredBatch batch(
            Random random,
            Method method,
            ToDoubleFunction<Ingredient> absorption,
            ToDoubleFunction<Ingredient> scattering) {
        List<MeasuredValue> values = new ArrayList<>();
        for (double nm : NM) {
            Coefficients at = MIXTURE.at(nm);
            double mua = 0;
            double musp = 0;
            for (Coefficients.Share s : at.shares()) {
                mua += s.muaPerCm() * absorption.applyAsDouble(s.ingredient());
                musp += s.muspPerCm() * scattering.applyAsDouble(s.ingredient());
            }
            double uA = 0.01 * at.muaPerCm();
            double uS = 0.01 * at.muspPerCm();
            values.add(new MeasuredValue(Quantity.ABSORPTION, nm, mua + uA * random.nextGaussian(), uA));
            values.add(new MeasuredValue(Quantity.SCATTERING, nm, musp + uS * random.nextGaussian(), uS));
        }
        return new MeasuredBatch("B1", LocalDate.of(2026, 3, 2), MIXTURE, List.of(), method, values);
    }

    @Test
    void agreesWhenItShould() {
        Random random = new Random(1);
        int agrees = 0;
        for (int run = 0; run < 1000; run++) {
            double red = 1 + 0.02 * random.nextGaussian();
            double blue = 1 + 0.02 * random.nextGaussian();
            double emulsion = 1 + 0.03 * random.nextGaussian();
            double water = 1 + 0.01 * random.nextGaussian();
            Verdict v = Verdict.of(
                    Factors.none(),
                    batch(random, TRUSTED, i -> i == RED ? red : i == BLUE ? blue : water, i -> emulsion));
            if (v.outcome() == Verdict.Outcome.AGREES) agrees++;
        }
        double three = 3 * Math.sqrt(0.05 * 0.95 / 1000);
        assertTrue(agrees >= 1000 * (0.95 - three), "two tests at half the level each: " + agrees);
        assertTrue(agrees <= 1000 * (0.975 + three), "and the first alone takes half: " + agrees);
    }

    @Test
    void blamesTheIngredientThatIsOff() {
        Verdict v = Verdict.of(Factors.none(), batch(new Random(2), TRUSTED, i -> i == BLUE ? 1.2 : 1, i -> 1));
        assertEquals(Verdict.Outcome.ONE_FACTOR, v.outcome(), v.sentence());
        Suspect first = v.named().get(0);
        assertEquals(Factor.of(BLUE, Quantity.ABSORPTION), first.factor());
        assertEquals(1.2, first.estimate(), 3 * first.u());
        assertTrue(first.u() < 0.02, "u " + first.u());
        assertTrue(v.sentence().contains("The data blame blue-demo absorption, "), v.sentence());
        assertTrue(v.sentence().contains("above its file's figure"), v.sentence());
        assertEquals(14, v.rows().size());
    }

    @Test
    void blamesScatteringToo() {
        Verdict v = Verdict.of(Factors.none(), batch(new Random(3), TRUSTED, i -> 1, i -> i == EMULSION ? 0.8 : 1));
        assertEquals(Verdict.Outcome.ONE_FACTOR, v.outcome(), v.sentence());
        assertEquals(
                Factor.of(EMULSION, Quantity.SCATTERING), v.suspects().get(0).factor());
        assertTrue(v.sentence().contains("below its file's figure"), v.sentence());
    }

    /** A single fault of a single ingredient is found in nearly every one of a thousand noisy batches, and never pinned on another. */
    @Test
    void rarelyBlamesTheInnocent() {
        Random random = new Random(4);
        int right = 0;
        int wrong = 0;
        for (int run = 0; run < 1000; run++) {
            Verdict v = Verdict.of(Factors.none(), batch(random, TRUSTED, i -> i == RED ? 1.15 : 1, i -> 1));
            if (v.outcome() != Verdict.Outcome.ONE_FACTOR) continue;
            if (v.suspects().get(0).factor().equals(Factor.of(RED, Quantity.ABSORPTION))) right++;
            else wrong++;
        }
        assertTrue(right > 900, "right " + right);
        assertEquals(0, wrong);
    }

    @Test
    void twoFaultsAreNoSingleIngredients() {
        Verdict v = Verdict.of(
                Factors.none(),
                batch(new Random(5), TRUSTED, i -> i == BLUE ? 1.25 : 1, i -> i == EMULSION ? 0.75 : 1));
        assertEquals(Verdict.Outcome.NO_SINGLE_FACTOR, v.outcome(), v.sentence());
        assertTrue(v.sentence().contains("No single ingredient explains it."), v.sentence());
    }

    /** One value cannot choose between two dyes; the one that is off by fewer of its own uncertainties is named first. */
    @Test
    void oneValueCannotTell() {
        double mua = MIXTURE.at(740).muaPerCm();
        MeasuredBatch b = new MeasuredBatch(
                "B2",
                LocalDate.of(2026, 3, 2),
                MIXTURE,
                List.of(),
                TRUSTED,
                List.of(new MeasuredValue(Quantity.ABSORPTION, 740, mua * 1.3, mua * 0.01)));
        Verdict v = Verdict.of(Factors.none(), b);
        assertEquals(Verdict.Outcome.CANNOT_TELL_WHICH, v.outcome(), v.sentence());
        assertEquals(3, v.suspects().size(), "scattering has no part in µa, and the method's scale is trusted");
        assertTrue(v.sentence().contains("cannot tell which of 2: "), v.sentence());
        assertTrue(
                v.named().stream().noneMatch(s -> s.factor().name().equals("water")),
                "water would have to be off tenfold");
        for (Suspect s : v.suspects()) assertEquals(0, s.left(), 1e-6 * v.chiSquared());
    }

    /** A scale that is not trusted is a rival of whatever makes up all of the coefficient. */
    @Test
    void anUncertainScaleIsARival() {
        Method method = new Method("time-resolved fit", 0.02, 0.02);
        Verdict v = Verdict.of(Factors.none(), batch(new Random(6), method, i -> 1, i -> 0.8));
        assertEquals(Verdict.Outcome.CANNOT_TELL_WHICH, v.outcome(), v.sentence());
        assertTrue(v.sentence().contains("emulsion-demo scattering"), v.sentence());
        assertTrue(v.sentence().contains("the µs' scale of time-resolved fit"), v.sentence());
    }

    /** Seven values that are all high by a little are no chance, though none of them nor their χ² would raise an eyebrow. */
    @Test
    void seesALeanThatIsSmallEverywhere() {
        Verdict v = Verdict.of(Factors.none(), batch(new Random(8), TRUSTED, i -> i == BLUE ? 1.12 : 1, i -> 1));
        assertTrue(v.pTogether() > 0.05, v.sentence());
        assertEquals(Verdict.Outcome.ONE_FACTOR, v.outcome(), v.sentence());
        assertEquals(Factor.of(BLUE, Quantity.ABSORPTION), v.named().get(0).factor());
        assertTrue(v.sentence().contains("but they lean one way together"), v.sentence());
    }

    /** Water 40 % off would do as well as a dye 12 % off, but that is 40 of its standard uncertainties against 6. */
    @Test
    void leavesOutWhatIsFarFetched() {
        Verdict v = Verdict.of(Factors.none(), batch(new Random(7), TRUSTED, i -> i == BLUE ? 1.12 : 1, i -> 1));
        assertEquals(
                List.of(Factor.of(BLUE, Quantity.ABSORPTION)),
                v.named().stream().map(Suspect::factor).toList());
        Suspect water = v.suspects().stream()
                .filter(s -> s.factor().equals(Factor.of(WATER, Quantity.ABSORPTION)))
                .findFirst()
                .orElseThrow();
        assertTrue(water.explains() && Math.abs(water.inStandardUncertainties()) > 30, v.sentence());
    }

    /** What was learned before counts: a lot that an update has moved agrees with a batch that its file would not. */
    @Test
    void judgesByWhatIsKnownNow() {
        MeasuredBatch off = batch(new Random(7), TRUSTED, i -> i == BLUE ? 1.12 : 1, i -> 1);
        Factors learned = LotUpdate.of(Factors.none(), off).after();
        MeasuredBatch again = batch(new Random(8), TRUSTED, i -> i == BLUE ? 1.12 : 1, i -> 1);
        assertEquals(
                Verdict.Outcome.ONE_FACTOR, Verdict.of(Factors.none(), again).outcome());
        assertEquals(Verdict.Outcome.AGREES, Verdict.of(learned, again).outcome());
    }
}
