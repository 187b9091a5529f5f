package org.hazewright.transport;

import java.util.Locale;

/**
 * Where the diffusion model may be trusted, in numbers, with the reason in words.
 *
 * <p>Found by comparison with photon packets (0.3 to 2 million each) in media of µs'/µa 5 to 200, g 0.5 and 0.9, n 1.33 and 1.40,
 * semi-infinite and slabs of 5 to 20 transport lengths 1/(µa + µs'): inside, steady reflectance in the default convention is
 * within {@link #STEADY_ERROR} of theirs and the mean time of flight within {@link #TIME_ERROR}; the variance within 0.12. Nearer
 * the beam and in darker media the light still remembers its direction. The flux form starts later. Far away the small error
 * of the attenuation, 0.4 (1 − a') relative for isotropic scattering (Case &amp; Zweifel, Linear Transport Theory,
 * Addison-Wesley 1967; from memory), adds up: it is allowed 10 %.
 */
public final class DiffusionRange {
    /** Largest relative error of steady reflectance inside the range. */
    public static final double STEADY_ERROR = 0.10;
    /** Largest relative error of the mean time of flight inside the range. */
    public static final double TIME_ERROR = 0.06;
    /** Least µs'/µa. */
    public static final double LEAST_RATIO = 20;
    /** Least distance from the beam, in transport lengths, for the form from flux and fluence. */
    public static final double LEAST_DISTANCE = 5;
    /** The same for the flux form. */
    public static final double LEAST_DISTANCE_OF_FLUX = 10;
    /** The same for time-resolved and modulated light. */
    public static final double LEAST_DISTANCE_IN_TIME = 7;
    /** Least thickness of a slab, in transport lengths. */
    public static final double LEAST_THICKNESS = 10;

    private DiffusionRange() {}

    /** Null inside the range, else a plain sentence that says what is outside. */
    public static String outside(
            Medium medium, double distanceMm, Double thicknessMm, boolean inTime, Convention.Form form) {
        String body = outside(medium, thicknessMm);
        if (body != null) return body;
        double lengths = distanceMm / medium.transportLengthMm();
        double least = form == Convention.Form.FLUX ? LEAST_DISTANCE_OF_FLUX : LEAST_DISTANCE;
        if (inTime) least = Math.max(least, LEAST_DISTANCE_IN_TIME);
        if (lengths < least)
            return String.format(
                    Locale.ROOT,
                    "The detector is %.2g transport lengths from the beam; diffusion holds from %.2g on.",
                    lengths,
                    least);
        double farthest = 0.25 / (1 - medium.reducedAlbedo()) / medium.muEffPerMm();
        if (distanceMm > farthest)
            return String.format(
                    Locale.ROOT,
                    "The detector is so far from the beam that the small error of diffusion's attenuation adds up to more than"
                            + " 10 %%; it holds up to %.3g mm.",
                    farthest);
        return null;
    }

    /** The same for totals over the whole surface. */
    public static String outside(Medium medium, Double thicknessMm) {
        if (medium.muspPerCm() == 0) return "The medium does not scatter; diffusion does not hold.";
        if (medium.muspPerCm() < LEAST_RATIO * medium.muaPerCm())
            return String.format(
                    Locale.ROOT,
                    "µs' is %.2g times µa; diffusion holds from %.2g times on.",
                    medium.muspPerCm() / medium.muaPerCm(),
                    LEAST_RATIO);
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
