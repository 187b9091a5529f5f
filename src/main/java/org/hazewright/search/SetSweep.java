package org.hazewright.search;

/**
 * Walks through every admissible set once, with the unlimited least squares of each at hand.
 *
 * <p>The sets form a tree: each grows from the one without its last member. A node carries, for every candidate that may
 * still follow, what is left of its column and of its pull once the members are fitted (a Cholesky factor of the Gram
 * matrix extended row by row), so that the lower bound of a child costs a few operations whatever the number of points:
 * the members' amounts free, the newcomer's between 0 and its reach. Only children whose bound is below {@link #ceiling}
 * are shown to {@link #visit}. When limits bind at the best sets, {@link #lean} adds a second bound: the same least squares
 * with those limits' multipliers in the objective (Lagrangian relaxation; Geoffrion, Math. Program. Study 2, 82, 1974), a
 * lower bound whatever set it is used on, and nearly exact where the multipliers are alike. A ridge of 1e-14 on the unit diagonal keeps collinear sets in order; callers leave room for
 * it in the ceiling.
 */
abstract class SetSweep {
    static final double RIDGE = 1e-14;

    private final Columns columns;
    private final Columns.Gram gram;
    private final double[] charge;
    private final int n;
    private final int most;
    private final Watch watch;

    /** Sets whose bound is at or above this are not shown; may be lowered at any time. */
    double ceiling = Double.POSITIVE_INFINITY;
    /** Positions of the members of the set shown, ascending. */
    final int[] member;
    /** Amounts of the unlimited optimum of the set shown, scaled as the Gram matrix: see {@link #freeAmounts}. */
    final double[] amount;

    /** Score of that optimum, and value of the second objective at its own. */
    double freeBound;

    double leanBound;

    /** Set by {@link #visit} to leave the sweep early, to begin again with better knowledge. */
    boolean again;

    /** The second objective, null when there is none: see {@link #lean}. */
    double[] leanLinear;

    double[] leanCharge;
    double leanStart;
    private final double[][] leanPull;
    private int opened;
    private double considered;
    private double gone;
    private double spent;

    private final double[][] left;
    private final double[][] pull;
    private final double[][] row;
    private final double[] pivot;
    private final double[] fitted;
    private final double[] leanFitted;
    private final double[] unit;
    private final double[][] choices;

    /** {@code charge}: what each candidate adds to the score by being there, by position. */
    SetSweep(Columns columns, Columns.Gram gram, double[] charge, Watch watch) {
        this.columns = columns;
        this.gram = gram;
        this.charge = charge;
        this.watch = watch;
        n = columns.size;
        most = columns.mostTogether;
        member = new int[most];
        amount = new double[most];
        left = new double[most + 1][n];
        pull = new double[most + 1][n];
        row = new double[most][n];
        pivot = new double[most];
        fitted = new double[most];
        leanFitted = new double[most];
        unit = new double[most];
        leanPull = new double[most + 1][n];
        choices = choices(n, most);
    }

    /** Takes in multipliers: the second objective's linear term and start, and its charges by position. */
    final void lean(double[] linear, double start, double[] charges) {
        leanLinear = linear;
        leanStart = start;
        leanCharge = charges;
    }

    /**
     * Whether no set can matter that has the first {@code depth} members and others from position {@code from} on; asked
     * before they are gone through, which is expected to take {@code work} in the units of {@link #spent}.
     */
    abstract boolean hopeless(int depth, int from, double work);

    /** To be called by {@link #visit} with the work it did, in microseconds or so: counted, not timed. */
    final void spent(double work) {
        spent += work;
    }

    /** A question with a price, asked only while its answers save more than it costs. */
    static final class Question {
        private double asked;
        private double yes;

        boolean worthwhile(double work, double price) {
            return work * (1 + yes) > price * (2 + asked);
        }

        boolean answered(boolean answer) {
            asked++;
            if (answer) yes++;
            return answer;
        }
    }

    /** One question for each depth. */
    final Question[] questions() {
        Question[] questions = new Question[most + 1];
        for (int d = 0; d <= most; d++) questions[d] = new Question();
        return questions;
    }

    /** Fills in the first members of a branch and all that may follow; returns how many. */
    final int branch(int[] into, int depth, int from) {
        System.arraycopy(member, 0, into, 0, depth);
        for (int i = from; i < n; i++) into[depth + i - from] = i;
        return depth + n - from;
    }

    /** A set of {@code count} members (see {@link #member}) that may matter. The empty set is not shown. */
    abstract void visit(int count);

    final void run() {
        if (most == 0) return;
        for (int i = 0; i < n; i++) {
            left[0][i] = 1 + RIDGE;
            pull[0][i] = gram.b[i];
            if (leanLinear != null) leanPull[0][i] = leanLinear[i];
        }
        again = false;
        node(0, 0, gram.start, 0, leanStart, 0);
    }

