package org.hazewright.shelf;

import java.util.Collections;
import java.util.EnumSet;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import org.hazewright.optics.Refusal;

/**
 * A thing to weigh: what it is, what it mixes into, what it does to light, and where that is known from.
 *
 * <p>Density in g/mL, {@code maxGPerMl} the most of it in g per mL of finished phantom, price per g in the user's currency.
 * A base that is itself mixed has a {@code blend} and neither density nor optics of its own: they come from its parts. {@code
 * families} is what it mixes into; for a base, the one family it is. {@code index} is its own bulk refractive index, by which it
 * moves the host index; without one it does not.
 */
public record Ingredient(
        String id,
        String name,
        Part part,
        Set<Family> families,
        Form form,
        double densityGPerMl,
        OptionalDouble maxGPerMl,
        OptionalDouble pricePerG,
        boolean settles,
        double leastShare,
        List<String> handling,
        List<Conflict> conflicts,
        List<String> cautions,
        Source source,
        Uncertainty uncertainty,
        Optional<Absorption> absorption,
        Optional<Scattering> scattering,
        Optional<Material> index,
        List<BlendPart> blend,
        Making making,
        Optional<Lot> lot) {

    public Ingredient {
        handling = List.copyOf(handling);
        conflicts = List.copyOf(conflicts);
        cautions = List.copyOf(cautions);
        blend = List.copyOf(blend);
        if (families.isEmpty()) throw new Refusal("Ingredient " + id + " names no family that it mixes into.");
        families = Collections.unmodifiableSet(EnumSet.copyOf(families)); // in the order of the enum, run after run
        if (part == Part.BASE && families.size() != 1)
            throw new Refusal("Base " + id + " names " + families.size() + " families; a base is of one.");
        if (blend.isEmpty()) Refusal.positive("Density of " + id + " in g/mL", densityGPerMl);
        maxGPerMl.ifPresent(v -> Refusal.positive("Upper limit of " + id + " in g/mL", v));
        pricePerG.ifPresent(v -> Refusal.notNegative("Price of " + id + " per g", v));
        Refusal.within("Least share of base " + id, leastShare, 0, 1);
        if (!blend.isEmpty()) {
            double sum = blend.stream().mapToDouble(BlendPart::massFraction).sum();
            if (Math.abs(sum - 1) > 1e-6)
                throw new Refusal("Mass fractions of the blend " + id + " sum to " + sum + "; they must sum to 1.");
        }
    }

    public boolean isBlend() {
        return !blend.isEmpty();
    }

    /** The family of a base. */
    public Family family() {
        return families.iterator().next();
    }

    public boolean mixesInto(Family family) {
        return families.contains(family);
    }

    /** The ingredient this is a lot of, or itself: two lots of one ingredient share it. */
    public String kind() {
        return lot.map(Lot::of).orElse(id);
    }

    /** The same thing, known otherwise. */
    public Ingredient withUncertainty(Uncertainty other) {
        return new Ingredient(
                id,
                name,
                part,
                families,
                form,
                densityGPerMl,
                maxGPerMl,
                pricePerG,
                settles,
                leastShare,
                handling,
                conflicts,
                cautions,
                source,
                other,
                absorption,
                scattering,
                index,
                blend,
                making,
                lot);
    }

    /** By id alone: equal ingredients have equal ids, and maps are asked for ingredients all the time. */
    @Override
    public int hashCode() {
        return id.hashCode();
    }
}
