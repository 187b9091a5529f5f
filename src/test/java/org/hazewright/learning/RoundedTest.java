package org.hazewright.learning;

import static org.junit.jupiter.api.Assertions.assertEquals;

import org.junit.jupiter.api.Test;

/** Numbers in sentences read the same everywhere. */
class RoundedTest {
    @Test
    void fewDigitsAndNoSurprises() {
        assertEquals("0.0123", Rounded.number(0.012345));
        assertEquals("-41.2", Rounded.number(-41.2));
        assertEquals("1230", Rounded.number(1234));
        assertEquals("3.2e-7", Rounded.number(3.2e-7));
        assertEquals("-1.23e9", Rounded.number(-1.234e9));
        assertEquals("0", Rounded.number(0));
        assertEquals("780", Rounded.number(780));
        assertEquals("Infinity", Rounded.number(Double.POSITIVE_INFINITY));
        assertEquals("3.1 %", Rounded.percent(0.0312));
        assertEquals("120 %", Rounded.percent(1.2));
        assertEquals("692.5", Rounded.plain(692.5));
        assertEquals("10", Rounded.plain(10));
        assertEquals("0.53", Rounded.probability(0.5312));
        assertEquals("2.5e-7", Rounded.probability(2.51e-7));
        assertEquals("below 1e-9", Rounded.probability(1e-12));
        assertEquals("above 0.999", Rounded.probability(0.9999));
    }
}
