package org.hazewright.transport;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import java.util.function.DoubleUnaryOperator;
import org.hazewright.optics.Refusal;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.MethodSource;

/** What must hold between the steady, modulated and pulsed signals of one medium, whatever it is. */
class DiffusionPropertyTest {
    record Case(Medium medium, double outside, Double thickness, Convention convention, double rho, Side side) {
        Diffusion diffusion() {
            return new Diffusion(medium, outside, thickness, convention);
        }
    }

    static List<Case> cases() {
        Random random = new Random(6);
        List<Case> all = new ArrayList<>();
        for (int i = 0; i < 40; i++) {
            double musp = Math.exp(random.nextDouble() * 3 + 1);
            double mua = musp * Math.exp(-2 - 5 * random.nextDouble());
            double n = 1.3 + 0.3 * random.nextDouble();
            Double thickness = i % 2 == 0 ? null : (2 + 30 * random.nextDouble()) * 10 / musp;
            Convention c = new Convention(
                    Convention.Form.values()[i / 2 % 2],
                    Convention.DiffusionConstant.values()[i / 4 % 2],
                    Convention.SourceStrength.values()[i / 8 % 2],
                    Convention.Per.values()[i / 16 % 2]);
            Side side = i % 4 == 3 ? Side.TRANSMITTANCE : Side.REFLECTANCE;
            double rho = (0.5 + 25 * random.nextDouble()) * 10 / musp;
            all.add(new Case(new Medium(mua, musp, 0.8, n), i % 5 == 0 ? 1.5 : 1, thickness, c, rho, side));
        }
        return all;
    }

    /** Trapezoidal rule in ln t over 16 decades, which converges exponentially for these curves. */
    private static double integral(DoubleUnaryOperator f) {
        double sum = 0;
        for (double u = Math.log(1e-6); u < Math.log(1e10); u += 0.02)
            sum += f.applyAsDouble(Math.exp(u)) * Math.exp(u);
        return 0.02 * sum;
    }

    @ParameterizedTest
    @MethodSource("cases")
    void timeIntegralIsTheSteadySignal(Case c) {
        Diffusion d = c.diffusion();
        TimeSignal pulse = new TimeSignal(d);
        double steady = new SteadySignal(d).perMm2(c.rho, c.side);
        assertEquals(steady, integral(t -> pulse.perMm2PerPs(c.rho, t, c.side)), 1e-8 * steady);
    }

    @ParameterizedTest
    @MethodSource("cases")
    void transformOfThePulseIsTheModulatedSignal(Case c) {
        Diffusion d = c.diffusion();
        TimeSignal pulse = new TimeSignal(d);
        double megahertz = 250;
        double omega = 2 * Math.PI * 1e-6 * megahertz;
        double re = integral(t -> Math.cos(omega * t) * pulse.perMm2PerPs(c.rho, t, c.side));
        double im = integral(t -> Math.sin(omega * t) * pulse.perMm2PerPs(c.rho, t, c.side));
        FrequencySignal wave = new FrequencySignal(d, megahertz);
        double amplitude = Math.hypot(re, im);
        assertEquals(amplitude, wave.amplitudePerMm2(c.rho, c.side), 1e-7 * amplitude);
        double turns = (wave.phaseDeg(c.rho, c.side) - Math.toDegrees(Math.atan2(im, re))) / 360;
        assertEquals(Math.rint(turns), turns, 1e-7);
    }

    @ParameterizedTest
    @MethodSource("cases")
    void momentsAreThoseOfThePulse(Case c) {
        Diffusion d = c.diffusion();
        TimeSignal pulse = new TimeSignal(d);
        double s0 = integral(t -> pulse.perMm2PerPs(c.rho, t, c.side));
        double s1 = integral(t -> t * pulse.perMm2PerPs(c.rho, t, c.side));
        double mean = s1 / s0;
        double variance = integral(t -> (t - mean) * (t - mean) * pulse.perMm2PerPs(c.rho, t, c.side)) / s0;
        TimeMoments m = new TimeMoments(d, c.side);
        assertEquals(mean, m.meanPs(c.rho), 1e-7 * mean);
        assertEquals(variance, m.variancePs2(c.rho), 1e-6 * variance);
    }

    /** ∫ R(ρ) 2πρ dρ is the total; substitution ρ = exp(u). */
    @ParameterizedTest
    @MethodSource("cases")
    void surfaceIntegralIsTheTotal(Case c) {
        Diffusion d = c.diffusion();
        SteadySignal s = new SteadySignal(d);
        double sum = 0;
        for (double u = Math.log(1e-5); u < Math.log(1e4); u += 0.02) {
            double rho = Math.exp(u);
            sum += 0.02 * 2 * Math.PI * rho * rho * s.perMm2(rho, c.side);
        }
        double total = c.side == Side.REFLECTANCE ? d.totalReflectance() : d.totalTransmittance();
        assertEquals(total, sum, 2e-6 * total);
    }

