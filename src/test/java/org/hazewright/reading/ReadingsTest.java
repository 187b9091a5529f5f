package org.hazewright.reading;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNotNull;
import static org.junit.jupiter.api.Assertions.assertNull;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import org.hazewright.optics.Refusal;
import org.hazewright.optics.Spectrum;
import org.hazewright.transport.Collimated;
import org.hazewright.transport.Diffusion;
import org.hazewright.transport.DiffusionRange;
import org.hazewright.transport.Medium;
import org.hazewright.transport.Response;
import org.hazewright.transport.Side;
import org.hazewright.transport.SteadySignal;
import org.hazewright.transport.TimeAxis;
import org.hazewright.transport.TimeMoments;
import org.hazewright.transport.TimeSignal;
import org.junit.jupiter.api.Test;

class ReadingsTest {
    private static final Medium TYPICAL = new Medium(0.1, 10, 0.8, 1.4);
    private static final Spread SPREAD = new Spread(0.004, 0.3);

    private static SetUp.Draft of(SetUp.Kind kind) {
        return SetUp.of("Probe", kind).wavelengthsNm(List.of(690.0)).packets(20_000);
    }

    private static List<Reading> read(SetUp setUp, Medium medium) {
        return Readings.of(
                setUp, Foresight.of(nm -> medium).uncertain(nm -> SPREAD).onThreads(1));
    }

    private static Reading only(List<Reading> all, Quantity quantity) {
        List<Reading> found = all.stream().filter(r -> r.quantity() == quantity).toList();
        assertEquals(1, found.size(), quantity.word());
        return found.get(0);
    }

    @Test
    void steadyReadingSaysItsForm() {
        Reading r = read(of(SetUp.Kind.REFLECTANCE).distancesMm(List.of(25.0)).done(), TYPICAL)
                .get(0);
        assertEquals(new SteadySignal(new Diffusion(TYPICAL, 1)).reflectancePerMm2(25), r.value(), 1e-15);
        assertEquals("diffusion: flux-and-fluence, D with absorption, unit source, per power entered", r.model());
        assertTrue(r.insideRange());
        assertNull(r.note());
        assertEquals("1/mm2", r.unit());
    }

    /** Uncertainty against a brute-force shift of µa and µs' by one standard uncertainty, second order being small. */
    @Test
    void uncertaintyIsCarriedThrough() {
        Spread small = new Spread(1e-4, 1e-2);
        SetUp setUp =
                of(SetUp.Kind.REFLECTANCE).distancesMm(List.of(20.0, 30.0)).done();
        List<Reading> all = Readings.of(setUp, Foresight.of(nm -> TYPICAL).uncertain(nm -> small));
        Reading db = only(all, Quantity.ATTENUATION_DB);
        double base = decibel(TYPICAL);
        double a = decibel(TYPICAL.withMua(0.1 + 1e-4)) - base;
        double s = decibel(TYPICAL.withMusp(10 + 1e-2)) - base;
        assertEquals(base, db.value(), 1e-12);
        assertEquals(Math.hypot(a, s), db.u(), 0.01 * db.u());
        assertEquals("dB", db.unit());
        assertTrue(db.note().contains("20.00 mm"));
    }

    private static double decibel(Medium m) {
        SteadySignal s = new SteadySignal(new Diffusion(m, 1));
        return 10 * Math.log10(s.reflectancePerMm2(20) / s.reflectancePerMm2(30));
    }

    @Test
    void withoutUncertaintyThereIsNone() {
        SetUp setUp = of(SetUp.Kind.REFLECTANCE).distancesMm(List.of(25.0)).done();
        assertNull(Readings.of(setUp, nm -> TYPICAL).get(0).u());
    }

    /** Near the beam packets answer, and they are right: against diffusion where both hold. */
    @Test
    void autoTakesPacketsNearTheBeam() {
        SetUp setUp = of(SetUp.Kind.REFLECTANCE).distancesMm(List.of(2.0, 12.0)).done();
        List<Reading> all = read(setUp, TYPICAL);
        assertEquals("packets", all.get(0).model());
        assertTrue(all.get(0).insideRange());
        assertTrue(all.get(0).note().contains("ring from 1.950 to 2.050 mm"));
        assertTrue(all.get(1).model().startsWith("diffusion"));
        Reading attenuation = only(all, Quantity.ATTENUATION_DB);
        assertTrue(
                attenuation.model().contains("packets") && attenuation.model().contains("diffusion"));
        SetUp insisted = of(SetUp.Kind.REFLECTANCE)
                .distancesMm(List.of(2.0))
                .model(SetUp.ModelChoice.DIFFUSION)
                .done();
        Reading guess = read(insisted, TYPICAL).get(0);
        assertFalse(guess.insideRange());
        assertTrue(guess.note().contains("transport lengths from the beam"));
    }

