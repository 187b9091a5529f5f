package org.hazewright.design;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.function.BooleanSupplier;
import java.util.function.Consumer;
import org.hazewright.design.SetSearch.Progress;
import org.hazewright.design.TopSets.Entry;

/**
 * One search, in three stages: least scores without the tolerances; least worst miss; least scores within the tolerances,
 * when some set can meet them and the first stage has not settled the matter already.
 *
 * <p>Each stage is a {@link SetSweep} with its own bound. A set whose unlimited optimum lies within the limits is solved by
 * that. Otherwise the limits are taken in by {@link ActiveSet} until the value passes the best known; an optimum at which
 * an amount is 0 is left to the smaller set.
 */
final class SearchRun {
    private final SetSearch search;
    private final Columns columns;
    private final int topK;
    private final BooleanSupplier stop;
    private final Consumer<Progress> progress;

    private final Columns.Gram gram;
    private final double[][] rows;
    private final ActiveSet engine;
    private final WorstMissProgramme worstMiss;
    private final MissBounds bounds;
    private final int[] scratch;
    private final double[] misses;
    private final double[] rowWeight;

    private final TopSets any;
    private final TopSets within;
    private LeastWorstMiss least;
    private int[] leastSet = new int[0];
    private long solved;
    private long programmes;
    private boolean stopped;

    SearchRun(SetSearch search, Columns columns, int topK, BooleanSupplier stop, Consumer<Progress> progress) {
        this.search = search;
        this.columns = columns;
        this.topK = topK;
        this.stop = stop;
        this.progress = progress;
        gram = columns.gram(true);
        int m = columns.points;
        int k = columns.mostTogether;
        rows = new double[columns.size][1 + m];
        for (int i = 0; i < columns.size; i++) {
            rows[i][0] = columns.volume[i] * gram.scale[i];
            for (int j = 0; j < m; j++) rows[i][1 + j] = columns.miss[i][j] * gram.scale[i];
        }
        engine = new ActiveSet(Math.max(1, k), 1 + m);
        worstMiss = new WorstMissProgramme(columns, Math.max(1, columns.size));
        bounds = new MissBounds(columns);
        scratch = new int[Math.max(1, columns.size)];
        misses = new double[m];
        rowWeight = new double[m];
        engine.low[0] = Double.NEGATIVE_INFINITY;
        engine.high[0] = 1;
        for (int j = 0; j < m; j++) {
            engine.low[1 + j] = columns.residual[j] - 1;
            engine.high[1 + j] = columns.residual[j] + 1;
        }
        any = new TopSets(topK + 1, columns.alone);
        within = new TopSets(topK + 1, columns.alone);
    }

    SetResult run() {
        double worstAlone = 0;
        for (double r : columns.residual) worstAlone = Math.max(worstAlone, Math.abs(r));
        Entry alone = new Entry(new int[0], columns.alone, worstAlone <= 1);
        any.add(alone);
        if (alone.meets()) within.add(alone);
        long admissible = search.admissible();

        solved = 1;
        ScoreSweep first = new ScoreSweep(false);
        first.run();
        stopped |= first.stopped;
        progress.accept(
                new Progress(1, admissible, admissible, any.entries().get(0).score(), worstAlone));
        leastWorstMiss();
        progress.accept(
                new Progress(2, admissible, admissible, any.entries().get(0).score(), least.value()));
        boolean settled = any.entries().stream().allMatch(Entry::meets);
        if (!stopped && !settled && least.value() <= 1 + 1e-9) {
            solved = 1;
            seedWithin();
            solved = 1;
            ScoreSweep second = new ScoreSweep(true);
            second.run();
            stopped |= second.stopped;
        }
        boolean meets = !within.entries().isEmpty();
        List<SetSolution> found = new ArrayList<>();
        for (Entry e : (meets ? within : any).entries()) found.add(search.solve(e.members(), meets));
        return new SetResult(
                found.get(0),
                meets,
                least,
                List.copyOf(found.subList(1, found.size())),
                admissible,
                solved,
                admissible - solved,
                programmes,
                !stopped);
    }

    // ---- scores -------------------------------------------------------------------------------------------------

    private final class ScoreSweep extends SetSweep {
        private final boolean tolerances;
        private final TopSets top;

        ScoreSweep(boolean tolerances) {
            super(columns, gram, columns.weighing, stop);
            this.tolerances = tolerances;
            top = tolerances ? within : any;
            ceiling = room(top.ceiling());
        }

