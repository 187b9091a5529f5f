package org.hazewright.search;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import org.apache.commons.math3.optim.MaxIter;
import org.apache.commons.math3.optim.linear.LinearConstraint;
import org.apache.commons.math3.optim.linear.LinearConstraintSet;
import org.apache.commons.math3.optim.linear.LinearObjectiveFunction;
import org.apache.commons.math3.optim.linear.NoFeasibleSolutionException;
import org.apache.commons.math3.optim.linear.NonNegativeConstraint;
import org.apache.commons.math3.optim.linear.Relationship;
import org.apache.commons.math3.optim.linear.SimplexSolver;
import org.apache.commons.math3.optim.nonlinear.scalar.GoalType;
import org.hazewright.optics.Refusal;
import org.hazewright.search.ConvexProgramme.Binding;
import org.hazewright.search.ConvexProgramme.Limit;
import org.hazewright.search.ConvexProgramme.Side;
import org.hazewright.search.ConvexProgramme.Solution;
import org.hazewright.search.ConvexProgramme.Status;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** Random programmes: optimal by every first-order condition, feasible exactly when the simplex method says so. */
class ConvexProgrammeTest {
    private static final double OPEN = Double.POSITIVE_INFINITY;

    /** {@code spread}: ratio of the largest to the smallest unit of the variables. */
    @ParameterizedTest
    @ValueSource(doubles = {1, 1e3, 1e6})
    void optimalOrContradicting(double spread) {
        int optimal = 0;
        int infeasible = 0;
        for (int seed = 0; seed < 1000; seed++) {
            Random random = new Random(seed * 7L + (long) spread);
            ConvexProgramme p = random(random, spread);
            Solution s = p.solve();
            String which = "spread " + spread + " seed " + seed;
            if (s.status() == Status.INFEASIBLE) {
                infeasible++;
                assertFalse(simplexFindsPoint(p), which);
                assertTrue(contradiction(p, s.binding()) > 0, which);
            } else {
                optimal++;
                assertEquals(Status.OPTIMAL, s.status(), which);
                assertTrue(s.kktResidual() <= 1e-9, which + " residual " + s.kktResidual());
                assertEquals(0, residual(p, s), 1e-9, which);
                for (Binding b : s.binding()) assertTrue(b.multiplier() >= 0, which);
            }
        }
        assertTrue(optimal > 300 && infeasible > 100, optimal + " optimal, " + infeasible + " infeasible");
    }

    /** 1 to 6 variables, 0 to 6 limits, G of any rank, in units that differ by the spread. */
    private static ConvexProgramme random(Random random, double spread) {
        int n = 1 + random.nextInt(6);
        int rank = random.nextInt(3) == 0 ? 1 + random.nextInt(n) : n + 2;
        double[] unit = new double[n];
        for (int i = 0; i < n; i++) unit[i] = Math.pow(spread, random.nextDouble());
        double[][] columns = new double[n][rank];
        for (int i = 0; i < n; i++) for (int k = 0; k < rank; k++) columns[i][k] = random.nextGaussian();
        if (n > 1 && random.nextInt(4) == 0) columns[n - 1] = columns[0].clone();
        if (n > 2 && random.nextInt(4) == 0)
            for (int k = 0; k < rank; k++) columns[1][k] = columns[2][k] * (1 + 1e-7 * random.nextGaussian());
        double[] wanted = new double[rank];
        for (int k = 0; k < rank; k++) wanted[k] = 3 * random.nextGaussian();
        double[][] g = new double[n][n];
        double[] a = new double[n];
        for (int i = 0; i < n; i++) {
            for (int k = 0; k < rank; k++) a[i] += columns[i][k] * wanted[k] * unit[i];
            for (int j = 0; j <= i; j++) {
                double sum = 0;
                for (int k = 0; k < rank; k++) sum += columns[i][k] * columns[j][k];
                g[i][j] = sum * unit[i] * unit[j];
                g[j][i] = g[i][j];
            }
        }
        double[] upper = new double[n];
        for (int i = 0; i < n; i++) upper[i] = random.nextInt(3) == 0 ? OPEN : 2 * random.nextDouble() / unit[i];
        List<Limit> limits = new ArrayList<>();
        int rows = random.nextInt(7);
        double[] near = new double[n];
        for (int i = 0; i < n; i++) near[i] = random.nextDouble();
        for (int r = 0; r < rows; r++) {
            double[] row = new double[n];
            double at = 0;
            for (int i = 0; i < n; i++) {
                double v = random.nextGaussian();
                at += v * near[i];
                row[i] = v * unit[i];
            }
            double shift = random.nextInt(3) == 0 ? random.nextGaussian() : 0;
            double width = random.nextDouble();
            switch (random.nextInt(3)) {
                case 0 -> limits.add(new Limit(row, at + shift - width, at + shift + width));
                case 1 -> limits.add(new Limit(row, at + shift - width, OPEN));
                default -> limits.add(new Limit(row, -OPEN, at + shift + width));
            }
        }
        return ConvexProgramme.ofAmounts(g, a, 0, upper, limits);
    }

