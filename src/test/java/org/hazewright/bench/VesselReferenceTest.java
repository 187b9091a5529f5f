package org.hazewright.bench;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Point;
import org.hazewright.design.Frozen;
import org.hazewright.files.ShelfReader;
import org.hazewright.mixture.Mixture;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Shelf;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/**
 * A published titration step by step: carbon ink added to a lipid bath by a titrant that scatters as the bath does, A. Sudakou et
 * al., Biomed. Opt. Express 14, 3506 (2023), open data: grams of ink stock in grams of bath at steps 1, 11 and 21, and the nominal
 * µa by weight.
 */
class VesselReferenceTest {
    private static final Shelf SHELF = ShelfReader.readShipped();
    private static final Ingredient WATER = SHELF.require("water");
    private static final Ingredient INK = SHELF.require("ink-published-bottle");

    /** Mass fraction of ink in the authors' stock. */
    private static final double STOCK = 0.009948208;

    /** Mass fraction of stock in the authors' titrant: what went in between steps 1 and 21. */
    private static final double TITRANT = (14.8683 - 1.4939) / (3770.93 - 3617.17);

    private static Vessel bath(double stockG, double totalG) {
        Map<Ingredient, Double> masses = new LinkedHashMap<>();
        masses.put(WATER, totalG - stockG * STOCK);
        masses.put(INK, stockG * STOCK);
        return new Vessel(masses);
    }

    private static Map<Ingredient, Double> titrant() {
        return Map.of(WATER, 1 - TITRANT * STOCK, INK, TITRANT * STOCK);
    }

    /**
     * From the bath of step 1 the grams that lead to the authors' rise of µa must be theirs. The rise is what is compared, since
     * their water stands at 37 °C and ours at 22 °C. Their µa is printed to 0.0001 of a rise of at least 0.09 (0.1 %); the extinction
     * table has five digits; densities of emulsion and ink are taken as water's (0.3 %). 1.5 % leaves the authors' own 1 % of
     * difference between wavelengths.
     */
    @ParameterizedTest
    @CsvSource({
        "692.5, 0.0300, 0.1362, 75.40", "730, 0.0438, 0.1415, 75.40", "780, 0.0479, 0.1403, 75.40",
        "817.5, 0.0440, 0.1324, 75.40", "692.5, 0.0300, 0.2421, 153.76", "780, 0.0479, 0.2324, 153.76",
    })
    void gramsToTheNextStep(double nm, double before, double after, double publishedG) {
        Vessel first = bath(1.4939, 3617.17);
        Mixture mixture = new Mixture(first.massesG(), 22);
        double wanted = mixture.at(nm).muaPerCm() + after - before;
        List<Point> points = List.of(new Point(Point.Quantity.MUA, nm, wanted, 0.01 * wanted, 1));
        double g = first.doseG(titrant(), new Frozen(points, mixture, WATER, Balance.USUAL), 1000);
        assertEquals(publishedG, g, 0.015 * publishedG);
    }

    /** Grams add, so that step 11 of the table is reached from step 1: stock and total to the table's last digits. */
    @ParameterizedTest
    @CsvSource({"75.40, 8.0521, 3692.57", "153.76, 14.8683, 3770.93"})
    void amountsOfTheTable(double addedG, double stockG, double totalG) {
        Vessel reached = bath(1.4939, 3617.17).plus(titrant(), addedG);
        assertEquals(totalG, reached.massG(), 0.005);
        assertEquals(
                stockG * STOCK,
                reached.massesG().get(INK),
                2e-4 * stockG * STOCK,
                "a digit of 75.40 g is 1.3 in 10 000");
    }
}
