package org.hazewright.optics;

import java.util.Arrays;

/**
 * Averages over a log-normal distribution: the trapezoidal rule in t = ln(D/median), its step halved until it settles.
 *
 * <p>For a Gaussian times a smooth function the trapezoidal rule on the whole line converges faster than any power of the
 * step (Trefethen &amp; Weideman, SIAM Rev. 56, 385, 2014), and a halved step uses all earlier spheres again. The first
 * steps are σ and σ/2, σ = ln GSD. Where the tails are cut, less than 1e-8 of any average is lost, by a rough formula for the
 * cross section.
 *
 * <p>Error estimate: the last change, which is the error of the coarser rule. Until the step resolves the ripples of the cross
 * section (a step in x below {@value #RESOLVED}) two rules may agree by chance, so there it is three times the last change,
 * and not less than a quarter of the change before.
 */
final class LogNormalQuadrature extends SizeQuadrature {
    private static final double RESOLVED = 0.2;
    private static final double TAIL = 1e-9;

    private final double medianNm;
    private final double sigma;
    private final double scatteringSmall;
    private final double scatteringMiddle;
    private final boolean absorbing;

    private final double from;
    private final double typicalSize;
    private double step;
    private double[] nodes;
    private double[] wanted;
    private final double[] sums = new double[FIGURES];
    private double[] averages;
    private double change = Double.NaN;
    private double error = Double.NaN;

    LogNormalQuadrature(SizeDistribution.LogNormal sizes, double sizePerNm, double n, double k) {
        this.medianNm = sizes.numberMedianDiameterNm();
        this.sigma = Math.log(sizes.geometricStandardDeviation());
        this.absorbing = k > 0;
        // |(m² − 1)/(m² + 2)|² and |m − 1|²
        double re = n * n - k * k;
        double im = 2 * n * k;
        this.scatteringSmall = 8.0 / 3 * ((re - 1) * (re - 1) + im * im) / ((re + 2) * (re + 2) + im * im);
        this.scatteringMiddle = 2 * ((n - 1) * (n - 1) + k * k);

        // where the integrands are: rough cross sections on a coarse grid
        int grid = 48;
        double low = sigma * sigma - 6 * sigma;
        double high = 6 * sigma * sigma + 6 * sigma;
        double[][] rough = new double[3][grid + 1];
        double[] most = new double[3];
        int top = 0;
        for (int i = 0; i <= grid; i++) {
            double t = low + (high - low) * i / grid;
            double x = medianNm * sizePerNm * Math.exp(t);
            double area = Math.exp(-t * t / (2 * sigma * sigma) + 2 * t);
            double scattering = area
                    / (1 / (scatteringSmall * x * x * x * x + 1e-300) + 1 / (scatteringMiddle * x * x + 1e-300) + 0.5);
            rough[0][i] = scattering;
            rough[1][i] = scattering / (1 + x * x);
            rough[2][i] = area * Math.min(x, 1);
            for (int j = 0; j < 3; j++) most[j] = Math.max(most[j], rough[j][i]);
            if (rough[0][i] == most[0]) top = i;
        }
        int first = 0;
        while (first < grid && rough[1][first] < TAIL * most[1] && (!absorbing || rough[2][first] < TAIL * most[2]))
            first++;
        int last = grid;
        while (last > 0 && rough[0][last] < TAIL * most[0] && (!absorbing || rough[2][last] < TAIL * most[2])) last--;
        double end = low + (high - low) * Math.min(grid, last + 1) / grid;
        this.from = low + (high - low) * Math.max(0, first - 1) / grid;
        this.typicalSize = medianNm * sizePerNm * Math.exp(low + (high - low) * top / grid);
        double largest = medianNm * sizePerNm * Math.exp(end);
        if (largest > Mie.X_MAX)
            throw new Refusal("This log-normal distribution reaches particles of "
                    + Plain.number(Math.rint(largest / sizePerNm / 1e3))
                    + " µm, size parameter " + Plain.number(Math.rint(largest))
                    + ", that still scatter noticeably; spheres can be"
                    + " computed up to 20000. Give a smaller median or geometric standard deviation.");
        this.step = sigma / 2;
        this.nodes = new double[2 + (int) ((end - from) / step)];
        for (int i = 0; i < nodes.length; i++) nodes[i] = from + i * step;
        this.wanted = nodes;
    }

    private double density(double t) {
        return Math.exp(-t * t / (2 * sigma * sigma)) / (sigma * Math.sqrt(2 * Math.PI));
    }

    @Override
    double[] wantedNm() {
        double[] out = new double[wanted.length];
        for (int i = 0; i < out.length; i++) out[i] = medianNm * Math.exp(wanted[i]);
        return out;
    }

    @Override
    void accept(double[][] figures) {
        boolean first = averages == null;
        double[] even = new double[FIGURES];
        for (int i = 0; i < wanted.length; i++) {
            double density = density(wanted[i]);
            for (int j = 0; j < FIGURES; j++) {
                sums[j] += density * figures[j][i];
                if (first && i % 2 == 0) even[j] += density * figures[j][i];
            }
        }
        double[] now = new double[FIGURES];
        double[] difference = new double[FIGURES];
        for (int j = 0; j < FIGURES; j++) {
            now[j] = step * sums[j];
            difference[j] = now[j] - (first ? 2 * step * even[j] : averages[j]);
        }
        double before = change;
        change = worst(difference, now);
        averages = now;
        boolean resolved = step * typicalSize < RESOLVED;
        error = resolved ? change : Math.max(3 * change, first ? 0 : before / 4);
        if (error <= WANTED) {
            wanted = new double[0];
            return;
        }
        if (2 * nodes.length > MOST_SPHERES) throw doesNotSettle();
        wanted = new double[nodes.length];
        for (int i = 0; i < wanted.length; i++) wanted[i] = nodes[i] + step / 2;
        int old = nodes.length;
        nodes = Arrays.copyOf(nodes, 2 * old);
        System.arraycopy(wanted, 0, nodes, old, old);
        step /= 2;
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
        double[] out = new double[nodes.length];
        for (int i = 0; i < out.length; i++) out[i] = medianNm * Math.exp(nodes[i]);
        return out;
    }

    @Override
    double[] weights() {
        double[] out = new double[nodes.length];
        for (int i = 0; i < out.length; i++) out[i] = step * density(nodes[i]);
        return out;
    }
}
