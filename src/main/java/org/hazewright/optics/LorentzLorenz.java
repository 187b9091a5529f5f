package org.hazewright.optics;

/**
 * Refractive index of a mixture of media that do not scatter: (n² − 1)/(n² + 2) = Σ φ_i (n_i² − 1)/(n_i² + 2).
 *
 * <p>Refractions add by volume (Lorentz, Ann. Phys. 245, 641, 1880; Lorenz, Ann. Phys. 247, 70, 1880). Good to about 1e-3 in
 * n for liquids that mix without change of volume; a mixture that shrinks by 1 % refracts 1 % more, 4e-3 in n, so the volumes should be
 * those in the mixture (glycerol on the shelf has its density in water).
 */
public final class LorentzLorenz {
    private LorentzLorenz() {}

    /** Index from volume fractions (each ≥ 0, sum 1 within 1e-6) and indices of the parts, lists of the same length. */
    public static double mix(double[] volumeFractions, double[] n) {
        if (volumeFractions.length != n.length || n.length == 0)
            throw new Refusal("A mixture has " + volumeFractions.length + " volume fractions and " + n.length
                    + " refractive indices; it needs as many of one as of the other, at least one.");
        double sum = 0;
        double refraction = 0;
        for (int i = 0; i < n.length; i++) {
            double share = Refusal.notNegative("Volume fraction", volumeFractions[i]);
            double n2 = Refusal.positive("Refractive index", n[i]) * n[i];
            sum += share;
            refraction += share * (n2 - 1) / (n2 + 2);
        }
        if (!(Math.abs(sum - 1) <= 1e-6))
            throw new Refusal("The volume fractions of a mixture add up to " + sum + "; they must add up to 1.");
        refraction /= sum;
        return Math.sqrt((1 + 2 * refraction) / (1 - refraction));
    }
}
