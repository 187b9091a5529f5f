package org.hazewright.learning;

import java.util.ArrayList;
import java.util.List;
import java.util.function.Predicate;
import java.util.function.UnaryOperator;
import org.apache.commons.math3.linear.Array2DRowRealMatrix;
import org.apache.commons.math3.linear.EigenDecomposition;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Uncertainty;

/**
 * What is known of several factors together: jointly normal, with means and a covariance that is kept whole.
 *
 * <p>Before any measurement an ingredient's two factors have mean 1, the standard uncertainties of its file and their correlation;
 * different ingredients are independent. Measuring a mixture ties them together, so the covariance of one update is the starting
 * point of the next.
 */
public final class Factors {
    private final List<Factor> factors;
    private final double[] mean;
    private final double[][] covariance;

    /** {@code covariance} is symmetric and positive semidefinite, in the order of {@code factors}. */
    public Factors(List<Factor> factors, double[] mean, double[][] covariance) {
        int n = factors.size();
        if (mean.length != n || covariance.length != n)
            throw new Refusal(n + " factors come with " + mean.length + " means and " + covariance.length
                    + " rows of covariance; it takes one of each for every factor.");
        this.factors = List.copyOf(factors);
        if (this.factors.stream().distinct().count() != n)
            throw new Refusal("A factor is named twice among " + words(this.factors) + ".");
        this.mean = mean.clone();
        this.covariance = new double[n][];
        for (int i = 0; i < n; i++) {
            if (covariance[i].length != n)
                throw new Refusal("Row " + (i + 1) + " of a covariance of " + n + " factors has " + covariance[i].length
                        + " entries.");
            if (!Double.isFinite(mean[i]))
                throw new Refusal("The factor of " + factors.get(i).words() + " is " + mean[i] + ".");
            this.covariance[i] = covariance[i].clone();
        }
        refuseImpossible();
    }

    private void refuseImpossible() {
        int n = factors.size();
        if (n == 0) return;
        double[][] scaled = new double[n][n];
        for (int i = 0; i < n; i++)
            if (!(covariance[i][i] >= 0) || Double.isInfinite(covariance[i][i]))
                throw new Refusal("The variance of " + factors.get(i).words() + " is " + covariance[i][i]
                        + "; it must be 0 or above.");
        for (int i = 0; i < n; i++) {
            for (int j = 0; j < n; j++) {
                double size = Math.sqrt(covariance[i][i] * covariance[j][j]);
                if (!(Math.abs(covariance[i][j] - covariance[j][i]) <= 1e-9 * size + Double.MIN_NORMAL))
                    throw new Refusal("The covariance of " + factors.get(i).words() + " and "
                            + factors.get(j).words() + " is " + covariance[i][j] + " one way and " + covariance[j][i]
                            + " the other.");
                scaled[i][j] = size > 0 ? (covariance[i][j] + covariance[j][i]) / 2 / size : i == j ? 1 : 0;
            }
        }
        for (double e : new EigenDecomposition(new Array2DRowRealMatrix(scaled, false)).getRealEigenvalues())
            if (e < -1e-9)
                throw new Refusal("The covariance of " + words(factors)
                        + " is not possible: some combination would have a negative variance.");
    }

    private static String words(List<Factor> factors) {
        return String.join(", ", factors.stream().map(Factor::words).toList());
    }

    /** Nothing is known of anything. */
    public static Factors none() {
        return new Factors(List.of(), new double[0], new double[0][]);
    }

    /** As the files of these ingredients say, before any measurement. */
    public static Factors asFiled(List<Ingredient> ingredients) {
        Factors all = none();
        for (Ingredient i : ingredients) all = all.with(i);
        return all;
    }

    /** With an ingredient's two factors as its file says; unchanged where they are known already. */
    public Factors with(Ingredient i) {
        Uncertainty u = i.uncertainty();
        return with(
                Factor.of(i, Quantity.ABSORPTION),
                u.absorption(),
                Factor.of(i, Quantity.SCATTERING),
                u.scattering(),
                u.correlation());
    }

    /** With a method's two scales; unchanged where they are known already. */
    public Factors with(Method m) {
        return with(
                Factor.of(m, Quantity.ABSORPTION), m.uMuaScale(), Factor.of(m, Quantity.SCATTERING), m.uMuspScale(), 0);
    }

