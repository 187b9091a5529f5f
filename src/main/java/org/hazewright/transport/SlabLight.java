package org.hazewright.transport;

import org.hazewright.optics.Refusal;

/**
 * Where the light of a narrow beam that meets a slab at right angles goes; shares of the power that meets the surface.
 *
 * <p>{@code specularReflectance} never enters. {@code unscatteredReflectance} entered, met the far face and came back out
 * without having been scattered; {@code unscatteredTransmittance} went through without having been scattered; both with all
 * internal reflections summed. {@code diffuse…} was scattered at least once. Semi-infinite medium: all transmittances are 0.
 */
public record SlabLight(
        double specularReflectance,
        double unscatteredReflectance,
        double diffuseReflectance,
        double unscatteredTransmittance,
        double diffuseTransmittance) {
    public SlabLight {
        Refusal.within("Specular reflectance", specularReflectance, 0, 1);
        Refusal.within("Unscattered reflectance", unscatteredReflectance, 0, 1);
        Refusal.within("Diffuse reflectance", diffuseReflectance, 0, 1);
        Refusal.within("Unscattered transmittance", unscatteredTransmittance, 0, 1);
        Refusal.within("Diffuse transmittance", diffuseTransmittance, 0, 1);
    }

    /** Everything that comes back. */
    public double totalReflectance() {
        return specularReflectance + unscatteredReflectance + diffuseReflectance;
    }

    /** Everything that comes through. */
    public double totalTransmittance() {
        return unscatteredTransmittance + diffuseTransmittance;
    }

    /** The rest, which stayed. */
    public double absorbed() {
        return 1 - totalReflectance() - totalTransmittance();
    }
}
