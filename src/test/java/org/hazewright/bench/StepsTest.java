package org.hazewright.bench;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.stream.Stream;
import org.hazewright.brief.Balance;
import org.hazewright.mixture.Recipe;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/** Orders of work against common practice at the bench. */
class StepsTest {
    private static final Balance BALANCE = Balance.USUAL;

    private static List<Step> steps(Contents contents) {
        StockPlan plan = Bottles.plan(contents, BALANCE);
        List<Sensitivity> bands = Sensitivity.of(plan.recipe(), BALANCE, Bottles.points(contents, 0.05));
        return Steps.of(plan.recipe(), BALANCE, bands, plan.stocksInHand());
    }

    /** The words occur in steps in this order, each in a later step than the one before. */
    private static void inOrder(List<Step> steps, String... words) {
        int at = -1;
        for (String word : words) {
            int from = at;
            at = java.util.stream.IntStream.range(from + 1, steps.size())
                    .filter(k -> steps.get(k).text().contains(word))
                    .findFirst()
                    .orElseThrow(() -> new AssertionError("no step with \"" + word + "\" after step " + (from + 1)
                            + ":\n"
                            + String.join("\n", steps.stream().map(Step::text).toList())));
        }
    }

    /**
     * Water, preservative, bloom cold, melt, cool into the window, water lost given back, emulsion below its limit, ink stock last,
     * pour, set in the cold (common practice).
     */
    @Test
    void aGelIsSwollenColdMeltedCooledAndThenFilled() {
        List<Step> steps = steps(Bottles.contents(
                Bottles.GELATIN, 100, Bottles.INK, 14.024e-6, Bottles.EMULSION, 0.0492, Bottles.AZIDE, 3e-4));
        inOrder(
                steps,
                "of Carbon ink into a clean bottle",
                "of Water, purified, to it",
                "Weigh a clean, dry vessel",
                "of Water, purified, into the vessel",
                "of Sodium azide into the vessel",
                "of Gelatin powder and sprinkle it on the cold liquid",
                "swell for 45 min at 20 °C",
                "write the mass down",
                "Heat to 50 °C",
                "cool to below 40 °C while stirring slowly, but keep it above 32 °C",
                "give back the water that it lost",
                "of Lipid emulsion, 20 % soybean oil, into the vessel",
                "Shake stock ink-1-",
                "of stock ink-1-",
                "pour into the moulds at 33 °C",
                "set at 4 °C for 12 h");
        assertEquals(
                4,
                steps.stream()
                        .filter(s -> s.text().contains("set at 4"))
                        .findFirst()
                        .orElseThrow()
                        .temperatureC()
                        .orElseThrow());
    }

    /** Part A, pigments by ultrasound, cool, degas, hardener last, degas, pour, cure (common practice). */
    @Test
    void aSiliconeTakesItsPigmentsInPartAAndItsHardenerLast() {
        List<Step> steps = steps(Bottles.contents(Bottles.SILICONE, 150, Bottles.TITANIA, 4e-3, Bottles.CARBON, 1e-2));
        inOrder(
                steps,
                "three to four times 150 mL",
                "of Silicone, part A, into the cup",
                "of Titanium dioxide powder into the cup",
                "by ultrasound for 30 min",
                "of Carbon paste into the cup",
                "cool to 22 °C",
                "Degas the mix",
                "of Silicone, part B, into the cup, last",
                "within 90 min",
                "Degas until the foam has collapsed",
                "turn the mould",
                "cure at 65 °C for 4 h");
        assertTrue(steps.stream().anyMatch(s -> s.text().contains("100 : 10 by mass")));
        assertTrue(steps.stream()
                .filter(s -> s.text().contains("Titanium dioxide powder into"))
                .allMatch(s -> s.cautions().stream().anyMatch(c -> c.contains("dust"))));
    }

    @Test
    void aMasterbatchIsMadeInPartAAndTheRatioCountsIt() {
        List<Step> steps = steps(Bottles.contents(Bottles.SILICONE, 60, Bottles.TITANIA, 1e-4));
        inOrder(
                steps,
                "of Titanium dioxide powder into a clean cup labelled tio2-1-",
                "Add",
                "disperse it by ultrasound for 30 min",
                "of Silicone, part A, into the cup",
                "of stock tio2-1-",
                "100 : 10 by mass, the base in the stocks counted");
    }

    @Test
    void aResinKeepsItsRatioAndItsPotLife() {
        List<Step> steps = steps(Bottles.contents(Bottles.RESIN, 100, Bottles.TITANIA, 5e-3));
        inOrder(
                steps,
                "of Epoxy resin into the cup",
                "ultrasound",
                "of Amine hardener into the cup, last",
                "within 45 min",
                "cure at 25 °C for 24 h");
        assertTrue(steps.stream().anyMatch(s -> s.text().contains("100 : 30 by mass")));
        assertFalse(steps.stream().anyMatch(s -> s.text().contains("egas")), "no file asks for degassing");
    }