    private Factors with(Factor a, double ua, Factor s, double us, double correlation) {
        if (factors.contains(a) && factors.contains(s)) return this;
        if (factors.contains(a) || factors.contains(s))
            throw new Refusal("Of " + a.words() + " and " + s.words() + " only one is known; give both or neither.");
        int n = factors.size();
        List<Factor> names = new ArrayList<>(factors);
        names.add(a);
        names.add(s);
        double[] means = java.util.Arrays.copyOf(mean, n + 2);
        means[n] = 1;
        means[n + 1] = 1;
        double[][] c = new double[n + 2][n + 2];
        for (int i = 0; i < n; i++) System.arraycopy(covariance[i], 0, c[i], 0, n);
        c[n][n] = ua * ua;
        c[n + 1][n + 1] = us * us;
        c[n][n + 1] = c[n + 1][n] = correlation * ua * us;
        return new Factors(names, means, c);
    }

    /** With all that a batch brings in: its ingredients and its method. */
    public Factors with(MeasuredBatch batch) {
        Factors all = this;
        for (Ingredient i : batch.mixture().massesG().keySet()) all = all.with(i);
        return all.with(batch.method());
    }

    public List<Factor> factors() {
        return factors;
    }

    public double[] means() {
        return mean.clone();
    }

    public double[][] covariance() {
        double[][] c = new double[covariance.length][];
        for (int i = 0; i < c.length; i++) c[i] = covariance[i].clone();
        return c;
    }

    public boolean knows(Factor f) {
        return factors.contains(f);
    }

    private int number(Factor f) {
        int i = factors.indexOf(f);
        if (i < 0) throw new Refusal("Nothing is known of " + f.words() + "; known are " + words(factors) + ".");
        return i;
    }

    public double mean(Factor f) {
        return mean[number(f)];
    }

    /** Standard uncertainty of a factor. */
    public double u(Factor f) {
        return Math.sqrt(covariance[number(f)][number(f)]);
    }

    /** Correlation of two factors; 0 where one of them is known exactly. */
    public double correlation(Factor f, Factor g) {
        double size = u(f) * u(g);
        return size > 0 ? Math.max(-1, Math.min(1, covariance[number(f)][number(g)] / size)) : 0;
    }

    /** What an ingredient's file would say after its figures were multiplied by the means: relative uncertainties. */
    public Uncertainty uncertainty(Ingredient i) {
        Factor a = Factor.of(i, Quantity.ABSORPTION);
        Factor s = Factor.of(i, Quantity.SCATTERING);
        return new Uncertainty(relativeU(a), relativeU(s), correlation(a, s));
    }

    private double relativeU(Factor f) {
        if (!(mean(f) > 0))
            throw new Refusal("The data put " + f.words() + " at " + Rounded.number(mean(f))
                    + " times its file's figure, which cannot be. Check the batch and its measured values.");
        return Math.min(1, u(f) / mean(f));
    }

    /** The same knowledge of some factors only. */
    public Factors only(Predicate<Factor> wanted) {
        int[] kept = java.util.stream.IntStream.range(0, mean.length)
                .filter(i -> wanted.test(factors.get(i)))
                .toArray();
        double[] means = new double[kept.length];
        double[][] c = new double[kept.length][kept.length];
        List<Factor> names = new ArrayList<>();
        for (int i = 0; i < kept.length; i++) {
            names.add(factors.get(kept[i]));
            means[i] = mean[kept[i]];
            for (int j = 0; j < kept.length; j++) c[i][j] = covariance[kept[i]][kept[j]];
        }
        return new Factors(names, means, c);
    }

    /**
     * The same knowledge after new files were written with their figures multiplied by the means: ingredients' means become 1 and their
     * uncertainties relative; {@code newId} turns an ingredient's old id into that of its new lot. Scales of methods stay.
     */
    public Factors rebased(UnaryOperator<String> newId) {
        int n = mean.length;
        double[] by = new double[n];
        double[] means = mean.clone();
        List<Factor> names = new ArrayList<>(factors);
        for (int i = 0; i < n; i++) {
            Factor f = factors.get(i);
            by[i] = 1;
            if (f.kind() == Factor.Kind.METHOD) continue;
            relativeU(f);
            by[i] = mean[i];
            means[i] = 1;
            names.set(i, new Factor(f.kind(), newId.apply(f.name()), f.quantity()));
        }
        double[][] c = covariance();
        for (int i = 0; i < n; i++) for (int j = 0; j < n; j++) c[i][j] /= by[i] * by[j];
        return new Factors(names, means, c);
    }
}
