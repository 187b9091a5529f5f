package org.hazewright.desk.model;

import java.util.OptionalDouble;
import org.hazewright.brief.Point;
import org.hazewright.brief.Target;
import org.hazewright.optics.Figures;
import org.hazewright.optics.Refusal;

/** One wavelength of the table of targets (nm): what is wanted there in 1/cm, how far it may be off, and its weight. */
public record Row(
        double wavelengthNm,
        OptionalDouble muaPerCm,
        OptionalDouble muspPerCm,
        Allowed muaAllowed,
        Allowed muspAllowed,
        double weight) {

    public Row {
        if (!(wavelengthNm >= 200 && wavelengthNm <= 3000))
            throw new Refusal("A wavelength of " + Figures.plain(wavelengthNm)
                    + " nm is out of reach; type one between 200 and 3000 nm.");
        if (muaPerCm.isEmpty() && muspPerCm.isEmpty())
            throw new Refusal("Nothing would be wanted at " + Figures.plain(wavelengthNm)
                    + " nm; type µa or µs', or remove the wavelength.");
        check("µa", muaPerCm);
        check("µs'", muspPerCm);
        if (!(weight > 0 && weight <= 1000))
            throw new Refusal("A weight lies above 0 and is at most 1000; 1 is usual.");
    }

    private static void check(String sign, OptionalDouble v) {
        if (v.isPresent() && !(v.getAsDouble() >= 0 && v.getAsDouble() <= 1e5))
            throw new Refusal(
                    sign + " cannot be " + Figures.plain(v.getAsDouble()) + " /cm; type a number from 0 to 100000.");
    }

    public static Row of(Target t) {
        return new Row(
                t.wavelengthNm(),
                t.muaPerCm(),
                t.muspPerCm(),
                t.muaPerCm().isPresent()
                        ? Allowed.guessed(t.muaTolerancePerCm(), t.muaPerCm().getAsDouble())
                        : new Allowed.Share(0.05),
                t.muspPerCm().isPresent()
                        ? Allowed.guessed(t.muspTolerancePerCm(), t.muspPerCm().getAsDouble())
                        : new Allowed.Share(0.05),
                t.weight());
    }

    public Target target() {
        return new Target(
                wavelengthNm,
                muaPerCm,
                muspPerCm,
                muaPerCm.isPresent() ? half("µa", muaPerCm.getAsDouble(), muaAllowed) : 0,
                muspPerCm.isPresent() ? half("µs'", muspPerCm.getAsDouble(), muspAllowed) : 0,
                weight);
    }

    private double half(String sign, double wanted, Allowed allowed) {
        double half = allowed.perCm(wanted);
        if (!(half > 0))
            throw new Refusal(sign + " of 0 leaves a share no room; type its tolerance in /cm, such as 0.005 /cm.");
        return half;
    }

    public OptionalDouble wanted(Point.Quantity q) {
        return q == Point.Quantity.MUA ? muaPerCm : muspPerCm;
    }

    public Allowed allowed(Point.Quantity q) {
        return q == Point.Quantity.MUA ? muaAllowed : muspAllowed;
    }

    public Row withWanted(Point.Quantity q, OptionalDouble v) {
        return q == Point.Quantity.MUA
                ? new Row(wavelengthNm, v, muspPerCm, muaAllowed, muspAllowed, weight)
                : new Row(wavelengthNm, muaPerCm, v, muaAllowed, muspAllowed, weight);
    }

    public Row withAllowed(Point.Quantity q, Allowed a) {
        return q == Point.Quantity.MUA
                ? new Row(wavelengthNm, muaPerCm, muspPerCm, a, muspAllowed, weight)
                : new Row(wavelengthNm, muaPerCm, muspPerCm, muaAllowed, a, weight);
    }

    public Row withWavelength(double nm) {
        return new Row(nm, muaPerCm, muspPerCm, muaAllowed, muspAllowed, weight);
    }

    public Row withWeight(double w) {
        return new Row(wavelengthNm, muaPerCm, muspPerCm, muaAllowed, muspAllowed, w);
    }
}
