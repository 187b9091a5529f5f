package org.hazewright.transport;

import java.util.List;
import java.util.function.BooleanSupplier;
import java.util.function.DoubleConsumer;
import org.hazewright.optics.Refusal;

/**
 * What a run of photon packets is asked: how many, from which seed, on how many threads, and what to collect.
 *
 * <p>1 to 1e10 packets. {@code side} is the surface whose light the rings collect. {@code times} is null for no histogram; its
 * points are the centres of bins one step wide. {@code progress} is told the finished share (0 to 1) now and then, from any
 * thread; {@code stop} is asked between blocks and ends the run early. The result depends on packets and seed, never on
 * {@code threads}.
 */
public record PacketRun(
        long packets,
        long seed,
        int threads,
        List<Ring> rings,
        Side side,
        TimeAxis times,
        DoubleConsumer progress,
        BooleanSupplier stop) {
    public PacketRun {
        Refusal.within("Number of packets", packets, 1, 1e10);
        Refusal.within("Number of threads", threads, 1, 1024);
        rings = List.copyOf(rings);
        if (side == null || progress == null || stop == null)
            throw new Refusal("A run of packets needs a side, a progress and a stop.");
        if (times != null && (long) times.size() * Math.max(1, rings.size()) > 10_000_000)
            throw new Refusal(
                    "The time histograms would hold more than 10000000 bins; take fewer rings or a longer step.");
    }

    /** Totals only, on all processors. */
    public static PacketRun of(long packets, long seed) {
        int all = Runtime.getRuntime().availableProcessors();
        return new PacketRun(packets, seed, all, List.of(), Side.REFLECTANCE, null, share -> {}, () -> false);
    }

    public PacketRun onThreads(int count) {
        return new PacketRun(packets, seed, count, rings, side, times, progress, stop);
    }

    public PacketRun collecting(Side from, List<Ring> into) {
        return new PacketRun(packets, seed, threads, into, from, times, progress, stop);
    }

    public PacketRun over(TimeAxis axis) {
        return new PacketRun(packets, seed, threads, rings, side, axis, progress, stop);
    }

    public PacketRun watched(DoubleConsumer share, BooleanSupplier halt) {
        return new PacketRun(packets, seed, threads, rings, side, times, share, halt);
    }
}
