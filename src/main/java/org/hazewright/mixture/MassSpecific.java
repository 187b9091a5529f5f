package org.hazewright.mixture;

import org.hazewright.optics.Crowding;
import org.hazewright.optics.Index;
import org.hazewright.optics.ParticleOptics;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Absorption;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Scattering;

/**
 * What one gram of an ingredient per millilitre of phantom adds at one wavelength, in cm²/g.
 *
 * @param kappaA to µa
 * @param kappaMus to µs
 * @param kappaMusp to µs', crowding included
 */
public record MassSpecific(double kappaA, double kappaMus, double kappaMusp) {
    public static final MassSpecific NOTHING = new MassSpecific(0, 0, 0);

    /**
     * At a wavelength in nm and a temperature in °C, in a host of the given index, with the particles at a volume fraction in the
     * phantom (0 for the dilute limit).
     *
     * <p>A population of volume fraction φ = C f/ρ (C in g/mL, f the particles' share of the ingredient's volume, ρ its density)
     * adds φ times its coefficients per unit volume fraction, so κ = f/ρ times those. A {@link Refusal} names the ingredient or its table:
     * outside the range of a table or formula, and above the limit of a crowding model.
     */
    public static MassSpecific of(
            Ingredient i, double nm, double temperatureC, double hostIndex, double particleFraction) {
        double kappaA = 0;
        double kappaMus = 0;
        double kappaMusp = 0;
        if (i.absorption().isPresent()) {
            Absorption a = i.absorption().get();
            kappaA += a.kappaCm2PerG(nm);
            kappaMus += a.scatteredCm2PerG(nm);
            kappaMusp += a.scatteredCm2PerG(nm) * (1 - a.g());
        }
        if (i.scattering().isPresent()) {
            Scattering s = i.scattering().get();
            if (s instanceof Scattering.MieParticles mie) {
                Index particle = mie.particle().index().at(nm, temperatureC);
                Crowding crowding = particleFraction > 0 ? mie.crowding() : new Crowding.None();
                ParticleOptics p = crowded(i, mie, particle, hostIndex, nm, particleFraction, crowding);
                double mlPerG = mie.volumeFraction() / i.densityGPerMl();
                kappaA += mlPerG * p.muaPerCm() * mie.absorptionMagnitude();
                kappaMus += mlPerG * p.musPerCm() * mie.magnitude();
                kappaMusp += mlPerG * p.muspPerCm() * mie.magnitude();
            } else if (s instanceof Scattering.PowerLaw law) {
                kappaMusp += law.muspCm2PerG(nm);
                kappaMus += law.muspCm2PerG(nm) / (1 - law.g());
            } else if (s instanceof Scattering.Tabulated table) {
                kappaMusp += table.muspCm2PerG(nm);
                kappaMus += table.muspCm2PerG(nm) / (1 - table.gAt(nm));
            }
        }
        return new MassSpecific(kappaA, kappaMus, kappaMusp);
    }

    /** What is refused is refused with the ingredient's name: in a mixture of several it is not plain whose limit is meant. */
    private static ParticleOptics crowded(
            Ingredient i,
            Scattering.MieParticles mie,
            Index particle,
            double hostIndex,
            double nm,
            double particleFraction,
            Crowding crowding) {
        try {
            return mie.population().perVolumeFraction(particle, hostIndex, nm, particleFraction, crowding);
        } catch (Refusal refusal) {
            throw new Refusal(i.id() + ": " + refusal.getMessage(), refusal);
        }
    }

    /** Refuses a wavelength in nm that an ingredient's figures do not reach, naming the table and its range. */
    public static void requireFigures(Ingredient i, double nm, double temperatureC) {
        i.absorption().ifPresent(a -> a.table().at(nm));
        i.index().ifPresent(m -> m.index().at(nm, temperatureC));
        i.scattering().ifPresent(s -> {
            if (s instanceof Scattering.MieParticles mie) mie.particle().index().at(nm, temperatureC);
            else if (s instanceof Scattering.PowerLaw law) law.muspCm2PerG(nm);
            else if (s instanceof Scattering.Tabulated table) {
                table.muspCm2PerG(nm);
                table.gAt(nm);
            }
        });
    }

    /** Share of an ingredient's volume that is Mie particles; 0 without. */
    public static double particleShare(Ingredient i) {
        return i.scattering()
                .map(s -> s instanceof Scattering.MieParticles m ? m.volumeFraction() : 0.0)
                .orElse(0.0);
    }
}
