package org.hazewright.search;

import java.util.function.BooleanSupplier;
import java.util.function.Consumer;
import org.hazewright.search.SetSearch.Progress;

/** What a running search shares with whoever waits for it: how far it is, the best so far, and whether to stop. */
final class Watch {
    private final BooleanSupplier stop;
    private final Consumer<Progress> progress;
    private final long admissible;
    private int calls;

    /** 1 scores, 2 worst miss, 3 scores within the tolerances. */
    int stage = 1;

    double bestScore;
    double bestWorstMiss;
    /** Once true, stays so. */
    boolean stopped;

    Watch(BooleanSupplier stop, Consumer<Progress> progress, long admissible) {
        this.stop = stop;
        this.progress = progress;
        this.admissible = admissible;
    }

    /** Asked every few dozen microseconds of work; tells the progress now and then. */
    boolean stops(double considered) {
        if (!stopped) stopped = stop.getAsBoolean();
        if ((++calls & 127) == 0) tell(considered);
        return stopped;
    }

    void tell(double considered) {
        progress.accept(
                new Progress(stage, (long) Math.min(considered, admissible), admissible, bestScore, bestWorstMiss));
    }
}
