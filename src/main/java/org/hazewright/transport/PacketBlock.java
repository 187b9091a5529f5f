package org.hazewright.transport;

/**
 * One block of packets, followed from start to end on one thread, with a random stream of its own.
 *
 * <p>A packet carries a weight, of which the share µa/µt stays behind at every scattering; it is let through a face whole or not
 * at all, by the Fresnel reflectance; when its weight is small it is dropped or made ten times heavier by roulette, and the
 * books of both are kept, so that every block balances to rounding:
 * specular + reflected + transmitted + absorbed + unfinished + dropped − made = packets.
 * Scattering angles by Henyey &amp; Greenstein, Astrophys. J. 93, 70 (1941). Weights and roulette: Kahn &amp; Harris, Natl. Bur.
 * Stand. Appl. Math. Ser. 12, 27 (1951).
 */
final class PacketBlock {
    static final int WEIGHT = 0;
    static final int PATH = 1;
    static final int PATH_SQUARED = 2;
    static final int SCORE = 3;
    static final int SUMS = 4;
    private static final double LIGHT = 1e-3;
    private static final double SURVIVAL = 0.1;
    private static final int ANGLES = 1024;
    private static final double[] COSINE = new double[ANGLES];
    private static final double[] SINE = new double[ANGLES];

    static {
        for (int i = 0; i < ANGLES; i++) {
            COSINE[i] = Math.cos(2 * Math.PI * (i + 0.5) / ANGLES);
            SINE[i] = Math.sin(2 * Math.PI * (i + 0.5) / ANGLES);
        }
    }

    final long packets;
    double reflected;
    double transmitted;
    double unscatteredReflected;
    double unscatteredTransmitted;
    double absorbed;
    double unfinished;
    double dropped;
    double made;
    long scatterings;
    /** Four sums for each ring: weight, weight × path, weight × path², weight × (scatterings − µs path). */
    final double[] ring;

    final double[] histogram;
    private final PhotonPackets problem;
    private final PacketRun run;
    private final double[] innerSquared;
    private final double[] outerSquared;

    PacketBlock(PhotonPackets problem, PacketRun run, long packets) {
        this.problem = problem;
        this.run = run;
        this.packets = packets;
        int rings = run.rings().size();
        ring = new double[SUMS * rings];
        histogram = run.times() == null
                ? new double[0]
                : new double[rings * run.times().size()];
        innerSquared = new double[rings];
        outerSquared = new double[rings];
        for (int i = 0; i < rings; i++) {
            innerSquared[i] = run.rings().get(i).innerMm() * run.rings().get(i).innerMm();
            outerSquared[i] = run.rings().get(i).outerMm() * run.rings().get(i).outerMm();
        }
    }

