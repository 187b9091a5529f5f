/**
 * What hands do: stocks, rounding to the balance, the order of steps, a batch as weighed, corrections.
 *
 * <p>Stands on {@code design} and knows no files and no screens. Start with {@link org.hazewright.bench.Answer}.
 */
package org.hazewright.bench;
