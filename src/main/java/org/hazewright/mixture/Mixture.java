package org.hazewright.mixture;

import java.util.ArrayList;
import java.util.Collections;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import org.hazewright.optics.Crowding;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Scattering;

/**
 * What was put together, in g of each ingredient, and what it does to light.
 *
 * <p>Volumes add: V = Σ m_i/ρ_i in mL. C_i = m_i/V in g/mL. µa(λ) = Σ C_i κ_a,i(λ) and µs'(λ) = Σ C_i κ_s,i(λ)·packing_i(λ, φ),
 * 1/cm. Particles with Percus–Yevick crowding feel the volume fraction of all such particles together; a measured polynomial
 * that of its own ingredient. Blends must be resolved into their parts first.
 */
public final class Mixture {
    private final Map<Ingredient, Double> massesG;
    private final Map<Ingredient, Double> volumesMl;
    private final double temperatureC;
    private final double volumeMl;

    /** Grams of each ingredient, 0 or above, and the temperature in °C, 0 to 100, at which it is used; at least one mass above 0. */
    public Mixture(Map<Ingredient, Double> massesG, double temperatureC) {
        Map<Ingredient, Double> masses = new LinkedHashMap<>();
        Map<Ingredient, Double> volumes = new LinkedHashMap<>();
        double volume = 0;
        for (var entry : massesG.entrySet()) {
            Ingredient i = entry.getKey();
            if (i.isBlend()) throw new Refusal("The blend " + i.id() + " must be weighed as its parts.");
            double m = Refusal.notNegative("Grams of " + i.id(), entry.getValue());
            masses.put(i, m);
            volumes.put(i, m / i.densityGPerMl());
            volume += m / i.densityGPerMl();
        }
        if (!(volume > 0)) throw new Refusal("Nothing was put together: all masses are 0 g.");
        this.massesG = Collections.unmodifiableMap(masses);
        this.volumesMl = volumes;
        this.volumeMl = volume;
        this.temperatureC = Refusal.within("Temperature in °C", temperatureC, 0, 100);
    }

    /** What a recipe puts into the vessel, stocks resolved. */
    public static Mixture of(Recipe recipe) {
        return new Mixture(recipe.massesG(), recipe.temperatureC());
    }

    /** Grams of each ingredient, in the order given. */
    public Map<Ingredient, Double> massesG() {
        return massesG;
    }

    /** °C. */
    public double temperatureC() {
        return temperatureC;
    }

    /** Σ m_i/ρ_i in mL. */
    public double volumeMl() {
        return volumeMl;
    }

    /** Grams in all. */
    public double massG() {
        return massesG.values().stream().mapToDouble(Double::doubleValue).sum();
    }

    /** Grams over volume, g/mL. */
    public double densityGPerMl() {
        return massG() / volumeMl;
    }

    /** C_i in g/mL; 0 for what is not in it. */
    public double concentrationGPerMl(Ingredient i) {
        return massesG.getOrDefault(i, 0.0) / volumeMl;
    }

    /** Index of what surrounds the particles at a wavelength in nm: Lorentz–Lorenz over the volumes, particles left out. */
    public double hostIndex(double nm) {
        return HostIndex.host(volumesMl, nm, temperatureC);
    }

    /** The volume fraction that an ingredient's particles feel, by its own crowding model; 0 for none. */
    public double crowdFraction(Ingredient i) {
        if (!(i.scattering().orElse(null) instanceof Scattering.MieParticles own)) return 0;
        if (own.crowding() instanceof Crowding.None) return 0;
        if (own.crowding() instanceof Crowding.Polynomial) return particleFraction(i);
        double all = 0;
        for (Ingredient other : massesG.keySet())
            if (other.scattering().orElse(null) instanceof Scattering.MieParticles m
                    && m.crowding() instanceof Crowding.PercusYevick) all += particleFraction(other);
        return all;
    }

    private double particleFraction(Ingredient i) {
        return volumesMl.get(i) / volumeMl * MassSpecific.particleShare(i);
    }

    /** Refuses a wavelength in nm that some ingredient's figures do not reach. */
    public void requireFigures(double nm) {
        for (Ingredient i : massesG.keySet()) MassSpecific.requireFigures(i, nm, temperatureC);
    }

    /** The coefficients at a wavelength in nm; a {@link Refusal} names the ingredient whose figures do not reach there. */
    public Coefficients at(double nm) {
        double host = hostIndex(nm);
        List<Coefficients.Share> shares = new ArrayList<>(massesG.size());
        double mua = 0;
        double mus = 0;
        double musp = 0;
        for (Ingredient i : massesG.keySet()) {
            double c = concentrationGPerMl(i);
            MassSpecific k =
                    c == 0 ? MassSpecific.NOTHING : MassSpecific.of(i, nm, temperatureC, host, crowdFraction(i));
            shares.add(new Coefficients.Share(i, c * k.kappaA(), c * k.kappaMus(), c * k.kappaMusp()));
            mua += c * k.kappaA();
            mus += c * k.kappaMus();
            musp += c * k.kappaMusp();
        }
        return new Coefficients(nm, mua, mus, musp, host, HostIndex.boundary(volumesMl, nm, temperatureC), shares);
    }
}
