package org.hazewright.design;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.TreeMap;
import java.util.TreeSet;
import java.util.function.BooleanSupplier;
import java.util.function.DoubleConsumer;
import java.util.stream.IntStream;
import org.hazewright.brief.Brief;
import org.hazewright.optics.Refusal;
import org.hazewright.search.SetProblem;
import org.hazewright.search.SetResult;
import org.hazewright.search.SetSearch;
import org.hazewright.search.SetSolution;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Shelf;

/**
 * One list of bottles for a whole series of phantoms.
 *
 * <p>Every phantom is searched by itself ({@link SetSearch}), the sets of ingredients are ranked by what they do for all of them
 * ({@link SetsForAll}), and the best of each base are settled on the full model ({@link FixedPoint}). Best is the set with which
 * most phantoms lie inside every tolerance, then the one of least score. The balance's own part is left out of it: stocks that the
 * whole series shares take care of that. A phantom may hold less of the set than all of it, never more.
 */
public final class CommonSet {
    private static final int RUNNERS_UP = 8;

    private final List<Brief> briefs;
    private final Shelf shelf;
    private final BooleanSupplier stop;
    private final DoubleConsumer progress;

    private CommonSet(List<Brief> briefs, Shelf shelf, BooleanSupplier stop, DoubleConsumer progress) {
        this.briefs = List.copyOf(briefs);
        this.shelf = shelf;
        this.stop = stop;
        this.progress = progress;
    }

    /** A set of bottles in one base, and the best amounts of it for each phantom, in their order. */
    public record Way(Ingredient base, Set<String> ids, List<Option> options) {
        public long meeting() {
            return options.stream().filter(Option::meets).count();
        }

        double score() {
            return options.stream()
                    .mapToDouble(o -> o.score().bias()
                            + o.score().ingredient()
                            + SetsForAll.PER_WEIGHING * o.concentrationGPerMl().size())
                    .sum();
        }
    }

    /**
     * What was found.
     *
     * @param best the set that suits the series best
     * @param own by phantom, where it misses with that set and meets every tolerance with a set of its own: that set
     * @param compared how many sets were solved for the whole series, or shown not to be among its best
     * @param ofAll whether those are all that the brief allows
     * @param proven whether every phantom's own search came to its end
     */
    public record Found(
            Way best,
            Map<Integer, Option> own,
            Optional<Way> next,
            int compared,
            boolean ofAll,
            Map<String, String> leftOut,
            boolean proven) {}

    /** {@code stop} is asked now and then, {@code progress} is told the share done, 0 to 1; phantoms are searched side by side. */
    public static Found find(List<Brief> briefs, Shelf shelf, BooleanSupplier stop, DoubleConsumer progress) {
        return new CommonSet(briefs, shelf, stop, progress).find();
    }

    /** One phantom in one base. */
    record Cell(
            Brief brief,
            Candidates candidates,
            BriefColumns columns,
            SetProblem problem,
            SetSearch search,
            SetResult result) {
        int[] positions(Set<String> ids) {
            return IntStream.range(0, candidates.ingredients.size())
                    .filter(i -> ids.contains(candidates.ingredients.get(i).id()))
                    .toArray();
        }

        /** Of all candidates, in their order. */
        List<String> ids() {
            return candidates.ingredients.stream().map(Ingredient::id).toList();
        }

        Set<String> ids(SetSolution s) {
            Set<String> ids = new TreeSet<>();
            for (int i : s.members()) ids.add(candidates.ingredients.get(i).id());
            return ids;
        }
    }

    private Found find() {
        List<Way> ways = new ArrayList<>();
        Map<Integer, Option> own = new TreeMap<>();
        Map<String, String> leftOut = new TreeMap<>();
        List<String> refused = new ArrayList<>();
        int compared = 0;
        boolean proven = true;
        boolean ofAll = true;
        List<List<Cell>> cellsOfBases = new ArrayList<>();
        for (String base : briefs.get(0).bases()) {
            List<Cell> cells;
            try {
                cells = search(base);
            } catch (Refusal refusal) {
                if (briefs.get(0).bases().size() == 1) throw refusal;
                refused.add(refusal.getMessage());
                leftOut.put(base, refusal.getMessage());
                continue;
            }
            cellsOfBases.add(cells);
            for (Cell c : cells) {
                leftOut.putAll(c.candidates.leftOut);
                proven &= c.result.proven();
            }
            Set<Set<String>> sets = new LinkedHashSet<>();
            for (Cell c : cells) {
                sets.add(c.ids(c.result.best()));
                c.result.runnersUp().forEach(s -> sets.add(c.ids(s)));
            }
            SetsForAll ranking = new SetsForAll(cells, stop);
            for (SetsForAll.Screened screened : ranking.best(sets)) ways.add(settle(screened, cells));
            compared += ranking.compared;
            ofAll &= ranking.exhausted;
        }
        if (ways.isEmpty()) throw new Refusal(String.join(" ", refused));
        ways.sort(Comparator.comparingLong((Way w) -> -w.meeting()).thenComparingDouble(Way::score));
        Way best = ways.get(0);
        List<Cell> cells = cellsOfBases.stream()
                .filter(c -> c.get(0).candidates.base.equals(best.base))
                .findFirst()
                .orElseThrow();
        for (int k = 0; k < briefs.size(); k++) {
            if (best.options.get(k).meets()) continue;
            Cell c = cells.get(k);
            if (!c.result.meets()) continue;
            Option alone = settled(c, c.result.best());
            if (alone.meets()) own.put(k, alone);
        }
        Optional<Way> next = ways.stream().filter(w -> !w.ids.equals(best.ids)).findFirst();
        return new Found(best, own, next, compared, ofAll, leftOut, proven);
    }

    private List<Cell> search(String base) {
        java.util.concurrent.atomic.AtomicInteger done = new java.util.concurrent.atomic.AtomicInteger();
        return briefs.parallelStream()
                .map(brief -> {
                    Candidates candidates = Candidates.of(brief, shelf, base);
                    BriefColumns columns = new BriefColumns(brief, shelf, candidates);
                    SetProblem problem = columns.everything();
                    SetSearch search = new SetSearch(problem);
                    SetResult result = search.run(RUNNERS_UP, stop, p -> {});
                    progress.accept(0.9 * done.incrementAndGet() / briefs.size());
                    return new Cell(brief, candidates, columns, problem, search, result);
                })
                .toList();
    }

    private static Way settle(SetsForAll.Screened s, List<Cell> cells) {
        List<Option> options = IntStream.range(0, cells.size())
                .parallel()
                .mapToObj(k -> settled(cells.get(k), s.solutions().get(k)))
                .toList();
        return new Way(cells.get(0).candidates.base, s.ids(), options);
    }

    private static Option settled(Cell c, SetSolution s) {
        FixedPoint fixed = new FixedPoint(c.brief, c.columns, c.candidates);
        Map<Ingredient, Double> start = new LinkedHashMap<>();
        for (int k = 0; k < s.members().length; k++)
            start.put(c.candidates.ingredients.get(s.members()[k]), s.amounts()[k]);
        return fixed.leastScore(start, true, 1)
                .or(() -> fixed.leastScore(start, false, 1))
                .orElseThrow();
    }
}
