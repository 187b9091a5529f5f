package org.hazewright.transport;

import org.hazewright.optics.Refusal;

/**
 * The diffusion model of a medium under a thin beam: an isotropic source one transport length deep, the field zero a little
 * outside the surface (extrapolated boundary).
 *
 * <p>Semi-infinite when {@code thicknessMm} is null, else an endless slab. z_s = 1/(3D), z_b = 2 A D; D by the convention. The
 * surfaces see the same outside. In a slab the source must lie inside; a slab thinner than that is refused, diffusion has
 * nothing to say there. µs' must be above 0. Signals: {@link SteadySignal}, {@link FrequencySignal}, {@link TimeSignal}.
 *
 * <p>Haskell et al., J. Opt. Soc. Am. A 11, 2727 (1994); Contini, Martelli &amp; Zaccanti, Appl. Opt. 36, 4587 (1997).
 */
public final class Diffusion {
    private final Medium medium;
    private final Boundary boundary;
    private final Convention convention;
    private final Double thicknessMm;
    final double constantMm;
    final double sourceDepthMm;
    final double extrapolationMm;
    final double fluenceShare;
    final double fluxShare;
    final double strength;

    public Diffusion(Medium medium, double outsideIndex, Double thicknessMm, Convention convention) {
        if (medium.muspPerCm() == 0)
            throw new Refusal("Diffusion needs scattering; µs' is 0. Choose model = \"transport\" or \"packets\".");
        this.medium = medium;
        this.boundary = new Boundary(medium.n(), outsideIndex);
        this.convention = convention;
        this.thicknessMm = thicknessMm;
        double transport = convention.diffusion() == Convention.DiffusionConstant.WITH_ABSORPTION
                ? medium.muaPerMm() + medium.muspPerMm()
                : medium.muspPerMm();
        constantMm = 1 / (3 * transport);
        sourceDepthMm = 1 / transport;
        extrapolationMm = 2 * boundary.factorA() * constantMm;
        if (thicknessMm != null) {
            Refusal.positive("Thickness in mm", thicknessMm);
            if (sourceDepthMm >= thicknessMm)
                throw new Refusal(String.format(
                        java.util.Locale.ROOT,
                        "The slab of %.3g mm is thinner than one transport length (%.3g mm); diffusion does not hold there."
                                + " Choose model = \"transport\" or \"packets\".",
                        thicknessMm,
                        sourceDepthMm));
        }
        boolean flux = convention.form() == Convention.Form.FLUX;
        fluenceShare = flux ? 0 : boundary.fluenceShare();
        fluxShare = flux ? 1 : boundary.fluxShare();
        double source = convention.sourceStrength() == Convention.SourceStrength.UNIT ? 1 : medium.reducedAlbedo();
        double power = convention.per() == Convention.Per.ENTERED ? 1 : 1 - boundary.normalReflectance();
        strength = source * power;
    }

    /** Semi-infinite with the default convention. */
    public Diffusion(Medium medium, double outsideIndex) {
        this(medium, outsideIndex, null, Convention.DEFAULT);
    }

    public Medium medium() {
        return medium;
    }

    public Boundary boundary() {
        return boundary;
    }

    public Convention convention() {
        return convention;
    }

    /** Null for the semi-infinite medium. */
    public Double thicknessMm() {
        return thicknessMm;
    }

    public boolean slab() {
        return thicknessMm != null;
    }

    /** D in mm. */
    public double constantMm() {
        return constantMm;
    }

    /** Depth of the source 1/(3D) in mm. */
    public double sourceDepthMm() {
        return sourceDepthMm;
    }

    /** Distance outside the surface where the field vanishes, 2 A D, in mm. */
    public double extrapolationMm() {
        return extrapolationMm;
    }

    /** µeff = √(µa/D) in 1/mm. */
    public double muEffPerMm() {
        return Math.sqrt(medium.muaPerMm() / constantMm);
    }

    /** Slab thickness plus the extrapolation on both sides, mm. */
    double extrapolatedThicknessMm() {
        return thicknessMm + 2 * extrapolationMm;
    }

    /** Diffuse reflectance over the whole surface. */
    public double totalReflectance() {
        return total(sourceDepthMm);
    }

    /** Diffuse transmittance over the whole far surface of a slab; 0 for the semi-infinite medium. */
    public double totalTransmittance() {
        return slab() ? total(thicknessMm - sourceDepthMm) : 0;
    }

    /** The field of a plane source between its zeros at −z_b and s + z_b, read at the surface that is {@code a} away. */
    private double total(double a) {
        double k = muEffPerMm();
        double near = extrapolationMm;
        double fluence;
        double flux;
        if (!slab()) {
            double direct = Math.exp(-k * a);
            fluence = k == 0 ? near / constantMm : direct * -Math.expm1(-2 * k * near) / (2 * k * constantMm);
            flux = direct * (1 + Math.exp(-2 * k * near)) / 2;
        } else {
            double whole = extrapolatedThicknessMm();
            double rest = whole - near - a;
            if (k * whole < 1e-6) {
                fluence = near * rest / (constantMm * whole);
                flux = rest / whole;
            } else {
                double e = Math.exp(-k * a) * Math.expm1(-2 * k * rest) / Math.expm1(-2 * k * whole);
                fluence = e * -Math.expm1(-2 * k * near) / (2 * k * constantMm);
                flux = e * (1 + Math.exp(-2 * k * near)) / 2;
            }
        }
        return strength * (fluenceShare * fluence + fluxShare * flux);
    }
}
