package org.hazewright.search;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Random;
import java.util.concurrent.atomic.AtomicInteger;
import org.hazewright.optics.Refusal;
import org.hazewright.search.ConvexProgramme.Status;
import org.hazewright.search.SetProblem.Candidate;
import org.hazewright.search.SetProblem.Conflict;
import org.hazewright.search.SetProblem.Group;
import org.hazewright.search.SetProblem.Limits;
import org.hazewright.search.SetProblem.Point;
import org.hazewright.search.SetSolution.Binding;
import org.hazewright.search.SetSolution.Stop;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.EnumSource;

/** What every answer of the search must be like, whatever the problem. */
class SetSearchTest {
    private static final double OPEN = Double.POSITIVE_INFINITY;

    private static Candidate dye(double... effect) {
        return new Candidate(effect, 1e-3, 1e-3, OPEN, 1e-3, Group.ABSORBER);
    }

    private static Limits upTo(int absorbers) {
        return new Limits(absorbers, 1, 1, absorbers + 2, 0.9, List.of());
    }

    private static double score(SetProblem p, int[] set, double[] c) {
        double sum = 0;
        double[] misses = p.misses(set, c);
        for (int j = 0; j < misses.length; j++) sum += p.points().get(j).weight() * misses[j] * misses[j];
        for (int k = 0; k < set.length; k++) {
            Candidate candidate = p.candidates().get(set[k]);
            sum += candidate.ingredientTerm() * c[k] * c[k] + candidate.weighingTerm();
        }
        return sum;
    }

    /** Every set: first-order residual at most 1e-9, and no feasible neighbour is better. */
    @ParameterizedTest
    @EnumSource(RandomProblems.Twist.class)
    void everySetIsOptimal(RandomProblems.Twist twist) {
        for (int seed = 1; seed <= 4; seed++) {
            SetProblem p = RandomProblems.of(twist, 9, 3, 3, seed % 2 == 0 ? 1 : 10, seed);
            SetSearch search = new SetSearch(p);
            double alone = score(p, new int[0], new double[0]);
            Random random = new Random(seed);
            for (int[] set : BruteForce.sets(p))
                for (boolean tolerances : new boolean[] {false, true}) {
                    SetSolution s = search.solve(set, tolerances);
                    if (s.status() == Status.INFEASIBLE) {
                        assertTrue(tolerances);
                        assertFalse(s.binding().isEmpty());
                        continue;
                    }
                    assertEquals(Status.OPTIMAL, s.status());
                    assertTrue(s.kktResidual() <= 1e-9, twist + " " + Arrays.toString(set) + " " + s.kktResidual());
                    assertEquals(score(p, set, s.amounts()), s.score(), 1e-13 * alone);
                    if (tolerances) assertTrue(s.meets());
                    for (int round = 0; round < 20; round++) {
                        double[] c = neighbour(p, s, random);
                        if (!feasible(p, set, c, tolerances)) continue;
                        assertTrue(score(p, set, c) >= s.score() - 1e-12 * alone, twist + " " + Arrays.toString(set));
                    }
                }
        }
    }

    private static double[] neighbour(SetProblem p, SetSolution s, Random random) {
        double[] c = s.amounts().clone();
        double size = Math.pow(10, -1 - 4 * random.nextDouble());
        for (int k = 0; k < c.length; k++) {
            if (random.nextInt(3) == 0) continue;
            double most = 0;
            double[] effect = p.candidates().get(s.members()[k]).effect();
            for (int j = 0; j < effect.length; j++)
                most = Math.max(most, Math.abs(effect[j]) / p.points().get(j).halfWidth());
            c[k] += size * random.nextGaussian() * Math.max(c[k], 1 / most);
            c[k] = Math.max(0, Math.min(p.candidates().get(s.members()[k]).upper(), c[k]));
        }
        return c;
    }

    private static boolean feasible(SetProblem p, int[] set, double[] c, boolean tolerances) {
        double volume = 0;
        for (int k = 0; k < set.length; k++)
            volume += c[k] * p.candidates().get(set[k]).specificVolume();
        if (volume > p.limits().addedVolume()) return false;
        if (tolerances) for (double m : p.misses(set, c)) if (Math.abs(m) > 1) return false;
        return true;
    }

