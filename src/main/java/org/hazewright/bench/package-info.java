/**
 * What hands are to do: stocks, rounding to the balance, how far each weighing may be off, the order of steps; sets and titrations.
 *
 * <p>Stands on {@code design} and knows no files and no screens. Start with {@link org.hazewright.bench.Answer}; concentrations
 * become grams in {@link org.hazewright.bench.StockPlan}, grams become an order of work in {@link org.hazewright.bench.Steps}.
 */
package org.hazewright.bench;
