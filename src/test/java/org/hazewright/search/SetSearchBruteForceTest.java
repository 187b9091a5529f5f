package org.hazewright.search;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.EnumSource;

/** The search against every set solved the long way by Commons Math. */
class SetSearchBruteForceTest {
    private record Judged(int[] set, double score) {}

    @ParameterizedTest
    @EnumSource(RandomProblems.Twist.class)
    void findsWhatExhaustionFinds(RandomProblems.Twist twist) {
        for (int seed = 1; seed <= 12; seed++) {
            double loose = new double[] {0.5, 2, 6, 20}[seed % 4];
            SetProblem problem = RandomProblems.of(twist, 7, 2, 3, loose, seed);
            String which = twist + " seed " + seed;
            SetResult found = new SetSearch(problem).run(3);
            List<int[]> sets = BruteForce.sets(problem);
            assertEquals(sets.size(), found.admissible(), which);
            assertEquals(found.admissible(), found.solved() + found.cut(), which);
            assertTrue(found.proven(), which);

            double worst = Double.POSITIVE_INFINITY;
            for (int[] set : sets) worst = Math.min(worst, BruteForce.leastWorstMiss(problem, set));
            assertEquals(worst, found.bestPossibleWorstMiss(), 1e-6 * (1 + worst), which + " worst miss");
            assertTrue(found.leastWorstMiss().value() - found.leastWorstMiss().bound() <= 1e-8 * (1 + worst), which);

            List<Judged> judged = new ArrayList<>();
            for (int[] set : sets) judged.add(new Judged(set, BruteForce.leastScore(problem, set, true)));
            judged.removeIf(j -> j.score == Double.POSITIVE_INFINITY);
            assertEquals(!judged.isEmpty(), found.meets(), which + " meets, worst miss " + worst);
            if (judged.isEmpty())
                for (int[] set : sets) judged.add(new Judged(set, BruteForce.leastScore(problem, set, false)));
            judged.sort(Comparator.comparingDouble(Judged::score));
            double alone = BruteForce.leastScore(problem, new int[0], false);
            double grain = 1e-7 * judged.get(0).score + 1e-9 * alone;
            assertEquals(judged.get(0).score, found.best().score(), grain, which + " score");
            double last = found.best().score();
            for (SetSolution s : found.runnersUp()) {
                assertTrue(s.score() >= last - grain, which);
                last = s.score();
                double byHand = BruteForce.leastScore(problem, s.members(), found.meets());
                assertEquals(byHand, s.score(), 1e-7 * byHand + 1e-9 * alone, which + " runner-up");
            }
            for (SetSolution s : all(found)) {
                assertTrue(s.kktResidual() <= 1e-9, which + " residual " + s.kktResidual());
                if (found.meets()) assertTrue(s.meets(), which);
                for (double c : s.amounts()) assertFalse(c <= 0, which);
            }
        }
    }

    static List<SetSolution> all(SetResult r) {
        List<SetSolution> all = new ArrayList<>(r.runnersUp());
        all.add(0, r.best());
        return all;
    }
}
