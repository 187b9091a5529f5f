/**
 * From a brief and a shelf to the recipes that answer it best.
 *
 * <p>{@link org.hazewright.design.Design} turns brief and shelf into the plain numbers of {@code search}, iterates crowding and host
 * index around it, and turns the answer back into ingredients, with plain sentences on what holds it back. What hands can weigh
 * (stocks, rounding) is decided in {@code bench}. Start with {@link org.hazewright.design.Design}.
 */
package org.hazewright.design;
