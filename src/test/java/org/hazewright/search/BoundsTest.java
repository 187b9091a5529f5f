package org.hazewright.search;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Random;
import org.apache.commons.math3.linear.Array2DRowRealMatrix;
import org.apache.commons.math3.linear.ArrayRealVector;
import org.apache.commons.math3.linear.CholeskyDecomposition;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.EnumSource;

/**
 * What cuts sets, held against least squares by Commons Math over every choice of amounts above 0: no bound is above the truth,
 * and where a bound is meant to be the truth, it is.
 */
class BoundsTest {
    private static final RandomProblems.Twist[] REGULAR = {
        RandomProblems.Twist.PLAIN, RandomProblems.Twist.WILD_SIGNS, RandomProblems.Twist.TIGHT_UPPERS
    };

    private static Watch unwatched() {
        return new Watch(() -> false, p -> {}, Long.MAX_VALUE);
    }

    /** Where the unlimited xᵀHx − 2bᵀx is least, over some positions. */
    private static double[] unlimited(Columns.Gram gram, double[] b, int[] set) {
        int k = set.length;
        double[][] h = new double[k][k];
        double[] right = new double[k];
        for (int r = 0; r < k; r++) {
            right[r] = b[set[r]];
            for (int c = 0; c < k; c++) h[r][c] = gram.h[set[r] * gram.n + set[c]];
        }
        return new CholeskyDecomposition(new Array2DRowRealMatrix(h), 1e-12, 1e-14)
                .getSolver()
                .solve(new ArrayRealVector(right))
                .toArray();
    }

    private static double value(double[] b, int[] set, double[] x) {
        // at the optimum of a support xᵀHx = bᵀx
        double v = 0;
        for (int k = 0; k < set.length; k++) v -= b[set[k]] * x[k];
        return v;
    }

    /** Least xᵀHx − 2bᵀx over x ≥ 0: the best of all supports whose own optimum is not negative. */
    private static double leastNonNegative(Columns.Gram gram, double[] b, int[] set) {
        double best = 0;
        for (int bits = 1; bits < 1 << set.length; bits++) {
            int[] support = new int[Integer.bitCount(bits)];
            int n = 0;
            for (int k = 0; k < set.length; k++) if ((bits >> k & 1) == 1) support[n++] = set[k];
            double[] x = unlimited(gram, b, support);
            if (Arrays.stream(x).allMatch(v -> v >= 0)) best = Math.min(best, value(b, support, x));
        }
        return best;
    }

    private static List<int[]> shown(Columns columns, SetSweep[] made, double ceiling, boolean lean, long seed) {
        Columns.Gram gram = columns.gram(true);
        Random random = new Random(seed);
        double[] charges = columns.weighing;
        double[] linear = gram.b.clone();
        double[] leanCharges = charges.clone();
        for (int i = 0; i < columns.size; i++) {
            linear[i] += 0.3 * random.nextGaussian() * Math.abs(linear[i]);
            leanCharges[i] += 0.01 * random.nextGaussian();
        }
        double leanStart = gram.start * (1 + 0.1 * random.nextDouble());
        List<int[]> all = new ArrayList<>();
        SetSweep sweep = new SetSweep(columns, gram, charges, unwatched()) {
            @Override
            boolean hopeless(int depth, int from, double work) {
                return false;
            }

            @Override
            void visit(int count) {
                int[] set = Arrays.copyOf(member, count);
                all.add(set);
                double[] x = unlimited(gram, gram.b, set);
                double charge = 0;
                double leanCharge = 0;
                for (int i : set) {
                    charge += charges[i];
                    leanCharge += leanCharges[i];
                }
                double grain = 1e-9 * gram.start;
                assertEquals(gram.start + charge + value(gram.b, set, x), freeBound, grain, "unlimited least squares");
                double rise = freeAmounts(count);
                for (int k = 0; k < count; k++)
                    assertEquals(x[k], amount[k], 1e-6 * (Math.abs(x[k]) + Math.sqrt(gram.start)), "amounts");
                boolean positive = Arrays.stream(amount, 0, count).allMatch(v -> v > 0);
                assertEquals(positive, rise == 0, "a rise is asked for when an amount is not above 0");
                double truth = gram.start + charge + leastNonNegative(gram, gram.b, set);
                assertTrue(freeBound + rise <= truth + grain, "a bound above the truth");
                if (count == 1 && !positive) assertEquals(truth, freeBound + rise, grain, "alone it is held at 0");
                if (!lean) return;
                double[] y = unlimited(gram, linear, set);
                double second = leanStart + leanCharge + value(linear, set, y);
                grain = 1e-9 * (gram.start + Math.abs(second));
                assertEquals(second, leanBound, grain, "second objective");
                double leanTruth = leanStart + leanCharge + leastNonNegative(gram, linear, set);
                double leanRise = leanAmounts(count);
                assertTrue(leanBound + leanRise <= leanTruth + grain, "a second bound above the truth");
                assertEquals(Arrays.stream(y).allMatch(v -> v > 0), leanRise == 0);
            }
        };
        if (lean) sweep.lean(linear, leanStart, leanCharges);
        sweep.ceiling = ceiling;
        sweep.run();
        made[0] = sweep;
        return all;
    }

