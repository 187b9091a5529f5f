package org.hazewright.optics;

/**
 * Efficiencies of one sphere: cross section over geometric cross section, and the mean cosine g of the scattering angle.
 *
 * <p>{@code qAbs} is its own figure and not qExt − qSca formed later, so that a weak absorber keeps its digits.
 *
 * @param qExt extinction: qSca + qAbs
 * @param qSca scattering
 * @param qAbs absorption
 * @param g mean cosine, −1 to 1; 0 for a sphere that scatters nothing
 */
public record Efficiencies(double qExt, double qSca, double qAbs, double g) {}
