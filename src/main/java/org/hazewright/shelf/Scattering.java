package org.hazewright.shelf;

import java.util.Optional;
import org.hazewright.optics.Crowding;
import org.hazewright.optics.Population;
import org.hazewright.optics.Refusal;
import org.hazewright.optics.SizeDistribution;
import org.hazewright.optics.Spectrum;

/** How an ingredient scatters: by Mie from its particles, by a power law, or by a table. */
public sealed interface Scattering {

    /** Wavelengths in nm at which the model can be asked. */
    double fromNm();

    double toNm();

    /** Measured magnitude over the Mie magnitude; 1 unless a lot was measured. Multiplies µs and µs' alike. */
    double magnitude();

    /** The same model, its magnitude multiplied. */
    Scattering scaled(double factor);

    /**
     * Spheres of a material, by Mie theory.
     *
     * <p>{@code volumeFraction} is the particles' share of the ingredient's volume as bought, in (0, 1]; {@code absorptionMagnitude}
     * is measured absorption over what their own index gives by Mie, 1 unless a lot was measured.
     */
    record MieParticles(
            Material particle,
            double volumeFraction,
            SizeDistribution sizes,
            Crowding crowding,
            double magnitude,
            double absorptionMagnitude)
            implements Scattering {
        public MieParticles {
            if (!(volumeFraction > 0 && volumeFraction <= 1))
                throw new Refusal(
                        "Particle volume fraction is " + volumeFraction + "; it must lie above 0 and at most 1.");
            Refusal.positive("Magnitude of scattering", magnitude);
            Refusal.positive("Magnitude of absorption", absorptionMagnitude);
        }

        /** With the absorption that Mie gives. */
        public MieParticles(
                Material particle, double volumeFraction, SizeDistribution sizes, Crowding crowding, double magnitude) {
            this(particle, volumeFraction, sizes, crowding, magnitude, 1);
        }

        public Population population() {
            return new Population(sizes);
        }

        @Override
        public double fromNm() {
            return particle.index().fromNm();
        }

        @Override
        public double toNm() {
            return particle.index().toNm();
        }

        @Override
        public Scattering scaled(double factor) {
            return new MieParticles(particle, volumeFraction, sizes, crowding, magnitude * factor, absorptionMagnitude);
        }

        /** The same particles, their own absorption multiplied. */
        public MieParticles absorbing(double factor) {
            return new MieParticles(particle, volumeFraction, sizes, crowding, magnitude, absorptionMagnitude * factor);
        }
    }

    /** µs' = musp · (λ/at)^−exponent, cm²/g; valid in the stated range, 400 to 1100 nm unless the file narrows it. */
    record PowerLaw(
            double muspCm2PerG, double atNm, double exponent, double g, double fromNm, double toNm, double magnitude)
            implements Scattering {
        public PowerLaw {
            Refusal.positive("µs' of a power law in cm²/g", muspCm2PerG);
            Refusal.positive("Reference wavelength of a power law in nm", atNm);
            Refusal.within("Exponent of a power law", exponent, -6, 6);
            if (!(g >= -1 && g < 1))
                throw new Refusal("Mean cosine g is " + g + "; it must lie between -1 and below 1.");
            Refusal.positive("Magnitude of scattering", magnitude);
        }

        public double muspCm2PerG(double nm) {
            if (nm < fromNm || nm > toNm)
                throw new Refusal("The scattering power law has no value at " + nm + " nm: it holds from " + fromNm
                        + " to " + toNm + " nm, and nothing is extrapolated.");
            return magnitude * muspCm2PerG * Math.pow(nm / atNm, -exponent);
        }

        @Override
        public Scattering scaled(double factor) {
            return new PowerLaw(muspCm2PerG, atNm, exponent, g, fromNm, toNm, magnitude * factor);
        }
    }

    /** Tables of µs' (1/cm of the neat ingredient, or cm²/g) and, where known, g. */
    record Tabulated(Spectrum musp, double perTableUnit, Optional<Spectrum> g, double magnitude) implements Scattering {
        public Tabulated {
            Refusal.positive("Scale of a scattering table", perTableUnit);
            Refusal.positive("Magnitude of scattering", magnitude);
            for (double v : musp.values())
                if (v < 0) throw new Refusal(musp.name() + " holds the negative µs' " + v + "; it must be 0 or above.");
            g.ifPresent(spectrum -> {
                for (double v : spectrum.values())
                    if (!(v >= -1 && v < 1))
                        throw new Refusal(
                                spectrum.name() + " holds g = " + v + "; it must lie between -1 and below 1.");
            });
        }

        public double muspCm2PerG(double nm) {
            return magnitude * musp.at(nm) * perTableUnit;
        }

        public double gAt(double nm) {
            return g.map(spectrum -> spectrum.at(nm)).orElse(0.0);
        }

        @Override
        public double fromNm() {
            return musp.fromNm();
        }

        @Override
        public double toNm() {
            return musp.toNm();
        }

        @Override
        public Scattering scaled(double factor) {
            return new Tabulated(musp, perTableUnit, g, magnitude * factor);
        }
    }
}
