package org.hazewright.mixture;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Map;
import java.util.Optional;
import org.hazewright.optics.ConstantIndex;
import org.hazewright.optics.Crowding;
import org.hazewright.optics.Index;
import org.hazewright.optics.ParticleOptics;
import org.hazewright.optics.Population;
import org.hazewright.optics.SizeDistribution;
import org.hazewright.optics.Spectrum;
import org.hazewright.shelf.Absorption;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Material;
import org.hazewright.shelf.Part;
import org.hazewright.shelf.Scattering;
import org.hazewright.shelf.Source;
import org.hazewright.shelf.Uncertainty;
import org.junit.jupiter.api.Test;

/** What one gram in a millilitre adds, worked out by hand for every way in which an ingredient may be described. */
class MassSpecificTest {
    private static final Source INVENTED = new Source(Source.Basis.INVENTED, "");
    private static final Material GLASSY =
            new Material("glassy", "glassy", new ConstantIndex("glassy", 1.59, 0.001, 300, 1300), INVENTED);

    private static Ingredient of(
            double densityGPerMl, Optional<Absorption> absorption, Optional<Scattering> scattering) {
        return DemoIngredients.of(
                "demo",
                Part.SCATTERER,
                densityGPerMl,
                new Uncertainty(0, 0),
                absorption,
                scattering,
                DemoIngredients.water(0).index());
    }

    private static Spectrum flat(double value) {
        return new Spectrum("flat", new double[] {500, 900}, new double[] {value, value});
    }

    /** Extinction 12 /cm of 0.8 g/mL is 15 cm²/g; a quarter of it scattered with g = 0.6: 11.25 absorbed, 3.75 µs, 1.5 µs'. */
    @Test
    void anExtinctionTable() {
        MassSpecific k = MassSpecific.of(
                of(0.8, Optional.of(Absorption.neat(flat(12), 0.8, 0.25, 0.6)), Optional.empty()), 700, 22, 1.33, 0);
        assertEquals(11.25, k.kappaA(), 1e-12);
        assertEquals(3.75, k.kappaMus(), 1e-12);
        assertEquals(1.5, k.kappaMusp(), 1e-12);
    }

    /** µs' 30 cm²/g at 600 nm falling as 1/λ is 25 at 720 nm; g = 0.75 makes µs four times that; the magnitude doubles both. */
    @Test
    void aPowerLaw() {
        Scattering law = new Scattering.PowerLaw(30, 600, 1, 0.75, 500, 900, 2);
        MassSpecific k = MassSpecific.of(of(1.1, Optional.empty(), Optional.of(law)), 720, 22, 1.33, 0);
        assertEquals(0, k.kappaA());
        assertEquals(50, k.kappaMusp(), 1e-12);
        assertEquals(200, k.kappaMus(), 1e-12);
    }

    /** Tables of µs' 40 /cm of 1.25 g/mL: 32 cm²/g; with g = 0.9 µs is 320, without a table of g it is µs'. */
    @Test
    void tables() {
        for (boolean known : new boolean[] {true, false}) {
            Scattering table =
                    new Scattering.Tabulated(flat(40), 1 / 1.25, known ? Optional.of(flat(0.9)) : Optional.empty(), 1);
            MassSpecific k = MassSpecific.of(of(1.25, Optional.empty(), Optional.of(table)), 700, 22, 1.33, 0);
            assertEquals(32, k.kappaMusp(), 1e-12);
            assertEquals(known ? 320 : 32, k.kappaMus(), 1e-10);
        }
    }

    /** Both descriptions at once add up. */
    @Test
    void anExtinctionTableAndALaw() {
        Optional<Absorption> absorption = Optional.of(Absorption.massSpecific(flat(10), 0.2, 0.5));
        Optional<Scattering> law = Optional.of(new Scattering.PowerLaw(30, 700, 1, 0.7, 500, 900, 1));
        MassSpecific both = MassSpecific.of(of(1, absorption, law), 700, 22, 1.33, 0);
        assertEquals(8, both.kappaA(), 1e-12);
        assertEquals(2 + 100, both.kappaMus(), 1e-10);
        assertEquals(1 + 30, both.kappaMusp(), 1e-12);
    }

