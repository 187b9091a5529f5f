package org.hazewright.optics;

import java.util.Arrays;

/**
 * How the diameters (nm) of a population of spheres are distributed by number.
 *
 * <p>Equal distributions are equal values, so a population's figures can be cached by it.
 */
public sealed interface SizeDistribution {

    /** Mean cube of the diameter, nm³: what turns a number density into a volume fraction. */
    double meanCubedDiameterNm3();

    /** All particles of one diameter in nm. */
    record Single(double diameterNm) implements SizeDistribution {
        public Single {
            Refusal.positive("Diameter in nm", diameterNm);
        }

        @Override
        public double meanCubedDiameterNm3() {
            return diameterNm * diameterNm * diameterNm;
        }
    }

    /**
     * Log-normal by number: the logarithm of the diameter is normal with mean ln(median) and standard deviation ln(GSD).
     *
     * <p>Geometric standard deviation above 1 (1 would be {@link Single}) and at most 4. ⟨D³⟩ = median³ exp(4.5 ln²GSD)
     * (Hatch &amp; Choate, J. Franklin Inst. 207, 369, 1929).
     */
    record LogNormal(double numberMedianDiameterNm, double geometricStandardDeviation) implements SizeDistribution {
        public LogNormal {
            Refusal.positive("Number median diameter in nm", numberMedianDiameterNm);
            if (!(geometricStandardDeviation > 1 && geometricStandardDeviation <= 4))
                throw new Refusal("Geometric standard deviation is " + geometricStandardDeviation
                        + "; it must lie above 1 and at most 4. For particles of one size use a single diameter.");
        }

        @Override
        public double meanCubedDiameterNm3() {
            double s = Math.log(geometricStandardDeviation);
            return Math.pow(numberMedianDiameterNm, 3) * Math.exp(4.5 * s * s);
        }
    }

    /**
     * A sizing table: bins between ascending edges (nm), with any non-negative weights by number; within a bin the diameters
     * are spread evenly.
     */
    final class Histogram implements SizeDistribution {
        private final double[] edgesNm;
        private final double[] weights;

        /** {@code edgesNm} has one value more than {@code weights}. Weights are normalised to a sum of 1. */
        public Histogram(double[] edgesNm, double[] weights) {
            if (weights.length < 1 || edgesNm.length != weights.length + 1)
                throw new Refusal("A histogram of sizes has " + edgesNm.length + " edges and " + weights.length
                        + " weights; it needs at least one bin, and one edge more than weights.");
            double sum = 0;
            for (double w : weights) sum += Refusal.notNegative("Weight of a size bin", w);
            if (!(sum > 0)) throw new Refusal("All weights of the size bins are 0; at least one must be above 0.");
            for (int i = 0; i < edgesNm.length; i++) {
                Refusal.notNegative("Edge of a size bin in nm", edgesNm[i]);
                if (i > 0 && edgesNm[i] <= edgesNm[i - 1])
                    throw new Refusal("Edges of size bins go from " + edgesNm[i - 1] + " to " + edgesNm[i]
                            + " nm; they must ascend.");
            }
            this.edgesNm = edgesNm.clone();
            this.weights = weights.clone();
            for (int i = 0; i < weights.length; i++) this.weights[i] /= sum;
        }

        /** Edges in nm, ascending, one more than there are bins. */
        public double[] edgesNm() {
            return edgesNm.clone();
        }

        /** Share of the particles in each bin, by number; they sum to 1. */
        public double[] weights() {
            return weights.clone();
        }

        @Override
        public double meanCubedDiameterNm3() {
            double mean = 0;
            for (int i = 0; i < weights.length; i++) {
                double a = edgesNm[i];
                double b = edgesNm[i + 1];
                mean += weights[i] * (a + b) * (a * a + b * b) / 4; // ∫D³dD/(b − a) = (b⁴ − a⁴)/4(b − a)
            }
            return mean;
        }

        @Override
        public boolean equals(Object other) {
            return other instanceof Histogram h
                    && Arrays.equals(edgesNm, h.edgesNm)
                    && Arrays.equals(weights, h.weights);
        }

        @Override
        public int hashCode() {
            return 31 * Arrays.hashCode(edgesNm) + Arrays.hashCode(weights);
        }

        @Override
        public String toString() {
            return "Histogram" + Arrays.toString(edgesNm) + Arrays.toString(weights);
        }
    }
}