    private static boolean simplexFindsPoint(ConvexProgramme p) {
        int n = p.linear().length;
        List<LinearConstraint> constraints = new ArrayList<>();
        double[] unit = new double[n];
        for (int i = 0; i < n; i++) unit[i] = 1 / Math.sqrt(p.quadratic()[i][i]);
        for (int i = 0; i < n; i++) {
            double[] row = new double[n];
            row[i] = 1;
            constraints.add(new LinearConstraint(row, Relationship.GEQ, 0));
            if (p.upper()[i] < OPEN)
                constraints.add(new LinearConstraint(row, Relationship.LEQ, p.upper()[i] / unit[i]));
        }
        for (Limit l : p.limits()) {
            double[] row = new double[n];
            for (int i = 0; i < n; i++) row[i] = l.row()[i] * unit[i];
            if (l.low() > -OPEN) constraints.add(new LinearConstraint(row, Relationship.GEQ, l.low()));
            if (l.high() < OPEN) constraints.add(new LinearConstraint(row, Relationship.LEQ, l.high()));
        }
        try {
            new SimplexSolver(1e-9, 10, 1e-11)
                    .optimize(
                            new MaxIter(10000),
                            new LinearObjectiveFunction(new double[n], 0),
                            new LinearConstraintSet(constraints),
                            GoalType.MINIMIZE,
                            new NonNegativeConstraint(true));
            return true;
        } catch (NoFeasibleSolutionException e) {
            return false;
        }
    }

    private static double[] normal(ConvexProgramme p, Binding b) {
        double[] normal = new double[p.linear().length];
        switch (b.side()) {
            case LOWER -> normal[b.index()] = 1;
            case UPPER -> normal[b.index()] = -1;
            default -> {
                for (int i = 0; i < normal.length; i++)
                    normal[i] = p.limits().get(b.index()).row()[i] * (b.side() == Side.LOW ? 1 : -1);
            }
        }
        return normal;
    }

    private static double limit(ConvexProgramme p, Binding b) {
        return switch (b.side()) {
            case LOWER -> p.lower()[b.index()];
            case UPPER -> -p.upper()[b.index()];
            case LOW -> p.limits().get(b.index()).low();
            case HIGH -> -p.limits().get(b.index()).high();
        };
    }

    /** Σ weight·limit less the most that Σ weight·normal·x can be: above 0 proves that no x exists. */
    private static double contradiction(ConvexProgramme p, List<Binding> proof) {
        double asked = 0;
        double[] sum = new double[p.linear().length];
        double[] size = new double[p.linear().length];
        for (Binding b : proof) {
            asked += b.multiplier() * limit(p, b);
            double[] normal = normal(p, b);
            for (int i = 0; i < sum.length; i++) {
                sum[i] += b.multiplier() * normal[i];
                size[i] += Math.abs(b.multiplier() * normal[i]);
            }
        }
        for (int i = 0; i < sum.length; i++) {
            if (Math.abs(sum[i]) <= 1e-12 * size[i]) continue;
            asked -= sum[i] > 0 ? sum[i] * p.upper()[i] : 0;
        }
        return asked;
    }

    /** First-order conditions, worked out here: gradient less multipliers over the largest term, limits over their terms. */
    private static double residual(ConvexProgramme p, Solution s) {
        int n = p.linear().length;
        double[] x = s.x();
        double largest = 0;
        double[] rest = new double[n];
        for (int i = 0; i < n; i++) {
            double scale = 1 / Math.sqrt(p.quadratic()[i][i]);
            rest[i] = -p.linear()[i] * scale;
            largest = Math.max(largest, Math.abs(rest[i]));
            for (int j = 0; j < n; j++) {
                double term = p.quadratic()[i][j] * x[j] * scale;
                rest[i] += term;
                largest = Math.max(largest, Math.abs(term));
            }
            for (Binding b : s.binding()) {
                double term = b.multiplier() * normal(p, b)[i] * scale;
                rest[i] -= term;
                largest = Math.max(largest, Math.abs(term));
            }
        }
        double worst = 0;
        for (double r : rest) worst = Math.max(worst, Math.abs(r) / largest);
        for (Binding b : s.binding()) {
            double[] normal = normal(p, b);
            double sum = -limit(p, b);
            double size = Math.abs(sum) + 1e-300;
            for (int i = 0; i < n; i++) {
                sum += normal[i] * x[i];
                size += Math.abs(normal[i] * x[i]);
            }
            worst = Math.max(worst, Math.abs(sum) / size);
        }
        for (int i = 0; i < n; i++) {
            if (x[i] < 0 || x[i] > p.upper()[i]) worst = Math.max(worst, 1);
        }
        for (Limit l : p.limits()) {
            double sum = 0;
            double size = 0;
            for (int i = 0; i < n; i++) {
                sum += l.row()[i] * x[i];
                size += Math.abs(l.row()[i] * x[i]);
            }
            if (sum < l.low()) worst = Math.max(worst, (l.low() - sum) / (size + Math.abs(l.low())));
            if (sum > l.high()) worst = Math.max(worst, (sum - l.high()) / (size + Math.abs(l.high())));
        }
        return worst;
    }

