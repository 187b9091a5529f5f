package org.hazewright.learning;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertSame;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import org.hazewright.mixture.DemoIngredients;
import org.hazewright.mixture.MassSpecific;
import org.hazewright.optics.ConstantIndex;
import org.hazewright.optics.Crowding;
import org.hazewright.optics.Refusal;
import org.hazewright.optics.SizeDistribution;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Lot;
import org.hazewright.shelf.Material;
import org.hazewright.shelf.Part;
import org.hazewright.shelf.Scattering;
import org.hazewright.shelf.Source;
import org.hazewright.shelf.Uncertainty;
import org.junit.jupiter.api.Test;

/** A lot's figures do in a mixture what the measurement said they do. */
class NewLotTest {
    private static final Source MEASURED =
            new Source(Source.Basis.MEASURED, "dilution series of 2026-03-02, demo bench");
    private static final NewLot LOT = new NewLot(
            "ink-demo-l07", new Lot("ink-demo", "L07", Optional.empty(), Optional.empty(), Optional.empty()), MEASURED);

    private static Factors factors(Ingredient i, double absorption, double scattering) {
        return new Factors(
                List.of(Factor.of(i, Quantity.ABSORPTION), Factor.of(i, Quantity.SCATTERING)),
                new double[] {absorption, scattering},
                new double[][] {{0.0004, 0.0001}, {0.0001, 0.0009}});
    }

    @Test
    void bothSharesOfAnExtinctionAreMultipliedByTheirOwnFactor() {
        Ingredient ink = DemoIngredients.ink(0.05);
        Ingredient lot = LOT.learned(ink, factors(ink, 1.1, 0.8));
        for (double nm : new double[] {680, 755, 842}) {
            MassSpecific before = MassSpecific.of(ink, nm, 22, 1.33, 0);
            MassSpecific after = MassSpecific.of(lot, nm, 22, 1.33, 0);
            assertEquals(1.1 * before.kappaA(), after.kappaA(), 1e-12 * after.kappaA());
            assertEquals(0.8 * before.kappaMus(), after.kappaMus(), 1e-12 * after.kappaMus());
            assertEquals(0.8 * before.kappaMusp(), after.kappaMusp(), 1e-12 * after.kappaMusp());
        }
        assertEquals(0.02 / 1.1, lot.uncertainty().absorption(), 1e-15);
        assertEquals(0.03 / 0.8, lot.uncertainty().scattering(), 1e-15);
        assertEquals(0.0001 / 0.0006, lot.uncertainty().correlation(), 1e-12);
        assertEquals("ink-demo-l07", lot.id());
        assertEquals("ink-demo", lot.kind());
        assertSame(MEASURED, lot.source());
    }

    @Test
    void aScatterersMagnitudeMoves() {
        Ingredient beads = DemoIngredients.beads();
        Ingredient lot = LOT.learned(beads, factors(beads, 1, 0.93));
        assertEquals(
                0.93 * MassSpecific.of(beads, 700, 22, 1.33, 0).kappaMusp(),
                MassSpecific.of(lot, 700, 22, 1.33, 0).kappaMusp(),
                1e-9);
        Ingredient measured = LOT.scatterer(beads, new DilutionFit.Magnitude(1.2, 0.024, 1, 2));
        assertEquals(
                1.2 * MassSpecific.of(beads, 700, 22, 1.33, 0).kappaMus(),
                MassSpecific.of(measured, 700, 22, 1.33, 0).kappaMus(),
                1e-9);
        assertEquals(0.02, measured.uncertainty().scattering(), 1e-15);
        assertThrows(
                Refusal.class, () -> LOT.scatterer(DemoIngredients.water(0), new DilutionFit.Magnitude(1, 0, 1, 2)));
    }

    @Test
    void anAbsorberIsItsFittedExtinction() {
        Ingredient ink = DemoIngredients.ink(0.05);
        List<DilutionReading> readings = new ArrayList<>();
        for (double nm : new double[] {680, 780})
            for (int i = 0; i < 5; i++)
                readings.add(new DilutionReading(
                        i * 5e-5,
                        10,
                        nm,
                        DilutionReading.Signal.TRANSMISSION,
                        Math.exp(-i * 5e-5 * 7000),
                        OptionalDouble.of(0.002)));
        DilutionFit fit = new DilutionSeries("ink-demo", 1.0, 0.15, 0.01, 0, readings).fit();
        Ingredient lot = LOT.absorber(ink, fit, 0.7);
        assertEquals(7000 * 0.85, MassSpecific.of(lot, 730, 22, 1.33, 0).kappaA(), 1e-6);
        assertEquals(7000 * 0.15 * 0.3, MassSpecific.of(lot, 730, 22, 1.33, 0).kappaMusp(), 1e-6);
        assertEquals(fit.uncertainty(), lot.uncertainty());
    }

    @Test
    void particlesThatAbsorbByTheirIndexAreMultipliedToo() {
        Material carbon = new Material("carbon", "carbon", new ConstantIndex("carbon", 1.8, 0.6, 400, 1000), MEASURED);
        Ingredient black = DemoIngredients.of(
                "black-demo",
                Part.ABSORBER,
                1.8,
                new Uncertainty(0.1, 0.1),
                Optional.empty(),
                Optional.of(new Scattering.MieParticles(
                        carbon, 1, new SizeDistribution.Single(80), new Crowding.None(), 1)),
                Optional.empty());
        Ingredient lot = LOT.learned(black, factors(black, 1.1, 0.9));
        MassSpecific before = MassSpecific.of(black, 700, 22, 1.33, 0);
        MassSpecific after = MassSpecific.of(lot, 700, 22, 1.33, 0);
        assertTrue(before.kappaA() > 0);
        assertEquals(1.1 * before.kappaA(), after.kappaA(), 1e-12 * after.kappaA());
        assertEquals(0.9 * before.kappaMusp(), after.kappaMusp(), 1e-12 * after.kappaMusp());
    }

    @Test
    void whatCannotBeIsRefused() {
        Ingredient ink = DemoIngredients.ink(0.05);
        assertThrows(Refusal.class, () -> LOT.learned(ink, factors(ink, -0.1, 1)));
    }
}
