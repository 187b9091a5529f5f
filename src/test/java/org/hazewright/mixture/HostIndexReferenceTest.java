package org.hazewright.mixture;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.LinkedHashMap;
import java.util.Map;
import org.hazewright.files.ShelfReader;
import org.hazewright.optics.Efficiencies;
import org.hazewright.optics.Mie;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Shelf;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/**
 * The shipped shelf's host: what is dissolved in water and how warm it is move n_h as published tables say, and with it the
 * scattering of beads by the amount that Mie gives for the table's index.
 *
 * <p>Beads: the shipped polystyrene of 0.5 µm, so few that they do not crowd. Tables hold n relative to air, which is 1.00027
 * (sodium line, 20 °C); the program's n is relative to vacuum.
 */
class HostIndexReferenceTest {
    private static final Shelf SHELF = ShelfReader.readShipped();
    private static final Ingredient WATER = SHELF.require("water");
    private static final Ingredient BEADS = SHELF.require("microspheres-polystyrene-500");
    private static final double SODIUM_NM = 589.3;
    private static final double AIR = 1.00027;
    private static final double FEW = 1e-6;

    private static Mixture solution(String id, double massFraction, double temperatureC) {
        Map<Ingredient, Double> masses = new LinkedHashMap<>();
        masses.put(WATER, 1 - massFraction);
        masses.put(BEADS, FEW);
        if (!id.equals("water")) masses.put(SHELF.require(id), massFraction);
        return new Mixture(masses, temperatureC);
    }

    /** µs' that the beads add, over their volume fraction, 1/cm. */
    private static double beads(Mixture m) {
        double fraction = MassSpecific.particleShare(BEADS) * FEW / BEADS.densityGPerMl() / m.volumeMl();
        return m.at(SODIUM_NM).shares().stream()
                        .filter(s -> s.ingredient().equals(BEADS))
                        .findFirst()
                        .orElseThrow()
                        .muspPerCm()
                / fraction;
    }

    /** The same of one sphere by Mie, 3 Q_sca (1 − g)/(2D), in a host of an index that is given. */
    private static double mie(double beadIndex, double hostIndex) {
        double diameterNm = 500;
        Efficiencies q = Mie.sphere(Math.PI * diameterNm * hostIndex / SODIUM_NM, beadIndex / hostIndex, 0);
        return 1.5 * q.qSca() * (1 - q.g()) / (diameterNm * 1e-7);
    }

    /** Sultanova et al., Acta Phys. Pol. A 116, 585 (2009), one-term fit, at 20 °C. */
    private static double polystyrene() {
        double l2 = SODIUM_NM * SODIUM_NM * 1e-6;
        return Math.sqrt(1 + 1.4435 * l2 / (l2 - 0.020216));
    }

    /**
     * Handbook of Chemistry and Physics (CRC), aqueous solutions at 20 °C, sodium line; sucrose as copied in a public property library,
     * glycerol from memory, each against an independent computation (Lorentz–Lorenz with the densities of Volk &amp; Kähler, Exp. Fluids 59,
     * 75, 2018). The tolerance is for volumes that do not add exactly; an error of 1e-3 in n_h is one of 0.8 % in µs' here.
     */
    @ParameterizedTest
    @CsvSource({
        "sucrose, 0.05, 1.3403, 3e-4",
        "sucrose, 0.10, 1.3478, 3e-4",
        "sucrose, 0.20, 1.3639, 5e-4",
        "sucrose, 0.30, 1.3812, 5e-4",
        "sucrose, 0.40, 1.3999, 1e-3",
        "sucrose, 0.48, 1.4159, 2e-3",
        "glycerol, 0.10, 1.3448, 3e-4",
        "glycerol, 0.20, 1.3575, 1e-3",
        "glycerol, 0.30, 1.3707, 1e-3",
        "glycerol, 0.40, 1.3841, 1e-3",
        "glycerol, 0.50, 1.3981, 1e-3",
    })
    void dissolvedAdditives(String id, double massFraction, double nInAir, double tolerance) {
        Mixture m = solution(id, massFraction, 20);
        double host = nInAir * AIR;
        assertEquals(host, m.hostIndex(SODIUM_NM), tolerance);
        double published = mie(polystyrene(), host) / mie(polystyrene(), 1.33300 * AIR);
        double found = beads(m) / beads(solution("water", 0, 20));
        assertEquals(published, found, 10 * tolerance * published);
        assertTrue(1 - published > 30 * tolerance, "the test can tell a host that does not move: " + published);
    }

