package org.hazewright.optics;

/**
 * An average over a size distribution, in the making: it asks for the cross sections of some diameters, is given them, and
 * asks again until its own error estimate is small enough.
 *
 * <p>Asking for many diameters at once lets {@link Mie#spheres} work on those of a whole spectrum together. Three averages
 * are formed over the same diameters: of C_sca, of C_sca(1 − g) and of C_abs, nm².
 */
abstract class SizeQuadrature {
    /** Relative error wanted of each average. */
    static final double WANTED = 1e-6;

    /** An average stops here even if its error is larger than wanted. */
    static final int MOST_SPHERES = 80_000;

    static final int FIGURES = 3;

    /** The rule for a distribution, for spheres of relative index m in a host where a diameter of 1 nm has size x. */
    static SizeQuadrature of(SizeDistribution sizes, double sizePerNm, double n, double k) {
        if (sizes instanceof SizeDistribution.LogNormal l) return new LogNormalQuadrature(l, sizePerNm, n, k);
        if (sizes instanceof SizeDistribution.Histogram h) return new HistogramQuadrature(h, sizePerNm);
        return new SingleQuadrature(((SizeDistribution.Single) sizes).diameterNm());
    }

    /** Diameters in nm whose cross sections are wanted next; none when settled. */
    abstract double[] wantedNm();

    /** Takes {C_sca, C_sca(1 − g), C_abs} of the diameters that were wanted last. */
    abstract void accept(double[][] figures);

    /** The three averages by number, nm². */
    abstract double[] averages();

    /** Estimated relative error of the worst of the three averages. */
    abstract double relativeError();

    /** Diameters in nm of the rule that gave the averages. */
    abstract double[] diametersNm();

    /** Their weights by number: Σ weight · C is the average. */
    abstract double[] weights();

    /** Largest of |difference|/average over the three figures; a figure that is 0 throughout has no error. */
    static double worst(double[] difference, double[] average) {
        double worst = 0;
        for (int i = 0; i < FIGURES; i++)
            if (average[i] != 0) worst = Math.max(worst, Math.abs(difference[i] / average[i]));
        return worst;
    }

    /** One size: nothing to average. */
    private static final class SingleQuadrature extends SizeQuadrature {
        private final double[] diameterNm;
        private double[] figures;

        SingleQuadrature(double diameterNm) {
            this.diameterNm = new double[] {diameterNm};
        }

        @Override
        double[] wantedNm() {
            return figures == null ? diameterNm : new double[0];
        }

        @Override
        void accept(double[][] given) {
            figures = new double[] {given[0][0], given[1][0], given[2][0]};
        }

        @Override
        double[] averages() {
            return figures;
        }

        @Override
        double relativeError() {
            return 0;
        }

        @Override
        double[] diametersNm() {
            return diameterNm;
        }

        @Override
        double[] weights() {
            return new double[] {1};
        }
    }
}
