package org.hazewright.transport;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import org.junit.jupiter.api.Test;

class PacketStreamTest {
    private static final int N = 400_000;

    /** Kolmogorov–Smirnov against 1 − exp(−x): √N D below 1.95 in 999 of 1000; the tail beyond the ziggurat's edge on its own. */
    @Test
    void exponentialVariates() {
        PacketStream s = new PacketStream(1, 0);
        double[] x = new double[N];
        int tail = 0;
        for (int i = 0; i < N; i++) {
            x[i] = s.exponential();
            if (x[i] > 7.69711747013104972) tail++;
        }
        Arrays.sort(x);
        double worst = 0;
        for (int i = 0; i < N; i++) worst = Math.max(worst, Math.abs(-Math.expm1(-x[i]) - (i + 0.5) / N));
        assertTrue(worst * Math.sqrt(N) < 1.95, "D √N = " + worst * Math.sqrt(N));
        double expected = N * Math.exp(-7.69711747013104972);
        assertEquals(expected, tail, 4 * Math.sqrt(expected));
    }

    @Test
    void uniformVariates() {
        PacketStream s = new PacketStream(2, 0);
        double[] x = new double[N];
        for (int i = 0; i < N; i++) x[i] = s.uniform();
        Arrays.sort(x);
        double worst = 0;
        for (int i = 0; i < N; i++) worst = Math.max(worst, Math.abs(x[i] - (i + 0.5) / N));
        assertTrue(worst * Math.sqrt(N) < 1.95);
        assertTrue(x[0] >= 0 && x[N - 1] < 1);
    }

    /** Neighbouring blocks and neighbouring seeds are uncorrelated: |r| √N below 4. */
    @Test
    void neighboursShareNothing() {
        PacketStream[] pair = {new PacketStream(7, 0), new PacketStream(7, 1), new PacketStream(8, 0)};
        double r1 = 0;
        double r2 = 0;
        for (int i = 0; i < N; i++) {
            double a = pair[0].uniform() - 0.5;
            r1 += 12 * a * (pair[1].uniform() - 0.5);
            r2 += 12 * a * (pair[2].uniform() - 0.5);
        }
        assertTrue(Math.abs(r1) / Math.sqrt(N) < 4);
        assertTrue(Math.abs(r2) / Math.sqrt(N) < 4);
        assertNotEquals(new PacketStream(7, 1).bits(), new PacketStream(8, 0).bits());
    }
}
