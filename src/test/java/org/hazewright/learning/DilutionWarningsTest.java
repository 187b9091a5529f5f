package org.hazewright.learning;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.OptionalDouble;
import org.junit.jupiter.api.Test;

/**
 * Every warning of a dilution series word for word, with figures that follow from how the readings were made up: six dilutions of 1 to 6
 * (mean 3.5, Σd² = 17.5), absorbances in a cell of 10 mm, so that µ is ln 10 times the absorbance.
 */
class DilutionWarningsTest {
    private static final double LN10 = Math.log(10);

    /** Third differences: they lean on no line and no parabola, and their squares sum to 20. */
    private static final double[] SCATTER = {1, -3, 3, -1, 0, 0};

    private static final double[] NONE = new double[6];
    private final List<DilutionReading> readings = new ArrayList<>();

    /** Absorbance 0.1 c and what is added to it; uncertainty 0.001 each when it is stated. */
    private void at(double nm, boolean stated, double[] added) {
        for (int i = 0; i < added.length; i++)
            readings.add(new DilutionReading(
                    i + 1,
                    10,
                    nm,
                    DilutionReading.Signal.ABSORBANCE,
                    0.1 * (i + 1) + added[i],
                    stated ? OptionalDouble.of(0.001) : OptionalDouble.empty()));
    }

    private static double[] times(double[] v, double factor) {
        double[] out = v.clone();
        for (int i = 0; i < v.length; i++) out[i] *= factor;
        return out;
    }

    private static double[] plus(double[] v, double constant) {
        double[] out = v.clone();
        for (int i = 0; i < v.length; i++) out[i] += constant;
        return out;
    }

    private List<String> warnings() {
        return new DilutionSeries("ink-demo", 1, 0, 0, 0, readings).fit().warnings();
    }

    @Test
    void nothingToSay() {
        for (double nm : new double[] {600, 650, 700}) at(nm, true, times(SCATTER, 0.0003));
        assertEquals(List.of(), warnings());
    }

    @Test
    void oneWavelengthTellsNothingApart() {
        at(600, true, times(SCATTER, 0.0003));
        assertEquals(
                List.of("With one wavelength, errors of the dilutions cannot be told from errors of the readings."),
                warnings());
    }

    /** χ² = 20 · 2² on 4 degrees of freedom: √20 = 4.47 times what is stated; at 0.9 of it, 4.02. */
    @Test
    void scatterBeyondWhatIsStated() {
        double[] nm = {600, 620, 640, 660, 680};
        for (double w : nm) at(w, true, times(SCATTER, w == 620 ? 0.002 : 0.0003));
        String said = " nm readings scatter more than their stated uncertainties, up to 4.47 times; the uncertainty of"
                + " the result was enlarged by that.";
        assertEquals(List.of("At 620" + said + " One wavelength in twenty does so by chance."), warnings());
        readings.clear();
        for (double w : nm) at(w, true, times(SCATTER, w == 620 ? 0.002 : w == 680 ? 0.0018 : 0.0003));
        assertEquals(List.of("At 620, 680" + said), warnings(), "two of five are no chance");
        readings.clear();
        for (double w : new double[] {600, 620, 640, 660}) at(w, true, times(SCATTER, w == 620 ? 0.002 : 0.0003));
        assertEquals(List.of("At 620" + said), warnings(), "one of four is not one of twenty");
    }

    @Test
    void manyWavelengthsAreCountedAndAllAreAll() {
        for (double w = 600; w <= 650; w += 10) at(w, true, times(SCATTER, w == 650 ? 0.0003 : 0.002));
        assertTrue(
                warnings().get(0).startsWith("At 5 of 6 wavelengths (600, 610, 620, 630, …) readings scatter"),
                warnings().toString());
        readings.clear();
        for (double w = 600; w <= 640; w += 10) at(w, true, times(SCATTER, w == 640 ? 0.0003 : 0.002));
        assertTrue(
                warnings().get(0).startsWith("At 600, 610, 620, 630 nm readings scatter"),
                warnings().toString());
        readings.clear();
        for (double w : new double[] {600, 610}) at(w, true, times(SCATTER, 0.002));
        assertTrue(
                warnings().get(0).startsWith("At all wavelengths readings scatter"),
                warnings().toString());
    }

    /** Eleven wavelengths may show one by chance, and so may twenty show two. */
    @Test
    void aTenthByChance() {
        for (int k = 0; k < 20; k++) at(600 + k, true, times(SCATTER, k < 2 ? 0.002 : 0.0003));
        assertTrue(warnings().get(0).endsWith("by chance."), warnings().toString());
        readings.clear();
        for (int k = 0; k < 20; k++) at(600 + k, true, times(SCATTER, k < 3 ? 0.002 : 0.0003));
        assertTrue(warnings().get(0).endsWith("enlarged by that."), warnings().toString());
    }

