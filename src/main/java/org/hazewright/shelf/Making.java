package org.hazewright.shelf;

import java.util.Optional;
import java.util.OptionalDouble;

/**
 * What hands must know of an ingredient to put it in: temperatures in °C, times in minutes or hours, each only where a source or
 * common practice gives it.
 */
public record Making(
        OptionalDouble hydrateMin,
        OptionalDouble hydrateC,
        OptionalDouble meltC,
        OptionalDouble addBelowC,
        OptionalDouble addAboveC,
        OptionalDouble pourC,
        OptionalDouble setC,
        OptionalDouble setH,
        OptionalDouble cureC,
        OptionalDouble cureH,
        OptionalDouble potLifeMin,
        OptionalDouble stirMin,
        OptionalDouble sonicateMin,
        boolean degas,
        boolean addLast,
        Optional<String> disperseIn,
        String source) {

    private static final OptionalDouble NO = OptionalDouble.empty();

    /** Nothing is known beyond common sense. */
    public static final Making PLAIN =
            new Making(NO, NO, NO, NO, NO, NO, NO, NO, NO, NO, NO, NO, NO, false, false, Optional.empty(), "");
}
