package org.hazewright.bench;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Brief;
import org.hazewright.brief.SearchLimits;
import org.hazewright.brief.Target;
import org.hazewright.files.ShelfReader;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Recipe;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Shelf;
import org.hazewright.shelf.Uncertainty;
import org.junit.jupiter.api.Test;

class BetterKnownTest {
    private static final Shelf SHELF = ShelfReader.readShipped();
    private static final Ingredient WATER = SHELF.require("water");

    private static Recipe recipe(Ingredient emulsion, Ingredient ink, double u) {
        return new Recipe(
                "bath",
                WATER,
                22,
                u,
                Optional.empty(),
                List.of(),
                List.of(Item.neat(WATER, 950), Item.neat(emulsion, 50), Item.neat(ink, 0.05)));
    }

    private static Ingredient known(String id, double absorption, double scattering) {
        return SHELF.require(id).withUncertainty(new Uncertainty(absorption, scattering));
    }

    /** A brief that wants what the recipe gives, so that only doubt can miss it. */
    private static Brief brief(Recipe recipe, double share, double u) {
        var at = org.hazewright.mixture.Mixture.of(recipe).at(800);
        Target target = new Target(
                800,
                OptionalDouble.of(at.muaPerCm()),
                OptionalDouble.of(at.muspPerCm()),
                share * at.muaPerCm(),
                share * at.muspPerCm(),
                1);
        return new Brief(
                "bath",
                "Bath",
                List.of("water"),
                1000,
                0,
                22,
                List.of(target),
                List.of(),
                SearchLimits.USUAL,
                new Balance(0.0001, u, 0.001, 5000),
                Optional.empty(),
                Optional.empty());
    }

    /**
     * With one figure known to a tolerance's half-width and all else far better, the chance is that of a normal deviate within one
     * standard deviation, 68.3 %, and within two when it is halved, 95.4 % (tables of the normal distribution).
     */
    @Test
    void halvingTheOneFigureThatMatters() {
        Recipe recipe = recipe(known("lipid-emulsion-20", 0, 0.05), known("ink-demo", 0.001, 0), 1e-6);
        BetterKnown better =
                BetterKnown.of(brief(recipe, 0.05, 1e-6), recipe, 40_000).orElseThrow();
        assertEquals("the scattering of lipid-emulsion-20", better.what());
        assertEquals(0.683, better.chance(), 0.012, "0.23 % is the standard error; host and densities add a little");
        assertEquals(0.954, better.then(), 0.008);
    }

    @Test
    void theBalanceCanBeTheFigure() {
        Recipe recipe = recipe(known("lipid-emulsion-20", 0, 0.001), known("ink-demo", 0.001, 0), 0.003);
        BetterKnown better =
                BetterKnown.of(brief(recipe, 0.05, 0.003), recipe, 20_000).orElseThrow();
        assertEquals("the balance's load", better.what());
        assertTrue(better.then() > better.chance() + 0.05, better.toString());
    }

    @Test
    void nothingToLearnWhereItLandsAnyway() {
        Recipe recipe = recipe(known("lipid-emulsion-20", 0, 0.005), known("ink-demo", 0.005, 0), 1e-6);
        assertEquals(Optional.empty(), BetterKnown.of(brief(recipe, 0.2, 1e-6), recipe, 5_000));
    }
}
