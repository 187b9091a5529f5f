package org.hazewright.mixture;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Random;
import org.hazewright.optics.Refusal;
import org.hazewright.optics.Spectrum;
import org.hazewright.shelf.Absorption;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Part;
import org.hazewright.shelf.Scattering;
import org.hazewright.shelf.Uncertainty;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** What must hold of any mixture: volumes add, shares sum, twice as much is the same phantom. */
class MixtureTest {
    private static final Ingredient WATER = DemoIngredients.water(0.01);
    private static final Ingredient INK = DemoIngredients.ink(0.05);
    private static final Ingredient EMULSION = DemoIngredients.emulsion(0.03);
    private static final Ingredient BEADS = DemoIngredients.beads();
    private static final double[] NM = {680, 730, 780, 840};

    private static Map<Ingredient, Double> random(long seed) {
        Random r = new Random(seed);
        Map<Ingredient, Double> masses = new LinkedHashMap<>();
        masses.put(INK, 0.02 * r.nextDouble());
        masses.put(EMULSION, 60 * r.nextDouble());
        masses.put(BEADS, 80 * r.nextDouble());
        masses.put(WATER, 500 + 500 * r.nextDouble());
        return masses;
    }

    @ParameterizedTest
    @ValueSource(longs = {1, 2, 3, 4, 5})
    void volumesAddAndSharesSum(long seed) {
        Map<Ingredient, Double> masses = random(seed);
        Mixture m = new Mixture(masses, 22);
        double volume = 0;
        double mass = 0;
        for (var e : masses.entrySet()) {
            volume += e.getValue() / e.getKey().densityGPerMl();
            mass += e.getValue();
            assertEquals(e.getValue(), m.concentrationGPerMl(e.getKey()) * m.volumeMl(), 1e-9);
        }
        assertEquals(volume, m.volumeMl(), 1e-9);
        assertEquals(mass / volume, m.densityGPerMl(), 1e-12);
        for (double nm : NM) {
            Coefficients c = m.at(nm);
            assertEquals(
                    c.muaPerCm(),
                    c.shares().stream()
                            .mapToDouble(Coefficients.Share::muaPerCm)
                            .sum(),
                    1e-14);
            assertEquals(
                    c.musPerCm(),
                    c.shares().stream()
                            .mapToDouble(Coefficients.Share::musPerCm)
                            .sum(),
                    1e-11);
            assertEquals(
                    c.muspPerCm(),
                    c.shares().stream()
                            .mapToDouble(Coefficients.Share::muspPerCm)
                            .sum(),
                    1e-12);
            assertEquals(
                    List.copyOf(masses.keySet()),
                    c.shares().stream().map(Coefficients.Share::ingredient).toList());
            assertTrue(c.g() > 0 && c.g() < 1);
            assertTrue(
                    c.boundaryIndex() > c.hostIndex(),
                    "oil particles raise what a surface sees, not what surrounds them");
        }
    }

    @ParameterizedTest
    @ValueSource(longs = {6, 7, 8})
    void twiceAsMuchIsTheSamePhantom(long seed) {
        Map<Ingredient, Double> once = random(seed);
        Map<Ingredient, Double> twice = new LinkedHashMap<>();
        once.forEach((i, g) -> twice.put(i, 2 * g));
        for (double nm : NM) {
            Coefficients a = new Mixture(once, 22).at(nm);
            Coefficients b = new Mixture(twice, 22).at(nm);
            assertEquals(a.muaPerCm(), b.muaPerCm(), 1e-13);
            assertEquals(a.musPerCm(), b.musPerCm(), 1e-10);
            assertEquals(a.muspPerCm(), b.muspPerCm(), 1e-11);
            assertEquals(a.hostIndex(), b.hostIndex(), 1e-14);
            assertEquals(a.boundaryIndex(), b.boundaryIndex(), 1e-14);
        }
    }

    /** The order in which things are named changes nothing beyond the last digit. */
    @Test
    void orderDoesNotMatter() {
        Map<Ingredient, Double> forth = random(9);
        Map<Ingredient, Double> back = new LinkedHashMap<>();
        List<Ingredient> keys = new java.util.ArrayList<>(forth.keySet());
        java.util.Collections.reverse(keys);
        keys.forEach(k -> back.put(k, forth.get(k)));
        for (double nm : NM) {
            assertEquals(
                    new Mixture(forth, 22).at(nm).muaPerCm(),
                    new Mixture(back, 22).at(nm).muaPerCm(),
                    1e-14);
            assertEquals(
                    new Mixture(forth, 22).at(nm).muspPerCm(),
                    new Mixture(back, 22).at(nm).muspPerCm(),
                    1e-12);
        }
    }

