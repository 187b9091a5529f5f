package org.hazewright.optics;

/**
 * Cauchy's dispersion formula n = a + b/λ² + c/λ⁴, λ in nm; k = 0. Good away from absorption bands only, so the range it was
 * fitted on is part of it: a wavelength outside is a {@link Refusal}. Does not depend on temperature. Cauchy, Bull. Sci. Math. 14, 6, 1830
 * (from memory).
 *
 * @param a without unit
 * @param b in nm²
 * @param c in nm⁴
 */
public record CauchyIndex(String name, double a, double b, double c, double fromNm, double toNm)
        implements RefractiveIndex {
    public CauchyIndex {
        new DispersionForm(name, fromNm, toNm);
    }

    @Override
    public Index at(double wavelengthNm, double temperatureC) {
        new DispersionForm(name, fromNm, toNm).refuseOutside(wavelengthNm);
        double inverse = 1 / (wavelengthNm * wavelengthNm);
        return Index.real(a + inverse * (b + inverse * c));
    }
}
