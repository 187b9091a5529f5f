package org.hazewright.reading;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import org.hazewright.brief.Tissue;
import org.hazewright.files.ShelfReader;
import org.hazewright.files.TissueSpectra;
import org.hazewright.mixture.Budget;
import org.hazewright.mixture.Coefficients;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Recipe;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Shelf;
import org.junit.jupiter.api.Test;

class HaemoglobinEquivalentTest {
    private static final Shelf SHELF = ShelfReader.readShipped();
    private static final Tissue.Spectra TABLES = TissueSpectra.shipped();
    private static final double[] NM = {690, 760, 800, 830};

    /**
     * Blood weighed in: 12 mL of oxygenated and 4 mL of deoxygenated solution of 150 g/L (64.5 kg/mol) in a litre. What is read is what
     * was weighed, and the two parts' own doubts, each of its share, are what makes it uncertain.
     */
    @Test
    void bloodReadsAsTheBloodThatWasWeighedIn() {
        Ingredient water = SHELF.require("water");
        Ingredient oxy = SHELF.require("haemoglobin-oxy");
        Ingredient deoxy = SHELF.require("haemoglobin-deoxy");
        Recipe recipe = new Recipe(
                "blood",
                water,
                22,
                0,
                Optional.empty(),
                List.of(),
                List.of(
                        item(water, 984 * water.densityGPerMl()),
                        item(oxy, 12 * oxy.densityGPerMl()),
                        item(deoxy, 4 * deoxy.densityGPerMl())));
        Mixture mixture = Mixture.of(recipe);
        double[] mua = Arrays.stream(NM).map(nm -> mixture.at(nm).muaPerCm()).toArray();
        Oximeter oximeter = new Oximeter(
                "test",
                TABLES.oxyEpsilon(),
                TABLES.deoxyEpsilon(),
                nm -> mixture.at(nm).shares().stream()
                        .filter(s -> s.ingredient().equals(water))
                        .mapToDouble(Coefficients.Share::muaPerCm)
                        .sum());
        HaemoglobinEquivalent h = HaemoglobinEquivalent.of(oximeter, NM, mua, Budget.of(recipe, NM, 1e9));
        double umolPerMl = 150 / 64.5;
        assertEquals(16 * umolPerMl, h.umolPerL(), 2e-3 * h.umolPerL());
        assertEquals(0.75, h.saturation(), 1e-3);
        double a = 12 * umolPerMl * oxy.uncertainty().absorption();
        double b = 4 * umolPerMl * deoxy.uncertainty().absorption();
        assertTrue(a > 0 && b > 0);
        double least = Math.hypot(a, b);
        assertTrue(h.uUmolPerL() >= 0.999 * least, h.toString());
        double others = 16 * umolPerMl * (Budget.VOLUME + Budget.DENSITY) + 3;
        assertTrue(h.uUmolPerL() <= Math.hypot(least, others), h.toString());
    }

    /** A composition's own µa reads as its haemoglobin when its water and fat are taken off. */
    @Test
    void aCompositionReadsAsItself() {
        Tissue tissue = new Tissue(NM, 60, 0.7, 0.6, 0.2, java.util.OptionalDouble.of(15), 1.1);
        double[] mua = Arrays.stream(NM).map(nm -> tissue.muaPerCm(nm, TABLES)).toArray();
        Oximeter oximeter = new Oximeter(
                "test", TABLES.oxyEpsilon(), TABLES.deoxyEpsilon(), nm -> tissue.bloodlessPerCm(nm, TABLES));
        Recipe bare = new Recipe(
                "water",
                SHELF.require("water"),
                22,
                0,
                Optional.empty(),
                List.of(),
                List.of(item(SHELF.require("water"), 100)));
        HaemoglobinEquivalent h = HaemoglobinEquivalent.of(oximeter, NM, mua, Budget.of(bare, NM, 1e9));
        assertEquals(60, h.umolPerL(), 1e-9);
        assertEquals(0.7, h.saturation(), 1e-11);
    }

    private static Item item(Ingredient i, double massG) {
        return new Item(i, Optional.empty(), Optional.empty(), massG);
    }
}
