/**
 * What can be bought: ingredients, their lots, and where their figures come from.
 *
 * <p>Values only, each checked by its constructor; reading them from files is done in {@code files}, mixing them in {@code
 * mixture}. Start with {@link org.hazewright.shelf.Ingredient}.
 */
package org.hazewright.shelf;
