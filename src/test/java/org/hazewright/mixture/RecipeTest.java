package org.hazewright.mixture;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Ingredient;
import org.junit.jupiter.api.Test;

/** Stocks resolved into grams, and recipes that cannot be made. */
class RecipeTest {
    static final Ingredient WATER = DemoIngredients.water(0.01);
    static final Ingredient INK = DemoIngredients.ink(0.05);
    static final Ingredient EMULSION = DemoIngredients.emulsion(0.03);

    /** 1 g of ink in 99 g of water, then 5 g of that in 45 g of water: 1 in 1000. */
    static final Stock FIRST = new Stock("ink-1-100", INK, Optional.empty(), 1, WATER, 99, Optional.empty());

    static final Stock SECOND = new Stock("ink-1-1000", INK, Optional.empty(), 5, WATER, 45, Optional.of("ink-1-100"));

    static Recipe recipe(List<Stock> stocks, Item... items) {
        return new Recipe("demo", WATER, 22, 0.001, Optional.empty(), stocks, List.of(items));
    }

    static Recipe dosed() {
        return recipe(List.of(FIRST, SECOND), Item.neat(EMULSION, 25), Item.ofStock(SECOND, 7), Item.neat(WATER, 468));
    }

    @Test
    void aStockOfAStockHoldsWhatItShould() {
        Recipe r = dosed();
        assertEquals(100, FIRST.ratio(), 1e-12);
        assertEquals(10, SECOND.ratio(), 1e-12);
        Map<Ingredient, Double> content = r.contentPerG("ink-1-1000");
        assertEquals(0.001, content.get(INK), 1e-15);
        assertEquals(0.999, content.get(WATER), 1e-15);
        assertEquals(
                1, content.values().stream().mapToDouble(Double::doubleValue).sum(), 1e-15);
        Map<Ingredient, Double> masses = r.massesG();
        assertEquals(0.007, masses.get(INK), 1e-15);
        assertEquals(468 + 6.993, masses.get(WATER), 1e-12);
        assertEquals(25, masses.get(EMULSION), 1e-15);
        assertEquals(
                500, masses.values().stream().mapToDouble(Double::doubleValue).sum(), 1e-12);
    }

    @Test
    void scaledPredictsTheSame() {
        Recipe r = dosed();
        Recipe twice = r.scaled(2);
        assertEquals(2 * r.stocks().get(1).totalG(), twice.stocks().get(1).totalG(), 1e-12);
        for (double nm : new double[] {690, 760, 830}) {
            Coefficients a = Mixture.of(r).at(nm);
            Coefficients b = Mixture.of(twice).at(nm);
            assertEquals(a.muaPerCm(), b.muaPerCm(), 1e-14);
            assertEquals(a.muspPerCm(), b.muspPerCm(), 1e-12);
        }
        assertEquals(2 * Mixture.of(r).volumeMl(), Mixture.of(twice).volumeMl(), 1e-9);
        assertThrows(Refusal.class, () -> r.scaled(0));
    }

    @Test
    void recipesThatCannotBeMadeAreRefused() {
        assertThrows(Refusal.class, () -> recipe(List.of()));
        assertThrows(Refusal.class, () -> recipe(List.of(), Item.neat(WATER, 0)));
        assertThrows(Refusal.class, () -> Item.neat(WATER, -1));
        assertThrows(Refusal.class, () -> recipe(List.of(FIRST, FIRST), Item.neat(WATER, 1)));
        Refusal unmade = assertThrows(Refusal.class, () -> recipe(List.of(FIRST), Item.ofStock(SECOND, 1)));
        assertTrue(unmade.getMessage().contains("it makes ink-1-100"), unmade.getMessage());
        assertThrows(Refusal.class, () -> recipe(List.of(SECOND, FIRST), Item.neat(WATER, 1)));
        assertThrows(Refusal.class, () -> dosed().stock("ink-1-10"));
        assertThrows(Refusal.class, () -> new Stock("s", INK, Optional.empty(), 0, WATER, 1, Optional.empty()));
    }
}
