package org.hazewright.bench;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.List;
import java.util.Optional;
import org.hazewright.brief.Balance;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Stock;
import org.junit.jupiter.api.Test;

/** Doses against a published recipe and against the figures of the trade. */
class StockReferenceTest {

    /**
     * Ink for µa 0.100 /cm at 780 nm in 1000 g over water of 0.0263 /cm, with ink of extinction 6182.6 /cm and albedo 0.15: 14.02 mg,
     * which is 1.410 g of a stock of mass fraction 0.009948208. Ink and stock: Sudakou et al., Biomed. Opt. Express 14, 3506, 2023,
     * open data; the two results worked by hand from them. To the last digit of the 1 mg balance.
     */
    @Test
    void inkForOneLitreFromThePublishedStock() {
        double inkGPerMl = (0.100 - 0.0263) / (6182.6 * (1 - 0.15));
        assertEquals(14.02e-3, 1000 * inkGPerMl, 0.005e-3);
        double fraction = 0.009948208;
        Stock published = new Stock(
                "published-stock",
                Bottles.INK,
                Optional.empty(),
                100 * fraction,
                Bottles.WATER,
                100 * (1 - fraction),
                Optional.empty());
        Contents contents =
                Bottles.contents(Bottles.WATER, 1000, Bottles.INK, inkGPerMl).withStocks(List.of(published));
        StockPlan plan = StockPlan.of(contents, Balance.USUAL, Bottles.judge(contents, Balance.USUAL, 0.05));
        Item ink = plan.recipe().items().stream()
                .filter(i -> i.stock().isPresent())
                .findFirst()
                .orElseThrow();
        assertEquals(1.410, ink.massG(), 0.0005);
    }

    /**
     * Neat ink for one litre, 14 to 19 mg, is uncertain by 5 to 7 % on a milligram balance, from a 1 : 100 stock by 0.07 % (common
     * practice). The figures count the last weighing alone and have one digit: held to half of it. A stock of 1000 g has no
     * uncertainty of its own to speak of.
     */
    @Test
    void whatAStockGains() {
        Balance milligram = new Balance(0.001, 0.001, 0.020, 2000);
        assertEquals(0.07, Dose.neat(Bottles.INK, 0.014).relativeUncertainty(milligram), 0.005);
        assertEquals(0.05, Dose.neat(Bottles.INK, 0.019).relativeUncertainty(milligram), 0.005);
        Stock hundred = new Stock("ink-1-100", Bottles.INK, Optional.empty(), 10, Bottles.WATER, 990, Optional.empty());
        Dose dose = new Dose(Bottles.INK, 0.01402, List.of(hundred), false);
        assertEquals(0.0007, dose.relativeUncertainty(milligram), 0.00005);
    }

    /** Silicone 10 : 1 and epoxy 100 : 30 by mass keep their ratios when a masterbatch brings part of the base (common practice). */
    @Test
    void twoPartBasesKeepTheirRatio() {
        Contents silicone = Bottles.contents(Bottles.SILICONE, 60, Bottles.TITANIA, 2e-4, Bottles.CARBON, 3e-4);
        var masses = Bottles.plan(silicone, Balance.USUAL).recipe().massesG();
        assertEquals(10, masses.get(Bottles.PART_A) / masses.get(Bottles.PART_B), 0.002);
        Contents resin = Bottles.contents(Bottles.RESIN, 250, Bottles.TITANIA, 6e-5);
        var parts = Bottles.plan(resin, Balance.USUAL).recipe().massesG();
        assertEquals(100.0 / 30, parts.get(Bottles.RESIN_A) / parts.get(Bottles.RESIN_B), 0.0002);
    }
}
