package org.hazewright.mixture;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Optional;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Part;
import org.hazewright.shelf.Scattering;
import org.hazewright.shelf.Uncertainty;
import org.junit.jupiter.api.Test;

/** First-order uncertainty against derivatives taken by hand. */
class BudgetTest {
    private static final double[] NM = {690, 780};
    private static final double CAPACITY_G = 600;

    private static Cause cause(Budget b, String name) {
        return b.causes().stream()
                .filter(c -> c.name().equals(name))
                .findFirst()
                .orElseThrow(() -> new AssertionError(name + " is not among "
                        + b.causes().stream().map(Cause::name).toList()));
    }

    @Test
    void ingredientsCountTheirShareTimesTheirUncertainty() {
        Recipe r = RecipeTest.dosed();
        Budget b = Budget.of(r, NM, CAPACITY_G);
        Mixture m = Mixture.of(r);
        for (int j = 0; j < NM.length; j++) {
            Coefficients at = m.at(NM[j]);
            for (Coefficients.Share s : at.shares()) {
                Ingredient i = s.ingredient();
                if (s.muaPerCm() > 0)
                    assertEquals(
                            s.muaPerCm() * i.uncertainty().absorption(),
                            cause(b, i.id() + " absorption").muaPerCm()[j],
                            1e-13);
                if (s.muspPerCm() > 0)
                    assertEquals(
                            s.muspPerCm() * i.uncertainty().scattering(),
                            cause(b, i.id() + " scattering").muspPerCm()[j],
                            1e-12);
            }
        }
    }

    /** ∂(κ m/V)/∂m = κ (1 − φ)/V for what is weighed, −κ_other m_other/(ρ V²) for the rest; u = 1 mg. */
    @Test
    void aWeighingThickensItsOwnAndThinsTheRest() {
        Ingredient water = RecipeTest.WATER;
        Ingredient emulsion = RecipeTest.EMULSION;
        Recipe r = DemoIngredients.recipe(0.001, Item.neat(emulsion, 25), Item.neat(water, 475));
        Mixture m = Mixture.of(r);
        Budget b = Budget.of(r, NM, CAPACITY_G);
        double v = m.volumeMl();
        for (int j = 0; j < NM.length; j++) {
            Coefficients at = m.at(NM[j]);
            Cause weighing = cause(b, "weighing emulsion-demo");
            double phi = 25 / 0.986 / v;
            assertEquals(at.muspPerCm() / 25 * (1 - phi) * 0.001, weighing.muspPerCm()[j], 1e-9);
            assertEquals(-at.muaPerCm() / (0.986 * v) * 0.001, weighing.muaPerCm()[j], 1e-10);
        }
    }

    /** A stock's substance counts a D/(S + D)² for an aliquot a, its diluent −a S/(S + D)²: one error for all of the aliquot. */
    @Test
    void aStocksErrorsReachTheVesselByItsDilution() {
        Recipe r = RecipeTest.recipe(
                List.of(RecipeTest.FIRST), Item.ofStock(RecipeTest.FIRST, 10), Item.neat(RecipeTest.WATER, 490));
        Mixture m = Mixture.of(r);
        Budget b = Budget.of(r, NM, CAPACITY_G);
        List<Cause> stock =
                b.causes().stream().filter(c -> c.kind() == Cause.Kind.STOCK).toList();
        assertEquals(2, stock.size());
        for (int j = 0; j < NM.length; j++) {
            Coefficients at = m.at(NM[j]);
            double ink = at.shares().stream()
                    .filter(s -> s.ingredient() == RecipeTest.INK)
                    .findFirst()
                    .orElseThrow()
                    .muaPerCm();
            // 0.1 g of ink in the vessel; 1 mg more in the stock is 1 mg · 10 · 99/100² = 0.99 mg·10/… of it: relative
            // 0.001 · 99/100.
            assertEquals(ink * 0.001 * 99 / 100, stock.get(0).muaPerCm()[j], 2e-6 * ink);
            assertEquals(-ink * 0.001 / 100, stock.get(1).muaPerCm()[j], 1e-8 * ink);
        }
    }

    @Test
    void causesAddInSquares() {
        Budget b = Budget.of(RecipeTest.dosed(), NM, CAPACITY_G);
        for (int j = 0; j < NM.length; j++) {
            double a = 0;
            double s = 0;
            for (Cause c : b.causes()) {
                a += c.muaPerCm()[j] * c.muaPerCm()[j];
                s += c.muspPerCm()[j] * c.muspPerCm()[j];
            }
            assertEquals(Math.sqrt(a), b.uMuaPerCm()[j], 1e-15);
            assertEquals(Math.sqrt(s), b.uMuspPerCm()[j], 1e-15);
        }
    }

    /** Correlated factors leave each quantity's own uncertainty as it is. */
    @Test
    void correlationTiesButDoesNotAdd() {
        for (double correlation : new double[] {-0.9, 0, 0.5, 1}) {
            Ingredient tied = DemoIngredients.of(
                    "tied-demo",
                    Part.ABSORBER,
                    1,
                    new Uncertainty(0.04, 0.06, correlation),
                    DemoIngredients.dye("x", 8, 2, 0).absorption(),
                    Optional.of(new Scattering.PowerLaw(10, 800, 1, 0.7, 400, 1100, 1)),
                    Optional.empty());
            Recipe r = DemoIngredients.recipe(0, Item.neat(tied, 30), Item.neat(DemoIngredients.water(0), 470));
            Budget b = Budget.of(r, NM, CAPACITY_G);
            Coefficients.Share share = Mixture.of(r).at(690).shares().get(0);
            double a = 0;
            double s = 0;
            double product = 0;
            for (Cause c : b.causes()) {
                if (c.kind() != Cause.Kind.ABSORPTION && c.kind() != Cause.Kind.SCATTERING) continue;
                a += c.muaPerCm()[0] * c.muaPerCm()[0];
                s += c.muspPerCm()[0] * c.muspPerCm()[0];
                product += c.muaPerCm()[0] * c.muspPerCm()[0];
            }
            assertEquals(0.04 * share.muaPerCm(), Math.sqrt(a), 1e-12);
            assertEquals(0.06 * share.muspPerCm(), Math.sqrt(s), 1e-12);
            assertEquals(correlation, product / Math.sqrt(a * s), 1e-12);
        }
    }

    /** A mass above the balance's capacity takes several loads, and its uncertainty grows as their root. */
    @Test
    void severalLoadsAddInSquares() {
        Recipe r = DemoIngredients.recipe(0.001, Item.neat(RecipeTest.EMULSION, 25), Item.neat(RecipeTest.WATER, 880));
        double one = cause(Budget.of(r, NM, 1000), "weighing water").muspPerCm()[0];
        double four = cause(Budget.of(r, NM, 220), "weighing water").muspPerCm()[0];
        assertEquals(2, four / one, 1e-6);
        assertTrue(one < 0);
    }
}
