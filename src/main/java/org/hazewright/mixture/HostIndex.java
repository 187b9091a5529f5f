package org.hazewright.mixture;

import java.util.Arrays;
import java.util.Map;
import org.hazewright.optics.Index;
import org.hazewright.optics.LorentzLorenz;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Scattering;

/**
 * The index that surrounds the particles, and the one that a surface sees: volume-weighted Lorentz–Lorenz over the parts that
 * have an index of their own.
 *
 * <p>(n² − 1)/(n² + 2) = Σ φ_i (n_i² − 1)/(n_i² + 2), volumes φ_i normalised over those parts. An ingredient without an index
 * takes no part. Particles are outside the host and inside the boundary. Absorption indices k take no part in either.
 *
 * <p>Lorentz 1880 and Lorenz 1880, see {@link LorentzLorenz}. Wavelengths in nm, temperature in °C, volumes in mL; a mixture in which
 * nothing has an index is a {@link Refusal}, and so is a wavelength that an index does not reach.
 */
final class HostIndex {
    private HostIndex() {}

    static double host(Map<Ingredient, Double> volumesMl, double nm, double temperatureC) {
        return mix(volumesMl, nm, temperatureC, false);
    }

    static double boundary(Map<Ingredient, Double> volumesMl, double nm, double temperatureC) {
        return mix(volumesMl, nm, temperatureC, true);
    }

    private static double mix(
            Map<Ingredient, Double> volumesMl, double nm, double temperatureC, boolean withParticles) {
        double[] volume = new double[2 * volumesMl.size()];
        double[] n = new double[volume.length];
        int used = 0;
        for (var entry : volumesMl.entrySet()) {
            Ingredient i = entry.getKey();
            double particles = MassSpecific.particleShare(i);
            if (i.index().isPresent() && particles < 1) {
                volume[used] = entry.getValue() * (1 - particles);
                n[used++] = i.index().get().index().at(nm, temperatureC).n();
            }
            if (withParticles && i.scattering().orElse(null) instanceof Scattering.MieParticles mie) {
                Index particle = mie.particle().index().at(nm, temperatureC);
                volume[used] = entry.getValue() * particles;
                n[used++] = particle.n();
            }
        }
        double total = 0;
        for (int k = 0; k < used; k++) total += volume[k];
        if (!(total > 0))
            throw new Refusal("Nothing in this mixture has a refractive index, so the host index is not"
                    + " known; give the base an index = \"<material>\" in its ingredient file.");
        double[] fraction = new double[used];
        for (int k = 0; k < used; k++) fraction[k] = volume[k] / total;
        return LorentzLorenz.mix(fraction, Arrays.copyOf(n, used));
    }
}
