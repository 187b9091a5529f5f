package org.hazewright.desk.model;

import java.util.List;

/**
 * What was done at one step: the loads that were weighed in g, or that it was ticked off.
 *
 * @param done whether the step is over; a mass in several loads is not before its last
 */
public record Weighed(List<Double> loadsG, boolean done) {
    public static final Weighed NOTHING = new Weighed(List.of(), false);

    public Weighed {
        loadsG = List.copyOf(loadsG);
    }

    public double massG() {
        return loadsG.stream().mapToDouble(Double::doubleValue).sum();
    }
}
