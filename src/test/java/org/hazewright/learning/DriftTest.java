package org.hazewright.learning;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.time.LocalDate;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.Random;
import java.util.function.IntToDoubleFunction;
import org.hazewright.mixture.DemoIngredients;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Lot;
import org.hazewright.shelf.Source;
import org.junit.jupiter.api.Test;

/** A lot that moves, a lot that does not, and a lot past its date. */
class DriftTest {
    private static final Ingredient INK = DemoIngredients.ink(0.05);
    private static final Factor FACTOR = Factor.of(INK, Quantity.ABSORPTION);
    private static final LocalDate START = LocalDate.of(2026, 1, 5);

    /** Updates of N(1, 0.05²) by readings of u 1 % of a truth that may move: precision adds, by hand. */
    private static Drift drift(Random random, int updates, IntToDoubleFunction truth) {
        double precision = 1 / (0.05 * 0.05);
        double weighted = precision;
        List<Drift.Estimate> estimates = new ArrayList<>();
        for (int k = 0; k < updates; k++) {
            double y = truth.applyAsDouble(k) + 0.01 * random.nextGaussian();
            precision += 1e4;
            weighted += 1e4 * y;
            estimates.add(new Drift.Estimate(START.plusDays(30L * k), weighted / precision, 1 / Math.sqrt(precision)));
        }
        return Drift.of(FACTOR, estimates);
    }

    @Test
    void aSteadyLotIsFlaggedFiveTimesInAHundredAtMost() {
        Random random = new Random(21);
        int flagged = 0;
        for (int run = 0; run < 4000; run++) {
            double off = 1 + 0.05 * random.nextGaussian();
            if (drift(random, 8, k -> off).drifting()) flagged++;
        }
        double three = 3 * Math.sqrt(0.05 * 0.95 / 4000);
        assertTrue(flagged / 4000.0 <= 0.05 + three, "two tests at half the level each: " + flagged);
        assertTrue(flagged / 4000.0 >= 0.03, "which overlap little: " + flagged);
    }

    @Test
    void aLotThatFadesIsFound() {
        Random random = new Random(22);
        int found = 0;
        for (int run = 0; run < 500; run++)
            if (drift(random, 8, k -> 1 - 0.01 * k).drifting()) found++;
        assertTrue(found > 475, "1 % a month read with 1 % over 8 months: " + found);
        Drift d = drift(new Random(23), 8, k -> 1 - 0.02 * k);
        assertTrue(d.move() < 0 && d.oneWay());
        assertTrue(d.sentence().startsWith("ink-demo absorption drifts: "), d.sentence());
        assertEquals(7, d.steps());
    }

    @Test
    void aLotThatWasFiledWrongIsNoDrift() {
        assertFalse(drift(new Random(24), 8, k -> 1.25).drifting());
        Drift jumps = drift(new Random(24), 8, k -> k % 2 == 0 ? 1.05 : 0.95);
        assertTrue(jumps.drifting() && !jumps.oneWay());
        assertTrue(jumps.sentence().startsWith("ink-demo absorption jumps about: "), jumps.sentence());
    }

    /** The same estimates from the update itself. */
    @Test
    void estimatesComeFromUpdates() {
        Factors known = Factors.asFiled(List.of(INK));
        Drift.Estimate e = Drift.Estimate.of(START, known, FACTOR);
        assertEquals(1, e.factor());
        assertEquals(0.05, e.u(), 1e-15);
        assertFalse(Drift.of(FACTOR, List.of(e)).drifting(), "one update shows no drift");
    }

    @Test
    void roundedHistoriesPassAndMixedOnesAreRefused() {
        Drift.Estimate a = new Drift.Estimate(START, 1.02, 0.010);
        assertFalse(Drift.of(FACTOR, List.of(a, new Drift.Estimate(START.plusDays(1), 1.02, 0.010)))
                .drifting());
        assertTrue(Drift.of(FACTOR, List.of(a, new Drift.Estimate(START.plusDays(1), 1.06, 0.010)))
                .drifting());
        assertThrows(Refusal.class, () -> Drift.of(FACTOR, List.of()));
        assertThrows(
                Refusal.class, () -> Drift.of(FACTOR, List.of(a, new Drift.Estimate(START.plusDays(1), 1.02, 0.03))));
        assertThrows(
                Refusal.class, () -> Drift.of(FACTOR, List.of(a, new Drift.Estimate(START.minusDays(1), 1.02, 0.009))));
        assertThrows(Refusal.class, () -> new Drift.Estimate(START, -0.2, 0.01));
    }

    @Test
    void lotsAreFlaggedByDateAndByDrift() {
        Lot lot =
                new Lot("ink-demo", "L07", Optional.empty(), Optional.empty(), Optional.of(LocalDate.of(2026, 6, 30)));
        Ingredient bottle = new NewLot("ink-demo", lot, new Source(Source.Basis.INVENTED, ""))
                .learned(INK, Factors.asFiled(List.of(INK)));
        assertTrue(LotFlag.of(bottle, LocalDate.of(2026, 6, 30), List.of()).isEmpty(), "its last day is a good day");
        List<LotFlag> late = LotFlag.of(bottle, LocalDate.of(2026, 7, 1), List.of());
        assertEquals(LotFlag.Kind.EXPIRED, late.get(0).kind());
        assertTrue(
                late.get(0).sentence().contains("L07") && late.get(0).sentence().contains("2026-06-30"));
        Drift fading = drift(new Random(25), 8, k -> 1 - 0.02 * k);
        assertEquals(
                2, LotFlag.of(bottle, LocalDate.of(2026, 7, 1), List.of(fading)).size());
        assertTrue(LotFlag.of(DemoIngredients.water(0.01), LocalDate.of(2026, 7, 1), List.of(fading))
                .isEmpty());
    }
}
