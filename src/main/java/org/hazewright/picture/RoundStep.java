package org.hazewright.picture;

/** A round step between the lines of a scale. */
public final class RoundStep {
    private RoundStep() {}

    /** 1, 2 or 5 times a power of ten, so that three to seven lines stand over a {@code span} above 0. */
    public static double over(double span) {
        double decade = Math.pow(10, Math.floor(Math.log10(span / 3)));
        double step = decade;
        for (double figure : new double[] {2, 5}) if (span / (figure * decade) >= 3) step = figure * decade;
        return step;
    }
}