    @Test
    void aWindowThatIsClosedHoldsTheGelAtThePouringTemperatureAndSaysSo() {
        List<Step> steps = steps(Bottles.contents(Bottles.AGAR, 100, Bottles.EMULSION, 0.02));
        Step cool = steps.stream()
                .filter(s -> s.text().contains("Let it cool"))
                .findFirst()
                .orElseThrow();
        assertEquals(45, cool.temperatureC().orElseThrow());
        assertTrue(cool.cautions().get(0).contains("below 40 °C"));
    }

    @Test
    void whatSettlesIsStirredUntilPouringOrMeasuring() {
        assertTrue(steps(Bottles.contents(Bottles.WATER, 100, Bottles.TITANIA, 1e-3)).stream()
                .anyMatch(s -> s.text().contains("Keep stirring until and while it is measured")));
        assertTrue(steps(Bottles.contents(Bottles.GELATIN, 100, Bottles.TITANIA, 1e-3)).stream()
                .anyMatch(s -> s.text().contains("go on stirring until pouring")));
        assertFalse(steps(Bottles.contents(Bottles.WATER, 100, Bottles.EMULSION, 1e-2)).stream()
                .anyMatch(s -> s.text().contains("eep stirring")));
    }

    @Test
    void aStockInHandIsFetchedNotMade() {
        Contents contents = Bottles.contents(Bottles.WATER, 1000, Bottles.INK, 14.024e-6);
        Recipe recipe = Bottles.plan(contents, BALANCE).recipe();
        String id = recipe.stocks().get(0).id();
        List<Step> steps = Steps.of(recipe, BALANCE, List.of(), List.of(id));
        assertTrue(steps.get(0).text().startsWith("Fetch stock " + id));
        assertFalse(steps.stream().anyMatch(s -> s.text().contains("labelled")));
    }

    @Test
    void workGoesForwardFromStocksToFinish() {
        for (Contents contents : all().toList()) {
            Step.Stage stage = Step.Stage.STOCKS;
            for (Step s : steps(contents)) {
                assertTrue(s.stage().compareTo(stage) >= 0, s.text());
                stage = s.stage();
            }
        }
    }

    static Stream<Contents> all() {
        return Stream.of(
                Bottles.contents(Bottles.WATER, 1000, Bottles.INK, 14.024e-6, Bottles.EMULSION, 0.0492),
                Bottles.contents(Bottles.WATER, 20, Bottles.INK, 1e-7),
                Bottles.contents(Bottles.WATER, 200, Bottles.INK, 1e-2),
                Bottles.contents(Bottles.GELATIN, 400, Bottles.TITANIA, 1e-3, Bottles.INK, 1e-5),
                Bottles.contents(Bottles.SILICONE, 60, Bottles.TITANIA, 1e-4, Bottles.CARBON, 1e-4),
                Bottles.contents(Bottles.RESIN, 500, Bottles.TITANIA, 1e-3));
    }

    @ParameterizedTest
    @MethodSource("all")
    void everyWeighingIsOneStepWithItsGramsItsBandAndItsLoads(Contents contents) {
        StockPlan plan = Bottles.plan(contents, BALANCE);
        List<Weighing> told = new ArrayList<>();
        for (Step s : steps(contents)) {
            if (s.weighing().isEmpty()) continue;
            Weighing w = s.weighing().get();
            told.add(w);
            assertTrue(s.text().contains(Grams.shown(w.massG(), BALANCE)), s.text());
            assertEquals(w.massG(), s.loadsG().stream().mapToDouble(g -> g).sum(), 1e-9);
            assertTrue(s.allowed().orElseThrow().lowG() < w.massG());
            assertTrue(s.allowed().orElseThrow().highG() > w.massG());
            if (w.label().equals("water"))
                assertEquals(w.massG() / 0.9978, s.volumeMl().orElseThrow(), 1e-9);
        }
        List<Weighing> all = Weighing.of(plan.recipe());
        assertEquals(all.size(), told.size());
        assertTrue(told.containsAll(all));
    }

    @ParameterizedTest
    @MethodSource("all")
    void everySentenceIsWholeAndPlain(Contents contents) {
        for (Step s : steps(contents)) {
            assertTrue(s.text().endsWith("."), s.text());
            assertTrue(Character.isUpperCase(s.text().charAt(0)), s.text());
            assertFalse(
                    s.text().contains("  ")
                            || s.text().contains("..")
                            || s.text().contains("null"),
                    s.text());
            assertFalse(s.text().contains("Optional"), s.text());
        }
    }
}
