/**
 * What an instrument will show on a phantom: signals at distances, slopes, modulated and pulsed light, slabs, oximeters.
 *
 * <p>From the optical coefficients of a medium and a set-up ({@link org.hazewright.reading.SetUp}) to readings that name their model
 * and say whether it may be trusted there. Knows no files, and grams only in {@link org.hazewright.reading.Phantom}. Start with
 * {@link org.hazewright.reading.Readings}; how light gets there is the work of {@code transport}.
 */
package org.hazewright.reading;
