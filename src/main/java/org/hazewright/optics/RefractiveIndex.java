package org.hazewright.optics;

/**
 * Refractive index of a medium over wavelength (nm, in vacuum) and temperature (°C).
 *
 * <p>Each form states its validity range; outside it {@link #at} throws a {@link Refusal} that names the medium and the range.
 */
public interface RefractiveIndex {
    /** The index, relative to vacuum, at a wavelength in nm and a temperature in °C. A form without a temperature of its own ignores it. */
    Index at(double wavelengthNm, double temperatureC);

    /** Shortest wavelength in nm that the source covers. */
    double fromNm();

    /** Longest wavelength in nm that the source covers. */
    double toNm();

    /** Whether a wavelength in nm can be asked for. */
    default boolean covers(double nm) {
        return nm >= fromNm() && nm <= toNm();
    }
}
