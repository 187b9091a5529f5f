package org.hazewright.search;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import org.apache.commons.math3.linear.Array2DRowRealMatrix;
import org.apache.commons.math3.linear.ArrayRealVector;
import org.apache.commons.math3.linear.QRDecomposition;
import org.apache.commons.math3.linear.RealMatrix;
import org.apache.commons.math3.linear.RealVector;
import org.apache.commons.math3.linear.SingularMatrixException;
import org.apache.commons.math3.linear.SingularValueDecomposition;
import org.apache.commons.math3.optim.MaxIter;
import org.apache.commons.math3.optim.PointValuePair;
import org.apache.commons.math3.optim.linear.LinearConstraint;
import org.apache.commons.math3.optim.linear.LinearConstraintSet;
import org.apache.commons.math3.optim.linear.LinearObjectiveFunction;
import org.apache.commons.math3.optim.linear.NonNegativeConstraint;
import org.apache.commons.math3.optim.linear.Relationship;
import org.apache.commons.math3.optim.linear.SimplexSolver;
import org.apache.commons.math3.optim.nonlinear.scalar.GoalType;
import org.hazewright.search.SetProblem.Candidate;
import org.hazewright.search.SetProblem.Group;
import org.hazewright.search.SetProblem.Point;

/**
 * The search done the long way, with the linear algebra and the simplex method of Commons Math: every set, every choice of
 * limits in force, least squares by orthogonal decomposition of the points themselves. Slow and independent.
 */
final class BruteForce {
    private BruteForce() {}

    /** Every admissible set, the empty one first. */
    static List<int[]> sets(SetProblem problem) {
        List<int[]> sets = new ArrayList<>();
        grow(problem, new int[0], 0, sets);
        return sets;
    }

    private static void grow(SetProblem problem, int[] set, int from, List<int[]> sets) {
        sets.add(set);
        for (int i = from; i < problem.candidates().size(); i++) {
            int[] more = Arrays.copyOf(set, set.length + 1);
            more[set.length] = i;
            if (admits(problem, more)) grow(problem, more, i + 1, sets);
        }
    }

    private static boolean admits(SetProblem problem, int[] set) {
        if (set.length > problem.limits().mostTogether()) return false;
        for (Group g : Group.values()) {
            int count = 0;
            for (int i : set) if (problem.candidates().get(i).group() == g) count++;
            if (count > problem.limits().most(g)) return false;
        }
        for (int a : set) {
            if (problem.candidates().get(a).upper() == 0) return false;
            for (int b : set)
                for (var c : problem.limits().conflicts()) if (c.first() == a && c.second() == b) return false;
        }
        return true;
    }

    /** Least J of a set, +∞ when its limits contradict each other. Amounts in units in which each column has length 1. */
    static double leastScore(SetProblem problem, int[] set, boolean tolerances) {
        int k = set.length;
        int m = problem.points().size();
        double charge = 0;
        for (int i : set) charge += problem.candidates().get(i).weighingTerm();
        if (k == 0) {
            double sum = 0;
            for (Point p : problem.points()) {
                double miss = p.residual() / p.halfWidth();
                if (tolerances && Math.abs(miss) > 1 + 1e-9) return Double.POSITIVE_INFINITY;
                sum += p.weight() * miss * miss;
            }
            return sum;
        }
        double[][] stacked = new double[m + k][k];
        double[] wanted = new double[m + k];
        double[] unit = new double[k];
        for (int c = 0; c < k; c++) {
            Candidate candidate = problem.candidates().get(set[c]);
            double sum = candidate.ingredientTerm();
            for (int j = 0; j < m; j++) {
                Point p = problem.points().get(j);
                stacked[j][c] = Math.sqrt(p.weight()) * candidate.effect()[j] / p.halfWidth();
                wanted[j] = Math.sqrt(p.weight()) * p.residual() / p.halfWidth();
                sum += stacked[j][c] * stacked[j][c];
            }
            stacked[m + c][c] = Math.sqrt(candidate.ingredientTerm());
            unit[c] = 1 / Math.sqrt(sum);
            for (int j = 0; j < m + k; j++) stacked[j][c] *= unit[c];
        }
        // Limits as normal·x ≤ limit.
        List<double[]> normals = new ArrayList<>();
        List<Double> limits = new ArrayList<>();
        double[] volume = new double[k];
        for (int c = 0; c < k; c++) {
            Candidate candidate = problem.candidates().get(set[c]);
            double[] below = new double[k];
            below[c] = -1;
            normals.add(below);
            limits.add(0.0);
            volume[c] = candidate.specificVolume() * unit[c] / problem.limits().addedVolume();
            if (candidate.upper() < Double.POSITIVE_INFINITY) {
                double[] above = new double[k];
                above[c] = 1;
                normals.add(above);
                limits.add(candidate.upper() / unit[c]);
            }
        }
        normals.add(volume);
        limits.add(1.0);
        if (tolerances)
            for (int j = 0; j < m; j++) {
                Point p = problem.points().get(j);
                double[] up = new double[k];
                double[] down = new double[k];
                for (int c = 0; c < k; c++) {
                    up[c] = problem.candidates().get(set[c]).effect()[j] / p.halfWidth() * unit[c];
                    down[c] = -up[c];
                }
                normals.add(up);
                limits.add(p.residual() / p.halfWidth() + 1);
                normals.add(down);
                limits.add(1 - p.residual() / p.halfWidth());
            }
        RealMatrix a = new Array2DRowRealMatrix(stacked, false);
        RealVector r = new ArrayRealVector(wanted, false);
        double[] best = {Double.POSITIVE_INFINITY};
        choose(a, r, normals, limits, new int[0], 0, best);
        return best[0] + charge;
    }

