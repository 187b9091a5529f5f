package org.hazewright.mixture;

import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Ingredient;

/**
 * Grams for a brief, in weighing order, with the stocks made first. The base's parts are items like the rest.
 *
 * @param base the base as the shelf names it (a blend stays one name; its parts are items)
 * @param weighingUncertaintyG standard uncertainty of one load on the balance, g
 * @param briefSha256 of the brief that it answers, when it answers one
 */
public record Recipe(
        String title,
        Ingredient base,
        double temperatureC,
        double weighingUncertaintyG,
        Optional<String> briefSha256,
        List<Stock> stocks,
        List<Item> items) {

    public Recipe {
        stocks = List.copyOf(stocks);
        items = List.copyOf(items);
        Refusal.notNegative("Standard uncertainty of a weighing in g", weighingUncertaintyG);
        if (items.isEmpty()) throw new Refusal("The recipe \"" + title + "\" has no items; there is nothing to weigh.");
        Set<String> made = new LinkedHashSet<>();
        for (Stock s : stocks) {
            s.from().ifPresent(f -> {
                if (!made.contains(f))
                    throw new Refusal(
                            "Stock " + s.id() + " is diluted from \"" + f + "\", which no earlier stock is called.");
            });
            if (!made.add(s.id())) throw new Refusal("Two stocks are called " + s.id() + ".");
        }
        for (Item i : items)
            i.stock().ifPresent(s -> {
                if (!made.contains(s))
                    throw new Refusal("An item is taken from the stock \"" + s + "\", which the recipe does not make"
                            + (made.isEmpty() ? "." : "; it makes " + String.join(", ", made) + "."));
            });
        if (!(items.stream().mapToDouble(Item::massG).sum() > 0))
            throw new Refusal("All items of the recipe \"" + title + "\" weigh 0 g.");
    }

    /** The stock of that id; a {@link Refusal} when the recipe makes none. */
    public Stock stock(String id) {
        return stocks.stream()
                .filter(s -> s.id().equals(id))
                .findFirst()
                .orElseThrow(() -> new Refusal("The recipe makes no stock \"" + id + "\"."));
    }

    /** What one gram of a stock holds, g of each ingredient; fractions sum to 1. */
    public Map<Ingredient, Double> contentPerG(String stockId) {
        Stock s = stock(stockId);
        Map<Ingredient, Double> content = new LinkedHashMap<>();
        double share = s.ingredientG() / s.totalG();
        if (s.from().isPresent())
            contentPerG(s.from().get()).forEach((i, g) -> content.merge(i, g * share, Double::sum));
        else content.merge(s.ingredient(), share, Double::sum);
        content.merge(s.diluent(), s.diluentG() / s.totalG(), Double::sum);
        return content;
    }

    /** Grams of every ingredient that end up in the vessel, stocks resolved, in order of first appearance. */
    public Map<Ingredient, Double> massesG() {
        Map<Ingredient, Double> masses = new LinkedHashMap<>();
        for (Item item : items) {
            if (item.stock().isEmpty()) masses.merge(item.ingredient(), item.massG(), Double::sum);
            else
                contentPerG(item.stock().get()).forEach((i, perG) -> masses.merge(i, perG * item.massG(), Double::sum));
        }
        return masses;
    }

    /** The same recipe for another amount: every item and stock times {@code factor}. */
    public Recipe scaled(double factor) {
        Refusal.positive("Scale of a recipe", factor);
        return new Recipe(
                title,
                base,
                temperatureC,
                weighingUncertaintyG,
                briefSha256,
                stocks.stream()
                        .map(s -> new Stock(
                                s.id(),
                                s.ingredient(),
                                s.lot(),
                                s.ingredientG() * factor,
                                s.diluent(),
                                s.diluentG() * factor,
                                s.from()))
                        .toList(),
                items.stream()
                        .map(i -> new Item(i.ingredient(), i.stock(), i.lot(), i.massG() * factor))
                        .toList());
    }
}
