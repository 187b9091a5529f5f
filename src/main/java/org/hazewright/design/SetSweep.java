package org.hazewright.design;

import java.util.function.BooleanSupplier;

/**
 * Walks through every admissible set once, with the unlimited least squares of each at hand.
 *
 * <p>The sets form a tree: each grows from the one without its last member. A node carries, for every candidate that may
 * still follow, what is left of its column and of its pull once the members are fitted (a Cholesky factor of the Gram
 * matrix extended row by row), so that the lower bound of a child costs a few operations whatever the number of points:
 * the members' amounts free, the newcomer's between 0 and its reach. Only children whose bound is below {@link #ceiling}
 * are shown to {@link #visit}. A ridge of 1e-14 on the unit diagonal keeps collinear sets in order; callers leave room for
 * it in the ceiling.
 */
abstract class SetSweep {
    static final double RIDGE = 1e-14;

    private final Columns columns;
    private final Columns.Gram gram;
    private final double[] charge;
    private final int n;
    private final int most;
    private final BooleanSupplier stop;

    /** Sets whose bound is at or above this are not shown; may be lowered at any time. */
    double ceiling = Double.POSITIVE_INFINITY;
    /** Positions of the members of the set shown, ascending. */
    final int[] member;
    /** Amounts of the unlimited optimum of the set shown, scaled as the Gram matrix: see {@link #freeAmounts}. */
    final double[] amount;

    /** Nodes opened. */
    long opened;

    boolean stopped;

    private final double[][] left;
    private final double[][] pull;
    private final double[][] row;
    private final double[] pivot;
    private final double[] fitted;

    /** {@code charge}: what each candidate adds to the score by being there, by position. */
    SetSweep(Columns columns, Columns.Gram gram, double[] charge, BooleanSupplier stop) {
        this.columns = columns;
        this.gram = gram;
        this.charge = charge;
        this.stop = stop;
        n = columns.size;
        most = columns.mostTogether;
        member = new int[most];
        amount = new double[most];
        left = new double[most + 1][n];
        pull = new double[most + 1][n];
        row = new double[most][n];
        pivot = new double[most];
        fitted = new double[most];
    }

    /**
     * A set of {@code count} members (see {@link #member}) that may matter; {@code bound} is a lower bound of its score with
     * the charges. The empty set is not shown.
     */
    abstract void visit(int count, double bound);

    final void run() {
        if (most == 0) return;
        for (int i = 0; i < n; i++) {
            left[0][i] = 1 + RIDGE;
            pull[0][i] = gram.b[i];
        }
        node(0, 0, gram.start, 0, 0);
    }

    private void node(int depth, int from, double value, double charged, int ofGroup) {
        if ((++opened & 255) == 0 && stop.getAsBoolean()) stopped = true;
        if (stopped) return;
        double[] l = left[depth];
        double[] p = pull[depth];
        for (int i = from; i < n; i++) {
            double over = value + charged + charge[i] - ceiling;
            if (over >= 0 && (p[i] <= 0 || p[i] * p[i] <= over * l[i])) continue;
            double x = p[i] <= 0 ? 0 : p[i] >= l[i] * gram.reach[i] ? gram.reach[i] : p[i] / l[i];
            double bound = value + charged + charge[i] - x * (2 * p[i] - x * l[i]);
            if (bound >= ceiling || blocked(depth, i)) continue;
            member[depth] = i;
            pivot[depth] = Math.sqrt(Math.max(l[i], 0.1 * RIDGE));
            fitted[depth] = p[i] / pivot[depth];
            visit(depth + 1, bound);
        }
        if (depth + 1 == most) return;
        for (int i = from; i < n && !stopped; i++) {
            boolean sameGroup = depth > 0 && columns.group[member[depth - 1]] == columns.group[i];
            int count = (sameGroup ? ofGroup : 0) + 1;
            int next = count < columns.most[columns.group[i]] ? i + 1 : columns.groupEnd[i];
            if (next >= n || blocked(depth, i)) continue;
            member[depth] = i;
            double z = extend(depth, i, next);
            node(depth + 1, next, value - z * z, charged + charge[i], count);
        }
    }

    private boolean blocked(int depth, int i) {
        if (columns.excludes == null) return false;
        boolean[] no = columns.excludes[i];
        for (int k = 0; k < depth; k++) if (no[member[k]]) return true;
        return false;
    }

    private double extend(int depth, int i, int next) {
        double[] l = left[depth];
        double[] p = pull[depth];
        double[] r = row[depth];
        double[] nextLeft = left[depth + 1];
        double[] nextPull = pull[depth + 1];
        double root = Math.sqrt(Math.max(l[i], 0.1 * RIDGE));
        double z = p[i] / root;
        double inverse = 1 / root;
        System.arraycopy(gram.h, i * n + next, r, next, n - next);
        for (int k = 0; k < depth; k++) {
            double[] before = row[k];
            double f = before[i];
            for (int j = next; j < n; j++) r[j] -= f * before[j];
        }
        for (int j = next; j < n; j++) {
            double v = r[j] * inverse;
            r[j] = v;
            nextLeft[j] = l[j] - v * v;
            nextPull[j] = p[j] - z * v;
        }
        pivot[depth] = root;
        fitted[depth] = z;
        return z;
    }

    /** Pivot of the k-th member of the set shown: the share of its column that the members before it leave. */
    final double pivotOf(int k) {
        return pivot[k];
    }

    /** Fills {@link #amount} with the unlimited optimum of the set shown; false when one of them is not above 0. */
    final boolean freeAmounts(int count) {
        boolean positive = true;
        for (int k = count - 1; k >= 0; k--) {
            double s = fitted[k];
            double[] r = row[k];
            for (int j = k + 1; j < count; j++) s -= r[member[j]] * amount[j];
            amount[k] = s / pivot[k];
            positive &= amount[k] > 0;
        }
        return positive;
    }
}
