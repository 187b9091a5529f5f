package org.hazewright.transport;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import java.util.Arrays;
import org.hazewright.optics.Refusal;
import org.junit.jupiter.api.Test;

class TimeCurveTest {
    private static Response gauss(double centre, double sigma, double step) {
        int n = (int) (12 * sigma / step) + 1;
        double[] t = new double[n];
        double[] y = new double[n];
        for (int i = 0; i < n; i++) {
            t[i] = centre - 6 * sigma + i * step;
            y[i] = 1000 * Math.exp(-0.5 * Math.pow((t[i] - centre) / sigma, 2));
        }
        return new Response(t, y);
    }

    /** A Gaussian seen through a Gaussian is a Gaussian: centres and variances add. */
    @Test
    void gaussiansAdd() {
        Response response = gauss(37, 60, 7);
        TimeCurve seen =
                TimeCurve.seen(t -> Math.exp(-0.5 * Math.pow((t - 2000) / 150, 2)), new TimeAxis(0, 4000, 5), response);
        double variance = 150 * 150 + 60 * 60;
        assertEquals(2037, seen.meanPs(), 0.01);
        assertEquals(variance, seen.variancePs2(), 30);
        double peak = 150 / Math.sqrt(variance);
        assertEquals(peak, Arrays.stream(seen.value()).max().orElseThrow(), 1e-3);
    }

    /** One measured spike leaves the curve as it is, only later. */
    @Test
    void spikeShifts() {
        Response spike = new Response(new double[] {95, 100, 105}, new double[] {0, 1, 0});
        TimeAxis axis = new TimeAxis(0, 1000, 5);
        TimeCurve ideal = TimeCurve.seen(t -> t * Math.exp(-t / 80), axis, null);
        TimeCurve seen = TimeCurve.seen(t -> t * Math.exp(-t / 80), axis, spike);
        double[] a = ideal.value();
        double[] b = seen.value();
        // the spike is a hat of two steps' width: 1/12 of its weight falls on either neighbour when spread on the grid
        for (int i = 25; i < a.length; i++)
            assertEquals(
                    a[i - 20],
                    b[i],
                    0.02 * a[i - 20] + 1e-9 * Arrays.stream(a).max().orElseThrow());
        assertEquals(0, b[15]);
    }

    /** A response that begins before its zero needs the ideal curve beyond the end of the axis, and gets it. */
    @Test
    void earlyResponseSeesBeyondTheEnd() {
        Response early = new Response(new double[] {-210, -200, -190}, new double[] {0, 1, 0});
        TimeCurve seen = TimeCurve.seen(t -> t, new TimeAxis(0, 100, 10), early);
        for (int i = 0; i < 11; i++) assertEquals(200 + 10 * i, seen.value()[i], 1e-9);
    }

    @Test
    void momentsOfAResponse() {
        Response triangle = new Response(new double[] {0, 100, 200}, new double[] {0, 5, 0});
        assertEquals(100, triangle.meanPs(), 1e-10);
        // a symmetric triangle of half-width w has variance w²/6
        assertEquals(10_000 / 6.0, triangle.variancePs2(), 1e-8);
    }

    @Test
    void countsSumToTheTotal() {
        TimeCurve c = TimeCurve.seen(t -> Math.exp(-t / 100), new TimeAxis(0, 500, 1), null)
                .ofCounts(1e6);
        assertEquals(1e6, Arrays.stream(c.value()).sum(), 1e-6);
        assertEquals(0, c.value()[0]);
    }

    @Test
    void axisHasBothEnds() {
        assertArrayEquals(new double[] {0, 2.5, 5}, new TimeAxis(0, 5, 2.5).timesPs());
        assertEquals(1001, new TimeAxis(0, 5000, 5).size());
        assertEquals(11, new TimeAxis(0, 1, 0.1).size());
    }

    @Test
    void refusals() {
        assertThrows(Refusal.class, () -> new TimeAxis(5, 5, 1));
        assertThrows(Refusal.class, () -> new TimeAxis(0, 1e6, 1));
        assertThrows(Refusal.class, () -> new Response(new double[] {0, 0}, new double[] {1, 1}));
        assertThrows(Refusal.class, () -> new Response(new double[] {0, 1}, new double[] {0, 0}));
        assertThrows(Refusal.class, () -> new Response(new double[] {0, 1}, new double[] {1, -1}));
        TimeCurve dark = TimeCurve.seen(t -> 0, new TimeAxis(0, 10, 1), null);
        assertThrows(Refusal.class, () -> dark.ofCounts(100));
    }
}