    /**
     * Gelatin in water: n − n(water) over its concentration in g/mL is 0.16–0.19 mL/g as quoted for gelatin and proteins (from memory); the
     * middle, 0.175, gives the host here, and the 9 % either way of it are the tolerance. µs' falls by what Mie gives for it.
     */
    @ParameterizedTest
    @CsvSource({"0.05", "0.10", "0.15"})
    void gelatinOfAGel(double massFraction) {
        Mixture m = solution("gelatin-powder", massFraction, 20);
        double gPerMl = massFraction / m.volumeMl();
        double water = 1.33300 * AIR;
        double host = water + 0.175 * gPerMl;
        assertEquals(0.175, (m.hostIndex(SODIUM_NM) - water) / gPerMl, 0.016);
        double fall = 1 - mie(polystyrene(), host) / mie(polystyrene(), water);
        assertEquals(fall, 1 - beads(m) / beads(solution("water", 0, 20)), 0.09 * fall);
    }

    /** The shipped gel is that blend: nine parts of water and one of gelatin by mass. */
    @Test
    void theBlendsHostIsThatOfItsParts() {
        Mixture gel = new Mixture(SHELF.partsOf(SHELF.require("gelatin-10")), 20);
        assertEquals(solution("gelatin-powder", 0.10, 20).hostIndex(SODIUM_NM), gel.hostIndex(SODIUM_NM), 1e-6);
    }

    /**
     * Water over temperature: Handbook of Chemistry and Physics (CRC), sodium line, in air (from memory). Older tables and IAPWS R9-97 part
     * by 1e-4 towards 60 °C. Beads in it, of the index at 20 °C less 1.4e-4 per °C (from memory, as the shelf's file says).
     */
    @ParameterizedTest
    @CsvSource({"10, 1.33370", "20, 1.33299", "30, 1.33192", "40, 1.33051", "50, 1.32894", "60, 1.32718"})
    void warmWater(double temperatureC, double nInAir) {
        Mixture m = solution("water", 0, temperatureC);
        double host = nInAir * AIR;
        assertEquals(host, m.hostIndex(SODIUM_NM), 1e-4);
        double bead = polystyrene() - 1.4e-4 * (temperatureC - 20);
        double published = mie(bead, host) / mie(polystyrene(), 1.33299 * AIR);
        assertEquals(published, beads(m) / beads(solution("water", 0, 20)), 1e-3 * published);
    }

    /**
     * Oil loses index faster than water when both are warmed, so a lipid emulsion scatters less: Cletus et al., J. Biomed. Opt. 15, 017003
     * (2010), saw µs' fall between 30 and 40 °C and found it as Mie says; their slope was not at hand. The contrast falls by 3.8e-4 less
     * what water loses, and µs' goes by its square and a little more (Rayleigh–Gans).
     */
    @Test
    void aWarmEmulsionScattersLess() {
        Ingredient emulsion = SHELF.require("lipid-emulsion-20");
        Map<Ingredient, Double> masses = Map.of(emulsion, 0.01, WATER, 0.99);
        Coefficients cool = new Mixture(masses, 30).at(740);
        Coefficients warm = new Mixture(masses, 40).at(740);
        double contrast = 0.140 - 8 * 3.8e-4 + (1.33299 - 1.33192) * AIR; // at 30 °C, from 22 °C, water nearly from 20
        double less = 10 * 3.8e-4 - (1.33192 - 1.33051) * AIR;
        assertEquals(-2 * less / contrast, Math.log(warm.muspPerCm() / cool.muspPerCm()), 0.15 * 2 * less / contrast);
    }
}
