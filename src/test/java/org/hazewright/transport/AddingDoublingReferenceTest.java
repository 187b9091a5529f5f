package org.hazewright.transport;

import static org.junit.jupiter.api.Assertions.assertEquals;

import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class AddingDoublingReferenceTest {
    /** A slab of 1 mm with the given optical thickness. */
    private static SlabLight slab(double g, double albedo, double depth, double n) {
        double mut = 10 * depth;
        return AddingDoubling.slab(new Medium(mut * (1 - albedo), mut * albedo * (1 - g), g, n), 1, 1);
    }

    /**
     * Van de Hulst, Multiple Light Scattering, Academic Press (1980), table 35: normal incidence, matched, printed to five
     * digits. The other rows were worked out by an independent code of the same equation.
     */
    @ParameterizedTest
    @CsvSource({
        "0.75, 0.9, 2, 0.09739, 0.66096",
        "0.75, 0.9, 4, 0.14157, 0.39732",
        "0.75, 0.9, 8, 0.16297, 0.13061",
        "0.75, 0.9, 16, 0.16549, 0.01313",
        "0, 0.99, 8, 0.72875, 0.12207"
    })
    void matchedSlab(double g, double albedo, double depth, double r, double t) {
        SlabLight light = slab(g, albedo, depth, 1);
        assertEquals(r, light.totalReflectance(), 1e-5);
        assertEquals(t, light.totalTransmittance(), 1e-5);
    }

    /** Giovanelli, Opt. Acta 2, 153 (1955): semi-infinite, isotropic, albedo 0.9, n 1.5; 0.2600 is 0.25992 to more digits. */
    @Test
    void giovanelli() {
        SlabLight light = AddingDoubling.semiInfinite(new Medium(1, 9, 0, 1.5), 1);
        assertEquals(0.2600, light.totalReflectance(), 1e-4);
        assertEquals(0.25992, light.totalReflectance(), 1e-5);
    }

    /** Chandrasekhar, Radiative Transfer, Oxford (1950): plane albedo of the isotropic half-space, 1 − H(1) √(1 − a). */
    @ParameterizedTest
    @CsvSource({"0.5, 0.11522588", "0.9, 0.41494748", "0.99, 0.75272072", "0.999, 0.91284533"})
    void chandrasekhar(double albedo, double expected) {
        SlabLight light = AddingDoubling.semiInfinite(new Medium(10 * (1 - albedo), 10 * albedo, 0, 1.4), 1.4);
        assertEquals(expected, light.totalReflectance(), 1e-7);
    }

    /** Henyey–Greenstein g 0.7, µa 0.01, µs' 1 /mm, faces to air; worked out by an independent code. */
    @ParameterizedTest
    @CsvSource({"1.40, 5, 0.57790, 0.24849", "1.40, 10, 0.62252, 0.10023", "1.33, 5, 0.59402, 0.24602"})
    void fresnelSlab(double n, double thickness, double r, double t) {
        SlabLight light = AddingDoubling.slab(new Medium(0.1, 10, 0.7, n), 1, thickness);
        assertEquals(r, light.totalReflectance(), 1.1e-5);
        assertEquals(t, light.totalTransmittance(), 1.1e-5);
    }

    /** Without scattering: Bouguer–Beer–Lambert between two faces; without anything: 2n/(n² + 1), the pile-of-plates formula. */
    @Test
    void clearPlate() {
        SlabLight clear = AddingDoubling.slab(new Medium(0, 0, 0, 1.5), 1, 3);
        assertEquals(2 * 1.5 / (1.5 * 1.5 + 1), clear.totalTransmittance(), 1e-14);
        assertEquals(1, clear.totalTransmittance() + clear.totalReflectance(), 1e-14);
        SlabLight dyed = AddingDoubling.slab(new Medium(2, 0, 0, 1.4), 1.4, 10);
        assertEquals(Math.exp(-2), dyed.unscatteredTransmittance(), 1e-14);
    }
}
