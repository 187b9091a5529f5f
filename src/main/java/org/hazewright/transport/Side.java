package org.hazewright.transport;

/** Where the light is picked up: on the surface the beam enters, or on the far surface of a slab. */
public enum Side {
    REFLECTANCE,
    TRANSMITTANCE
}
