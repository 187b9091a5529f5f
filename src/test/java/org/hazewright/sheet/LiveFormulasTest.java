package org.hazewright.sheet;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.SplittableRandom;
import org.apache.poi.ss.usermodel.Cell;
import org.apache.poi.ss.usermodel.CellType;
import org.hazewright.bench.Answer;
import org.hazewright.bench.Weighing;
import org.hazewright.brief.Point;
import org.hazewright.mixture.Coefficients;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;
import org.hazewright.shelf.Ingredient;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/** What a spreadsheet computes from the sheet equals what the program computes, planned and as weighed. */
class LiveFormulasTest {
    /** Sums of a few products in another order: double precision leaves far less. */
    private static final double RELATIVE = 1e-9;

    static List<Answer> answers() {
        return List.of(
                Answers.gelatin(),
                Answers.bath(),
                Answers.silicone("Slab", "PDMS silicone, part B", "Density from memory."));
    }

    @ParameterizedTest
    @MethodSource("answers")
    void anEmptySheetPredictsThePlan(Answer a) {
        Filled sheet = Filled.of(a);
        double[] made = sheet.asMade();
        for (int j = 0; j < made.length; j++) close(a.predicted().get(j).perCm(), made[j]);
        close(a.mixture().volumeMl(), sheet.number(sheet.cells(Names.VOLUME_ML).get(0)));
        close(a.mixture().massG(), sheet.number(sheet.cells(Names.MASS_G).get(0)));
        List<Ingredient> ingredients = List.copyOf(a.mixture().massesG().keySet());
        List<Cell> concentrations = sheet.cells(Names.CONCENTRATION);
        assertEquals(ingredients.size(), concentrations.size());
        for (int i = 0; i < ingredients.size(); i++)
            close(a.mixture().concentrationGPerMl(ingredients.get(i)), sheet.number(concentrations.get(i)));
    }

    /** The values that stand in the file before anybody recomputes, for programs that only show. */
    @ParameterizedTest
    @MethodSource("answers")
    void keptValuesAreTheComputedOnes(Answer a) {
        Filled sheet = Filled.of(a);
        for (Cell c : sheet.formulas()) {
            var kept = c.getCachedFormulaResultType();
            assertNotEquals(CellType.ERROR, kept, Filled.where(c));
            if (kept == CellType.NUMERIC) close(sheet.number(c), c.getNumericCellValue());
            else assertEquals(sheet.word(c), c.getStringCellValue(), Filled.where(c));
        }
    }

    /** The bath's crowding is none and all its liquids are of one index, so nothing is frozen and the whole model must agree. */
    @Test
    void asWeighedAgreesWithTheWholeModelWhereNothingIsFrozen() {
        Answer a = Answers.bath();
        SplittableRandom random = new SplittableRandom(7);
        for (int round = 0; round < 20; round++) {
            Filled sheet = Filled.of(a);
            Recipe made = weighed(a.recipe(), sheet, random, 0.05);
            Mixture mixture = Mixture.of(made);
            double[] live = sheet.asMade();
            for (int j = 0; j < live.length; j++)
                close(value(mixture, a.brief().points().get(j)), live[j]);
            close(mixture.volumeMl(), sheet.number(sheet.cells(Names.VOLUME_ML).get(0)));
        }
    }

    /** Where crowding is frozen: Σ m κ/V with the plan's κ exactly, and the whole model within a few parts in ten thousand. */
    @Test
    void asWeighedFollowsTheFrozenModelAndStaysNearTheWholeOne() {
        Answer a = Answers.gelatin();
        SplittableRandom random = new SplittableRandom(11);
        for (int round = 0; round < 10; round++) {
            Filled sheet = Filled.of(a);
            Recipe made = weighed(a.recipe(), sheet, random, 0.01);
            double[] live = sheet.asMade();
            for (int j = 0; j < live.length; j++) {
                Point p = a.brief().points().get(j);
                close(frozen(a.mixture(), made.massesG(), p), live[j]);
                assertEquals(value(Mixture.of(made), p), live[j], 1e-3 * live[j]);
            }
        }
    }

    @Test
    void anEmptyCellCountsAsPlannedAndAFilledOneAsWeighed() {
        Answer a = Answers.gelatin();
        Filled sheet = Filled.of(a);
        int emulsion = index(a.recipe(), "lipid-emulsion-20");
        double planned = sheet.asMade()[1];
        sheet.weigh(emulsion, a.recipe().items().get(2).massG() * 1.10);
        double made = sheet.asMade()[1];
        // ten per cent more emulsion, nearly all of the scattering, in 0.4 % more volume
        assertEquals(1.0955, made / planned, 0.002);
    }

    @ParameterizedTest
    @MethodSource("answers")
    void noFormulaFailsWhateverIsTyped(Answer a) {
        Filled sheet = Filled.of(a);
        sheet.type(0, "12,34");
        sheet.type(1, "12.3 g");
        sheet.weigh(2, 0);
        noErrors(sheet);
        for (int n = 0; n < Weighing.of(a.recipe()).size(); n++) sheet.weigh(n, -1);
        noErrors(sheet);
        close(a.mixture().volumeMl(), sheet.number(sheet.cells(Names.VOLUME_ML).get(0)));
    }

