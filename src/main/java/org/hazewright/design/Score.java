package org.hazewright.design;

/**
 * What a recipe is judged by: the expected squared miss J in units of tolerance, and its three parts.
 *
 * <p>J = Σ_j w_j [(µ_j − t_j)² + Σ_i (c_i κ_ij u_i)² + Σ_i (κ_ij ∂c_i/∂m_i u(m_i))²]/τ_j²: what it is off by plan ({@code bias}),
 * what is not known of the ingredients, and what the balance adds. Sums run over the points j and the chosen ingredients i; the
 * base is not chosen. Without unit.
 */
public record Score(double bias, double ingredient, double weighing) {
    public double total() {
        return bias + ingredient + weighing;
    }
}
