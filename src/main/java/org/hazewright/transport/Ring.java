package org.hazewright.transport;

import org.hazewright.optics.Refusal;

/** A ring of detection around the beam, radii in mm: 0 ≤ inner &lt; outer. Readings are averages over it. */
public record Ring(double innerMm, double outerMm) {
    public Ring {
        Refusal.notNegative("Inner radius in mm", innerMm);
        Refusal.positive("Outer radius in mm", outerMm);
        if (outerMm <= innerMm)
            throw new Refusal(
                    "A ring from " + innerMm + " to " + outerMm + " mm has no area; its outer radius must be larger.");
    }

    /** Around a distance, {@code halfWidthMm} to both sides; the inside stops at 0. */
    public static Ring around(double distanceMm, double halfWidthMm) {
        return new Ring(Math.max(0, distanceMm - halfWidthMm), distanceMm + halfWidthMm);
    }

    public double areaMm2() {
        return Math.PI * (outerMm - innerMm) * (outerMm + innerMm);
    }
}
