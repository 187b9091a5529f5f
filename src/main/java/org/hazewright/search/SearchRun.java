package org.hazewright.search;

import java.util.ArrayList;
import java.util.List;
import java.util.function.BooleanSupplier;
import java.util.function.Consumer;
import org.hazewright.search.SetSearch.Progress;
import org.hazewright.search.TopSets.Entry;

/**
 * One search, in three stages: least scores without the tolerances; least worst miss; least scores within the tolerances,
 * when some set can meet them and the first stage has not settled the matter already.
 */
final class SearchRun {
    private final SetSearch search;
    private final Columns columns;
    private final Watch watch;
    private final ScoreSearch scores;
    private final MissSearch worstMiss;
    private final long admissible;

    SearchRun(SetSearch search, Columns columns, int topK, BooleanSupplier stop, Consumer<Progress> progress) {
        this.search = search;
        this.columns = columns;
        admissible = search.admissible();
        watch = new Watch(stop, progress, admissible);
        MissBounds bounds = new MissBounds(columns);
        worstMiss = new MissSearch(columns, bounds, watch);
        scores = new ScoreSearch(search, columns, bounds, worstMiss, topK + 1, watch);
    }

    /** The worst miss alone, from nothing. */
    LeastWorstMiss leastWorstMiss() {
        return worstMiss.run(List.of());
    }

    SetResult run() {
        scores.sweep(false);
        List<int[]> known = new ArrayList<>();
        for (Entry e : scores.any.entries()) known.add(columns.positions(e.members()));
        watch.stage = 2;
        LeastWorstMiss least = worstMiss.run(known);
        boolean settled = scores.any.entries().stream().allMatch(Entry::meets);
        if (!watch.stopped && !settled && least.value() <= 1 + 1e-9) {
            watch.stage = 3;
            known.add(columns.positions(least.members()));
            scores.seed(known);
            scores.sweep(true);
        }
        boolean meets = !scores.within.entries().isEmpty();
        List<SetSolution> found = new ArrayList<>();
        for (Entry e : (meets ? scores.within : scores.any).entries()) found.add(search.solve(e.members(), meets));
        watch.tell(admissible);
        return new SetResult(
                found.get(0),
                meets,
                least,
                List.copyOf(found.subList(1, found.size())),
                admissible,
                scores.solved,
                admissible - scores.solved,
                worstMiss.programmes,
                !watch.stopped && scores.sound && worstMiss.sound);
    }
}
