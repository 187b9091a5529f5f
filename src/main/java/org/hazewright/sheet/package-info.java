/**
 * Workbooks: the recipe sheet that goes to the balance and comes back filled in.
 *
 * <p>The only room that knows Apache POI. It reads the domain and writes bytes; where they go is {@code files}' business. No
 * physics: the formulas on a sheet only add up what {@code mixture} computed. Start with {@link
 * org.hazewright.sheet.RecipeSheet}.
 */
package org.hazewright.sheet;
