package org.hazewright.optics;

/**
 * Scattering and absorption efficiencies of one homogeneous sphere of any size: Mie's solution.
 *
 * <p>Size parameter x = πD n_h/λ and relative index m = n + ik of the sphere in a host that does not absorb, k ≥ 0. Domain:
 * 1e-4 ≤ x ≤ 2e4, 0.2 ≤ n ≤ 10, 0 ≤ k ≤ 10 (so |m| ≤ 10√2); outside it a {@link Refusal}. Relative error of Q_ext, Q_sca and g at most 1e-10 for
 * x ≤ 1000 and 1e-8 above, and of Q_abs the same however weakly the sphere absorbs, against values of 30 digits. For coefficients and angles see
 * {@link MieSeries}, which also states the equations and their source.
 */
public final class Mie {
    static final double X_MIN = 1e-4;
    static final double X_MAX = 2e4;
    static final double N_MIN = 0.2;
    static final double N_MAX = 10;
    static final double K_MAX = 10;

    /** Added to a denominator that may be 0 exactly; no other denominator is changed by it. */
    static final double OFF_POLE = 1e-150;

    private Mie() {}

    /** Efficiencies of a sphere of size parameter x and relative index n + ik. */
    public static Efficiencies sphere(double x, double n, double k) {
        return MieSeries.of(x, n, k).efficiencies();
    }

    /**
     * Many spheres at once, several times as fast as one by one.
     *
     * <p>Size parameters {@code x} and relative indices {@code n} + i{@code k}, all of one length, in any order; fills {@code
     * qSca}, {@code qAbs} and {@code g} of that length (extinction is their sum). Same domain and error as {@link #sphere}.
     */
    public static void spheres(double[] x, double[] n, double[] k, double[] qSca, double[] qAbs, double[] g) {
        int count = x.length;
        if (n.length != count || k.length != count || qSca.length != count || qAbs.length != count || g.length != count)
            throw new Refusal("Spheres need as many indices and places for results as size parameters.");
        int[] order = bySize(x, n, k);
        MieLanes lanes = MieLanes.ofThisThread();
        for (int from = 0; from < count; ) {
            int first = order[from];
            boolean absorbing = k[first] > 0;
            boolean dense = dense(n[first], k[first]);
            double least = MieLanes.leastBeside(x[first]);
            lanes.clear();
            int to = from;
            while (to < count && lanes.filled() < MieLanes.LANES) {
                int next = order[to];
                if (x[next] < least || k[next] > 0 != absorbing || dense(n[next], k[next]) != dense) break;
                lanes.add(x[next], n[next], k[next]);
                to++;
            }
            if (lanes.filled() < FEW) {
                for (int i = from; i < to; i++) {
                    Efficiencies one = sphere(x[order[i]], n[order[i]], k[order[i]]);
                    qSca[order[i]] = one.qSca();
                    qAbs[order[i]] = one.qAbs();
                    g[order[i]] = one.g();
                }
            } else {
                lanes.solve(absorbing, dense);
                for (int i = from; i < to; i++) {
                    qSca[order[i]] = lanes.qSca(i - from);
                    qAbs[order[i]] = absorbing ? lanes.qAbs(i - from) : 0;
                    g[order[i]] = lanes.g(i - from);
                }
            }
            from = to;
        }
    }

    /** Fewer spheres than this are not worth a block. */
    private static final int FEW = 8;

    private static boolean dense(double n, double k) {
        return n * n + k * k >= 1;
    }

    /**
     * Places of the spheres, kinds apart (clear or absorbing, dense or thin), each kind from large to small within 3 %: one
     * counting sort by the exponent and the first five binary digits of x.
     */
    private static int[] bySize(double[] x, double[] n, double[] k) {
        int lowest = (int) (Double.doubleToRawLongBits(X_MIN) >>> 47);
        int sizes = (int) (Double.doubleToRawLongBits(X_MAX) >>> 47) - lowest + 1;
        int[] key = new int[x.length];
        int[] starts = new int[4 * sizes + 1];
        for (int i = 0; i < x.length; i++) {
            refuseOutsideDomain(x[i], n[i], k[i]);
            int kind = (k[i] > 0 ? 2 : 0) + (dense(n[i], k[i]) ? 1 : 0);
            key[i] = (kind + 1) * sizes - 1 - (int) (Double.doubleToRawLongBits(x[i]) >>> 47) + lowest;
            starts[key[i] + 1]++;
        }
        for (int i = 1; i < starts.length; i++) starts[i] += starts[i - 1];
        int[] order = new int[x.length];
        for (int i = 0; i < x.length; i++) order[starts[key[i]]++] = i;
        return order;
    }

    /**
     * Number of partial waves kept.
     *
     * <p>The last waves of a clear sphere fall off as |ψ_n/χ_n|², and x + 4.05 x^(1/3) + 2 is enough (Wiscombe, Appl. Opt. 19,
     * 1505, 1980). An absorbing sphere takes light in proportion to |ψ_n/χ_n| itself, so for the same error it needs more.
     */
    static int orders(double x, boolean absorbing) {
        return (int) (x + (absorbing ? 7 : 4.05) * Math.cbrt(x) + 3);
    }

    /** Order above z at which a downward recurrence may begin: ψ_n/χ_n &lt; 1e-16 there, so that it forgets how it began. */
    static int startOfDownward(double z) {
        return (int) (z + 7 * Math.cbrt(z) + 6);
    }

    static void refuseOutsideDomain(double x, double n, double k) {
        if (!(x >= X_MIN && x <= X_MAX))
            throw new Refusal(
                    "Size parameter x = πD n/λ is " + x + "; a sphere can be computed for x from 0.0001 to 20000."
                            + " Check diameter and wavelength: both are in nm.");
        if (!(n >= N_MIN && n <= N_MAX))
            throw new Refusal("Refractive index of the sphere relative to its host is " + n
                    + "; it must lie between 0.2 and 10.");
        if (!(k >= 0 && k <= K_MAX))
            throw new Refusal("Absorption index k of the sphere relative to its host is " + k
                    + "; it must lie between 0 (clear) and 10. In the convention n + ik, k > 0 absorbs.");
    }
}
