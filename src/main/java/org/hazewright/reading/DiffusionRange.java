package org.hazewright.reading;

import java.util.Locale;

/**
 * Where the diffusion model may be trusted, in numbers, with the reason in words.
 *
 * <p>The limits are those within which diffusion was compared with photon packets (see the test of the same name).
 */
public final class DiffusionRange {
    /** Least µs'/µa. */
    public static final double LEAST_RATIO = 10;
    /** Least distance from the beam, in transport lengths 1/(µa + µs'). */
    public static final double LEAST_DISTANCE = 5;
    /** Least distance in transport lengths for time-resolved and modulated light. */
    public static final double LEAST_DISTANCE_IN_TIME = 10;
    /** Least thickness of a slab, in transport lengths. */
    public static final double LEAST_THICKNESS = 10;

    private DiffusionRange() {}

    /** Null inside the range, else a plain sentence that says what is outside. */
    public static String outside(Medium medium, double distanceMm, Double thicknessMm, boolean inTime) {
        String body = outside(medium, thicknessMm);
        if (body != null) return body;
        double lengths = distanceMm / medium.transportLengthMm();
        double least = inTime ? LEAST_DISTANCE_IN_TIME : LEAST_DISTANCE;
        if (lengths < least)
            return String.format(
                    Locale.ROOT,
                    "The detector is %.2g transport lengths from the beam; diffusion holds from %.2g on.",
                    lengths,
                    least);
        return null;
    }

    /** The same for totals over the whole surface. */
    public static String outside(Medium medium, Double thicknessMm) {
        if (medium.muspPerCm() < LEAST_RATIO * medium.muaPerCm())
            return String.format(
                    Locale.ROOT,
                    "µs' is %.2g times µa; diffusion holds from %.2g times on.",
                    medium.muspPerCm() / medium.muaPerCm(),
                    LEAST_RATIO);
        if (medium.muspPerCm() == 0) return "The medium does not scatter; diffusion does not hold.";
        if (thicknessMm == null) return null;
        double thick = thicknessMm / medium.transportLengthMm();
        if (thick < LEAST_THICKNESS)
            return String.format(
                    Locale.ROOT,
                    "The slab is %.2g transport lengths thick; diffusion holds from %.2g on.",
                    thick,
                    LEAST_THICKNESS);
        return null;
    }
}
