package org.hazewright.mixture;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Optional;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Part;
import org.hazewright.shelf.Uncertainty;
import org.junit.jupiter.api.Test;

/** What densities, the finished volume and loads do to a prediction, by derivatives taken by hand. */
class DensityCausesTest {
    private static final double[] NM = {690, 780};

    private static Cause cause(Budget b, String name) {
        return b.causes().stream()
                .filter(c -> c.name().equals(name))
                .findFirst()
                .orElseThrow();
    }

    /** ∂µ/∂ρ_i · ρ_i = µ φ_i, times 0.1 %; the volume's −µ, times 0.1 %. */
    @Test
    void aDenserPartLeavesLessVolume() {
        Recipe r = RecipeTest.dosed();
        Mixture m = Mixture.of(r);
        Budget b = Budget.of(r, NM, 600);
        for (int j = 0; j < NM.length; j++) {
            Coefficients at = m.at(NM[j]);
            for (Ingredient i : List.of(RecipeTest.WATER, RecipeTest.EMULSION, RecipeTest.INK)) {
                double phi = m.concentrationGPerMl(i) / i.densityGPerMl();
                Cause density = cause(b, i.id() + " density");
                assertEquals(Cause.Kind.DENSITY, density.kind());
                assertEquals(at.muaPerCm() * phi * 0.001, density.muaPerCm()[j], 1e-12 * at.muaPerCm());
                assertEquals(at.muspPerCm() * phi * 0.001, density.muspPerCm()[j], 1e-12 * at.muspPerCm());
            }
            Cause volume = cause(b, "finished volume");
            assertEquals(-at.muaPerCm() * 0.001, volume.muaPerCm()[j], 1e-12 * at.muaPerCm());
            assertEquals(-at.muspPerCm() * 0.001, volume.muspPerCm()[j], 1e-12 * at.muspPerCm());
        }
    }

    /** A balance without error has no causes of weighing; and an ingredient has those that it can have. */
    @Test
    void onlyCausesThatAre() {
        Recipe r = DemoIngredients.recipe(0, Item.neat(RecipeTest.EMULSION, 25), Item.neat(RecipeTest.WATER, 475));
        List<String> names =
                Budget.of(r, NM, 600).causes().stream().map(Cause::name).toList();
        assertEquals(
                List.of(
                        "emulsion-demo scattering",
                        "water absorption",
                        "emulsion-demo density",
                        "water density",
                        "finished volume"),
                names);
    }

    /**
     * A load as uncertain as itself: the slope is taken over half of it downwards. Of m in M at equal densities µ ∝ m/(M + m), so the slope
     * from m/2 to 2 m is (2m/(M + 2m) − (m/2)/(M + m/2))/(1.5 m).
     */
    @Test
    void aLoadThatIsMostlyDoubt() {
        Ingredient dye = DemoIngredients.dye("dye", 100, 100, 0);
        Ingredient water = DemoIngredients.of(
                "clear",
                Part.BASE,
                1,
                new Uncertainty(0, 0),
                Optional.empty(),
                Optional.empty(),
                DemoIngredients.water(0).index());
        double m = 0.5;
        double rest = 9.5;
        Recipe r = DemoIngredients.recipe(0.5, Item.neat(dye, m), Item.neat(water, rest));
        Budget b = Budget.of(r, new double[] {700}, 600);
        double up = 2 * m / (rest + 2 * m);
        double down = m / 2 / (rest + m / 2);
        assertEquals(
                100 * (up - down) / (1.5 * m) * 0.5, cause(b, "weighing dye").muaPerCm()[0], 1e-12);
        // The big load is moved by its uncertainty both ways: µ ∝ m/(M ± 0.5 + m).
        double thin = m / (rest + 0.5 + m);
        double thick = m / (rest - 0.5 + m);
        assertEquals(
                100 * (thin - thick) / 1.0 * 0.5, cause(b, "weighing clear").muaPerCm()[0], 1e-12);
        assertTrue(b.uMuaPerCm()[0] > 4, "a dye of half a gram, give or take as much, is hardly known");
    }
}
