/**
 * Grams become coefficients: volumes, concentrations, µa, µs', g and host index of what was put together.
 *
 * <p>Knows the shelf and the optics, and nothing of wishes (briefs) or searches. Start with {@link
 * org.hazewright.mixture.Mixture}.
 */
package org.hazewright.mixture;
