package org.hazewright.search;

/**
 * The amounts whose worst miss max_j |Σ a_ij c_i − r_j|/τ_j is least, with the proof that no others do better.
 *
 * <p>The proof is the dual of the linear programme: {@code pointWeight} (signed, magnitudes summing to 1) says how the
 * targets pull against each other: positive where the value comes out too high. Any amounts within the limits have a worst
 * miss of at least {@code bound}; {@code value − bound} is the duality gap, without unit.
 *
 * @param members candidate indices with an amount above 0, ascending
 * @param amounts g/mL of each
 * @param value the least worst miss, in tolerances
 * @param bound proven lower bound of the same, for the candidates that were allowed
 * @param pointWeight dual of each point
 * @param volumeWeight fall of the worst miss per unit of added volume more, 0 when volume does not bind
 * @param upperWeight fall of the worst miss per g/mL that each candidate's own limit is raised (all candidates, by index)
 */
public record LeastWorstMiss(
        int[] members,
        double[] amounts,
        double value,
        double bound,
        double[] pointWeight,
        double volumeWeight,
        double[] upperWeight) {}
