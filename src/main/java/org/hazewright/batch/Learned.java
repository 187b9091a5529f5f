package org.hazewright.batch;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.SplittableRandom;
import org.apache.commons.math3.linear.Array2DRowRealMatrix;
import org.apache.commons.math3.linear.ArrayRealVector;
import org.apache.commons.math3.linear.EigenDecomposition;
import org.apache.commons.math3.linear.LUDecomposition;
import org.apache.commons.math3.linear.RealMatrix;
import org.apache.commons.math3.linear.RealVector;
import org.hazewright.bench.Answer;
import org.hazewright.brief.Point;
import org.hazewright.learning.MeasuredValue;
import org.hazewright.learning.Method;
import org.hazewright.learning.Quantity;
import org.hazewright.mixture.Budget;
import org.hazewright.mixture.Cause;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Sweep;
import org.hazewright.shelf.Ingredient;

/**
 * What is known of a batch once it was measured: of its bottles, and of this one making too.
 *
 * <p>Each cause of the uncertainty budget is a z ~ N(0, 1) whose effect on µ is g (1/cm for one standard uncertainty), so a measured
 * value is y = µ + Σ g z + scale + e, and z given all y is normal again (linear-Gaussian update). The same causes then say what a recipe gives
 * that has more in it: a bottle that proved 5 % strong stays 5 % strong, and a slip at the balance stays in the vessel. Without
 * measured values it is the prediction as it was.
 */
public final class Learned {
    private static final int DRAWS = 8_000;

    private final Map<String, Integer> number = new HashMap<>();
    private final RealVector mean;
    private final RealMatrix covariance;

    private Learned(Map<String, Integer> number, RealVector mean, RealMatrix covariance) {
        this.number.putAll(number);
        this.mean = mean;
        this.covariance = covariance;
    }

    /** What a recipe gives at some points: values in 1/cm, standard uncertainties, and the chance of landing inside every tolerance. */
    public record Landing(List<Answer.Predicted> predicted, double chance) {
        public Landing {
            predicted = List.copyOf(predicted);
        }

        /** Largest |miss|, in half-widths. */
        public double worstMiss() {
            return predicted.stream().mapToDouble(p -> Math.abs(p.miss())).max().orElse(0);
        }
    }

    public static Learned of(Batch batch) {
        Map<String, Integer> number = new LinkedHashMap<>();
        List<Map<Integer, Double>> rows = new ArrayList<>();
        List<Double> differences = new ArrayList<>();
        List<Double> variances = new ArrayList<>();
        for (Measurement m : batch.measured()) {
            double[] nm = m.values().stream()
                    .mapToDouble(MeasuredValue::wavelengthNm)
                    .sorted()
                    .distinct()
                    .toArray();
            Recipe made = batch.asMade(m.correction());
            Sweep sweep = Sweep.of(Mixture.of(made), nm);
            List<Cause> causes =
                    Budget.of(made, sweep, batch.balance().capacityG()).causes();
            List<String> keys = keys(causes);
            double[] mua = sweep.muaPerCm(made.massesG());
            double[] musp = sweep.muspPerCm(made.massesG());
            for (MeasuredValue v : m.values()) {
                int at = java.util.Arrays.binarySearch(nm, v.wavelengthNm());
                boolean scattering = v.quantity() == Quantity.SCATTERING;
                double predicted = (scattering ? musp : mua)[at];
                Map<Integer, Double> row = new HashMap<>();
                for (int c = 0; c < causes.size(); c++)
                    row.put(numbered(number, keys.get(c)), effect(causes.get(c), scattering, at));
                Method method = m.method();
                row.put(
                        numbered(
                                number,
                                "scale of " + method.name() + v.quantity().sign()),
                        predicted * method.uScale(v.quantity()));
                rows.add(row);
                differences.add(v.perCm() - predicted);
                variances.add(v.uPerCm() * v.uPerCm());
            }
        }
        return updated(number, rows, differences, variances);
    }

    private static Learned updated(
            Map<String, Integer> number,
            List<Map<Integer, Double>> rows,
            List<Double> differences,
            List<Double> variances) {
        int n = number.size();
        if (n == 0) return new Learned(number, null, null);
        RealMatrix h = new Array2DRowRealMatrix(rows.size(), n);
        for (int r = 0; r < rows.size(); r++) {
            int row = r;
            rows.get(r).forEach((c, g) -> h.setEntry(row, c, g));
        }
        RealMatrix s = h.multiply(h.transpose());
        for (int r = 0; r < rows.size(); r++) s.addToEntry(r, r, variances.get(r));
        RealMatrix gain = new LUDecomposition(s, 0).getSolver().solve(h).transpose();
        RealVector mean = gain.operate(
                new ArrayRealVector(differences.stream().mapToDouble(d -> d).toArray()));
        RealMatrix kept = gain.multiply(h).scalarMultiply(-1);
        for (int i = 0; i < n; i++) kept.addToEntry(i, i, 1);
        return new Learned(number, mean, kept);
    }

    private static int numbered(Map<String, Integer> number, String key) {
        Integer known = number.get(key);
        if (known != null) return known;
        number.put(key, number.size());
        return number.size() - 1;
    }

