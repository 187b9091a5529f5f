package org.hazewright.transport;

import static org.junit.jupiter.api.Assertions.assertEquals;

import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class BesselK0ReferenceTest {
    /** Abramowitz &amp; Stegun 1964, table 9.8; digits beyond the table by another library's K₀. */
    @ParameterizedTest
    @CsvSource({
        "0.001, 7.0236888005623825",
        "0.1, 2.4270690247020164",
        "1, 0.42102443824070823",
        "5, 0.0036910983340425942",
        "20, 5.741237815336524e-10"
    })
    void realArgument(double x, double expected) {
        BesselK0 k = new BesselK0();
        k.at(x, 0);
        assertEquals(expected, k.re, 1e-12 * expected);
        assertEquals(0, k.im);
    }

    /** Kelvin functions ker x + i kei x = K₀(x exp(iπ/4)); Abramowitz &amp; Stegun 1964, table 9.12 and 9.9.2. */
    @ParameterizedTest
    @CsvSource({
        "0.5, 0.8559058721186342, -0.6715816950943675",
        "1, 0.286706208728316, -0.49499463651871994",
        "3, -0.06702923330379866, -0.05112188404598678",
        "8, 0.0014858340685189619, 0.00036958395612595036"
    })
    void kelvinFunctions(double x, double ker, double kei) {
        BesselK0 k = new BesselK0();
        k.at(x / Math.sqrt(2), x / Math.sqrt(2));
        double size = Math.hypot(ker, kei);
        assertEquals(ker, k.re, 1e-11 * size);
        assertEquals(kei, k.im, 1e-11 * size);
    }
}
