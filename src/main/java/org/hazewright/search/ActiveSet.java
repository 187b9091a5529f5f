package org.hazewright.search;

import java.util.Arrays;

/**
 * The engine under {@link ConvexProgramme} and {@link SetSearch}: the dual active-set method for strictly convex quadratic
 * programmes, on storage that is used again and again.
 *
 * <p>minimise ½xᵀHx − bᵀx subject to lower ≤ x ≤ upper and low ≤ rows·x ≤ high; any limit may be infinite. The caller fills
 * the arrays (H row by row, unit diagonal after scaling; row values by column) and calls {@link #solve}. Starting from the
 * unlimited optimum, the most violated limit is taken in, and limits whose multiplier would turn negative are let go; the
 * value rises at every step, so it is a lower bound at any moment and the caller's cutoff may end the work early.
 *
 * <p>Goldfarb & Idnani, Math. Program. 27, 1 (1983), sections 3 and 4. A normal counts as dependent on those in force when
 * the part of it that is free is below 1e-9 of its length in the metric of H⁻¹: at 1e-12 contradicting limits were taken
 * for feasible ones.
 */
final class ActiveSet {
    static final int OPTIMAL = 0;
    static final int INFEASIBLE = 1;
    /** The optimum is known to be at or above the cutoff. */
    static final int CUT = 2;
    /** The step limit was reached: rounding keeps two limits taking turns. */
    static final int STALLED = 3;

    private static final double DEPENDENT = 1e-9;

    /** H with stride {@link #n}, linear term, limits of the variables; filled by the caller. */
    final double[] h;

    final double[] b;
    final double[] lower;
    final double[] upper;
    /** {@code column[i][r]} is the coefficient of variable i in row r; references, never written here. */
    final double[][] column;

    final double[] low;
    final double[] high;
    /** Added to the diagonal before it is factored, relative to it. */
    double ridge = 1e-12;

    /** Result: the optimum, its value, and the limits in force with their multipliers. */
    final double[] x;

    double value;
    int active;
    final int[] limit;
    final double[] multiplier;
    /** After INFEASIBLE: multipliers (≥ 0) of {@link #limit} and, last, of {@link #contradicting}: their sum cannot hold. */
    final double[] contradiction;

    int contradicting;

    private int n;
    private int rows;
    private final double[] chol;
    private final double[] jm;
    private final double[] r;
    private final double[] d;
    private final double[] z;
    private final double[] step;
    private final double[] normal;
    private final double[] y;
    private final double[] t;
    private final boolean[] inForce;

    ActiveSet(int mostVariables, int mostRows) {
        int k = mostVariables;
        h = new double[k * k];
        b = new double[k];
        lower = new double[k];
        upper = new double[k];
        column = new double[k][];
        low = new double[mostRows];
        high = new double[mostRows];
        x = new double[k];
        limit = new int[k + 1];
        multiplier = new double[k + 1];
        contradiction = new double[k + 1];
        chol = new double[k * k];
        jm = new double[k * k];
        r = new double[k * k];
        d = new double[k];
        z = new double[k];
        step = new double[k + 1];
        normal = new double[k];
        y = new double[mostRows];
        t = new double[k];
        inForce = new boolean[2 * k + 2 * mostRows];
    }

    /** Codes of limits: variable i at its lower or upper limit, row r at its low or high one. */
    boolean isLower(int code) {
        return code < n;
    }

    boolean isUpper(int code) {
        return code >= n && code < 2 * n;
    }

    boolean isRow(int code) {
        return code >= 2 * n;
    }

    int rowOf(int code) {
        return (code - 2 * n) >> 1;
    }

    boolean isHigh(int code) {
        return code >= 2 * n && (code & 1) == 1;
    }

    /** Solves for the first {@code variables} variables and {@code rowCount} rows; see the class comment for the outcomes. */
    int solve(int variables, int rowCount, double cutoff) {
        n = variables;
        rows = rowCount;
        active = 0;
        Arrays.fill(inForce, 0, 2 * n + 2 * rows, false);
        factor();
        unlimitedOptimum();
        int mostSteps = 60 + 8 * (n + Math.min(rows, 4 * n));
        for (int steps = 0; steps < mostSteps; steps++) {
            if (value >= cutoff) return CUT;
            int p = mostViolated();
            if (p < 0) {
                settle(null);
                return OPTIMAL;
            }
            fillNormal(p);
            double entering = 0;
            while (true) {
                if (++steps > mostSteps) return STALLED;
                double free = directions();
                int leaving = -1;
                double dualStep = Double.POSITIVE_INFINITY;
                for (int k = 0; k < active; k++)
                    if (step[k] > 0) {
                        double ratio = multiplier[k] / step[k];
                        if (ratio < dualStep) {
                            dualStep = ratio;
                            leaving = k;
                        }
                    }
                boolean dependent = free == 0;
                double primalStep = dependent ? Double.POSITIVE_INFINITY : Math.max(0, -slack(p)) / free;
                if (dependent && leaving < 0) {
                    for (int k = 0; k < active; k++) contradiction[k] = -step[k];
                    contradiction[active] = 1;
                    contradicting = p;
                    return INFEASIBLE;
                }
                double move = Math.min(dualStep, primalStep);
                if (!dependent) {
                    for (int i = 0; i < n; i++) x[i] += move * z[i];
                    value += move * free * (0.5 * move + entering);
                }
                for (int k = 0; k < active; k++) multiplier[k] -= move * step[k];
                entering += move;
                if (primalStep <= dualStep) {
                    takeIn(p, entering);
                    break;
                }
                letGo(leaving);
                if (value >= cutoff) return CUT;
            }
        }
        return STALLED;
    }