    /** The packets' own slopes give the same uncertainty as diffusion's where both hold. */
    @Test
    void packetsCarryUncertaintyToo() {
        SetUp.Draft draft = of(SetUp.Kind.REFLECTANCE).distancesMm(List.of(8.0)).packets(60_000);
        Reading packets =
                read(draft.model(SetUp.ModelChoice.PACKETS).done(), TYPICAL).get(0);
        Reading diffusion =
                read(draft.model(SetUp.ModelChoice.DIFFUSION).done(), TYPICAL).get(0);
        assertEquals(diffusion.value(), packets.value(), 0.25 * diffusion.value());
        assertEquals(diffusion.u() / diffusion.value(), packets.u() / packets.value(), 0.05);
    }

    @Test
    void tooFewPacketsFallBackAndSaySo() {
        Medium dark = new Medium(3, 10, 0.8, 1.4);
        SetUp setUp = of(SetUp.Kind.REFLECTANCE)
                .distancesMm(List.of(30.0))
                .packets(2000)
                .done();
        Reading r = read(setUp, dark).get(0);
        assertFalse(r.insideRange());
        assertTrue(r.note().contains("ask for more packets"), r.note());
        assertTrue(r.model().startsWith("diffusion"));
        Medium clear = new Medium(1, 0, 0, 1.4);
        Reading none = read(setUp, clear).get(0);
        assertNull(none.value());
        assertEquals("none", none.model());
        assertNotNull(none.note());
    }

    @Test
    void slopeShowsItsBias() {
        SetUp setUp =
                of(SetUp.Kind.SLOPE).distancesMm(List.of(20.0, 25.0, 30.0)).done();
        Reading r = only(read(setUp, TYPICAL), Quantity.APPARENT_MUA_PER_CM);
        assertEquals(0.1, r.value(), 0.01);
        assertTrue(r.value() != 0.1 && r.note().contains("0.1"));
        // u(µa) of a slope: d(µa)/µa = 2 dκ/κ, so at least u(µa) itself survives
        assertEquals(0.005, r.u(), 0.0015);
    }

    @Test
    void frequencyReadings() {
        SetUp setUp = of(SetUp.Kind.FREQUENCY)
                .distancesMm(List.of(30.0))
                .modulationMhz(100.0)
                .done();
        List<Reading> all = read(setUp, TYPICAL);
        assertEquals(0.9616, only(all, Quantity.MODULATION).value(), 1e-4);
        assertEquals(36.89, only(all, Quantity.PHASE_DEG).value(), 0.01);
        assertEquals("deg", only(all, Quantity.PHASE_DEG).unit());
        assertEquals(0.1, only(all, Quantity.APPARENT_MUA_PER_CM).value(), 1e-6);
        assertEquals(10, only(all, Quantity.APPARENT_MUSP_PER_CM).value(), 1e-5);
        // an analysis that finds the true values passes their uncertainties on unchanged
        assertEquals(SPREAD.uMuaPerCm(), only(all, Quantity.APPARENT_MUA_PER_CM).u(), 1e-5);
        assertEquals(
                SPREAD.uMuspPerCm(), only(all, Quantity.APPARENT_MUSP_PER_CM).u(), 1e-3);
    }

    /** Phase and modulation from counted packets agree with diffusion's within their own errors and the stated range. */
    @Test
    void frequencyFromPackets() {
        SetUp.Draft draft = of(SetUp.Kind.FREQUENCY)
                .distancesMm(List.of(10.0))
                .modulationMhz(300.0)
                .packets(60_000);
        List<Reading> packets = Readings.of(
                draft.model(SetUp.ModelChoice.PACKETS).done(),
                Foresight.of(nm -> TYPICAL).onThreads(2));
        List<Reading> diffusion =
                Readings.of(draft.model(SetUp.ModelChoice.DIFFUSION).done(), nm -> TYPICAL);
        Reading phase = only(packets, Quantity.PHASE_DEG);
        double expected = only(diffusion, Quantity.PHASE_DEG).value();
        assertEquals(expected, phase.value(), 3 * phase.u() + DiffusionRange.TIME_ERROR * expected);
        assertTrue(phase.u() < 0.1 * expected);
        Reading modulation = only(packets, Quantity.MODULATION);
        assertEquals(only(diffusion, Quantity.MODULATION).value(), modulation.value(), 3 * modulation.u() + 0.01);
    }