    @ParameterizedTest
    @EnumSource(
            value = RandomProblems.Twist.class,
            names = {"PLAIN", "WILD_SIGNS", "TIGHT_UPPERS", "CONFLICTS", "SPREAD"})
    void aSweepShowsEachAdmissibleSetOnceWithBoundsThatHold(RandomProblems.Twist twist) {
        for (int seed = 1; seed <= 5; seed++)
            for (boolean lean : new boolean[] {false, true}) {
                SetProblem problem = RandomProblems.of(twist, 9, 4, 4, 2, seed);
                Columns columns = new Columns(problem);
                SetSweep[] made = new SetSweep[1];
                List<int[]> all = shown(columns, made, Double.POSITIVE_INFINITY, lean, seed);
                assertEquals(BruteForce.sets(problem).size() - 1, all.size(), twist + " " + seed);
                assertEquals(
                        all.size(),
                        all.stream().map(Arrays::toString).distinct().count(),
                        "each once");
                for (int[] set : all) assertTrue(columns.admits(set), Arrays.toString(set));
            }
    }

    /** With a ceiling in the middle: what is left out has its best within reach of each amount above it, and much is left out. */
    @Test
    void aCeilingLeavesOutOnlyWhatCannotMatter() {
        for (RandomProblems.Twist twist : REGULAR)
            for (int seed = 1; seed <= 5; seed++) {
                SetProblem problem = RandomProblems.of(twist, 9, 4, 4, 2, seed);
                Columns columns = new Columns(problem);
                Columns.Gram gram = columns.gram(true);
                List<int[]> sets = BruteForce.sets(problem).stream()
                        .filter(s -> s.length > 0)
                        .map(columns::positions)
                        .toList();
                double[] truth = new double[sets.size()];
                for (int s = 0; s < truth.length; s++) {
                    truth[s] = gram.start + leastNonNegative(gram, gram.b, sets.get(s));
                    for (int i : sets.get(s)) truth[s] += columns.weighing[i];
                }
                double[] sorted = truth.clone();
                Arrays.sort(sorted);
                double ceiling = sorted[truth.length / 10];
                List<String> shown = shown(columns, new SetSweep[1], ceiling, false, seed).stream()
                        .map(Arrays::toString)
                        .toList();
                for (int s = 0; s < truth.length; s++)
                    if (truth[s] < ceiling * (1 - 1e-9) && reachable(gram, sets.get(s)))
                        assertTrue(shown.contains(Arrays.toString(sets.get(s))), twist + " " + seed);
                assertTrue(shown.size() < truth.length, twist + " " + seed + ": nothing was left out");
            }
    }

    private static boolean reachable(Columns.Gram gram, int[] set) {
        double[] x = unlimited(gram, gram.b, set);
        for (int k = 0; k < set.length; k++) if (x[k] > gram.reach[set[k]]) return false;
        return true;
    }

