package org.hazewright.optics;

/**
 * What a dilute population does to light, and how well that is known from the quadrature over sizes.
 *
 * @param optics coefficients in 1/cm per unit volume fraction
 * @param relativeError estimated relative error of the worst of the three coefficients: at most 1e-6, but for clear or weakly
 *     absorbing large spheres of high contrast, where it says how far the average came and is most often that of µa (see {@link
 *     Population})
 * @param spheres number of sizes that were computed
 */
public record PopulationAverage(ParticleOptics optics, double relativeError, int spheres) {}
