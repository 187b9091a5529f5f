/**
 * What hands do: stocks, rounding to the balance, how far each weighing may be off, the order of steps and their cautions.
 *
 * <p>Concentrations come in from a search, a recipe to weigh goes out; nothing here searches for ingredients, reads files or
 * draws. Start with {@link org.hazewright.bench.StockPlan}, then {@link org.hazewright.bench.Steps}.
 */
package org.hazewright.bench;
