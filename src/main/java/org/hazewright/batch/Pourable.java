package org.hazewright.batch;

import java.util.Map;
import java.util.Optional;
import org.hazewright.mixture.Stock;
import org.hazewright.shelf.Ingredient;

/**
 * Something that can be poured into a vessel: out of a bottle or a stock, or fresh base.
 *
 * @param perG grams of each ingredient in a gram of it
 * @param stock that it is poured from, {@code toMake} when that has to be made first
 */
record Pourable(String label, Map<Ingredient, Double> perG, Optional<Stock> stock, Optional<Stock> toMake) {}
