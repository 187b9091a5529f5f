package org.hazewright.optics;

/**
 * Efficiencies of one sphere: cross section over geometric cross section, and the mean cosine g of the scattering angle.
 *
 * <p>{@code qAbs} is its own figure and not qExt − qSca formed later, so that a weak absorber keeps its digits.
 */
public record Efficiencies(double qExt, double qSca, double qAbs, double g) {}
