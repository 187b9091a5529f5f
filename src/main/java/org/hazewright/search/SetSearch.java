package org.hazewright.search;

import java.util.ArrayList;
import java.util.List;
import java.util.function.BooleanSupplier;
import java.util.function.Consumer;
import org.hazewright.optics.Refusal;
import org.hazewright.search.ConvexProgramme.Limit;
import org.hazewright.search.ConvexProgramme.Status;
import org.hazewright.search.SetProblem.Candidate;
import org.hazewright.search.SetProblem.Point;
import org.hazewright.search.SetSolution.Binding;
import org.hazewright.search.SetSolution.Stop;

/**
 * The exact search over all admissible sets of a {@link SetProblem}.
 *
 * <p>Found, and proven by going through every set or by bounds: the least score among the sets that meet every target; when
 * none does, the least score of all; always the best possible worst miss with its dual. Deterministic: ties go to the
 * smaller set, then to the lowest indices, and a set with a member it can do without is never reported.
 */
public final class SetSearch {
    /** How far a search is: sets gone through in the present of its three stages, of so many; best so far. */
    public record Progress(int stage, long considered, long admissible, double bestScore, double bestWorstMiss) {}

    private final SetProblem problem;
    private final Columns columns;

    public SetSearch(SetProblem problem) {
        this.problem = problem;
        this.columns = new Columns(problem);
    }

    public SetProblem problem() {
        return problem;
    }

    /** The whole search with {@code topK} runners-up, never stopped. */
    public SetResult run(int topK) {
        return run(topK, () -> false, p -> {});
    }

    /**
     * The whole search.
     *
     * @param topK most runners-up wanted, ≥ 0; the more, the less can be cut
     * @param stop asked often; once true the search ends with the best so far, marked as not proven
     * @param progress told now and then, on the calling thread
     */
    public SetResult run(int topK, BooleanSupplier stop, Consumer<Progress> progress) {
        if (topK < 0) throw new Refusal("The number of runners-up is " + topK + "; it must be 0 or above.");
        return new SearchRun(this, columns, topK, stop, progress).run();
    }

    /** The best possible worst miss over all admissible sets alone; not proven when stopped, which {@code stop} then tells. */
    public LeastWorstMiss leastWorstMiss(BooleanSupplier stop) {
        return new SearchRun(this, columns, 0, stop, p -> {}).leastWorstMiss();
    }

    /** Number of admissible sets, the empty one included; at most {@link Long#MAX_VALUE}. */
    public long admissible() {
        return SetCount.of(columns);
    }

    /**
     * The best amounts of one set, whatever the limits on numbers: score with the set's own weighing terms, every member
     * charged even if its amount comes out as 0.
     *
     * @param set candidate indices, ascending, each once
     * @param withTolerances whether every target must lie inside its tolerance
     */
    public SetSolution solve(int[] set, boolean withTolerances) {
        for (int k = 0; k < set.length; k++)
            if (set[k] < 0 || set[k] >= problem.candidates().size() || k > 0 && set[k] <= set[k - 1])
                throw new Refusal("A set is made of candidate numbers from 0 to "
                        + (problem.candidates().size() - 1) + ", ascending; found " + java.util.Arrays.toString(set)
                        + ".");
        int n = set.length;
        int m = problem.points().size();
        double weighing = 0;
        for (int i : set) weighing += problem.candidates().get(i).weighingTerm();
        if (n == 0) return alone(withTolerances);
        double[][] miss = new double[n][];
        double[][] g = new double[n][n];
        double[] a = new double[n];
        double[] upper = new double[n];
        double[] volume = new double[n];
        double start = weighing;
        for (Point p : problem.points()) start += p.weight() * square(p.residual() / p.halfWidth());
        for (int i = 0; i < n; i++) {
            Candidate c = problem.candidates().get(set[i]);
            upper[i] = c.upper();
            volume[i] = c.specificVolume();
            miss[i] = c.effect();
            for (int j = 0; j < m; j++) {
                Point p = problem.points().get(j);
                miss[i][j] /= p.halfWidth();
                a[i] += 2 * p.weight() * miss[i][j] * p.residual() / p.halfWidth();
            }
            for (int k = 0; k <= i; k++) {
                double sum = 0;
                for (int j = 0; j < m; j++) sum += problem.points().get(j).weight() * miss[i][j] * miss[k][j];
                g[i][k] = 2 * sum;
                g[k][i] = 2 * sum;
            }
            g[i][i] += 2 * c.ingredientTerm();
        }
        List<Limit> limits = new ArrayList<>();
        limits.add(new Limit(volume, Double.NEGATIVE_INFINITY, problem.limits().addedVolume()));
        if (withTolerances)
            for (int j = 0; j < m; j++) {
                double[] row = new double[n];
                for (int i = 0; i < n; i++) row[i] = miss[i][j];
                double wanted = problem.points().get(j).residual()
                        / problem.points().get(j).halfWidth();
                limits.add(new Limit(row, wanted - 1, wanted + 1));
            }
        ConvexProgramme.Solution s =
                ConvexProgramme.ofAmounts(g, a, start, upper, limits).solve();
        List<Binding> binding = new ArrayList<>();
        for (ConvexProgramme.Binding b : s.binding())
            binding.add(
                    switch (b.side()) {
                        case LOWER -> new Binding(Stop.NOTHING, set[b.index()], b.multiplier());
                        case UPPER -> new Binding(Stop.UPPER, set[b.index()], b.multiplier());
                        case LOW -> point(Stop.TOO_LOW, b);
                        case HIGH ->
                            b.index() == 0 ? new Binding(Stop.VOLUME, -1, b.multiplier()) : point(Stop.TOO_HIGH, b);
                    });
        if (s.x() == null)
            return new SetSolution(
                    set.clone(),
                    new double[0],
                    s.status(),
                    Double.POSITIVE_INFINITY,
                    0,
                    weighing,
                    new double[0],
                    Double.NaN,
                    binding);
        double bias = 0;
        double ingredient = 0;
        double[] misses = problem.misses(set, s.x());
        for (int j = 0; j < m; j++) bias += problem.points().get(j).weight() * square(misses[j]);
        for (int i = 0; i < n; i++)
            ingredient += problem.candidates().get(set[i]).ingredientTerm() * square(s.x()[i]);
        return new SetSolution(
                set.clone(), s.x(), s.status(), bias, ingredient, weighing, misses, s.kktResidual(), binding);
    }

    private Binding point(Stop stop, ConvexProgramme.Binding b) {
        int j = b.index() - 1;
        return new Binding(stop, j, b.multiplier() / problem.points().get(j).halfWidth());
    }

    private SetSolution alone(boolean withTolerances) {
        double[] misses = problem.misses(new int[0], new double[0]);
        double bias = 0;
        List<Binding> binding = new ArrayList<>();
        for (int j = 0; j < misses.length; j++) {
            bias += problem.points().get(j).weight() * square(misses[j]);
            if (withTolerances && Math.abs(misses[j]) > 1)
                binding.add(new Binding(misses[j] > 0 ? Stop.TOO_HIGH : Stop.TOO_LOW, j, 1));
        }
        if (!binding.isEmpty())
            return new SetSolution(
                    new int[0],
                    new double[0],
                    Status.INFEASIBLE,
                    Double.POSITIVE_INFINITY,
                    0,
                    0,
                    new double[0],
                    Double.NaN,
                    binding);
        return new SetSolution(new int[0], new double[0], Status.OPTIMAL, bias, 0, 0, misses, 0, List.of());
    }

    private static double square(double v) {
        return v * v;
    }
}
