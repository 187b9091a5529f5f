package org.hazewright.design;

import java.util.Map;
import java.util.Set;
import java.util.stream.Collectors;
import org.hazewright.mixture.Mixture;
import org.hazewright.shelf.Ingredient;

/**
 * One set of ingredients at its best amounts, on the full model: before stocks and rounding.
 *
 * @param base the base it is for
 * @param concentrationGPerMl g per mL of finished phantom of every ingredient but the base's parts; all above 0
 * @param score of the plain optimum, weighing without stocks
 * @param misses signed, in half-widths, one a point, of the full model
 * @param mixture the brief's volume of it
 * @param frozen the model frozen there, for judging grams
 */
public record Option(
        Ingredient base,
        Map<Ingredient, Double> concentrationGPerMl,
        Score score,
        double[] misses,
        Mixture mixture,
        Frozen frozen) {

    public double worstMiss() {
        double worst = 0;
        for (double m : misses) worst = Math.max(worst, Math.abs(m));
        return worst;
    }

    /** Whether every point lies inside its tolerance, to 1e-9 of the half-width. */
    public boolean meets() {
        return worstMiss() <= 1 + 1e-9;
    }

    /** The ids it is made of, base apart: what tells one option from another. */
    public Set<String> ids() {
        return concentrationGPerMl.keySet().stream().map(Ingredient::id).collect(Collectors.toSet());
    }
}
