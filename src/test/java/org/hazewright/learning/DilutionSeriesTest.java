package org.hazewright.learning;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.OptionalDouble;
import java.util.Random;
import org.hazewright.learning.DilutionReading.Signal;
import org.hazewright.mixture.DemoIngredients;
import org.hazewright.mixture.MassSpecific;
import org.hazewright.optics.Refusal;
import org.hazewright.optics.Spectrum;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Uncertainty;
import org.junit.jupiter.api.Test;

/** A bottle diluted and read: units, limits, warnings, and what the scatter says of the whole spectrum. */
class DilutionSeriesTest {
    private static final double[] C = {0.00004, 0.00008, 0.00012, 0.00016, 0.0002, 0.00024}; // g/mL
    private static final OptionalDouble NO_U = OptionalDouble.empty();

    private static DilutionReading transmission(double c, double mm, double nm, double t) {
        return new DilutionReading(c, mm, nm, Signal.TRANSMISSION, t, NO_U);
    }

    @Test
    void transmissionAndAbsorbanceSayTheSame() {
        // A = 1 is T = 0.1; in a cell of 5 mm both are µt = ln 10/0.5 cm.
        DilutionReading t = new DilutionReading(1e-4, 5, 700, Signal.TRANSMISSION, 0.1, OptionalDouble.of(0.001));
        DilutionReading a =
                new DilutionReading(1e-4, 5, 700, Signal.ABSORBANCE, 1, OptionalDouble.of(0.01 / Math.log(10)));
        assertEquals(2 * Math.log(10), t.extinctionPerCm(), 1e-14);
        assertEquals(t.extinctionPerCm(), a.extinctionPerCm(), 1e-14);
        assertEquals(0.02, t.uExtinctionPerCm().orElseThrow(), 1e-15); // (0.001/0.1)/0.5 cm
        assertEquals(0.02, a.uExtinctionPerCm().orElseThrow(), 1e-15);
        assertEquals(Math.log(10), t.opticalDepth(), 1e-14);
    }

    @Test
    void massFractionsBecomeGramsPerMillilitre() {
        assertEquals(
                0.5 / (0.25 + 0.5), DilutionReading.gPerMl(0.5, 2, 1), 1e-15); // 1 g in 0.5 g / 2 + 0.5 g / 1 doubled
        assertEquals(1.3, DilutionReading.gPerMl(1, 1.3, 1), 1e-15);
        assertEquals(0, DilutionReading.gPerMl(0, 1.3, 1));
    }

    /** Beer–Lambert readings of the published ink give its extinction back, whatever the cell, the blank and the signal. */
    @Test
    void exactReadingsGiveTheExtinctionBack() {
        Spectrum published = DemoIngredients.publishedInk();
        List<DilutionReading> readings = new ArrayList<>();
        double blank = 0.03; // 1/cm that the cell adds
        for (double nm : published.wavelengthsNm())
            for (int i = 0; i < C.length; i++) {
                double mm = i % 2 == 0 ? 10 : 5;
                double depth = (blank + published.at(nm) * C[i]) * mm / 10;
                readings.add(
                        i < 3
                                ? transmission(C[i], mm, nm, Math.exp(-depth))
                                : new DilutionReading(C[i], mm, nm, Signal.ABSORBANCE, depth / Math.log(10), NO_U));
            }
        DilutionFit fit = new DilutionSeries("ink-demo", 1.02, 0.15, 0.02, 0.002, readings).fit();
        for (Extinction e : fit.wavelengths()) {
            assertEquals(published.at(e.wavelengthNm()), e.cm2PerG(), 1e-7);
            assertEquals(blank, e.line().intercept(), 1e-10);
            assertEquals(0.85 * published.at(e.wavelengthNm()), e.absorbedCm2PerG(), 1e-7);
        }
        assertEquals(7300.7 * 1.02, fit.neatExtinctionPerCm("lot").at(680), 1e-6);
        // κ by mass of the shelf's own absorption: neat over density, times 1 − albedo.
        assertEquals(0.85 * 7300.7, fit.absorption("lot", 0.7).kappaCm2PerG(680), 1e-7);
        // No scatter: what is left is the common part and the albedo's, 0.002 and 0.02/0.85 and 0.02/0.15.
        Uncertainty u = fit.uncertainty();
        assertEquals(Math.hypot(0.002, 0.02 / 0.85), u.absorption(), 1e-9);
        assertEquals(Math.hypot(0.002, 0.02 / 0.15), u.scattering(), 1e-9);
        assertTrue(u.correlation() < -0.99, "an albedo too high is absorption too low");
    }

