package org.hazewright.shelf;

import org.hazewright.optics.Refusal;

/** One part of a base that is itself mixed, by mass; {@code massFraction} in (0, 1]. */
public record BlendPart(String ingredient, double massFraction) {
    public BlendPart {
        if (!(massFraction > 0 && massFraction <= 1))
            throw new Refusal("Mass fraction of " + ingredient + " in a blend is " + massFraction
                    + "; it must lie above 0 and at most 1.");
    }
}
