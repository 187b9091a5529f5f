package org.hazewright.mixture;

/**
 * One independent thing that is not known exactly, and what one standard uncertainty of it does to the prediction.
 *
 * @param name for a person: "ink-demo absorption", "weighing lipid-emulsion-20"
 * @param muaPerCm signed change of µa at each wavelength for +1 standard uncertainty, 1/cm
 * @param muspPerCm the same for µs'
 */
public record Cause(String name, Kind kind, double[] muaPerCm, double[] muspPerCm) {

    /** What kind of thing is not known. */
    public enum Kind {
        ABSORPTION,
        SCATTERING,
        WEIGHING,
        STOCK,
        DENSITY,
        VOLUME
    }

    public Cause {
        muaPerCm = muaPerCm.clone();
        muspPerCm = muspPerCm.clone();
    }
}