    /** Two bottles of the same ink, nothing known against either: the first is reported, the second is a runner-up, never both. */
    @Test
    void twinsMakeNoNoise() {
        Candidate ink = new Candidate(new double[] {2, 1}, 0, 0, OPEN, 1e-3, Group.ABSORBER);
        Candidate other = new Candidate(new double[] {0, 1}, 0, 0, OPEN, 1e-3, Group.ABSORBER);
        SetProblem p = new SetProblem(
                List.of(new Point(2, 0.1, 1), new Point(3, 0.1, 1)), List.of(other, ink, ink, ink), upTo(3));
        SetResult r = new SetSearch(p).run(10);
        assertArrayEquals(new int[] {0, 1}, r.best().members());
        assertArrayEquals(new double[] {2, 1}, r.best().amounts(), 1e-12);
        assertEquals(2, r.runnersUp().size());
        assertArrayEquals(new int[] {0, 2}, r.runnersUp().get(0).members());
        assertArrayEquals(new int[] {0, 3}, r.runnersUp().get(1).members());
    }

    /** Lots whose errors are independent are worth mixing when weighing costs nothing: ink split in two halves the variance. */
    @Test
    void independentLotsAreWorthMixing() {
        Candidate lot = new Candidate(new double[] {1}, 0.5, 0, OPEN, 1e-3, Group.ABSORBER);
        SetProblem p = new SetProblem(List.of(new Point(1, 0.5, 1)), List.of(lot, lot), upTo(2));
        SetResult r = new SetSearch(p).run(1);
        assertArrayEquals(new int[] {0, 1}, r.best().members());
        // J = (2c − 1)²/0.25 + 2·0.5 c², least at c = 8/(16 + 1)
        assertEquals(8.0 / 17, r.best().amounts()[0], 1e-13);
        assertEquals(r.best().amounts()[0], r.best().amounts()[1], 1e-13);
    }

    @Test
    void theBaseAloneCanBeBest() {
        SetProblem p = new SetProblem(
                List.of(new Point(-0.05, 0.1, 1), new Point(0, 0.1, 2)), List.of(dye(1, 1), dye(2, 0.1)), upTo(2));
        SetResult r = new SetSearch(p).run(3);
        assertEquals(0, r.best().members().length);
        assertEquals(0.25, r.best().score(), 1e-15);
        assertTrue(r.meets());
        assertTrue(r.runnersUp().isEmpty());
        assertEquals(0.5, r.bestPossibleWorstMiss(), 1e-15);
        assertEquals(4, r.admissible());
    }

    /** No room beside the base, no candidates, or none allowed: the base alone, whatever is wanted. */
    @Test
    void limitsThatLeaveNothing() {
        List<Point> points = List.of(new Point(1, 0.5, 1));
        List<SetProblem> problems = List.of(
                new SetProblem(points, List.of(dye(1)), new Limits(1, 1, 1, 3, 0, List.of())),
                new SetProblem(points, List.of(), upTo(2)),
                new SetProblem(points, List.of(dye(1)), new Limits(0, 1, 1, 3, 0.5, List.of())),
                new SetProblem(points, List.of(dye(1)), new Limits(1, 1, 1, 0, 0.5, List.of())),
                new SetProblem(points, List.of(new Candidate(new double[] {1}, 0, 0, 0, 1, Group.ABSORBER)), upTo(1)));
        for (SetProblem p : problems) {
            SetResult r = new SetSearch(p).run(5);
            assertEquals(0, r.best().members().length);
            assertFalse(r.meets());
            assertTrue(r.proven());
            assertEquals(2, r.bestPossibleWorstMiss(), 1e-15);
            assertEquals(1, r.admissible());
            assertEquals(4, r.best().score(), 1e-15);
        }
    }

    /** One dye of flat absorption cannot serve two targets a factor apart; the contradiction names both, from both sides. */
    @Test
    void contradictionIsNamed() {
        SetProblem p = new SetProblem(List.of(new Point(1, 0.1, 1), new Point(2, 0.1, 1)), List.of(dye(1, 1)), upTo(1));
        SetSolution s = new SetSearch(p).solve(new int[] {0}, true);
        assertEquals(Status.INFEASIBLE, s.status());
        assertEquals(OPEN, s.score());
        assertEquals(OPEN, s.worstMiss());
        List<Stop> stops = s.binding().stream().map(Binding::stop).sorted().toList();
        assertEquals(List.of(Stop.TOO_LOW, Stop.TOO_HIGH), stops);
        for (Binding b : s.binding()) assertEquals(b.stop() == Stop.TOO_HIGH ? 0 : 1, b.index());
        SetSolution alone = new SetSearch(p).solve(new int[0], true);
        assertEquals(Status.INFEASIBLE, alone.status());
        assertEquals(2, alone.binding().size());
    }

