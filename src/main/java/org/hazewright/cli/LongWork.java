package org.hazewright.cli;

import java.io.PrintWriter;
import java.util.concurrent.TimeUnit;
import java.util.function.LongSupplier;

/**
 * Progress of long work on standard error: nothing in the first second, then a line after 1, 2, 4, 8 … s, so that a log stays
 * short and a person knows that it is alive and how to end it.
 */
final class LongWork {
    private final String doing;
    private final PrintWriter err;
    private final boolean silent;
    private final Interruption interruption;
    private final LongSupplier nanoTime;
    private final long beginning;
    private long nextS = 1;
    private volatile double share;

    LongWork(PrintWriter err, boolean silent, Interruption interruption) {
        this("Searching", err, silent, interruption);
    }

    /** {@code doing} is the word for the work: "Searching". */
    LongWork(String doing, PrintWriter err, boolean silent, Interruption interruption) {
        this(doing, err, silent, interruption, System::nanoTime);
    }

    LongWork(PrintWriter err, boolean silent, Interruption interruption, LongSupplier nanoTime) {
        this("Searching", err, silent, interruption, nanoTime);
    }

    private LongWork(String doing, PrintWriter err, boolean silent, Interruption interruption, LongSupplier nanoTime) {
        this.doing = doing;
        this.err = err;
        this.silent = silent;
        this.interruption = interruption;
        this.nanoTime = nanoTime;
        this.beginning = nanoTime.getAsLong();
        interruption.listen();
    }

    /** Whether to end with the best so far; asked often by the work, and tells of itself then. */
    boolean stop() {
        if (!silent) tell();
        return interruption.asked();
    }

    /** Told by the work: the share that is done, 0 to 1. */
    void progress(double done) {
        share = done;
    }

    private synchronized void tell() {
        long s = TimeUnit.NANOSECONDS.toSeconds(nanoTime.getAsLong() - beginning);
        if (s < nextS) return;
        while (nextS <= s) nextS *= 2;
        String percent = share > 0 && share < 1 ? ", " + Math.round(100 * share) + " % done" : "";
        err.println(doing + " for " + s + " s" + percent + ". Ctrl-C ends it with the best so far.");
    }
}