    /** Dilution: with twice the volume and the same particles every coefficient halves, crowding and host index apart. */
    @Test
    void dilutionHalves() {
        Ingredient clear = clear();
        Map<Ingredient, Double> masses = new LinkedHashMap<>();
        masses.put(INK, 0.01);
        masses.put(EMULSION, 40.0);
        masses.put(clear, 460.0);
        Mixture once = new Mixture(masses, 22);
        masses.put(clear, 460 + once.volumeMl() * clear.densityGPerMl());
        Mixture diluted = new Mixture(masses, 22);
        assertEquals(2 * once.volumeMl(), diluted.volumeMl(), 1e-9);
        for (double nm : NM) {
            assertEquals(once.at(nm).muaPerCm() / 2, diluted.at(nm).muaPerCm(), 1e-14);
            assertEquals(once.at(nm).muspPerCm() / 2, diluted.at(nm).muspPerCm(), 1e-12);
        }
    }

    @Test
    void crowdedParticlesScatterLess() {
        Mixture few = new Mixture(Map.of(BEADS, 1.0, WATER, 999.0), 22);
        Mixture many = new Mixture(Map.of(BEADS, 500.0, WATER, 500.0), 22);
        double fewPerG = few.at(700).muspPerCm() / few.concentrationGPerMl(BEADS);
        double manyPerG = many.at(700).muspPerCm() / many.concentrationGPerMl(BEADS);
        assertTrue(manyPerG < 0.97 * fewPerG, manyPerG + " of " + fewPerG);
        double phi = 0.10 * (500 / 1.02) / many.volumeMl();
        assertEquals(phi, many.crowdFraction(BEADS), 1e-12);
    }

    @Test
    void nothingAndBlendsAreRefused() {
        assertThrows(Refusal.class, () -> new Mixture(Map.of(WATER, 0.0), 22));
        assertThrows(Refusal.class, () -> new Mixture(Map.of(WATER, -1.0), 22));
        assertThrows(Refusal.class, () -> new Mixture(Map.of(WATER, 1.0), 140));
        Mixture m = new Mixture(Map.of(WATER, 1.0), 22);
        Refusal outside = assertThrows(Refusal.class, () -> m.at(1000));
        assertTrue(outside.getMessage().contains("600 to 900"), outside.getMessage());
    }

    /** Bathes particles and has no colour of its own. */
    private static Ingredient clear() {
        return DemoIngredients.of(
                "clear-demo", Part.BASE, 1.0, new Uncertainty(0, 0), Optional.empty(), Optional.empty(), WATER.index());
    }

    /**
     * A published ink and emulsion weighed out by hand, 1000 g at 780 nm, densities taken as 1: µs' 200.6 /cm of neat emulsion (Di Ninni et
     * al., Phys. Med. Biol. 56, N21, 2011, between its wavelengths), ink extinction 6182.6 /cm of albedo 0.15 and a bath of 0.0263 /cm
     * (Sudakou et al., Biomed. Opt. Express 14, 3506, 2023). Fraction 0.04985 of emulsion gives µs' 10.0; 14.02 mg of ink give µa 0.100.
     */
    @Test
    void aPhantomByHand() {
        Ingredient ink = DemoIngredients.of(
                "ink-demo",
                Part.ABSORBER,
                1,
                new Uncertainty(0, 0),
                Optional.of(Absorption.neat(DemoIngredients.publishedInk(), 1, 0.15, 1)),
                Optional.empty(),
                Optional.empty());
        Spectrum musp = new Spectrum("musp", new double[] {700, 780, 850}, new double[] {230, 200.6, 180});
        Ingredient emulsion = DemoIngredients.of(
                "emulsion-demo",
                Part.SCATTERER,
                1,
                new Uncertainty(0, 0),
                Optional.empty(),
                Optional.of(new Scattering.Tabulated(musp, 1, Optional.empty(), 1)),
                Optional.empty());
        Spectrum bathMua = new Spectrum("bath", new double[] {700, 850}, new double[] {0.0263, 0.0263});
        Ingredient bath = DemoIngredients.of(
                "bath-demo",
                Part.BASE,
                1,
                new Uncertainty(0, 0),
                Optional.of(Absorption.neat(bathMua, 1, 0, 0)),
                Optional.empty(),
                WATER.index());
        Ingredient clear = clear();
        Mixture m = new Mixture(Map.of(ink, 0.01402, emulsion, 49.85, clear, 950.13598), 22);
        assertEquals(10.0, m.at(780).muspPerCm(), 0.005);
        assertEquals(0.100 - 0.0263, m.at(780).muaPerCm(), 5e-5);
        Mixture bathed = new Mixture(Map.of(ink, 0.01402, bath, 999.98598), 22);
        assertEquals(0.100, bathed.at(780).muaPerCm(), 5e-5);
    }
}