    /** Multipliers are slopes: loosening a binding limit by a little lowers the score by multiplier times that. */
    @Test
    void multipliersAreSlopes() {
        double step = 1e-6;
        double[] scores = new double[2];
        double multiplier = Double.NaN;
        for (int k = 0; k < 2; k++) {
            SetProblem p = new SetProblem(
                    List.of(new Point(1, 0.1 + k * step, 1e-9), new Point(2, 1, 1)), List.of(dye(1, 1)), upTo(1));
            SetSolution s = new SetSearch(p).solve(new int[] {0}, true);
            scores[k] = s.score();
            if (k == 0) {
                assertEquals(1, s.binding().size());
                assertEquals(Stop.TOO_HIGH, s.binding().get(0).stop());
                multiplier = s.binding().get(0).multiplier();
            }
        }
        // c = 1.1 from the first target; the second misses by 0.9: dJ/dc = −2·0.9 + 2·0.001·1.1, by hand
        assertEquals(2 * 0.9 - 2e-3 * 1.1, multiplier, 1e-6);
        assertEquals(multiplier, (scores[0] - scores[1]) / step, 1e-4);
    }

    @Test
    void countsAdmissibleSets() {
        List<Candidate> thirty = new ArrayList<>();
        for (int i = 0; i < 30; i++) thirty.add(dye(1 + i % 5));
        List<Point> points = List.of(new Point(1, 0.1, 1));
        assertEquals(
                31931,
                new SetSearch(new SetProblem(points, thirty, new Limits(4, 0, 0, 4, 0.9, List.of()))).admissible());
        for (int seed = 0; seed < 5; seed++) {
            SetProblem p = RandomProblems.of(RandomProblems.Twist.CONFLICTS, 12, 1, 4, 1, seed);
            List<int[]> sets = BruteForce.sets(p);
            assertEquals(sets.size(), new SetSearch(p).admissible());
            for (int[] set : sets) assertTrue(p.admits(set));
        }
        SetProblem two = new SetProblem(
                points, List.of(dye(1), dye(2), dye(3)), new Limits(3, 0, 0, 3, 1, List.of(new Conflict(2, 0))));
        assertFalse(two.admits(new int[] {0, 2}));
        assertEquals(6, new SetSearch(two).admissible());
    }

    @Test
    void stoppedSearchSaysSo() {
        SetProblem p = SearchBenchmark.shelf(40, 6, 5, "tight", 3);
        AtomicInteger asked = new AtomicInteger();
        AtomicInteger told = new AtomicInteger();
        SetResult r = new SetSearch(p).run(5, () -> asked.incrementAndGet() > 60, s -> {
            told.incrementAndGet();
            assertTrue(
                    s.considered() <= s.admissible() && s.admissible() == 760099 && s.stage() >= 1 && s.stage() <= 3);
        });
        assertFalse(r.proven());
        assertTrue(told.get() > 0);
        SetResult whole = new SetSearch(p).run(5);
        assertTrue(whole.proven());
        assertTrue(r.best().score() >= whole.best().score() * (1 - 1e-12) || r.meets() != whole.meets());
        SetResult atOnce = new SetSearch(p).run(5, () -> true, s -> {});
        assertFalse(atOnce.proven());
        assertEquals(760099, atOnce.admissible()); // Σ C(40, k), k ≤ 5
    }

    @Test
    void sameAnswerEveryTime() {
        SetProblem p = SearchBenchmark.shelf(20, 4, 4, "tight", 5);
        SetResult first = new SetSearch(p).run(20);
        SetResult again = new SetSearch(p).run(20);
        List<SetSolution> a = SetSearchBruteForceTest.all(first);
        List<SetSolution> b = SetSearchBruteForceTest.all(again);
        assertEquals(a.size(), b.size());
        for (int k = 0; k < a.size(); k++) {
            assertArrayEquals(a.get(k).members(), b.get(k).members());
            assertArrayEquals(a.get(k).amounts(), b.get(k).amounts());
        }
        assertEquals(first.solved(), again.solved());
        assertEquals(first.programmes(), again.programmes());
        // Fewer runners-up asked for are the first of the same list.
        SetResult fewer = new SetSearch(p).run(4);
        for (int k = 0; k < 5; k++)
            assertArrayEquals(
                    a.get(k).members(),
                    SetSearchBruteForceTest.all(fewer).get(k).members());
    }

