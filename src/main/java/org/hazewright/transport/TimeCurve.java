package org.hazewright.transport;

import java.util.Arrays;
import java.util.function.DoubleUnaryOperator;
import org.hazewright.optics.Refusal;

/**
 * A curve over a {@link TimeAxis}: what a time-resolved instrument collects, one value for each time.
 *
 * <p>Values are those at the times themselves; a bin of width {@code step} centred there holds value × step. With a response
 * the ideal curve is convolved with it on the same step; light before the axis's start is followed too, so that nothing is cut
 * off by a late start.
 */
public record TimeCurve(TimeAxis axis, double[] value) {
    public TimeCurve {
        if (value.length != axis.size())
            throw new Refusal("The time axis has " + axis.size() + " points and the curve " + value.length + ".");
        value = value.clone();
    }

    /** The ideal curve, 0 before time 0, seen through a response, or as it is when {@code response} is null. */
    public static TimeCurve seen(DoubleUnaryOperator ideal, TimeAxis axis, Response response) {
        int n = axis.size();
        double[] y = new double[n];
        if (response == null) {
            for (int i = 0; i < n; i++) y[i] = axis.at(i) > 0 ? ideal.applyAsDouble(axis.at(i)) : 0;
            return new TimeCurve(axis, y);
        }
        Response.Kernel kernel = response.onStep(axis.stepPs());
        double[] w = kernel.weight();
        // y(t_i) = Σ_k w_k ideal(t_i − k step): earliest ideal time wanted is t_0 − last k
        int earliest = -(kernel.firstIndex() + w.length - 1);
        int latest = n - 1 - kernel.firstIndex();
        for (int j = earliest; j <= latest; j++) {
            double t = axis.fromPs() + j * axis.stepPs();
            if (!(t > 0)) continue;
            double x = ideal.applyAsDouble(t);
            int shift = j + kernel.firstIndex();
            int from = Math.max(0, -shift);
            int to = Math.min(w.length, n - shift);
            for (int k = from; k < to; k++) y[shift + k] += x * w[k];
        }
        return new TimeCurve(axis, y);
    }

    /** The same curve scaled so that its values sum to {@code counts}: expected counts for each bin. */
    public TimeCurve ofCounts(double counts) {
        Refusal.positive("Counts", counts);
        double sum = Arrays.stream(value).sum();
        if (!(sum > 0)) throw new Refusal("No light arrives within the time axis; make it longer or start earlier.");
        double[] y = value.clone();
        for (int i = 0; i < y.length; i++) y[i] *= counts / sum;
        return new TimeCurve(axis, y);
    }

    /** Centre of the curve within its axis, ps. */
    public double meanPs() {
        double sum = 0;
        double first = 0;
        for (int i = 0; i < value.length; i++) {
            sum += value[i];
            first += value[i] * axis.at(i);
        }
        return first / sum;
    }

    /** Variance of the curve within its axis, ps². */
    public double variancePs2() {
        double mean = meanPs();
        double sum = 0;
        double second = 0;
        for (int i = 0; i < value.length; i++) {
            sum += value[i];
            second += value[i] * (axis.at(i) - mean) * (axis.at(i) - mean);
        }
        return second / sum;
    }

    @Override
    public double[] value() {
        return value.clone();
    }

    @Override
    public boolean equals(Object other) {
        return other instanceof TimeCurve c && axis.equals(c.axis) && Arrays.equals(value, c.value);
    }

    @Override
    public int hashCode() {
        return 31 * axis.hashCode() + Arrays.hashCode(value);
    }

    @Override
    public String toString() {
        return "Curve over " + axis;
    }
}
