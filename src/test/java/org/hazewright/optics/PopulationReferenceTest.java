package org.hazewright.optics;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

/**
 * Populations and crowding against figures computed once from the published formulas in 40-digit arithmetic, by two codes that are
 * not this program (Bohren & Huffman 1983 for the spheres; Wertheim, Phys. Rev. Lett. 10, 321, 1963 for S(q)).
 */
class PopulationReferenceTest {
    /** Water by the Cauchy form of Michels, Foschum & Kienle, Opt. Express 16, 5907 (2008). */
    private static double water(double nm) {
        return 1.311 + 1.154e4 / (nm * nm) - 1.132e9 / Math.pow(nm, 4);
    }

    private static final double POLYSTYRENE_633 = 1.587513379555;
    private static final double SILICA_633 = 1.457012124641;

    /** Per unit volume fraction at 633 nm, independent scattering: µs and µs' in 1/mm. 1e-6 is what the quadrature promises. */
    @ParameterizedTest
    @CsvSource({
        "polystyrene, 1.587513379555, 1.332749701871, 1000, 0, 3783.6150421, 0.91840702209, 308.71641855",
        "oil, 1.472749701871, 1.332749701871, 200, 1.5, 411.10795319, 0.72520460500, 112.97057238",
        "silica, 1.457012124641, 1.332749701871, 500, 1.1, 531.23572627, 0.83199516797, 89.250168960",
        "rutile, 2.679638223239, 1.41, 200, 1.4, 18398.973937, 0.50885112140, 9036.6354164",
    })
    void perVolumeFraction(
            String what, double n, double host, double medianNm, double gsd, double mus, double g, double musp) {
        SizeDistribution sizes =
                gsd == 0 ? new SizeDistribution.Single(medianNm) : new SizeDistribution.LogNormal(medianNm, gsd);
        ParticleOptics p = new Population(sizes).perVolumeFraction(Index.real(n), host, 633);
        assertEquals(10 * mus, p.musPerCm(), 1e-6 * 10 * mus, what + " µs");
        assertEquals(10 * musp, p.muspPerCm(), 1e-6 * 10 * musp, what + " µs'");
        assertEquals(g, p.g(), 2e-6, what + " g");
    }

    @ParameterizedTest
    @CsvSource({
        "0.2, 1e-6, 0.208979591836735",
        "0.1, 2.5, 0.61661483490495",
        "0.25, 6, 1.3429502129232",
        "0.4, 7.1, 1.7315128701361",
    })
    void structureFactor(double phi, double qd, double s) {
        assertEquals(s, new HardSpheres(phi).structureFactor(qd), 1e-10 * s);
    }

    /** µs' and µs with crowding over without, in water. */
    @ParameterizedTest
    @CsvSource({
        "polystyrene, 300, 633, 0.1, 0.88141705851, 0.71047583808",
        "silica, 100, 633, 0.2, 0.29570831217, 0.26689882212",
    })
    void crowdedOverAlone(String what, double diameterNm, double nm, double phi, double muspRatio, double musRatio) {
        Index particle = Index.real(what.equals("silica") ? SILICA_633 : POLYSTYRENE_633);
        Population population = new Population(new SizeDistribution.Single(diameterNm));
        ParticleOptics alone = population.perVolumeFraction(particle, water(nm), nm);
        ParticleOptics crowded =
                population.perVolumeFraction(particle, water(nm), nm, phi, new Crowding.PercusYevick());
        assertEquals(muspRatio, crowded.muspPerCm() / alone.muspPerCm(), 1e-6);
        assertEquals(musRatio, crowded.musPerCm() / alone.musPerCm(), 1e-6);
        assertEquals(alone.muaPerCm(), crowded.muaPerCm(), 0, "absorption is not crowded");
    }

