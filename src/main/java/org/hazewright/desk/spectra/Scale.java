package org.hazewright.desk.spectra;

import java.util.ArrayList;
import java.util.List;

/** A straight axis: values from {@code low} to {@code high} over px from {@code at0} to {@code at1}. */
record Scale(double low, double high, double at0, double at1) {

    double px(double v) {
        return at0 + (v - low) / (high - low) * (at1 - at0);
    }

    double value(double px) {
        return low + (px - at0) / (at1 - at0) * (high - low);
    }

    /** Round values inside, about {@code wish} of them, in steps of 1, 2 or 5 times a power of ten. */
    List<Double> ticks(int wish) {
        double step = step(high - low, wish);
        List<Double> ticks = new ArrayList<>();
        for (long k = (long) Math.ceil(low / step - 1e-9); k * step <= high + 1e-9 * step; k++) ticks.add(k * step);
        return ticks;
    }

    static double step(double span, int wish) {
        double rough = span / Math.max(1, wish);
        double power = Math.pow(10, Math.floor(Math.log10(rough)));
        double lead = rough / power;
        return (lead <= 1 ? 1 : lead <= 2 ? 2 : lead <= 5 ? 5 : 10) * power;
    }

    /** Decimals that tell ticks of a step apart. */
    static int decimals(double step) {
        return Math.max(0, (int) -Math.floor(Math.log10(step) + 1e-9));
    }
}
