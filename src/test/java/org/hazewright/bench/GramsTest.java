package org.hazewright.bench;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Random;
import org.hazewright.brief.Balance;
import org.junit.jupiter.api.Test;

class GramsTest {

    @Test
    void gramsStandAsTheDisplayShowsThem() {
        assertEquals("1.410 g", Grams.shown(1.41, Balance.USUAL));
        assertEquals("1.403 to 1.417 g", Grams.band(1.403, 1.417, Balance.USUAL));
        assertEquals("12 g", Grams.shown(12, new Balance(1, 1, 1, 1000)));
    }

    @Test
    void plainNumbersCarryNoIdleZeros() {
        assertEquals("14.02", Grams.plain(14.0241));
        assertEquals("250", Grams.plain(250));
        assertEquals("0.0045", Grams.plain(0.0045));
        assertEquals("0", Grams.plain(0));
        assertEquals("14.02 mg", Grams.small(0.01402));
        assertEquals("2 g", Grams.small(2));
    }

    @Test
    void loadsAreFewShowableAndSumToTheMass() {
        Random random = new Random(4);
        for (int k = 0; k < 500; k++) {
            Balance balance = new Balance(0.001, 0.001, 0.02, 50 + 200 * random.nextDouble());
            double mass = balance.rounded(2000 * random.nextDouble() + 0.001);
            List<Double> loads = Grams.loads(mass, balance);
            assertEquals(mass, loads.stream().mapToDouble(Double::doubleValue).sum(), 1e-9);
            assertEquals(Math.ceil(mass / balance.capacityG() - 1e-9), loads.size(), 1e-9);
            for (double load : loads) {
                assertTrue(load <= balance.capacityG() + 0.001);
                assertEquals(balance.rounded(load), load, 1e-12);
            }
        }
    }
}
