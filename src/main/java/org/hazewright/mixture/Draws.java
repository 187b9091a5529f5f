package org.hazewright.mixture;

import java.util.Arrays;
import java.util.SplittableRandom;
import java.util.stream.IntStream;
import org.apache.commons.math3.util.KthSelector;
import org.hazewright.optics.Refusal;

/**
 * Monte Carlo propagation of a recipe's uncertainty (JCGM 101:2008, clause 7): the recipe made many times on paper.
 *
 * <p>Every unknown is normal. Draws come in blocks of {@value #BLOCK}, each with a generator of its own, split off the seed's one
 * after the other, so that the same seed gives the same draws on any number of threads and near seeds give unrelated ones.
 * Results at wavelength j: mean, standard uncertainty, 95 % interval (probabilistically symmetric, clause 7.7), and the share of
 * draws inside given limits.
 */
public final class Draws {
    private static final int BLOCK = 2048;

    /** Where a tail is looked through for an interval's end, in standard uncertainties: 5 to 6 in 100 of a normal lie beyond. */
    private static final double TAIL = 1.6;

    private final int count;
    private final int wavelengths;
    private final double[][] values; // [2 · wavelengths][count], µa first

    private Draws(int count, int wavelengths, double[][] values) {
        this.count = count;
        this.wavelengths = wavelengths;
        this.values = values;
    }

    /**
     * {@code count} draws (100 to 10 000 000) of a recipe at wavelengths in nm. {@code capacityG} is the balance's: a mass above it takes several
     * loads. The same {@code seed} gives the same draws.
     */
    public static Draws of(Recipe recipe, double[] wavelengthsNm, double capacityG, int count, long seed) {
        return of(new Unknowns(recipe, wavelengthsNm, capacityG), count, seed);
    }

    /** With coefficients as in a mixture that holds the same ingredients, at its wavelengths. */
    public static Draws of(Recipe recipe, Sweep sweep, double capacityG, int count, long seed) {
        return of(new Unknowns(recipe, sweep, capacityG), count, seed);
    }

    private static Draws of(Unknowns x, int count, long seed) {
        if (count < 100 || count > 10_000_000)
            throw new Refusal("A Monte Carlo of " + count + " draws is asked for; it must be 100 to 10 000 000.");
        int wavelengths = x.wavelengthsNm.length;
        double[][] values = new double[2 * wavelengths][count];
        SplittableRandom root = new SplittableRandom(seed);
        SplittableRandom[] generators = new SplittableRandom[(count + BLOCK - 1) / BLOCK];
        for (int b = 0; b < generators.length; b++) generators[b] = root.split();
        IntStream.range(0, generators.length)
                .parallel()
                .forEach(b -> new Block(x, generators[b]).fill(values, b * BLOCK, Math.min(count, (b + 1) * BLOCK)));
        return new Draws(count, wavelengths, values);
    }

    /** One block's work space and its draws. */
    private static final class Block {
        private final Unknowns x;
        private final SplittableRandom random;
        private final double[] planned;
        private final double[] loads;
        private final double[] uLoad;
        private final double[][] content;
        private final double[] masses;

        Block(Unknowns x, SplittableRandom random) {
            this.x = x;
            this.random = random;
            planned = x.plannedLoadsG();
            loads = new double[planned.length];
            uLoad = x.loads.stream().mapToDouble(Unknowns.Load::uG).toArray();
            content = new double[x.stockFrom.length][x.ingredients()];
            masses = new double[x.ingredients()];
        }

        void fill(double[][] values, int from, int to) {
            int points = x.wavelengthsNm.length;
            double[] mu = new double[2 * points];
            for (int draw = from; draw < to; draw++) {
                one(mu, points);
                for (int p = 0; p < mu.length; p++) values[p][draw] = mu[p];
            }
        }

        private void one(double[] mu, int points) {
            for (int k = 0; k < loads.length; k++)
                loads[k] = Math.max(0, planned[k] + uLoad[k] * random.nextGaussian());
            x.masses(loads, content, masses);
            double volume = 0;
            for (int i = 0; i < masses.length; i++)
                volume += masses[i] / (x.densityGPerMl[i] * (1 + Unknowns.DENSITY * random.nextGaussian()));
            volume *= 1 + Unknowns.VOLUME * random.nextGaussian();
            Arrays.fill(mu, 0);
            for (int i = 0; i < masses.length; i++) {
                double z = random.nextGaussian();
                double r = x.uncertainty[i].correlation();
                double zs = r * z + Math.sqrt(1 - r * r) * random.nextGaussian();
                double a = Math.max(0, 1 + x.uncertainty[i].absorption() * z) * masses[i] / volume;
                double s = Math.max(0, 1 + x.uncertainty[i].scattering() * zs) * masses[i] / volume;
                double[] kappaA = x.kappaA[i];
                double[] kappaS = x.kappaS[i];
                for (int j = 0; j < points; j++) {
                    mu[j] += a * kappaA[j];
                    mu[points + j] += s * kappaS[j];
                }
            }
        }
    }

    /** Number of draws. */
    public int count() {
        return count;
    }

    private double[] of(boolean scattering, int wavelength) {
        return values[scattering ? wavelengths + wavelength : wavelength];
    }

    /** Mean of the draws of µs' ({@code scattering}) or µa at the wavelength of that place, 1/cm. */
    public double mean(boolean scattering, int wavelength) {
        double sum = 0;
        for (double v : of(scattering, wavelength)) sum += v;
        return sum / count;
    }

    /** Standard deviation of the draws, 1/cm. */
    public double standardUncertainty(boolean scattering, int wavelength) {
        double mean = mean(scattering, wavelength);
        double sum = 0;
        for (double v : of(scattering, wavelength)) sum += (v - mean) * (v - mean);
        return Math.sqrt(sum / (count - 1));
    }

    /** Ends of the interval that holds 95 % of the draws, 2.5 % left out on either side, 1/cm. */
    public double[] interval95(boolean scattering, int wavelength) {
        double[] all = of(scattering, wavelength);
        double mean = mean(scattering, wavelength);
        double u = standardUncertainty(scattering, wavelength);
        int low = (int) Math.floor(0.025 * (count - 1));
        int high = (int) Math.ceil(0.975 * (count - 1));
        double[] below = Arrays.stream(all).filter(v -> v < mean - TAIL * u).toArray();
        double[] above = Arrays.stream(all).filter(v -> v > mean + TAIL * u).toArray();
        int rank = high - (count - above.length); // of the upper end among what lies above
        return new double[] {
            low < below.length ? ordered(below, low) : ordered(all.clone(), low),
            rank >= 0 ? ordered(above, rank) : ordered(all.clone(), high)
        };
    }

    /** An order statistic is had without sorting the rest. */
    private static double ordered(double[] work, int rank) {
        return new KthSelector().select(work, null, rank);
    }

    /**
     * Share of draws in which every value lies inside its limits: {@code low} and {@code high} hold µa at each wavelength, then
     * µs' at each; NaN where nothing is wanted.
     */
    public double shareInside(double[] low, double[] high) {
        int inside = 0;
        for (int draw = 0; draw < count; draw++) {
            boolean ok = true;
            for (int p = 0; p < low.length && ok; p++) ok = !(values[p][draw] < low[p]) && !(values[p][draw] > high[p]);
            if (ok) inside++;
        }
        return (double) inside / count;
    }
}
