package org.hazewright.mixture;

import java.util.List;
import org.hazewright.shelf.Ingredient;

/**
 * What a phantom does to light at one wavelength (nm): coefficients in 1/cm, g without unit, and who adds what.
 *
 * @param muaPerCm absorption, base e
 * @param musPerCm scattering
 * @param muspPerCm reduced scattering, crowding included
 * @param hostIndex of what surrounds the particles
 * @param boundaryIndex of the phantom as a whole, particles included: what a surface sees
 * @param shares one an ingredient, in the order of the mixture; they sum to the coefficients
 */
public record Coefficients(
        double wavelengthNm,
        double muaPerCm,
        double musPerCm,
        double muspPerCm,
        double hostIndex,
        double boundaryIndex,
        List<Share> shares) {

    /** One ingredient's part of the coefficients, 1/cm. */
    public record Share(Ingredient ingredient, double muaPerCm, double musPerCm, double muspPerCm) {}

    public Coefficients {
        shares = List.copyOf(shares);
    }

    /** Mean cosine of the scattering angle, 1 − µs'/µs; 0 where nothing is scattered. */
    public double g() {
        return musPerCm > 0 ? 1 - muspPerCm / musPerCm : 0;
    }
}
