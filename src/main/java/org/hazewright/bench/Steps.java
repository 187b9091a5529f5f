package org.hazewright.bench;

import java.util.Collection;
import java.util.List;
import org.hazewright.brief.Balance;
import org.hazewright.mixture.Recipe;

/**
 * An order of work for a recipe, made from what the ingredients' files say and from the family of the base.
 *
 * <p>Stocks first. Liquid and gel: the base cold, swelling, heating, cooling into the window, the water lost given back, additions,
 * pouring. Silicone and resin: part A, pigments dispersed in it, hardener last, degassing, pouring, curing. Orders are common
 * practice; temperatures and times stand only where a file gives them.
 */
public final class Steps {
    private Steps() {}

    /**
     * @param sensitivities of the recipe, for the allowed bands; empty when no targets are known
     * @param stocksInHand ids of stocks that are made already and need no steps
     */
    public static List<Step> of(
            Recipe recipe, Balance balance, List<Sensitivity> sensitivities, Collection<String> stocksInHand) {
        StepList list = new StepList(recipe, balance, sensitivities);
        StockSteps.write(list, stocksInHand);
        if (WeighingOrder.castAndCured(recipe.base())) CuredSteps.write(list);
        else PouredSteps.write(list);
        return list.steps();
    }

    public static List<Step> of(Recipe recipe, Balance balance, List<Sensitivity> sensitivities) {
        return of(recipe, balance, sensitivities, List.of());
    }
}
