package org.hazewright.bench;

import static org.hazewright.bench.Bottles.AZIDE;
import static org.hazewright.bench.Bottles.CARBON;
import static org.hazewright.bench.Bottles.DRY;
import static org.hazewright.bench.Bottles.EMULSION;
import static org.hazewright.bench.Bottles.GELATIN;
import static org.hazewright.bench.Bottles.INK;
import static org.hazewright.bench.Bottles.RESIN;
import static org.hazewright.bench.Bottles.SILICONE;
import static org.hazewright.bench.Bottles.TITANIA;
import static org.hazewright.bench.Bottles.WATER;
import static org.hazewright.bench.Bottles.contents;
import static org.hazewright.bench.Bottles.plan;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Random;
import java.util.function.ToDoubleFunction;
import java.util.stream.IntStream;
import java.util.stream.Stream;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Point;
import org.hazewright.design.Frozen;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Ingredient;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

class StockPlanTest {
    private static final List<Balance> BALANCES =
            List.of(Balance.USUAL, new Balance(0.0001, 0.0002, 0.010, 120), new Balance(0.01, 0.01, 0.5, 2000));

    /** Random contents of every family on fine and coarse balances, amounts over four decades. */
    static Stream<Planned> random() {
        return IntStream.range(0, 120).mapToObj(seed -> {
            Random random = new Random(seed);
            Ingredient base = List.of(WATER, GELATIN, SILICONE, RESIN).get(seed % 4);
            Balance balance = BALANCES.get(random.nextInt(BALANCES.size()));
            double volume = Math.pow(10, 1 + 2.3 * random.nextDouble());
            List<Object> wanted = new ArrayList<>();
            if (base == WATER || base == GELATIN) {
                wanted.addAll(List.of(INK, Math.pow(10, -6 + 4 * random.nextDouble())));
                wanted.addAll(List.of(EMULSION, Math.pow(10, -3 + 2 * random.nextDouble())));
                if (random.nextBoolean()) wanted.addAll(List.of(AZIDE, 2e-4));
            } else {
                wanted.addAll(List.of(TITANIA, Math.pow(10, -5 + 3 * random.nextDouble())));
                if (base == SILICONE) wanted.addAll(List.of(CARBON, Math.pow(10, -5 + 3 * random.nextDouble())));
            }
            Contents contents = contents(base, volume, wanted.toArray());
            return new Planned(contents, balance, plan(contents, balance));
        });
    }

    record Planned(Contents contents, Balance balance, StockPlan plan) {
        Recipe recipe() {
            return plan.recipe();
        }

        @Override
        public String toString() {
            return contents.base().id() + " " + contents.volumeMl() + " mL on " + balance;
        }
    }

    @ParameterizedTest
    @MethodSource("random")
    void theFinishedVolumeIsTheWantedOneWithinTheRoundingOfTheBase(Planned p) {
        double rounding = 0;
        for (Ingredient part : Bottles.SHELF.partsOf(p.contents().base()).keySet())
            rounding += 0.5 * p.balance().readabilityG() / part.densityGPerMl();
        double volume = Mixture.of(p.recipe()).volumeMl();
        assertEquals(p.contents().volumeMl(), volume, rounding * (1 + 1e-6) + 1e-9);
    }

    @ParameterizedTest
    @MethodSource("random")
    void everyMassIsOneThatTheBalanceShows(Planned p) {
        for (Weighing w : Weighing.of(p.recipe())) {
            double digits = w.massG() / p.balance().readabilityG();
            assertEquals(Math.rint(digits), digits, 1e-6, w.label());
            assertTrue(w.massG() > 0, w.label());
        }
    }

    @ParameterizedTest
    @MethodSource("random")
    void whatIsInTheVesselIsWhatWasWantedWithinTheRounding(Planned p) {
        Map<Ingredient, Double> masses = p.recipe().massesG();
        for (Item item : p.recipe().items()) {
            Ingredient i = item.ingredient();
            if (!p.contents().concentrationGPerMl().containsKey(i)) continue;
            double perG =
                    item.stock().map(s -> p.recipe().contentPerG(s).get(i)).orElse(1.0);
            // half a digit of rounding and at most three more by choice
            double reach = 3.5 * p.balance().readabilityG() * perG;
            assertEquals(p.contents().massG(i), masses.get(i), reach * (1 + 1e-6), i.id());
        }
    }

