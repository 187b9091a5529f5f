package org.hazewright.shelf;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.time.LocalDate;
import java.util.List;
import java.util.Optional;
import org.hazewright.mixture.DemoIngredients;
import org.hazewright.optics.Spectrum;
import org.junit.jupiter.api.Test;

/** Figures that are allowed and look wrong are asked about; those of real dyes and bands are not. */
class InspectionTest {
    private static List<String> doubts(double[] nm, double[] value) {
        Ingredient i = DemoIngredients.of(
                "demo",
                Part.ABSORBER,
                1,
                new Uncertainty(0.02, 0),
                Optional.of(Absorption.neat(new Spectrum("table", nm, value), 1, 0, 0)),
                Optional.empty(),
                Optional.empty());
        return Inspection.of(new Shelf("test", List.of(i), List.of()), LocalDate.of(2026, 12, 1)).stream()
                .map(Inspection.Doubt::sentence)
                .filter(s -> s.contains("jumps"))
                .toList();
    }

    /** Ten times too much or too little in one row, between neighbours as far apart as in a short table of one's own. */
    @Test
    void oneRowAgainstBothItsNeighbours() {
        double[] nm = {600, 700, 800, 900};
        assertEquals(1, doubts(nm, new double[] {6447, 59410, 5515, 5000}).size());
        assertEquals(1, doubts(nm, new double[] {6447, 594.1, 5515, 5000}).size());
        assertEquals(0, doubts(nm, new double[] {6447, 5941, 5515, 5000}).size());
    }

    /** A dye's flank falls by a factor of ten in 100 nm, row after row the same way. */
    @Test
    void aSteepFlankInWideStepsIsNone() {
        assertEquals(
                0,
                doubts(new double[] {600, 700, 800, 900}, new double[] {5000, 500, 40, 3})
                        .size());
    }

    /** Close rows that jump are asked about, whichever way. */
    @Test
    void neighboursCloseTogether() {
        double[] nm = {600, 610, 750, 900};
        assertEquals(1, doubts(nm, new double[] {100, 450, 460, 470}).size());
        assertEquals(1, doubts(nm, new double[] {450, 100, 90, 80}).size());
        assertEquals(0, doubts(nm, new double[] {100, 390, 400, 410}).size());
    }
}
