package org.hazewright.optics;

import java.util.concurrent.ConcurrentHashMap;

/**
 * Gauss–Legendre quadrature on [−1, 1]: exact for polynomials up to degree 2n − 1.
 *
 * <p>Only the positive nodes are kept, n even: the rule is symmetric. Newton's iteration on P_n (Abramowitz &amp; Stegun,
 * <em>Handbook of Mathematical Functions</em>, 1964, 25.4.29).
 *
 * @param node positive nodes, n/2 of them
 * @param weight their weights; all weights of the rule add up to 2
 */
record GaussLegendre(double[] node, double[] weight) {
    private static final ConcurrentHashMap<Integer, GaussLegendre> KNOWN = new ConcurrentHashMap<>();

    /** The rule with at least so many nodes; numbers are rounded up so that few rules serve all. */
    static GaussLegendre ofAtLeast(int nodes) {
        int step = Math.max(2, Integer.highestOneBit(Math.max(nodes, 16)) / 8);
        return KNOWN.computeIfAbsent((nodes + step - 1) / step * step, GaussLegendre::of);
    }

    private static GaussLegendre of(int n) {
        double[] node = new double[n / 2];
        double[] weight = new double[n / 2];
        for (int i = 0; i < n / 2; i++) {
            double z = Math.cos(Math.PI * (i + 0.75) / (n + 0.5));
            double slope = 1;
            for (int step = 0; step < 100; step++) {
                double below = 0;
                double here = 1;
                for (int j = 0; j < n; j++) {
                    double above = ((2 * j + 1) * z * here - j * below) / (j + 1);
                    below = here;
                    here = above;
                }
                slope = n * (z * here - below) / (z * z - 1);
                double dz = here / slope;
                z -= dz;
                if (Math.abs(dz) < 1e-15) break;
            }
            node[i] = z;
            weight[i] = 2 / ((1 - z) * (1 + z) * slope * slope);
        }
        return new GaussLegendre(node, weight);
    }
}
