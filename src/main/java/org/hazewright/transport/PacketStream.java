package org.hazewright.transport;

/**
 * Random numbers of one block of packets: xoshiro256++, seeded from the run's seed and the block's number.
 *
 * <p>Blackman &amp; Vigna, ACM Trans. Math. Softw. 47, 36 (2021); the state is filled by the 64-bit finaliser of Steele, Lea &amp;
 * Flood, OOPSLA 2014, so that neighbouring blocks share nothing. Exponential variates by the ziggurat of Marsaglia &amp; Tsang, J.
 * Stat. Softw. 5, 8 (2000), 256 layers.
 */
final class PacketStream {
    private static final double UNIT = 0x1p-53;
    private static final int LAYERS = 256;
    /** Where the ziggurat's tail begins, and the area of each layer; Marsaglia &amp; Tsang 2000. */
    private static final double TAIL = 7.69711747013104972;

    private static final double AREA = 3.9496598225815571993e-3;
    private static final double[] WIDTH = new double[LAYERS];
    private static final double[] HEIGHT = new double[LAYERS];
    private static final long[] INSIDE = new long[LAYERS];

    static {
        double[] edge = new double[LAYERS + 1];
        edge[0] = AREA / Math.exp(-TAIL);
        edge[1] = TAIL;
        for (int i = 2; i < LAYERS; i++) edge[i] = -Math.log(AREA / edge[i - 1] + Math.exp(-edge[i - 1]));
        edge[LAYERS] = 0;
        for (int i = 0; i < LAYERS; i++) {
            WIDTH[i] = edge[i] * UNIT;
            INSIDE[i] = (long) (edge[i + 1] / edge[i] * 0x1p53);
            HEIGHT[i] = Math.exp(-edge[i]);
        }
    }

    private long s0;
    private long s1;
    private long s2;
    private long s3;

    PacketStream(long seed, long block) {
        long x = mix(seed) ^ mix(block + 0x632be59bd9b4e019L);
        s0 = mix(x += 0x9e3779b97f4a7c15L);
        s1 = mix(x += 0x9e3779b97f4a7c15L);
        s2 = mix(x += 0x9e3779b97f4a7c15L);
        s3 = mix(x + 0x9e3779b97f4a7c15L);
    }

    private static long mix(long z) {
        z = (z ^ (z >>> 30)) * 0xbf58476d1ce4e5b9L;
        z = (z ^ (z >>> 27)) * 0x94d049bb133111ebL;
        return z ^ (z >>> 31);
    }

    /** 64 random bits. */
    long bits() {
        long result = Long.rotateLeft(s0 + s3, 23) + s0;
        long t = s1 << 17;
        s2 ^= s0;
        s3 ^= s1;
        s1 ^= s2;
        s0 ^= s3;
        s2 ^= t;
        s3 = Long.rotateLeft(s3, 45);
        return result;
    }

    /** Uniform in [0, 1). */
    double uniform() {
        return (bits() >>> 11) * UNIT;
    }

    /** Exponential with mean 1. */
    double exponential() {
        long r = bits();
        int i = (int) r & (LAYERS - 1);
        long u = r >>> 11;
        double x = u * WIDTH[i];
        return u < INSIDE[i] ? x : seldom(i, x);
    }

    /** One in ninety: the wedge between two layers, or the tail. */
    private double seldom(int i, double x) {
        double y = x;
        int k = i;
        while (true) {
            if (k == 0) return TAIL - Math.log(1 - uniform());
            double upper = k + 1 < LAYERS ? HEIGHT[k + 1] : 1;
            if (HEIGHT[k] + uniform() * (upper - HEIGHT[k]) < Math.exp(-y)) return y;
            long r = bits();
            k = (int) r & (LAYERS - 1);
            long u = r >>> 11;
            y = u * WIDTH[k];
            if (u < INSIDE[k]) return y;
        }
    }
}
