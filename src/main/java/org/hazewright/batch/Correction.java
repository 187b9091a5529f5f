package org.hazewright.batch;

import java.util.List;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;

/**
 * What to add to a batch that missed, or why to start again.
 *
 * @param stocks to make first for what is too little to weigh
 * @param items to add, rounded to the balance, in order; with {@link Outcome#START_AGAIN} the best that adding could do
 * @param after the batch with them in it
 * @param addedMl volume that they bring, {@code volumeMl} what then is in the vessel
 * @param now what stands in the vessel gives, by all that is known, and {@code then} what it will give
 * @param wantedChance of landing inside every tolerance
 * @param reason plain sentences
 * @param newBatch what a fresh batch takes
 */
public record Correction(
        Outcome outcome,
        List<Stock> stocks,
        List<Item> items,
        Recipe after,
        double addedMl,
        double volumeMl,
        Learned.Landing now,
        Learned.Landing then,
        double wantedChance,
        String reason,
        List<String> notes,
        Fresh newBatch) {

    /** What a correction comes to. */
    public enum Outcome {
        NOTHING_TO_DO,
        ADD,
        START_AGAIN
    }

    /**
     * A new batch of the same recipe: grams of all that is weighed in, the price of those that have one, the ingredients
     * without a price, and the chance of landing as the ingredients' files stand.
     */
    public record Fresh(double massG, int weighings, double cost, List<String> unpriced, double chance) {
        public Fresh {
            unpriced = List.copyOf(unpriced);
        }
    }

    public Correction {
        stocks = List.copyOf(stocks);
        items = List.copyOf(items);
        notes = List.copyOf(notes);
    }
}
