package org.hazewright.optics;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

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
     * Lipid emulsion in the tissue range: µs' falls behind the straight line by at most 2 % (Di Ninni, Martelli & Zaccanti, Biomed.
     * Opt. Express 2, 2265, 2011), here at 2.3 % of oil by volume, µs' near 22 /cm; their own uncertainty of 1 % is allowed on top.
     */
    @Test
    void emulsionFallsBehindByNoMoreThanPublished() {
        Population droplets = new Population(new SizeDistribution.LogNormal(195, 1.465));
        Index oil = Index.real(1.451 + 1.154e4 / (751.0 * 751) - 1.132e9 / Math.pow(751, 4));
        double alone = droplets.perVolumeFraction(oil, water(751), 751).muspPerCm();
        double before = 1;
        for (double phi : new double[] {0.002, 0.005, 0.01, 0.023}) {
            double ratio = droplets.perVolumeFraction(oil, water(751), 751, phi, new Crowding.PercusYevick())
                            .muspPerCm()
                    / alone;
            assertTrue(ratio < before, "the more, the less each scatters");
            assertTrue(ratio > 1 - 0.03, "at " + phi + " it is " + ratio);
            before = ratio;
        }
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
        assertTrue(refusal.getMessage().contains("0.45"), refusal.getMessage());
    }
}
