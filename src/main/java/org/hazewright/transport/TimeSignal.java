package org.hazewright.transport;

import org.hazewright.optics.Refusal;

/**
 * The answer to a short pulse: diffuse signal per mm² and ps at a distance ρ (mm) and time t (ps) after the pulse enters.
 *
 * <p>0 for t ≤ 0. The field is a spreading Gaussian along the surface times the field across the medium, which is summed over
 * mirror images at early times and over decaying waves across the slab at late ones; both are exact and meet to 1e−13:
 * <pre>
 *   Φ = v exp(−µa v t − ρ²/4Dvt)/(4πDvt) · Z,
 *   Z = Σ ± exp(−(z − z_i)²/4Dvt)/√(4πDvt) = 2/L Σ sin(p(z_s + z_b)) sin(p(z + z_b)) exp(−p² D v t),   p = nπ/L
 * </pre>
 * Patterson, Chance &amp; Wilson, Appl. Opt. 28, 2331 (1989); Contini et al., Appl. Opt. 36, 4587 (1997). Integral over all
 * times: {@link SteadySignal}; transform: {@link FrequencySignal}.
 */
public final class TimeSignal {
    private final Diffusion d;
    final double speed;

    public TimeSignal(Diffusion diffusion) {
        d = diffusion;
        speed = diffusion.medium().speedMmPerPs();
    }

    public Diffusion diffusion() {
        return d;
    }

    public double perMm2PerPs(double rhoMm, double timePs, Side side) {
        if (!(timePs > 0)) return 0;
        double spread = 4 * d.constantMm * speed * timePs;
        return Math.exp(-rhoMm * rhoMm / spread) / (Math.PI * spread) * acrossPerPs(timePs, side);
    }

    /** The signal integrated over the whole surface, per ps. */
    public double acrossPerPs(double timePs, Side side) {
        if (!(timePs > 0)) return 0;
        if (side == Side.TRANSMITTANCE && !d.slab())
            throw new Refusal("A semi-infinite medium has no far side; give the set-up a thickness_mm.");
        double spread = 4 * d.constantMm * speed * timePs;
        double decay = speed * d.strength * Math.exp(-d.medium().muaPerMm() * speed * timePs);
        if (d.slab()) {
            double whole = d.extrapolatedThicknessMm();
            if (spread > 0.4 * whole * whole) return decay * waves(spread / 4, side);
        }
        return decay * images(spread, side);
    }

    private double images(double spread, Side side) {
        double zs = d.sourceDepthMm;
        double zb = d.extrapolationMm;
        boolean far = side == Side.TRANSMITTANCE;
        double z = far ? d.thicknessMm() : 0;
        double sum = pair(spread, zs - z, -2 * zb - zs - z, far);
        if (d.slab()) {
            double period = 2 * d.extrapolatedThicknessMm();
            for (int m = 1; m <= 3; m++) {
                sum += pair(spread, m * period + zs - z, m * period - 2 * zb - zs - z, far);
                sum += pair(spread, -m * period + zs - z, -m * period - 2 * zb - zs - z, far);
            }
        }
        return sum / Math.sqrt(Math.PI * spread);
    }

    private double pair(double spread, double source, double sink, boolean far) {
        return image(spread, source, far) - image(spread, sink, far);
    }

    /** Fluence share plus flux share of one image at signed height dz above the point of reading. */
    private double image(double spread, double dz, boolean far) {
        double outward = d.constantMm * 2 * (far ? -dz : dz) / spread;
        return (d.fluenceShare + d.fluxShare * outward) * Math.exp(-dz * dz / spread);
    }

    private double waves(double diffused, Side side) {
        double whole = d.extrapolatedThicknessMm();
        double zb = d.extrapolationMm;
        boolean far = side == Side.TRANSMITTANCE;
        double sum = 0;
        for (int n = 1; ; n++) {
            double p = n * Math.PI / whole;
            double fall = Math.exp(-p * p * diffused);
            double sign = far && n % 2 == 0 ? -1 : 1;
            double read = d.fluenceShare * Math.sin(p * zb) + d.fluxShare * d.constantMm * p * Math.cos(p * zb);
            sum += sign * Math.sin(p * (d.sourceDepthMm + zb)) * read * fall;
            // the next wave against the slowest, which outlives the others
            double next = (n + 1) * Math.exp(-n * (n + 2) * Math.PI * Math.PI * diffused / (whole * whole));
            if (next < 1e-15) return 2 / whole * sum;
        }
    }
}