        @Override
        void visit(int count, double bound) {
            if (tolerances && bounds.exclude(member, count, 1 + 1e-9)) return;
            if (freeAmounts(count) && free(count)) {
                ceiling = room(top.ceiling());
                return;
            }
            double charge = 0;
            for (int k = 0; k < count; k++) charge += columns.weighing[member[k]];
            int outcome = limited(member, count, tolerances, (ceiling - gram.start - charge) / 2);
            if (outcome == ActiveSet.CUT) return;
            if (outcome == ActiveSet.INFEASIBLE) {
                solved++;
                addContradiction();
                return;
            }
            if (outcome == ActiveSet.STALLED) return;
            solved++;
            offer(member, count, engine.x, tolerances);
            ceiling = room(top.ceiling());
        }

        /** Whether the unlimited optimum is the optimum; then it is offered. */
        private boolean free(int count) {
            double volume = 0;
            double condition = 1;
            for (int k = 0; k < count; k++) {
                int i = member[k];
                if (amount[k] > gram.reach[i]) return false;
                volume += amount[k] * rows[i][0];
                condition = Math.min(condition, pivotOf(k));
            }
            if (volume > 1 || condition < 1e-4) return false;
            if (tolerances) {
                missesOf(member, count, amount);
                for (double e : misses) if (Math.abs(e) > 1) return false;
            }
            solved++;
            offer(member, count, amount, tolerances);
            return true;
        }
    }

    /** Room above a score for what rounding and the ridge can do to a bound. */
    private double room(double ceiling) {
        return ceiling + 1e-12 * columns.alone;
    }

    private void missesOf(int[] set, int count, double[] scaled) {
        for (int j = 0; j < misses.length; j++) misses[j] = -columns.residual[j];
        for (int k = 0; k < count; k++) {
            double x = scaled[k] * gram.scale[set[k]];
            double[] m = columns.miss[set[k]];
            for (int j = 0; j < misses.length; j++) misses[j] += x * m[j];
        }
    }

    /** Offers the optimum of a set to the lists it belongs to, unless one of its members is not needed. */
    private void offer(int[] set, int count, double[] scaled, boolean tolerances) {
        double zero = 1e-9 * Math.sqrt(columns.alone);
        for (int k = 0; k < count; k++) if (scaled[k] <= zero) return;
        missesOf(set, count, scaled);
        double score = 0;
        double worst = 0;
        for (int j = 0; j < misses.length; j++) {
            score += columns.weight[j] * misses[j] * misses[j];
            worst = Math.max(worst, Math.abs(misses[j]));
        }
        double charge = 0;
        for (int k = 0; k < count; k++) {
            double c = scaled[k] * gram.scale[set[k]];
            score += columns.ingredientTerm[set[k]] * c * c;
            charge += columns.weighing[set[k]];
        }
        Entry entry = new Entry(columns.members(set, count), score + charge, worst <= 1 + 1e-9);
        boolean forAny = !tolerances && any.wants(entry);
        boolean forWithin = entry.meets() && within.wants(entry);
        if (!forAny && !forWithin || canDoWithout(set, count, score, tolerances)) return;
        if (forAny) any.add(entry);
        if (forWithin) within.add(entry);
    }

    /** Whether a set does as well (weighing aside) without one of its members. */
    private boolean canDoWithout(int[] set, int count, double score, boolean tolerances) {
        double as = score + 1e-10 * score + 1e-12 * columns.alone;
        int[] fewer = new int[count];
        for (int k = 0; k < count; k++) {
            System.arraycopy(set, 0, fewer, 0, k);
            System.arraycopy(set, k + 1, fewer, k, count - 1 - k);
            if (count == 1)
                return columns.alone <= as
                        && (!tolerances || within.entries().stream().anyMatch(e -> e.members().length == 0));
            double[] x = engine.x;
            int outcome = limited(fewer, count - 1, tolerances, (as - gram.start) / 2);
            if (outcome == ActiveSet.OPTIMAL) return true;
        }
        return false;
    }

    /** Runs the engine on a set; the outcome's x is scaled. Cutoff in the engine's own measure, half the score less its start. */
    private int limited(int[] set, int count, boolean tolerances, double cutoff) {
        for (int k = 0; k < count; k++) {
            int i = set[k];
            for (int l = 0; l < count; l++) engine.h[k * count + l] = gram.h[i * gram.n + set[l]];
            engine.b[k] = gram.b[i];
            engine.lower[k] = 0;
            engine.upper[k] = gram.reach[i];
            engine.column[k] = rows[i];
        }
        return engine.solve(count, tolerances ? 1 + columns.points : 1, cutoff);
    }

