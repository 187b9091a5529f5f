package org.hazewright.shelf;

import org.hazewright.optics.Refusal;

/**
 * Relative standard uncertainties (k = 1) of a lot's absorption and scattering coefficients, and their covariance.
 *
 * <p>One factor for each quantity, fully correlated over wavelength: the whole spectrum is off by the same share. Each lies in
 * [0, 1]. {@code correlation} between the two factors lies in [−1, 1] and is 0 unless a measurement tied them together.
 */
public record Uncertainty(double absorption, double scattering, double correlation) {
    public Uncertainty {
        Refusal.within("Relative uncertainty of absorption", absorption, 0, 1);
        Refusal.within("Relative uncertainty of scattering", scattering, 0, 1);
        Refusal.within("Correlation of absorption and scattering", correlation, -1, 1);
    }

    public Uncertainty(double absorption, double scattering) {
        this(absorption, scattering, 0);
    }
}
