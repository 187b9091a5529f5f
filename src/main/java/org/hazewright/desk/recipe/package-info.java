/** The place Recipe: what is weighed, how surely it lands, what holds it back, and other ways. Start with {@link org.hazewright.desk.recipe.RecipePlace}. */
package org.hazewright.desk.recipe;
