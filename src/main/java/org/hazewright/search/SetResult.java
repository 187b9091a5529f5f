package org.hazewright.search;

import java.util.List;

/**
 * What the search found.
 *
 * @param best least score among the sets that meet every target, or, when none does, least score of all
 * @param meets whether {@code best} meets every target
 * @param leastWorstMiss the best possible worst miss over all admissible sets, with its dual
 * @param runnersUp the next best sets, ascending in score, judged as {@code best} was; fewer when there are no more. No
 *     reported set has a member it could do without
 * @param admissible number of admissible sets, the empty one included
 * @param solved sets whose optimum was computed
 * @param cut sets that a bound, or a smaller set inside them, shows not to matter
 * @param programmes linear programmes of the worst miss that were solved
 * @param proven false when the search was stopped: then everything here is the best so far
 */
public record SetResult(
        SetSolution best,
        boolean meets,
        LeastWorstMiss leastWorstMiss,
        List<SetSolution> runnersUp,
        long admissible,
        long solved,
        long cut,
        long programmes,
        boolean proven) {

    /** The best possible worst miss over all admissible sets, in tolerances. */
    public double bestPossibleWorstMiss() {
        return leastWorstMiss.value();
    }
}
