package org.hazewright.optics;

import java.util.Arrays;

/**
 * A measured function of wavelength: a table, linear between its points, refused outside them.
 *
 * <p>Wavelengths in nm, strictly ascending, at least two; values finite. Linear interpolation is stated here once and used
 * everywhere: it never leaves the range of the two neighbours, so a measured absorption cannot turn negative between points.
 * Nothing is extrapolated: {@link #at} outside [{@link #fromNm}, {@link #toNm}] throws a {@link Refusal} that names the table
 * and its range.
 */
public final class Spectrum {
    private final String name;
    private final double[] wavelengthNm;
    private final double[] value;

    /** {@code name} is what a person would look for: the file, or the quantity. */
    public Spectrum(String name, double[] wavelengthNm, double[] value) {
        if (wavelengthNm.length != value.length)
            throw new Refusal(name + " has " + wavelengthNm.length + " wavelengths and " + value.length + " values.");
        if (wavelengthNm.length < 2)
            throw new Refusal(name + " has " + wavelengthNm.length + " rows; a spectrum needs at least 2.");
        for (int i = 0; i < value.length; i++) {
            Refusal.positive(name + ": wavelength in nm", wavelengthNm[i]);
            if (!Double.isFinite(value[i]))
                throw new Refusal(
                        name + " has the value " + value[i] + " at " + wavelengthNm[i] + " nm; it must be finite.");
            if (i > 0 && wavelengthNm[i] <= wavelengthNm[i - 1])
                throw new Refusal(name + " goes from " + wavelengthNm[i - 1] + " to " + wavelengthNm[i]
                        + " nm; wavelengths must ascend, each once.");
        }
        this.name = name;
        this.wavelengthNm = wavelengthNm.clone();
        this.value = value.clone();
    }

    /** The file, or the quantity, as messages name it. */
    public String name() {
        return name;
    }

    /** First wavelength in nm. */
    public double fromNm() {
        return wavelengthNm[0];
    }

    /** Last wavelength in nm. */
    public double toNm() {
        return wavelengthNm[wavelengthNm.length - 1];
    }

    /** Whether a wavelength in nm lies within the table. */
    public boolean covers(double nm) {
        return nm >= fromNm() && nm <= toNm();
    }

    /** The value at a wavelength in nm, linear between neighbours. */
    public double at(double nm) {
        if (!covers(nm))
            throw new Refusal(name + " has no value at " + plain(nm) + " nm: it covers " + plain(fromNm()) + " to "
                    + plain(toNm()) + " nm, and nothing is extrapolated.");
        int i = Arrays.binarySearch(wavelengthNm, nm);
        if (i >= 0) return value[i];
        int right = -i - 1;
        double t = (nm - wavelengthNm[right - 1]) / (wavelengthNm[right] - wavelengthNm[right - 1]);
        return value[right - 1] + t * (value[right] - value[right - 1]);
    }

    /** The table's wavelengths in nm. */
    public double[] wavelengthsNm() {
        return wavelengthNm.clone();
    }

    /** The table's values, in whatever unit it was made with. */
    public double[] values() {
        return value.clone();
    }

    private static String plain(double nm) {
        return nm == Math.rint(nm) ? Long.toString((long) nm) : Double.toString(nm);
    }
}