    /** Names that stay the same when more is added: kind, name, and which of several of that name. */
    private static List<String> keys(List<Cause> causes) {
        Map<String, Integer> seen = new HashMap<>();
        List<String> keys = new ArrayList<>();
        for (Cause c : causes) {
            String name = c.kind() + " " + c.name();
            keys.add(name + " " + seen.merge(name, 1, Integer::sum));
        }
        return keys;
    }

    private static double effect(Cause c, boolean scattering, int at) {
        return (scattering ? c.muspPerCm() : c.muaPerCm())[at];
    }

    /**
     * What a recipe gives that holds the batch as made and perhaps more.
     *
     * @param sweep coefficients at the points' wavelengths, of all ingredients of the recipe
     */
    public Landing landing(Recipe recipe, List<Point> points, Sweep sweep, double capacityG) {
        double[] nm = sweep.wavelengthsNm();
        List<Cause> causes = Budget.of(recipe, sweep, capacityG).causes();
        List<String> keys = keys(causes);
        double[] mua = sweep.muaPerCm(recipe.massesG());
        double[] musp = sweep.muspPerCm(recipe.massesG());
        int rows = points.size();
        double[] value = new double[rows];
        double[][] known = new double[rows][number.size()];
        RealMatrix spread = new Array2DRowRealMatrix(rows, rows);
        double[][] fresh = new double[rows][causes.size()];
        for (int j = 0; j < rows; j++) {
            Point p = points.get(j);
            boolean scattering = p.quantity() == Point.Quantity.MUSP;
            int at = java.util.Arrays.binarySearch(nm, p.wavelengthNm());
            value[j] = (scattering ? musp : mua)[at];
            for (int c = 0; c < causes.size(); c++) {
                double g = effect(causes.get(c), scattering, at);
                Integer z = number.get(keys.get(c));
                if (z == null) fresh[j][c] = g;
                else {
                    known[j][z] = g;
                    value[j] += g * mean.getEntry(z);
                }
            }
        }
        if (!number.isEmpty()) {
            RealMatrix g = new Array2DRowRealMatrix(known, false);
            spread = spread.add(g.multiply(covariance).multiply(g.transpose()));
        }
        RealMatrix f = new Array2DRowRealMatrix(fresh, false);
        spread = spread.add(f.multiply(f.transpose()));
        return landing(points, value, spread);
    }

    private static Landing landing(List<Point> points, double[] value, RealMatrix spread) {
        List<Answer.Predicted> predicted = new ArrayList<>();
        for (int j = 0; j < value.length; j++) {
            Point p = points.get(j);
            double u = Math.sqrt(Math.max(0, spread.getEntry(j, j)));
            predicted.add(new Answer.Predicted(
                    p, value[j], u, value[j] - 1.959964 * u, value[j] + 1.959964 * u, p.miss(value[j])));
        }
        return new Landing(predicted, chance(points, value, spread));
    }

    /** Share of draws of the joint normal with every value inside its tolerance; the same seed each time, so that recipes compare. */
    private static double chance(List<Point> points, double[] value, RealMatrix spread) {
        int n = value.length;
        double[] scale = new double[n];
        RealMatrix inTolerances = spread.copy();
        for (int j = 0; j < n; j++) scale[j] = points.get(j).tolerancePerCm();
        for (int i = 0; i < n; i++)
            for (int j = 0; j < n; j++)
                inTolerances.setEntry(i, j, (spread.getEntry(i, j) + spread.getEntry(j, i)) / 2 / scale[i] / scale[j]);
        EigenDecomposition e = new EigenDecomposition(inTolerances);
        double[][] root = new double[n][n];
        for (int k = 0; k < n; k++) {
            double size = Math.sqrt(Math.max(0, e.getRealEigenvalue(k)));
            for (int j = 0; j < n; j++) root[j][k] = size * e.getV().getEntry(j, k);
        }
        SplittableRandom random = new SplittableRandom(1);
        double[] z = new double[n];
        int inside = 0;
        for (int draw = 0; draw < DRAWS; draw++) {
            for (int k = 0; k < n; k++) z[k] = random.nextGaussian();
            boolean ok = true;
            for (int j = 0; j < n && ok; j++) {
                double miss = points.get(j).miss(value[j]);
                for (int k = 0; k < n; k++) miss += root[j][k] * z[k];
                ok = Math.abs(miss) <= 1;
            }
            if (ok) inside++;
        }
        return (double) inside / DRAWS;
    }

    /** What a bottle's figure is now believed to be, over what its file says. */
    double factor(Ingredient i, Point.Quantity quantity) {
        double first = meanOf(Cause.Kind.ABSORPTION + " " + i.id() + " absorption 1");
        if (quantity == Point.Quantity.MUA)
            return Math.max(0, 1 + i.uncertainty().absorption() * first);
        double second = meanOf(Cause.Kind.SCATTERING + " " + i.id() + " scattering 1");
        double r = i.uncertainty().correlation();
        return Math.max(0, 1 + i.uncertainty().scattering() * (r * first + Math.sqrt(1 - r * r) * second));
    }

    private double meanOf(String key) {
        Integer z = number.get(key);
        return z == null ? 0 : mean.getEntry(z);
    }
}
