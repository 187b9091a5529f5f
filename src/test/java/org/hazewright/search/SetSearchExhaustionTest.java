package org.hazewright.search;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import org.hazewright.search.ConvexProgramme.Status;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.EnumSource;

/**
 * The search with its bounds against every set solved one by one: nothing that matters is cut. The single solves are held to
 * Commons Math in {@link SetSearchBruteForceTest}.
 */
class SetSearchExhaustionTest {
    @ParameterizedTest
    @EnumSource(RandomProblems.Twist.class)
    void cutsNothingThatMatters(RandomProblems.Twist twist) {
        for (int seed = 101; seed <= 112; seed++) {
            double loose = new double[] {0.3, 1, 4, 20}[seed % 4];
            SetProblem problem = RandomProblems.of(twist, 11, seed % 3 + 1, 4, loose, seed);
            String which = twist + " seed " + seed;
            SetSearch search = new SetSearch(problem);
            SetResult found = search.run(15);

            List<int[]> sets = BruteForce.sets(problem);
            assertEquals(sets.size(), found.admissible(), which);
            double worst = Double.POSITIVE_INFINITY;
            Columns columns = new Columns(problem);
            WorstMissProgramme programme = new WorstMissProgramme(columns, columns.size);
            for (int[] set : sets) {
                programme.solve(columns.positions(set), set.length);
                worst = Math.min(worst, programme.value);
            }
            assertEquals(worst, found.bestPossibleWorstMiss(), 1e-8 * worst + 1e-9, which);

            Map<List<Integer>, SetSolution> solutions = new HashMap<>();
            boolean meets = false;
            for (int[] set : sets) {
                SetSolution s = search.solve(set, true);
                meets |= s.status() == Status.OPTIMAL;
                solutions.put(key(set), s);
            }
            assertEquals(meets, found.meets(), which + ", worst miss " + worst);
            if (!meets) for (int[] set : sets) solutions.put(key(set), search.solve(set, false));
            double alone = search.solve(new int[0], false).score();
            double grain = 1e-12 * alone;
            List<Double> scores = new ArrayList<>();
            for (SetSolution s : solutions.values()) if (needsAll(s, solutions, grain)) scores.add(s.score());
            scores.sort(null);
            List<SetSolution> reported = SetSearchBruteForceTest.all(found);
            assertEquals(Math.min(16, scores.size()), reported.size(), which + " " + scores);
            for (int k = 0; k < reported.size(); k++)
                assertEquals(
                        scores.get(k), reported.get(k).score(), 1e-8 * scores.get(k) + grain, which + " place " + k);
        }
    }

    private static boolean needsAll(SetSolution s, Map<List<Integer>, SetSolution> solutions, double grain) {
        if (s.status() != Status.OPTIMAL) return false;
        double without = s.bias() + s.ingredient();
        for (int k = 0; k < s.members().length; k++) {
            if (s.amounts()[k] <= 0) return false;
            int[] fewer = new int[s.members().length - 1];
            System.arraycopy(s.members(), 0, fewer, 0, k);
            System.arraycopy(s.members(), k + 1, fewer, k, fewer.length - k);
            SetSolution smaller = solutions.get(key(fewer));
            if (smaller.status() == Status.OPTIMAL
                    && smaller.bias() + smaller.ingredient() <= without * (1 + 1e-10) + grain) return false;
        }
        return true;
    }

    private static List<Integer> key(int[] set) {
        return Arrays.stream(set).boxed().toList();
    }
}
