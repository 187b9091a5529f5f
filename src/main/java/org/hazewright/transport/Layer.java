package org.hazewright.transport;

/**
 * What a bare homogeneous layer does to light: reflection and transmission between the {@link Directions}, azimuth averaged.
 *
 * <p>Row i, column j: radiance leaving along i per radiance arriving along j. Made thin, then doubled. With
 * p± the phase function's even and odd Legendre parts, P = (1 − a p₊ W)/µ and Q = (1 − a p₋ W)/µ, half thickness h:
 * <pre>
 *   E = h P H,  F = h H Q,  H = tanh(√X)/√X at X = h² Q P;   R = 1/(1 + E) − 1/(1 + F),   T = 1/(1 + E) + 1/(1 + F) − 1
 * </pre>
 * H by its Padé fraction of third degree, whose error at √X = 2.5, reached by the most grazing direction only, is 4e−7.
 * Doubling: R + T(1 − R²)⁻¹RT and T(1 − R²)⁻¹T, by way of the even and odd illumination of the two halves, which keeps the
 * digits of a small T. (Doubling H itself would be quicker and is unstable.)
 *
 * <p>Van de Hulst, Multiple Light Scattering, Academic Press (1980), ch. 4; matrix exponential: Waterman, J. Opt. Soc. Am. 71,
 * 410 (1981).
 */
final class Layer {
    /** Half thickness of the first layer over the smallest cosine, at most. */
    private static final double FIRST = 2.5;

    final double[] reflection;
    final double[] transmission;

    private Layer(double[] reflection, double[] transmission) {
        this.reflection = reflection;
        this.transmission = transmission;
    }

    /** A layer of optical thickness {@code depth} in a medium of albedo a and truncated Henyey–Greenstein moments. */
    static Layer of(Directions directions, double albedo, double[] moment, double depth) {
        int doublings = Math.max(0, (int) Math.ceil(Math.log(depth / first(directions)) / Math.log(2)));
        Layer layer = thin(directions, albedo, moment, Math.scalb(depth, -doublings));
        for (int i = 0; i < doublings; i++) layer = layer.doubled(directions.count());
        return layer;
    }

    /** The same medium, so thick that less than 1e−8 of any light gets through. */
    static Layer deep(Directions directions, double albedo, double[] moment) {
        Layer layer = thin(directions, albedo, moment, first(directions));
        for (int i = 0; i < 60 && layer.leaks(1e-8); i++) layer = layer.doubled(directions.count());
        return layer;
    }

    private static double first(Directions directions) {
        double grazing = 1;
        for (double mu : directions.cosine()) grazing = Math.min(grazing, mu);
        return 2 * FIRST * grazing;
    }

    private boolean leaks(double share) {
        for (double t : transmission) if (Math.abs(t) > share) return true;
        return false;
    }

    private static Layer thin(Directions directions, double albedo, double[] moment, double depth) {
        int n = directions.count();
        double half = depth / 2;
        double[] p = generator(directions, albedo, moment, 0);
        double[] q = generator(directions, albedo, moment, 1);
        double[] x = Square.product(n, q, p);
        for (int i = 0; i < x.length; i++) x[i] *= half * half;
        double[] h = tangent(n, x);
        double[] e = Square.identity(n);
        double[] f = Square.identity(n);
        Square.solve(n, Square.onePlus(n, half, Square.product(n, p, h)), n, e);
        Square.solve(n, Square.onePlus(n, half, Square.product(n, h, q)), n, f);
        double[] r = new double[n * n];
        double[] t = new double[n * n];
        for (int i = 0; i < r.length; i++) {
            r[i] = e[i] - f[i];
            t[i] = e[i] + f[i];
        }
        for (int i = 0; i < n; i++) t[i * n + i] -= 1;
        return new Layer(r, t);
    }

    /** tanh(√x)/√x of a matrix, by the seventh convergent of its continued fraction. */
    private static double[] tangent(int n, double[] x) {
        double[] x2 = Square.product(n, x, x);
        double[] x3 = Square.product(n, x, x2);
        double[] top = new double[n * n];
        double[] bottom = new double[n * n];
        for (int i = 0; i < x.length; i++) {
            top[i] = 17325 * x[i] + 378 * x2[i] + x3[i];
            bottom[i] = 62370 * x[i] + 3150 * x2[i] + 28 * x3[i];
        }
        for (int i = 0; i < n; i++) {
            top[i * n + i] += 135135;
            bottom[i * n + i] += 135135;
        }
        Square.solve(n, bottom, n, top);
        return top;
    }

    /** (1 − a Σ (2l + 1) χ_l P_l(µ_i) P_l(µ_j) w_j)/µ_i over even or odd l, with every scattered flux conserved. */
    private static double[] generator(Directions directions, double albedo, double[] moment, int parity) {
        int n = directions.count();
        double[][] legendre = legendre(directions.cosine(), moment.length);
        double[] w = directions.weight();
        double[] phase = new double[n * n];
        for (int l = parity; l < moment.length; l += 2)
            for (int i = 0; i < n; i++) {
                double f = (2 * l + 1) * moment[l] * legendre[l][i];
                for (int j = 0; j < n; j++) phase[i * n + j] += f * legendre[l][j];
            }
        if (parity == 0) conserve(n, phase, w);
        double[] g = new double[n * n];
        for (int i = 0; i < n; i++)
            for (int j = 0; j < n; j++)
                g[i * n + j] = ((i == j ? 1 : 0) - albedo * phase[i * n + j] * w[j])
                        / directions.cosine()[i];
        return g;
    }

    /** What the rule misses of each direction's scattered light goes straight on; the beam's row, without weight, is scaled. */
    private static void conserve(int n, double[] phase, double[] w) {
        for (int j = 0; j < n; j++) {
            double sum = 0;
            for (int i = 0; i < n; i++) sum += w[i] * phase[i * n + j];
            if (w[j] > 0) phase[j * n + j] += (1 - sum) / w[j];
            else for (int i = 0; i < n; i++) phase[j * n + i] /= sum;
        }
    }

    private static double[][] legendre(double[] mu, int count) {
        double[][] p = new double[count][mu.length];
        for (int i = 0; i < mu.length; i++) {
            p[0][i] = 1;
            if (count > 1) p[1][i] = mu[i];
            for (int l = 1; l + 1 < count; l++)
                p[l + 1][i] = ((2 * l + 1) * mu[i] * p[l][i] - l * p[l - 1][i]) / (l + 1);
        }
        return p;
    }

    private Layer doubled(int n) {
        double[] even = transmission.clone();
        double[] odd = transmission.clone();
        Square.solve(n, Square.onePlus(n, -1, reflection), n, even);
        Square.solve(n, Square.onePlus(n, 1, reflection), n, odd);
        for (int i = 0; i < even.length; i++) {
            double half = 0.5 * (even[i] + odd[i]);
            odd[i] = 0.5 * (even[i] - odd[i]);
            even[i] = half;
        }
        double[] t = Square.product(n, transmission, even);
        double[] r = Square.product(n, transmission, odd);
        for (int i = 0; i < r.length; i++) r[i] += reflection[i];
        return new Layer(r, t);
    }
}
