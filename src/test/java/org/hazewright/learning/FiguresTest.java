package org.hazewright.learning;

import static org.junit.jupiter.api.Assertions.assertEquals;

import org.junit.jupiter.api.Test;

/** Numbers in sentences read the same everywhere. */
class FiguresTest {
    @Test
    void fewDigitsAndNoSurprises() {
        assertEquals("0.0123", Figures.number(0.012345));
        assertEquals("-41.2", Figures.number(-41.2));
        assertEquals("1230", Figures.number(1234));
        assertEquals("3.2e-7", Figures.number(3.2e-7));
        assertEquals("-1.23e9", Figures.number(-1.234e9));
        assertEquals("0", Figures.number(0));
        assertEquals("780", Figures.number(780));
        assertEquals("Infinity", Figures.number(Double.POSITIVE_INFINITY));
        assertEquals("3.1 %", Figures.percent(0.0312));
        assertEquals("120 %", Figures.percent(1.2));
        assertEquals("692.5", Figures.plain(692.5));
        assertEquals("10", Figures.plain(10));
        assertEquals("0.53", Figures.probability(0.5312));
        assertEquals("2.5e-7", Figures.probability(2.51e-7));
        assertEquals("below 1e-9", Figures.probability(1e-12));
        assertEquals("above 0.999", Figures.probability(0.9999));
    }
}
