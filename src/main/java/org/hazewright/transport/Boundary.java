package org.hazewright.transport;

import org.apache.commons.math3.analysis.integration.gauss.GaussIntegrator;
import org.apache.commons.math3.analysis.integration.gauss.GaussIntegratorFactory;
import org.hazewright.optics.Refusal;

/**
 * The smooth surface between a medium of index n and an outside of index n_out: Fresnel reflection and its averages.
 *
 * <p>Both indices real, in [1, 4]; the outside may be the denser one. For unpolarised light that is diffuse inside, with
 * R(µ) the reflectance at cosine µ inside:
 * <pre>
 *   R_φ = ∫ 2 µ R(µ) dµ,   R_j = ∫ 3 µ² R(µ) dµ      (0 ≤ µ ≤ 1)
 *   R_eff = (R_φ + R_j)/(2 − R_φ + R_j),   A = (1 + R_eff)/(1 − R_eff)
 * </pre>
 * Haskell et al., J. Opt. Soc. Am. A 11, 2727 (1994), eqs 2.3.5–2.3.7. What leaves the surface of a field of fluence rate Φ
 * and outward flux J is {@link #fluenceShare} Φ + {@link #fluxShare} J: the radiance (Φ + 3 J µ)/4π times 1 − R(µ), over the
 * half-space; Kienle &amp; Patterson, J. Opt. Soc. Am. A 14, 246 (1997), eq. 7. Equal indices: R = 0, A = 1, shares 1/4, 1/2.
 */
public record Boundary(double nInside, double nOutside) {
    private static final int POINTS = 128;
    private static final GaussIntegrator RULE = new GaussIntegratorFactory().legendre(POINTS, 0, 1);

    public Boundary {
        Refusal.within("Refractive index of the medium", nInside, 1, 4);
        Refusal.within("Refractive index outside", nOutside, 1, 4);
    }

    /** Reflectance of unpolarised light that meets the surface from inside at cosine µ in [0, 1]; 1 beyond the critical angle. */
    public double reflectance(double cosine) {
        return fresnel(nInside / nOutside, cosine);
    }

    /** Reflectance at normal incidence, ((n − n_out)/(n + n_out))², the same from both sides. */
    public double normalReflectance() {
        double r = (nInside - nOutside) / (nInside + nOutside);
        return r * r;
    }

    /** Cosine of the critical angle inside; 0 where there is no total reflection. */
    public double criticalCosine() {
        double s = nOutside / nInside;
        return s >= 1 ? 0 : Math.sqrt((1 - s) * (1 + s));
    }

    /** R_φ: share of an isotropic radiance's flux that is reflected. */
    public double fluenceReflection() {
        return average(1);
    }

    /** R_j: the same, for a radiance that goes as the cosine. */
    public double fluxReflection() {
        return average(2);
    }

    /** R_eff of Haskell et al. 1994: 0.431 for 1.33 in air, 0.493 for 1.40. */
    public double effectiveReflection() {
        double phi = fluenceReflection();
        double j = fluxReflection();
        return (phi + j) / (2 - phi + j);
    }

    /** A = (1 + R_eff)/(1 − R_eff); the field vanishes 2 A D outside the surface. */
    public double factorA() {
        double r = effectiveReflection();
        return (1 + r) / (1 - r);
    }

    /** Emitted power per unit fluence rate at the surface, (1 − R_φ)/4: 0.118 for 1.40 in air. */
    public double fluenceShare() {
        return (1 - fluenceReflection()) / 4;
    }

    /** Emitted power per unit outward flux, (1 − R_j)/2: 0.306 for 1.40 in air. */
    public double fluxShare() {
        return (1 - fluxReflection()) / 2;
    }

    /** Unpolarised Fresnel reflectance for relative index m = n₁/n₂ met from medium 1 at cosine µ. */
    static double fresnel(double m, double mu) {
        double t2 = 1 - m * m * (1 - mu) * (1 + mu);
        if (t2 <= 0) return 1;
        double t = Math.sqrt(t2);
        double s = (m * mu - t) / (m * mu + t);
        double p = (mu - m * t) / (mu + m * t);
        return m == 1 ? 0 : 0.5 * (s * s + p * p);
    }

    /** ∫ (k + 1) µᵏ R dµ; the outside cosine as variable where the light is totally reflected, so that no root is integrated. */
    private double average(int k) {
        if (nInside == nOutside) return 0;
        double m = nInside / nOutside;
        double sum = 0;
        if (m < 1) {
            for (int i = 0; i < POINTS; i++) {
                double mu = graded(RULE.getPoint(i));
                sum += RULE.getWeight(i) * gradedSlope(RULE.getPoint(i)) * Math.pow(mu, k) * fresnel(m, mu);
            }
            return (k + 1) * sum;
        }
        for (int i = 0; i < POINTS; i++) {
            double t = graded(RULE.getPoint(i));
            double mu = Math.sqrt(1 - (1 - t) * (1 + t) / (m * m));
            sum += RULE.getWeight(i)
                    * gradedSlope(RULE.getPoint(i))
                    * t
                    / (m * m)
                    * Math.pow(mu, k - 1)
                    * fresnel(m, mu);
        }
        return Math.pow(criticalCosine(), k + 1) + (k + 1) * sum;
    }

    /** Crowds the points towards 0, where grazing reflectance changes fast when the indices are nearly equal. */
    private static double graded(double x) {
        return x * x * x;
    }

    private static double gradedSlope(double x) {
        return 3 * x * x;
    }
}
