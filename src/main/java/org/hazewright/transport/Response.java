package org.hazewright.transport;

import java.util.Arrays;
import org.hazewright.optics.Refusal;

/**
 * A measured instrument response: counts against time, on an ascending axis in ps.
 *
 * <p>At least two points; counts finite, 0 or above, not all 0. Linear between its points and 0 outside. Its zero of time is
 * the axis's own.
 */
public record Response(double[] timePs, double[] counts) {
    public Response {
        if (timePs.length != counts.length || timePs.length < 2)
            throw new Refusal("The response has " + timePs.length + " times and " + counts.length
                    + " counts; it needs as many of each, at least 2.");
        double sum = 0;
        for (int i = 0; i < timePs.length; i++) {
            if (!Double.isFinite(timePs[i]) || (i > 0 && timePs[i] <= timePs[i - 1]))
                throw new Refusal(
                        "The response's times must ascend, each once; row " + (i + 1) + " has " + timePs[i] + ".");
            sum += Refusal.notNegative("Response counts in row " + (i + 1), counts[i]);
        }
        if (!(sum > 0)) throw new Refusal("The response is 0 everywhere; it needs counts above 0.");
        timePs = timePs.clone();
        counts = counts.clone();
    }

    @Override
    public double[] timePs() {
        return timePs.clone();
    }

    @Override
    public double[] counts() {
        return counts.clone();
    }

    /** Centre of the response, ps. */
    public double meanPs() {
        double[] m = moments();
        return m[1] / m[0];
    }

    /** Variance of the response, ps². */
    public double variancePs2() {
        double[] m = moments();
        return m[2] / m[0] - (m[1] / m[0]) * (m[1] / m[0]);
    }

    /** Weights at 0, ±step, ±2 step … that sum to 1; {@code firstIndex} of the result is that of its first weight. */
    Kernel onStep(double stepPs) {
        int first = (int) Math.floor(timePs[0] / stepPs);
        int last = (int) Math.ceil(timePs[timePs.length - 1] / stepPs);
        double[] w = new double[last - first + 1];
        // each straight piece is shared between the steps by hat functions, which keeps area and centre exact
        for (int i = 0; i + 1 < timePs.length; i++) spread(i, w, first, stepPs);
        double sum = Arrays.stream(w).sum();
        for (int i = 0; i < w.length; i++) w[i] /= sum;
        return new Kernel(first, w);
    }

    record Kernel(int firstIndex, double[] weight) {}

    private void spread(int i, double[] w, int first, double step) {
        double a = timePs[i];
        double b = timePs[i + 1];
        double from = a;
        for (int k = (int) Math.floor(a / step); from < b; k++) {
            double to = Math.min(b, (k + 1) * step);
            if (to <= from) continue;
            // two-point Gauss is exact for the product of two straight lines
            double centre = 0.5 * (from + to);
            double half = 0.5 * (to - from);
            for (int s = -1; s <= 1; s += 2) {
                double t = centre + s * half / Math.sqrt(3);
                double y = counts[i] + (counts[i + 1] - counts[i]) * (t - a) / (b - a);
                double x = t / step - k;
                w[k - first] += half * y * (1 - x);
                if (k - first + 1 < w.length) w[k - first + 1] += half * y * x;
            }
            from = to;
        }
    }

    private double[] moments() {
        double[] m = new double[3];
        for (int i = 0; i + 1 < timePs.length; i++) {
            double a = timePs[i];
            double h = timePs[i + 1] - a;
            // three-point Gauss: exact to the fifth power
            double[] x = {0.5 - Math.sqrt(0.15), 0.5, 0.5 + Math.sqrt(0.15)};
            double[] g = {5 / 18.0, 8 / 18.0, 5 / 18.0};
            for (int k = 0; k < 3; k++) {
                double t = a + h * x[k];
                double y = h * g[k] * (counts[i] + (counts[i + 1] - counts[i]) * x[k]);
                m[0] += y;
                m[1] += y * t;
                m[2] += y * t * t;
            }
        }
        return m;
    }

    @Override
    public boolean equals(Object other) {
        return other instanceof Response r && Arrays.equals(timePs, r.timePs) && Arrays.equals(counts, r.counts);
    }

    @Override
    public int hashCode() {
        return 31 * Arrays.hashCode(timePs) + Arrays.hashCode(counts);
    }

    @Override
    public String toString() {
        return "Response of " + timePs.length + " points from " + timePs[0] + " to " + timePs[timePs.length - 1]
                + " ps";
    }
}
