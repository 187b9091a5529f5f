package org.hazewright.design;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Collection;
import java.util.Comparator;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Set;
import java.util.TreeSet;
import java.util.concurrent.atomic.AtomicBoolean;
import java.util.function.BooleanSupplier;
import java.util.stream.IntStream;
import org.hazewright.search.ConvexProgramme;
import org.hazewright.search.SetProblem;
import org.hazewright.search.SetSolution;

/**
 * Sets of ingredients ranked by what they do for a whole series in one base: those with which most phantoms lie inside every tolerance
 * first, then least Σ (bias + ingredient + {@value #PER_WEIGHING} for each bottle that a phantom takes from).
 *
 * <p>Sets that lead for some phantom are solved for all of them. Then, while there are at most {@value #MOST} of them, so is every
 * other admissible set, phantom by phantom, until it can no longer be among the {@value #KEPT} best: a phantom not yet solved counts
 * as inside where its own search found any set inside, and with the score of all candidates together, which no set of them can be
 * below. So the best kept are the best of all, on coefficients as the searches had them.
 */
final class SetsForAll {
    static final double PER_WEIGHING = 0.01;
    static final int KEPT = 3;
    private static final int MOST = 60_000;

    /** A set solved for all phantoms on straightened coefficients. */
    record Screened(Set<String> ids, int meeting, double score, List<SetSolution> solutions) {}

    private static final Comparator<Screened> BEST_FIRST = Comparator.comparingInt((Screened s) -> -s.meeting)
            .thenComparingDouble(Screened::score)
            .thenComparing(s -> String.join(",", s.ids));

    private final List<CommonSet.Cell> cells;
    private final BooleanSupplier stop;

    /** From the phantom numbered so on: how many may lie inside, and the least that they can score together. */
    private final int[] mayMeet;

    private final double[] leastScore;
    private final List<Screened> best = new ArrayList<>();

    /** Whether the best are the best of all admissible sets. */
    boolean exhausted;

    /** Sets that were solved for every phantom or shown not to be among the best. */
    int compared;

    SetsForAll(List<CommonSet.Cell> cells, BooleanSupplier stop) {
        this.cells = cells;
        this.stop = stop;
        mayMeet = new int[cells.size() + 1];
        leastScore = new double[cells.size() + 1];
        for (int k = cells.size() - 1; k >= 0; k--) {
            CommonSet.Cell c = cells.get(k);
            mayMeet[k] = mayMeet[k + 1] + (c.result().meets() || !c.result().proven() ? 1 : 0);
            leastScore[k] = leastScore[k + 1] + together(c);
        }
    }

    /** Score of all candidates together, weighings left out: no set of them can do better. 0 where it cannot be settled. */
    private static double together(CommonSet.Cell c) {
        int n = c.problem().candidates().size();
        if (n == 0) return 0;
        SetSolution all = c.search().solve(IntStream.range(0, n).toArray(), false);
        return all.status() == ConvexProgramme.Status.OPTIMAL ? (1 - 1e-9) * (all.bias() + all.ingredient()) : 0;
    }

    /** The best, best first, begun with sets that are likely to be good. */
    List<Screened> best(Collection<Set<String>> likely) {
        likely.parallelStream().forEach(this::screen);
        compared = likely.size();
        Set<Set<String>> others = others();
        others.removeAll(new LinkedHashSet<>(likely));
        if (exhausted) {
            AtomicBoolean stopped = new AtomicBoolean();
            others.parallelStream().forEach(ids -> {
                if (stop.getAsBoolean()) stopped.set(true);
                else screen(ids);
            });
            exhausted = !stopped.get();
            if (exhausted) compared += others.size();
        }
        return best;
    }

    /** All admissible sets; none when they are too many, or when not every phantom can take the same ingredients. */
    private Set<Set<String>> others() {
        CommonSet.Cell first = cells.get(0);
        List<String> ids = first.ids();
        exhausted = cells.stream().allMatch(c -> c.ids().equals(ids))
                && first.search().admissible() <= MOST;
        Set<Set<String>> all = new LinkedHashSet<>();
        if (exhausted) grow(first.problem(), ids, new int[0], all);
        return all;
    }

    /** A set and all that grow out of it; limits on numbers and conflicts that bar a set bar every larger one. */
    private static void grow(SetProblem problem, List<String> ids, int[] set, Set<Set<String>> all) {
        Set<String> named = new TreeSet<>();
        for (int i : set) named.add(ids.get(i));
        all.add(named);
        for (int next = set.length == 0 ? 0 : set[set.length - 1] + 1; next < ids.size(); next++) {
            int[] larger = Arrays.copyOf(set, set.length + 1);
            larger[set.length] = next;
            if (problem.admits(larger)) grow(problem, ids, larger, all);
        }
    }

    private void screen(Set<String> ids) {
        int meeting = 0;
        double score = 0;
        List<SetSolution> solutions = new ArrayList<>();
        for (int k = 0; k < cells.size(); k++) {
            if (hopeless(meeting + mayMeet[k], score + leastScore[k])) return;
            CommonSet.Cell c = cells.get(k);
            int[] set = c.positions(ids);
            SetSolution s = c.search().solve(set, true);
            if (s.status() == ConvexProgramme.Status.INFEASIBLE) s = c.search().solve(set, false);
            else meeting++;
            int used = 0;
            for (double a : s.amounts()) if (a > 0) used++;
            score += s.bias() + s.ingredient() + PER_WEIGHING * used;
            solutions.add(s);
        }
        synchronized (best) {
            best.add(new Screened(ids, meeting, score, solutions));
            best.sort(BEST_FIRST);
            if (best.size() > KEPT) best.remove(KEPT);
        }
    }

    private boolean hopeless(int mostMeeting, double leastScore) {
        synchronized (best) {
            if (best.size() < KEPT) return false;
            Screened last = best.get(KEPT - 1);
            return mostMeeting < last.meeting || mostMeeting == last.meeting && leastScore > last.score;
        }
    }
}