    /** Twice the batch of everything: the same problem in other units gives the same recipe in those units. */
    @Test
    void unitsDoNotMatter() {
        for (int seed = 1; seed <= 6; seed++) {
            SetProblem p = RandomProblems.of(RandomProblems.Twist.PLAIN, 10, 2, 3, 2, seed);
            double f = 1e-7;
            List<Candidate> scaled = new ArrayList<>();
            for (Candidate c : p.candidates()) {
                double[] a = c.effect();
                for (int j = 0; j < a.length; j++) a[j] /= f;
                scaled.add(new Candidate(
                        a,
                        c.ingredientTerm() / f / f,
                        c.weighingTerm(),
                        c.upper() * f,
                        c.specificVolume() / f,
                        c.group()));
            }
            SetResult one = new SetSearch(p).run(3);
            SetResult other = new SetSearch(new SetProblem(p.points(), scaled, p.limits())).run(3);
            assertArrayEquals(one.best().members(), other.best().members());
            for (int k = 0; k < one.best().amounts().length; k++)
                assertEquals(
                        one.best().amounts()[k],
                        other.best().amounts()[k] / f,
                        1e-9 * one.best().amounts()[k]);
            assertEquals(one.bestPossibleWorstMiss(), other.bestPossibleWorstMiss(), 1e-9);
        }
    }

    @Test
    void refusesNonsense() {
        assertThrows(Refusal.class, () -> new Point(Double.NaN, 1, 1));
        assertThrows(Refusal.class, () -> new Point(1, 0, 1));
        assertThrows(Refusal.class, () -> new Point(1, 1, -1));
        assertThrows(Refusal.class, () -> new Candidate(new double[] {1}, -1, 0, 1, 1, Group.ABSORBER));
        assertThrows(Refusal.class, () -> new Candidate(new double[] {OPEN}, 0, 0, 1, 1, Group.ABSORBER));
        assertThrows(Refusal.class, () -> new Candidate(new double[] {1}, 0, 0, -1, 1, Group.ABSORBER));
        assertThrows(Refusal.class, () -> new Limits(1, 1, 1, 3, 1.5, List.of()));
        assertThrows(Refusal.class, () -> new Limits(-1, 1, 1, 3, 0.5, List.of()));
        assertThrows(Refusal.class, () -> new SetProblem(List.of(), List.of(), upTo(1)));
        List<Point> points = List.of(new Point(1, 1, 1));
        assertThrows(Refusal.class, () -> new SetProblem(points, List.of(dye(1, 2)), upTo(1)));
        SetProblem p = new SetProblem(points, List.of(dye(1), dye(2)), upTo(1));
        assertThrows(Refusal.class, () -> new SetSearch(p).solve(new int[] {1, 0}, false));
        assertThrows(Refusal.class, () -> new SetSearch(p).solve(new int[] {2}, false));
        assertThrows(Refusal.class, () -> new SetSearch(p).run(-1));
    }

    /** What a proof excludes is excluded: its bound never exceeds the solved worst miss of any set. */
    @ParameterizedTest
    @EnumSource(RandomProblems.Twist.class)
    void proofsBoundEverySet(RandomProblems.Twist twist) {
        SetProblem p = RandomProblems.of(twist, 8, 2, 3, 1, 77);
        Columns columns = new Columns(p);
        WorstMissProgramme programme = new WorstMissProgramme(columns, columns.size);
        List<int[]> sets = BruteForce.sets(p);
        List<double[]> weights = new ArrayList<>();
        double[] value = new double[sets.size()];
        for (int s = 0; s < value.length; s++) {
            assertTrue(programme.solve(columns.positions(sets.get(s)), sets.get(s).length));
            value[s] = programme.value;
            weights.add(programme.weight.clone());
        }
        for (int w = 0; w < value.length; w++) {
            MissBounds proof = new MissBounds(columns);
            proof.add(weights.get(w));
            for (int s = 0; s < value.length; s++) {
                int[] set = columns.positions(sets.get(s));
                assertFalse(proof.exclude(set, set.length, value[s] * (1 + 1e-9) + 1e-9), twist + " " + s);
                if (s == w) assertTrue(proof.exclude(set, set.length, value[s] * (1 - 1e-9) - 1e-9), twist + " " + s);
            }
        }
    }
}
