package org.hazewright.bench;

import java.util.List;

/**
 * One thing that a person should know before starting, in a plain sentence or two.
 *
 * @param ingredients ids of those it is about
 */
public record Warning(Kind kind, List<String> ingredients, String text) {

    /** What a warning is about. */
    public enum Kind {
        /** Two ingredients that must not meet. */
        FORBIDDEN,
        /** Two ingredients that should not meet. */
        CONFLICT,
        EXPIRED,
        /** The figures of a lot were seen to move. */
        DRIFTING,
        SETTLING,
        /** No temperature suits the base and an ingredient. */
        TEMPERATURE,
        /** Can hurt people. */
        HAZARD
    }

    public Warning {
        ingredients = List.copyOf(ingredients);
    }
}
