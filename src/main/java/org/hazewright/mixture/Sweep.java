package org.hazewright.mixture;

import java.util.Arrays;
import java.util.Collections;
import java.util.LinkedHashMap;
import java.util.Map;
import java.util.function.BiConsumer;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Ingredient;

/**
 * Mass-specific coefficients of a mixture's ingredients at many wavelengths (nm), in cm²/g: κ as the ingredients have it in that
 * mixture, with its host index and crowding.
 *
 * <p>µ(λ) = Σ m_i κ_i(λ)/V in 1/cm is exact for the mixture itself and all of its concentrations; for a neighbour that holds the same
 * ingredients it is right but for the host index and crowding, which are held.
 */
public final class Sweep {
    private final double[] wavelengthsNm;
    private final Map<Ingredient, double[]> kappaA;
    private final Map<Ingredient, double[]> kappaMusp;

    private Sweep(double[] wavelengthsNm, Map<Ingredient, double[]> kappaA, Map<Ingredient, double[]> kappaMusp) {
        this.wavelengthsNm = wavelengthsNm;
        this.kappaA = Collections.unmodifiableMap(kappaA);
        this.kappaMusp = Collections.unmodifiableMap(kappaMusp);
    }

    /** A {@link Refusal} names the ingredient whose figures do not reach a wavelength. */
    public static Sweep of(Mixture mixture, double[] wavelengthsNm) {
        double[] nm = wavelengthsNm.clone();
        Map<Ingredient, double[]> a = new LinkedHashMap<>();
        Map<Ingredient, double[]> s = new LinkedHashMap<>();
        for (Ingredient i : mixture.massesG().keySet()) {
            a.put(i, new double[nm.length]);
            s.put(i, new double[nm.length]);
        }
        for (int j = 0; j < nm.length; j++)
            for (Coefficients.Share share : mixture.at(nm[j]).shares()) {
                double c = mixture.concentrationGPerMl(share.ingredient());
                if (c == 0) continue;
                a.get(share.ingredient())[j] = share.muaPerCm() / c;
                s.get(share.ingredient())[j] = share.muspPerCm() / c;
            }
        return new Sweep(nm, a, s);
    }

    /** As {@link #of}, over the wavelengths that the figures of every ingredient reach; {@code gap} is told the others and why. */
    public static Sweep within(Mixture mixture, double[] wavelengthsNm, BiConsumer<Double, String> gap) {
        double[] reached = Arrays.stream(wavelengthsNm)
                .filter(nm -> {
                    try {
                        mixture.massesG()
                                .keySet()
                                .forEach(i -> MassSpecific.requireFigures(i, nm, mixture.temperatureC()));
                        return true;
                    } catch (Refusal refusal) {
                        gap.accept(nm, refusal.getMessage());
                        return false;
                    }
                })
                .toArray();
        return of(mixture, reached);
    }

    /** The wavelengths in nm, in the order asked for. */
    public double[] wavelengthsNm() {
        return wavelengthsNm.clone();
    }

    /** Whether every ingredient of a recipe is known here. */
    public boolean covers(Iterable<Ingredient> ingredients) {
        for (Ingredient i : ingredients) if (!kappaA.containsKey(i)) return false;
        return true;
    }

    double[] kappaA(Ingredient i) {
        return required(kappaA, i);
    }

    double[] kappaMusp(Ingredient i) {
        return required(kappaMusp, i);
    }

    private static double[] required(Map<Ingredient, double[]> kappa, Ingredient i) {
        double[] found = kappa.get(i);
        if (found == null) throw new Refusal("The coefficients of " + i.id() + " were not asked for in this mixture.");
        return found;
    }

    /** µa of masses in g at each wavelength, 1/cm. */
    public double[] muaPerCm(Map<Ingredient, Double> massesG) {
        return sum(massesG, kappaA);
    }

    /** µs' of masses in g at each wavelength, 1/cm. */
    public double[] muspPerCm(Map<Ingredient, Double> massesG) {
        return sum(massesG, kappaMusp);
    }

    /** One ingredient's part of µa, 1/cm, in masses in g. */
    public double[] muaShare(Ingredient i, Map<Ingredient, Double> massesG) {
        return share(i, massesG, kappaA);
    }

    /** One ingredient's part of µs', 1/cm, in masses in g. */
    public double[] muspShare(Ingredient i, Map<Ingredient, Double> massesG) {
        return share(i, massesG, kappaMusp);
    }

    private static double[] share(Ingredient i, Map<Ingredient, Double> massesG, Map<Ingredient, double[]> kappa) {
        double c = massesG.getOrDefault(i, 0.0) / volumeMl(massesG);
        return Arrays.stream(required(kappa, i)).map(k -> k * c).toArray();
    }

    private double[] sum(Map<Ingredient, Double> massesG, Map<Ingredient, double[]> kappa) {
        double volume = volumeMl(massesG);
        double[] mu = new double[wavelengthsNm.length];
        for (var entry : massesG.entrySet()) {
            double c = entry.getValue() / volume;
            double[] k = required(kappa, entry.getKey());
            for (int j = 0; j < mu.length; j++) mu[j] += c * k[j];
        }
        return mu;
    }

    private static double volumeMl(Map<Ingredient, Double> massesG) {
        double volume = 0;
        for (var entry : massesG.entrySet())
            volume += entry.getValue() / entry.getKey().densityGPerMl();
        return volume;
    }
}
