package org.hazewright.transport;

import org.hazewright.optics.Refusal;

/**
 * Mean time of flight and variance of the diffuse signal over all times, in ps and ps².
 *
 * <p>Semi-infinite: derivatives of the steady signal with respect to κ² = µa/D, in closed form. Slab: the trapezoidal rule in
 * the logarithm of time, where the curve falls off doubly exponentially on both sides, so that a step of 0.04 leaves less than
 * 1e−9. Without absorption the semi-infinite curve ends as t^(−5/2): its mean exists, its variance does not and is refused.
 */
public final class TimeMoments {
    private static final double STEP = 0.04;
    private final Diffusion d;
    private final Side side;
    private final double vd;
    private double[] time;
    private double[] across;

    public TimeMoments(Diffusion diffusion, Side side) {
        this.d = diffusion;
        this.side = side;
        vd = diffusion.medium().speedMmPerPs() * diffusion.constantMm;
        if (side == Side.TRANSMITTANCE && !diffusion.slab())
            throw new Refusal("A semi-infinite medium has no far side; give the set-up a thickness_mm.");
        if (diffusion.slab()) lay();
    }

    public double meanPs(double rhoMm) {
        double[] s = d.slab() ? summed(rhoMm) : derived(rhoMm);
        return s[1] / s[0];
    }

    public double variancePs2(double rhoMm) {
        if (!d.slab() && d.medium().muaPerCm() == 0)
            throw new Refusal("Without absorption the time of flight in a semi-infinite medium has no finite variance."
                    + " Give the medium some absorption, or the set-up a thickness_mm.");
        double[] s = d.slab() ? summed(rhoMm) : derived(rhoMm);
        double mean = s[1] / s[0];
        return s[2] / s[0] - mean * mean;
    }

    /** Zeroth to second moment from S, −dS/ds and d²S/ds², where s is the Laplace variable and dκ²/ds = 1/(vD). */
    private double[] derived(double rho) {
        double zs = d.sourceDepthMm;
        double sink = 2 * d.extrapolationMm + zs;
        double k = d.muEffPerMm();
        double r1 = Math.hypot(rho, zs);
        double r2 = Math.hypot(rho, sink);
        double e1 = Math.exp(-k * r1);
        double e2 = Math.exp(-k * r2);
        double phi = d.fluenceShare / d.constantMm;
        double j = d.fluxShare;
        double s0 = phi * (e1 / r1 - e2 / r2)
                + j * (zs * (k + 1 / r1) * e1 / (r1 * r1) + sink * (k + 1 / r2) * e2 / (r2 * r2));
        double pair = k == 0 ? r2 - r1 : e1 * -Math.expm1(-k * (r2 - r1)) / k;
        double s1 = phi * pair / 2 + j * (zs * e1 / r1 + sink * e2 / r2) / 2;
        double s2 = k == 0
                ? Double.POSITIVE_INFINITY
                : phi * (e1 * (1 + k * r1) - e2 * (1 + k * r2)) / (4 * k * k * k) + j * (zs * e1 + sink * e2) / (4 * k);
        return new double[] {s0, s1 / vd, s2 / (vd * vd)};
    }

    private double[] summed(double rho) {
        double s0 = 0;
        double s1 = 0;
        double s2 = 0;
        double r2 = rho * rho / (4 * vd);
        for (int i = 0; i < time.length; i++) {
            double t = time[i];
            double w = across[i] * Math.exp(-r2 / t);
            s0 += w;
            s1 += w * t;
            s2 += w * t * t;
        }
        return new double[] {s0, s1, s2};
    }

    /** The field across the slab, on times from before the first light to after the last, shared by all distances. */
    private void lay() {
        double zs = d.sourceDepthMm;
        double nearest = side == Side.REFLECTANCE ? zs : d.thicknessMm() - zs;
        double whole = d.extrapolatedThicknessMm();
        double first = nearest * nearest / (4 * vd) / 60;
        double rate = d.medium().muaPerMm() * d.medium().speedMmPerPs() + vd * Math.PI * Math.PI / (whole * whole);
        double last = 200 / rate + 60 * whole * whole / vd;
        int n = (int) Math.ceil(Math.log(last / first) / STEP) + 1;
        time = new double[n];
        across = new double[n];
        TimeSignal signal = new TimeSignal(d);
        for (int i = 0; i < n; i++) {
            time[i] = first * Math.exp(i * STEP);
            // dt = t d(ln t); the Gaussian along the surface goes as 1/t: the two cancel
            across[i] = signal.acrossPerPs(time[i], side);
        }
    }
}
