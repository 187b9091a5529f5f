package org.hazewright.optics;

import java.util.Arrays;

/**
 * Dispersion by resonances of a medium that does not absorb: n² = a + Σ b/(λ² − c), λ the vacuum wavelength in µm, b and c in µm²; k = 0.
 *
 * <p>Papers print the formula in two ways. {@link #sellmeier} takes n² = a + Σ b λ²/(λ² − c), which is the same with a + Σ b for a
 * and b c for b, since λ²/(λ² − c) = 1 + c/(λ² − c); {@link #pole} takes it as it stands above. {@code b} and {@code c} have the
 * same length, one pair a resonance at λ = √c. Refused: a resonance of any strength inside the validity range (nm), and
 * wavelengths outside it. Does not depend on temperature.
 */
public final class ResonanceIndex implements RefractiveIndex {
    private final DispersionForm form;
    private final double a;
    private final double[] b;
    private final double[] c;

    private ResonanceIndex(DispersionForm form, double a, double[] b, double[] c) {
        this.form = form;
        this.a = a;
        this.b = b;
        this.c = c;
    }

    /**
     * n² = a + Σ b/(λ² − c): the form of, for instance, rutile in DeVore, J. Opt. Soc. Am. 41, 416, 1951.
     *
     * @param name of the medium, for messages
     * @param a without unit
     * @param b in µm²
     * @param c in µm²
     */
    public static ResonanceIndex pole(String name, double a, double[] b, double[] c, double fromNm, double toNm) {
        DispersionForm form = new DispersionForm(name, fromNm, toNm);
        form.refusePoles(b, c);
        return new ResonanceIndex(form, a, b.clone(), c.clone());
    }

    /**
     * n² = a + Σ b λ²/(λ² − c): Sellmeier, Ann. Phys. 219, 272, 1871; the form of, for instance, fused silica in Malitson, J. Opt.
     * Soc. Am. 55, 1205, 1965.
     *
     * @param name of the medium, for messages
     * @param a without unit, often 1
     * @param b without unit
     * @param c in µm²: the square of the resonance wavelength, which some papers print instead
     */
    public static ResonanceIndex sellmeier(String name, double a, double[] b, double[] c, double fromNm, double toNm) {
        DispersionForm form = new DispersionForm(name, fromNm, toNm);
        form.refusePoles(b, c);
        double sum = a;
        double[] strength = new double[b.length];
        for (int i = 0; i < b.length; i++) {
            sum += b[i];
            strength[i] = b[i] * c[i];
        }
        return new ResonanceIndex(form, sum, strength, c.clone());
    }

    @Override
    public Index at(double wavelengthNm, double temperatureC) {
        form.refuseOutside(wavelengthNm);
        double l2 = wavelengthNm * wavelengthNm * 1e-6;
        double n2 = a;
        for (int i = 0; i < b.length; i++) n2 += b[i] / (l2 - c[i]);
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
        return other instanceof ResonanceIndex o
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
        return "ResonanceIndex[" + form + ", a=" + a + ", b=" + Arrays.toString(b) + ", c=" + Arrays.toString(c) + "]";
    }
}
