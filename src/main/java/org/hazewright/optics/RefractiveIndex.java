package org.hazewright.optics;

/**
 * Refractive index of a medium over wavelength (nm, in vacuum) and temperature (°C).
 *
 * <p>Each form states its validity range; outside it {@link #at} throws a {@link Refusal} that names the medium and the range.
 */
public interface RefractiveIndex {
    Index at(double wavelengthNm, double temperatureC);

    double fromNm();

    double toNm();

    default boolean covers(double nm) {
        return nm >= fromNm() && nm <= toNm();
    }
}
