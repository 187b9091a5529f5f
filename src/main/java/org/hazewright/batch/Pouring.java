package org.hazewright.batch;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Form;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Shelf;

/** What a correction can pour: what the recipe was made of, with what is too little for the balance left out or diluted first. */
final class Pouring {
    private final Batch batch;
    private final Recipe made;
    private final Shelf shelf;

    Pouring(Batch batch, Recipe made, Shelf shelf) {
        this.batch = batch;
        this.made = made;
        this.shelf = shelf;
    }

    /** Fresh base, every stock that an item was drawn from, and every other ingredient that went in neat; the small ones left out or diluted. */
    List<Pourable> list(Set<String> small, boolean leaveOut) {
        List<Pourable> list = new ArrayList<>();
        Map<Ingredient, Double> base = new LinkedHashMap<>();
        for (var part : shelf.partsOf(made.base()).entrySet()) base.put(asUsed(part.getKey()), part.getValue());
        list.add(new Pourable("base", base, Optional.empty(), Optional.empty()));
        Set<String> seen = new LinkedHashSet<>();
        for (Item i : made.items()) {
            if (i.stock().isEmpty() && batch.isBasePart(i.ingredient()) || !seen.add(i.label())) continue;
            Optional<Stock> from = i.stock().map(made::stock);
            Pourable p = from.isPresent()
                    ? new Pourable(i.label(), made.contentPerG(i.stock().get()), from, Optional.empty())
                    : new Pourable(i.label(), Map.of(i.ingredient(), 1.0), Optional.empty(), Optional.empty());
            boolean tooLittle = small.contains(p.label());
            if (tooLittle && leaveOut) continue;
            list.add(tooLittle ? diluted(p, i.ingredient(), from) : p);
        }
        return list;
    }

    /** The lot of an ingredient that is in the vessel, so that its coefficients are those of the vessel. */
    private Ingredient asUsed(Ingredient i) {
        for (Ingredient used : sweepIngredients())
            if (used.equals(i) || used.kind().equals(i.id())) return used;
        throw new Refusal("The vessel holds no " + i.id() + ", a part of the base "
                + made.base().id() + ", so no fresh base can be added to it.");
    }

    private Set<Ingredient> sweepIngredients() {
        return made.massesG().keySet();
    }

    /** A bottle diluted a hundred times, a stock ten times more, so that the balance can weigh it. */
    private Pourable diluted(Pourable p, Ingredient what, Optional<Stock> from) {
        Ingredient liquid = shelf.partsOf(made.base()).keySet().stream()
                .filter(i -> i.form() == Form.LIQUID)
                .findFirst()
                .map(this::asUsed)
                .orElseThrow(() -> new Refusal("Too little " + p.label()
                        + " to weigh would be needed, and the base has no liquid to dilute it in."));
        int ratio = from.isPresent() ? 10 : 100;
        double grams =
                batch.balance().rounded(Math.max(0.5, 25 * batch.balance().smallestLoadG()));
        Stock s = new Stock(
                p.label() + "-1-" + ratio + "-correction-" + (batch.correctionCount() + 1),
                what,
                from.isPresent() ? from.get().lot() : what.lot().map(l -> l.number()),
                grams,
                liquid,
                batch.balance().rounded((ratio - 1) * grams),
                from.map(Stock::id));
        Map<Ingredient, Double> perG = new LinkedHashMap<>();
        double share = s.ingredientG() / s.totalG();
        p.perG().forEach((i, g) -> perG.merge(i, g * share, Double::sum));
        perG.merge(liquid, 1 - share, Double::sum);
        return new Pourable(p.label(), perG, Optional.of(s), Optional.of(s));
    }
}
