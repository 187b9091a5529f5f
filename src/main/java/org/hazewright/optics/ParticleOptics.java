package org.hazewright.optics;

/**
 * What a population of particles does to light at one wavelength, per unit of its volume fraction.
 *
 * <p>{@code musPerCm}, {@code muspPerCm} and {@code muaPerCm} are in 1/cm for a volume fraction of 1; multiply by the volume
 * fraction in the phantom. The reduced scattering coefficient is carried on its own and not as µs(1 − g), since with crowding
 * it is the quantity that is integrated; {@link #g()} is 1 − µs'/µs.
 */
public record ParticleOptics(double musPerCm, double muspPerCm, double muaPerCm) {
    /** Mean cosine of the scattering angle, crowding included; 0 where nothing is scattered. */
    public double g() {
        return musPerCm > 0 ? 1 - muspPerCm / musPerCm : 0;
    }
}
