package org.hazewright.search;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Arrays;
import java.util.List;
import org.hazewright.search.ConvexProgramme.Limit;
import org.hazewright.search.ConvexProgramme.Side;
import org.hazewright.search.ConvexProgramme.Solution;
import org.hazewright.search.ConvexProgramme.Status;
import org.hazewright.search.SetProblem.Candidate;
import org.hazewright.search.SetProblem.Group;
import org.hazewright.search.SetProblem.Limits;
import org.hazewright.search.SetProblem.Point;
import org.junit.jupiter.api.Test;

/** Quadratic and Chebyshev problems with published solutions, all small enough to be confirmed by hand. */
class ConvexProgrammeReferenceTest {
    private static final double OPEN = Double.POSITIVE_INFINITY;

    private static double[] all(int n, double v) {
        double[] a = new double[n];
        Arrays.fill(a, v);
        return a;
    }

    private static void check(ConvexProgramme p, double[] x, double value, double tolerance) {
        Solution s = p.solve();
        assertEquals(Status.OPTIMAL, s.status());
        assertArrayEquals(x, s.x(), tolerance);
        assertEquals(value, s.value(), tolerance);
        assertTrue(s.kktResidual() <= 1e-9, "residual " + s.kktResidual());
    }

    /** Goldfarb & Idnani, Math. Program. 27, 1 (1983), the worked example (from memory): optimum 6.5 at (1/2, 3/2). */
    @Test
    void goldfarbAndIdnani1983() {
        ConvexProgramme p = ConvexProgramme.ofAmounts(
                new double[][] {{4, -2}, {-2, 4}},
                new double[] {-6, 0},
                0,
                all(2, OPEN),
                List.of(new Limit(new double[] {1, 1}, 2, OPEN)));
        check(p, new double[] {0.5, 1.5}, 6.5, 1e-12);
        assertEquals(5, p.solve().multiplier(Side.LOW, 0), 1e-11); // gradient (5, 5) = 5·(1, 1)
    }

    /** Nocedal & Wright, Numerical Optimization, 2nd ed., Springer 2006, example 16.4 (from memory): (1.4, 1.7). */
    @Test
    void nocedalAndWrightExample164() {
        ConvexProgramme p = ConvexProgramme.ofAmounts(
                new double[][] {{2, 0}, {0, 2}},
                new double[] {2, 5},
                7.25,
                all(2, OPEN),
                List.of(
                        new Limit(new double[] {1, -2}, -2, OPEN),
                        new Limit(new double[] {-1, -2}, -6, OPEN),
                        new Limit(new double[] {-1, 2}, -2, OPEN)));
        check(p, new double[] {1.4, 1.7}, 0.8, 1e-12);
        assertEquals(0.8, p.solve().multiplier(Side.LOW, 0), 1e-11);
    }

    /** Same book, example 16.2 (from memory): two equalities, optimum (2, −1, 1), multipliers 3 and −2. */
    @Test
    void nocedalAndWrightExample162() {
        ConvexProgramme p = new ConvexProgramme(
                new double[][] {{6, 2, 1}, {2, 5, 2}, {1, 2, 4}},
                new double[] {8, 3, 3},
                0,
                all(3, -OPEN),
                all(3, OPEN),
                List.of(new Limit(new double[] {1, 0, 1}, 3, 3), new Limit(new double[] {0, 1, 1}, 0, 0)));
        check(p, new double[] {2, -1, 1}, -3.5, 1e-12);
        Solution s = p.solve();
        assertEquals(3, s.multiplier(Side.LOW, 0) - s.multiplier(Side.HIGH, 0), 1e-11);
        assertEquals(-2, s.multiplier(Side.LOW, 1) - s.multiplier(Side.HIGH, 1), 1e-11);
    }

    /**
     * Hock & Schittkowski, Test Examples for Nonlinear Programming Codes, Lect. Notes Econ. Math. Syst. 187, Springer 1981,
     * problems 21, 35 and 76 (from memory; 76 to the seven printed digits).
     */
    @Test
    void hockAndSchittkowski() {
        check(
                new ConvexProgramme(
                        new double[][] {{0.02, 0}, {0, 2}},
                        new double[] {0, 0},
                        -100,
                        new double[] {2, -50},
                        new double[] {50, 50},
                        List.of(new Limit(new double[] {10, -1}, 10, OPEN))),
                new double[] {2, 0},
                -99.96,
                1e-11);
        check(
                ConvexProgramme.ofAmounts(
                        new double[][] {{4, 2, 2}, {2, 4, 0}, {2, 0, 2}},
                        new double[] {8, 6, 4},
                        9,
                        all(3, OPEN),
                        List.of(new Limit(new double[] {1, 1, 2}, -OPEN, 3))),
                new double[] {4.0 / 3, 7.0 / 9, 4.0 / 9},
                1.0 / 9,
                1e-12);
        check(
                ConvexProgramme.ofAmounts(
                        new double[][] {{2, 0, -1, 0}, {0, 1, 0, 0}, {-1, 0, 2, 1}, {0, 0, 1, 1}},
                        new double[] {1, 3, -1, 1},
                        0,
                        all(4, OPEN),
                        List.of(
                                new Limit(new double[] {1, 2, 1, 1}, -OPEN, 5),
                                new Limit(new double[] {3, 1, 2, -1}, -OPEN, 4),
                                new Limit(new double[] {0, 1, 4, 0}, 1.5, OPEN))),
                new double[] {0.2727273, 2.090909, 0, 0.5454545},
                -4.681818,
                5e-7);
    }

    /**
     * The straight line nearest to eˣ on [0, 1] in the worst case: slope e − 1, error (2 − e + (e − 1) ln(e − 1))/2 = 0.1059,
     * reached with alternating sign at 0, ln(e − 1) and 1 (Chebyshev's alternation; Powell, Approximation Theory and Methods,
     * Cambridge 1981, ch. 7).
     */
    @Test
    void chebyshevLineThroughExponential() {
        double middle = Math.log(Math.E - 1);
        double[] x = {0, 0.1, 0.2, 0.35, middle, 0.6, 0.8, 0.93, 1};
        double[] ones = all(x.length, 1);
        List<Point> points =
                Arrays.stream(x).mapToObj(v -> new Point(Math.exp(v), 1, 1)).toList();
        List<Candidate> candidates = List.of(
                new Candidate(ones, 0, 0, OPEN, 1e-3, Group.ABSORBER),
                new Candidate(x, 0, 0, OPEN, 1e-3, Group.ABSORBER));
        LeastWorstMiss least = new SetSearch(new SetProblem(points, candidates, new Limits(2, 0, 0, 2, 1, List.of())))
                .leastWorstMiss(() -> false);
        double error = (2 - Math.E + (Math.E - 1) * middle) / 2;
        assertEquals(error, least.value(), 1e-14);
        assertEquals(error, least.bound(), 1e-13);
        assertArrayEquals(new double[] {1 - error, Math.E - 1}, least.amounts(), 1e-13);
        for (int j = 0; j < x.length; j++) {
            // Too low at the ends, too high in the middle; half the weight there, since the weights balance both
            // columns.
            double weight = j == 4 ? 0.5 : j == 0 ? -0.5 * (1 - middle) : j == 8 ? -0.5 * middle : 0;
            assertEquals(weight, least.pointWeight()[j], 1e-13, "point " + j);
        }
    }
}
