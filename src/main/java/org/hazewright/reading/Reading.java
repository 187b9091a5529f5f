package org.hazewright.reading;

/**
 * One thing that an instrument will show, with the model it comes from and whether that model may be trusted here.
 *
 * <p>{@code distanceMm} is null where the set-up has none; {@code wavelengthNm} is null where the reading needs several; {@code
 * value} is null for a curve and {@code curve} for a value; {@code u}, the standard uncertainty, is null where none was asked
 * for or none is known; {@code note} is null or a plain sentence. NaN never appears: a value that cannot be had is a note.
 */
public record Reading(
        String setUp,
        SetUp.Kind kind,
        Double wavelengthNm,
        Double distanceMm,
        Quantity quantity,
        Double value,
        Double u,
        Curve curve,
        String model,
        boolean insideRange,
        String note) {

    /** A curve: y over x with their units, and the standard uncertainty of y where known, else null. */
    public record Curve(String xUnit, double[] x, String yUnit, double[] y, double[] u) {}

    public String unit() {
        return curve == null ? quantity.unit() : curve.yUnit();
    }

    Reading withNote(String more) {
        if (more == null) return this;
        String both = note == null ? more : note + " " + more;
        return new Reading(setUp, kind, wavelengthNm, distanceMm, quantity, value, u, curve, model, insideRange, both);
    }
}
