package org.hazewright.transport;

import org.hazewright.optics.Refusal;

/** Times from {@code fromPs} to {@code toPs} every {@code stepPs}, ps; at most 100000 of them, the ends included. */
public record TimeAxis(double fromPs, double toPs, double stepPs) {
    public TimeAxis {
        if (!Double.isFinite(fromPs) || !Double.isFinite(toPs) || toPs <= fromPs)
            throw new Refusal("The time axis goes from " + fromPs + " to " + toPs + " ps; it must go forward.");
        Refusal.positive("Step of the time axis in ps", stepPs);
        if ((toPs - fromPs) / stepPs > 99_999)
            throw new Refusal("The time axis has more than 100000 points; make the step longer.");
    }

    public int size() {
        return (int) Math.floor((toPs - fromPs) / stepPs + 1e-9) + 1;
    }

    public double at(int i) {
        return fromPs + i * stepPs;
    }

    public double[] timesPs() {
        double[] t = new double[size()];
        for (int i = 0; i < t.length; i++) t[i] = at(i);
        return t;
    }
}
