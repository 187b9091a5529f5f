package org.hazewright.transport;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.MethodSource;

class AddingDoublingPropertyTest {
    record Case(Medium medium, double outside, double thickness) {}

    static List<Case> cases() {
        Random random = new Random(35);
        List<Case> all = new ArrayList<>();
        double[] outsides = {1, 1, 1.33, 1.5};
        for (int i = 0; i < 60; i++) {
            double musp = Math.exp(-2 + 6 * random.nextDouble());
            double mua = i % 6 == 0 ? 0 : musp * Math.exp(-8 + 9 * random.nextDouble());
            double g = -0.3 + 1.25 * random.nextDouble();
            double n = i % 7 == 0 ? outsides[i % 4] : 1 + 0.7 * random.nextDouble();
            double thickness = Math.exp(-3 + 7 * random.nextDouble());
            all.add(new Case(new Medium(mua, musp, g, n), outsides[i % 4], thickness));
        }
        return all;
    }

    @ParameterizedTest
    @MethodSource("cases")
    void energyIsConserved(Case c) {
        SlabLight light = AddingDoubling.slab(c.medium, c.outside, c.thickness);
        if (c.medium.muaPerCm() == 0) assertEquals(0, light.absorbed(), 1e-8);
        else assertTrue(light.absorbed() > -1e-9, light.toString());
        assertTrue(light.diffuseReflectance() > 0);
    }

    @ParameterizedTest
    @MethodSource("cases")
    void moreAbsorptionMeansLessLight(Case c) {
        SlabLight less = AddingDoubling.slab(c.medium, c.outside, c.thickness);
        Medium dark = c.medium.withMua(c.medium.muaPerCm() * 1.2 + 0.01);
        SlabLight more = AddingDoubling.slab(dark, c.outside, c.thickness);
        assertTrue(more.diffuseReflectance() < less.diffuseReflectance() + 1e-12);
        assertTrue(more.totalTransmittance() < less.totalTransmittance() + 1e-12);
    }

    /** Only the products of length and coefficient matter. */
    @ParameterizedTest
    @MethodSource("cases")
    void tenTimesThinnerAndTenTimesStronger(Case c) {
        Medium strong = new Medium(c.medium.muaPerCm() * 10, c.medium.muspPerCm() * 10, c.medium.g(), c.medium.n());
        SlabLight a = AddingDoubling.slab(c.medium, c.outside, c.thickness);
        SlabLight b = AddingDoubling.slab(strong, c.outside, c.thickness / 10);
        assertEquals(a.diffuseReflectance(), b.diffuseReflectance(), 1e-10);
        assertEquals(a.diffuseTransmittance(), b.diffuseTransmittance(), 1e-10);
    }

    /** Twice as many directions and more change no share by more than the error that is promised. */
    @ParameterizedTest
    @CsvSource({
        "0.80, 1.40, 1",
        "0.80, 1.50, 1",
        "0.80, 1.33, 1.5",
        "0.90, 1.33, 1",
        "0.90, 1.40, 1",
        "0.90, 1.60, 1",
        "0.95, 1.33, 1",
        "0.95, 1.40, 1",
        "0.95, 1.50, 1.33",
        "0.95, 1.40, 1.4"
    })
    void directionsAreEnough(double g, double n, double outside) {
        for (double depth : new double[] {0.1, 1, 5, 50})
            for (double albedo : new double[] {0.5, 0.99, 0.9999}) {
                Medium m = new Medium(10 * depth * (1 - albedo), 10 * depth * albedo * (1 - g), g, n);
                SlabLight ours = AddingDoubling.slab(m, outside, 1);
                SlabLight fine = AddingDoubling.slab(m, outside, 1, 79);
                String at = "depth " + depth + ", albedo " + albedo;
                assertEquals(fine.diffuseReflectance(), ours.diffuseReflectance(), 1e-5, at);
                assertEquals(fine.diffuseTransmittance(), ours.diffuseTransmittance(), 1e-5, at);
            }
    }

    /** Single scattering in a very thin matched slab: half of it goes back when isotropic, R = a τ/2 (τ → 0). */
    @Test
    void thinMatchedSlab() {
        double tau = 1e-4;
        SlabLight light = AddingDoubling.slab(new Medium(10 * tau * 0.2, 10 * tau * 0.8, 0, 1), 1, 1);
        assertEquals(0.8 * tau / 2, light.diffuseReflectance(), 1e-3 * tau);
        assertEquals(0.8 * tau / 2, light.diffuseTransmittance(), 1e-3 * tau);
    }

    @ParameterizedTest
    @CsvSource({"0.5, 0.0", "0.1, 0.7", "0.02, 0.9"})
    void thickSlabIsSemiInfinite(double mua, double g) {
        Medium m = new Medium(mua, 10, g, 1.4);
        double half = AddingDoubling.semiInfinite(m, 1).diffuseReflectance();
        assertEquals(half, AddingDoubling.slab(m, 1, 400).diffuseReflectance(), 1e-9);
    }

    /** The light that leaks through a thick slab falls by one factor per mm, however little is left: no digits are lost. */
    @Test
    void deepLightFallsExponentially() {
        Medium m = new Medium(1, 10, 0.8, 1.4);
        double a = AddingDoubling.slab(m, 1, 40).diffuseTransmittance();
        double b = AddingDoubling.slab(m, 1, 80).diffuseTransmittance();
        double c = AddingDoubling.slab(m, 1, 120).diffuseTransmittance();
        assertTrue(c > 0 && c < 1e-20);
        assertEquals(b / a, c / b, 1e-6 * b / a);
        // and the factor is diffusion's within its own small error, 4 % at µa/µs' = 0.1
        double k = Math.log(a / b) / 40;
        assertEquals(m.muEffPerMm(), k, 0.04 * k);
    }

    @Test
    void semiInfiniteWithoutAbsorptionReturnsEverything() {
        SlabLight light = AddingDoubling.semiInfinite(new Medium(0, 10, 0.8, 1.4), 1);
        assertEquals(1, light.totalReflectance(), 1e-15);
    }
}
