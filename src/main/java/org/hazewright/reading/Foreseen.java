package org.hazewright.reading;

import java.util.List;

/** A set-up as it stood on the phantom, what it shows there, and diffusion's line through its distances (empty for other kinds). */
public record Foreseen(SetUp setUp, List<Reading> readings, List<Reading> line) {
    /** Points of the line. */
    private static final int POINTS = 61;

    public Foreseen {
        readings = List.copyOf(readings);
        line = List.copyOf(line);
    }

    public static Foreseen of(Phantom phantom, SetUp setUp, Foresight running) {
        return new Foreseen(phantom.placed(setUp), phantom.read(setUp, running), phantom.line(setUp, POINTS));
    }

    /** Whether every model holds where it was used. */
    public boolean trusted() {
        return readings.stream().allMatch(Reading::insideRange);
    }
}
