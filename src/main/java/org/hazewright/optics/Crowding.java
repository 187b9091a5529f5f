package org.hazewright.optics;

import java.util.Arrays;

/**
 * How particles that stand close together scatter less than the same particles far apart.
 *
 * <p>φ is the particles' volume fraction in the phantom. Absorption is not affected. A φ above a model's range is refused
 * with a message that names the limit.
 */
public sealed interface Crowding {

    /** Each particle by itself: right when dilute (below about 1 % by volume). */
    record None() implements Crowding {}

    /**
     * Hard spheres, 0 ≤ φ ≤ 0.45: µs' = N ∫ (dC/dΩ) S(q)(1 − cos θ) dΩ with {@link HardSpheres}, each size with the S(q) of its
     * own diameter at the whole volume fraction (local monodisperse approximation, Pedersen, J. Appl. Cryst. 27, 595, 1994);
     * Fraden &amp; Maret, Phys. Rev. Lett. 65, 512, 1990.
     */
    record PercusYevick() implements Crowding {}

    /**
     * A measured correction: µs' times 1 + a₁φ + a₂φ² + …, 0 ≤ φ ≤ {@code maxVolumeFraction}. The measurement is of µs', so
     * µs is given the same factor and g stays that of single particles.
     */
    final class Polynomial implements Crowding {
        private final double[] coefficients;
        private final double maxVolumeFraction;

        /** {@code coefficients} a₁, a₂, …, without the leading 1. */
        public Polynomial(double[] coefficients, double maxVolumeFraction) {
            for (double a : coefficients)
                if (!Double.isFinite(a))
                    throw new Refusal("A coefficient of the crowding polynomial is " + a + "; it must be finite.");
            if (!(maxVolumeFraction > 0 && maxVolumeFraction <= 1))
                throw new Refusal("The largest volume fraction of the crowding polynomial is " + maxVolumeFraction
                        + "; it must lie above 0 and at most 1.");
            this.coefficients = coefficients.clone();
            this.maxVolumeFraction = maxVolumeFraction;
            for (int i = 0; i <= 100; i++)
                if (!(valueAt(maxVolumeFraction * i / 100) > 0))
                    throw new Refusal("The crowding polynomial falls to " + valueAt(maxVolumeFraction * i / 100)
                            + " at the volume fraction " + maxVolumeFraction * i / 100
                            + "; it must stay above 0 up to its largest volume fraction.");
        }

        /** a₁, a₂, …, without unit, φ being a fraction and not a percentage. */
        public double[] coefficients() {
            return coefficients.clone();
        }

        /** The largest φ that was measured. */
        public double maxVolumeFraction() {
            return maxVolumeFraction;
        }

        /** The factor on µs' at φ, above 0; a φ below 0 or above the largest is a {@link Refusal} that names the limit. */
        public double factor(double volumeFraction) {
            Refusal.notNegative("Volume fraction of particles", volumeFraction);
            if (volumeFraction > maxVolumeFraction)
                throw new Refusal("Volume fraction of particles is " + volumeFraction + ", above " + maxVolumeFraction
                        + ", the largest that the measured crowding correction covers. Perhaps dilute it, or choose another"
                        + " model of crowding.");
            return valueAt(volumeFraction);
        }

        private double valueAt(double phi) {
            double sum = 0;
            for (int i = coefficients.length - 1; i >= 0; i--) sum = (sum + coefficients[i]) * phi;
            return 1 + sum;
        }

        @Override
        public boolean equals(Object other) {
            return other instanceof Polynomial p
                    && maxVolumeFraction == p.maxVolumeFraction
                    && Arrays.equals(coefficients, p.coefficients);
        }

        @Override
        public int hashCode() {
            return 31 * Arrays.hashCode(coefficients) + Double.hashCode(maxVolumeFraction);
        }

        @Override
        public String toString() {
            return "Polynomial" + Arrays.toString(coefficients) + " up to " + maxVolumeFraction;
        }
    }
}
