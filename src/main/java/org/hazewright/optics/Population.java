package org.hazewright.optics;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;

/**
 * Many spheres of one material: what they do to light per unit of their volume fraction.
 *
 * <p>N = 1/(π⟨D³⟩/6) spheres per unit volume for a volume fraction of 1; µs = N⟨C_sca⟩, µs' = N⟨C_sca(1 − g)⟩, µa = N⟨C_abs⟩,
 * averaged over the distribution by number, relative quadrature error at most 1e-6 (checked by refinement).
 */
public record Population(SizeDistribution sizes) {
    private static final int CACHED = 4096;
    private static final Map<Key, ParticleOptics> CACHE = new LinkedHashMap<>(64, 0.75f, true) {
        @Override
        protected boolean removeEldestEntry(Map.Entry<Key, ParticleOptics> eldest) {
            return size() > CACHED;
        }
    };

    private record Key(SizeDistribution sizes, Index particle, double hostIndex, double nm, double phi, Crowding c) {}

    /** Independent particles in a host of the given index, 1/cm per unit volume fraction. */
    public ParticleOptics perVolumeFraction(Index particle, double hostIndex, double wavelengthNm) {
        return perVolumeFraction(particle, hostIndex, wavelengthNm, 0, new Crowding.None());
    }

    /** Particles at a volume fraction with crowding, still 1/cm per unit volume fraction: multiply by it. */
    public ParticleOptics perVolumeFraction(
            Index particle, double hostIndex, double wavelengthNm, double volumeFraction, Crowding crowding) {
        Refusal.positive("Refractive index of the host", hostIndex);
        Refusal.positive("Wavelength in nm", wavelengthNm);
        Refusal.within("Volume fraction of particles", volumeFraction, 0, 1);
        Key key = new Key(sizes, particle, hostIndex, wavelengthNm, volumeFraction, crowding);
        synchronized (CACHE) {
            ParticleOptics known = CACHE.get(key);
            if (known != null) return known;
        }
        ParticleOptics optics = compute(key);
        synchronized (CACHE) {
            CACHE.put(key, optics);
        }
        return optics;
    }

    private ParticleOptics compute(Key key) {
        if (key.c instanceof Crowding.Polynomial p) {
            ParticleOptics dilute = perVolumeFraction(key.particle, key.hostIndex, key.nm);
            double factor = p.factor(key.phi);
            return new ParticleOptics(dilute.musPerCm() * factor, dilute.muspPerCm() * factor, dilute.muaPerCm());
        }
        HardSpheres spheres = key.c instanceof Crowding.PercusYevick ? new HardSpheres(key.phi) : null;
        if (sizes instanceof SizeDistribution.Single s)
            return average(List.of(new double[] {s.diameterNm(), 1}), key, spheres);
        ParticleOptics before = null;
        for (int n = 32; n <= 1 << 16; n *= 2) {
            ParticleOptics now = average(nodes(n), key, spheres);
            if (before != null
                    && Math.abs(now.musPerCm() - before.musPerCm()) <= 3e-7 * now.musPerCm()
                    && Math.abs(now.muspPerCm() - before.muspPerCm()) <= 3e-7 * now.muspPerCm()
                    && Math.abs(now.muaPerCm() - before.muaPerCm()) <= 3e-7 * now.muaPerCm()) return now;
            before = now;
        }
        throw new Refusal("The average over the size distribution does not settle to 1e-6.");
    }

    private List<double[]> nodes(int n) {
        List<double[]> nodes = new ArrayList<>();
        if (sizes instanceof SizeDistribution.LogNormal l) {
            double s = Math.log(l.geometricStandardDeviation());
            double from = 2 * s * s - 6 * s;
            double to = 6 * s * s + 6 * s;
            double h = (to - from) / n;
            for (int i = 0; i <= n; i++) {
                double t = from + i * h;
                nodes.add(new double[] {
                    l.numberMedianDiameterNm() * Math.exp(t),
                    h / (s * Math.sqrt(2 * Math.PI)) * Math.exp(-t * t / (2 * s * s))
                });
            }
        } else if (sizes instanceof SizeDistribution.Histogram hist) {
            double[] edges = hist.edgesNm();
            double[] weights = hist.weights();
            double[][] rule = gauss(Math.max(8, n / weights.length));
            for (int b = 0; b < weights.length; b++)
                for (double[] p : rule)
                    nodes.add(new double[] {
                        (edges[b] + edges[b + 1]) / 2 + (edges[b + 1] - edges[b]) / 2 * p[0], weights[b] * p[1] / 2
                    });
        }
        return nodes;
    }

    private ParticleOptics average(List<double[]> nodes, Key key, HardSpheres spheres) {
        double mus = 0;
        double musp = 0;
        double mua = 0;
        for (double[] node : nodes) {
            double d = node[0];
            double x = Math.PI * d * key.hostIndex / key.nm;
            if (x < Mie.X_MIN && nodes.size() > 1) continue;
            double area = node[1] * Math.PI * d * d / 4;
            MieSeries mie = MieSeries.of(x, key.particle.n() / key.hostIndex, key.particle.k() / key.hostIndex);
            Efficiencies e = mie.efficiencies();
            mua += area * e.qAbs();
            if (spheres == null) {
                mus += area * e.qSca();
                musp += area * e.qSca() * (1 - e.g());
            } else {
                for (double[] p : gauss(2 * mie.orders() + 32)) {
                    double phase = 2
                            * Math.PI
                            * mie.phaseFunction(p[0])
                            * p[1]
                            * spheres.structureFactor(4 * x * Math.sqrt((1 - p[0]) / 2));
                    mus += area * e.qSca() * phase;
                    musp += area * e.qSca() * phase * (1 - p[0]);
                }
            }
        }
        double perVolume = 6e7 / (Math.PI * sizes.meanCubedDiameterNm3());
        return new ParticleOptics(mus * perVolume, musp * perVolume, mua * perVolume);
    }

    private static final Map<Integer, double[][]> RULES = new java.util.concurrent.ConcurrentHashMap<>();

    private static double[][] gauss(int n) {
        return RULES.computeIfAbsent(n, Population::legendre);
    }

    /** Gauss–Legendre nodes and weights on [−1, 1]. */
    private static double[][] legendre(int n) {
        double[][] rule = new double[n][2];
        for (int i = 0; i < n; i++) {
            double z = Math.cos(Math.PI * (i + 0.75) / (n + 0.5));
            double slope = 0;
            for (int step = 0; step < 50; step++) {
                double below = 0;
                double here = 1;
                for (int j = 0; j < n; j++) {
                    double above = ((2 * j + 1) * z * here - j * below) / (j + 1);
                    below = here;
                    here = above;
                }
                slope = n * (z * here - below) / (z * z - 1);
                double dz = here / slope;
                z -= dz;
                if (Math.abs(dz) < 1e-15) break;
            }
            rule[i][0] = z;
            rule[i][1] = 2 / ((1 - z * z) * slope * slope);
        }
        return rule;
    }
}
