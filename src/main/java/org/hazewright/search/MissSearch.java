package org.hazewright.search;

import java.util.Arrays;
import java.util.List;

/**
 * The best possible worst miss over all admissible sets.
 *
 * <p>A set is cut when the least squares of its misses already show a worst miss at or above the best known (the worst miss is
 * at least √(Σ w_j miss_j²/Σ w_j)), when a proof of {@link MissBounds} does, or when it can grow: the larger set does no worse.
 * What is left gets its linear programme, whose dual becomes a proof for others. The programme of all candidates of a branch
 * bounds the branch.
 */
final class MissSearch {
    /** Values below this are exact fits; nothing is gained by looking further. */
    private static final double NONE = 1e-9;
    /** Gap between a programme's value and its dual that counts as rounding, in tolerances. */
    private static final double GRAIN = 1e-9;

    private final Columns columns;
    private final MissBounds bounds;
    private final Watch watch;
    private final WorstMissProgramme programme;
    private final int[] scratch;
    private LeastWorstMiss least;

    /** Linear programmes solved. */
    long programmes;
    /** Whether every programme that was needed ended with its proof. */
    boolean sound = true;

    MissSearch(Columns columns, MissBounds bounds, Watch watch) {
        this.columns = columns;
        this.bounds = bounds;
        this.watch = watch;
        programme = new WorstMissProgramme(columns, Math.max(1, columns.size));
        scratch = new int[Math.max(1, columns.size)];
        programme.solve(scratch, 0);
        keep(scratch, 0);
    }

    /** Searches, beginning with sets (of positions) that are likely to be good. */
    LeastWorstMiss run(List<int[]> known) {
        for (int[] set : known) if (!bounds.exclude(set, set.length, wanted())) attempt(set, set.length);
        if (!watch.stops(0) && least.value() > NONE) {
            for (int i = 0; i < columns.size; i++) scratch[i] = i;
            programme.solve(scratch, columns.size);
            bounds.add(programme.weight);
            if (!bounds.exclude(scratch, columns.size, wanted())) new MissSweep().run();
        }
        return least;
    }

    /** Whether a set (of positions) cannot meet every tolerance; solved by its programme. */
    boolean misses(int[] set, int count) {
        programmes++;
        boolean proven = programme.solve(set, count);
        bounds.add(programme.weight);
        return proven && bounds.exclude(set, count, 1 + 1e-9);
    }

    /** A set matters when its worst miss is below this. */
    private double wanted() {
        return least.value() * (1 - 1e-9);
    }

    private final class MissSweep extends SetSweep {
        private final Question[] proofs = questions();
        private final Question[] programs = questions();

        MissSweep() {
            super(columns, columns.gram(false), new double[columns.size], watch);
            lower();
        }

        private void lower() {
            double t = least.value() <= NONE ? 0 : wanted();
            ceiling = t * t * columns.weightSum + (t == 0 ? 0 : 1e-12 * columns.alone);
        }

        @Override
        void visit(int count) {
            spent(0.1);
            if (bounds.exclude(member, count, wanted()) || columns.canGrow(member, count)) return;
            spent(2 + count);
            if (attempt(member, count)) lower();
        }

        /** By the proofs at hand, then by the linear programme of all candidates that the branch may hold. */
        @Override
        boolean hopeless(int depth, int from, double work) {
            int count = branch(scratch, depth, from);
            if (!proofs[depth].worthwhile(work, 0.5 + 0.05 * count)) return false;
            if (proofs[depth].answered(bounds.exclude(scratch, count, wanted()))) return true;
            if (!programs[depth].worthwhile(work, 2 + 0.004 * count * count * count)) return false;
            programmes++;
            programme.solve(scratch, count);
            bounds.add(programme.weight);
            return programs[depth].answered(bounds.exclude(scratch, count, wanted()));
        }
    }

    /** Solves a set; true when it is the best so far. */
    private boolean attempt(int[] set, int count) {
        programmes++;
        boolean proven = programme.solve(set, count);
        bounds.add(programme.weight);
        if (programme.value < wanted()) {
            keep(set, count);
            sound &= proven;
            return true;
        }
        sound &= bounds.exclude(set, count, wanted() * (1 - 1e-9) - GRAIN);
        return false;
    }

    private void keep(int[] set, int count) {
        int kept = 0;
        int[] members = new int[count];
        for (int k = 0; k < count; k++)
            if (programme.amount[k] * columns.missSize[set[k]] > 1e-12) members[kept++] = columns.index[set[k]];
        members = Arrays.copyOf(members, kept);
        Arrays.sort(members);
        double[] amounts = new double[kept];
        double[] upper = new double[columns.problem.candidates().size()];
        double pulled = programme.volumeWeight;
        double perVolume = programme.volumeWeight == 0
                ? 0
                : programme.volumeWeight / columns.problem.limits().addedVolume();
        for (int k = 0; k < count; k++) {
            int i = columns.index[set[k]];
            int at = Arrays.binarySearch(members, i);
            if (at >= 0) amounts[at] = programme.amount[k];
            double weight = programme.upperWeight[k];
            pulled += weight * columns.reach[set[k]];
            // A reach set by the volume is the volume's limit, not the candidate's own.
            SetProblem.Candidate c = columns.problem.candidates().get(i);
            if (c.upper() <= columns.reach[set[k]]) upper[i] = weight;
            else perVolume += weight / c.specificVolume();
        }
        double bound = -pulled;
        for (int j = 0; j < columns.points; j++) bound -= programme.weight[j] * columns.residual[j];
        least = new LeastWorstMiss(
                members, amounts, programme.value, bound, programme.weight.clone(), perVolume, upper);
        watch.bestWorstMiss = least.value();
    }
}
