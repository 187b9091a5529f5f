package org.hazewright.optics;

/**
 * What the index forms share: a name for messages, a validity range in nm, and the refusal outside it.
 */
record DispersionForm(String name, double fromNm, double toNm) {
    DispersionForm {
        Refusal.positive(name + ": lower wavelength of the validity range in nm", fromNm);
        Refusal.positive(name + ": upper wavelength of the validity range in nm", toNm);
        if (fromNm > toNm)
            throw new Refusal(name + " is said to hold from " + Plain.number(fromNm) + " to " + Plain.number(toNm)
                    + " nm; the first must not exceed the second.");
    }

    void refuseOutside(double wavelengthNm) {
        if (!(wavelengthNm >= fromNm && wavelengthNm <= toNm))
            throw new Refusal("Refractive index of " + name + " is not known at " + Plain.number(wavelengthNm)
                    + " nm: its source covers " + Plain.number(fromNm) + " to " + Plain.number(toNm)
                    + " nm, and nothing is extrapolated.");
    }

    /** The index whose square is given; a square that is not above 0 means that the form is used near one of its poles. */
    Index ofSquare(double nSquared, double wavelengthNm) {
        if (!(nSquared > 0) || Double.isInfinite(nSquared))
            throw new Refusal("The formula for the refractive index of " + name + " gives n² = " + nSquared + " at "
                    + Plain.number(wavelengthNm) + " nm; check its coefficients and its validity range.");
        return Index.real(Math.sqrt(nSquared));
    }

    /** Refuses coefficient lists of unequal length and poles λ² = c (µm²) inside the validity range. */
    void refusePoles(double[] b, double[] c) {
        if (b.length != c.length)
            throw new Refusal("The formula for the refractive index of " + name + " has " + b.length + " values b and "
                    + c.length + " values c; each b needs its c.");
        for (int i = 0; i < c.length; i++) {
            double poleNm = 1e3 * Math.sqrt(c[i]);
            if (!Double.isFinite(b[i]) || !Double.isFinite(c[i]))
                throw new Refusal("The formula for the refractive index of " + name + " has the coefficients b = "
                        + b[i] + " and c = " + c[i] + "; both must be finite.");
            if (poleNm >= fromNm && poleNm <= toNm && b[i] != 0)
                throw new Refusal("The formula for the refractive index of " + name + " has a pole at "
                        + Plain.number(poleNm) + " nm, inside its validity range " + Plain.number(fromNm) + " to "
                        + Plain.number(toNm) + " nm; check c (in µm²) and the range (in nm).");
        }
    }
}
