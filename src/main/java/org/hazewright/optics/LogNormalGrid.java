package org.hazewright.optics;

/**
 * Diameters evenly spaced in t = ln(D/median), from far below to far above what scatters in a log-normal distribution, with their
 * weights by number: Σ weight · C(D) is the average of C.
 *
 * <p>It does not depend on the wavelength, so a spectrum shares it. Spacing σ/{@code perSigma}, σ = ln GSD; place 2i of a grid
 * twice as fine is place i of this one.
 */
final class LogNormalGrid {
    private record Key(SizeDistribution.LogNormal sizes, double perSigma) {}

    private static final BoundedCache<Key, LogNormalGrid> KNOWN =
            new BoundedCache<>(500_000, grid -> 40 + 2L * grid.diameterNm.length);

    /** In units of σ beyond where D² φ(t) and D⁶ φ(t) are largest; there they have fallen by 1e-8. */
    private static final double REACH = 6;

    private final double perSigma;
    private final double step;
    private final double[] diameterNm;
    private final double[] weight;

    private LogNormalGrid(Key key) {
        double sigma = Math.log(key.sizes.geometricStandardDeviation());
        perSigma = key.perSigma;
        step = sigma / perSigma;
        double from = sigma * sigma - REACH * sigma;
        double to = 6 * sigma * sigma + REACH * sigma;
        int count = (int) Math.ceil((to - from) / step) + 1;
        diameterNm = new double[count];
        weight = new double[count];
        double median = key.sizes.numberMedianDiameterNm();
        for (int i = 0; i < count; i++) {
            double t = from + i * step;
            diameterNm[i] = median * Math.exp(t);
            weight[i] = step / (sigma * Math.sqrt(2 * Math.PI)) * Math.exp(-t * t / (2 * sigma * sigma));
        }
    }

    static LogNormalGrid of(SizeDistribution.LogNormal sizes, double perSigma) {
        Key key = new Key(sizes, perSigma);
        LogNormalGrid known = KNOWN.get(key);
        if (known != null) return known;
        LogNormalGrid made = new LogNormalGrid(key);
        KNOWN.put(key, made);
        return made;
    }

    double perSigma() {
        return perSigma;
    }

    double step() {
        return step;
    }

    int count() {
        return diameterNm.length;
    }

    double diameterNm(int place) {
        return diameterNm[place];
    }

    double weight(int place) {
        return weight[place];
    }
}
