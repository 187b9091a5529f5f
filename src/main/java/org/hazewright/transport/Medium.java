package org.hazewright.transport;

import org.hazewright.optics.Refusal;

/**
 * A homogeneous medium as light meets it: absorption, reduced scattering, mean cosine and refractive index.
 *
 * <p>µa and µs' in 1/cm, 0 or above and at most 1e6; g in [−0.99, 0.99]; n in [1, 4]. µs = µs'/(1 − g), µt = µa + µs.
 */
public record Medium(double muaPerCm, double muspPerCm, double g, double n) {
    /** Speed of light in vacuum, mm/ps (exact by the definition of the metre). */
    public static final double LIGHT_MM_PER_PS = 0.299792458;

    public Medium {
        Refusal.within("Absorption coefficient in 1/cm", muaPerCm, 0, 1e6);
        Refusal.within("Reduced scattering coefficient in 1/cm", muspPerCm, 0, 1e6);
        Refusal.within("Mean cosine g", g, -0.99, 0.99);
        Refusal.within("Refractive index", n, 1, 4);
    }

    public double musPerCm() {
        return muspPerCm / (1 - g);
    }

    /** Extinction coefficient µa + µs. */
    public double mutPerCm() {
        return muaPerCm + musPerCm();
    }

    public double muaPerMm() {
        return muaPerCm / 10;
    }

    public double muspPerMm() {
        return muspPerCm / 10;
    }

    public double musPerMm() {
        return musPerCm() / 10;
    }

    public double mutPerMm() {
        return mutPerCm() / 10;
    }

    /** Single-scattering albedo µs/µt; 0 for a medium that does nothing to light. */
    public double albedo() {
        return mutPerCm() == 0 ? 0 : musPerCm() / mutPerCm();
    }

    /** Reduced albedo a' = µs'/(µa + µs'); 0 for a medium that does nothing to light. */
    public double reducedAlbedo() {
        return muspPerCm == 0 ? 0 : muspPerCm / (muaPerCm + muspPerCm);
    }

    /** Transport mean free path 1/(µa + µs') in mm; infinite for a medium that does nothing to light. */
    public double transportLengthMm() {
        return 10 / (muaPerCm + muspPerCm);
    }

    /** Effective attenuation µeff = √(3 µa (µa + µs')) in 1/mm, with D = 1/(3(µa + µs')). */
    public double muEffPerMm() {
        return Math.sqrt(3 * muaPerMm() * (muaPerMm() + muspPerMm()));
    }

    /** Speed of light in the medium, mm/ps. */
    public double speedMmPerPs() {
        return LIGHT_MM_PER_PS / n;
    }

    public Medium withMua(double perCm) {
        return new Medium(perCm, muspPerCm, g, n);
    }

    public Medium withMusp(double perCm) {
        return new Medium(muaPerCm, perCm, g, n);
    }
}