    @Test
    void timeReadings() {
        Response response = new Response(new double[] {-50, 0, 100}, new double[] {0, 9, 0});
        SetUp setUp = of(SetUp.Kind.TIME)
                .distancesMm(List.of(30.0))
                .time(new TimeAxis(0, 5000, 5))
                .response(response)
                .counts(1e6)
                .done();
        List<Reading> all = read(setUp, TYPICAL);
        Reading curve = only(all, Quantity.TIME_CURVE);
        assertEquals("counts", curve.unit());
        assertEquals(1001, curve.curve().y().length);
        assertEquals(1e6, Arrays.stream(curve.curve().y()).sum(), 1e-3);
        assertEquals(1001, curve.curve().u().length);
        // scaled to fixed counts, some bins go up and others down with µa: the changes sum to 0, the uncertainties do
        // not
        assertTrue(Arrays.stream(curve.curve().u()).sum() > 0);
        TimeMoments m = new TimeMoments(new Diffusion(TYPICAL, 1), Side.REFLECTANCE);
        Reading mean = only(all, Quantity.MEAN_TIME_PS);
        assertEquals(m.meanPs(30) + 50 / 3.0, mean.value(), 1e-6);
        assertTrue(mean.note().contains("response's own mean"));
        assertEquals(
                m.variancePs2(30) + response.variancePs2(),
                only(all, Quantity.TIME_VARIANCE_PS2).value(),
                1e-3);
        assertEquals(0.1, only(all, Quantity.APPARENT_MUA_PER_CM).value(), 1e-6);
    }

    @Test
    void timeFromPackets() {
        SetUp setUp = of(SetUp.Kind.TIME)
                .distancesMm(List.of(4.0))
                .time(new TimeAxis(100, 1500, 20))
                .packets(40_000)
                .done();
        List<Reading> all = read(setUp, TYPICAL);
        Reading curve = only(all, Quantity.TIME_CURVE);
        assertEquals("packets", curve.model());
        assertEquals("1/(mm2 ps)", curve.unit());
        double[] y = curve.curve().y();
        assertEquals(71, y.length);
        // late light decays with absorption and spreading in any model: compare the sum with diffusion's
        TimeSignal t = new TimeSignal(new Diffusion(TYPICAL, 1));
        double expected = 0;
        for (double x : curve.curve().x()) expected += t.perMm2PerPs(4, x, Side.REFLECTANCE);
        assertEquals(expected, Arrays.stream(y).sum(), 0.2 * expected);
    }

    @Test
    void noVarianceWithoutAbsorption() {
        SetUp setUp = of(SetUp.Kind.TIME)
                .distancesMm(List.of(30.0))
                .time(new TimeAxis(0, 5000, 5))
                .done();
        Reading r = only(read(setUp, TYPICAL.withMua(0)), Quantity.TIME_VARIANCE_PS2);
        assertNull(r.value());
        assertTrue(r.note().contains("not finite"));
    }

    @Test
    void progressCountsAllWavelengths() {
        List<Double> told = new ArrayList<>();
        SetUp setUp = of(SetUp.Kind.SLAB)
                .wavelengthsNm(List.of(690.0, 760.0, 830.0))
                .thicknessMm(1.0)
                .model(SetUp.ModelChoice.PACKETS)
                .packets(4000)
                .done();
        Readings.of(setUp, Foresight.of(nm -> TYPICAL).onThreads(1).watched(told::add, () -> false));
        assertEquals(
                List.of(1 / 6.0, 2 / 6.0, 3 / 6.0, 4 / 6.0, 5 / 6.0, 1.0),
                told.stream().map(x -> Math.rint(x * 6) / 6).toList());
    }

    @Test
    void slabByThreeModels() {
        SetUp.Draft draft = of(SetUp.Kind.SLAB).thicknessMm(12.0).packets(60_000);
        List<Reading> auto = read(draft.done(), TYPICAL);
        assertEquals("transport", auto.get(0).model());
        List<Reading> packets = read(draft.model(SetUp.ModelChoice.PACKETS).done(), TYPICAL);
        List<Reading> diffusion = read(draft.model(SetUp.ModelChoice.DIFFUSION).done(), TYPICAL);
        for (Quantity q : List.of(Quantity.TOTAL_REFLECTANCE, Quantity.TOTAL_TRANSMITTANCE)) {
            double exact = only(auto, q).value();
            assertEquals(exact, only(packets, q).value(), 0.01);
            assertEquals(exact, only(diffusion, q).value(), 0.05 * exact);
        }
        double sum = only(auto, Quantity.SPECULAR_REFLECTANCE).value()
                + only(auto, Quantity.DIFFUSE_REFLECTANCE).value();
        assertEquals(sum, only(auto, Quantity.TOTAL_REFLECTANCE).value(), 1e-12);
        assertTrue(only(auto, Quantity.TOTAL_TRANSMITTANCE).u() > 0.001);
    }

