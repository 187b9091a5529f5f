package org.hazewright.transport;

/**
 * Small square matrices, row after row in one array: product and solution of linear systems.
 *
 * <p>Only what the transport equation asks for, written so that the innermost loop runs along a row.
 */
final class Square {
    private Square() {}

    /** a b, all of order n. */
    static double[] product(int n, double[] a, double[] b) {
        double[] c = new double[n * n];
        int i = 0;
        for (; i + 1 < n; i += 2) twoRows(n, a, b, c, i);
        if (i < n) oneRow(n, a, b, c, i);
        return c;
    }

    private static void twoRows(int n, double[] a, double[] b, double[] c, int i) {
        int r0 = i * n;
        int r1 = r0 + n;
        int k = 0;
        for (; k + 3 < n; k += 4) {
            double p0 = a[r0 + k], p1 = a[r0 + k + 1], p2 = a[r0 + k + 2], p3 = a[r0 + k + 3];
            double q0 = a[r1 + k], q1 = a[r1 + k + 1], q2 = a[r1 + k + 2], q3 = a[r1 + k + 3];
            int b0 = k * n;
            for (int j = 0; j < n; j++) {
                double x0 = b[b0 + j], x1 = b[b0 + n + j], x2 = b[b0 + 2 * n + j], x3 = b[b0 + 3 * n + j];
                c[r0 + j] += (p0 * x0 + p1 * x1) + (p2 * x2 + p3 * x3);
                c[r1 + j] += (q0 * x0 + q1 * x1) + (q2 * x2 + q3 * x3);
            }
        }
        for (; k < n; k++) {
            double p = a[r0 + k];
            double q = a[r1 + k];
            for (int j = 0; j < n; j++) {
                c[r0 + j] += p * b[k * n + j];
                c[r1 + j] += q * b[k * n + j];
            }
        }
    }

    private static void oneRow(int n, double[] a, double[] b, double[] c, int i) {
        for (int k = 0; k < n; k++) {
            double p = a[i * n + k];
            for (int j = 0; j < n; j++) c[i * n + j] += p * b[k * n + j];
        }
    }

    /**
     * Solves a x = b for m right sides (b is n rows of m); a is destroyed, b becomes x. Gauss elimination, rows exchanged for
     * the largest pivot.
     */
    static void solve(int n, double[] a, int m, double[] b) {
        for (int k = 0; k < n; k++) {
            int best = k;
            for (int i = k + 1; i < n; i++) if (Math.abs(a[i * n + k]) > Math.abs(a[best * n + k])) best = i;
            if (best != k) {
                exchange(a, best * n, k * n, n);
                exchange(b, best * m, k * m, m);
            }
            double pivot = 1 / a[k * n + k];
            for (int i = k + 1; i < n; i++) {
                double f = a[i * n + k] * pivot;
                a[i * n + k] = f;
                for (int j = k + 1; j < n; j++) a[i * n + j] -= f * a[k * n + j];
            }
        }
        for (int i = 1; i < n; i++) takeOff(n, a, m, b, i, 0, i);
        for (int i = n - 1; i >= 0; i--) {
            takeOff(n, a, m, b, i, i + 1, n);
            double pivot = 1 / a[i * n + i];
            for (int j = 0; j < m; j++) b[i * m + j] *= pivot;
        }
    }

    /** Row i of b loses a_ik times row k, for k from {@code from} to {@code to}; four rows at a time. */
    private static void takeOff(int n, double[] a, int m, double[] b, int i, int from, int to) {
        int row = i * m;
        int k = from;
        for (; k + 3 < to; k += 4) {
            double f0 = a[i * n + k];
            double f1 = a[i * n + k + 1];
            double f2 = a[i * n + k + 2];
            double f3 = a[i * n + k + 3];
            int b0 = k * m;
            for (int j = 0; j < m; j++)
                b[row + j] -= (f0 * b[b0 + j] + f1 * b[b0 + m + j]) + (f2 * b[b0 + 2 * m + j] + f3 * b[b0 + 3 * m + j]);
        }
        for (; k < to; k++) {
            double f = a[i * n + k];
            for (int j = 0; j < m; j++) b[row + j] -= f * b[k * m + j];
        }
    }

    private static void exchange(double[] x, int p, int q, int length) {
        for (int j = 0; j < length; j++) {
            double t = x[p + j];
            x[p + j] = x[q + j];
            x[q + j] = t;
        }
    }

    /** 1 + s a: the unit matrix plus a scaled matrix. */
    static double[] onePlus(int n, double s, double[] a) {
        double[] c = new double[n * n];
        for (int i = 0; i < c.length; i++) c[i] = s * a[i];
        for (int i = 0; i < n; i++) c[i * n + i] += 1;
        return c;
    }

    static double[] identity(int n) {
        return onePlus(n, 0, new double[n * n]);
    }
}
