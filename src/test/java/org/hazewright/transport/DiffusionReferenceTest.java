package org.hazewright.transport;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.hazewright.optics.Refusal;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** Figures worked out from the published formulas in another program; two independent codes agreed to the digits shown. */
class DiffusionReferenceTest {
    private static Convention flux(Convention.DiffusionConstant d, Convention.SourceStrength s) {
        return new Convention(Convention.Form.FLUX, d, s, Convention.Per.ENTERED);
    }

    private static Diffusion typical(double n, Convention convention) {
        return new Diffusion(new Medium(0.1, 10, 0.8, n), 1, null, convention);
    }

    /** Farrell, Patterson &amp; Wilson, Med. Phys. 19, 879 (1992), without the factor a'; µa 0.01, µs' 1 /mm. */
    @ParameterizedTest
    @CsvSource({
        "1.40, 10, 1.56467e-4", "1.40, 20, 7.01722e-6", "1.40, 30, 5.36102e-7",
        "1.33, 10, 1.52687e-4", "1.33, 20, 6.53751e-6", "1.33, 30, 4.93056e-7"
    })
    void steadyReflectanceOfFarrell(double n, double rho, double expected) {
        Convention c = flux(Convention.DiffusionConstant.WITH_ABSORPTION, Convention.SourceStrength.UNIT);
        assertEquals(expected, new SteadySignal(typical(n, c)).reflectancePerMm2(rho), 5e-6 * expected);
    }

    @ParameterizedTest
    @CsvSource({"1.33, 0.650438", "1.40, 0.628292"})
    void totalReflectanceOfFarrell(double n, double expected) {
        Convention c = flux(Convention.DiffusionConstant.WITH_ABSORPTION, Convention.SourceStrength.ALBEDO);
        assertEquals(expected, typical(n, c).totalReflectance(), 1e-6);
    }

    /** Farrell et al. 1992, eq. 15, written with A as they print it. */
    @ParameterizedTest
    @CsvSource({"0.1, 10, 1.4", "1, 10, 1.33", "0.02, 20, 1.5"})
    void totalReflectanceAsPrinted(double mua, double musp, double n) {
        double a = musp / (mua + musp);
        double root = Math.sqrt(3 * (1 - a));
        double big = new Boundary(n, 1).factorA();
        double printed = a / 2 * (1 + Math.exp(-4.0 / 3 * big * root)) * Math.exp(-root);
        Convention c = flux(Convention.DiffusionConstant.WITH_ABSORPTION, Convention.SourceStrength.ALBEDO);
        double ours = new Diffusion(new Medium(mua, musp, 0.8, n), 1, null, c).totalReflectance();
        assertEquals(printed, ours, 1e-12);
    }

    /** Kienle &amp; Patterson, J. Opt. Soc. Am. A 14, 246 (1997): 0.118 Φ + 0.306 J for n 1.40, three digits each. */
    @Test
    void fluxAndFluenceOfKienleAndPatterson() {
        double d = 1 / (3 * 1.01);
        double zs = 1 / 1.01;
        double sink = zs + 4 * new Boundary(1.4, 1).factorA() * d;
        double k = Math.sqrt(0.01 / d);
        double rho = 10;
        double r1 = Math.hypot(rho, zs);
        double r2 = Math.hypot(rho, sink);
        double phi = (Math.exp(-k * r1) / r1 - Math.exp(-k * r2) / r2) / (4 * Math.PI * d);
        double j = (zs * (k + 1 / r1) * Math.exp(-k * r1) / (r1 * r1)
                        + sink * (k + 1 / r2) * Math.exp(-k * r2) / (r2 * r2))
                / (4 * Math.PI);
        double ours = new SteadySignal(typical(1.4, Convention.DEFAULT)).reflectancePerMm2(rho);
        assertEquals(0.118 * phi + 0.306 * j, ours, 0.003 * ours);
    }

    /** Patterson, Chance &amp; Wilson, Appl. Opt. 28, 2331 (1989), with the extrapolated boundary; D = 1/(3µs'), ρ 30 mm. */
    @ParameterizedTest
    @CsvSource({"1.33, 976.15", "1.40, 1030.56"})
    void meanTime(double n, double expected) {
        Convention c = flux(Convention.DiffusionConstant.WITHOUT_ABSORPTION, Convention.SourceStrength.UNIT);
        TimeMoments m = new TimeMoments(typical(n, c), Side.REFLECTANCE);
        assertEquals(expected, m.meanPs(30), 0.01);
        if (n == 1.40) assertEquals(2.022e5, m.variancePs2(30), 50);
    }

    @Test
    void modulatedLight() {
        Convention c = flux(Convention.DiffusionConstant.WITH_ABSORPTION, Convention.SourceStrength.UNIT);
        FrequencySignal f = new FrequencySignal(typical(1.4, c), 100);
        assertEquals(0.96145, f.modulation(30, Side.REFLECTANCE), 5e-6);
        assertEquals(37.013, f.phaseDeg(30, Side.REFLECTANCE), 5e-4);
    }

    /** Contini, Martelli &amp; Zaccanti, Appl. Opt. 36, 4587 (1997), eqs 36, 39, 45, 46, summed here over 60 images. */
    @ParameterizedTest
    @CsvSource({"20, 15", "40, 5", "30, 25", "15, 30"})
    void slabOfContini(double thickness, double rho) {
        Convention c = flux(Convention.DiffusionConstant.WITHOUT_ABSORPTION, Convention.SourceStrength.UNIT);
        Diffusion slab = new Diffusion(new Medium(0.1, 10, 0.8, 1.4), 1, thickness, c);
        double d = 1.0 / 3;
        double ze = 2 * new Boundary(1.4, 1).factorA() * d;
        double k = Math.sqrt(3 * 0.01);
        double r = 0;
        double t = 0;
        for (int m = -60; m <= 60; m++) {
            double z3 = -2 * m * thickness - 4 * m * ze - 1;
            double z4 = -2 * m * thickness - (4 * m - 2) * ze + 1;
            double z1 = (1 - 2 * m) * thickness - 4 * m * ze - 1;
            double z2 = (1 - 2 * m) * thickness - (4 * m - 2) * ze + 1;
            r -= (printed(z3, rho, k) - printed(z4, rho, k)) / (4 * Math.PI);
            t += (printed(z1, rho, k) - printed(z2, rho, k)) / (4 * Math.PI);
        }
        SteadySignal s = new SteadySignal(slab);
        assertEquals(r, s.reflectancePerMm2(rho), 1e-9 * r);
        assertEquals(t, s.transmittancePerMm2(rho), 1e-9 * t);
    }

    private static double printed(double z, double rho, double k) {
        double q = rho * rho + z * z;
        return z * (Math.pow(q, -1.5) + k / q) * Math.exp(-k * Math.sqrt(q));
    }

    @Test
    void refusesWhatItCannotSay() {
        Refusal clear = assertThrows(Refusal.class, () -> new Diffusion(new Medium(0.1, 0, 0, 1.4), 1));
        assertTrue(clear.getMessage().contains("transport"));
        Refusal thin = assertThrows(
                Refusal.class, () -> new Diffusion(new Medium(0.1, 10, 0.8, 1.4), 1, 0.5, Convention.DEFAULT));
        assertTrue(thin.getMessage().contains("transport length"));
        assertThrows(Refusal.class, () -> new SteadySignal(typical(1.4, Convention.DEFAULT)).transmittancePerMm2(3));
    }
}
