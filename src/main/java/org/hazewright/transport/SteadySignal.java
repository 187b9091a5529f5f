package org.hazewright.transport;

/**
 * Steady-state diffuse reflectance R(ρ) or transmittance T(ρ) per mm², of a thin beam of unit power.
 *
 * <p>ρ in mm, 0 or above. Farrell, Patterson &amp; Wilson, Med. Phys. 19, 879 (1992); Kienle &amp; Patterson, J. Opt. Soc. Am. A
 * 14, 246 (1997); slab: Contini et al., Appl. Opt. 36, 4587 (1997). See {@link Convention} for which.
 * Not for several threads at once.
 */
public final class SteadySignal {
    private final PointSignal signal;

    public SteadySignal(Diffusion diffusion) {
        signal = new PointSignal(diffusion, 0);
    }

    public double perMm2(double rhoMm, Side side) {
        signal.at(rhoMm, side);
        return signal.re;
    }

    public double reflectancePerMm2(double rhoMm) {
        return perMm2(rhoMm, Side.REFLECTANCE);
    }

    public double transmittancePerMm2(double rhoMm) {
        return perMm2(rhoMm, Side.TRANSMITTANCE);
    }
}
