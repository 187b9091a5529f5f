package org.hazewright.optics;

/**
 * Averages over a log-normal distribution: the trapezoidal rule in t = ln(D/median), its step halved until it settles.
 *
 * <p>For a Gaussian times a smooth function the trapezoidal rule on the whole line converges faster than any power of the
 * step (Trefethen &amp; Weideman, SIAM Rev. 56, 385, 2014), and a halved step uses all earlier spheres again. The first step
 * follows the structure of the cross section of a droplet, about {@value #FIRST_STEP_IN_X} in x where most is scattered, and is no
 * longer than σ/{@value #LEAST_PER_SIGMA}, σ = ln GSD. Where the tails are cut, less than 1e-7 of any average is lost, by a rough
 * formula for the cross section.
 *
 * <p>Error estimate: that of {@link Ripples} for the worst average, plus the tails. Clear spheres of high contrast (index 1.3 and
 * more, size parameter 10 and more) have resonances so narrow that no affordable step resolves all of them; there the estimate is a
 * statistical one and may stay above what is wanted.
 */
final class LogNormalQuadrature extends SizeQuadrature {
    private static final double TAIL = 1e-6;
    private static final double TAILS_LOST = 1.5e-7;
    private static final double FIRST_STEP_IN_X = 0.27;
    private static final double LEAST_PER_SIGMA = 2.5;

    private final SizeDistribution.LogNormal sizes;
    private final double sizePerNm;

    /** The grid, its places in use, and the figures of the spheres there. */
    private LogNormalGrid grid;

    private int first;
    private int last;
    private double[][] values;

    private double[] wantedNm;
    private double[] averages;
    private double error = Double.NaN;

    LogNormalQuadrature(SizeDistribution.LogNormal sizes, double sizePerNm, double n, double k) {
        this.sizes = sizes;
        this.sizePerNm = sizePerNm;
        // |(m² − 1)/(m² + 2)|² and |m − 1|²
        double re = n * n - k * k;
        double im = 2 * n * k;
        double scatteringSmall = 8.0 / 3 * ((re - 1) * (re - 1) + im * im) / ((re + 2) * (re + 2) + im * im);
        double scatteringMiddle = 2 * ((n - 1) * (n - 1) + k * k);

        double opaque = Math.max(
                1, 1 / (4 * k)); // below this size light is absorbed throughout the sphere, above it on its face
        // where the integrands are: rough cross sections on a coarse grid
        LogNormalGrid coarse = LogNormalGrid.of(sizes, LEAST_PER_SIGMA);
        int count = coarse.count();
        double[][] rough = new double[3][count];
        double[] most = new double[3];
        double top = 0;
        for (int i = 0; i < count; i++) {
            double x = coarse.diameterNm(i) * sizePerNm;
            double area = coarse.weight(i) * x * x;
            double scattering = area
                    / (1 / (scatteringSmall * x * x * x * x + 1e-300) + 1 / (scatteringMiddle * x * x + 1e-300) + 0.5);
            rough[0][i] = scattering;
            rough[1][i] = scattering / (1 + x * x);
            rough[2][i] = k > 0 ? area * Math.min(x, opaque) : 0;
            if (scattering > most[0]) top = x;
            for (int j = 0; j < 3; j++) most[j] = Math.max(most[j], rough[j][i]);
        }
        int from = 0;
        while (from < count - 1 && rough[1][from] < TAIL * most[1] && rough[2][from] <= TAIL * most[2]) from++;
        int to = count - 1;
        while (to > 0 && rough[0][to] < TAIL * most[0] && rough[2][to] <= TAIL * most[2]) to--;
        from = Math.max(0, from - 1);
        to = Math.min(count - 1, to + 1);
        if (coarse.diameterNm(to) * sizePerNm > Mie.X_MAX)
            throw new Refusal("This log-normal distribution reaches particles of "
                    + Plain.number(Math.rint(coarse.diameterNm(to) / 1e3))
                    + " µm, size parameter " + Plain.number(Math.rint(coarse.diameterNm(to) * sizePerNm))
                    + ", that still scatter noticeably; spheres can be"
                    + " computed up to 20000. Give a smaller median or geometric standard deviation.");
        int finer = Math.max(0, (int) Math.ceil(4 * Math.log(coarse.step() * top / FIRST_STEP_IN_X) / Math.log(2)));
        grid = LogNormalGrid.of(sizes, LEAST_PER_SIGMA * Math.pow(2, finer / 4.0));
        first = Math.max(0, (int) (from * coarse.step() / grid.step()));
        last = Math.min(grid.count() - 1, (int) Math.ceil(to * coarse.step() / grid.step()));
        wantedNm = new double[last - first + 1];
        for (int i = 0; i < wantedNm.length; i++) wantedNm[i] = diameterNm(first + i);
    }

    /** Spheres smaller than can be computed scatter nothing beside the rest. */
    private double diameterNm(int place) {
        return Math.max(Mie.X_MIN / sizePerNm, grid.diameterNm(place));
    }

    @Override
    double[] wantedNm() {
        return wantedNm;
    }

    @Override
    void accept(double[][] figures) {
        values = values == null ? figures : between(values, figures);
        averages = new double[FIGURES];
        error = 0;
        double[] terms = new double[last - first + 1];
        for (int j = 0; j < FIGURES; j++) {
            double sum = 0;
            for (int i = 0; i < terms.length; i++) {
                terms[i] = grid.weight(first + i) * values[j][i];
                sum += terms[i];
            }
            averages[j] = sum;
            if (sum != 0) error = Math.max(error, Ripples.error(terms) / sum);
        }
        error += TAILS_LOST;
        if (error <= WANTED || 2 * terms.length > MOST_SPHERES) {
            wantedNm = new double[0];
            return;
        }
        grid = LogNormalGrid.of(sizes, 2 * grid.perSigma());
        first *= 2;
        last *= 2;
        wantedNm = new double[terms.length - 1];
        for (int i = 0; i < wantedNm.length; i++) wantedNm[i] = diameterNm(first + 2 * i + 1);
    }

    /** Known values with fresh ones between them. */
    private static double[][] between(double[][] known, double[][] fresh) {
        double[][] out = new double[FIGURES][2 * known[0].length - 1];
        for (int j = 0; j < FIGURES; j++) {
            for (int i = 0; i < fresh[j].length; i++) {
                out[j][2 * i] = known[j][i];
                out[j][2 * i + 1] = fresh[j][i];
            }
            out[j][2 * fresh[j].length] = known[j][fresh[j].length];
        }
        return out;
    }

    @Override
    double[] averages() {
        return averages;
    }

    @Override
    double relativeError() {
        return error;
    }

    @Override
    double[] diametersNm() {
        double[] out = new double[last - first + 1];
        for (int i = 0; i < out.length; i++) out[i] = diameterNm(first + i);
        return out;
    }

    @Override
    double[] weights() {
        double[] out = new double[last - first + 1];
        for (int i = 0; i < out.length; i++) out[i] = grid.weight(first + i);
        return out;
    }
}
