package org.hazewright.optics;

/**
 * Averages over a log-normal distribution: the trapezoidal rule in t = ln(D/median), its step halved until it settles.
 *
 * <p>For a Gaussian times a smooth function the trapezoidal rule on the whole line converges faster than any power of the
 * step (Trefethen &amp; Weideman, SIAM Rev. 56, 385, 2014), and a halved step uses all earlier spheres again. The first step
 * follows the structure of the cross section of a droplet, about {@value #FIRST_STEP_IN_X} in x, within limits set by
 * σ = ln GSD. Where the tails are cut, less than 3e-7 of any average is lost, by a rough formula for the cross section.
 *
 * <p>Error estimate, the larger of two, plus the tails.
 *
 * <p>(1) Convergence: the spheres are dealt out in turn to 2, 4 and 8 coarser rules; d₀, d₁, d₂ are the largest differences
 * (halved) between rules that are each other's midpoints. d₀ is the error of a rule twice as coarse. Each halving squares the
 * gain of the one before, so this rule's error is d₀ times less than the larger of d₀/d₁ and (d₁/d₂)², of which three times is
 * taken, but not less than d₀/100 nor more than 3d₀.
 *
 * <p>(2) Roughness: ripples of the cross section finer than the step let two rules agree by chance, but they make it jump from
 * node to node; sixteenth differences of C(t)/D^3.5, nearly zero for a smooth function, give the size of the jumps and with
 * it r, the standard error of the sum. Three times r is taken, less where r falls faster with the step than for jumps by
 * chance: times 2r/r₂ with r₂ of the rule twice as coarse, since jumps that fall so are a smooth function coming into view.
 *
 * <p>Clear spheres of high contrast (index 1.3 and more, size parameter 10 and more) have resonances so narrow that no
 * affordable step resolves all of them; there the estimate is the statistical one and may stay above what is wanted.
 */
final class LogNormalQuadrature extends SizeQuadrature {
    private static final double TAIL = 1e-6;
    private static final double TAILS_LOST = 3e-7;

    /** Sum of the squares of the binomial coefficients in a sixteenth difference. */
    private static final double SQUARES = 601080390;

    /** First step as a length in x, and its limits as parts of σ. */
    private static final double FIRST_STEP_IN_X = 0.155;

    private static final double LONGEST_FIRST = 1 / 3.5;
    private static final double SHORTEST_FIRST = 1 / 14.0;

    /** Cross sections grow with a power of the diameter from 2 (large) to 6 (small); this one is divided out of differences. */
    private static final double FLATTEN = 3.5;

    private final double medianNm;
    private final double sigma;
    private final double scatteringSmall;
    private final double scatteringMiddle;
    private final boolean absorbing;

    private final double from;
    private final double typicalSize;
    private double step;

    /** Of the spheres, by ascending size: diameter in nm, density of t, and their three figures. */
    private double[] diameters = new double[0];

    private double[] densities = new double[0];
    private double[][] values = new double[FIGURES][0];

    /** t and diameters of the spheres wanted next. */
    private double[] wanted;

