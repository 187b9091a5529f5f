package org.hazewright.optics;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;

/**
 * Many spheres of one material: what they do to light per unit of their volume fraction.
 *
 * <p>N = 1/(π⟨D³⟩/6) spheres per unit volume for a volume fraction of 1; µs = N⟨C_sca⟩, µs' = N⟨C_sca(1 − g)⟩, µa = N⟨C_abs⟩,
 * averaged over the distribution by number to a relative error of 1e-6, by an estimate that {@link #average} gives.
 *
 * <p>Where 1e-6 is not reached: clear or weakly absorbing spheres of high contrast (relative index 1.3 and more at size
 * parameters of 10 and more) of many sizes have resonances narrower than any affordable step, and the average ends at {@value
 * SizeQuadrature#MOST_SPHERES} spheres with the error that {@link PopulationAverage#relativeError} says, typically 1e-5. Of
 * spheres that absorb very weakly, µa is the worst of the three: it hangs on the few spheres at a resonance, and may be known to 1e-2 only at
 * k = 1e-4 and to 0.2 at k = 1e-7, where a gram of titania in a litre adds some 1e-4 /cm. Nothing is refused for it. Crowding of such a population is a ratio over some 2000 of its sizes.
 *
 * <p>What was computed is remembered by value (sizes, indices, wavelength), so asking again costs nothing. Safe for threads.
 *
 * <p>The host does not absorb: its own absorption is added by volume elsewhere. Particle index n + ik, wavelengths in nm in
 * vacuum, host index real; the domain is that of {@link Mie}.
 */
public record Population(SizeDistribution sizes) {
    private record Key(SizeDistribution sizes, Index particle, double hostIndex, double wavelengthNm) {}

    /** Figures of one population at one wavelength, with the rule over sizes that gave them. */
    private record Figures(PopulationAverage average, double[] diametersNm, double[] weights) {}

    private static final HardSpheres ALONE = new HardSpheres(0);

    /** Sizes kept of a log-normal rule for the angular patterns, which serve only as a ratio to the same spheres alone. */
    private static final int MOST_PATTERNS = 2000;

    // in numbers kept: about 16 MB and 120 MB
    private static final BoundedCache<Key, Figures> DILUTE =
            new BoundedCache<>(2_000_000, figures -> 40 + 2L * figures.diametersNm.length);
    private static final BoundedCache<Key, CrowdedSpheres> CROWDED =
            new BoundedCache<>(15_000_000, spheres -> 40 + 5L * spheres.directions());

    /** Independent particles in a host of the given index, 1/cm per unit volume fraction. */
    public ParticleOptics perVolumeFraction(Index particle, double hostIndex, double wavelengthNm) {
        return average(particle, hostIndex, wavelengthNm).optics();
    }

    /** Independent particles as in {@link #perVolumeFraction}, with the estimated error of the average over sizes. */
    public PopulationAverage average(Index particle, double hostIndex, double wavelengthNm) {
        return figures(new Key(sizes, particle, hostIndex, wavelengthNm)).average;
    }

    /**
     * Independent particles at several wavelengths (nm), each with its own particle and host index: the same as one by one,
     * but the spheres of all wavelengths are computed together, which is several times as fast.
     */
    public List<ParticleOptics> spectrum(List<Index> particle, double[] hostIndex, double[] wavelengthsNm) {
        if (particle.size() != wavelengthsNm.length || hostIndex.length != wavelengthsNm.length)
            throw new Refusal("A spectrum of " + wavelengthsNm.length + " wavelengths has " + particle.size()
                    + " particle indices and " + hostIndex.length
                    + " host indices; it needs one of each for every wavelength.");
        List<Key> keys = new ArrayList<>();
        for (int i = 0; i < wavelengthsNm.length; i++)
            keys.add(new Key(sizes, particle.get(i), hostIndex[i], wavelengthsNm[i]));
        return figures(keys).stream().map(figures -> figures.average.optics()).toList();
    }

    /**
     * Particles at a volume fraction, crowded as the model says; still 1/cm per unit volume fraction, so multiply by it.
     *
     * <p>{@code volumeFraction} 0 to 1, further limited by the model. The first volume fraction asked for at a wavelength costs
     * the angular pattern of all sizes, each further one a few microseconds.
     */
    public ParticleOptics perVolumeFraction(
            Index particle, double hostIndex, double wavelengthNm, double volumeFraction, Crowding crowding) {
        Refusal.within("Volume fraction of particles", volumeFraction, 0, 1);
        if (crowding instanceof Crowding.PercusYevick) {
            HardSpheres spheres = new HardSpheres(volumeFraction);
            Key key = new Key(sizes, particle, hostIndex, wavelengthNm);
            ParticleOptics dilute = figures(key).average.optics();
            if (volumeFraction == 0) return dilute;
            CrowdedSpheres crowded = crowded(key);
            double[] scattered = crowded.scattered(spheres);
            double[] alone = crowded.scattered(ALONE);
            return new ParticleOptics(
                    dilute.musPerCm() * scattered[0] / alone[0],
                    dilute.muspPerCm() * scattered[1] / alone[1],
                    dilute.muaPerCm());
        }
        ParticleOptics dilute = perVolumeFraction(particle, hostIndex, wavelengthNm);
        if (crowding instanceof Crowding.None) return dilute;
        double factor = ((Crowding.Polynomial) crowding).factor(volumeFraction);
        return new ParticleOptics(dilute.musPerCm() * factor, dilute.muspPerCm() * factor, dilute.muaPerCm());
    }

