package org.hazewright.bench;

import java.util.Comparator;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.hazewright.shelf.Family;
import org.hazewright.shelf.Form;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Lot;
import org.hazewright.shelf.Part;

/**
 * The order in which things go into the vessel (common practice).
 *
 * <p>Liquid and gel: the base's liquids, what dissolves in them cold (preservatives and other modifiers), the base's powders, then
 * what must wait until the base has cooled, scatterers, absorbers. Silicone and resin: the part that pigments are dispersed in,
 * pigments, the base's other parts, the hardener. Whatever its file says goes in last comes after its like. Between equals the
 * larger amount first.
 */
final class WeighingOrder {
    private WeighingOrder() {}

    static Optional<String> lotOf(Ingredient i) {
        return i.lot().map(Lot::number);
    }

    /**
     * The part that starts the cure: the smallest liquid or paste of a silicone or resin of two or more parts, the later one
     * between equals. Empty for other bases.
     */
    static Optional<Ingredient> hardenerOf(Ingredient base, Map<Ingredient, Double> massFractions) {
        if (!castAndCured(base)) return Optional.empty();
        List<Map.Entry<Ingredient, Double>> liquids = massFractions.entrySet().stream()
                .filter(p -> p.getKey().form() != Form.POWDER)
                .toList();
        if (liquids.size() < 2) return Optional.empty();
        return liquids.stream()
                .reduce((a, b) -> b.getValue() <= a.getValue() ? b : a)
                .map(Map.Entry::getKey);
    }

    static boolean castAndCured(Ingredient base) {
        return base.family() == Family.SILICONE || base.family() == Family.RESIN;
    }

    /** One thing to go in: what it brings, whether as a part of the base, and how much. */
    record Entry<T>(T what, Ingredient ingredient, boolean ofBase, double massG) {}

    static <T> List<T> sorted(List<Entry<T>> entries, Ingredient base, Map<Ingredient, Double> massFractions) {
        Optional<Ingredient> hardener = hardenerOf(base, massFractions);
        Optional<Ingredient> first = massFractions.entrySet().stream()
                .filter(p -> p.getKey().form() != Form.POWDER)
                .max(Map.Entry.comparingByValue())
                .map(Map.Entry::getKey);
        return entries.stream()
                .sorted(Comparator.<Entry<T>>comparingInt(e -> rank(e, base, first, hardener))
                        .thenComparing(Comparator.<Entry<T>>comparingDouble(Entry::massG)
                                .reversed()))
                .map(Entry::what)
                .toList();
    }

    private static int rank(Entry<?> e, Ingredient base, Optional<Ingredient> first, Optional<Ingredient> hardener) {
        boolean cast = castAndCured(base);
        if (e.ofBase()) {
            if (hardener.isPresent() && hardener.get().equals(e.ingredient())) return 90;
            if (e.ingredient().form() == Form.POWDER) return 30;
            return cast && !first.get().equals(e.ingredient()) ? 85 : 0;
        }
        if (e.ingredient().making().addLast()) return 80;
        if (e.ingredient().part() == Part.SCATTERER) return 50;
        if (e.ingredient().part() == Part.ABSORBER) return 60;
        boolean waits = !cast && e.ingredient().making().addBelowC().isPresent();
        return waits ? 40 : 20;
    }
}
