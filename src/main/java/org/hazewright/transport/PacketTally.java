package org.hazewright.transport;

import java.util.Arrays;
import java.util.List;

/**
 * What a run of photon packets found, per packet that met the surface, with standard errors from the spread between blocks.
 *
 * <p>{@code light} holds the five shares of {@link SlabLight}; the rest of the budget is {@code absorbed}, {@code unfinished}
 * (paths longer than followed) and {@code dropped − made} (roulette, 0 on average): together 1 to rounding. With fewer than two
 * blocks standard errors are NaN. {@code packets} is what was finished, less than asked when the run was stopped.
 */
public record PacketTally(
        long packets,
        long scatterings,
        SlabLight light,
        double uTotalReflectance,
        double uTotalTransmittance,
        double absorbed,
        double unfinished,
        double dropped,
        double made,
        List<InRing> rings) {
    public PacketTally {
        rings = List.copyOf(rings);
    }

    /** Sum of all books; 1 to rounding. */
    public double budget() {
        return light.totalReflectance() + light.totalTransmittance() + absorbed + unfinished + dropped - made;
    }

    /**
     * One ring: average signal per mm² and its standard error; mean time and variance of flight; relative slopes.
     *
     * <p>{@code meanPathMm} is also −∂ ln(signal)/∂µa exactly; {@code score} is µs ∂ ln(signal)/∂µs at constant g. All NaN where no
     * packet arrived. The histogram is per mm² and ps.
     */
    public record InRing(
            Ring ring,
            double perMm2,
            double uPerMm2,
            double meanPathMm,
            double meanTimePs,
            double uMeanTimePs,
            double timeVariancePs2,
            double score,
            double[] histogram,
            double[] uHistogram) {}

    /** Running sums over blocks, in their order. */
    static final class Sums {
        private final PhotonPackets problem;
        private final PacketRun run;
        private final PacketBlock all;
        private final double[] ringSquares;
        private final double[] ringCross;
        private final double[] ringPathSquares;
        private final double[] histogramSquares;
        private long packets;
        private long blocks;
        private double reflectedSquares;
        private double transmittedSquares;

        Sums(PhotonPackets problem, PacketRun run) {
            this.problem = problem;
            this.run = run;
            all = new PacketBlock(problem, run, 0);
            int n = run.rings().size();
            ringSquares = new double[n];
            ringCross = new double[n];
            ringPathSquares = new double[n];
            histogramSquares = new double[all.histogram.length];
        }

        void add(PacketBlock b) {
            packets += b.packets;
            blocks++;
            all.reflected += b.reflected;
            all.transmitted += b.transmitted;
            all.unscatteredReflected += b.unscatteredReflected;
            all.unscatteredTransmitted += b.unscatteredTransmitted;
            all.absorbed += b.absorbed;
            all.unfinished += b.unfinished;
            all.dropped += b.dropped;
            all.made += b.made;
            all.scatterings += b.scatterings;
            // squares of block means, weighted by the block's packets: Σ n m² = Σ s²/n
            reflectedSquares += b.reflected * b.reflected / b.packets;
            transmittedSquares += b.transmitted * b.transmitted / b.packets;
            for (int i = 0; i < all.ring.length; i++) all.ring[i] += b.ring[i];
            for (int i = 0; i < ringSquares.length; i++) {
                double w = b.ring[PacketBlock.SUMS * i + PacketBlock.WEIGHT];
                double l = b.ring[PacketBlock.SUMS * i + PacketBlock.PATH];
                ringSquares[i] += w * w / b.packets;
                ringCross[i] += w * l / b.packets;
                ringPathSquares[i] += l * l / b.packets;
            }
            for (int i = 0; i < all.histogram.length; i++) {
                all.histogram[i] += b.histogram[i];
                histogramSquares[i] += b.histogram[i] * b.histogram[i] / b.packets;
            }
        }

        /** Standard error of a sum's mean per packet. */
        private double error(double sum, double squares) {
            if (blocks < 2) return Double.NaN;
            return Math.sqrt(Math.max(0, squares - sum * sum / packets) / ((blocks - 1.0) * packets));
        }

        PacketTally tally() {
            if (packets == 0)
                return new PacketTally(
                        0, 0, new SlabLight(0, 0, 0, 0, 0), Double.NaN, Double.NaN, 0, 0, 0, 0, List.of());
            double n = packets;
            double ur = all.unscatteredReflected / n;
            double ut = all.unscatteredTransmitted / n;
            SlabLight light = new SlabLight(
                    problem.boundary.normalReflectance(),
                    ur,
                    Math.max(0, all.reflected / n - ur),
                    ut,
                    Math.max(0, all.transmitted / n - ut));
            InRing[] rings = new InRing[ringSquares.length];
            for (int i = 0; i < rings.length; i++) rings[i] = inRing(i);
            return new PacketTally(
                    packets,
                    all.scatterings,
                    light,
                    error(all.reflected, reflectedSquares),
                    error(all.transmitted, transmittedSquares),
                    all.absorbed / n,
                    all.unfinished / n,
                    all.dropped / n,
                    all.made / n,
                    Arrays.asList(rings));
        }

        private InRing inRing(int i) {
            Ring ring = run.rings().get(i);
            double area = ring.areaMm2();
            double w = all.ring[PacketBlock.SUMS * i + PacketBlock.WEIGHT];
            double l = all.ring[PacketBlock.SUMS * i + PacketBlock.PATH];
            double l2 = all.ring[PacketBlock.SUMS * i + PacketBlock.PATH_SQUARED];
            double s = all.ring[PacketBlock.SUMS * i + PacketBlock.SCORE];
            double mean = l / w;
            double speed = problem.medium.speedMmPerPs();
            // residual l − mean w of the ratio, whose block sums add up to 0
            double residual = ringPathSquares[i] - 2 * mean * ringCross[i] + mean * mean * ringSquares[i];
            double uMean = error(0, residual) * packets / w;
            int bins = run.times() == null ? 0 : run.times().size();
            double[] h = new double[bins];
            double[] uh = new double[bins];
            for (int k = 0; k < bins; k++) {
                double scale = 1 / (area * run.times().stepPs());
                h[k] = all.histogram[i * bins + k] / packets * scale;
                uh[k] = error(all.histogram[i * bins + k], histogramSquares[i * bins + k]) * scale;
            }
            return new InRing(
                    ring,
                    w / packets / area,
                    error(w, ringSquares[i]) / area,
                    mean,
                    mean / speed,
                    uMean / speed,
                    (l2 / w - mean * mean) / (speed * speed),
                    s / w,
                    h,
                    uh);
        }
    }
}