    @Test
    void theQuickQuestionIsAnsweredByTheTruth() {
        Random random = new Random(8);
        for (RandomProblems.Twist twist : REGULAR)
            for (int seed = 1; seed <= 25; seed++) {
                Columns columns = new Columns(RandomProblems.of(twist, 9, 5, 4, 2, seed));
                Columns.Gram gram = columns.gram(true);
                NonNegative quick = new NonNegative(gram);
                int[] set = random.ints(0, columns.size)
                        .distinct()
                        .limit(1 + random.nextInt(6))
                        .sorted()
                        .toArray();
                double[] linear = gram.b.clone();
                if (seed % 2 == 0) for (int i = 0; i < linear.length; i++) linear[i] *= 1.5 * random.nextGaussian();
                double truth = gram.start + leastNonNegative(gram, linear, set);
                double step = 1e-7 * gram.start;
                String which = twist + " " + seed + " " + Arrays.toString(set);
                assertTrue(quick.staysAbove(set, set.length, linear, gram.start, truth - step), which);
                assertFalse(quick.staysAbove(set, set.length, linear, gram.start, truth + step), which);
            }
    }

    @Test
    void dependentColumnsAreADoubtAndNoProof() {
        Columns columns = new Columns(RandomProblems.of(RandomProblems.Twist.TWINS, 8, 3, 4, 2, 3));
        Columns.Gram gram = columns.gram(false);
        int[] twins = columns.positions(new int[] {0, 3});
        assertEquals(1, Math.abs(gram.h[twins[0] * gram.n + twins[1]]), 1e-12, "the problem has no twins");
        double[] linear = new double[gram.n];
        linear[twins[0]] = 1;
        linear[twins[1]] = 2;
        // x and its twin pull apart without end once both are in; the least over x ≥ 0 is with the second alone: −4
        assertFalse(new NonNegative(gram).staysAbove(twins, 2, linear, 10, 6.001));
        assertTrue(new NonNegative(gram).staysAbove(twins, 2, linear, 10, 5.999));
    }

    @Test
    void aProofOfOneSetIsExactForItAndNeverWrongForAnother() {
        for (RandomProblems.Twist twist : REGULAR)
            for (int seed = 1; seed <= 8; seed++) {
                SetProblem problem = RandomProblems.of(twist, 8, 3, 3, 1, seed);
                Columns columns = new Columns(problem);
                WorstMissProgramme programme = new WorstMissProgramme(columns, columns.size);
                List<int[]> sets = BruteForce.sets(problem);
                double[] truth = new double[sets.size()];
                for (int s = 0; s < truth.length; s++) truth[s] = BruteForce.leastWorstMiss(problem, sets.get(s));
                for (int s = 1; s < truth.length; s += 5) {
                    MissBounds bounds = new MissBounds(columns);
                    int[] own = columns.positions(sets.get(s));
                    programme.solve(own, own.length);
                    assertEquals(truth[s], programme.value, 1e-7 * (1 + truth[s]), "by the simplex method");
                    bounds.add(programme.weight);
                    double grain = 1e-7 * (1 + truth[s]);
                    boolean alone = programme.volumeWeight == 0;
                    if (alone) assertTrue(bounds.exclude(own, own.length, truth[s] - grain), twist + " " + seed);
                    for (int o = 0; o < truth.length; o++) {
                        int[] other = columns.positions(sets.get(o));
                        assertFalse(
                                bounds.exclude(other, other.length, truth[o] + 1e-7 * (1 + truth[o])),
                                "proof of " + Arrays.toString(own) + " cuts " + Arrays.toString(other));
                    }
                }
            }
    }

