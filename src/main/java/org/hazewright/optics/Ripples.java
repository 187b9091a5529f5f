package org.hazewright.optics;

/**
 * The error of a trapezoidal sum, read off the ripples of its terms.
 *
 * <p>The sum of y(ih) errs by what the Fourier transform of y holds at the sampling frequency 2π/h and its multiples (Trefethen
 * &amp; Weideman, SIAM Rev. 56, 385, 2014). That can't be seen in the terms, but half of it can: |Σ y_i e^{iωi}| at ω near π is the
 * error of a rule of twice the step. For a smooth y it has fallen on the way there, from ω near 0.75π and 0.45π, and from π to 2π it
 * falls by that again at least; where y has peaks that are narrower than the step it is the same everywhere, like noise, and then
 * this error is as large. Several frequencies are taken together at each place, lest one of them be small by chance.
 */
final class Ripples {
    /** Terms are folded to this many, of which every frequency 2πk/PERIOD is a period. */
    private static final int PERIOD = 50;

    private static final int[] WAVES = {25, 24, 23, 20, 19, 18, 12, 11, 10};
    private static final int EACH = 3;
    private static final int ALL = 2 * WAVES.length;
    private static final double[][] TABLE = new double[PERIOD][ALL];

    static {
        for (int r = 0; r < PERIOD; r++)
            for (int k = 0; k < WAVES.length; k++) {
                double phase = 2 * Math.PI * ((r * WAVES[k]) % PERIOD) / PERIOD;
                TABLE[r][2 * k] = Math.cos(phase);
                TABLE[r][2 * k + 1] = Math.sin(phase);
            }
    }

    private static final double SAFETY = 4;

    private Ripples() {}

    /** Estimated error of Σ terms, in the unit of the terms. */
    static double error(double[] terms) {
        double[] folded = new double[PERIOD];
        for (int i = 0, r = 0; i < terms.length; i++) {
            folded[r] += terms[i];
            if (++r == PERIOD) r = 0;
        }
        double[] parts = new double[ALL];
        for (int r = 0; r < PERIOD; r++) add(folded[r], TABLE[r], parts);
        double last = rms(parts, 0);
        double before = rms(parts, 1);
        double middle = rms(parts, 2);
        if (last == 0) return 0;
        double fall = Math.max(last / middle, Math.pow(last / before, 2));
        return SAFETY * last * Math.min(1, fall);
    }

    private static void add(double term, double[] table, double[] parts) {
        for (int i = 0; i < ALL; i++) parts[i] += term * table[i];
    }

    private static double rms(double[] parts, int group) {
        double sum = 0;
        for (int i = 2 * EACH * group; i < 2 * EACH * (group + 1); i++) sum += parts[i] * parts[i];
        return Math.sqrt(sum / EACH);
    }
}