    private void node(int depth, int from, double value, double charged, double leanValue, int ofGroup) {
        if ((++opened & 127) == 0) watch.stops(considered);
        if (watch.stopped || again) return;
        gone += n - from;
        considered += n - from;
        if (gone > 1e6) {
            gone *= 0.5;
            spent *= 0.5;
        }
        double[] l = left[depth];
        double[] p = pull[depth];
        for (int i = from; i < n; i++) {
            double over = value + charged + charge[i] - ceiling;
            if (over >= 0 && (p[i] <= 0 || p[i] * p[i] <= over * l[i])) continue;
            double x = p[i] <= 0 ? 0 : p[i] >= l[i] * gram.reach[i] ? gram.reach[i] : p[i] / l[i];
            double bound = value + charged + charge[i] - x * (2 * p[i] - x * l[i]);
            if (bound >= ceiling) continue;
            if (leanLinear != null) {
                double q = leanPull[depth][i];
                double y = q <= 0 ? 0 : q >= l[i] * gram.reach[i] ? gram.reach[i] : q / l[i];
                bound = Math.max(bound, leanValue + leanCharge[i] - y * (2 * q - y * l[i]));
                if (bound >= ceiling) continue;
                leanBound = leanValue + leanCharge[i] - q * q / Math.max(l[i], 0.1 * RIDGE);
                leanFitted[depth] = q / Math.sqrt(Math.max(l[i], 0.1 * RIDGE));
            }
            if (blocked(depth, i)) continue;
            member[depth] = i;
            pivot[depth] = Math.sqrt(Math.max(l[i], 0.1 * RIDGE));
            fitted[depth] = p[i] / pivot[depth];
            freeBound = value + charged + charge[i] - fitted[depth] * fitted[depth];
            visit(depth + 1);
            if (again) return;
        }
        if (depth + 1 == most) return;
        for (int i = from; i < n && !watch.stopped && !again; i++) {
            boolean sameGroup = depth > 0 && columns.group[member[depth - 1]] == columns.group[i];
            int count = (sameGroup ? ofGroup : 0) + 1;
            int next = count < columns.most[columns.group[i]] ? i + 1 : columns.groupEnd[i];
            if (next >= n || blocked(depth, i)) continue;
            member[depth] = i;
            double sets = choices[n - next][most - depth - 1];
            double work = sets * spent / (1000 + gone);
            if (work > 1 && hopeless(depth + 1, next, work)) {
                considered += sets;
                continue;
            }
            double z = extend(depth, i, next);
            double lean = 0;
            if (leanLinear != null) {
                double y = leanPull[depth][i] / pivot[depth];
                lean = leanValue + leanCharge[i] - y * y;
                leanFitted[depth] = y;
                double[] r = row[depth];
                double[] before = leanPull[depth];
                double[] after = leanPull[depth + 1];
                for (int j = next; j < n; j++) after[j] = before[j] - y * r[j];
            }
            node(depth + 1, next, value - z * z, charged + charge[i], lean, count);
        }
    }

    /** Sets of 1 to {@code together} out of {@code from}, in row {@code from} and column {@code together}. */
    private static double[][] choices(int most, int together) {
        double[][] sets = new double[most + 1][together + 1];
        // those without the last, those with it, and it alone
        for (int from = 1; from <= most; from++)
            for (int k = 1; k <= together; k++) sets[from][k] = sets[from - 1][k] + sets[from - 1][k - 1] + 1;
        return sets;
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

    /**
     * Fills {@link #amount} with the unlimited optimum of the set shown. Returns 0 when all are above 0; otherwise by how
     * much the value rises at least when they may not be negative: the most that any one of them costs to be held at 0.
     */
    final double freeAmounts(int count) {
        return amounts(count, fitted);
    }

    /** The same for the second objective: its unlimited optimum, and the rise when amounts may not be negative. */
    final double leanAmounts(int count) {
        return amounts(count, leanFitted);
    }

    private double amounts(int count, double[] of) {
        boolean positive = true;
        for (int k = count - 1; k >= 0; k--) {
            double s = of[k];
            double[] r = row[k];
            for (int j = k + 1; j < count; j++) s -= r[member[j]] * amount[j];
            amount[k] = s / pivot[k];
            positive &= amount[k] > 0;
        }
        if (positive) return 0;
        double rise = Double.MIN_NORMAL;
        for (int i = 0; i < count; i++) {
            if (amount[i] > 0) continue;
            // Diagonal of the inverse: squared length of column i of the inverse factor.
            double sum = 0;
            for (int k = i; k < count; k++) {
                double s = k == i ? 1 : 0;
                for (int j = i; j < k; j++) s -= row[j][member[k]] * unit[j];
                unit[k] = s / pivot[k];
                sum += unit[k] * unit[k];
            }
            rise = Math.max(rise, amount[i] * amount[i] / sum);
        }
        return rise;
    }
}
