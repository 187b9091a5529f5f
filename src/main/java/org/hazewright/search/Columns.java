package org.hazewright.search;

import java.util.Arrays;
import org.hazewright.search.SetProblem.Candidate;
import org.hazewright.search.SetProblem.Conflict;
import org.hazewright.search.SetProblem.Group;
import org.hazewright.search.SetProblem.Point;

/**
 * The problem laid out for the search: usable candidates side by side, group after group, and the two Gram matrices.
 *
 * <p>A position is a place in this order; {@link #index} leads back to the candidate. Candidates that no admissible set can
 * hold (no reach, or a group of which none is allowed) are left out. Targets enter as misses, volumes as shares of what may
 * be added. After this the cost of a set does not depend on the number of points, except where misses are checked.
 */
final class Columns {
    final SetProblem problem;
    final int points;
    final int size;
    final int[] index;
    final double[] residual;
    final double[] weight;
    /** a_ij/τ_j for each position, per g/mL. */
    final double[][] miss;

    final double[] missSize;
    /** v_i over the volume that may be added. */
    final double[] volume;

    /** Most g/mL that the candidate's own limit and the volume allow. */
    final double[] reach;

    final double[] ingredientTerm;
    final double[] weighing;
    final int[] group;
    /** First position after the candidate's group. */
    final int[] groupEnd;

    final int[] most;
    final int mostTogether;
    /** Conflicts by position, or null when there are none. */
    final boolean[][] excludes;

    /** Score of the base alone, Σ w_j r_j²/τ_j². */
    final double alone;

    final double weightSum;

    Columns(SetProblem problem) {
        this.problem = problem;
        points = problem.points().size();
        residual = new double[points];
        weight = new double[points];
        double sum = 0;
        double weights = 0;
        for (int j = 0; j < points; j++) {
            Point p = problem.points().get(j);
            residual[j] = p.residual() / p.halfWidth();
            weight[j] = p.weight();
            sum += weight[j] * residual[j] * residual[j];
            weights += weight[j];
        }
        alone = sum;
        weightSum = weights;
        int all = problem.candidates().size();
        int[] place = new int[all];
        Arrays.fill(place, -1);
        index = new int[all];
        int count = 0;
        for (Group g : Group.values())
            for (int i = 0; i < all; i++) {
                Candidate c = problem.candidates().get(i);
                if (c.group() != g || problem.reach(i) <= 0 || problem.limits().most(g) == 0) continue;
                place[i] = count;
                index[count++] = i;
            }
        size = count;
        mostTogether = Math.min(size, problem.limits().mostTogether());
        miss = new double[size][points];
        missSize = new double[size];
        volume = new double[size];
        reach = new double[size];
        ingredientTerm = new double[size];
        weighing = new double[size];
        group = new int[size];
        groupEnd = new int[size];
        most = new int[Group.values().length];
        for (Group g : Group.values()) most[g.ordinal()] = problem.limits().most(g);
        for (int i = 0; i < size; i++) {
            Candidate c = problem.candidates().get(index[i]);
            double[] effect = c.effect();
            for (int j = 0; j < points; j++) {
                miss[i][j] = effect[j] / problem.points().get(j).halfWidth();
                missSize[i] = Math.max(missSize[i], Math.abs(miss[i][j]));
            }
            volume[i] = c.specificVolume() / problem.limits().addedVolume();
            reach[i] = problem.reach(index[i]);
            ingredientTerm[i] = c.ingredientTerm();
            weighing[i] = c.weighingTerm();
            group[i] = c.group().ordinal();
        }
        for (int i = size - 1; i >= 0; i--)
            groupEnd[i] = i + 1 < size && group[i + 1] == group[i] ? groupEnd[i + 1] : i + 1;
        boolean[][] pairs = null;
        for (Conflict c : problem.limits().conflicts()) {
            int a = place[c.first()];
            int b = place[c.second()];
            if (a < 0 || b < 0) continue;
            if (pairs == null) pairs = new boolean[size][size];
            pairs[a][b] = true;
            pairs[b][a] = true;
        }
        excludes = pairs;
    }

    /** The bias alone, or the whole score but for the weighing constants, as a quadratic in scaled amounts. */
    Gram gram(boolean withIngredientTerm) {
        return new Gram(this, withIngredientTerm);
    }

    /** Candidate indices, ascending, of positions {@code set[0..count)}. */
    int[] members(int[] set, int count) {
        int[] members = new int[count];
        for (int k = 0; k < count; k++) members[k] = index[set[k]];
        Arrays.sort(members);
        return members;
    }

    /** Positions, ascending, of candidate indices. */
    int[] positions(int[] members) {
        int[] set = new int[members.length];
        for (int k = 0; k < set.length; k++) for (int i = 0; i < size; i++) if (index[i] == members[k]) set[k] = i;
        Arrays.sort(set);
        return set;
    }

    /** Whether positions, ascending, are an admissible set. */
    boolean admits(int[] set) {
        if (set.length > mostTogether) return false;
        int[] of = new int[most.length];
        for (int k = 0; k < set.length; k++) {
            if (k > 0 && set[k] == set[k - 1] || ++of[group[set[k]]] > most[group[set[k]]]) return false;
            if (excludes != null) for (int l = 0; l < k; l++) if (excludes[set[k]][set[l]]) return false;
        }
        return true;
    }

    /** Whether another candidate could join the set without breaking a limit on numbers or a conflict. */
    boolean canGrow(int[] set, int count) {
        if (count >= mostTogether) return false;
        int[] of = new int[most.length];
        for (int k = 0; k < count; k++) of[group[set[k]]]++;
        for (int i = 0; i < size; i++) {
            if (of[group[i]] >= most[group[i]]) continue;
            boolean free = true;
            for (int k = 0; k < count && free; k++) free = set[k] != i && (excludes == null || !excludes[i][set[k]]);
            if (free) return true;
        }
        return false;
    }

    /**
     * xᵀHx − 2bᵀx + start in amounts x_i = c_i/scale_i, H with a unit diagonal (a column of zeros keeps a one there, with
     * nothing else in its row).
     */
    static final class Gram {
        final int n;
        final double[] scale;
        final double[] h;
        final double[] b;
        final double[] reach;
        final double start;

        private Gram(Columns c, boolean withIngredientTerm) {
            n = c.size;
            start = c.alone;
            scale = new double[n];
            h = new double[n * n];
            b = new double[n];
            reach = new double[n];
            double[] weighted = new double[c.points];
            for (int i = 0; i < n; i++) {
                double[] mi = c.miss[i];
                double own = withIngredientTerm ? c.ingredientTerm[i] : 0;
                double linear = 0;
                for (int j = 0; j < c.points; j++) {
                    weighted[j] = c.weight[j] * mi[j];
                    own += weighted[j] * mi[j];
                    linear += weighted[j] * c.residual[j];
                }
                scale[i] = own > 0 ? 1 / Math.sqrt(own) : 1;
                b[i] = linear * scale[i];
                reach[i] = c.reach[i] / scale[i];
                h[i * n + i] = 1;
                for (int k = 0; k < i; k++) {
                    double[] mk = c.miss[k];
                    double sum = 0;
                    for (int j = 0; j < c.points; j++) sum += weighted[j] * mk[j];
                    h[i * n + k] = sum * scale[i] * scale[k];
                    h[k * n + i] = h[i * n + k];
                }
            }
        }
    }
}
