package org.hazewright.search;

import java.util.Arrays;
import java.util.List;
import org.hazewright.search.TopSets.Entry;

/**
 * The sets of least score, with or without the tolerances as limits.
 *
 * <p>A set whose unlimited optimum lies within its limits is solved by that. Otherwise bounds come first: least squares with
 * amounts that cannot be negative, plain and leaning on the multipliers of the best set. What they leave goes to
 * {@link ActiveSet}, which takes the limits in until the value passes the worst score that still matters. An optimum at which
 * an amount is 0 is left to the smaller set.
 */
final class ScoreSearch {
    private final SetSearch search;
    private final Columns columns;
    private final Columns.Gram gram;
    private final MissBounds bounds;
    private final MissSearch worstMiss;
    private final Watch watch;
    private final ActiveSet engine;
    private final NonNegative quick;
    /** For each position its share of the volume, then its misses, per scaled amount. */
    private final double[][] rows;

    private final int[] scratch;
    private final double[] misses;
    private final double zero;

    /** Best sets, whatever their misses. */
    final TopSets any;
    /** Best sets that meet every tolerance: each at its optimum within the tolerances. */
    final TopSets within;
    /** Sets whose optimum was computed in the last sweep, the empty set included. */
    long solved;
    /** Whether every set that was needed could be settled. */
    boolean sound = true;

    ScoreSearch(SetSearch search, Columns columns, MissBounds bounds, MissSearch worstMiss, int most, Watch watch) {
        this.search = search;
        this.columns = columns;
        this.bounds = bounds;
        this.worstMiss = worstMiss;
        this.watch = watch;
        gram = columns.gram(true);
        int m = columns.points;
        rows = new double[columns.size][1 + m];
        for (int i = 0; i < columns.size; i++) {
            rows[i][0] = columns.volume[i] * gram.scale[i];
            for (int j = 0; j < m; j++) rows[i][1 + j] = columns.miss[i][j] * gram.scale[i];
        }
        engine = new ActiveSet(Math.max(1, columns.mostTogether), 1 + m);
        engine.ridge = SetSweep.RIDGE;
        engine.low[0] = Double.NEGATIVE_INFINITY;
        engine.high[0] = 1;
        double worstAlone = 0;
        for (int j = 0; j < m; j++) {
            engine.low[1 + j] = columns.residual[j] - 1;
            engine.high[1 + j] = columns.residual[j] + 1;
            worstAlone = Math.max(worstAlone, Math.abs(columns.residual[j]));
        }
        quick = new NonNegative(gram);
        scratch = new int[Math.max(1, columns.size)];
        misses = new double[m];
        zero = 1e-9 * Math.sqrt(columns.alone);
        any = new TopSets(most, columns.alone);
        within = new TopSets(most, columns.alone);
        Entry alone = new Entry(new int[0], columns.alone, worstAlone <= 1 + 1e-9);
        any.add(alone);
        if (alone.meets()) within.add(alone);
        watch.bestScore = columns.alone;
    }

    /** Goes through all sets; begins again with the multipliers of the best set when too many sets need the engine. */
    void sweep(boolean tolerances) {
        TopSets top = tolerances ? within : any;
        int patience = 200;
        while (true) {
            ScoreSweep sweep = new ScoreSweep(tolerances, patience);
            if (!top.entries().isEmpty()) leanOn(top.entries().get(0), tolerances, sweep);
            solved = 1;
            sweep.run();
            if (!sweep.again) return;
            climb(tolerances);
            patience = patience >= 20000 ? Integer.MAX_VALUE : patience * 10;
        }
    }

    /** Solves sets (of positions) within the tolerances, so that the sweep has something to go by. */
    void seed(List<int[]> sets) {
        for (int[] set : sets) if (set.length > 0) attempt(set, true);
    }

    /** From the best set known to better ones by adding or exchanging one member at a time, as long as that helps. */
    private void climb(boolean tolerances) {
        TopSets top = tolerances ? within : any;
        if (top.entries().isEmpty()) return;
        double before = Double.POSITIVE_INFINITY;
        while (top.entries().get(0).score() < before && !watch.stops(0)) {
            before = top.entries().get(0).score();
            int[] set = columns.positions(top.entries().get(0).members());
            for (int out = 0; out <= set.length; out++)
                for (int in = 0; in < columns.size; in++) {
                    int[] other = Arrays.copyOf(set, out == set.length ? set.length + 1 : set.length);
                    other[out] = in;
                    Arrays.sort(other);
                    if (columns.admits(other)) attempt(other, tolerances);
                }
        }
    }

    /** Solves a set and offers what its optimum holds. */
    private void attempt(int[] set, boolean tolerances) {
        double cutoff = (room(tolerances ? within : any) - gram.start) / 2;
        if (limited(set, set.length, tolerances, cutoff) != ActiveSet.OPTIMAL) return;
        int kept = 0;
        int[] support = new int[set.length];
        double[] x = new double[set.length];
        for (int k = 0; k < set.length; k++)
            if (engine.x[k] > zero) {
                x[kept] = engine.x[k];
                support[kept++] = set[k];
            }
        if (kept > 0) offer(support, kept, x, tolerances);
    }

