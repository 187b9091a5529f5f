package org.hazewright.reading;

import java.util.function.Function;
import org.apache.commons.math3.exception.MathIllegalStateException;
import org.apache.commons.math3.fitting.leastsquares.LeastSquaresBuilder;
import org.apache.commons.math3.fitting.leastsquares.LeastSquaresOptimizer;
import org.apache.commons.math3.fitting.leastsquares.LevenbergMarquardtOptimizer;
import org.apache.commons.math3.linear.Array2DRowRealMatrix;
import org.apache.commons.math3.linear.ArrayRealVector;
import org.apache.commons.math3.linear.RealMatrix;
import org.apache.commons.math3.linear.RealVector;
import org.apache.commons.math3.stat.regression.SimpleRegression;
import org.apache.commons.math3.util.Pair;
import org.hazewright.optics.Refusal;
import org.hazewright.transport.Convention;
import org.hazewright.transport.Diffusion;
import org.hazewright.transport.FrequencySignal;
import org.hazewright.transport.Medium;
import org.hazewright.transport.Response;
import org.hazewright.transport.Side;
import org.hazewright.transport.TimeCurve;
import org.hazewright.transport.TimeMoments;
import org.hazewright.transport.TimeSignal;

/**
 * The µa and µs' that a set-up's own analysis reports from what it measures; beside the true ones they show the method's bias.
 *
 * <p>All in 1/cm. Slopes: of ln(ρ² R) over ρ, −Re κ; of the phase, Im κ, with κ² = (µa + iω/v)/D (Fantini et al., J. Opt. Soc.
 * Am. B 11, 2128, 1994). Fits: least squares on the diffusion model with the set-up's convention, µa and µs' free, refractive
 * index and geometry known. {@code method} says which in plain words.
 */
public record Apparent(double muaPerCm, double muspPerCm, String method) {
    private static final double RADIANS_PER_PS = 2 * Math.PI * 1e-6;
    private static final int EVALUATIONS = 500;

    /** What an analysis needs to know besides its data. */
    public record Known(double n, double g, double outsideIndex, Double thicknessMm, Convention convention) {
        Diffusion with(double muaPerMm, double muspPerMm) {
            return new Diffusion(
                    new Medium(10 * muaPerMm, 10 * muspPerMm, g, n), outsideIndex, thicknessMm, convention);
        }
    }

    /** Steady slope: the slope gives µeff alone, so µs' is taken as known. */
    public static Apparent slope(double[] distanceMm, double[] signal, double muspPerCm, Convention convention) {
        double k = -slopeOf(distanceMm, logSquared(distanceMm, signal));
        double mus = muspPerCm / 10;
        double k2 = k * Math.abs(k);
        double mua = convention.diffusion() == Convention.DiffusionConstant.WITHOUT_ABSORPTION
                ? k2 / (3 * mus)
                : k2 < 0 ? k2 / (3 * mus) : 2 * k2 / (3 * (mus + Math.sqrt(mus * mus + 4 * k2 / 3)));
        return new Apparent(10 * mua, muspPerCm, "slope of ln(ρ²R), µs' taken as known");
    }

    /** Slopes of amplitude and phase lag (degrees) over distance. */
    public static Apparent slopes(
            double[] distanceMm, double[] amplitude, double[] phaseDeg, double modulationMhz, Known known) {
        double re = -slopeOf(distanceMm, logSquared(distanceMm, amplitude));
        double im = Math.toRadians(slopeOf(distanceMm, phaseDeg));
        double q = RADIANS_PER_PS * modulationMhz / (Medium.LIGHT_MM_PER_PS / known.n());
        double mua = q * (re * re - im * im) / (2 * re * im);
        double transport = 2 * re * im / (3 * q);
        double musp = known.convention().diffusion() == Convention.DiffusionConstant.WITH_ABSORPTION
                ? transport - mua
                : transport;
        return new Apparent(10 * mua, 10 * musp, "slopes of ln(ρ² amplitude) and phase");
    }

    /** One distance: modulation relative to 0 MHz and phase lag, fitted by diffusion. */
    public static Apparent frequency(
            double distanceMm, double modulation, double phaseDeg, double modulationMhz, Known known) {
        return fit("diffusion fit of modulation and phase", d -> {
            FrequencySignal f = new FrequencySignal(known.with(d[0], d[1]), modulationMhz);
            double m = f.modulation(distanceMm, Side.REFLECTANCE);
            double p = f.phaseDeg(distanceMm, Side.REFLECTANCE);
            return new double[] {Math.log(m / modulation) / Math.log(modulation), p / phaseDeg - 1};
        });
    }