    /**
     * Dilutions that are off by 1 % at every wavelength against a detector that is off by 1 % on its own: simulated a thousand times, the
     * slopes' true relative spread against what the fit says of it.
     */
    @Test
    void sharedAndOwnScatterAreToldApart() {
        double[] both = spread(0.01, 0.01);
        assertEquals(both[0], both[2], 0.15 * both[0], "shared");
        assertEquals(both[1], both[3], 0.15 * both[1], "own");
        double[] dilutionsOnly = spread(0.01, 0);
        assertEquals(dilutionsOnly[0], dilutionsOnly[2], 0.15 * dilutionsOnly[0]);
        double[] detectorOnly = spread(0, 0.01);
        assertEquals(detectorOnly[1], detectorOnly[3], 0.15 * detectorOnly[1]);
        assertTrue(detectorOnly[2] < 0.35 * detectorOnly[3], "little of it is taken for shared");
    }

    /** True shared, true own, said shared, said own: root mean squares over runs. */
    private static double[] spread(double dilution, double detector) {
        double[] nm = {680, 730, 780, 830};
        Random random = new Random(4711);
        int runs = 1000;
        double shared = 0;
        double own = 0;
        double saidShared = 0;
        double saidOwn = 0;
        for (int run = 0; run < runs; run++) {
            double[] off = new double[C.length];
            for (int i = 0; i < C.length; i++) off[i] = 1 + dilution * random.nextGaussian();
            List<DilutionReading> readings = new ArrayList<>();
            for (double w : nm)
                for (int i = 0; i < C.length; i++) {
                    double depth = 6000 * C[i] * off[i] + 6000 * C[3] * detector * random.nextGaussian();
                    readings.add(transmission(C[i], 10, w, Math.exp(-depth)));
                }
            DilutionFit fit = new DilutionSeries("ink-demo", 1, 0, 0, 0, readings).fit();
            double product = 0;
            double square = 0;
            for (Extinction e : fit.wavelengths()) {
                double d = e.cm2PerG() / 6000 - 1;
                square += d * d / nm.length;
                for (Extinction f : fit.wavelengths())
                    if (f != e) product += d * (f.cm2PerG() / 6000 - 1) / (nm.length * (nm.length - 1));
            }
            shared += product / runs;
            own += (square - product) / runs;
            saidShared += fit.shared() * fit.shared() / runs;
            saidOwn += fit.own() * fit.own() / runs;
        }
        return new double[] {Math.sqrt(Math.max(0, shared)), Math.sqrt(own), Math.sqrt(saidShared), Math.sqrt(saidOwn)};
    }

    @Test
    void aCurveIsFoundAndSaid() {
        List<DilutionReading> readings = new ArrayList<>();
        Random random = new Random(5);
        for (double nm : new double[] {680, 780})
            for (double c : C) {
                double seen = Math.exp(-6000 * c) + 0.02; // 2 % stray light
                readings.add(transmission(c, 10, nm, seen / 1.02 + 1e-4 * random.nextGaussian()));
            }
        DilutionFit fit = new DilutionSeries("ink-demo", 1, 0.15, 0, 0, readings).fit();
        for (Extinction e : fit.wavelengths()) {
            assertTrue(e.bends());
            assertTrue(e.linearity().orElseThrow().bend() < 0);
        }
        assertTrue(
                fit.warnings().stream().anyMatch(w -> w.startsWith("At all wavelengths the line bends")),
                fit.warnings().toString());
    }

    @Test
    void aWrongDilutionIsNamedOnceAndKept() {
        List<DilutionReading> readings = new ArrayList<>();
        Random random = new Random(6);
        for (double nm : new double[] {680, 730, 780})
            for (int i = 0; i < C.length; i++) {
                double depth = 5000 * C[i] * (i == 2 ? 1.15 : 1) + 0.001 * random.nextGaussian();
                readings.add(transmission(C[i], 10, nm, Math.exp(-depth)));
            }
        DilutionFit fit = new DilutionSeries("ink-demo", 1, 0.15, 0, 0, readings).fit();
        for (Extinction e : fit.wavelengths()) {
            assertEquals(C.length, e.line().points().size());
            assertTrue(e.line().points().get(2).outlier());
        }
        List<String> about = fit.warnings().stream()
                .filter(w -> w.startsWith("The dilution of 0.00012 g/mL"))
                .toList();
        assertEquals(1, about.size(), fit.warnings().toString());
        assertTrue(about.get(0).contains("all wavelengths") && about.get(0).contains("kept"));
    }

