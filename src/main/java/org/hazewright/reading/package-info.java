/**
 * What an instrument will show on a phantom: diffusion, slabs, photon packets, oximeter.
 *
 * <p>From the optical coefficients of a homogeneous medium ({@link org.hazewright.reading.Medium}) and a set-up ({@link
 * org.hazewright.reading.SetUp}) to readings that name their model and say whether it may be trusted there. Knows no files,
 * and grams only in {@link org.hazewright.reading.Phantom}. Inside, lengths are mm and times ps; coefficients are 1/cm at the
 * borders and 1/mm within. Start with
 * {@link org.hazewright.reading.Readings}; the physics is in {@link org.hazewright.reading.Diffusion}, {@link
 * org.hazewright.reading.AddingDoubling} and {@link org.hazewright.reading.PhotonPackets}.
 */
package org.hazewright.reading;