    /** The two sums for one slab agree where they change over, for light and dark slabs. */
    @Test
    void imagesAndWavesMeet() {
        for (double mua : new double[] {0, 0.001, 0.1, 2}) {
            Diffusion d = new Diffusion(new Medium(mua, 10, 0.8, 1.4), 1, 12.0, Convention.DEFAULT);
            SteadySignal s = new SteadySignal(d);
            for (double share : new double[] {0.05, 0.5, 0.8, 2}) {
                double rho = share * d.extrapolatedThicknessMm();
                for (Side side : Side.values()) {
                    double below = s.perMm2(rho * (1 - 1e-9), side);
                    double above = s.perMm2(rho * (1 + 1e-9), side);
                    assertEquals(below, above, 2e-7 * below, mua + " " + share + " " + side);
                }
            }
        }
    }

    @Test
    void thickSlabIsSemiInfinite() {
        Medium m = new Medium(0.2, 10, 0.8, 1.4);
        Diffusion half = new Diffusion(m, 1);
        Diffusion slab = new Diffusion(m, 1, 200.0, Convention.DEFAULT);
        for (double rho : new double[] {1, 10, 40}) {
            double r = new SteadySignal(half).reflectancePerMm2(rho);
            assertEquals(r, new SteadySignal(slab).reflectancePerMm2(rho), 1e-9 * r);
        }
        assertEquals(half.totalReflectance(), slab.totalReflectance(), 1e-12);
    }

    /** Without absorption all light leaves a slab: the flux form conserves energy exactly. */
    @Test
    void withoutAbsorptionNothingIsLost() {
        Convention flux = new Convention(
                Convention.Form.FLUX,
                Convention.DiffusionConstant.WITH_ABSORPTION,
                Convention.SourceStrength.UNIT,
                Convention.Per.ENTERED);
        Diffusion slab = new Diffusion(new Medium(0, 10, 0.8, 1.4), 1, 15.0, flux);
        assertEquals(1, slab.totalReflectance() + slab.totalTransmittance(), 1e-12);
        assertEquals(1, new Diffusion(new Medium(0, 10, 0.8, 1.4), 1, null, flux).totalReflectance(), 1e-12);
    }

    /** The lag grows without jumps, through whole turns, in the open medium and through slabs. */
    @ParameterizedTest
    @CsvSource({"0, REFLECTANCE, 720", "12, REFLECTANCE, 360", "12, TRANSMITTANCE, 360", "30, TRANSMITTANCE, 720"})
    void phaseIsUnwrapped(double thick, Side side, double least) {
        Medium m = new Medium(0.1, 10, 0.8, 1.4);
        Diffusion d = new Diffusion(m, 1, thick == 0 ? null : (Double) thick, Convention.DEFAULT);
        double before = 0;
        for (double mhz = 10; mhz < 20_000; mhz *= 1.05) {
            double lag = new FrequencySignal(d, mhz).phaseDeg(40, side);
            assertTrue(lag > before && lag < before + 120, mhz + " MHz: " + before + " to " + lag);
            before = lag;
        }
        assertTrue(before > least);
    }

    @Test
    void smallFrequencyLagIsTheMeanTime() {
        Diffusion d = new Diffusion(new Medium(0.1, 10, 0.8, 1.4), 1);
        double lag = Math.toRadians(new FrequencySignal(d, 0.01).phaseDeg(25, Side.REFLECTANCE));
        double mean = new TimeMoments(d, Side.REFLECTANCE).meanPs(25);
        assertEquals(mean, lag / (2 * Math.PI * 1e-8), 1e-6 * mean);
    }

    @Test
    void varianceWithoutAbsorptionIsRefused() {
        TimeMoments m = new TimeMoments(new Diffusion(new Medium(0, 10, 0.8, 1.4), 1), Side.REFLECTANCE);
        assertTrue(m.meanPs(20) > 0);
        assertThrows(Refusal.class, () -> m.variancePs2(20));
    }

    /** Every factor of the convention does what its words say. */
    @Test
    void conventionsScale() {
        Medium m = new Medium(0.5, 10, 0.8, 1.4);
        Convention.Form f = Convention.Form.FLUX;
        Convention.DiffusionConstant c = Convention.DiffusionConstant.WITH_ABSORPTION;
        double unit = at(m, new Convention(f, c, Convention.SourceStrength.UNIT, Convention.Per.ENTERED));
        double albedo = at(m, new Convention(f, c, Convention.SourceStrength.ALBEDO, Convention.Per.ENTERED));
        double incident = at(m, new Convention(f, c, Convention.SourceStrength.UNIT, Convention.Per.INCIDENT));
        assertEquals(10 / 10.5, albedo / unit, 1e-12);
        assertEquals(1 - Math.pow(0.4 / 2.4, 2), incident / unit, 1e-12);
    }

    private static double at(Medium m, Convention c) {
        return new SteadySignal(new Diffusion(m, 1, null, c)).reflectancePerMm2(20);
    }
}
