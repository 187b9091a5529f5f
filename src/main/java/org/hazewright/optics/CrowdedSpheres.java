package org.hazewright.optics;

/**
 * The angular pattern of a whole population, kept so that its scattering at any volume fraction is one short sum.
 *
 * <p>µs = Σ w S(v), µs' = Σ w (1 − cos θ) S(v) over all directions of all sizes, v = q D = 4x sin(θ/2), x the size parameter of
 * the size. The three integrals of {@link HardSpheres#moments} at v do not depend on the volume fraction and are kept too.
 * Gauss–Legendre over cos θ: |S1|² + |S2|² of a sphere is a polynomial in cos θ whose degree is twice its number of partial
 * waves, and S needs another 3x or so nodes at the largest volume fraction allowed.
 */
final class CrowdedSpheres {
    /** Sizes that scatter less than this share of the whole are left out. */
    private static final double NEGLIGIBLE = 1e-10;

    private final double[] weight;
    private final double[] weightBack;
    private final double[] f0;
    private final double[] f1;
    private final double[] f3;

    /** Sizes and their weights by number; {@code perCm} turns a mean cross section in nm² into the coefficient. */
    CrowdedSpheres(
            double[] diametersNm,
            double[] weights,
            Index particle,
            double hostIndex,
            double wavelengthNm,
            double perCm) {
        int sizes = diametersNm.length;
        double waveNumber = 2 * Math.PI * hostIndex / wavelengthNm;
        MieSeries[] series = new MieSeries[sizes];
        double[] scattered = new double[sizes];
        double total = 0;
        for (int i = 0; i < sizes; i++) {
            series[i] =
                    MieSeries.of(waveNumber * diametersNm[i] / 2, particle.n() / hostIndex, particle.k() / hostIndex);
            scattered[i] = weights[i]
                    * diametersNm[i]
                    * diametersNm[i]
                    * series[i].efficiencies().qSca();
            total += scattered[i];
        }
        int count = 0;
        for (int i = 0; i < sizes; i++)
            if (scattered[i] >= NEGLIGIBLE * total) count += 2 * rule(series[i]).node().length;
            else series[i] = null;
        weight = new double[count];
        weightBack = new double[count];
        f0 = new double[count];
        f1 = new double[count];
        f3 = new double[count];
        double[] moments = new double[3];
        double[] pattern = new double[2];
        int place = 0;
        for (int i = 0; i < sizes; i++) {
            if (series[i] == null) continue;
            GaussLegendre rule = rule(series[i]);
            double x = series[i].x;
            double factor =
                    perCm * weights[i] * Math.PI / (waveNumber * waveNumber); // 2π/k² times half of |S1|² + |S2|²
            for (int j = 0; j < rule.node().length; j++) {
                double cos = rule.node()[j];
                series[i].patterns(cos, pattern);
                for (int side = 0; side < 2; side++) {
                    weight[place] = factor * rule.weight()[j] * pattern[side];
                    weightBack[place] = weight[place] * (1 - cos);
                    HardSpheres.moments(4 * x * Math.sqrt((1 - cos) / 2), moments);
                    f0[place] = moments[0];
                    f1[place] = moments[1];
                    f3[place] = moments[2];
                    place++;
                    cos = -cos;
                }
            }
        }
    }

    private static GaussLegendre rule(MieSeries series) {
        return GaussLegendre.ofAtLeast((int) (series.orders() + 3 * series.x + 16));
    }

    int directions() {
        return weight.length;
    }

    /** {µs, µs'} in 1/cm per unit volume fraction with these neighbours. */
    double[] scattered(HardSpheres spheres) {
        double mus = 0;
        double musp = 0;
        for (int i = 0; i < weight.length; i++) {
            double s = spheres.structureFactor(f0[i], f1[i], f3[i]);
            mus += weight[i] * s;
            musp += weightBack[i] * s;
        }
        return new double[] {mus, musp};
    }
}
