package org.hazewright.transport;

import org.hazewright.optics.Refusal;

/**
 * A collimated beam through a slab or cuvette at right angles: Bouguer–Beer–Lambert between two reflecting faces.
 *
 * <p>Along the ray exp(−µt d). With r the Fresnel reflectance of a face at normal incidence and all internal reflections
 * summed as powers (a beam wider than its coherence):
 * <pre>
 *   T = (1 − r)² e/(1 − r² e²),   R = r + (1 − r)² r e²/(1 − r² e²),   e = exp(−µt d)
 * </pre>
 * Thickness in mm, 0 or above. The detector is taken to see no scattered light at all: true for a narrow acceptance and a
 * small µs d only.
 */
public record Collimated(Medium medium, double outsideIndex, double thicknessMm) {
    public Collimated {
        Refusal.within("Refractive index outside", outsideIndex, 1, 4);
        Refusal.notNegative("Thickness in mm", thicknessMm);
    }

    /** µt d, without unit. */
    public double opticalThickness() {
        return medium.mutPerMm() * thicknessMm;
    }

    /** exp(−µt d): one pass through the medium, without its faces. */
    public double internalTransmittance() {
        return Math.exp(-opticalThickness());
    }

    public double specularReflectance() {
        return new Boundary(medium.n(), outsideIndex).normalReflectance();
    }

    /** Unscattered share that leaves by the far face. */
    public double transmittance() {
        double r = specularReflectance();
        double e = internalTransmittance();
        return (1 - r) * (1 - r) * e / (1 - r * r * e * e);
    }

    /** Unscattered share that entered and leaves by the near face. */
    public double returned() {
        double r = specularReflectance();
        double e = internalTransmittance();
        return (1 - r) * (1 - r) * r * e * e / (1 - r * r * e * e);
    }

    /** −10 lg T, computed without forming T, so that it stays a number where T is 0. */
    public double attenuationDb() {
        double r = specularReflectance();
        double e = internalTransmittance();
        double faces = (1 - r) * (1 - r) / (1 - r * r * e * e);
        return 10 * (opticalThickness() / Math.log(10) - Math.log10(faces));
    }
}
