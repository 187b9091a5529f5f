package org.hazewright.search;

/**
 * A quick question about least squares with amounts that cannot be negative: does xᵀHx − 2bᵀx + start stay at or above a
 * ceiling for all x ≥ 0?
 *
 * <p>Active sets from nothing upwards on the Gram matrix (Lawson & Hanson, <i>Solving Least Squares Problems</i>, Prentice-Hall
 * 1974, ch. 23): few amounts end above 0, so few are ever touched, and the answer is no as soon as any point lies below the
 * ceiling. Doubt (dependent columns, too many rounds) is answered with no. H has a unit diagonal.
 */
final class NonNegative {
    private final int stride;
    private final double[] h;
    private final double[] x;
    private final double[] pull;
    private final double[] y;
    private final double[] trial;
    private final double[][] factor;
    private final int[] passive;
    private final boolean[] isPassive;
    private int count;

    NonNegative(Columns.Gram gram) {
        stride = gram.n;
        h = gram.h;
        x = new double[stride];
        pull = new double[stride];
        y = new double[stride];
        trial = new double[stride];
        factor = new double[stride][stride];
        passive = new int[stride];
        isPassive = new boolean[stride];
    }

    /** Whether the least value over the positions {@code set[0..size)} is at least {@code ceiling}. */
    boolean staysAbove(int[] set, int size, double[] linear, double start, double ceiling) {
        if (start < ceiling) return false;
        double tolerance = 1e-11 * Math.sqrt(Math.abs(start));
        count = 0;
        for (int k = 0; k < size; k++) {
            pull[k] = linear[set[k]];
            x[k] = 0;
            isPassive[k] = false;
        }
        for (int round = 0; round < 3 * size + 3; round++) {
            int enters = -1;
            double most = tolerance;
            for (int k = 0; k < size; k++)
                if (!isPassive[k] && pull[k] > most) {
                    most = pull[k];
                    enters = k;
                }
            if (enters < 0) return true;
            isPassive[enters] = true;
            passive[count] = enters;
            if (!append(set, count++)) return false;
            double value;
            while (true) {
                value = fit(set, linear, start);
                if (!stepBack()) break;
                int kept = 0;
                for (int k = 0; k < count; k++) if (isPassive[passive[k]]) passive[kept++] = passive[k];
                count = 0;
                while (count < kept) if (!append(set, count++)) return false;
            }
            if (value < ceiling) return false;
            for (int k = 0; k < size; k++) {
                if (isPassive[k]) continue;
                int row = set[k] * stride;
                double p = linear[set[k]];
                for (int j = 0; j < count; j++) p -= h[row + set[passive[j]]] * x[passive[j]];
                pull[k] = p;
            }
        }
        return false;
    }

    private boolean append(int[] set, int at) {
        double[] l = factor[at];
        int row = set[passive[at]] * stride;
        double left = h[row + set[passive[at]]];
        for (int k = 0; k < at; k++) {
            double s = h[row + set[passive[k]]];
            double[] f = factor[k];
            for (int j = 0; j < k; j++) s -= l[j] * f[j];
            s /= f[k];
            l[k] = s;
            left -= s * s;
        }
        if (left < 1e-10) return false;
        l[at] = Math.sqrt(left);
        return true;
    }

    private double fit(int[] set, double[] linear, double start) {
        double value = start;
        for (int k = 0; k < count; k++) {
            double[] f = factor[k];
            double s = linear[set[passive[k]]];
            for (int j = 0; j < k; j++) s -= f[j] * y[j];
            y[k] = s / f[k];
            value -= y[k] * y[k];
        }
        for (int k = count - 1; k >= 0; k--) {
            double s = y[k];
            for (int j = k + 1; j < count; j++) s -= factor[j][k] * trial[j];
            trial[k] = s / factor[k][k];
        }
        return value;
    }

    /** Moves to the fitted point, or as far as amounts stay at 0 or above, dropping those that get there; true if any did. */
    private boolean stepBack() {
        double step = 1;
        int first = -1;
        for (int k = 0; k < count; k++) {
            if (trial[k] > 0) continue;
            double from = x[passive[k]];
            double s = from == 0 ? 0 : from / (from - trial[k]);
            if (first < 0 || s < step) {
                step = s;
                first = k;
            }
        }
        for (int k = 0; k < count; k++) {
            int i = passive[k];
            x[i] += step * (trial[k] - x[i]);
            if (k == first || first >= 0 && x[i] <= 0) {
                x[i] = 0;
                isPassive[i] = false;
            }
        }
        return first >= 0;
    }
}