    /** Follows every packet; the hot loop keeps all it needs in local variables. */
    void follow(PacketStream random) {
        final double freePath = 1 / problem.medium.mutPerMm();
        final double albedo = problem.medium.albedo();
        final double g = problem.medium.g();
        final boolean isotropic = Math.abs(g) < 1e-6;
        final double g2 = isotropic ? 0 : (1 + g * g) / (2 * g);
        final double gq = isotropic ? 0 : (1 - g * g) * (1 - g * g) / (2 * g);
        final double bottom = problem.thicknessMm;
        final double critical = problem.boundary.criticalCosine();
        final double relative = problem.boundary.nInside() / problem.boundary.nOutside();
        final double entering = 1 - problem.boundary.normalReflectance();
        final double longest = problem.longestPathMm;
        long allScatterings = 0;
        for (long p = 0; p < packets; p++) {
            double x = 0, y = 0, z = 0;
            double ux = 0, uy = 0, uz = 1;
            double weight = entering;
            double left = 0;
            double path = 0;
            long scattered = 0;
            double step = random.exponential() * freePath;
            while (true) {
                double zn = z + uz * step;
                if (zn < 0 || zn > bottom) {
                    // to the face, and through it or back
                    double face = zn < 0 ? 0 : bottom;
                    double part = (face - z) / uz;
                    x += ux * part;
                    y += uy * part;
                    z = face;
                    path += part;
                    step -= part;
                    double mu = Math.abs(uz);
                    if (mu <= critical || random.uniform() < Boundary.fresnel(relative, mu)) {
                        uz = -uz;
                        if (path > longest) {
                            unfinished += weight;
                            break;
                        }
                        continue;
                    }
                    leave(face == 0, weight, x, y, path, scattered);
                    break;
                }
                x += ux * step;
                y += uy * step;
                z = zn;
                path += step;
                double stays = weight - weight * albedo;
                left += stays;
                weight -= stays;
                scattered++;
                long bits = random.bits();
                double xi = (bits >>> 32) * 0x1p-32 + 0x1p-33;
                double cosine;
                if (isotropic) cosine = 2 * xi - 1;
                else {
                    double q = 1 - g + 2 * g * xi;
                    cosine = g2 - gq / (q * q);
                }
                double sine = Math.sqrt(Math.max(0, 1 - cosine * cosine));
                // azimuth: a point of the circle from the table, turned on by the rest of the bits
                int k = (int) bits >>> 22;
                double rest = (((int) bits & 0x3fffff) - 2097151.5) * (2 * Math.PI / ANGLES * 0x1p-22);
                double r2 = rest * rest;
                double cr = 1 - r2 * (0.5 - r2 / 24);
                double sr = rest * (1 - r2 / 6);
                double cosPhi = COSINE[k] * cr - SINE[k] * sr;
                double sinPhi = SINE[k] * cr + COSINE[k] * sr;
                // two directions at right angles to the old one, without a root: Duff et al., J. Comput. Graph. Tech.
                // 6, 1 (2017)
                double sign = Math.copySign(1, uz);
                double a = -1 / (sign + uz);
                double b = ux * uy * a;
                double f = sine * cosPhi;
                double h = sine * sinPhi;
                double nx = f * (1 + sign * ux * ux * a) + h * b + cosine * ux;
                double ny = f * sign * b + h * (sign + uy * uy * a) + cosine * uy;
                uz = cosine * uz - f * sign * ux - h * uy;
                ux = nx;
                uy = ny;
                if (weight < LIGHT) {
                    if (random.uniform() >= SURVIVAL) {
                        dropped += weight;
                        break;
                    }
                    made += weight * (1 / SURVIVAL - 1);
                    weight *= 1 / SURVIVAL;
                }
                if (path > longest) {
                    unfinished += weight;
                    break;
                }
                step = random.exponential() * freePath;
            }
            absorbed += left;
            allScatterings += scattered;
        }
        scatterings += allScatterings;
    }

    private void leave(boolean near, double weight, double x, double y, double path, long scattered) {
        if (near) reflected += weight;
        else transmitted += weight;
        if (scattered == 0) {
            if (near) unscatteredReflected += weight;
            else unscatteredTransmitted += weight;
        }
        if (near != (run.side() == Side.REFLECTANCE)) return;
        double rho2 = x * x + y * y;
        for (int i = 0; i < innerSquared.length; i++) {
            if (rho2 < innerSquared[i] || rho2 >= outerSquared[i]) continue;
            int k = SUMS * i;
            ring[k + WEIGHT] += weight;
            ring[k + PATH] += weight * path;
            ring[k + PATH_SQUARED] += weight * path * path;
            ring[k + SCORE] += weight * (scattered - problem.medium.musPerMm() * path);
            if (histogram.length > 0) {
                TimeAxis t = run.times();
                double bin = (path / problem.medium.speedMmPerPs() - t.fromPs()) / t.stepPs() + 0.5;
                if (bin >= 0 && bin < t.size()) histogram[i * t.size() + (int) bin] += weight;
            }
        }
    }
}
