package org.hazewright.search;

import java.util.Arrays;

/**
 * The linear programme of the worst miss: minimise t subject to |Σ a_ij c_i − r_j|/τ_j ≤ t, 0 ≤ c ≤ upper and the volume.
 *
 * <p>Of k amounts it has k + 1 variables and many rows, so it is solved from vertex to vertex in those variables with the
 * inverse of the k + 1 limits in force at hand (the exchange method of discrete Chebyshev approximation with side
 * conditions; Stiefel, Numer. Math. 2, 1, 1960). The start, nothing added and t the base's own worst miss, is always
 * feasible. Edges are chosen by the steepest multiplier, and by lowest index (Bland, Math. Oper. Res. 2, 103, 1977) once a
 * run of steps has gained nothing. Storage is reused; results are in the fields until the next call.
 */
final class WorstMissProgramme {
    private static final double TINY = 1e-11;

    private final Columns columns;
    private final int m;

    /** Result: amounts by position in the set that was given (scaled as {@link Columns#miss}), and the worst miss. */
    final double[] amount;

    double value;
    /** Dual: signed weight of each point (magnitudes sum to 1 unless something broke). */
    final double[] weight;

    double volumeWeight;
    final double[] upperWeight;

    private final double[][] edge;
    private final int[] inForce;
    private final boolean[] isIn;
    private final double[] y;
    private final double[] dy;
    private final double[] w;
    private final double[] size;
    private double[][] col;
    private int k;

    WorstMissProgramme(Columns columns, int mostMembers) {
        this.columns = columns;
        m = columns.points;
        int n = mostMembers + 1;
        amount = new double[mostMembers];
        weight = new double[m];
        upperWeight = new double[mostMembers];
        edge = new double[n][n];
        inForce = new int[n];
        isIn = new boolean[2 * mostMembers + 1 + 2 * m];
        y = new double[m];
        dy = new double[m];
        w = new double[n];
        size = new double[mostMembers];
        col = new double[mostMembers][];
    }

    /** Solves for the members at positions {@code set[0..count)} of the columns; true when it ended at a proven vertex. */
    boolean solve(int[] set, int count) {
        k = count;
        double volume = 0;
        for (int i = 0; i < k; i++) {
            col[i] = columns.miss[set[i]];
            double most = columns.missSize[set[i]];
            size[i] = most > 0 ? 1 / most : 1;
            amount[i] = 0;
        }
        Arrays.fill(isIn, 0, 2 * k + 1 + 2 * m, false);
        int worst = 0;
        for (int j = 0; j < m; j++) {
            y[j] = -columns.residual[j];
            if (Math.abs(y[j]) > Math.abs(y[worst])) worst = j;
        }
        value = Math.abs(y[worst]);
        double sign = y[worst] < 0 ? -1 : 1;
        for (int l = 0; l < k; l++) {
            Arrays.fill(edge[l], 0, k + 1, 0);
            edge[l][l] = 1;
            edge[l][k] = sign * col[l][worst] * size[l];
            inForce[l] = l;
            isIn[l] = true;
        }
        Arrays.fill(edge[k], 0, k + 1, 0);
        edge[k][k] = 1;
        inForce[k] = 2 * k + 1 + 2 * worst + (sign < 0 ? 1 : 0);
        isIn[inForce[k]] = true;

        int idle = 0;
        boolean proven = false;
        for (int round = 0; round < 200 + 20 * (k + m); round++) {
            int leaving = -1;
            double steepest = -TINY;
            for (int l = 0; l <= k; l++) {
                double multiplier = edge[l][k];
                if (multiplier >= -TINY) continue;
                boolean better =
                        idle > 2 * k + 10 ? leaving < 0 || inForce[l] < inForce[leaving] : multiplier < steepest;
                if (better) {
                    steepest = multiplier;
                    leaving = l;
                }
            }
            if (leaving < 0) {
                proven = true;
                break;
            }
            double[] along = edge[leaving];
            double dt = along[k];
            Arrays.fill(dy, 0);
            double dVolume = 0;
            for (int i = 0; i < k; i++) {
                double f = along[i] * size[i];
                if (f == 0) continue;
                double[] c = col[i];
                for (int j = 0; j < m; j++) dy[j] += f * c[j];
                dVolume += f * columns.volume[set[i]];
            }
            int entering = -1;
            double step = Double.POSITIVE_INFINITY;
            double rate = 0;
            for (int j = 0; j < m; j++) {
                // slacks t − y and t + y
                double up = dt - dy[j];
                double down = dt + dy[j];
                int code = 2 * k + 1 + 2 * j;
                if (up < -TINY && !isIn[code]) {
                    double s = Math.max(0, value - y[j]) / -up;
                    if (s < step || s == step && up < rate) {
                        step = s;
                        entering = code;
                        rate = up;
                    }
                }
                if (down < -TINY && !isIn[code + 1]) {
                    double s = Math.max(0, value + y[j]) / -down;
                    if (s < step || s == step && down < rate) {
                        step = s;
                        entering = code + 1;
                        rate = down;
                    }
                }
            }
            for (int i = 0; i < k; i++) {
                double d = along[i];
                if (d < -TINY && !isIn[i]) {
                    double s = Math.max(0, amount[i]) / -d;
                    if (s < step || s == step && d < rate) {
                        step = s;
                        entering = i;
                        rate = d;
                    }
                } else if (d > TINY && !isIn[k + i]) {
                    double s = Math.max(0, columns.reach[set[i]] / size[i] - amount[i]) / d;
                    if (s < step || s == step && -d < rate) {
                        step = s;
                        entering = k + i;
                        rate = -d;
                    }
                }
            }
            if (dVolume > TINY && !isIn[2 * k]) {
                double s = Math.max(0, 1 - volume) / dVolume;
                if (s < step || s == step && -dVolume < rate) {
                    step = s;
                    entering = 2 * k;
                    rate = -dVolume;
                }
            }
            if (entering < 0) break;
            for (int i = 0; i < k; i++) amount[i] += step * along[i];
            for (int j = 0; j < m; j++) y[j] += step * dy[j];
            value += step * dt;
            volume += step * dVolume;
            idle = step * -dt > 1e-14 * value ? 0 : idle + 1;
            exchange(set, leaving, entering);
        }
        finish(set);
        return proven;
    }

