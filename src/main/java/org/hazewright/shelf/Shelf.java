package org.hazewright.shelf;

import java.util.Collection;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.TreeMap;
import java.util.TreeSet;
import org.hazewright.optics.Refusal;

/** The ingredients that can be used, by id, in the order of their ids; and the materials they are made of. */
public final class Shelf {
    private final Map<String, Ingredient> ingredients = new TreeMap<>();
    private final Map<String, Material> materials = new TreeMap<>();
    private final String place;
    private final List<String> others;

    /** {@code place} is where the shelf came from, for messages. */
    public Shelf(String place, Collection<Ingredient> ingredients, Collection<Material> materials) {
        this(place, ingredients, materials, List.of());
    }

    /** A part of a shelf: {@code others} are ids that it also holds and that were not asked for, named when an id is mistyped. */
    public Shelf(
            String place,
            Collection<Ingredient> ingredients,
            Collection<Material> materials,
            Collection<String> others) {
        this.place = place;
        this.others = List.copyOf(others);
        for (Ingredient i : ingredients)
            if (this.ingredients.put(i.id(), i) != null)
                throw new Refusal("Two ingredients on the shelf " + place + " have the id \"" + i.id() + "\".");
        for (Material m : materials) this.materials.put(m.id(), m);
        for (Ingredient i : ingredients)
            for (BlendPart p : i.blend()) {
                Ingredient part = require(p.ingredient());
                if (part.isBlend())
                    throw new Refusal(
                            "The blend " + i.id() + " holds " + part.id() + ", itself a blend; name its parts.");
            }
    }

    public String place() {
        return place;
    }

    public List<Ingredient> ingredients() {
        return List.copyOf(ingredients.values());
    }

    public List<Material> materials() {
        return List.copyOf(materials.values());
    }

    public Optional<Ingredient> find(String id) {
        return Optional.ofNullable(ingredients.get(id));
    }

    /** The ingredient of that id, or a refusal that suggests the nearest one. */
    public Ingredient require(String id) {
        Ingredient found = ingredients.get(id);
        if (found == null) {
            Set<String> known = new TreeSet<>(ingredients.keySet());
            known.addAll(others);
            throw new Refusal(unknown("ingredient", id, known));
        }
        return found;
    }

    public Material requireMaterial(String id) {
        Material found = materials.get(id);
        if (found == null) throw new Refusal(unknown("material", id, materials.keySet()));
        return found;
    }

    private String unknown(String what, String id, Collection<String> known) {
        if (known.isEmpty()) return "There is no " + what + " on the shelf " + place + ".";
        String hint = Nearest.to(id, known)
                .map(n -> " Perhaps \"" + n + "\" is meant.")
                .orElse(" The shelf holds: " + String.join(", ", known) + ".");
        return "There is no " + what + " \"" + id + "\" on the shelf " + place + "." + hint;
    }

    /** The base's parts by mass fraction: its blend, or itself alone. */
    public Map<Ingredient, Double> partsOf(Ingredient base) {
        Map<Ingredient, Double> parts = new LinkedHashMap<>();
        if (!base.isBlend()) parts.put(base, 1.0);
        for (BlendPart p : base.blend()) parts.merge(require(p.ingredient()), p.massFraction(), Double::sum);
        return parts;
    }

    /** Density of a base in g/mL, by adding the volumes of its parts. */
    public double densityGPerMl(Ingredient base) {
        double mlPerG = 0;
        for (var part : partsOf(base).entrySet())
            mlPerG += part.getValue() / part.getKey().densityGPerMl();
        return 1 / mlPerG;
    }

    /**
     * What stocks for this base are diluted with: its own liquid, the largest liquid part by mass; empty for a base with none.
     */
    public Optional<Ingredient> liquidOf(Ingredient base) {
        return partsOf(base).entrySet().stream()
                .filter(p -> p.getKey().form() == Form.LIQUID)
                .max((a, b) -> Double.compare(a.getValue(), b.getValue()))
                .map(Map.Entry::getKey);
    }
}
