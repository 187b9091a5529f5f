package org.hazewright.search;

import java.util.List;

/**
 * One set with its best amounts.
 *
 * @param members candidate indices, ascending; empty for the base alone
 * @param amounts c_i of each member, g/mL; empty when the limits contradict each other
 * @param status OPTIMAL, INFEASIBLE (the limits contradict: see {@code binding}) or UNSETTLED
 * @param bias Σ w_j miss_j²
 * @param ingredient Σ D_i c_i²
 * @param weighing Σ q_i
 * @param misses signed miss at each point, in tolerances
 * @param kktResidual as {@link ConvexProgramme.Solution#kktResidual}; 0 for the empty set
 * @param binding the limits in force, or those that contradict each other
 */
public record SetSolution(
        int[] members,
        double[] amounts,
        ConvexProgramme.Status status,
        double bias,
        double ingredient,
        double weighing,
        double[] misses,
        double kktResidual,
        List<Binding> binding) {

    /** What can stop an amount. */
    public enum Stop {
        /** the amount of candidate {@code index} at 0 */
        NOTHING,
        /** candidate {@code index} at its own upper limit */
        UPPER,
        /** no more volume beside the base; {@code index} is −1 */
        VOLUME,
        /** point {@code index} at the low edge of its tolerance */
        TOO_LOW,
        /** point {@code index} at the high edge of its tolerance */
        TOO_HIGH
    }

    /** A limit in force; the multiplier (≥ 0) is the fall of the score per unit by which it is loosened. */
    public record Binding(Stop stop, int index, double multiplier) {}

    /** J = bias + ingredient + weighing; infinite when the limits contradict each other. */
    public double score() {
        return bias + ingredient + weighing;
    }

    /** Largest |miss|, in tolerances; infinite when the limits contradict each other. */
    public double worstMiss() {
        if (status == ConvexProgramme.Status.INFEASIBLE) return Double.POSITIVE_INFINITY;
        double worst = 0;
        for (double m : misses) worst = Math.max(worst, Math.abs(m));
        return worst;
    }

    /** Whether every target lies inside its tolerance, to 1e-9 of the half-width. */
    public boolean meets() {
        return worstMiss() <= 1 + 1e-9;
    }
}
