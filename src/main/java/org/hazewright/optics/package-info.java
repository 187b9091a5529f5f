/**
 * Light meets matter: spectra, refractive index, Mie scattering, populations of particles, crowding.
 *
 * <p>The ground floor. Nothing here knows of ingredients, grams or files; everything is a function of wavelength in nm,
 * refractive index and size. Start with {@link org.hazewright.optics.Mie} for one sphere and {@link
 * org.hazewright.optics.Population} for many.
 */
package org.hazewright.optics;
