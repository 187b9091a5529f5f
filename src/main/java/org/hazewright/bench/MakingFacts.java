package org.hazewright.bench;

import java.util.ArrayList;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.OptionalDouble;
import java.util.Set;
import java.util.function.Function;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Recipe;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Making;
import org.hazewright.shelf.Part;

/**
 * What the files of a recipe's ingredients say about making it: temperatures in °C, times in min or h. Of the base a fact is taken
 * from its own file first, then from its parts', then from modifiers (a gelling powder may come as one); nothing is made up where
 * no file speaks.
 */
final class MakingFacts {
    private final List<Ingredient> base = new ArrayList<>(); // in the order in which facts are looked up
    private final Set<Ingredient> added = new LinkedHashSet<>();

    MakingFacts(Recipe recipe) {
        base.add(recipe.base());
        for (Item i : recipe.items()) {
            if (isBase(recipe, i)) base.add(i.ingredient());
            else added.add(i.ingredient());
        }
        added.stream().filter(i -> i.part() == Part.MODIFIER).forEach(base::add);
    }

    /** Whether an item is a part of the base, or the base itself, weighed neat. */
    static boolean isBase(Recipe recipe, Item item) {
        if (item.stock().isPresent()) return false;
        String id = item.ingredient().id();
        return id.equals(recipe.base().id())
                || recipe.base().blend().stream().anyMatch(p -> p.ingredient().equals(id));
    }

    /** What is added to the base, in weighing order. */
    Set<Ingredient> added() {
        return added;
    }

    OptionalDouble ofBase(Function<Making, OptionalDouble> fact) {
        return base.stream()
                .map(i -> fact.apply(i.making()))
                .filter(OptionalDouble::isPresent)
                .findFirst()
                .orElse(OptionalDouble.empty());
    }

    boolean degas() {
        return base.stream().anyMatch(i -> i.making().degas())
                || added.stream().anyMatch(i -> i.making().degas());
    }

    OptionalDouble meltC() {
        return ofBase(Making::meltC);
    }

    /** What the molten base must not fall below while things are added. */
    OptionalDouble stayAboveC() {
        return ofBase(Making::addAboveC);
    }

    /** The lowest limit that what is added, or the base itself, sets on the base's temperature at adding. */
    OptionalDouble addBelowC() {
        OptionalDouble own = ofBase(Making::addBelowC);
        OptionalDouble others = added.stream()
                .map(i -> i.making().addBelowC())
                .filter(OptionalDouble::isPresent)
                .mapToDouble(OptionalDouble::getAsDouble)
                .min();
        if (own.isEmpty()) return others;
        if (others.isEmpty()) return own;
        return OptionalDouble.of(Math.min(own.getAsDouble(), others.getAsDouble()));
    }

    boolean settles() {
        return added.stream().anyMatch(Ingredient::settles);
    }
}
