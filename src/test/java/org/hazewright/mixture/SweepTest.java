package org.hazewright.mixture;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Random;
import java.util.TreeMap;
import org.hazewright.optics.ConstantIndex;
import org.hazewright.optics.Crowding;
import org.hazewright.optics.Refusal;
import org.hazewright.optics.SizeDistribution;
import org.hazewright.optics.Spectrum;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Material;
import org.hazewright.shelf.Part;
import org.hazewright.shelf.Scattering;
import org.hazewright.shelf.Source;
import org.hazewright.shelf.Uncertainty;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** Coefficients per gram at many wavelengths give back what the mixture itself says, and that of its neighbours. */
class SweepTest {
    private static final Ingredient WATER = DemoIngredients.water(0.01);
    private static final Ingredient INK = DemoIngredients.ink(0.05);
    private static final Ingredient EMULSION = DemoIngredients.emulsion(0.03);
    private static final Ingredient BEADS = DemoIngredients.beads();
    private static final double[] NM = {680, 705.5, 760, 842};

    private static Map<Ingredient, Double> random(Random r, boolean beads) {
        Map<Ingredient, Double> masses = new LinkedHashMap<>();
        masses.put(INK, 0.001 + 0.02 * r.nextDouble());
        masses.put(EMULSION, 60 * r.nextDouble());
        if (beads) masses.put(BEADS, 80 * r.nextDouble());
        masses.put(WATER, 500 + 500 * r.nextDouble());
        return masses;
    }

    @ParameterizedTest
    @ValueSource(longs = {1, 2, 3})
    void theMixtureItself(long seed) {
        Map<Ingredient, Double> masses = random(new Random(seed), true);
        Mixture m = new Mixture(masses, 22);
        agrees(m, Sweep.of(m, NM), masses);
    }

    /** Without Mie particles nothing depends on the host, so a neighbour's coefficients are exact as well. */
    @ParameterizedTest
    @ValueSource(longs = {4, 5, 6})
    void aNeighbourThatHoldsTheSame(long seed) {
        Random r = new Random(seed);
        Sweep sweep = Sweep.of(new Mixture(random(r, false), 22), NM);
        Map<Ingredient, Double> other = random(r, false);
        agrees(new Mixture(other, 22), sweep, other);
    }

    private static void agrees(Mixture m, Sweep sweep, Map<Ingredient, Double> masses) {
        assertArrayEquals(NM, sweep.wavelengthsNm());
        for (int j = 0; j < NM.length; j++) {
            Coefficients at = m.at(NM[j]);
            assertEquals(at.muaPerCm(), sweep.muaPerCm(masses)[j], 1e-12 * at.muaPerCm());
            assertEquals(at.muspPerCm(), sweep.muspPerCm(masses)[j], 1e-12 * at.muspPerCm());
            for (Coefficients.Share s : at.shares()) {
                assertEquals(s.muaPerCm(), sweep.muaShare(s.ingredient(), masses)[j], 1e-12 * at.muaPerCm());
                assertEquals(s.muspPerCm(), sweep.muspShare(s.ingredient(), masses)[j], 1e-12 * at.muspPerCm());
            }
        }
    }

    @Test
    void whatIsNotInItIsRefusedOrNothing() {
        Map<Ingredient, Double> bath = Map.of(INK, 0.01, WATER, 500.0);
        Sweep sweep = Sweep.of(new Mixture(bath, 22), NM);
        assertTrue(sweep.covers(List.of(INK, WATER)) && sweep.covers(List.of()));
        assertFalse(sweep.covers(List.of(INK, EMULSION)));
        Refusal refusal = assertThrows(Refusal.class, () -> sweep.muaPerCm(Map.of(EMULSION, 1.0)));
        assertTrue(refusal.getMessage().contains("emulsion-demo"), refusal.getMessage());
        assertThrows(Refusal.class, () -> sweep.muspShare(EMULSION, bath));
        assertArrayEquals(new double[NM.length], sweep.muaShare(INK, Map.of(WATER, 500.0)), "no ink, no share of it");
    }

    /** What is given back is the caller's own. */
    @Test
    void wavelengthsAreCopied() {
        Sweep sweep = Sweep.of(new Mixture(Map.of(WATER, 500.0), 22), NM);
        sweep.wavelengthsNm()[0] = 1;
        assertArrayEquals(NM, sweep.wavelengthsNm());
    }