    private CrowdedSpheres crowded(Key key) {
        CrowdedSpheres known = CROWDED.get(key);
        if (known != null) return known;
        Figures figures = figures(key);
        CrowdedSpheres made = new CrowdedSpheres(
                figures.diametersNm, figures.weights, key.particle, key.hostIndex, key.wavelengthNm, perCm(key.sizes));
        CROWDED.put(key, made);
        return made;
    }

    private static Figures figures(Key key) {
        Figures known = DILUTE.get(key);
        return known != null ? known : figures(List.of(key)).get(0);
    }

    private static List<Figures> figures(List<Key> keys) {
        Figures[] out = new Figures[keys.size()];
        List<Integer> open = new ArrayList<>();
        SizeQuadrature[] rules = new SizeQuadrature[keys.size()];
        for (int i = 0; i < out.length; i++) {
            out[i] = DILUTE.get(keys.get(i));
            if (out[i] == null) {
                rules[i] = begin(keys.get(i));
                open.add(i);
            }
        }
        List<Integer> waiting = open;
        while (!waiting.isEmpty()) waiting = advance(keys, rules, waiting);
        for (int i : open) {
            Key key = keys.get(i);
            double[] averages = rules[i].averages();
            double perCm = perCm(key.sizes);
            double[] diameters = rules[i].diametersNm();
            double[] weights = rules[i].weights();
            // every s-th node of an equal-step rule is a rule again
            int every = key.sizes instanceof SizeDistribution.LogNormal ? 1 + diameters.length / MOST_PATTERNS : 1;
            out[i] = new Figures(
                    new PopulationAverage(
                            new ParticleOptics(averages[0] * perCm, averages[1] * perCm, averages[2] * perCm),
                            rules[i].relativeError(),
                            diameters.length),
                    everyOf(diameters, every, 1),
                    everyOf(weights, every, every));
            DILUTE.put(key, out[i]);
        }
        return List.of(out);
    }

    private static double[] everyOf(double[] values, int every, double factor) {
        if (every == 1) return values;
        double[] out = new double[values.length / every];
        for (int i = 0; i < out.length; i++) out[i] = factor * values[i * every];
        return out;
    }

    private static SizeQuadrature begin(Key key) {
        Refusal.positive("Refractive index of the host", key.hostIndex);
        Refusal.positive("Wavelength in nm", key.wavelengthNm);
        double n = key.particle.n() / key.hostIndex;
        double k = key.particle.k() / key.hostIndex;
        Mie.refuseOutsideDomain(1, n, k);
        return SizeQuadrature.of(key.sizes, Math.PI * key.hostIndex / key.wavelengthNm, n, k);
    }

    /** One round: the spheres wanted by all rules at once. Returns those rules that are not settled. */
    private static List<Integer> advance(List<Key> keys, SizeQuadrature[] rules, List<Integer> waiting) {
        List<double[]> wanted = new ArrayList<>();
        int count = 0;
        for (int i : waiting) {
            double[] diameters = rules[i].wantedNm();
            wanted.add(diameters);
            count += diameters.length;
        }
        double[] x = new double[count];
        double[] n = new double[count];
        double[] k = new double[count];
        int place = 0;
        for (int w = 0; w < waiting.size(); w++) {
            Key key = keys.get(waiting.get(w));
            double sizePerNm = Math.PI * key.hostIndex / key.wavelengthNm;
            double[] diameters = wanted.get(w);
            int end = place + diameters.length;
            Arrays.fill(n, place, end, key.particle.n() / key.hostIndex);
            Arrays.fill(k, place, end, key.particle.k() / key.hostIndex);
            for (double diameter : diameters) x[place++] = sizePerNm * diameter;
        }
        double[] sca = new double[count];
        double[] abs = new double[count];
        double[] g = new double[count];
        Mie.spheres(x, n, k, sca, abs, g);
        List<Integer> still = new ArrayList<>();
        place = 0;
        for (int w = 0; w < waiting.size(); w++) {
            double[] diameters = wanted.get(w);
            double[][] figures = new double[SizeQuadrature.FIGURES][diameters.length];
            for (int i = 0; i < diameters.length; i++) {
                double area = Math.PI / 4 * diameters[i] * diameters[i];
                figures[0][i] = area * sca[place];
                figures[1][i] = area * sca[place] * (1 - g[place]);
                figures[2][i] = area * abs[place];
                place++;
            }
            SizeQuadrature rule = rules[waiting.get(w)];
            rule.accept(figures);
            if (rule.wantedNm().length > 0) still.add(waiting.get(w));
        }
        return still;
    }

    /** From a mean cross section in nm² to 1/cm per unit volume fraction: 1e7 nm/cm over the mean volume in nm³. */
    private static double perCm(SizeDistribution sizes) {
        return 1e7 / (Math.PI / 6 * sizes.meanCubedDiameterNm3());
    }
}
