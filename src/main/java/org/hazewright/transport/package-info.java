/**
 * How light moves through a homogeneous turbid medium and out of it: diffusion, adding–doubling, photon packets, and the straight
 * unscattered beam.
 *
 * <p>From a {@link org.hazewright.transport.Medium} to reflectance, transmittance, times of flight and phases. Knows no instrument,
 * recipe or file. Inside, lengths are mm and times ps; coefficients are 1/cm at the borders and 1/mm within. The three models are
 * {@link org.hazewright.transport.Diffusion}, {@link org.hazewright.transport.AddingDoubling} and {@link
 * org.hazewright.transport.PhotonPackets}; what they assume at the surface is a {@link org.hazewright.transport.Boundary}.
 */
package org.hazewright.transport;