    private double[] wantedNm;
    private double[] averages;
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
        int grid = 40;
        double low = sigma * sigma - 6 * sigma;
        double high = 6 * sigma * sigma + 6 * sigma;
        double[][] rough = new double[3][grid + 1];
        double[] most = new double[3];
        double top = 0;
        // in equal steps of t a power of e grows by a factor, and a Gaussian by a factor that does so itself
        double stride = (high - low) / grid;
        double growth = Math.exp(stride);
        double narrowing = Math.exp(-stride * stride / (sigma * sigma));
        double rise = Math.exp(2 * stride - (2 * low * stride + stride * stride) / (2 * sigma * sigma));
        double x = medianNm * sizePerNm * Math.exp(low);
        double area = Math.exp(-low * low / (2 * sigma * sigma) + 2 * low);
        for (int i = 0; i <= grid; i++) {
            double scattering = area
                    / (1 / (scatteringSmall * x * x * x * x + 1e-300) + 1 / (scatteringMiddle * x * x + 1e-300) + 0.5);
            rough[0][i] = scattering;
            rough[1][i] = scattering / (1 + x * x);
            rough[2][i] = area * Math.min(x, 1);
            if (scattering > most[0]) top = x;
            for (int j = 0; j < 3; j++) most[j] = Math.max(most[j], rough[j][i]);
            x *= growth;
            area *= rise;
            rise *= narrowing;
        }
        int first = 0;
        while (first < grid && rough[1][first] < TAIL * most[1] && (!absorbing || rough[2][first] < TAIL * most[2]))
            first++;
        int last = grid;
        while (last > 0 && rough[0][last] < TAIL * most[0] && (!absorbing || rough[2][last] < TAIL * most[2])) last--;
        double end = low + (high - low) * Math.min(grid, last + 1) / grid;
        this.from = low + (high - low) * Math.max(0, first - 1) / grid;
        double largest = medianNm * sizePerNm * Math.exp(end);
        if (largest > Mie.X_MAX)
            throw new Refusal("This log-normal distribution reaches particles of "
                    + Plain.number(Math.rint(largest / sizePerNm / 1e3))
                    + " µm, size parameter " + Plain.number(Math.rint(largest))
                    + ", that still scatter noticeably; spheres can be"
                    + " computed up to 20000. Give a smaller median or geometric standard deviation.");
        this.typicalSize = top;
        this.step = Math.min(sigma * LONGEST_FIRST, Math.max(sigma * SHORTEST_FIRST, FIRST_STEP_IN_X / typicalSize));
        double[] nodes = new double[2 + (int) ((end - from) / step)];
        for (int i = 0; i < nodes.length; i++) nodes[i] = from + i * step;
        want(nodes);
    }

    private void want(double[] t) {
        wanted = t;
        wantedNm = new double[t.length];
        for (int i = 0; i < t.length; i++) wantedNm[i] = medianNm * Math.exp(t[i]);
    }

    private double density(double t) {
        return Math.exp(-t * t / (2 * sigma * sigma)) / (sigma * Math.sqrt(2 * Math.PI));
    }

    @Override
    double[] wantedNm() {
        return wantedNm;
    }

    @Override
    void accept(double[][] figures) {
        double[] fresh = new double[wanted.length];
        for (int i = 0; i < fresh.length; i++) fresh[i] = density(wanted[i]);
        densities = between(densities, fresh);
        diameters = between(diameters, wantedNm);
        for (int j = 0; j < FIGURES; j++) values[j] = between(values[j], figures[j]);
        averages = new double[FIGURES];
        for (int j = 0; j < FIGURES; j++) {
            for (int i = 0; i < densities.length; i++) averages[j] += densities[i] * values[j][i];
            averages[j] *= step;
        }
        error = estimate();
        if (error <= WANTED || 2 * densities.length > MOST_SPHERES) {
            want(new double[0]);
            return;
        }
        double[] middles = new double[densities.length];
        for (int i = 0; i < middles.length; i++) middles[i] = from + (i + 0.5) * step;
        want(middles);
        step /= 2;
    }

    /** Known values with fresh ones between them; all fresh when nothing is known. */
    private static double[] between(double[] known, double[] fresh) {
        if (known.length == 0) return fresh;
        double[] out = new double[2 * known.length];
        for (int i = 0; i < known.length; i++) {
            out[2 * i] = known[i];
            out[2 * i + 1] = fresh[i];
        }
        return out;
    }

    private double estimate() {
        double[] d = new double[3];
        double rough = 0;
        for (int j = 0; j < FIGURES; j++) {
            if (averages[j] == 0) continue;
            double[] terms = new double[densities.length];
            for (int i = 0; i < terms.length; i++) terms[i] = step * densities[i] * values[j][i] / averages[j];
            compareRules(terms, d);
            rough = Math.max(rough, chance(values[j], averages[j]));
        }
        double gain = d[0] == 0 ? 0 : 3 * Math.max(d[0] / d[1], d[1] * d[1] / (d[2] * d[2]));
        double converging = aliased() ? Math.max(3 * d[0], d[1]) : d[0] * Math.max(0.01, Math.min(3, gain));
        return Math.max(converging, rough) + TAILS_LOST;
    }

    /** Raises d₀, d₁, d₂ to the differences between rules 2, 4 and 8 times as coarse as this one, whose terms add up to 1. */
    private static void compareRules(double[] terms, double[] d) {
        double[] dealt = new double[8];
        for (int i = 0; i < terms.length; i++) dealt[i & 7] += terms[i];
        for (int level = 2; level >= 0; level--) {
            int half = 1 << level; // rules of step 2·half: place i and its midpoints i + half
            for (int i = 0; i < half; i++) {
                d[level] = Math.max(d[level], half * Math.abs(dealt[i] - dealt[i + half]));
                dealt[i] += dealt[i + half];
            }
        }
    }

    /** Whether the ripples, about 0.8 apart in x, may keep step with the nodes all over a narrow distribution. */
    private boolean aliased() {
        return sigma < 0.2 && step * typicalSize > 0.35;
    }

    /** The error by chance of one average, from its roughness r and that of the rules twice as coarse. */
    private double chance(double[] value, double average) {
        double r = roughness(value, densities, step, average);
        if (3 * r <= WANTED / 2) return 3 * r;
        double coarser = Double.POSITIVE_INFINITY;
        for (int parity = 0; parity < 2; parity++) {
            double[] half = new double[(value.length - parity + 1) / 2];
            double[] density = new double[half.length];
            for (int i = 0; i < half.length; i++) {
                half[i] = value[2 * i + parity];
                density[i] = densities[2 * i + parity];
            }
            if (half.length > 32) coarser = Math.min(coarser, roughness(half, density, 2 * step, average));
        }
        return 3 * r * (Double.isFinite(coarser) ? Math.min(1, 2 * r / coarser) : 1);
    }

    /** Standard error of an average from the jumps of the cross section between neighbouring nodes. */
    private static double roughness(double[] value, double[] density, double step, double average) {
        int inner = value.length - 16;
        if (inner <= 0) return Double.POSITIVE_INFINITY;
        double[] jump = new double[value.length];
        double ratio = Math.exp(-FLATTEN * step);
        double flat = 1;
        for (int i = 0; i < jump.length; i++) {
            jump[i] = value[i] * flat;
            flat *= ratio;
        }
        for (int i = 1; i <= 4; i++) fourthDifference(jump, jump.length - 4 * i);
        double unflat = step / (average * Math.pow(ratio, 8));
        double back = 1 / ratio;
        double sum = 0;
        for (int i = 0; i < inner; i++) {
            double term = jump[i] * density[i + 8] * unflat;
            sum += term * term;
            unflat *= back;
        }
        return Math.sqrt(sum / SQUARES);
    }

    private static void fourthDifference(double[] v, int count) {
        for (int i = 0; i < count; i++) v[i] = v[i] - 4 * v[i + 1] + 6 * v[i + 2] - 4 * v[i + 3] + v[i + 4];
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
        return diameters;
    }

    @Override
    double[] weights() {
        double[] out = new double[densities.length];
        for (int i = 0; i < out.length; i++) out[i] = step * densities[i];
        return out;
    }
}
