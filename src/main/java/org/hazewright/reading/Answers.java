package org.hazewright.reading;

import java.util.ArrayList;
import java.util.List;

/** Collects the readings of one set-up at one wavelength. */
final class Answers {
    private final SetUp setUp;
    private final Double nm;
    private final List<Reading> readings = new ArrayList<>();

    Answers(SetUp setUp, Double nm) {
        this.setUp = setUp;
        this.nm = nm;
    }

    List<Reading> all() {
        return readings;
    }

    /** A value that is not a number becomes null, which leaves the note to say why. */
    void add(Double mm, Quantity quantity, Double value, Double u, String model, boolean inside, String note) {
        boolean there = value != null && Double.isFinite(value);
        Double v = there ? value : null;
        Double uv = there && u != null && Double.isFinite(u) ? u : null;
        readings.add(new Reading(setUp.title(), setUp.kind(), nm, mm, quantity, v, uv, null, model, inside, note));
    }

    void curve(Double mm, Quantity quantity, Reading.Curve curve, String model, boolean inside, String note) {
        readings.add(
                new Reading(setUp.title(), setUp.kind(), nm, mm, quantity, null, null, curve, model, inside, note));
    }
}
