package org.hazewright.design;

import java.util.List;
import java.util.Map;
import org.hazewright.brief.Brief;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Shelf;

/**
 * What the search found for a brief, before stocks and rounding.
 *
 * @param options best first: those that meet every tolerance before those that do not, then by score; at least one
 * @param bestPossibleWorstMiss least worst miss over all admissible sets and bases
 * @param limits plain sentences, each checked by solving the problem it speaks of
 * @param leftOut ingredients that could not take part, and why
 */
public record Finding(
        Brief brief,
        Shelf shelf,
        List<Option> options,
        double bestPossibleWorstMiss,
        List<String> limits,
        Map<String, String> leftOut,
        long admissible,
        long solved,
        long cut,
        boolean proven) {
    public Finding {
        options = List.copyOf(options);
        limits = List.copyOf(limits);
        if (options.isEmpty()) throw new Refusal("The search found no recipe at all, not even the bare base.");
    }

    public Option best() {
        return options.get(0);
    }
}