    @Test
    void wordsSayWhetherAWeighingIsInside() {
        Answer a = Answers.gelatin();
        Filled sheet = Filled.of(a);
        Cell cell = sheet.weighed().get(4);
        double low = Filled.beside(cell, FillInPlan.LOW).getNumericCellValue();
        double high = Filled.beside(cell, FillInPlan.HIGH).getNumericCellValue();
        Cell word = Filled.beside(cell, FillInPlan.WORD);
        assertEquals("", sheet.word(word));
        Map<Double, String> words = new LinkedHashMap<>();
        words.put(low, "inside");
        words.put(high, "inside");
        words.put(low - 0.001, "OUTSIDE, too little");
        words.put(high + 0.001, "OUTSIDE, too much");
        words.put(-1.0, "not a mass");
        words.forEach((grams, expected) -> {
            sheet.weigh(4, grams);
            assertEquals(expected, sheet.word(word), grams + " g");
        });
        sheet.type(4, "10,2");
        assertEquals("not a number", sheet.word(word));
    }

    @Test
    void targetsTurnOutsideWithTheGrams() {
        Answer a = Answers.gelatin();
        Filled sheet = Filled.of(a);
        Cell verdict = sheet.workbook.getSheet("Fill in").getRow(4).getCell(0);
        assertEquals("With the grams so far every target lands inside its tolerance.", sheet.word(verdict));
        for (Cell c : sheet.cells(Names.LANDED)) assertEquals("inside", sheet.word(c));
        sheet.weigh(
                index(a.recipe(), "lipid-emulsion-20"),
                a.recipe().items().get(2).massG() * 1.2);
        long outside = sheet.cells(Names.LANDED).stream()
                .filter(c -> sheet.word(c).equals("OUTSIDE"))
                .count();
        assertTrue(outside >= 4, "20 % more emulsion leaves every tolerance of µs'");
        assertEquals("With the grams so far " + outside + " of 8 targets land OUTSIDE.", sheet.word(verdict));
        for (Cell c : sheet.cells(Names.LANDED)) {
            double miss = sheet.number(Filled.beside(c, FillInPlan.LOT));
            assertEquals(Math.abs(miss) <= 1 ? "inside" : "OUTSIDE", sheet.word(c));
            assertEquals(LandingGauge.text(miss), sheet.word(Filled.beside(c, FillInPlan.NOTE)));
        }
    }

    private static void noErrors(Filled sheet) {
        for (Cell c : sheet.formulas())
            assertNotEquals(
                    CellType.ERROR, sheet.value(c).getCellType(), () -> Filled.where(c) + ": " + c.getCellFormula());
    }

    /** Fills in every second weighing with grams off by up to {@code spread} and returns what was made. */
    private static Recipe weighed(Recipe plan, Filled sheet, SplittableRandom random, double spread) {
        List<Double> grams = new ArrayList<>();
        List<Weighing> weighings = Weighing.of(plan);
        for (int n = 0; n < weighings.size(); n++) {
            double g = weighings.get(n).massG();
            if (random.nextBoolean()) {
                g *= 1 + spread * (2 * random.nextDouble() - 1);
                sheet.weigh(n, g);
            }
            grams.add(g);
        }
        List<Stock> stocks = new ArrayList<>();
        for (int k = 0; k < plan.stocks().size(); k++) {
            Stock s = plan.stocks().get(k);
            stocks.add(new Stock(
                    s.id(), s.ingredient(), s.lot(), grams.get(2 * k), s.diluent(), grams.get(2 * k + 1), s.from()));
        }
        List<Item> items = new ArrayList<>();
        for (int k = 0; k < plan.items().size(); k++) {
            Item i = plan.items().get(k);
            items.add(new Item(i.ingredient(), i.stock(), i.lot(), grams.get(2 * stocks.size() + k)));
        }
        return new Recipe(plan.title(), plan.base(), plan.temperatureC(), 0, Optional.empty(), stocks, items);
    }

    private static double value(Mixture mixture, Point p) {
        Coefficients at = mixture.at(p.wavelengthNm());
        return p.quantity() == Point.Quantity.MUA ? at.muaPerCm() : at.muspPerCm();
    }

    private static double frozen(Mixture plan, Map<Ingredient, Double> massesG, Point p) {
        double sum = 0;
        double volume = 0;
        for (Coefficients.Share share : plan.at(p.wavelengthNm()).shares()) {
            double mu = p.quantity() == Point.Quantity.MUA ? share.muaPerCm() : share.muspPerCm();
            double m = massesG.get(share.ingredient());
            sum += m * mu / plan.concentrationGPerMl(share.ingredient());
            volume += m / share.ingredient().densityGPerMl();
        }
        return sum / volume;
    }

    private static int index(Recipe recipe, String label) {
        List<Weighing> all = Weighing.of(recipe);
        for (int n = 0; n < all.size(); n++)
            if (all.get(n).role() == Weighing.Role.ITEM && all.get(n).label().equals(label)) return n;
        throw new AssertionError(label);
    }

    private static void close(double expected, double actual) {
        assertEquals(expected, actual, RELATIVE * Math.max(1e-9, Math.abs(expected)));
    }
}