    private void addContradiction() {
        Arrays.fill(rowWeight, 0);
        for (int k = 0; k <= engine.active; k++) {
            int code = k == engine.active ? engine.contradicting : engine.limit[k];
            if (!engine.isRow(code) || engine.rowOf(code) == 0) continue;
            rowWeight[engine.rowOf(code) - 1] +=
                    engine.isHigh(code) ? engine.contradiction[k] : -engine.contradiction[k];
        }
        bounds.add(rowWeight);
    }

    private void seedWithin() {
        List<Entry> seeds = new ArrayList<>(any.entries());
        seeds.add(new Entry(least.members(), 0, true));
        for (Entry e : seeds) {
            int count = e.members().length;
            if (count == 0) continue;
            int[] set = positions(e.members());
            if (limited(set, count, true, Double.POSITIVE_INFINITY) == ActiveSet.OPTIMAL)
                offer(set, count, engine.x.clone(), true);
        }
    }

    private int[] positions(int[] members) {
        int[] set = new int[members.length];
        for (int k = 0; k < set.length; k++)
            for (int i = 0; i < columns.size; i++) if (columns.index[i] == members[k]) set[k] = i;
        Arrays.sort(set);
        return set;
    }

    // ---- worst miss ---------------------------------------------------------------------------------------------

    LeastWorstMiss leastWorstMiss() {
        worstMiss.solve(scratch, 0);
        keepLeast(scratch, 0);
        for (Entry e : any.entries()) tryWorstMiss(positions(e.members()), e.members().length);
        if (stop.getAsBoolean()) stopped = true;
        if (!stopped && least.value() > 1e-9) {
            for (int i = 0; i < columns.size; i++) scratch[i] = i;
            worstMiss.solve(scratch, columns.size);
            bounds.add(worstMiss.weight);
            boolean hopeless = bounds.exclude(scratch, columns.size, least.value() * (1 - 1e-9));
            if (!hopeless) {
                MissSweep sweep = new MissSweep();
                sweep.run();
                stopped |= sweep.stopped;
            }
        }
        return least;
    }

    private final class MissSweep extends SetSweep {
        MissSweep() {
            super(columns, columns.gram(false), new double[columns.size], stop);
            lower();
        }

        private void lower() {
            double t = least.value() <= 1e-9 ? 0 : least.value() * (1 - 1e-9);
            ceiling = t * t * columns.weightSum + (t == 0 ? 0 : 1e-12 * columns.alone);
        }

        @Override
        void visit(int count, double bound) {
            double t = least.value() * (1 - 1e-9);
            if (bounds.exclude(member, count, t) || columns.canGrow(member, count)) return;
            if (tryWorstMiss(member, count)) lower();
        }
    }

    private boolean tryWorstMiss(int[] set, int count) {
        programmes++;
        worstMiss.solve(set, count);
        bounds.add(worstMiss.weight);
        if (worstMiss.value >= least.value() * (1 - 1e-9)) return false;
        keepLeast(set, count);
        return true;
    }

    private void keepLeast(int[] set, int count) {
        int kept = 0;
        int[] members = new int[count];
        for (int k = 0; k < count; k++)
            if (worstMiss.amount[k] * columns.missSize[set[k]] > 1e-12) members[kept++] = columns.index[set[k]];
        members = Arrays.copyOf(members, kept);
        Arrays.sort(members);
        double[] amounts = new double[kept];
        double[] upper = new double[columns.problem.candidates().size()];
        double pulled = 0;
        double perVolume = worstMiss.volumeWeight == 0
                ? 0
                : worstMiss.volumeWeight / columns.problem.limits().addedVolume();
        for (int k = 0; k < count; k++) {
            int i = columns.index[set[k]];
            int at = Arrays.binarySearch(members, i);
            if (at >= 0) amounts[at] = worstMiss.amount[k];
            pulled += worstMiss.upperWeight[k] * columns.reach[set[k]];
            SetProblem.Candidate c = columns.problem.candidates().get(i);
            if (c.upper() <= columns.reach[set[k]]) upper[i] = worstMiss.upperWeight[k];
            else perVolume += worstMiss.upperWeight[k] / c.specificVolume();
        }
        double bound = -worstMiss.volumeWeight - pulled;
        for (int j = 0; j < columns.points; j++) bound -= worstMiss.weight[j] * columns.residual[j];
        least = new LeastWorstMiss(
                members, amounts, worstMiss.value, bound, worstMiss.weight.clone(), perVolume, upper);
    }
}