    @ParameterizedTest
    @MethodSource("random")
    void nothingIsWeighedBelowTheSmallestLoadUnlessItIsSaid(Planned p) {
        for (Weighing w : Weighing.of(p.recipe()))
            if (w.massG() < p.balance().smallestLoadG() - 1e-12)
                assertTrue(
                        p.plan().notes().stream()
                                .anyMatch(n -> n.startsWith(w.ingredient().name())),
                        () -> w + " is below the smallest load and no note says so: "
                                + p.plan().notes());
        for (Ingredient wanted : p.contents().concentrationGPerMl().keySet())
            if (!p.recipe().massesG().containsKey(wanted))
                assertTrue(p.plan().notes().stream().anyMatch(n -> n.contains("left out")));
    }

    @ParameterizedTest
    @MethodSource("random")
    void theBaseKeepsItsOwnProportionsWithTheLiquidOfTheStocksCounted(Planned p) {
        Map<Ingredient, Double> masses = p.recipe().massesG();
        Map<Ingredient, Double> parts = Bottles.SHELF.partsOf(p.contents().base());
        double whole = parts.keySet().stream().mapToDouble(masses::get).sum();
        parts.forEach((i, share) ->
                assertEquals(share * whole, masses.get(i), p.balance().readabilityG() * parts.size(), i.id()));
    }

    @ParameterizedTest
    @MethodSource("random")
    void everyStockHoldsMoreThanIsDrawnAndIsMadeOfRoundGrams(Planned p) {
        for (Leftover l : p.plan().leftovers()) assertTrue(l.leftG() >= 0.09 * l.usedG(), l.toString());
        for (Stock s : p.recipe().stocks()) {
            assertTrue(s.totalG() >= 10 - 1e-9, s.id());
            double figure = s.ingredientG() / Math.pow(10, Math.floor(Math.log10(s.ingredientG()) + 1e-9));
            assertTrue(
                    Math.abs(figure - 1) < 1e-9 || Math.abs(figure - 2) < 1e-9 || Math.abs(figure - 5) < 1e-9,
                    s.toString());
            assertTrue(List.of(10L, 20L, 50L, 100L, 200L, 500L, 1000L).contains(Math.round(s.ratio())), s.toString());
        }
        assertTrue(p.plan().judged() < 40);
    }

    @ParameterizedTest
    @MethodSource("random")
    void weighingsAreTheLoadsThatAPersonCounts(Planned p) {
        int loads = 0;
        for (Weighing w : Weighing.of(p.recipe()))
            loads += Grams.loads(w.massG(), p.balance()).size();
        assertEquals(loads, p.plan().weighings());
    }

    @Test
    void anAmountBelowTheSmallestLoadComesFromAStock() {
        StockPlan plan = plan(contents(WATER, 1000, INK, 14.024e-6, EMULSION, 0.0492), Balance.USUAL);
        Item ink = itemOf(plan, INK);
        assertTrue(ink.stock().isPresent());
        assertEquals(WATER, plan.recipe().stock(ink.stock().get()).diluent());
        assertTrue(plan.notes().isEmpty());
    }

    @Test
    void anAmountThatCouldBeWeighedComesFromAStockWhereThatIsMuchBetter() {
        // 40 mg on a milligram balance is ± 2.6 %, half of the tolerance of 5 %.
        StockPlan plan = plan(contents(WATER, 400, INK, 1e-4, EMULSION, 0.05), Balance.USUAL);
        assertTrue(itemOf(plan, INK).stock().isPresent());
        // 4 g are ± 0.03 %: a stock would be work for nothing.
        StockPlan plenty = plan(contents(WATER, 400, INK, 1e-2, EMULSION, 0.05), Balance.USUAL);
        assertTrue(plenty.recipe().stocks().isEmpty());
    }

