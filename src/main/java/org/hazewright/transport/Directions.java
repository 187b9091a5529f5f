package org.hazewright.transport;

import org.apache.commons.math3.analysis.integration.gauss.GaussIntegrator;
import org.apache.commons.math3.analysis.integration.gauss.GaussIntegratorFactory;

/**
 * The directions in which the radiance of a slab is followed: cosines, weights, and the surface's reflectance for each.
 *
 * <p>Gauss–Legendre points on [0, µ_c] and on [µ_c, 1], µ_c the critical cosine, shared out by angle, so that no interval holds
 * the kink of total reflection; one interval when there is none. Fresnel reflectance rises as a root at µ_c and would spoil the
 * rule there, so each direction gets the reflectance that makes ∫ R(µ) µ f(µ) dµ exact for every polynomial f through the
 * interval's points (product integration). The last direction is the beam's, cosine 1 with weight 0: it receives light and
 * gives none.
 */
record Directions(double[] cosine, double[] weight, double[] reflectance) {
    private static final GaussIntegratorFactory RULES = new GaussIntegratorFactory();
    private static final int FINE = 200;

    /** {@code count} directions and the beam's. */
    static Directions of(int count, Boundary boundary) {
        double critical = boundary.criticalCosine();
        int trapped = critical == 0 ? 0 : Math.max(4, (int) Math.round(count * Math.asin(critical) * 2 / Math.PI));
        double[] mu = new double[count + 1];
        double[] w = new double[count + 1];
        double[] r = new double[count + 1];
        if (trapped > 0) fill(mu, w, 0, trapped, 0, critical);
        fill(mu, w, trapped, count - trapped, critical, 1);
        for (int i = 0; i < trapped; i++) r[i] = 1;
        if (boundary.nInside() != boundary.nOutside()) average(boundary, mu, w, r, trapped, count);
        mu[count] = 1;
        r[count] = boundary.normalReflectance();
        return new Directions(mu, w, r);
    }

    private static void fill(double[] mu, double[] w, int from, int n, double low, double high) {
        GaussIntegrator rule = RULES.legendre(n, low, high);
        for (int i = 0; i < n; i++) {
            mu[from + i] = rule.getPoint(i);
            w[from + i] = rule.getWeight(i);
        }
    }

    private static void average(Boundary boundary, double[] mu, double[] w, double[] r, int from, int to) {
        double m = boundary.nInside() / boundary.nOutside();
        GaussIntegrator fine = RULES.legendre(FINE, 0, 1);
        double[] denominator = new double[to];
        for (int i = from; i < to; i++) {
            denominator[i] = 1;
            for (int k = from; k < to; k++) if (k != i) denominator[i] *= mu[i] - mu[k];
        }
        for (int s = 0; s < FINE; s++) {
            // the cosine outside where light is totally reflected (µ dµ = t dt/m²), else the cosine inside
            double t = fine.getPoint(s);
            double q = m > 1 ? Math.sqrt(1 - (1 - t) * (1 + t) / (m * m)) : t;
            double share = fine.getWeight(s) * (m > 1 ? t / (m * m) : t) * Boundary.fresnel(m, q);
            double all = 1;
            for (int k = from; k < to; k++) all *= q - mu[k];
            for (int i = from; i < to; i++) r[i] += share * all / ((q - mu[i]) * denominator[i]);
        }
        for (int i = from; i < to; i++) r[i] /= w[i] * mu[i];
    }

    int count() {
        return cosine.length;
    }
}
