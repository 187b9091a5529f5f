package org.hazewright.mixture;

import java.util.Optional;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Ingredient;

/**
 * One thing weighed into the vessel, in g: an ingredient, or, where {@code stock} is given, an aliquot of that stock (and then
 * {@code ingredient} is what the stock holds).
 */
public record Item(Ingredient ingredient, Optional<String> stock, Optional<String> lot, double massG) {
    public Item {
        Refusal.notNegative("Grams of " + stock.orElse(ingredient.id()), massG);
    }

    /** Grams of an ingredient as it is bought. */
    public static Item neat(Ingredient ingredient, double massG) {
        return new Item(ingredient, Optional.empty(), Optional.empty(), massG);
    }

    /** Grams of a stock. */
    public static Item ofStock(Stock stock, double massG) {
        return new Item(stock.ingredient(), Optional.of(stock.id()), stock.lot(), massG);
    }

    /** What stands on the label of the bottle it is poured from. */
    public String label() {
        return stock.orElse(ingredient.id());
    }
}