    /**
     * Spheres far smaller than the wavelength: every direction sees S(0), so µs and µs' lose the same factor (1 − φ)⁴/(1 + 2φ)², the packing
     * factor of Twersky, J. Opt. Soc. Am. 65, 524 (1975), for spheres. At q d ≤ 0.04 the next term of S, of order (q d)², is below 1e-3.
     */
    @ParameterizedTest
    @ValueSource(doubles = {0.01, 0.1, 0.25, 0.45})
    void smallSpheresLoseThePackingFactor(double phi) {
        Population tiny = new Population(new SizeDistribution.Single(4));
        ParticleOptics alone = tiny.perVolumeFraction(Index.real(1.47), 1.33, 800);
        ParticleOptics crowded = tiny.perVolumeFraction(Index.real(1.47), 1.33, 800, phi, new Crowding.PercusYevick());
        double packing = Math.pow(1 - phi, 4) / Math.pow(1 + 2 * phi, 2);
        assertEquals(packing, crowded.muspPerCm() / alone.muspPerCm(), 1e-3 * packing);
        assertEquals(packing, crowded.musPerCm() / alone.musPerCm(), 1e-3 * packing);
    }

    /** A suspension of two sizes: each sees S of its own diameter at the whole volume fraction (Pedersen 1994), so its terms add. */
    @Test
    void eachSizeSeesItsOwnNeighbours() {
        double phi = 0.2;
        SizeDistribution both =
                new SizeDistribution.Histogram(new double[] {199.9, 200.1, 399.9, 400.1}, new double[] {2, 0, 1});
        double expected = 0;
        double volumes = 2 * Math.pow(200, 3) + Math.pow(400, 3);
        for (double d : new double[] {200, 400})
            expected += (d == 200 ? 2 : 1)
                    * Math.pow(d, 3)
                    / volumes
                    * new Population(new SizeDistribution.Single(d))
                            .perVolumeFraction(
                                    Index.real(POLYSTYRENE_633), water(633), 633, phi, new Crowding.PercusYevick())
                            .muspPerCm();
        double found = new Population(both)
                .perVolumeFraction(Index.real(POLYSTYRENE_633), water(633), 633, phi, new Crowding.PercusYevick())
                .muspPerCm();
        assertEquals(expected, found, 1e-5 * expected, "bins of 0.2 nm are as good as one size");
    }

    /** What the host takes from the contrast, the particles lose: µs' in the Rayleigh–Gans limit goes with (n_p − n_h)². */
    @Test
    void indexMatchingLowersScattering() {
        Population small = new Population(new SizeDistribution.Single(60));
        double water = small.perVolumeFraction(Index.real(1.47), 1.333, 800).muspPerCm();
        double sugar = small.perVolumeFraction(Index.real(1.47), 1.42, 800).muspPerCm();
        // Rayleigh: ((m² − 1)/(m² + 2))² n_h⁴, Bohren & Huffman 1983, eq. 5.8
        double expected = rayleigh(1.47, 1.42) / rayleigh(1.47, 1.333);
        assertEquals(expected, sugar / water, 0.02 * expected);
        assertEquals(0, small.perVolumeFraction(Index.real(1.47), 1.47, 800).muspPerCm(), 1e-12 * water);
    }

    private static double rayleigh(double particle, double host) {
        double m2 = particle * particle / (host * host);
        double contrast = (m2 - 1) / (m2 + 2);
        return contrast * contrast * Math.pow(host, 4);
    }

    @Test
    void beyondTheModelIsNamed() {
        Population population = new Population(new SizeDistribution.Single(300));
        Refusal refusal = assertThrows(
                Refusal.class,
                () -> population.perVolumeFraction(Index.real(1.58), 1.33, 633, 0.5, new Crowding.PercusYevick()));
        assertTrue(refusal.getMessage().contains("above 0.45, the limit of the Percus–Yevick"), refusal.getMessage());
        population.perVolumeFraction(Index.real(1.58), 1.33, 633, 0.45, new Crowding.PercusYevick());
        Crowding measured = new Crowding.Polynomial(new double[] {-1.2}, 0.03);
        Refusal above = assertThrows(
                Refusal.class, () -> population.perVolumeFraction(Index.real(1.58), 1.33, 633, 0.031, measured));
        assertTrue(above.getMessage().contains("above 0.03, the largest that the measured"), above.getMessage());
        double alone = population.perVolumeFraction(Index.real(1.58), 1.33, 633).muspPerCm();
        assertEquals(
                (1 - 1.2 * 0.03) * alone,
                population
                        .perVolumeFraction(Index.real(1.58), 1.33, 633, 0.03, measured)
                        .muspPerCm(),
                1e-12 * alone);
    }
}
