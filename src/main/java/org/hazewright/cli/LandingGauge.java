package org.hazewright.cli;

/** The landing gauge in letters: a bracket for the tolerance, a point for where the prediction lands. */
final class LandingGauge {
    private static final int HALF = 6;
    private static final int MARGIN = 3;

    private LandingGauge() {}

    /** {@code miss} in half-widths: −1 and 1 are the brackets; beyond the margin the point stands at the end. */
    static String of(double miss) {
        int width = 2 * (HALF + MARGIN) + 1;
        int middle = HALF + MARGIN;
        char[] line = " ".repeat(width).toCharArray();
        for (int i = 0; i < width; i++) line[i] = '·';
        line[middle - HALF] = '[';
        line[middle + HALF] = ']';
        int at = (int) Math.rint(middle + Math.max(-1.6, Math.min(1.6, miss)) * HALF);
        at = Math.max(0, Math.min(width - 1, at));
        boolean inside = Math.abs(miss) <= 1;
        if (inside && at == middle - HALF) at++;
        if (inside && at == middle + HALF) at--;
        if (!inside && at == middle - HALF) at--;
        if (!inside && at == middle + HALF) at++;
        line[at] = inside ? 'o' : 'x';
        return new String(line);
    }
}