    /** A nearly clear slab: what the far face returns unscattered is counted and named. */
    @Test
    void farFaceIsNamed() {
        SetUp setUp = of(SetUp.Kind.SLAB).thicknessMm(1.0).done();
        Medium clear = new Medium(0.1, 0.1, 0, 1.5);
        List<Reading> all = read(setUp, clear);
        Reading total = only(all, Quantity.TOTAL_REFLECTANCE);
        assertTrue(total.note().contains("returned by the far face"));
        double parts = only(all, Quantity.SPECULAR_REFLECTANCE).value()
                + only(all, Quantity.DIFFUSE_REFLECTANCE).value()
                + new Collimated(clear, 1, 1).returned();
        assertEquals(parts, total.value(), 1e-12);
    }

    @Test
    void collimatedReadings() {
        SetUp setUp =
                of(SetUp.Kind.COLLIMATED).thicknessMm(10.0).outsideIndex(1.33).done();
        Medium thin = new Medium(0.2, 0.05, 0.9, 1.33);
        List<Reading> all = read(setUp, thin);
        assertEquals(
                Math.exp(-0.7), only(all, Quantity.UNSCATTERED_TRANSMITTANCE).value(), 1e-12);
        assertEquals(7 / Math.log(10), only(all, Quantity.ATTENUATION_DB).value(), 1e-12);
        // u(dB) = 10/ln 10 · d · √(u(µa)² + (u(µs')/(1 − g))²)
        double u = 10 / Math.log(10) * Math.hypot(0.004, 3);
        assertEquals(u, only(all, Quantity.ATTENUATION_DB).u(), 1e-6 * u);
        assertTrue(only(all, Quantity.ATTENUATION_DB).insideRange());
        Reading turbid = only(read(setUp, TYPICAL), Quantity.ATTENUATION_DB);
        assertFalse(turbid.insideRange());
        assertTrue(turbid.note().contains("scattered"));
    }

    @Test
    void oximeterReadings() {
        double[] nm = {690, 830};
        Oximeter o = new Oximeter(
                "a table",
                new Spectrum("oxy", nm, new double[] {276, 974}),
                new Spectrum("deoxy", nm, new double[] {2052, 693}),
                x -> 0.01);
        SetUp setUp = SetUp.of("Finger", SetUp.Kind.OXIMETER)
                .wavelengthsNm(List.of(690.0, 830.0))
                .done();
        Foresight f = Foresight.of(x -> new Medium(0.01 + o.muaPerCm(x, 60, 0.7), 10, 0.8, 1.4))
                .uncertain(x -> SPREAD)
                .with(o);
        List<Reading> all = Readings.of(setUp, f);
        Reading saturation = only(all, Quantity.SATURATION);
        assertEquals(0.7, saturation.value(), 1e-9);
        assertNull(saturation.wavelengthNm());
        assertTrue(saturation.u() > 0 && saturation.insideRange());
        assertEquals(60, only(all, Quantity.HAEMOGLOBIN_UMOL_PER_L).value(), 1e-7);
        assertThrows(Refusal.class, () -> Readings.of(setUp, x -> TYPICAL));
    }

    /** No reading ever holds a value that is not a number, and each says its model. */
    @Test
    void nothingIsNaN() {
        Medium[] media = {TYPICAL, new Medium(0, 10, 0.9, 1.33), new Medium(5, 1, 0, 1.5), new Medium(1, 0, 0, 1.4)};
        List<SetUp> setUps = List.of(
                of(SetUp.Kind.REFLECTANCE)
                        .distancesMm(List.of(0.5, 15.0))
                        .packets(2000)
                        .done(),
                of(SetUp.Kind.SLOPE)
                        .distancesMm(List.of(10.0, 15.0))
                        .thicknessMm(4.0)
                        .packets(2000)
                        .done(),
                of(SetUp.Kind.FREQUENCY)
                        .distancesMm(List.of(10.0))
                        .modulationMhz(100.0)
                        .packets(2000)
                        .done(),
                of(SetUp.Kind.TIME)
                        .distancesMm(List.of(10.0))
                        .time(new TimeAxis(0, 2000, 20))
                        .packets(2000)
                        .done(),
                of(SetUp.Kind.SLAB).thicknessMm(2.0).done(),
                of(SetUp.Kind.COLLIMATED).thicknessMm(2.0).done());
        for (Medium m : media)
            for (SetUp s : setUps)
                for (Reading r : read(s, m)) {
                    if (r.value() != null) assertTrue(Double.isFinite(r.value()), r.toString());
                    else assertTrue(r.curve() != null || r.note() != null, r.toString());
                    if (r.u() != null) assertTrue(Double.isFinite(r.u()) && r.u() >= 0, r.toString());
                    assertFalse(r.model().isBlank());
                }
    }
}
