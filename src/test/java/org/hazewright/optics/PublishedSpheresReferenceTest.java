package org.hazewright.optics;

import static org.junit.jupiter.api.Assertions.assertEquals;

import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/**
 * One sphere against published tables, to their last printed digit.
 */
class PublishedSpheresReferenceTest {

    /**
     * Bohren & Huffman, Absorption and Scattering of Light by Small Particles, Wiley 1983, appendix A: m = 1.55, diameter
     * 1.05 µm at 0.6328 µm, printed x = 5.213, Q_ext = 3.10543 (x rounded for print: 2π · 0.525/0.6328).
     */
    @Test
    void bohrenAndHuffmanAppendixA() {
        Efficiencies sphere = Mie.sphere(2 * Math.PI * 0.525 / 0.6328, 1.55, 0);
        assertEquals(3.10543, sphere.qExt(), 0.5e-5);
        assertEquals(3.10543, sphere.qSca(), 0.5e-5);
    }

    /** Wiscombe, Mie Scattering Calculations, NCAR/TN-140+STR, 1979, test cases; one unit of the last printed digit. */
    @ParameterizedTest
    @CsvSource({
        "1.5, 0, 10, 2.881999, 2.881999, 0.742913, 1e-6",
        "0.75, 0, 0.099, 7.41786e-6, 7.41786e-6, 0.001448, 1e-6",
        "0.75, 0, 10, 2.232265, 2.232265, 0.896473, 1e-6",
        "0.75, 0, 1000, 1.997908, 1.997908, 0.844944, 1e-6",
        "1.33, 1e-5, 100, 2.101321, 2.096594, 0.868959, 1e-6",
        "1.33, 1e-5, 10000, 2.004089, 1.723857, 0.907840, 1e-6",
        "1.5, 1, 1, 2.336321, 0.663454, 0.192136, 1e-6",
        "1.5, 1, 100, 2.097502, 1.283697, 0.850252, 1e-6",
        "10, 10, 1, 2.532993, 2.049405, -0.110664, 1e-6",
    })
    void wiscombe(double n, double k, double x, double qExt, double qSca, double g, double digit) {
        Efficiencies sphere = Mie.sphere(x, n, k);
        assertEquals(qExt, sphere.qExt(), digit * Math.min(1, qExt));
        assertEquals(qSca, sphere.qSca(), digit * Math.min(1, qSca));
        assertEquals(g, sphere.g(), digit);
    }

    /** Same report: m = 1.33 + 1e-5 i, x = 1; the extinction is not printed to as many digits. */
    @Test
    void wiscombeNearlyClear() {
        Efficiencies sphere = Mie.sphere(1, 1.33, 1e-5);
        assertEquals(0.0939233, sphere.qSca(), 1e-7);
        assertEquals(0.184517, sphere.g(), 1e-6);
    }

    /**
     * Rayleigh's law for a sphere small against the wavelength: Q_sca = (8/3) x⁴ |L|², Q_abs = 4x Im L, L = (m² − 1)/(m² + 2)
     * (Bohren & Huffman, eqs. 5.7 and 5.8). The next term is smaller by about x².
     */
    @ParameterizedTest
    @CsvSource({"1.5, 0", "0.5, 0", "1.001, 0", "1.33, 1e-9", "1.95, 0.79", "0.2, 3"})
    void rayleigh(double n, double k) {
        double x = 1e-4;
        double re = n * n - k * k;
        double im = 2 * n * k;
        double square = ((re - 1) * (re - 1) + im * im) / ((re + 2) * (re + 2) + im * im);
        double imL = 3 * im / ((re + 2) * (re + 2) + im * im);
        Efficiencies sphere = Mie.sphere(x, n, k);
        assertEquals(1, sphere.qSca() / (8.0 / 3 * Math.pow(x, 4) * square), 20 * x * x);
        if (k > 0) assertEquals(1, sphere.qAbs() / (4 * x * imL), 20 * x * x);
    }

    /** Extinction paradox: a very large sphere takes twice its shadow, Q_ext → 2 + 1.992 x^(−2/3) (Bohren & Huffman, ch. 4.4.3). */
    @Test
    void largeOpaqueSphere() {
        Efficiencies sphere = Mie.sphere(2e4, 1.5, 0.1);
        assertEquals(2 + 1.992 * Math.pow(2e4, -2.0 / 3), sphere.qExt(), 1e-4);
    }
}
