package org.hazewright.mixture;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Map;
import org.hazewright.files.ShelfReader;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Shelf;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/**
 * The shipped 20 % lipid emulsion in water over concentration, against its published behaviour.
 *
 * <p>Di Ninni, Martelli &amp; Zaccanti, Biomed. Opt. Express 2, 2265 (2011): µa does not feel the neighbours; µs' needs one term in
 * the square of the concentration beside the linear one, which takes off at most 2 % in the range used for tissue. The source's points
 * were not at hand, so the departure at the upper end of that range, µs' 15 /cm, is held to 2 ± 1 %: 1 % is what nine laboratories
 * reach on µs' (Spinelli et al., Biomed. Opt. Express 5, 2037, 2014). No crowding at all fails this test, and so does twice as much.
 */
class EmulsionCrowdingReferenceTest {
    private static final Shelf SHELF = ShelfReader.readShipped();
    private static final Ingredient WATER = SHELF.require("water");
    private static final Ingredient EMULSION = SHELF.require("lipid-emulsion-20");
    private static final double ROOM_C = 22;

    /** With a share of emulsion by volume. */
    private static Coefficients at(double share, double nm) {
        return new Mixture(
                        Map.of(WATER, (1 - share) * WATER.densityGPerMl(), EMULSION, share * EMULSION.densityGPerMl()),
                        ROOM_C)
                .at(nm);
    }

    /** µs' over the straight line through few droplets. */
    private static double ofTheLine(double share, double nm) {
        return at(share, nm).muspPerCm() / share / (at(1e-5, nm).muspPerCm() / 1e-5);
    }

    /** Share of emulsion that gives a µs', by bisection. */
    private static double shareFor(double muspPerCm, double nm) {
        double low = 0;
        double high = 0.2;
        for (int i = 0; i < 40; i++) {
            double middle = (low + high) / 2;
            if (at(middle, nm).muspPerCm() < muspPerCm) low = middle;
            else high = middle;
        }
        return high;
    }

    /**
     * µs' per unit fraction of emulsion, few droplets: Di Ninni, Martelli &amp; Zaccanti, Phys. Med. Biol. 56, N21 (2011), mean of nine
     * batches over ten years, and the largest deviation of a batch from it, which is the tolerance.
     */
    @ParameterizedTest
    @CsvSource({"632.8, 259, 0.022", "751, 212, 0.011", "833, 184, 0.014"})
    void fewDropletsScatterAsPublished(double nm, double muspPerCm, double deviation) {
        assertEquals(muspPerCm, at(1e-5, nm).muspPerCm() / 1e-5, deviation * muspPerCm);
    }

    @Test
    void atTheUpperEndOfTheTissueRangeTwoPerCentAreMissing() {
        double missing = 1 - ofTheLine(shareFor(15, 751), 751);
        assertEquals(0.02, missing, 0.01, "of the line, " + missing + " is missing");
    }

    /** Below that, a square alone: the shortfall goes with the concentration, to a twentieth of itself, at any of their wavelengths. */
    @ParameterizedTest
    @CsvSource({"632.8", "751", "833"})
    void oneTermInTheSquareIsEnough(double nm) {
        double full = shareFor(15, nm);
        double each = (1 - ofTheLine(full, nm)) / full;
        double before = 1;
        for (double part : new double[] {0.1, 0.25, 0.5, 0.75, 1}) {
            double found = ofTheLine(part * full, nm);
            assertTrue(found < before, "the more, the less each scatters");
            assertEquals(each * part * full, 1 - found, 0.05 * each * part * full);
            before = found;
        }
    }

    /** µa of the parts by volume, whatever the crowd. */
    @Test
    void absorptionStaysOnTheStraightLine() {
        for (double nm : new double[] {632.8, 751, 833}) {
            double water = at(0, nm).muaPerCm();
            double neat = at(1, nm).muaPerCm();
            for (double share : new double[] {0.02, 0.1, 0.4})
                assertEquals((1 - share) * water + share * neat, at(share, nm).muaPerCm(), 1e-12);
        }
    }
}
