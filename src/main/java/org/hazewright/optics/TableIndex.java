package org.hazewright.optics;

/**
 * A measured refractive index: n, and k where the source gives it, linear between table rows.
 *
 * <p>{@code k} may be null, which means k = 0 over the range of n. With both, the range is where both are given. n above 0,
 * k not below 0.
 */
public final class TableIndex implements RefractiveIndex {
    private final DispersionForm form;
    private final Spectrum n;
    private final Spectrum k;

    /** {@code name} is the medium's, for messages. n and k without unit, over wavelengths in nm. */
    public TableIndex(String name, Spectrum n, Spectrum k) {
        double from = k == null ? n.fromNm() : Math.max(n.fromNm(), k.fromNm());
        double to = k == null ? n.toNm() : Math.min(n.toNm(), k.toNm());
        if (from > to)
            throw new Refusal(name + " has n from " + Plain.number(n.fromNm()) + " to " + Plain.number(n.toNm())
                    + " nm and k from " + Plain.number(k.fromNm()) + " to " + Plain.number(k.toNm())
                    + " nm; the two must overlap.");
        for (double value : n.values()) Refusal.positive(name + ": refractive index n", value);
        if (k != null) for (double value : k.values()) Refusal.notNegative(name + ": absorption index k", value);
        this.form = new DispersionForm(name, from, to);
        this.n = n;
        this.k = k;
    }

    @Override
    public Index at(double wavelengthNm, double temperatureC) {
        form.refuseOutside(wavelengthNm);
        return new Index(n.at(wavelengthNm), k == null ? 0 : k.at(wavelengthNm));
    }

    @Override
    public double fromNm() {
        return form.fromNm();
    }

    @Override
    public double toNm() {
        return form.toNm();
    }
}
