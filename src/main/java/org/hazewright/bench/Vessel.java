package org.hazewright.bench;

import java.util.Collections;
import java.util.LinkedHashMap;
import java.util.Map;
import org.apache.commons.math3.optim.MaxEval;
import org.apache.commons.math3.optim.nonlinear.scalar.GoalType;
import org.apache.commons.math3.optim.univariate.BrentOptimizer;
import org.apache.commons.math3.optim.univariate.SearchInterval;
import org.apache.commons.math3.optim.univariate.UnivariateObjectiveFunction;
import org.hazewright.brief.Point;
import org.hazewright.design.Frozen;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Ingredient;

/**
 * What is in a vessel, g of each ingredient, while it is added to and taken from. Volumes add: V = Σ m_i/ρ_i, mL.
 */
public record Vessel(Map<Ingredient, Double> massesG) {
    public Vessel {
        massesG = Collections.unmodifiableMap(new LinkedHashMap<>(massesG));
    }

    public double volumeMl() {
        return volumeMl(massesG);
    }

    public double massG() {
        return massesG.values().stream().mapToDouble(Double::doubleValue).sum();
    }

    /** With so many grams of a liquid of which one gram holds {@code perG}. */
    public Vessel plus(Map<Ingredient, Double> perG, double massG) {
        Map<Ingredient, Double> masses = new LinkedHashMap<>(massesG);
        perG.forEach((i, share) -> masses.merge(i, share * massG, Double::sum));
        return new Vessel(masses);
    }

    /** After so many mL of the stirred content were taken out; refused when it does not hold more than that. */
    public Vessel without(double volumeMl) {
        double whole = volumeMl();
        Refusal.notNegative("Volume taken out in mL", volumeMl);
        if (volumeMl >= whole)
            throw new Refusal("Taking " + Grams.plain(volumeMl) + " mL out of a vessel that holds " + Grams.plain(whole)
                    + " mL leaves nothing; take less out, or begin with more.");
        Map<Ingredient, Double> masses = new LinkedHashMap<>(massesG);
        masses.replaceAll((i, g) -> g * (1 - volumeMl / whole));
        return new Vessel(masses);
    }

    /**
     * Grams of a liquid to add so that Σ w (miss)² over the model's points is least; 0 when adding does no good. {@code mostG} is
     * the most that is tried. For one point this is the root of µ(g) = (A + g a)/(V + g v) = t, to 1e-9 of the dose.
     */
    public double doseG(Map<Ingredient, Double> perG, Frozen model, double mostG) {
        double[] here = times(model.valuesPerCm(massesG), volumeMl());
        double[] each = times(model.valuesPerCm(perG), volumeMl(perG));
        double v0 = volumeMl();
        double v = volumeMl(perG);
        if (model.points().size() == 1) {
            double t = model.points().get(0).wantedPerCm();
            double rate = each[0] - t * v;
            double g = (t * v0 - here[0]) / rate;
            return rate == 0 || !(g > 0) ? 0 : Math.min(g, mostG);
        }
        UnivariateObjectiveFunction misses = new UnivariateObjectiveFunction(g -> {
            double sum = 0;
            for (int j = 0; j < here.length; j++) {
                Point p = model.points().get(j);
                double miss = p.miss((here[j] + g * each[j]) / (v0 + g * v));
                sum += p.weight() * miss * miss;
            }
            return sum;
        });
        return new BrentOptimizer(1e-9, 1e-9)
                .optimize(misses, GoalType.MINIMIZE, new SearchInterval(0, mostG), new MaxEval(500))
                .getPoint();
    }

    private static double[] times(double[] values, double factor) {
        double[] out = values.clone();
        for (int j = 0; j < out.length; j++) out[j] *= factor;
        return out;
    }

    private static double volumeMl(Map<Ingredient, Double> massesG) {
        double volume = 0;
        for (var entry : massesG.entrySet())
            volume += entry.getValue() / entry.getKey().densityGPerMl();
        return volume;
    }

    /** What one gram of a recipe's mixture holds, g. */
    static Map<Ingredient, Double> perG(Map<Ingredient, Double> massesG) {
        double sum = massesG.values().stream().mapToDouble(Double::doubleValue).sum();
        Map<Ingredient, Double> perG = new LinkedHashMap<>(massesG);
        perG.replaceAll((i, g) -> g / sum);
        return perG;
    }
}
