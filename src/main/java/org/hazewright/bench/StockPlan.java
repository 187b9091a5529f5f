package org.hazewright.bench;

import java.util.List;
import java.util.function.ToDoubleFunction;
import org.hazewright.brief.Balance;
import org.hazewright.mixture.Recipe;

/**
 * Concentrations made weighable: the recipe in grams with its stocks, what they leave over, and what a person should know of the
 * choice.
 *
 * @param recipe rounded to the balance, in weighing order
 * @param score the judge's figure for it
 * @param weighings loads on the balance, stocks that are not in hand included
 * @param leftovers of stocks made for it; a stock in hand has none
 * @param stocksInHand ids of its stocks that are made already
 * @param notes plain sentences: what lies below the smallest load and why, what was left out, what settles in a stock
 * @param judged how often the judge was asked
 */
public record StockPlan(
        Recipe recipe,
        double score,
        int weighings,
        List<Leftover> leftovers,
        List<String> stocksInHand,
        List<String> notes,
        int judged) {

    /** What a person wants of the plan beside its score. */
    public enum Wish {
        /** Nothing else. */
        LEAST_SCORE,
        /** As few weighings as the tolerances allow. */
        FEWEST_WEIGHINGS,
        /** Stocks in hand are used for whatever they hold. */
        STOCK_IN_HAND,
        /** The same but for what is weighed neat to one part in a thousand, and no new stock is made. */
        NO_NEW_STOCK
    }

    public StockPlan {
        leftovers = List.copyOf(leftovers);
        stocksInHand = List.copyOf(stocksInHand);
        notes = List.copyOf(notes);
    }

    /**
     * The plan of least score for these contents; among plans that score alike the one of fewest weighings, then the one that
     * leaves least over.
     *
     * @param judge the score of a recipe, J of the search; smaller is better. It must hold what the search held: when a recipe
     *     can be inside every tolerance, one outside must score worse than any inside, or rounding may step over an edge. Asked
     *     fewer than 40 times.
     */
    public static StockPlan of(Contents contents, Balance balance, ToDoubleFunction<Recipe> judge) {
        return of(contents, balance, judge, Wish.LEAST_SCORE);
    }

    /** The plan of least score for these contents that does what is wished. */
    public static StockPlan of(Contents contents, Balance balance, ToDoubleFunction<Recipe> judge, Wish wish) {
        return new Planning(contents, balance, judge, wish).plan();
    }

    /** Grams of stock made and not drawn. */
    public double leftG() {
        return leftovers.stream().mapToDouble(Leftover::leftG).sum();
    }
}
