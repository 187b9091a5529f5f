package org.hazewright.bench;

import java.util.ArrayList;
import java.util.List;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;

/** What stays in a stock's bottle when the recipe is made, in g. */
public record Leftover(String stock, double madeG, double usedG) {

    public double leftG() {
        return madeG - usedG;
    }

    /** One for each stock of a recipe, in making order; drawn from are the items and the stocks made from it. */
    public static List<Leftover> of(Recipe recipe) {
        List<Leftover> leftovers = new ArrayList<>();
        for (Stock s : recipe.stocks()) {
            double used = 0;
            for (Item i : recipe.items()) if (i.stock().filter(s.id()::equals).isPresent()) used += i.massG();
            for (Stock later : recipe.stocks())
                if (later.from().filter(s.id()::equals).isPresent()) used += later.ingredientG();
            leftovers.add(new Leftover(s.id(), s.totalG(), used));
        }
        return leftovers;
    }
}
