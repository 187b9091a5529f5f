package org.hazewright.design;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.hazewright.brief.Brief;
import org.hazewright.mixture.Mixture;
import org.hazewright.search.ConvexProgramme;
import org.hazewright.search.LeastWorstMiss;
import org.hazewright.search.SetProblem;
import org.hazewright.search.SetSearch;
import org.hazewright.search.SetSolution;
import org.hazewright.shelf.Ingredient;

/**
 * The best amounts of one set on the full model: the convex programme is solved with coefficients of the current mixture, and the
 * mixture moved to its answer, until neither changes.
 *
 * <p>Each round straightens the full model at the present amounts, crowding and host index included, and solves the convex
 * programme there (Gauss–Newton with limits), so a round squares the error where crowding bends the model by a few per cent. When a
 * step turns back on the one before, strides are halved. Rounds end at a relative change of 1e-8, or after {@value #ROUNDS}. The
 * misses reported are those of {@link Mixture} itself.
 */
final class FixedPoint {
    private static final int ROUNDS = 40;
    private static final double SETTLED = 1e-8;

    /** A step above this share takes the slopes anew; below they serve, and the answer is theirs to a part in a million. */
    private static final double FAR = 0.02;

    private final Brief brief;
    private final BriefColumns columns;
    private final Candidates candidates;

    FixedPoint(Brief brief, BriefColumns columns, Candidates candidates) {
        this.brief = brief;
        this.columns = columns;
        this.candidates = candidates;
    }

    /** How the amounts of a set are chosen in each round. */
    interface Rule {
        /** The answer for all candidates of a problem; empty when its limits contradict. */
        Optional<double[]> amounts(SetProblem problem);
    }

    /** Least score, inside every tolerance (narrowed to {@code edge}) when {@code inside}. Empty when none is inside. */
    Optional<Option> leastScore(Map<Ingredient, Double> start, boolean inside, double edge) {
        return run(start, edge, problem -> {
            SetSolution s = new SetSearch(problem).solve(all(problem), inside);
            return s.status() == ConvexProgramme.Status.INFEASIBLE ? Optional.empty() : Optional.of(spread(s, problem));
        });
    }

    /** Least worst miss. */
    Optional<Option> leastWorstMiss(Map<Ingredient, Double> start) {
        return run(start, 1, problem -> {
            LeastWorstMiss least = new SetSearch(problem).leastWorstMiss(() -> false);
            double[] amounts = new double[problem.candidates().size()];
            for (int k = 0; k < least.members().length; k++) amounts[least.members()[k]] = least.amounts()[k];
            return Optional.of(amounts);
        });
    }

    private Optional<Option> run(Map<Ingredient, Double> start, double edge, Rule rule) {
        List<Ingredient> members = new ArrayList<>(start.keySet());
        Map<Ingredient, Double> now = new LinkedHashMap<>(start);
        SetProblem problem = null;
        double stride = 1;
        double[] before = null;
        List<double[]> slopes = columns.slopes(now, members);
        for (int round = 0; round < ROUNDS; round++) {
            problem = columns.tangent(now, members, slopes, edge);
            Optional<double[]> next = rule.amounts(problem);
            if (next.isEmpty()) return Optional.empty();
            double[] amounts = next.get();
            double[] step = new double[amounts.length];
            double change = 0;
            for (int k = 0; k < amounts.length; k++) {
                step[k] = amounts[k] - now.get(members.get(k));
                change = Math.max(change, Math.abs(step[k]) / Math.max(amounts[k], 1e-9));
            }
            if (before != null && turnsBack(step, before)) stride = Math.max(0.1, stride / 2);
            before = step;
            for (int k = 0; k < amounts.length; k++)
                now.merge(members.get(k), stride == 1 || change <= SETTLED ? step[k] : stride * step[k], Double::sum);
            if (change <= SETTLED) break;
            if (change > FAR && round > 0) slopes = columns.slopes(now, members);
        }
        double[] amounts = members.stream().mapToDouble(now::get).toArray();
        return Optional.of(option(members, amounts, problem));
    }

    /** Whether a step goes back more than half of the one before: the straightened model overshoots, and strides are halved. */
    private static boolean turnsBack(double[] step, double[] before) {
        double along = 0;
        double size = 0;
        for (int k = 0; k < step.length; k++) {
            double scale = 1 / Math.max(1e-24, before[k] * before[k]);
            along += step[k] * before[k] * scale;
            size += 1;
        }
        return along < -0.5 * size;
    }

    private Option option(List<Ingredient> members, double[] amounts, SetProblem problem) {
        Map<Ingredient, Double> used = new LinkedHashMap<>();
        double ingredient = 0;
        double weighing = 0;
        for (int k = 0; k < members.size(); k++) {
            if (!(amounts[k] > 0)) continue;
            used.put(members.get(k), amounts[k]);
            ingredient += problem.candidates().get(k).ingredientTerm() * amounts[k] * amounts[k];
            weighing += problem.candidates().get(k).weighingTerm();
        }
        Mixture mixture = columns.mixture(used, brief.volumeMl());
        double[] misses = misses(mixture);
        double bias = 0;
        for (int j = 0; j < misses.length; j++) bias += columns.points().get(j).weight() * misses[j] * misses[j];
        Score score = new Score(bias, ingredient, weighing);
        Frozen frozen = new Frozen(columns.points(), mixture, candidates.base, brief.balance());
        return new Option(candidates.base, used, score, misses, mixture, frozen);
    }

    /** Signed misses of the full model. */
    private double[] misses(Mixture mixture) {
        double[] values = columns.values(mixture);
        for (int j = 0; j < values.length; j++)
            values[j] = columns.points().get(j).miss(values[j]);
        return values;
    }

    private static int[] all(SetProblem problem) {
        int[] all = new int[problem.candidates().size()];
        for (int k = 0; k < all.length; k++) all[k] = k;
        return all;
    }

    private static double[] spread(SetSolution s, SetProblem problem) {
        double[] amounts = new double[problem.candidates().size()];
        for (int k = 0; k < s.members().length; k++) amounts[s.members()[k]] = s.amounts()[k];
        return amounts;
    }
}
