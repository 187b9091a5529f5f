package org.hazewright.optics;

import java.util.Arrays;

/**
 * Dispersion by resonances: n² = a + Σ b λ²/(λ² − c), λ in µm, c in µm²; k = 0 (Sellmeier, Ann. Phys. 219, 272, 1871).
 *
 * <p>{@code b} and {@code c} have the same length, one pair a resonance. A pole (λ² = c) inside the validity range is refused.
 */
public final class SellmeierIndex implements RefractiveIndex {
    private final DispersionForm form;
    private final double a;
    private final double[] b;
    private final double[] c;

    public SellmeierIndex(String name, double a, double[] b, double[] c, double fromNm, double toNm) {
        this.form = new DispersionForm(name, fromNm, toNm);
        this.a = a;
        this.b = b.clone();
        this.c = c.clone();
        form.refusePoles(this.b, this.c);
    }

    @Override
    public Index at(double wavelengthNm, double temperatureC) {
        form.refuseOutside(wavelengthNm);
        double l2 = wavelengthNm * wavelengthNm * 1e-6;
        double n2 = a;
        for (int i = 0; i < b.length; i++) n2 += b[i] * l2 / (l2 - c[i]);
        return form.ofSquare(n2, wavelengthNm);
    }

    @Override
    public double fromNm() {
        return form.fromNm();
    }

    @Override
    public double toNm() {
        return form.toNm();
    }

    @Override
    public boolean equals(Object other) {
        return other instanceof SellmeierIndex o
                && form.equals(o.form)
                && a == o.a
                && Arrays.equals(b, o.b)
                && Arrays.equals(c, o.c);
    }

    @Override
    public int hashCode() {
        return 31 * (31 * form.hashCode() + Arrays.hashCode(b)) + Arrays.hashCode(c);
    }

    @Override
    public String toString() {
        return "SellmeierIndex[" + form + ", a=" + a + ", b=" + Arrays.toString(b) + ", c=" + Arrays.toString(c) + "]";
    }
}
