package org.hazewright.brief;

import java.util.Optional;
import org.hazewright.optics.Refusal;

/**
 * A dilution that stands on the bench already: grams of an ingredient, or of an earlier stock, in grams of diluent, all by id.
 *
 * @param ingredient what it holds; empty when it was diluted from another stock
 * @param from the stock that it was diluted from
 */
public record StockInHand(
        String id,
        Optional<String> ingredient,
        Optional<String> from,
        double ingredientG,
        String diluent,
        double diluentG) {
    public StockInHand {
        if (ingredient.isPresent() == from.isPresent())
            throw new Refusal(
                    "The stock " + id + " needs an ingredient, or the stock it was diluted from: one of the two.");
        Refusal.positive("Grams of what went into the stock " + id, ingredientG);
        Refusal.positive("Grams of diluent in the stock " + id, diluentG);
    }
}
