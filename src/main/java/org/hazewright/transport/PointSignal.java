package org.hazewright.transport;

import org.hazewright.optics.Refusal;

/**
 * The signal per mm² at a distance ρ from the beam, for a steady or sinusoidal source: κ² = (µa + iω/v)/D, complex.
 *
 * <p>Two exact forms of one field. Near the beam, mirror images of the source; their sum loses all digits where the slab is
 * thin against ρ, and there the waves across the slab are summed instead:
 * <pre>
 *   Φ = 1/(4πD) Σ ± exp(−κ r)/r
 *   Φ = 1/(πDL) Σ sin(p(z_s + z_b)) sin(p(z + z_b)) K₀(√(κ² + p²) ρ),   p = nπ/L, L = s + 2 z_b
 * </pre>
 * Images: Contini, Martelli &amp; Zaccanti, Appl. Opt. 36, 4587 (1997), eqs 36–46. Truncated at 1e−13 of the sum, except within
 * ρ &lt; L/20 of a slab that hardly absorbs: there the m-th images fall as 1/m³ only, and what lies beyond 1000 of them is added
 * as such a tail, to 1e−7.
 */
final class PointSignal {
    private static final double NEGLIGIBLE = 1e-13;
    private static final int PAIRS = 1000;
    private final Diffusion d;
    private final double kRe;
    private final double kIm;
    double re;
    double im;

    /** {@code omegaPerPs} is the angular frequency in 1/ps; 0 for a steady source. */
    PointSignal(Diffusion d, double omegaPerPs) {
        this(d, d.medium().muaPerMm(), omegaPerPs / d.medium().speedMmPerPs());
    }

    /** Complex absorption in 1/mm, real part 0 or above unless the slab keeps the field bounded. */
    PointSignal(Diffusion d, double muaRe, double muaIm) {
        this.d = d;
        double modulus = Math.sqrt(Math.hypot(muaRe, muaIm) / d.constantMm);
        double half = 0.5 * Math.atan2(muaIm, muaRe);
        kRe = modulus * Math.cos(half);
        kIm = modulus * Math.sin(half);
    }

    /** Im κ: phase lag of a plane wave, rad/mm. */
    double lagPerMm() {
        return kIm;
    }

    /** Leaves the complex signal in {@link #re} and {@link #im}, time going as exp(+iωt). */
    void at(double rhoMm, Side side) {
        Refusal.notNegative("Distance in mm", rhoMm);
        if (side == Side.TRANSMITTANCE && !d.slab())
            throw new Refusal("A semi-infinite medium has no far side; give the set-up a thickness_mm.");
        re = 0;
        im = 0;
        if (d.slab() && acrossIsBetter(rhoMm)) across(rhoMm, side);
        else images(rhoMm, side);
        re *= d.strength;
        im *= d.strength;
    }

    /**
     * Images are quicker where absorption ends their sum early, and lose as many digits as the slab's slowest wave falls faster
     * than the direct one; waves need a distance to fall over.
     */
    private boolean acrossIsBetter(double rho) {
        double whole = d.extrapolatedThicknessMm();
        if (kRe * whole < 0.5 && rho >= 0.05 * whole) return true;
        double lost = (Math.hypot(kRe, Math.PI / whole) - kRe) * rho;
        return rho >= 0.5 * whole && (kRe * whole < 2 || lost > 7);
    }

    private void images(double rho, Side side) {
        double zs = d.sourceDepthMm;
        double zb = d.extrapolationMm;
        boolean far = side == Side.TRANSMITTANCE;
        double z = far ? d.thicknessMm() : 0;
        double period = d.slab() ? 2 * d.extrapolatedThicknessMm() : 0;
        pair(rho, z, zs, -2 * zb - zs, far);
        if (!d.slab()) return;
        for (int m = 1; m <= PAIRS; m++) {
            double beforeRe = re;
            double beforeIm = im;
            pair(rho, z, m * period + zs, m * period - 2 * zb - zs, far);
            pair(rho, z, -m * period + zs, -m * period - 2 * zb - zs, far);
            double step = Math.abs(re - beforeRe) + Math.abs(im - beforeIm);
            if (step <= NEGLIGIBLE * (Math.abs(re) + Math.abs(im))) return;
            if (m == PAIRS) {
                double tail = 0.5 * m - 0.5;
                re += tail * (re - beforeRe);
                im += tail * (im - beforeIm);
            }
        }
    }

    private void pair(double rho, double z, double source, double sink, boolean far) {
        image(rho, z, source, 1, far);
        image(rho, z, sink, -1, far);
    }

    private void image(double rho, double z, double zi, double sign, boolean far) {
        double dz = zi - z;
        double r = Math.sqrt(rho * rho + dz * dz);
        double e = sign * Math.exp(-kRe * r) / (4 * Math.PI * r);
        double c = kIm == 0 ? e : e * Math.cos(kIm * r);
        double s = kIm == 0 ? 0 : -e * Math.sin(kIm * r);
        double fluence = d.fluenceShare / d.constantMm;
        double outward = d.fluxShare * (far ? -dz : dz) / r;
        double fRe = fluence + outward * (kRe + 1 / r);
        double fIm = outward * kIm;
        re += fRe * c - fIm * s;
        im += fRe * s + fIm * c;
    }

    private void across(double rho, Side side) {
        double whole = d.extrapolatedThicknessMm();
        double zs = d.sourceDepthMm + d.extrapolationMm;
        double zb = d.extrapolationMm;
        boolean far = side == Side.TRANSMITTANCE;
        double k2Re = kRe * kRe - kIm * kIm;
        double k2Im = 2 * kRe * kIm;
        double scale = 1 / (Math.PI * whole);
        BesselK0 k0 = new BesselK0();
        double first = 0;
        for (int n = 1; n <= 2000; n++) {
            double p = n * Math.PI / whole;
            double a = k2Re + p * p;
            double modulus = Math.sqrt(Math.hypot(a, k2Im));
            double half = 0.5 * Math.atan2(k2Im, a);
            k0.at(modulus * Math.cos(half) * rho, modulus * Math.sin(half) * rho);
            // symmetric slab: the wave at the far side is the near one, with alternating sign
            double sign = far && n % 2 == 0 ? -1 : 1;
            double weight = scale
                    * sign
                    * Math.sin(p * zs)
                    * (d.fluenceShare / d.constantMm * Math.sin(p * zb) + d.fluxShare * p * Math.cos(p * zb));
            re += weight * k0.re;
            im += weight * k0.im;
            double size = (p + 1 / zb) * Math.hypot(k0.re, k0.im);
            if (n == 1) first = size;
            else if (size <= 1e-16 * first) return;
        }
    }
}