    @Test
    void theChosenPlanScoresNoWorseThanWeighingNeat() {
        Contents contents = contents(SILICONE, 60, TITANIA, 1.1e-3, CARBON, 2e-3);
        ToDoubleFunction<Recipe> judge = Bottles.judge(contents, Balance.USUAL, 0.05);
        Recipe neat = new Assembly(contents, Balance.USUAL)
                .require(List.of(
                        Dose.neat(TITANIA, contents.massG(TITANIA)), Dose.neat(CARBON, contents.massG(CARBON))));
        StockPlan plan = StockPlan.of(contents, Balance.USUAL, judge);
        assertTrue(plan.score() <= judge.applyAsDouble(neat));
        assertEquals(plan.score(), judge.applyAsDouble(plan.recipe()), 1e-12);
    }

    @Test
    void oneStockIsNotEnoughForMicrogramsSoTwoAreMadeInSeries() {
        // 2 µg of ink in 20 mL: even at 1 : 1000 only 2 mg of stock would be drawn.
        StockPlan plan = plan(contents(WATER, 20, INK, 1e-7, EMULSION, 0.05), Balance.USUAL);
        Stock last = plan.recipe().stock(itemOf(plan, INK).stock().orElseThrow());
        assertTrue(last.from().isPresent());
        assertEquals(2, plan.leftovers().size());
        assertEquals(2e-6, plan.recipe().massesG().get(INK), 2e-6 * 0.05);
    }

    @Test
    void aStockInHandIsDrawnFromAndNotMadeAgain() {
        Contents contents = contents(WATER, 1000, INK, 14.024e-6, EMULSION, 0.0492);
        Stock hand = new Stock("ink-of-monday", INK, Optional.empty(), 1, WATER, 99, Optional.empty());
        StockPlan plan = plan(contents.withStocks(List.of(hand)), Balance.USUAL);
        assertEquals(Optional.of("ink-of-monday"), itemOf(plan, INK).stock());
        assertEquals(List.of("ink-of-monday"), plan.stocksInHand());
        assertTrue(plan.leftovers().isEmpty());
        assertTrue(plan.weighings() < plan(contents, Balance.USUAL).weighings());
    }

    @Test
    void aPowderThatSettlesIsSuspendedOnlyWhenItMustAndThenSo() {
        StockPlan must = plan(contents(WATER, 100, TITANIA, 1e-4), Balance.USUAL);
        assertTrue(itemOf(must, TITANIA).stock().isPresent());
        assertTrue(must.notes().get(0).contains("settles"));
        StockPlan need = plan(contents(WATER, 100, TITANIA, 3e-4), Balance.USUAL);
        assertTrue(itemOf(need, TITANIA).stock().isEmpty());
    }

    @Test
    void aBaseWithoutLiquidTakesItNeatAndSaysWhy() {
        StockPlan plan = plan(contents(DRY, 100, TITANIA, 1e-4), Balance.USUAL);
        assertTrue(plan.recipe().stocks().isEmpty());
        assertEquals(1, plan.notes().size());
        assertTrue(plan.notes().get(0).contains("has no liquid"), plan.notes().get(0));
    }

    @Test
    void whatTheBalanceShowsAsNothingIsLeftOutAndSaid() {
        StockPlan plan = plan(contents(DRY, 100, TITANIA, 1e-6), Balance.USUAL);
        assertFalse(plan.recipe().massesG().containsKey(TITANIA));
        assertTrue(plan.notes().get(0).contains("left out"), plan.notes().get(0));
    }

    @Test
    void roundingDoesNotStepOverAToleranceThatTheJudgeHolds() {
        // Five grams on a 10 mg balance: plain rounding is off by up to 0.1 %, and the plan stands 0.05 % inside the
        // edge.
        Balance coarse = new Balance(0.01, 0, 0.05, 2000);
        int over = 0;
        for (int k = 0; k < 30; k++) {
            Contents contents = contents(WATER, 160 + 0.37 * k, EMULSION, 0.0511);
            Point exact = Bottles.points(contents, 0.05).get(1);
            double tau = exact.tolerancePerCm();
            Point edge = new Point(exact.quantity(), 780, exact.wantedPerCm() - 0.99 * tau, tau, 1);
            Frozen frozen = new Frozen(List.of(edge), Bottles.exact(contents), WATER, coarse);
            ToDoubleFunction<Recipe> judge = r -> frozen.score(r).total() + 1e3 * Math.max(0, frozen.worstMiss(r) - 1);
            Recipe plain =
                    new Assembly(contents, coarse).require(List.of(Dose.neat(EMULSION, contents.massG(EMULSION))));
            if (frozen.worstMiss(plain) > 1) over++;
            StockPlan plan = StockPlan.of(contents, coarse, judge);
            assertTrue(frozen.worstMiss(plan.recipe()) <= 1, "missed at " + contents.volumeMl() + " mL");
        }
        assertTrue(over > 0, "plain rounding never stepped over: nothing was tested");
    }

