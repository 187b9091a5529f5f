package org.hazewright.reading;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.hazewright.optics.Refusal;
import org.hazewright.transport.Convention;
import org.hazewright.transport.Diffusion;
import org.hazewright.transport.FrequencySignal;
import org.hazewright.transport.Medium;
import org.hazewright.transport.Response;
import org.hazewright.transport.Side;
import org.hazewright.transport.SteadySignal;
import org.hazewright.transport.TimeAxis;
import org.hazewright.transport.TimeCurve;
import org.hazewright.transport.TimeMoments;
import org.hazewright.transport.TimeSignal;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class ApparentTest {
    private static final Apparent.Known SEMI = new Apparent.Known(1.4, 0.8, 1, null, Convention.DEFAULT);

    private static Diffusion diffusion(double mua, double musp) {
        return new Diffusion(new Medium(mua, musp, 0.8, 1.4), 1);
    }

    /** Fits of data that diffusion made find what made them, from a start that knows nothing. */
    @ParameterizedTest
    @CsvSource({"0.1, 10", "0.02, 5", "0.4, 15", "0.05, 25"})
    void fitsFindWhatMadeTheData(double mua, double musp) {
        Diffusion d = diffusion(mua, musp);
        FrequencySignal f = new FrequencySignal(d, 140);
        Apparent wave =
                Apparent.frequency(25, f.modulation(25, Side.REFLECTANCE), f.phaseDeg(25, Side.REFLECTANCE), 140, SEMI);
        assertEquals(mua, wave.muaPerCm(), 1e-6 * mua);
        assertEquals(musp, wave.muspPerCm(), 1e-6 * musp);
        TimeMoments m = new TimeMoments(d, Side.REFLECTANCE);
        Apparent moments = Apparent.moments(25, m.meanPs(25), m.variancePs2(25), SEMI);
        assertEquals(mua, moments.muaPerCm(), 1e-6 * mua);
        assertEquals(musp, moments.muspPerCm(), 1e-6 * musp);
    }

    @ParameterizedTest
    @CsvSource({"0.1, 10", "0.02, 5", "0.4, 15"})
    void curveFitSeesThroughTheResponse(double mua, double musp) {
        TimeSignal t = new TimeSignal(diffusion(mua, musp));
        Response response = new Response(new double[] {-100, 0, 50, 300}, new double[] {0, 80, 100, 0});
        TimeCurve seen = TimeCurve.seen(
                        x -> t.perMm2PerPs(25, x, Side.REFLECTANCE), new TimeAxis(0, 6000, 10), response)
                .ofCounts(1e6);
        Apparent fit = Apparent.curve(25, seen, response, SEMI);
        assertEquals(mua, fit.muaPerCm(), 1e-5 * mua);
        assertEquals(musp, fit.muspPerCm(), 1e-5 * musp);
        // without the response the same fit is wrong, so the response matters
        Apparent naive = Apparent.curve(25, seen, null, SEMI);
        assertTrue(Math.abs(naive.muspPerCm() / musp - 1) > 0.02);
    }

    /** The slope of ln(ρ² R) tends to −µeff far away, and the µa it reports to the true one. */
    @Test
    void slopeIsRightFarAwayAndBiasedNear() {
        Diffusion d = diffusion(0.1, 10);
        double far = slope(d, 300, 320).muaPerCm();
        double near = slope(d, 3, 4).muaPerCm();
        assertEquals(0.1, far, 0.002);
        assertTrue(Math.abs(near - 0.1) > 0.02, "near the beam the slope method is biased: " + near);
    }

    private static Apparent slope(Diffusion d, double a, double b) {
        SteadySignal s = new SteadySignal(d);
        double[] mm = {a, b};
        double[] r = {s.reflectancePerMm2(a), s.reflectancePerMm2(b)};
        return Apparent.slope(mm, r, 10, Convention.DEFAULT);
    }

    /** An exact exponential over ρ²: the slope method's own model, both rules for D. */
    @Test
    void slopeOfItsOwnModel() {
        double mua = 0.02;
        double mus = 1.2;
        double[] mm = {10, 20, 35};
        for (Convention.DiffusionConstant rule : Convention.DiffusionConstant.values()) {
            boolean with = rule == Convention.DiffusionConstant.WITH_ABSORPTION;
            double k = Math.sqrt(3 * mua * (with ? mua + mus : mus));
            double[] r = new double[3];
            for (int i = 0; i < 3; i++) r[i] = Math.exp(-k * mm[i]) / (mm[i] * mm[i]);
            Convention c =
                    new Convention(Convention.Form.FLUX, rule, Convention.SourceStrength.UNIT, Convention.Per.ENTERED);
            assertEquals(10 * mua, Apparent.slope(mm, r, 10 * mus, c).muaPerCm(), 1e-12);
        }
    }

    /** Plane waves in a medium without surface, exp(−κρ)/ρ²: both slopes give µa and µs' back. */
    @Test
    void slopesOfTheirOwnModel() {
        double mua = 0.01;
        double transport = 1.01;
        double d = 1 / (3 * transport);
        double q = 2 * Math.PI * 1e-4 * 1.4 / Medium.LIGHT_MM_PER_PS;
        double modulus = Math.sqrt(Math.hypot(mua, q) / d);
        double half = 0.5 * Math.atan2(q, mua);
        double[] mm = {15, 25, 30};
        double[] a = new double[3];
        double[] p = new double[3];
        for (int i = 0; i < 3; i++) {
            a[i] = 7 * Math.exp(-modulus * Math.cos(half) * mm[i]) / (mm[i] * mm[i]);
            p[i] = 12 + Math.toDegrees(modulus * Math.sin(half) * mm[i]);
        }
        Apparent seen = Apparent.slopes(mm, a, p, 100, SEMI);
        assertEquals(0.1, seen.muaPerCm(), 1e-10);
        assertEquals(10, seen.muspPerCm(), 1e-9);
    }

    @Test
    void refusals() {
        assertThrows(Refusal.class, () -> Apparent.slope(new double[] {1}, new double[] {1}, 10, Convention.DEFAULT));
        assertThrows(
                Refusal.class, () -> Apparent.slope(new double[] {1, 2}, new double[] {1, 0}, 10, Convention.DEFAULT));
    }
}
