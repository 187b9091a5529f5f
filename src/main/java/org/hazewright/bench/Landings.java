package org.hazewright.bench;

import java.util.Arrays;
import java.util.List;
import java.util.SplittableRandom;

/**
 * How often the mixtures of a run land inside every tolerance, one by one and all together, when what moves them is known to first
 * order.
 *
 * <p>Misses are linear in independent standard normal causes, miss = planned + Σ_c z_c e_c (JCGM 100:2008, 5.1.2 with the normal
 * distributions of 4.4), and {@value #DRAWS} draws of all causes are counted: the standard error of a chance is at most 0.5 in 100.
 * One cause moves every mixture that it is part of at once, so the chance of all is not the product of the single ones.
 *
 * @param each chance of each mixture, 0 to 1
 * @param all chance that every mixture lands
 */
record Landings(double[] each, double all) {
    private static final int DRAWS = 10_000;
    private static final long SEED = 1;

    /** One mixture: planned misses in half-widths, and by cause what one standard uncertainty of it adds to each miss. */
    record Doubt(double[] misses, double[][] effects) {}

    /** All mixtures with the same causes in the same order. */
    static Landings of(List<Doubt> doubts) {
        int causes = doubts.get(0).effects.length;
        int[] landed = new int[doubts.size()];
        int together = 0;
        SplittableRandom random = new SplittableRandom(SEED);
        double[] z = new double[causes];
        for (int draw = 0; draw < DRAWS; draw++) {
            for (int c = 0; c < causes; c++) z[c] = random.nextGaussian();
            int now = 0;
            for (int k = 0; k < landed.length; k++)
                if (lands(doubts.get(k), z)) {
                    landed[k]++;
                    now++;
                }
            if (now == landed.length) together++;
        }
        return new Landings(
                Arrays.stream(landed).mapToDouble(n -> n / (double) DRAWS).toArray(), (double) together / DRAWS);
    }

    private static boolean lands(Doubt d, double[] z) {
        for (int j = 0; j < d.misses.length; j++) {
            double miss = d.misses[j];
            for (int c = 0; c < z.length; c++) miss += z[c] * d.effects[c][j];
            if (Math.abs(miss) > 1) return false;
        }
        return true;
    }
}