    @Test
    void scatteringDepthIsWarnedAboveOneAndRefusedAboveLnHundred() {
        List<DilutionReading> thin = series(0.9, 250);
        assertTrue(new DilutionSeries("emulsion-demo", 1, 1, 0, 0, thin)
                .fit().warnings().stream().noneMatch(w -> w.contains("scattering depth")));
        List<DilutionReading> thick = series(3, 250);
        assertTrue(new DilutionSeries("emulsion-demo", 1, 1, 0, 0, thick)
                .fit().warnings().stream().anyMatch(w -> w.contains("scattering depth reaches 3,")));
        // The same beam lost to absorption is no scattering at all.
        assertTrue(new DilutionSeries("emulsion-demo", 1, 0, 0, 0, thick)
                .fit().warnings().stream().noneMatch(w -> w.contains("scattering depth")));
        List<DilutionReading> opaque = series(5, 250);
        Refusal refusal = assertThrows(Refusal.class, () -> new DilutionSeries("emulsion-demo", 1, 1, 0, 0, opaque));
        assertTrue(refusal.getMessage().contains("cell of at most 2 mm"), refusal.getMessage());
        assertTrue(refusal.getMessage().contains("0.004 g/mL"), refusal.getMessage());
        new DilutionSeries("emulsion-demo", 1, 0.2, 0, 0, opaque);
    }

    /** Six dilutions in a 10 mm cell, the strongest of the given optical depth. */
    private static List<DilutionReading> series(double depth, double cm2PerG) {
        List<DilutionReading> readings = new ArrayList<>();
        for (int i = 1; i <= 5; i++) {
            double d = depth * i / 5;
            readings.add(transmission(d / cm2PerG, 10, 633, Math.exp(-d)));
        }
        return readings;
    }

    @Test
    void aScatterersMagnitudeIsMeasuredOverModelled() {
        Ingredient emulsion = DemoIngredients.emulsion(0.05);
        List<DilutionReading> readings = new ArrayList<>();
        for (double nm : new double[] {600, 700, 800})
            for (int i = 0; i <= 4; i++) {
                double c = 0.0003 * i;
                double mus = MassSpecific.of(emulsion, nm, 22, 1.33, 0).kappaMus();
                readings.add(new DilutionReading(
                        c, 10, nm, Signal.TRANSMISSION, Math.exp(-1.07 * mus * c), OptionalDouble.of(0.002)));
            }
        DilutionFit fit = new DilutionSeries("emulsion-demo", 0.986, 1, 0, 0.003, readings).fit();
        DilutionFit.Magnitude m = fit.magnitudeOf(emulsion, 1.33, 22);
        assertEquals(1.07, m.ratio(), 1e-9);
        assertEquals(2, m.degreesOfFreedom());
        assertTrue(m.u() > 0.003 && m.u() < 0.02, "u " + m.u());
        assertTrue(m.pValue() > 0.99, "the shape is the model's own");
    }

    @Test
    void refusesWhatIsNoDilutionSeries() {
        assertThrows(Refusal.class, () -> transmission(1e-4, 10, 700, 0));
        assertThrows(Refusal.class, () -> transmission(1e-4, 10, 700, 45)); // per cent
        assertThrows(Refusal.class, () -> transmission(-1e-4, 10, 700, 0.5));
        assertThrows(Refusal.class, () -> new DilutionReading(1e-4, 10, 700, Signal.ABSORBANCE, 30, NO_U));
        assertThrows(Refusal.class, () -> new DilutionSeries("ink-demo", 1, 0, 0, 0, List.of()));
        List<DilutionReading> mixed = List.of(
                transmission(1e-4, 10, 700, 0.5),
                new DilutionReading(2e-4, 10, 700, Signal.TRANSMISSION, 0.3, OptionalDouble.of(0.01)));
        assertTrue(assertThrows(Refusal.class, () -> new DilutionSeries("ink-demo", 1, 0, 0, 0, mixed))
                .getMessage()
                .contains("all or for none"));
        List<DilutionReading> two = List.of(transmission(1e-4, 10, 700, 0.5), transmission(2e-4, 10, 700, 0.3));
        assertTrue(assertThrows(Refusal.class, () -> new DilutionSeries("ink-demo", 1, 0, 0, 0, two).fit())
                .getMessage()
                .contains("700 nm"));
        List<DilutionReading> rising = List.of(
                transmission(1e-4, 10, 700, 0.3), transmission(2e-4, 10, 700, 0.5), transmission(3e-4, 10, 700, 0.7));
        assertThrows(Refusal.class, () -> new DilutionSeries("ink-demo", 1, 0, 0, 0, rising).fit());
    }

    @Test
    void oneWavelengthGivesNoSharedPart() {
        List<DilutionReading> readings = new ArrayList<>();
        Random random = new Random(8);
        for (double c : C) readings.add(transmission(c, 10, 780, Math.exp(-6000 * c + 0.01 * random.nextGaussian())));
        DilutionFit fit = new DilutionSeries("ink-demo", 1, 0, 0, 0, readings).fit();
        assertEquals(0, fit.shared());
        assertEquals(fit.wavelengths().get(0).relativeU(), fit.own(), 1e-15);
        assertFalse(fit.warnings().isEmpty());
        assertThrows(Refusal.class, () -> fit.neatExtinctionPerCm("lot"));
    }
}
