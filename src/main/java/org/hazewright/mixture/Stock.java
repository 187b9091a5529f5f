package org.hazewright.mixture;

import java.util.Optional;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Ingredient;

/**
 * A dilution made first so that small amounts can be weighed: grams of an ingredient, or of an earlier stock, in grams of diluent.
 *
 * @param from the stock it is diluted from; empty when {@code ingredient} goes in neat
 */
public record Stock(
        String id,
        Ingredient ingredient,
        Optional<String> lot,
        double ingredientG,
        Ingredient diluent,
        double diluentG,
        Optional<String> from) {
    public Stock {
        Refusal.positive("Grams of " + ingredient.id() + " in stock " + id, ingredientG);
        Refusal.positive("Grams of diluent in stock " + id, diluentG);
    }

    /** Grams of stock made. */
    public double totalG() {
        return ingredientG + diluentG;
    }

    /** Grams of stock that hold one gram of what was put in: its dilution, above 1. */
    public double ratio() {
        return totalG() / ingredientG;
    }
}