    /**
     * A cell that adds 0.01 to every absorbance: intercept 0.01 ln 10 = 0.023 /cm, of standard error 0.001 ln 10 √(1/6 + 3.5²/17.5) =
     * 0.00214. At the other wavelength it takes 0.006 away, which is less.
     */
    @Test
    void aLineThatMissesZero() {
        at(600, true, plus(times(SCATTER, 0.0003), 0.01));
        at(700, true, plus(times(SCATTER, 0.0003), -0.006));
        at(800, true, times(SCATTER, 0.0003));
        assertEquals(
                List.of(
                        "At 600, 700 nm the line misses zero at no concentration, at most by 0.023 ± 0.00214 1/cm: blank"
                                + " and cell are not alike. The slope is used, so a constant offset does no harm."),
                warnings());
    }

    /** 0.002 d² of absorbance: the parabola stands 10/3 of that from its line at the ends, 0.0154 /cm. */
    @Test
    void aLineThatBends() {
        double[] parabola = new double[6];
        for (int i = 0; i < 6; i++) parabola[i] = (i - 2.5) * (i - 2.5) - 35.0 / 12;
        at(600, false, times(parabola, -0.002));
        at(700, false, times(SCATTER, 0.0003));
        List<String> said = warnings().stream().filter(w -> w.contains("bends")).toList();
        assertEquals(
                List.of("At 600 nm the line bends, most clearly by -0.0154 1/cm at 600 nm (F-test, probability below"
                        + " 1e-9): the thick end reads too clear, by scattered or stray light. Dilute further."),
                said);
        readings.clear();
        double[] mixed = new double[6];
        for (int i = 0; i < 6; i++) mixed[i] = 0.002 * parabola[i] + 0.0002 * SCATTER[i];
        at(600, false, times(parabola, 0.001));
        at(700, false, mixed);
        said = warnings().stream().filter(w -> w.contains("bends")).toList();
        assertEquals(1, said.size(), said.toString());
        assertTrue(
                said.get(0).startsWith("At all wavelengths the line bends, most clearly by 0.00768 1/cm at 600 nm"),
                "the one without scatter is the clearest: " + said);
        assertTrue(said.get(0).endsWith("check the dilutions."), said.toString());
    }

    @Test
    void tooFewDilutions() {
        at(600, true, new double[] {0, 0.0004, 0});
        at(700, true, times(SCATTER, 0.0003));
        assertEquals(
                List.of("At 600 nm there are too few dilutions to test whether the line is straight; take at least 4."),
                warnings());
    }

    /** Absorbance 0.1 · 6 + 1.4001 is above 2, where stray light counts; 2 itself is not. */
    @Test
    void absorbanceAboveTwo() {
        at(600, true, plus(times(SCATTER, 0.0003), 1.4001));
        at(700, true, times(SCATTER, 0.0003));
        assertTrue(
                warnings().contains("At 600 nm the absorbance reaches 2, above 2, where stray light counts."),
                warnings().toString());
        readings.clear();
        at(600, true, plus(NONE, 1.39));
        assertTrue(
                warnings().stream().noneMatch(w -> w.contains("absorbance reaches")),
                warnings().toString());
    }

    /** Half of the extinction is scattered: depth 0.5 · 0.6 ln 10 = 0.691 passes; all of it, 1.38, is said. */
    @Test
    void scatteringDepth() {
        at(600, true, times(SCATTER, 0.0003));
        at(700, true, times(SCATTER, 0.0003));
        assertEquals(
                List.of(),
                new DilutionSeries("ink-demo", 1, 0.5, 0, 0, readings).fit().warnings());
        assertEquals(
                List.of("At all wavelengths the scattering depth reaches 1.38, above 1: part of the scattered light is"
                        + " read as transmitted and the extinction comes out low."),
                new DilutionSeries("ink-demo", 1, 1, 0, 0, readings).fit().warnings());
        assertEquals(0.6 * LN10, readings.get(5).opticalDepth(), 1e-12);
    }

    /**
     * The third dilution reads 0.045 too much on a line of 0.1 a step: it pulls the slope by −0.5 · 0.045/17.5 = −0.00129, so the line
     * without it is 1.3 % steeper. At 800 nm it is the sixth, 0.03 too little: the slope without it is 0.1, with it 0.1 − 2.5 · 0.03/17.5.
     */
    @Test
    void anOutlierAndWhatItDoes() {
        double[] third = {0, 0, 0.045, 0, 0, 0};
        double[] less = {0, 0, 0.022, 0, 0, 0};
        double[] sixth = {0, 0, 0, 0, 0, -0.03};
        at(600, false, less);
        at(700, false, third);
        at(800, false, sixth);
        List<String> said =
                warnings().stream().filter(w -> w.startsWith("The dilution")).toList();
        assertEquals(
                List.of(
                        "The dilution of 3 g/mL lies off the line of the others at 600, 700 nm; it was kept. Without it"
                                + " the extinction would change by up to 1.3 %.",
                        "The dilution of 6 g/mL lies off the line of the others at 800 nm; it was kept. Without it the"
                                + " extinction would change by up to 4.5 %."),
                said);
    }
}