    @Test
    void everyWayOffersMoreStockThanIsDrawn() {
        Random random = new Random(11);
        for (int k = 0; k < 300; k++) {
            Contents contents = contents(WATER, 100, INK, Math.pow(10, -6 + 4 * random.nextDouble()));
            for (Dose dose : new Dilutions(contents, Balance.USUAL).of(INK)) {
                double drawn = dose.weighedG();
                for (int n = dose.chain().size() - 1; n >= 0; n--) {
                    Stock s = dose.chain().get(n);
                    assertTrue(s.totalG() >= 1.1 * drawn * (1 - 1e-6), s + " for " + drawn + " g");
                    drawn = s.ingredientG();
                }
            }
        }
    }

    /** Against differences of the grams in the vessel, each weighing moved by itself. */
    @Test
    void theUncertaintyOfADoseIsThatOfItsWeighings() {
        Contents contents = contents(WATER, 100, INK, 2e-7);
        Balance balance = new Balance(1e-9, 0.001, 0.02, 500);
        for (Dose dose : new Dilutions(contents, Balance.USUAL).of(INK)) {
            Recipe recipe = new Assembly(contents, balance).require(List.of(dose));
            double planned = recipe.massesG().get(INK);
            double sum = 0;
            for (Weighing w : Weighing.of(recipe)) {
                double moved = w.changed(recipe, w.massG() + 1e-5).massesG().get(INK);
                sum += Math.pow((moved - planned) / 1e-5 * 0.001 / planned, 2);
            }
            assertEquals(Math.sqrt(sum), dose.relativeUncertainty(balance), 1e-3 * Math.sqrt(sum));
        }
    }

    @Test
    void thePartThatStartsTheCureIsTheLastItem() {
        Recipe silicone = plan(contents(SILICONE, 60, TITANIA, 1e-3, CARBON, 1e-2), Balance.USUAL)
                .recipe();
        assertEquals(Bottles.PART_A, silicone.items().get(0).ingredient());
        assertEquals(
                Bottles.PART_B,
                silicone.items().get(silicone.items().size() - 1).ingredient());
        Recipe gel = plan(contents(GELATIN, 100, INK, 1e-5, EMULSION, 0.05, AZIDE, 3e-4), Balance.USUAL)
                .recipe();
        assertEquals(
                List.of(WATER, AZIDE, Bottles.GELATIN_POWDER, EMULSION, INK),
                gel.items().stream().map(Item::ingredient).toList());
    }

    @Test
    void twiceTheVolumeTakesTwiceOfEverything() {
        Contents one = contents(GELATIN, 200, INK, 5e-3, EMULSION, 0.05);
        Contents two = contents(GELATIN, 400, INK, 5e-3, EMULSION, 0.05);
        Map<Ingredient, Double> small = plan(one, Balance.USUAL).recipe().massesG();
        Map<Ingredient, Double> large = plan(two, Balance.USUAL).recipe().massesG();
        small.forEach((i, g) -> assertEquals(2 * g, large.get(i), 0.008, i.id()));
    }

    @Test
    void whatDoesNotFitIsRefusedInPlainWords() {
        Refusal full = assertThrows(Refusal.class, () -> contents(WATER, 100, EMULSION, 0.99));
        assertTrue(full.getMessage().contains("no room"), full.getMessage());
        assertThrows(Refusal.class, () -> contents(WATER, 0, EMULSION, 0.1));
        assertThrows(Refusal.class, () -> contents(WATER, 100, EMULSION, -0.1));
        assertThrows(Refusal.class, () -> contents(WATER, 100, GELATIN, 0.1));
    }

    private static Item itemOf(StockPlan plan, Ingredient i) {
        return plan.recipe().items().stream()
                .filter(item -> item.ingredient().equals(i))
                .findFirst()
                .orElseThrow();
    }
}