    /** The most that columns can pull a bound down: a knapsack of shares, filled by the greatest pull per volume first. */
    @Test
    void aProofCountsTheVolumeOnce() {
        for (int seed = 1; seed <= 20; seed++) {
            Columns columns = new Columns(RandomProblems.of(RandomProblems.Twist.TIGHT_VOLUME, 8, 3, 4, 1, seed));
            Random random = new Random(seed);
            double[] y = random.doubles(columns.points, -1, 1).toArray();
            double sum = Arrays.stream(y).map(Math::abs).sum();
            int[] set =
                    random.ints(0, columns.size).distinct().limit(4).sorted().toArray();
            double least = 0;
            for (int j = 0; j < y.length; j++) least -= y[j] / sum * columns.residual[j];
            double[][] items = new double[set.length][];
            for (int k = 0; k < set.length; k++) {
                double pull = 0;
                for (int j = 0; j < y.length; j++) pull -= y[j] / sum * columns.miss[set[k]][j];
                items[k] = new double[] {
                    Math.max(0, pull) / columns.volume[set[k]], columns.reach[set[k]] * columns.volume[set[k]]
                };
            }
            Arrays.sort(items, (a, b) -> Double.compare(b[0], a[0]));
            double room = 1;
            for (double[] item : items) {
                double share = Math.min(room, item[1]);
                least -= share * item[0];
                room -= share;
            }
            MissBounds bounds = new MissBounds(columns);
            bounds.add(y);
            double grain = 1e-9 * (1 + Math.abs(least));
            assertTrue(bounds.exclude(set, set.length, least - grain), "seed " + seed);
            assertFalse(bounds.exclude(set, set.length, least + grain), "seed " + seed);
        }
    }

    @Test
    void theListKeepsTheLeastScoresAndBreaksTiesTowardsSmallerSets() {
        TopSets top = new TopSets(3, 1);
        assertEquals(Double.POSITIVE_INFINITY, top.ceiling());
        top.add(new TopSets.Entry(new int[] {1, 2}, 5, true));
        top.add(new TopSets.Entry(new int[] {4}, 5 * (1 + 1e-10), true));
        top.add(new TopSets.Entry(new int[] {0, 9}, 5, true));
        assertTrue(top.full());
        assertEquals(List.of("[4]", "[0, 9]", "[1, 2]"), names(top));
        assertTrue(top.ceiling() > 5 && top.ceiling() < 5 + 1e-7, "a tie may still enter");
        assertFalse(top.wants(new TopSets.Entry(new int[] {4}, 4, true)), "a set enters once");
        assertFalse(top.wants(new TopSets.Entry(new int[] {2, 3}, 5, true)), "comes after all that tie");
        assertTrue(top.wants(new TopSets.Entry(new int[] {0, 3}, 5, true)), "comes before [0, 9]");
        top.add(new TopSets.Entry(new int[] {6, 7}, 4, true));
        assertEquals(List.of("[6, 7]", "[4]", "[0, 9]"), names(top));
        assertTrue(top.holds(new int[] {4}));
        assertFalse(top.holds(new int[] {1, 2}));
    }

    private static List<String> names(TopSets top) {
        return top.entries().stream().map(e -> Arrays.toString(e.members())).toList();
    }

    /** Where limits bind at the best sets and many sets need the engine, the multipliers' bound takes over; nothing is lost by it. */
    @ParameterizedTest
    @EnumSource(
            value = RandomProblems.Twist.class,
            names = {"TIGHT_UPPERS", "TIGHT_VOLUME", "BASE_ABOVE_TARGET"})
    void multipliersCutNothingThatMatters(RandomProblems.Twist twist) {
        for (int seed = 1; seed <= 3; seed++)
            for (double loose : new double[] {1, 8}) {
                SetProblem problem = RandomProblems.of(twist, 18, 3, 5, loose, 40 + seed);
                SetSearch search = new SetSearch(problem);
                SetResult found = search.run(2);
                double best = Double.POSITIVE_INFINITY;
                for (int[] set : BruteForce.sets(problem)) {
                    SetSolution s = search.solve(set, found.meets());
                    if (s.status() == ConvexProgramme.Status.OPTIMAL) best = Math.min(best, s.score());
                }
                String which = twist + " " + seed + " " + loose;
                assertEquals(best, found.best().score(), 1e-8 * best, which);
                assertTrue(found.proven(), which);
                assertTrue(
                        found.cut() > found.admissible() / 3,
                        which + ": of " + found.admissible() + " sets only " + found.cut() + " were cut");
            }
    }
}
