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
import java.util.function.BooleanSupplier;
import java.util.function.DoubleConsumer;
import org.hazewright.brief.Brief;
import org.hazewright.optics.Refusal;
import org.hazewright.search.ConvexProgramme;
import org.hazewright.search.LeastWorstMiss;
import org.hazewright.search.SetProblem;
import org.hazewright.search.SetResult;
import org.hazewright.search.SetSearch;
import org.hazewright.search.SetSolution;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Shelf;

/**
 * From a brief and a shelf to the best sets of ingredients and their amounts.
 *
 * <p>For every candidate base the search over sets is exact ({@link SetSearch}); the leading sets are then settled on the full
 * model ({@link FixedPoint}) and ranked there: inside every tolerance first, then least score.
 */
public final class Design {
    /** Sets taken from the search to the full model, for each base. */
    private static final int FINALISTS = 12;

    private final Brief brief;
    private final Shelf shelf;
    private final BooleanSupplier stop;
    private final DoubleConsumer progress;
    private final List<Searched> searched = new ArrayList<>();
    private double bestPossible = Double.POSITIVE_INFINITY;

    /** {@code stop} is asked now and then; {@code progress} is told the share done, 0 to 1. */
    public Design(Brief brief, Shelf shelf, BooleanSupplier stop, DoubleConsumer progress) {
        this.brief = brief;
        this.shelf = shelf;
        this.stop = stop;
        this.progress = progress;
    }

    public Design(Brief brief, Shelf shelf) {
        this(brief, shelf, () -> false, share -> {});
    }

    /** One base's search, kept for the sentences about its limits. */
    record Searched(Candidates candidates, BriefColumns columns, SetProblem problem, SetResult result) {}

    /**
     * The best options; with {@code leadersOnly} those that could still be best when weighings are made finer by stocks, else all
     * {@value #FINALISTS}.
     */
    public Finding find(boolean leadersOnly) {
        List<Option> options = new ArrayList<>();
        Map<String, String> leftOut = new TreeMap<>();
        List<String> refused = new ArrayList<>();
        searched.clear();
        bestPossible = Double.POSITIVE_INFINITY;
        int done = 0;
        for (String base : brief.bases()) {
            Searched s;
            try {
                s = search(base, done++);
            } catch (Refusal refusal) {
                if (brief.bases().size() == 1) throw refusal;
                refused.add(refusal.getMessage());
                leftOut.put(base, refusal.getMessage());
                continue;
            }
            searched.add(s);
            leftOut.putAll(s.candidates.leftOut);
            List<Option> found = settle(s, leadersOnly);
            double possible = Math.min(
                    settledWorstMiss(s),
                    found.stream().mapToDouble(Option::worstMiss).min().orElse(Double.POSITIVE_INFINITY));
            if (possible < bestPossible) bestPossible = possible;
            options.addAll(found);
        }
        if (searched.isEmpty()) throw new Refusal(String.join(" ", refused));
        options.sort(Comparator.comparing((Option o) -> !o.meets())
                .thenComparingDouble(o -> o.score().total())
                .thenComparing(o -> o.ids().size())
                .thenComparing(o -> String.join(",", new java.util.TreeSet<>(o.ids()))));
        List<String> limits = heldBack(options.get(0));
        long admissible =
                searched.stream().mapToLong(s -> s.result.admissible()).sum();
        long solved = searched.stream().mapToLong(s -> s.result.solved()).sum();
        long cut = searched.stream().mapToLong(s -> s.result.cut()).sum();
        boolean proven = searched.stream().allMatch(s -> s.result.proven());
        return new Finding(brief, shelf, options, bestPossible, limits, leftOut, admissible, solved, cut, proven);
    }

    /** What holds back an option that was found, in sentences; none once the search is stopped, since nobody waits for more then. */
    public List<String> heldBack(Option option) {
        if (stop.getAsBoolean()) return List.of();
        Searched own = searched.stream()
                .filter(s -> s.candidates.base.equals(option.base()))
                .findFirst()
                .orElseThrow();
        return new HeldBack(brief, own, option, bestPossible, stop).sentences();
    }

    /** The same option again with every tolerance narrowed to {@code edge} of itself: room for rounding. */
    public Optional<Option> narrowed(Option option, double edge) {
        Candidates candidates = Candidates.of(brief, shelf, option.base().id());
        BriefColumns columns = new BriefColumns(brief, shelf, candidates);
        return new FixedPoint(brief, columns, candidates).leastScore(option.concentrationGPerMl(), true, edge);
    }

    private Searched search(String base, int done) {
        Candidates candidates = Candidates.of(brief, shelf, base);
        BriefColumns columns = new BriefColumns(brief, shelf, candidates);
        SetProblem problem = columns.everything();
        double bases = brief.bases().size();
        SetResult result = new SetSearch(problem).run(FINALISTS, stop, p -> progress.accept((done + share(p)) / bases));
        return new Searched(candidates, columns, problem, result);
    }

    private static double share(SetSearch.Progress p) {
        return p.admissible() == 0 ? 1 : Math.min(1, (double) p.considered() / p.admissible());
    }

    /** The leading sets on the full model; sets that shrink to the same ingredients count once. */
    private List<Option> settle(Searched s, boolean leadersOnly) {
        FixedPoint fixed = new FixedPoint(brief, s.columns, s.candidates);
        List<SetSolution> finalists = new ArrayList<>();
        finalists.add(s.result.best());
        finalists.addAll(s.result.runnersUp());
        boolean canMeet = s.result.bestPossibleWorstMiss() < 1.1; // crowding moves the edge by less than that
        finalists.removeIf(f -> f.status() == ConvexProgramme.Status.INFEASIBLE);
        List<Option> options = new ArrayList<>();
        options.add(settled(s, fixed, finalists.get(0), canMeet));
        double best = options.get(0).score().total();
        options.addAll(finalists.subList(1, finalists.size()).parallelStream()
                .filter(f -> !leadersOnly || f.bias() + f.ingredient() <= 1.1 * best)
                .map(f -> settled(s, fixed, f, canMeet))
                .toList());
        Set<Set<String>> seen = new LinkedHashSet<>();
        options.removeIf(o -> !seen.add(o.ids()));
        return options;
    }

    private static Option settled(Searched s, FixedPoint fixed, SetSolution f, boolean canMeet) {
        Map<Ingredient, Double> start = concentrations(s, f.members(), f.amounts());
        Optional<Option> inside = canMeet ? fixed.leastScore(start, true, 1) : Optional.empty();
        return inside.or(() -> fixed.leastScore(start, false, 1)).orElseThrow();
    }

    /** The least worst miss of the search, on the full model. */
    private double settledWorstMiss(Searched s) {
        LeastWorstMiss least = s.result.leastWorstMiss();
        if (least.members().length == 0) return least.value();
        Map<Ingredient, Double> start = concentrations(s, least.members(), least.amounts());
        return new FixedPoint(brief, s.columns, s.candidates)
                .leastWorstMiss(start)
                .map(Option::worstMiss)
                .orElse(least.value());
    }

    static Map<Ingredient, Double> concentrations(Searched s, int[] members, double[] amounts) {
        Map<Ingredient, Double> c = new LinkedHashMap<>();
        for (int k = 0; k < members.length; k++) c.put(s.candidates.ingredients.get(members[k]), amounts[k]);
        return c;
    }
}
