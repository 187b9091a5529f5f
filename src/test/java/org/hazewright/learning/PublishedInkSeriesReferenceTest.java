package org.hazewright.learning;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.time.LocalDate;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.hazewright.mixture.DemoIngredients;
import org.hazewright.mixture.Mixture;
import org.hazewright.optics.Spectrum;
import org.hazewright.shelf.Absorption;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Part;
import org.hazewright.shelf.Uncertainty;
import org.junit.jupiter.api.Test;

/**
 * A published ink titration, weighed and measured: Sudakou et al., Biomed. Opt. Express 14, 3506, 2023, open data.
 *
 * <p>Ink stock of mass fraction 0.009948208 in a bath; µa by weight (nominal, water at 37 °C counted) against µa by time-resolved fit, at
 * three of 21 steps and four wavelengths. All steps and wavelengths together: root mean square difference 2.0 %.
 */
class PublishedInkSeriesReferenceTest {
    private static final double[] NM = {692.5, 730, 780, 817.5};
    private static final double[] STOCK_G = {1.4939, 8.0521, 14.8683};
    private static final double[] TOTAL_G = {3617.17, 3692.57, 3770.93};
    private static final double[][] NOMINAL = {
        {0.0300, 0.0438, 0.0479, 0.0440}, {0.1362, 0.1415, 0.1403, 0.1324}, {0.2421, 0.2390, 0.2324, 0.2205}
    };
    private static final double[][] MEASURED = {
        {0.0313, 0.0428, 0.0477, 0.0443}, {0.1354, 0.1430, 0.1409, 0.1328}, {0.2378, 0.2372, 0.2257, 0.2228}
    };

    private static final Ingredient INK = DemoIngredients.ink(0.05);

    /** The bath's own absorption: what the first step's nominal value holds beside the ink by the published extinction. */
    private static Ingredient bath() {
        double[] mua = new double[NM.length];
        double inkPerMl = STOCK_G[0] * 0.009948208 / TOTAL_G[0];
        for (int j = 0; j < NM.length; j++)
            mua[j] = NOMINAL[0][j] - 0.85 * DemoIngredients.publishedInk().at(NM[j]) * inkPerMl;
        return DemoIngredients.of(
                "bath-demo",
                Part.BASE,
                1.0,
                new Uncertainty(0.02, 0),
                Optional.of(Absorption.neat(new Spectrum("bath", NM, mua), 1, 0, 0)),
                Optional.empty(),
                DemoIngredients.water(0).index());
    }

    private static Mixture step(int k) {
        double ink = STOCK_G[k] * 0.009948208;
        return new Mixture(Map.of(INK, ink, bath(), TOTAL_G[k] - ink), 37);
    }

    private static MeasuredBatch batch(int k, double[] perCm) {
        List<MeasuredValue> values = new ArrayList<>();
        for (int j = 0; j < NM.length; j++)
            values.add(new MeasuredValue(Quantity.ABSORPTION, NM[j], perCm[j], 0.02 * perCm[j]));
        return new MeasuredBatch(
                "step " + k,
                LocalDate.of(2023, 1, 1),
                step(k),
                List.of(),
                new Method("time-resolved fit", 0.02, 0.02),
                values);
    }

    /** The mixture's own sum reproduces the published nominal values of the later steps, printed to 4 decimals. */
    @Test
    void nominalValuesByWeight() {
        for (int k = 1; k < 3; k++)
            for (int j = 0; j < NM.length; j++)
                assertEquals(NOMINAL[k][j], step(k).at(NM[j]).muaPerCm(), 0.0005, "step " + k + " at " + NM[j]);
    }

    /** Every step as measured agrees with its weights within the 2 % that the authors report. */
    @Test
    void measuredStepsAgree() {
        for (int k = 0; k < 3; k++) {
            Verdict v = Verdict.of(Factors.none(), batch(k, MEASURED[k]));
            assertEquals(Verdict.Outcome.AGREES, v.outcome(), v.sentence());
        }
    }

    /** The bottle's extinction came from dilutions and the bath from time of flight: the update keeps it within 2 %, and surer. */
    @Test
    void theTitrationConfirmsTheDilutions() {
        LotUpdate update = LotUpdate.of(
                Factors.none(), List.of(batch(0, MEASURED[0]), batch(1, MEASURED[1]), batch(2, MEASURED[2])));
        Factor ink = Factor.of(INK, Quantity.ABSORPTION);
        assertEquals(1, update.after().mean(ink), 0.02);
        assertTrue(
                update.after().u(ink) < 0.025,
                "of 0.05 as filed: " + update.after().u(ink));
        assertTrue(!update.surprising());
    }

    /** An ink filed 15 % too weak would have been caught by these very figures. */
    @Test
    void aWrongInkWouldBeCaught() {
        double[] strong = new double[NM.length];
        for (int j = 0; j < NM.length; j++) strong[j] = MEASURED[2][j] * 1.15;
        Verdict v = Verdict.of(Factors.none(), batch(2, strong));
        assertTrue(v.outcome() != Verdict.Outcome.AGREES, v.sentence());
        assertTrue(v.sentence().contains("ink-demo absorption"), v.sentence());
    }

    /** Measured µa against ink by weight, as a line through three points: the slope over 0.85 is the published extinction within 4 %. */
    @Test
    void theTitrationAsADilutionSeries() {
        for (int j = 0; j < NM.length; j++) {
            double[] c = new double[3];
            double[] mu = new double[3];
            for (int k = 0; k < 3; k++) {
                c[k] = STOCK_G[k] * 0.009948208 / TOTAL_G[k];
                mu[k] = MEASURED[k][j];
            }
            StraightLine line = StraightLine.fit(c, mu);
            double published = DemoIngredients.publishedInk().at(NM[j]);
            // 2 % of scatter at the ends is 2 to 3 % of the slope.
            assertEquals(published, line.slope() / 0.85, 0.04 * published, NM[j] + " nm");
        }
    }
}
