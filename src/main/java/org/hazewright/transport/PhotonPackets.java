package org.hazewright.transport;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.concurrent.ExecutionException;
import java.util.concurrent.ExecutorService;
import java.util.concurrent.Executors;
import java.util.concurrent.Future;
import java.util.concurrent.atomic.AtomicLong;
import org.hazewright.optics.Refusal;

/**
 * Photon packets: Monte Carlo of a thin beam at right angles on a slab or a semi-infinite medium with smooth faces.
 *
 * <p>The referee between the other models. A run is cut into blocks of {@link #BLOCK} packets, each with a random stream of its
 * own, merged in the order of their numbers: the result is the same to the last bit for any number of threads. A packet whose
 * path exceeds {@code longestPathMm} (1e5 mm unless said) is put aside as unfinished; this only happens where almost nothing
 * absorbs.
 */
public final class PhotonPackets {
    /** Packets in a block; the run's standard errors come from the spread between blocks. */
    public static final int BLOCK = 2000;

    final Medium medium;
    final Boundary boundary;
    final double thicknessMm;
    final double longestPathMm;

    /** {@code thicknessMm} null: semi-infinite. */
    public PhotonPackets(Medium medium, double outsideIndex, Double thicknessMm) {
        this(medium, outsideIndex, thicknessMm, 1e5);
    }

    public PhotonPackets(Medium medium, double outsideIndex, Double thicknessMm, double longestPathMm) {
        this.medium = medium;
        this.boundary = new Boundary(medium.n(), outsideIndex);
        this.thicknessMm =
                thicknessMm == null ? Double.POSITIVE_INFINITY : Refusal.positive("Thickness in mm", thicknessMm);
        this.longestPathMm = Refusal.positive("Longest path in mm", longestPathMm);
        if (medium.mutPerCm() == 0)
            throw new Refusal("Photon packets need a medium that absorbs or scatters; both coefficients are 0.");
    }

    public Medium medium() {
        return medium;
    }

    public Boundary boundary() {
        return boundary;
    }

    /** Runs the packets, or as many whole blocks as were finished when the run was stopped. */
    public PacketTally run(PacketRun run) {
        long blocks = (run.packets() + BLOCK - 1) / BLOCK;
        Merger merger = new Merger(new PacketTally.Sums(this, run), run, blocks);
        AtomicLong next = new AtomicLong();
        Runnable work = () -> {
            while (!run.stop().getAsBoolean()) {
                long b = next.getAndIncrement();
                if (b >= blocks) return;
                PacketBlock block = new PacketBlock(this, run, Math.min(BLOCK, run.packets() - b * BLOCK));
                block.follow(new PacketStream(run.seed(), b));
                merger.take(b, block);
            }
        };
        int threads = (int) Math.min(run.threads(), blocks);
        if (threads == 1) work.run();
        else together(threads, work);
        return merger.sums.tally();
    }

    private static void together(int threads, Runnable work) {
        ExecutorService pool = Executors.newFixedThreadPool(threads - 1, r -> {
            Thread t = new Thread(r, "photon packets");
            t.setDaemon(true);
            return t;
        });
        try {
            List<Future<?>> others = new ArrayList<>();
            for (int i = 1; i < threads; i++) others.add(pool.submit(work));
            work.run();
            for (Future<?> other : others) other.get();
        } catch (InterruptedException e) {
            Thread.currentThread().interrupt();
            throw new Refusal("The run of photon packets was interrupted.", e);
        } catch (ExecutionException e) {
            throw new IllegalStateException("A thread of photon packets failed.", e.getCause());
        } finally {
            pool.shutdownNow();
        }
    }

    /** Takes finished blocks in any order and adds them in theirs. */
    private static final class Merger {
        final PacketTally.Sums sums;
        private final PacketRun run;
        private final long blocks;
        private final Map<Long, PacketBlock> waiting = new HashMap<>();
        private long nextToAdd;

        Merger(PacketTally.Sums sums, PacketRun run, long blocks) {
            this.sums = sums;
            this.run = run;
            this.blocks = blocks;
        }

        synchronized void take(long number, PacketBlock block) {
            waiting.put(number, block);
            for (PacketBlock b; (b = waiting.remove(nextToAdd)) != null; nextToAdd++) sums.add(b);
            run.progress().accept((double) nextToAdd / blocks);
        }
    }
}