    /** Mean time and variance of flight, the response's own already taken off, fitted by diffusion. */
    public static Apparent moments(double distanceMm, double meanPs, double variancePs2, Known known) {
        return fit("diffusion fit of mean time and variance", d -> {
            TimeMoments m = new TimeMoments(known.with(d[0], d[1]), Side.REFLECTANCE);
            return new double[] {m.meanPs(distanceMm) / meanPs - 1, m.variancePs2(distanceMm) / variancePs2 - 1};
        });
    }

    /**
     * A measured curve of any scale, fitted by the diffusion curve seen through the same response, from 80 % of the peak on the
     * rising side to 1 % on the falling side (common practice), weighted as counts.
     */
    public static Apparent curve(double distanceMm, TimeCurve measured, Response response, Known known) {
        double[] y = measured.value();
        int peak = peakOf(y);
        int from = peak;
        while (from > 0 && y[from - 1] >= 0.8 * y[peak]) from--;
        int to = peak;
        while (to + 1 < y.length && y[to + 1] >= 0.01 * y[peak]) to++;
        int first = from;
        double top = y[peak];
        int count = to - from + 1;
        if (count < 5)
            throw new Refusal("The time axis has " + count
                    + " points on the curve's peak and tail; a fit needs 5 or more." + " Take a shorter step.");
        return fit(
                "diffusion fit of the time curve, 80 % rise to 1 % tail",
                d -> {
                    TimeSignal t = new TimeSignal(known.with(d[0], d[1]));
                    double[] f = TimeCurve.seen(
                                    time -> t.perMm2PerPs(distanceMm, time, Side.REFLECTANCE),
                                    measured.axis(),
                                    response)
                            .value();
                    double fy = 0;
                    double ff = 0;
                    for (int i = first; i < first + count; i++) {
                        fy += f[i];
                        ff += f[i] * f[i] / y[i];
                    }
                    double[] r = new double[count];
                    for (int i = 0; i < count; i++)
                        r[i] = (fy / ff * f[first + i] - y[first + i]) / Math.sqrt(y[first + i] * top);
                    return r;
                });
    }

    private static int peakOf(double[] y) {
        int peak = 0;
        for (int i = 0; i < y.length; i++) if (y[i] > y[peak]) peak = i;
        return peak;
    }

    /** Least squares over ln µa and ln µs' (1/mm), from µa 0.01 and µs' 1 /mm. */
    private static Apparent fit(String method, Function<double[], double[]> residual) {
        double[] start = {Math.log(0.01), Math.log(1)};
        int m = residualAt(residual, start).length;
        try {
            LeastSquaresOptimizer.Optimum best = new LevenbergMarquardtOptimizer()
                    .optimize(new LeastSquaresBuilder()
                            .start(start)
                            .target(new double[m])
                            .model(p -> withSlopes(residual, p.toArray()))
                            .maxEvaluations(EVALUATIONS)
                            .maxIterations(EVALUATIONS)
                            .build());
            double[] p = best.getPoint().toArray();
            return new Apparent(10 * Math.exp(p[0]), 10 * Math.exp(p[1]), method);
        } catch (MathIllegalStateException e) {
            throw new Refusal("The " + method + " finds no µa and µs' that explain the data.", e);
        }
    }

    private static Pair<RealVector, RealMatrix> withSlopes(Function<double[], double[]> residual, double[] p) {
        double[] r = residualAt(residual, p);
        RealMatrix j = new Array2DRowRealMatrix(r.length, 2);
        for (int k = 0; k < 2; k++) {
            double[] up = p.clone();
            double[] down = p.clone();
            up[k] += 1e-4;
            down[k] -= 1e-4;
            double[] a = residualAt(residual, up);
            double[] b = residualAt(residual, down);
            for (int i = 0; i < r.length; i++) j.setEntry(i, k, (a[i] - b[i]) / 2e-4);
        }
        return new Pair<>(new ArrayRealVector(r), j);
    }

    private static double[] residualAt(Function<double[], double[]> residual, double[] p) {
        double a = Math.min(1e2, Math.max(1e-9, Math.exp(p[0])));
        double s = Math.min(1e4, Math.max(1e-3, Math.exp(p[1])));
        return residual.apply(new double[] {a, s});
    }

    private static double[] logSquared(double[] distance, double[] signal) {
        if (distance.length != signal.length || distance.length < 2)
            throw new Refusal(
                    "The slope method needs signals at 2 distances or more; there are " + signal.length + ".");
        double[] y = new double[signal.length];
        for (int i = 0; i < y.length; i++) {
            Refusal.positive("Signal at " + distance[i] + " mm", signal[i]);
            y[i] = Math.log(distance[i] * distance[i] * signal[i]);
        }
        return y;
    }

    private static double slopeOf(double[] x, double[] y) {
        SimpleRegression line = new SimpleRegression();
        for (int i = 0; i < x.length; i++) line.addData(x[i], y[i]);
        return line.getSlope();
    }
}