    @Test
    void linearProgrammesToo() {
        for (int seed = 0; seed < 200; seed++) {
            Random random = new Random(seed);
            int n = 2 + random.nextInt(4);
            double[] a = new double[n];
            double[] upper = new double[n];
            List<LinearConstraint> constraints = new ArrayList<>();
            List<Limit> limits = new ArrayList<>();
            for (int i = 0; i < n; i++) {
                a[i] = random.nextGaussian();
                upper[i] = 1 + random.nextDouble();
                double[] row = new double[n];
                row[i] = 1;
                constraints.add(new LinearConstraint(row, Relationship.LEQ, upper[i]));
            }
            for (int r = 0; r < 3; r++) {
                double[] row = new double[n];
                for (int i = 0; i < n; i++) row[i] = random.nextDouble();
                limits.add(new Limit(row, -OPEN, 1));
                constraints.add(new LinearConstraint(row, Relationship.LEQ, 1));
            }
            double expected = new SimplexSolver()
                    .optimize(
                            new LinearObjectiveFunction(a, 0),
                            new LinearConstraintSet(constraints),
                            GoalType.MAXIMIZE,
                            new NonNegativeConstraint(true))
                    .getValue();
            Solution s = ConvexProgramme.ofAmounts(new double[n][n], a, 0, upper, limits)
                    .solve();
            assertEquals(Status.OPTIMAL, s.status(), "seed " + seed);
            assertEquals(-expected, s.value(), 1e-8 * (1 + expected), "seed " + seed);
        }
    }

    /** Two wants that cannot both be had: x + y ≥ 3 with both at most 1; the proof names the three limits. */
    @Test
    void namesLimitsThatContradict() {
        Solution s = ConvexProgramme.ofAmounts(
                        new double[][] {{1, 0, 0}, {0, 1, 0}, {0, 0, 1}},
                        new double[] {0, 0, 5},
                        0,
                        new double[] {1, 1, OPEN},
                        List.of(
                                new Limit(new double[] {0, 0, 1}, -OPEN, 4),
                                new Limit(new double[] {1, 1, 0}, 3, OPEN)))
                .solve();
        assertEquals(Status.INFEASIBLE, s.status());
        assertEquals(3, s.binding().size());
        double w = s.multiplier(Side.LOW, 1);
        assertTrue(w > 0);
        assertEquals(w, s.multiplier(Side.UPPER, 0), 1e-12 * w);
        assertEquals(w, s.multiplier(Side.UPPER, 1), 1e-12 * w);
    }

    /** A gap of one part in 1e8 between two limits is a contradiction; touching limits are not. */
    @Test
    void tellsTouchingLimitsFromCrossing() {
        for (double gap : new double[] {0, 1e-8, 1e-4}) {
            Solution s = ConvexProgramme.ofAmounts(
                            new double[][] {{1, 0.5}, {0.5, 1}},
                            new double[] {0, 0},
                            0,
                            new double[] {OPEN, OPEN},
                            List.of(
                                    new Limit(new double[] {1, 2}, -OPEN, 4),
                                    new Limit(new double[] {2, 4}, 8 * (1 + gap), OPEN)))
                    .solve();
            assertEquals(gap == 0 ? Status.OPTIMAL : Status.INFEASIBLE, s.status(), "gap " + gap);
        }
    }

    @Test
    void unboundedIsNotPassedOffAsSolved() {
        Solution s = ConvexProgramme.ofAmounts(
                        new double[][] {{1, 0}, {0, 0}}, new double[] {1, 1}, 0, new double[] {OPEN, OPEN}, List.of())
                .solve();
        assertEquals(Status.UNSETTLED, s.status());
    }

    @Test
    void refusesNonsense() {
        double[] one = {1};
        double[] open = {OPEN};
        assertThrows(
                Refusal.class,
                () -> ConvexProgramme.ofAmounts(new double[0][0], new double[0], 0, new double[0], List.of()));
        assertThrows(Refusal.class, () -> ConvexProgramme.ofAmounts(new double[][] {{-1}}, one, 0, open, List.of()));
        assertThrows(
                Refusal.class,
                () -> ConvexProgramme.ofAmounts(new double[][] {{1}}, new double[] {Double.NaN}, 0, open, List.of()));
        assertThrows(Refusal.class, () -> new Limit(new double[] {1}, Double.NaN, 1));
        assertThrows(
                Refusal.class,
                () -> ConvexProgramme.ofAmounts(
                        new double[][] {{1, 0.2}, {0.3, 1}}, new double[2], 0, new double[] {1, 1}, List.of()));
    }
}
