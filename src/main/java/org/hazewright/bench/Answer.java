package org.hazewright.bench;

import java.util.List;
import java.util.Map;
import org.hazewright.brief.Brief;
import org.hazewright.brief.Point;
import org.hazewright.design.Score;
import org.hazewright.mixture.Budget;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Recipe;
import org.hazewright.shelf.Ingredient;

/**
 * The answer to a brief: grams that a person can weigh, what they should give, how far that may be trusted, and why it is not
 * better.
 *
 * @param recipe rounded to the balance, stocks included; every figure here is that of the rounded grams on the full model
 * @param predicted one a point of the brief, in its order
 * @param exact the optimum before stocks and rounding
 * @param bestPossibleWorstMiss the least worst miss that any admissible set can reach
 * @param chance share of Monte Carlo draws with every target inside its tolerance
 * @param budget first-order uncertainty by cause at the brief's wavelengths
 * @param limits plain sentences: what holds it back and what relaxing it would buy
 * @param notes what a person should know of the choice of stocks
 * @param leftOut ingredients of the shelf that could not take part, and why
 */
public record Answer(
        Brief brief,
        Recipe recipe,
        Mixture mixture,
        List<Predicted> predicted,
        Score score,
        Exact exact,
        double worstMiss,
        double bestPossibleWorstMiss,
        double chance,
        Budget budget,
        List<String> limits,
        List<Alternative> alternatives,
        Map<String, String> leftOut,
        SearchCount search,
        List<String> notes) {

    /** One wanted number and what is predicted for it, 1/cm: value, standard uncertainty, 95 % interval, miss in half-widths. */
    public record Predicted(Point point, double perCm, double uPerCm, double lowPerCm, double highPerCm, double miss) {
        public boolean inside() {
            return Math.abs(miss) <= 1;
        }
    }

    /** The optimum of the search in g/mL of finished phantom, before stocks and rounding. */
    public record Exact(Score score, Map<Ingredient, Double> concentrationGPerMl) {}

    /** Another recipe that a person would call different; {@code why} in about three words. */
    public record Alternative(
            String why, Recipe recipe, Score score, double worstMiss, double chance, int weighings, double cost) {}

    /** How the search went: sets that the limits admit, sets solved, sets cut by a bound; whether the best is proven. */
    public record SearchCount(long admissible, long solved, long cut, boolean proven) {}

    public Answer {
        predicted = List.copyOf(predicted);
        limits = List.copyOf(limits);
        alternatives = List.copyOf(alternatives);
    }

    /** Whether every target lies inside its tolerance as weighed. */
    public boolean meets() {
        return predicted.stream().allMatch(Predicted::inside);
    }
}
