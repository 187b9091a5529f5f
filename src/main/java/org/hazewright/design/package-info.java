/**
 * The search: score, exact search over sets of ingredients, proof of the limit, alternatives.
 *
 * <p>Two floors. Below, plain numbers: convex programmes over enumerated sets. Above, {@link org.hazewright.design.Design} turns a
 * brief and a shelf into such numbers, iterates crowding and host index, and turns the answer back into ingredients. What hands
 * can weigh (stocks, rounding) is decided in {@code bench}. Start with {@link org.hazewright.design.Design}.
 */
package org.hazewright.design;