    private static void choose(
            RealMatrix a,
            RealVector r,
            List<double[]> normals,
            List<Double> limits,
            int[] inForce,
            int from,
            double[] best) {
        double[] x = equalityLeastSquares(a, r, normals, limits, inForce);
        if (x != null) {
            boolean feasible = true;
            double size = 1;
            for (double v : x) size = Math.max(size, Math.abs(v));
            for (int l = 0; l < normals.size() && feasible; l++) {
                double sum = -limits.get(l);
                for (int c = 0; c < x.length; c++) sum += normals.get(l)[c] * x[c];
                feasible = sum <= 1e-9 * Math.max(1, 1e-3 * size);
            }
            if (feasible) {
                RealVector rest = a.operate(new ArrayRealVector(x)).subtract(r);
                best[0] = Math.min(best[0], rest.dotProduct(rest));
            }
        }
        if (inForce.length == a.getColumnDimension()) return;
        for (int l = from; l < normals.size(); l++) {
            int[] more = Arrays.copyOf(inForce, inForce.length + 1);
            more[inForce.length] = l;
            choose(a, r, normals, limits, more, l + 1, best);
        }
    }

    /** Least squares with some limits held as equalities, by the null space of their normals; null when they depend. */
    private static double[] equalityLeastSquares(
            RealMatrix a, RealVector r, List<double[]> normals, List<Double> limits, int[] inForce) {
        int k = a.getColumnDimension();
        int p = inForce.length;
        RealVector start = new ArrayRealVector(k);
        RealMatrix free = null;
        if (p > 0) {
            RealMatrix nt = new Array2DRowRealMatrix(k, p);
            RealVector value = new ArrayRealVector(p);
            for (int c = 0; c < p; c++) {
                nt.setColumn(c, normals.get(inForce[c]));
                value.setEntry(c, limits.get(inForce[c]));
            }
            QRDecomposition qr = new QRDecomposition(nt);
            RealMatrix q = qr.getQ();
            RealMatrix rr = qr.getR();
            double[] t = new double[p];
            for (int c = 0; c < p; c++) {
                double s = value.getEntry(c);
                for (int b = 0; b < c; b++) s -= rr.getEntry(b, c) * t[b];
                if (Math.abs(rr.getEntry(c, c)) < 1e-10 * nt.getColumnVector(c).getNorm()) return null;
                t[c] = s / rr.getEntry(c, c);
            }
            for (int c = 0; c < p; c++) start = start.add(q.getColumnVector(c).mapMultiply(t[c]));
            if (p == k) return start.toArray();
            free = q.getSubMatrix(0, k - 1, p, k - 1);
        }
        RealMatrix reduced = free == null ? a : a.multiply(free);
        RealVector rest = r.subtract(a.operate(start));
        RealVector y;
        try {
            y = new QRDecomposition(reduced, 1e-12).getSolver().solve(rest);
        } catch (SingularMatrixException e) {
            y = new SingularValueDecomposition(reduced).getSolver().solve(rest);
        }
        return (free == null ? y : start.add(free.operate(y))).toArray();
    }

    /** Least worst miss of a set by the simplex method. */
    static double leastWorstMiss(SetProblem problem, int[] set) {
        int k = set.length;
        int m = problem.points().size();
        double alone = 0;
        for (Point p : problem.points()) alone = Math.max(alone, Math.abs(p.residual() / p.halfWidth()));
        if (k == 0) return alone;
        double[] unit = new double[k];
        for (int c = 0; c < k; c++) {
            double most = 0;
            for (int j = 0; j < m; j++)
                most = Math.max(
                        most,
                        Math.abs(problem.candidates().get(set[c]).effect()[j]
                                / problem.points().get(j).halfWidth()));
            unit[c] = alone / most;
        }
        // Variables x and s, all ≥ 0; the worst miss is alone·s.
        List<LinearConstraint> constraints = new ArrayList<>();
        double[] volume = new double[k + 1];
        for (int c = 0; c < k; c++) {
            Candidate candidate = problem.candidates().get(set[c]);
            volume[c] = candidate.specificVolume() * unit[c] / problem.limits().addedVolume();
            if (candidate.upper() < Double.POSITIVE_INFINITY) {
                double[] row = new double[k + 1];
                row[c] = 1;
                constraints.add(new LinearConstraint(row, Relationship.LEQ, candidate.upper() / unit[c]));
            }
        }
        constraints.add(new LinearConstraint(volume, Relationship.LEQ, 1));
        for (int j = 0; j < m; j++) {
            Point p = problem.points().get(j);
            double[] up = new double[k + 1];
            double[] down = new double[k + 1];
            for (int c = 0; c < k; c++) {
                up[c] = problem.candidates().get(set[c]).effect()[j] / p.halfWidth() * unit[c] / alone;
                down[c] = -up[c];
            }
            up[k] = -1;
            down[k] = -1;
            double rest = p.residual() / p.halfWidth() / alone;
            constraints.add(new LinearConstraint(up, Relationship.LEQ, rest));
            constraints.add(new LinearConstraint(down, Relationship.LEQ, -rest));
        }
        double[] objective = new double[k + 1];
        objective[k] = 1;
        PointValuePair found = new SimplexSolver(1e-10, 10, 1e-11)
                .optimize(
                        new MaxIter(10000),
                        new LinearObjectiveFunction(objective, 0),
                        new LinearConstraintSet(constraints),
                        GoalType.MINIMIZE,
                        new NonNegativeConstraint(true));
        return found.getValue() * alone;
    }
}
