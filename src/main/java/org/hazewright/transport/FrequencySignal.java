package org.hazewright.transport;

import org.hazewright.optics.Refusal;

/**
 * Light modulated at one frequency: amplitude, modulation relative to 0 MHz, and phase lag at a distance from the beam.
 *
 * <p>Frequency in MHz, 0 to 1e5; ρ in mm. The lag is in degrees and unwrapped: it grows from 0 at 0 MHz without jumps.
 * Haskell et al., J. Opt. Soc. Am. A 11, 2727 (1994), with the complex µeff.
 * Not for several threads at once.
 */
public final class FrequencySignal {
    private static final double RADIANS_PER_PS = 2 * Math.PI * 1e-6;
    private final Diffusion diffusion;
    private final double megahertz;
    private final PointSignal steady;
    private final PointSignal modulated;
    private double lastRhoMm = Double.NaN;
    private Side lastSide;

    public FrequencySignal(Diffusion diffusion, double megahertz) {
        this.diffusion = diffusion;
        this.megahertz = Refusal.within("Modulation frequency in MHz", megahertz, 0, 1e5);
        steady = new PointSignal(diffusion, 0);
        modulated = new PointSignal(diffusion, RADIANS_PER_PS * megahertz);
    }

    /** Amplitude per mm² for unit amplitude of the source. */
    public double amplitudePerMm2(double rhoMm, Side side) {
        modulatedAt(rhoMm, side);
        return Math.hypot(modulated.re, modulated.im);
    }

    /** Amplitude over that at 0 MHz. */
    public double modulation(double rhoMm, Side side) {
        double a = amplitudePerMm2(rhoMm, side);
        steady.at(rhoMm, side);
        return a / steady.re;
    }

    /** Phase lag in degrees. */
    public double phaseDeg(double rhoMm, Side side) {
        modulatedAt(rhoMm, side);
        double lag = -Math.atan2(modulated.im, modulated.re);
        return Math.toDegrees(unwrapped(lag, rhoMm, side));
    }

    /** Amplitude and phase at one place are as a rule asked for together. */
    private void modulatedAt(double rhoMm, Side side) {
        if (rhoMm == lastRhoMm && side == lastSide) return;
        modulated.at(rhoMm, side);
        lastRhoMm = rhoMm;
        lastSide = side;
    }

    /** Goes up from 0 MHz in steps over which the phase cannot turn by half a circle, counting whole turns. */
    private double unwrapped(double lag, double rho, Side side) {
        // the lag is at most that of a plane wave along the whole way, Im κ (ρ + depth + thickness)
        double omega = RADIANS_PER_PS * megahertz;
        double path = rho + diffusion.sourceDepthMm + (diffusion.slab() ? diffusion.thicknessMm() : 0);
        double most = modulated.lagPerMm() * path;
        if (most < 3) return lag;
        int steps = (int) Math.ceil(most);
        double before = 0;
        double turns = 0;
        for (int i = 1; i < steps; i++) {
            double part = (double) i / steps;
            PointSignal there = new PointSignal(diffusion, omega * part * part);
            there.at(rho, side);
            double now = -Math.atan2(there.im, there.re);
            turns += Math.rint((before - now) / (2 * Math.PI));
            before = now;
        }
        turns += Math.rint((before - lag) / (2 * Math.PI));
        return lag + 2 * Math.PI * turns;
    }
}
