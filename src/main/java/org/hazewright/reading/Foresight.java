package org.hazewright.reading;

import java.util.function.BooleanSupplier;
import java.util.function.DoubleConsumer;
import java.util.function.DoubleFunction;
import org.hazewright.optics.Refusal;
import org.hazewright.transport.Medium;
import org.hazewright.transport.PacketRun;

/**
 * What readings are foreseen from: the phantom's medium and its uncertainty at each wavelength (nm), and how to run packets.
 *
 * <p>{@code spread} gives null where no uncertainty is known; {@code oximeter} may be null when no set-up asks for one.
 */
public record Foresight(
        DoubleFunction<Medium> medium,
        DoubleFunction<Spread> spread,
        Oximeter oximeter,
        int threads,
        DoubleConsumer progress,
        BooleanSupplier stop) {
    public Foresight {
        if (medium == null || spread == null || progress == null || stop == null)
            throw new Refusal("Readings need a medium, its uncertainty, a progress and a stop.");
        Refusal.within("Number of threads", threads, 1, 1024);
    }

    /** No uncertainty, no oximeter, all processors. */
    public static Foresight of(DoubleFunction<Medium> medium) {
        return new Foresight(
                medium, nm -> null, null, Runtime.getRuntime().availableProcessors(), share -> {}, () -> false);
    }

    public Foresight uncertain(DoubleFunction<Spread> by) {
        return new Foresight(medium, by, oximeter, threads, progress, stop);
    }

    public Foresight with(Oximeter reader) {
        return new Foresight(medium, spread, reader, threads, progress, stop);
    }

    public Foresight onThreads(int count) {
        return new Foresight(medium, spread, oximeter, count, progress, stop);
    }

    public Foresight watched(DoubleConsumer share, BooleanSupplier halt) {
        return new Foresight(medium, spread, oximeter, threads, share, halt);
    }

    PacketRun run(SetUp setUp) {
        return PacketRun.of(setUp.packets(), setUp.seed()).onThreads(threads).watched(progress, stop);
    }
}
