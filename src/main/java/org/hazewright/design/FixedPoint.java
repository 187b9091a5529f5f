package org.hazewright.design;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.hazewright.brief.Brief;
import org.hazewright.brief.Point;
import org.hazewright.mixture.Coefficients;
import org.hazewright.mixture.Mixture;
import org.hazewright.shelf.Ingredient;

/**
 * The best amounts of one set on the full model: the convex programme is solved with coefficients of the current mixture, and the
 * mixture moved to its answer, until neither changes.
 *
 * <p>Crowding and host index change by a few per cent between no particles and the answer, so each round shrinks the error some ten
 * times; rounds end at a relative change of 1e-10, or after {@value #ROUNDS}. The misses reported are those of {@link
 * Mixture} itself.
 */
final class FixedPoint {
    private static final int ROUNDS = 40;
    private static final double SETTLED = 1e-10;

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
        double[] amounts = new double[members.size()];
        for (int round = 0; round < ROUNDS; round++) {
            problem = columns.at(columns.mixture(now, 1), members, edge);
            Optional<double[]> next = rule.amounts(problem);
            if (next.isEmpty()) return Optional.empty();
            amounts = next.get();
            double change = 0;
            double size = 0;
            for (int k = 0; k < members.size(); k++) {
                double before = now.get(members.get(k));
                change = Math.max(change, Math.abs(amounts[k] - before) / Math.max(Math.abs(amounts[k]), 1e-12));
                size = Math.max(size, amounts[k]);
                now.put(members.get(k), amounts[k]);
            }
            if (change <= SETTLED || size == 0) break;
        }
        return Optional.of(option(now, members, amounts, problem));
    }

    private Option option(Map<Ingredient, Double> now, List<Ingredient> members, double[] amounts, SetProblem problem) {
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
        Map<Double, Coefficients> known = new LinkedHashMap<>();
        double[] misses = new double[columns.points().size()];
        for (int j = 0; j < misses.length; j++) {
            Point p = columns.points().get(j);
            Coefficients at = known.computeIfAbsent(p.wavelengthNm(), mixture::at);
            misses[j] = p.miss(p.quantity() == Point.Quantity.MUA ? at.muaPerCm() : at.muspPerCm());
        }
        return misses;
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