    private void factor() {
        // Lower triangle of the Cholesky factor, then its inverse row by row: row k of L⁻¹ is column k of J = L⁻ᵀ.
        for (int i = 0; i < n; i++) {
            int row = i * n;
            for (int j = 0; j <= i; j++) {
                double sum = h[row + j];
                if (i == j) sum += ridge * h[row + i];
                for (int k = 0; k < j; k++) sum -= chol[row + k] * chol[j * n + k];
                if (i == j) chol[row + i] = Math.sqrt(Math.max(sum, 0.5 * ridge * h[row + i] + 1e-300));
                else chol[row + j] = sum / chol[j * n + j];
            }
        }
        for (int k = 0; k < n; k++) {
            int row = k * n;
            double inverse = 1 / chol[row + k];
            for (int i = 0; i < k; i++) {
                double sum = 0;
                for (int j = i; j < k; j++) sum -= chol[row + j] * jm[j * n + i];
                jm[row + i] = sum * inverse;
            }
            jm[row + k] = inverse;
            for (int i = k + 1; i < n; i++) jm[row + i] = 0;
        }
    }

    private void unlimitedOptimum() {
        Arrays.fill(x, 0, n, 0);
        value = 0;
        for (int k = 0; k < n; k++) {
            double s = 0;
            for (int i = 0; i <= k; i++) s += jm[k * n + i] * b[i];
            for (int i = 0; i <= k; i++) x[i] += s * jm[k * n + i];
            value -= 0.5 * s * s;
        }
    }

    /** The code of the limit violated most, or −1; limits in force hold by construction. */
    private int mostViolated() {
        double size = 0;
        for (int i = 0; i < n; i++) size = Math.max(size, Math.abs(x[i]));
        int found = -1;
        double grain = 1e-12 * size;
        double worst = grain;
        for (int i = 0; i < n; i++) {
            if (lower[i] - x[i] > worst && !inForce[i]) {
                worst = lower[i] - x[i];
                found = i;
            }
            if (x[i] - upper[i] > worst && !inForce[n + i]) {
                worst = x[i] - upper[i];
                found = n + i;
            }
        }
        if (rows == 0) return found;
        Arrays.fill(y, 0, rows, 0);
        for (int i = 0; i < n; i++) {
            double xi = x[i];
            if (xi == 0) continue;
            double[] c = column[i];
            for (int k = 0; k < rows; k++) y[k] += xi * c[k];
        }
        for (int k = 0; k < rows; k++) {
            double under = low[k] - y[k];
            double over = y[k] - high[k];
            double violation = Math.max(under, over);
            if (violation > worst && violation > grain + 1e-12 * Math.abs(over > under ? high[k] : low[k])) {
                int code = 2 * n + 2 * k + (over > under ? 1 : 0);
                if (!inForce[code]) {
                    worst = violation;
                    found = code;
                }
            }
        }
        return found;
    }

    private void fillNormal(int code) {
        if (code < 2 * n) {
            Arrays.fill(normal, 0, n, 0);
            if (code < n) normal[code] = 1;
            else normal[code - n] = -1;
        } else {
            int k = rowOf(code);
            double sign = (code & 1) == 1 ? -1 : 1;
            for (int i = 0; i < n; i++) normal[i] = sign * column[i][k];
        }
    }

    private double slack(int code) {
        if (code < n) return x[code] - lower[code];
        if (code < 2 * n) return upper[code - n] - x[code - n];
        int k = rowOf(code);
        double sum = 0;
        for (int i = 0; i < n; i++) sum += x[i] * column[i][k];
        return (code & 1) == 1 ? high[k] - sum : sum - low[k];
    }