    /** Gives the sweep the multipliers of the limits that bind at a set's optimum. */
    private void leanOn(Entry entry, boolean tolerances, SetSweep sweep) {
        int count = entry.members().length;
        int[] set = columns.positions(entry.members());
        if (count == 0 || limited(set, count, tolerances, Double.POSITIVE_INFINITY) != ActiveSet.OPTIMAL) return;
        double[] linear = gram.b.clone();
        double[] charges = columns.weighing.clone();
        double start = gram.start;
        boolean some = false;
        for (int k = 0; k < engine.active; k++) {
            int code = engine.limit[k];
            double u = engine.multiplier[k];
            if (u <= 0 || engine.isLower(code)) continue;
            some = true;
            if (engine.isUpper(code)) {
                int i = set[code - count];
                linear[i] -= u;
                charges[i] -= 2 * u * gram.reach[i];
            } else {
                int r = engine.rowOf(code);
                double sign = engine.isHigh(code) ? -1 : 1;
                for (int i = 0; i < columns.size; i++) linear[i] += sign * u * rows[i][r];
                start += 2 * u * (engine.isHigh(code) ? -engine.high[r] : engine.low[r]);
            }
        }
        if (some) sweep.lean(linear, start, charges);
    }

    /** Scores at or above this do not matter; with room for what rounding and the ridge can do to a bound. */
    private double room(TopSets top) {
        return top.ceiling() + 1e-12 * columns.alone;
    }

    private final class ScoreSweep extends SetSweep {
        private final Question[] optima = questions();
        private final boolean tolerances;
        private final TopSets top;
        private int patience;

        ScoreSweep(boolean tolerances, int patience) {
            super(columns, gram, columns.weighing, watch);
            this.patience = patience;
            this.tolerances = tolerances;
            top = tolerances ? within : any;
            ceiling = room(top);
        }

        @Override
        void visit(int count) {
            spent(0.1);
            if (tolerances && bounds.exclude(member, count, 1 + 1e-9)) return;
            double rise = freeAmounts(count);
            if (freeBound + rise >= ceiling || rise == 0 && free(count)) return;
            if (leanLinear != null && leanBound + leanAmounts(count) >= ceiling) return;
            spent(0.1 * count);
            double charge = 0;
            double leanCharges = 0;
            for (int k = 0; k < count; k++) {
                charge += columns.weighing[member[k]];
                if (leanLinear != null) leanCharges += leanCharge[member[k]];
            }
            if (rise > 0 && quick.staysAbove(member, count, gram.b, gram.start + charge, ceiling)) return;
            if (leanLinear != null && quick.staysAbove(member, count, leanLinear, leanStart + leanCharges, ceiling))
                return;
            if (--patience < 0) again = true;
            else limit(count, (ceiling - gram.start - charge) / 2);
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
            ceiling = room(top);
            return true;
        }

        private void limit(int count, double cutoff) {
            int outcome = limited(member, count, tolerances, cutoff);
            if (outcome == ActiveSet.CUT) return;
            solved++;
            if (outcome == ActiveSet.OPTIMAL) offer(member, count, engine.x, tolerances);
            else if (outcome == ActiveSet.INFEASIBLE && tolerances && contradicts(count)) return;
            else solveWithCare(member, count, tolerances);
            ceiling = room(top);
        }

        /** Whether the engine's contradiction, or failing that the linear programme, proves that the set cannot meet all. */
        private boolean contradicts(int count) {
            double[] weight = new double[columns.points];
            for (int k = 0; k <= engine.active; k++) {
                int code = k == engine.active ? engine.contradicting : engine.limit[k];
                if (!engine.isRow(code) || engine.rowOf(code) == 0) continue;
                double sign = engine.isHigh(code) ? 1 : -1;
                weight[engine.rowOf(code) - 1] += sign * engine.contradiction[k];
            }
            bounds.add(weight);
            return bounds.exclude(member, count, 1 + 1e-9) || worstMiss.misses(member, count);
        }

        /** By the optimum of all that the branch may hold, unlimited in number, charged for the members only. */
        @Override
        boolean hopeless(int depth, int from, double work) {
            int count = branch(scratch, depth, from);
            if (!optima[depth].worthwhile(work, 1 + 0.2 * count)) return false;
            double[] linear = leanLinear == null ? gram.b : leanLinear;
            double start = leanLinear == null ? gram.start : leanStart;
            for (int k = 0; k < count; k++) {
                int i = scratch[k];
                if (k < depth) start += columns.weighing[i];
                if (leanLinear != null) start += leanCharge[i] - columns.weighing[i];
            }
            return optima[depth].answered(quick.staysAbove(scratch, count, linear, start, ceiling));
        }
    }

    /** For the rare set that the engine cannot settle: the whole programme, unscaled and checked. */
    private void solveWithCare(int[] set, int count, boolean tolerances) {
        int[] members = columns.members(set, count);
        SetSolution s = search.solve(members, tolerances);
        if (s.status() == ConvexProgramme.Status.UNSETTLED) sound = false;
        if (s.status() != ConvexProgramme.Status.OPTIMAL) return;
        double[] x = new double[count];
        for (int k = 0; k < count; k++)
            x[k] = s.amounts()[Arrays.binarySearch(members, columns.index[set[k]])] / gram.scale[set[k]];
        offer(set, count, x, tolerances);
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
        TopSets best = within.entries().isEmpty() ? any : within;
        watch.bestScore = best.entries().get(0).score();
    }

    /** Whether a set does as well (weighing aside) without one of its members. */
    private boolean canDoWithout(int[] set, int count, double score, boolean tolerances) {
        double as = score + 1e-10 * score + 1e-12 * columns.alone;
        if (count == 1) return columns.alone <= as && (!tolerances || within.holds(new int[0]));
        int[] fewer = new int[count - 1];
        for (int k = 0; k < count; k++) {
            System.arraycopy(set, 0, fewer, 0, k);
            System.arraycopy(set, k + 1, fewer, k, count - 1 - k);
            if (limited(fewer, count - 1, tolerances, (as - gram.start) / 2) == ActiveSet.OPTIMAL) return true;
        }
        return false;
    }

    /** Runs the engine on a set; its x is scaled, its cutoff half the score (weighing aside) less that of the base alone. */
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
}
