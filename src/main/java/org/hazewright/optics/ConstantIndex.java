package org.hazewright.optics;

/**
 * One refractive index n + ik for a whole wavelength range: for media whose source gives a single figure.
 *
 * <p>n above 0, k not below 0; a wavelength outside {@code fromNm} to {@code toNm} is a {@link Refusal}. Does not depend on temperature.
 */
public record ConstantIndex(String name, double n, double k, double fromNm, double toNm) implements RefractiveIndex {
    public ConstantIndex {
        new DispersionForm(name, fromNm, toNm);
        new Index(n, k);
    }

    @Override
    public Index at(double wavelengthNm, double temperatureC) {
        new DispersionForm(name, fromNm, toNm).refuseOutside(wavelengthNm);
        return new Index(n, k);
    }
}