    /** Primal direction z, dual direction {@link #step}; returns zᵀnormal, 0 when the normal depends on those in force. */
    private double directions() {
        double all = 0;
        double free = 0;
        for (int k = 0; k < n; k++) {
            double s = 0;
            int col = k * n;
            for (int i = 0; i < n; i++) s += jm[col + i] * normal[i];
            d[k] = s;
            all += s * s;
            if (k >= active) free += s * s;
        }
        if (free <= DEPENDENT * DEPENDENT * all) free = 0;
        else {
            Arrays.fill(z, 0, n, 0);
            for (int k = active; k < n; k++) {
                double s = d[k];
                int col = k * n;
                for (int i = 0; i < n; i++) z[i] += s * jm[col + i];
            }
        }
        for (int k = active - 1; k >= 0; k--) {
            double s = d[k];
            for (int j = k + 1; j < active; j++) s -= r[j * n + k] * step[j];
            step[k] = s / r[k * n + k];
        }
        return free;
    }

    private void takeIn(int code, double entering) {
        for (int k = n - 1; k > active; k--) {
            if (d[k] == 0) continue;
            double length = Math.sqrt(d[k - 1] * d[k - 1] + d[k] * d[k]);
            double c = d[k - 1] / length;
            double s = d[k] / length;
            d[k - 1] = length;
            d[k] = 0;
            rotate(k - 1, k, c, s);
        }
        System.arraycopy(d, 0, r, active * n, active + 1);
        limit[active] = code;
        multiplier[active] = entering;
        inForce[code] = true;
        active++;
    }

    private void letGo(int l) {
        inForce[limit[l]] = false;
        active--;
        for (int k = l; k < active; k++) {
            limit[k] = limit[k + 1];
            multiplier[k] = multiplier[k + 1];
            System.arraycopy(r, (k + 1) * n, r, k * n, Math.min(n, k + 2));
        }
        for (int k = l; k < active; k++) {
            double a = r[k * n + k];
            double e = r[k * n + k + 1];
            if (e == 0) continue;
            double length = Math.sqrt(a * a + e * e);
            double c = a / length;
            double s = e / length;
            r[k * n + k] = length;
            r[k * n + k + 1] = 0;
            for (int j = k + 1; j < active; j++) {
                double p = r[j * n + k];
                double q = r[j * n + k + 1];
                r[j * n + k] = c * p + s * q;
                r[j * n + k + 1] = c * q - s * p;
            }
            rotate(k, k + 1, c, s);
        }
    }

    private void rotate(int p, int q, double c, double s) {
        int a = p * n;
        int e = q * n;
        for (int i = 0; i < n; i++) {
            double u = jm[a + i];
            double v = jm[e + i];
            jm[a + i] = c * u + s * v;
            jm[e + i] = c * v - s * u;
        }
    }

    /**
     * Makes x and the multipliers exact for the limits now in force: the equations of the optimum are solved with the
     * factors at hand, and errors of rounding (and of the ridge, when the true matrix {@code trueH} is given) are taken out
     * by repeated correction.
     */
    void settle(double[] trueH) {
        double[] matrix = trueH == null ? h : trueH;
        int rounds = trueH == null ? 1 : 4;
        for (int round = 0; round < rounds; round++) {
            // t: what the gradient still lacks, b − Hx + N·multiplier; moved along J.
            for (int i = 0; i < n; i++) {
                double sum = b[i];
                for (int j = 0; j < n; j++) sum -= matrix[i * n + j] * x[j];
                t[i] = sum;
            }
            for (int k = 0; k < active; k++) {
                fillNormal(limit[k]);
                for (int i = 0; i < n; i++) t[i] += multiplier[k] * normal[i];
            }
            // d1 = R⁻ᵀ(limit − Nᵀx); d2 = J2ᵀ t
            for (int k = 0; k < active; k++) {
                double s = -slack(limit[k]);
                for (int j = 0; j < k; j++) s -= r[k * n + j] * d[j];
                d[k] = s / r[k * n + k];
            }
            for (int k = active; k < n; k++) {
                double s = 0;
                for (int i = 0; i < n; i++) s += jm[k * n + i] * t[i];
                d[k] = s;
            }
            Arrays.fill(z, 0, n, 0);
            for (int k = 0; k < n; k++) for (int i = 0; i < n; i++) z[i] += d[k] * jm[k * n + i];
            for (int i = 0; i < n; i++) x[i] += z[i];
            // R·dMultiplier = d1 − J1ᵀ t
            for (int k = active - 1; k >= 0; k--) {
                double s = d[k];
                for (int i = 0; i < n; i++) s -= jm[k * n + i] * t[i];
                for (int j = k + 1; j < active; j++) s -= r[j * n + k] * step[j];
                step[k] = s / r[k * n + k];
            }
            for (int k = 0; k < active; k++) multiplier[k] += step[k];
        }
        for (int k = 0; k < active; k++) {
            if (isLower(limit[k])) x[limit[k]] = lower[limit[k]];
            else if (isUpper(limit[k])) x[limit[k] - n] = upper[limit[k] - n];
        }
        double sum = 0;
        for (int i = 0; i < n; i++) {
            double gradient = 0;
            for (int j = 0; j < n; j++) gradient += matrix[i * n + j] * x[j];
            sum += x[i] * (0.5 * gradient - b[i]);
        }
        value = sum;
    }
}
