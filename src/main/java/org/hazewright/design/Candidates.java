package org.hazewright.design;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.stream.Collectors;
import org.hazewright.brief.Brief;
import org.hazewright.brief.Point;
import org.hazewright.mixture.MassSpecific;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Family;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Part;
import org.hazewright.shelf.Shelf;

/**
 * The ingredients that a search may choose from for one base, and the base's own parts; who was left out, and why.
 *
 * <p>An ingredient that a brief names in {@code use} and that cannot take part is refused; one that was merely on the shelf is
 * left out with a reason.
 */
final class Candidates {
    final Ingredient base;
    final Map<Ingredient, Double> baseParts;
    final List<Ingredient> ingredients;
    final Map<String, String> leftOut;

    private Candidates(
            Ingredient base,
            Map<Ingredient, Double> baseParts,
            List<Ingredient> ingredients,
            Map<String, String> leftOut) {
        this.base = base;
        this.baseParts = baseParts;
        this.ingredients = List.copyOf(ingredients);
        this.leftOut = leftOut;
    }

    static Candidates of(Brief brief, Shelf shelf, String baseId) {
        Ingredient base = shelf.require(baseId);
        if (base.part() != Part.BASE)
            throw new Refusal("\"" + baseId + "\" cannot be a base: its file says part = \""
                    + base.part().word()
                    + "\". Bases on the shelf: "
                    + shelf.ingredients().stream()
                            .filter(i -> i.part() == Part.BASE)
                            .map(Ingredient::id)
                            .collect(Collectors.joining(", "))
                    + ".");
        Map<Ingredient, Double> parts = shelf.partsOf(base);
        double[] nm = brief.wavelengthsNm();
        for (Ingredient part : parts.keySet()) {
            String gap = gap(part, nm, brief.temperatureC());
            if (gap != null) throw new Refusal("The base " + baseId + " cannot be used: " + gap);
        }
        Family family = base.family();
        brief.limits().avoid().forEach(shelf::require);
        boolean named = !brief.limits().use().isEmpty();
        for (String id : brief.limits().use()) {
            Ingredient i = shelf.require(id);
            if (parts.containsKey(i) || i.equals(base)) continue;
            if (!i.mixesInto(family) && brief.bases().size() == 1)
                throw new Refusal(id + " does not mix into " + baseId + ": it mixes into " + families(i) + ", and "
                        + baseId + " is a " + family.word() + ". Take it out of use, or choose another base.");
            if (brief.limits().avoid().contains(id))
                throw new Refusal("\"" + id + "\" stands both in use and in avoid; take it out of one.");
            String gap = gap(i, nm, brief.temperatureC());
            if (gap != null && i.mixesInto(family)) throw new Refusal(gap);
        }
        List<Ingredient> chosen = new ArrayList<>();
        Map<String, String> leftOut = new java.util.TreeMap<>();
        for (Ingredient i : shelf.ingredients()) {
            if (i.part() == Part.BASE || parts.containsKey(i)) continue;
            if (named && !brief.limits().use().contains(i.id())) continue;
            if (brief.limits().avoid().contains(i.id())) leftOut.put(i.id(), "avoided");
            else if (!i.mixesInto(family)) leftOut.put(i.id(), "not for " + family.word());
            else {
                String gap = gap(i, nm, brief.temperatureC());
                if (gap == null) chosen.add(i);
                else leftOut.put(i.id(), gap);
            }
        }
        Candidates candidates = new Candidates(base, parts, chosen, leftOut);
        candidates.refuseWithoutScatterer(brief, shelf);
        return candidates;
    }

    private void refuseWithoutScatterer(Brief brief, Shelf shelf) {
        boolean wanted =
                brief.points().stream().anyMatch(p -> p.quantity() == Point.Quantity.MUSP && p.wantedPerCm() > 0);
        if (!wanted) return;
        boolean scatters = ingredients.stream().anyMatch(i -> i.scattering().isPresent())
                || baseParts.keySet().stream().anyMatch(i -> i.scattering().isPresent());
        if (scatters && brief.limits().maxScatterers() > 0) return;
        if (scatters)
            throw new Refusal(
                    "The brief wants µs' but allows no scatterer (max_scatterers = 0); raise max_scatterers or drop"
                            + " musp_per_cm.");
        String known = shelf.ingredients().stream()
                .filter(i -> i.part() == Part.SCATTERER)
                .map(i -> i.id() + (leftOut.containsKey(i.id()) ? " (" + leftOut.get(i.id()) + ")" : ""))
                .collect(Collectors.joining("; "));
        throw new Refusal("The brief wants µs' but no scatterer can go into " + base.id() + ". "
                + (known.isEmpty()
                        ? "The shelf " + shelf.place() + " holds no scatterer."
                        : "Scatterers on the shelf: " + known + ".")
                + " Add one to the shelf or to use, or drop musp_per_cm.");
    }

    /** Why an ingredient cannot be computed at a wavelength that is wanted; null when it can. */
    private static String gap(Ingredient i, double[] wavelengthsNm, double temperatureC) {
        try {
            for (double nm : wavelengthsNm) MassSpecific.requireFigures(i, nm, temperatureC);
            return null;
        } catch (Refusal refusal) {
            return refusal.getMessage();
        }
    }

    private static String families(Ingredient i) {
        return i.families().stream().map(Family::word).sorted().collect(Collectors.joining(", "));
    }
}
