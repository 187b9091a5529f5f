package org.hazewright.bench;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;
import org.hazewright.shelf.Ingredient;

/**
 * One mass to weigh, in g, and what for.
 *
 * @param place its stock's or item's place in the recipe, from 0
 * @param ingredient what comes out of the bottle; of a stock, what that stock holds
 * @param from the stock that it is drawn from, when it is not drawn neat
 * @param into the stock that it makes, when it does not go into the vessel
 */
public record Weighing(
        Role role, int place, Ingredient ingredient, Optional<String> from, Optional<String> into, double massG) {

    /** What a mass is weighed for. */
    public enum Role {
        STOCK_SUBSTANCE,
        STOCK_DILUENT,
        ITEM
    }

    /** What stands on the bottle: the stock's id, or the ingredient's. */
    public String label() {
        return from.orElse(ingredient.id());
    }

    /** Every mass of a recipe in the order of work: for each stock what it holds and its diluent, then the items. */
    public static List<Weighing> of(Recipe recipe) {
        List<Weighing> all = new ArrayList<>();
        for (int k = 0; k < recipe.stocks().size(); k++) {
            Stock s = recipe.stocks().get(k);
            Optional<String> into = Optional.of(s.id());
            all.add(new Weighing(Role.STOCK_SUBSTANCE, k, s.ingredient(), s.from(), into, s.ingredientG()));
            all.add(new Weighing(Role.STOCK_DILUENT, k, s.diluent(), Optional.empty(), into, s.diluentG()));
        }
        for (int k = 0; k < recipe.items().size(); k++) {
            Item i = recipe.items().get(k);
            all.add(new Weighing(Role.ITEM, k, i.ingredient(), i.stock(), Optional.empty(), i.massG()));
        }
        return all;
    }

    /** The recipe with this mass at another value and all else as planned. */
    Recipe changed(Recipe recipe, double otherG) {
        List<Stock> stocks = new ArrayList<>(recipe.stocks());
        List<Item> items = new ArrayList<>(recipe.items());
        switch (role) {
            case STOCK_SUBSTANCE ->
                stocks.set(
                        place, with(stocks.get(place), otherG, stocks.get(place).diluentG()));
            case STOCK_DILUENT ->
                stocks.set(place, with(stocks.get(place), stocks.get(place).ingredientG(), otherG));
            case ITEM -> {
                Item i = items.get(place);
                items.set(place, new Item(i.ingredient(), i.stock(), i.lot(), otherG));
            }
        }
        return new Recipe(
                recipe.title(),
                recipe.base(),
                recipe.temperatureC(),
                recipe.weighingUncertaintyG(),
                recipe.briefSha256(),
                stocks,
                items);
    }

    private static Stock with(Stock s, double substanceG, double diluentG) {
        return new Stock(s.id(), s.ingredient(), s.lot(), substanceG, s.diluent(), diluentG, s.from());
    }
}
