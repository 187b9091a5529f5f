package org.hazewright.brief;

import java.util.List;
import org.hazewright.optics.Refusal;

/**
 * Limits of the search: ids to use (empty means all), ids to avoid, how many absorbers, scatterers and modifiers at most, and the
 * base's least share of the volume (at least what its own file asks for).
 */
public record SearchLimits(
        List<String> use,
        List<String> avoid,
        int maxAbsorbers,
        int maxScatterers,
        int maxModifiers,
        double leastBaseShare) {

    /**
     * What a brief that says nothing means: two absorbers, one scatterer, and no modifier, since a modifier moves targets only by
     * displacing base and moving its index, which nobody expects unasked.
     */
    public static final SearchLimits USUAL = new SearchLimits(List.of(), List.of(), 2, 1, 0, 0);

    public SearchLimits {
        use = List.copyOf(use);
        avoid = List.copyOf(avoid);
        Refusal.within("max_absorbers", maxAbsorbers, 0, 8);
        Refusal.within("max_scatterers", maxScatterers, 0, 8);
        Refusal.within("max_modifiers", maxModifiers, 0, 8);
        Refusal.within("least_base_share", leastBaseShare, 0, 1);
    }
}