    /** Water's table ends at 600 and 900 nm, the ink's at 680 and 842.5, the emulsion's law at 400 and 1100. */
    @Test
    void gapsAreToldAndLeftOut() {
        Mixture m = new Mixture(Map.of(INK, 0.01, WATER, 500.0, EMULSION, 20.0), 22);
        Map<Double, String> gaps = new TreeMap<>();
        double[] asked = {350, 599, 680, 800, 842.5, 843, 950, 1150};
        Sweep sweep = Sweep.within(m, asked, gaps::put);
        assertArrayEquals(new double[] {680, 800, 842.5}, sweep.wavelengthsNm());
        assertEquals(List.of(350.0, 599.0, 843.0, 950.0, 1150.0), List.copyOf(gaps.keySet()));
        assertTrue(gaps.get(843.0).contains("ink extinction"), gaps.get(843.0));
        assertEquals(3, sweep.muaPerCm(m.massesG()).length);
    }

    /** Each kind of figure that an ingredient may have is asked for: its index, its particles' index, its law, its two tables. */
    @Test
    void everyKindOfFigureHasItsRange() {
        Source source = new Source(Source.Basis.INVENTED, "");
        Material narrow = new Material("narrow", "narrow", new ConstantIndex("narrow", 1.5, 0, 700, 720), source);
        Spectrum musp = new Spectrum("musp of 700 to 720", new double[] {700, 720}, new double[] {5, 4});
        Spectrum wide = new Spectrum("musp", new double[] {400, 1000}, new double[] {5, 4});
        Spectrum g = new Spectrum("g of 700 to 720", new double[] {700, 720}, new double[] {0.7, 0.7});
        List<Ingredient> kinds = List.of(
                kind(Optional.empty(), Optional.of(narrow)),
                kind(
                        Optional.of(new Scattering.MieParticles(
                                narrow, 1, new SizeDistribution.Single(300), new Crowding.None(), 1)),
                        WATER.index()),
                kind(Optional.of(new Scattering.PowerLaw(9, 700, 1, 0.7, 700, 720, 1)), WATER.index()),
                kind(Optional.of(new Scattering.Tabulated(musp, 1, Optional.empty(), 1)), WATER.index()),
                kind(Optional.of(new Scattering.Tabulated(wide, 1, Optional.of(g), 1)), WATER.index()));
        for (Ingredient i : kinds) {
            Mixture m = new Mixture(Map.of(i, 1.0, WATER, 99.0), 22);
            Map<Double, String> gaps = new TreeMap<>();
            assertArrayEquals(
                    new double[] {700, 720},
                    Sweep.within(m, new double[] {699, 700, 720, 721}, gaps::put)
                            .wavelengthsNm(),
                    i.toString());
            assertEquals(List.of(699.0, 721.0), List.copyOf(gaps.keySet()));
            assertThrows(Refusal.class, () -> m.requireFigures(721));
            m.requireFigures(710);
        }
    }

    private static Ingredient kind(Optional<Scattering> scattering, Optional<Material> index) {
        return DemoIngredients.of(
                "kind-demo", Part.SCATTERER, 1, new Uncertainty(0.01, 0.01), Optional.empty(), scattering, index);
    }

    /** A budget and draws on a sweep are those of the mixture. */
    @Test
    void budgetAndDrawsOfASweep() {
        Recipe r = RecipeTest.dosed();
        Sweep sweep = Sweep.of(Mixture.of(r), NM);
        Budget own = Budget.of(r, NM, 600);
        Budget of = Budget.of(r, sweep, 600);
        assertArrayEquals(NM, of.wavelengthsNm());
        assertArrayEquals(own.uMuaPerCm(), of.uMuaPerCm());
        assertArrayEquals(own.uMuspPerCm(), of.uMuspPerCm());
        assertNotEquals(0, of.uMuspPerCm()[0]);
        Draws one = Draws.of(r, NM, 600, 1000, 3);
        Draws other = Draws.of(r, sweep, 600, 1000, 3);
        for (int j = 0; j < NM.length; j++) assertEquals(one.mean(true, j), other.mean(true, j));
    }
}