    private void exchange(int[] set, int leaving, int entering) {
        for (int l = 0; l <= k; l++) {
            double[] e = edge[l];
            double s;
            if (entering < k) s = e[entering];
            else if (entering < 2 * k) s = -e[entering - k];
            else if (entering == 2 * k) {
                s = 0;
                for (int i = 0; i < k; i++) s -= e[i] * size[i] * columns.volume[set[i]];
            } else {
                int j = (entering - 2 * k - 1) >> 1;
                double sign = ((entering - 2 * k - 1) & 1) == 0 ? -1 : 1;
                s = e[k];
                for (int i = 0; i < k; i++) s += sign * e[i] * size[i] * col[i][j];
            }
            w[l] = s;
        }
        double[] pivot = edge[leaving];
        double inverse = 1 / w[leaving];
        for (int i = 0; i <= k; i++) pivot[i] *= inverse;
        for (int l = 0; l <= k; l++) {
            if (l == leaving || w[l] == 0) continue;
            double[] e = edge[l];
            double s = w[l];
            for (int i = 0; i <= k; i++) e[i] -= s * pivot[i];
        }
        isIn[inForce[leaving]] = false;
        inForce[leaving] = entering;
        isIn[entering] = true;
    }

    private void finish(int[] set) {
        Arrays.fill(weight, 0);
        Arrays.fill(upperWeight, 0, k, 0);
        volumeWeight = 0;
        for (int l = 0; l <= k; l++) {
            int code = inForce[l];
            double multiplier = Math.max(0, edge[l][k]);
            if (code < k) amount[code] = 0;
            else if (code < 2 * k) upperWeight[code - k] = multiplier / size[code - k];
            else if (code == 2 * k) volumeWeight = multiplier;
            else {
                weight[(code - 2 * k - 1) >> 1] += ((code - 2 * k - 1) & 1) == 0 ? multiplier : -multiplier;
            }
        }
        for (int j = 0; j < m; j++) y[j] = -columns.residual[j];
        for (int i = 0; i < k; i++) {
            amount[i] = Math.max(0, Math.min(columns.reach[set[i]], amount[i] * size[i]));
            for (int j = 0; j < m; j++) y[j] += amount[i] * col[i][j];
        }
        value = 0;
        for (int j = 0; j < m; j++) value = Math.max(value, Math.abs(y[j]));
    }
}