    /** κ = f/ρ of what a unit volume fraction adds; the magnitude belongs to scattering alone. */
    @Test
    void mieParticles() {
        double nm = 650;
        ParticleOptics perVolume = new Population(new SizeDistribution.Single(500))
                .perVolumeFraction(new Index(1.59, 0.001), 1.33, nm, 0, new Crowding.None());
        for (double magnitude : new double[] {1, 1.5}) {
            Scattering mie = new Scattering.MieParticles(
                    GLASSY, 0.1, new SizeDistribution.Single(500), new Crowding.PercusYevick(), magnitude);
            Ingredient i = of(1.05, Optional.of(Absorption.massSpecific(flat(0.5), 0, 0)), Optional.of(mie));
            MassSpecific k = MassSpecific.of(i, nm, 22, 1.33, 0);
            assertEquals(0.5 + 0.1 / 1.05 * perVolume.muaPerCm(), k.kappaA(), 1e-9 * k.kappaA());
            assertEquals(magnitude * 0.1 / 1.05 * perVolume.musPerCm(), k.kappaMus(), 1e-12 * k.kappaMus());
            assertEquals(magnitude * 0.1 / 1.05 * perVolume.muspPerCm(), k.kappaMusp(), 1e-12 * k.kappaMusp());
            MassSpecific crowded = MassSpecific.of(i, nm, 22, 1.33, 0.2);
            assertTrue(crowded.kappaMusp() < 0.95 * k.kappaMusp(), "Percus–Yevick spheres at 0.2 scatter less");
            assertEquals(k.kappaA(), crowded.kappaA(), 1e-12, "and absorb as much");
        }
        assertEquals(0.1, MassSpecific.particleShare(DemoIngredients.beads()));
        assertEquals(0, MassSpecific.particleShare(DemoIngredients.emulsion(0)));
        assertEquals(0, MassSpecific.particleShare(DemoIngredients.water(0)));
    }

    /** Who feels whom: Percus–Yevick particles all of their kind, a polynomial its own, others nobody. */
    @Test
    void crowdFractions() {
        Ingredient hard = DemoIngredients.beads();
        Ingredient hardToo = crowd("hard-too", new Crowding.PercusYevick());
        Ingredient alone = crowd("alone", new Crowding.Polynomial(new double[] {-0.5}, 0.5));
        Ingredient none = crowd("none", new Crowding.None());
        Ingredient water = DemoIngredients.water(0);
        Mixture m = new Mixture(Map.of(hard, 102.0, hardToo, 50.0, alone, 60.0, none, 70.0, water, 718.56), 22);
        double volume = 100 + 50 + 60 + 70 + 720;
        assertEquals(volume, m.volumeMl(), 1e-9);
        assertEquals((0.1 * 100 + 0.3 * 50) / volume, m.crowdFraction(hard), 1e-15);
        assertEquals(m.crowdFraction(hard), m.crowdFraction(hardToo));
        assertEquals(0.3 * 60 / volume, m.crowdFraction(alone), 1e-15);
        assertEquals(0, m.crowdFraction(none));
        assertEquals(0, m.crowdFraction(water));
        assertEquals(22, m.temperatureC());
    }

    private static Ingredient crowd(String id, Crowding crowding) {
        Scattering mie = new Scattering.MieParticles(GLASSY, 0.3, new SizeDistribution.Single(300), crowding, 1);
        return DemoIngredients.of(
                id, Part.SCATTERER, 1, new Uncertainty(0, 0), Optional.empty(), Optional.of(mie), Optional.empty());
    }

    /**
     * The host is what has an index and is not a particle, by volume, the boundary all of it: (n² − 1)/(n² + 2) adds (Lorentz, Lorenz; the
     * formula's right side is worked out here).
     */
    @Test
    void hostAndBoundaryIndex() {
        Ingredient beads = DemoIngredients.beads(); // 0.10 of oil 1.47 in water 1.33
        Ingredient powder = crowd("powder", new Crowding.None()); // 0.3 of 1.59, the rest without an index
        Ingredient sugar = DemoIngredients.of(
                "sugar",
                Part.MODIFIER,
                1.6,
                new Uncertainty(0, 0),
                Optional.empty(),
                Optional.empty(),
                Optional.of(new Material("sugar", "sugar", new ConstantIndex("sugar", 1.55, 0, 300, 1300), INVENTED)));
        Mixture m = new Mixture(Map.of(beads, 102.0, powder, 40.0, sugar, 320.0, DemoIngredients.water(0), 499.0), 22);
        double[] host = {90 + 500, 200};
        assertEquals(
                mixed(new double[] {1.33, 1.55}, host),
                m.hostIndex(700),
                1e-12,
                "90 mL around the beads, 500 of water");
        double[] all = {90 + 500, 200, 10, 12};
        assertEquals(
                mixed(new double[] {1.33, 1.55, 1.47, 1.59}, all), m.at(700).boundaryIndex(), 1e-12);
    }

    private static double mixed(double[] n, double[] volume) {
        double sum = 0;
        double total = 0;
        for (int k = 0; k < n.length; k++) {
            sum += volume[k] * (n[k] * n[k] - 1) / (n[k] * n[k] + 2);
            total += volume[k];
        }
        double l = sum / total;
        return Math.sqrt((1 + 2 * l) / (1 - l));
    }
}
