package org.hazewright.transport;

import java.util.Locale;

/**
 * Whether the mould's side walls are far enough from the light for the models, which know none.
 *
 * <p>Light that reaches a wall and comes back has gone about twice the wall's distance d; beside light that stayed near, it is
 * weaker by exp(−2 µeff d) and, at a detector at distance ρ, by the longer way. A wall counts as far when that is less than 1 %,
 * µeff (2 d − ρ) ≥ 4.6, or when without absorption d is at least 5 ρ and 30 transport lengths (common practice).
 */
public final class SideWalls {
    private SideWalls() {}

    /**
     * A plain sentence when walls matter, null when they do not.
     *
     * @param wallMm from the beam (or the middle between beam and detector) to the nearest wall, mm
     * @param distanceMm the farthest detector, 0 for none
     */
    public static String note(Medium medium, double wallMm, double distanceMm) {
        double length = 1 / medium.muEffPerMm();
        double decades = (2 * wallMm - distanceMm) / length;
        if (decades >= 4.6) return null;
        if (wallMm >= 5 * distanceMm && wallMm >= 30 * medium.transportLengthMm()) return null;
        double needed = Double.isInfinite(length)
                ? Math.max(5 * distanceMm, 30 * medium.transportLengthMm())
                : Math.min(
                        0.5 * (4.6 * length + distanceMm), Math.max(5 * distanceMm, 30 * medium.transportLengthMm()));
        return String.format(
                Locale.ROOT,
                "The nearest side wall is %.3g mm away, where light still reaches; the models know no side walls. Take a mould"
                        + " whose walls are at least %.3g mm from the beam.",
                wallMm,
                needed);
    }
}
