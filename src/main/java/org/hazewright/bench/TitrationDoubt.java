package org.hazewright.bench;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;
import java.util.function.Function;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Titration;
import org.hazewright.mixture.Budget;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Sweep;
import org.hazewright.shelf.Ingredient;

/**
 * First-order uncertainty of every step of a titration (JCGM 100:2008, eq. 10).
 *
 * <p>The whole titration is run again with one load on the balance off by its standard uncertainty: of the stocks (which bath and
 * titrant share), of the bath, of the titrant, of each addition and of the water given back. So an error of an early step stays
 * for the later ones, thinned as they are. To that come the ingredients' coefficients, densities, and the finished volume. Host
 * index and crowding are held at each step; what the volume of an aliquot is off by is left out, since it takes all in proportion.
 */
final class TitrationDoubt {
    /** What is on the balance during a titration. */
    record Loads(Recipe start, Recipe titrant, List<Double> addedG, List<Double> waterBackG) {}

    private final Loads planned;
    private final Titration titration;
    private final Ingredient water;
    private final Balance balance;
    private final List<Sweep> sweeps;

    /** {@code sweeps} hold each step's coefficients, the start first. */
    TitrationDoubt(Loads planned, Titration titration, Ingredient water, Balance balance, List<Sweep> sweeps) {
        this.planned = planned;
        this.titration = titration;
        this.water = water;
        this.balance = balance;
        this.sweeps = sweeps;
    }

    /** The vessel after each step, the start first. Water is lost as it is planned to be given back. */
    static List<Vessel> run(Loads loads, List<Double> waterLostG, Titration titration, Ingredient water) {
        List<Vessel> states = new ArrayList<>();
        Vessel v = new Vessel(loads.start.massesG());
        states.add(v);
        Map<Ingredient, Double> perG = Vessel.perG(loads.titrant.massesG());
        for (int k = 0; k < loads.addedG.size(); k++) {
            v = v.without(titration.aliquotMl());
            double back = loads.waterBackG.get(k) - waterLostG.get(k);
            if (back != 0) v = v.plus(Map.of(water, 1.0), back);
            v = v.plus(perG, loads.addedG.get(k));
            states.add(v);
        }
        return states;
    }

    /**
     * What one standard uncertainty of each cause adds at each step, 1/cm, the causes independent of one another and in the same
     * order at every step: [cause][µa at each wavelength, then µs'].
     */
    List<double[][]> effectsPerCm() {
        List<Vessel> states = run(planned, planned.waterBackG, titration, water);
        List<List<double[]>> effects = ofFigures(states);
        for (Weighing w : Weighing.of(planned.start))
            if (w.role() == Weighing.Role.ITEM) add(effects, w.massG(), by -> startMoved(w, by));
        for (Weighing w : Weighing.of(planned.titrant))
            if (w.role() == Weighing.Role.ITEM) add(effects, w.massG(), by -> titrantMoved(w, by));
        stocks().values().forEach(w -> add(effects, w.massG(), by -> stockMoved(w, by)));
        for (int k = 0; k < planned.addedG.size(); k++) {
            int step = k;
            add(
                    effects,
                    planned.addedG.get(k),
                    by -> new Loads(
                            planned.start, planned.titrant, moved(planned.addedG, step, by), planned.waterBackG));
            if (planned.waterBackG.get(k) > 0)
                add(
                        effects,
                        planned.waterBackG.get(k),
                        by -> new Loads(
                                planned.start, planned.titrant, planned.addedG, moved(planned.waterBackG, step, by)));
        }
        return effects.stream().map(e -> e.toArray(double[][]::new)).toList();
    }

    /** Standard uncertainties, 1/cm, of what causes do together. */
    static double[] uPerCm(double[][] effects) {
        double[] u = new double[effects[0].length];
        for (double[] e : effects) for (int j = 0; j < u.length; j++) u[j] += square(e[j]);
        Arrays.setAll(u, j -> Math.sqrt(u[j]));
        return u;
    }

    /** Loads of stocks, each once, although bath and titrant may both draw from one. */
    private Map<String, Weighing> stocks() {
        Map<String, Weighing> loads = new LinkedHashMap<>();
        for (Recipe r : List.of(planned.start, planned.titrant))
            for (Weighing w : Weighing.of(r)) w.into().ifPresent(id -> loads.putIfAbsent(w.role() + " " + id, w));
        return loads;
    }

    private Loads startMoved(Weighing w, double by) {
        return new Loads(w.changed(planned.start, w.massG() + by), planned.titrant, planned.addedG, planned.waterBackG);
    }

    private Loads titrantMoved(Weighing w, double by) {
        return new Loads(planned.start, w.changed(planned.titrant, w.massG() + by), planned.addedG, planned.waterBackG);
    }

    private Loads stockMoved(Weighing stock, double by) {
        return new Loads(
                withStock(planned.start, stock, by),
                withStock(planned.titrant, stock, by),
                planned.addedG,
                planned.waterBackG);
    }

    private static Recipe withStock(Recipe recipe, Weighing stock, double by) {
        for (Weighing w : Weighing.of(recipe))
            if (w.role() == stock.role() && w.into().equals(stock.into())) return w.changed(recipe, w.massG() + by);
        return recipe;
    }

    private static List<Double> moved(List<Double> grams, int at, double by) {
        List<Double> other = new ArrayList<>(grams);
        other.set(at, grams.get(at) + by);
        return other;
    }

    /** Adds what one load's standard uncertainty does, by a central difference. */
    private void add(List<List<double[]>> effects, double massG, Function<Double, Loads> moved) {
        double u = balance.standardUncertaintyG() * Math.sqrt(balance.loads(massG));
        double step = Math.min(u, massG / 2);
        if (!(step > 0)) return;
        List<Vessel> up = run(moved.apply(step), planned.waterBackG, titration, water);
        List<Vessel> down = run(moved.apply(-step), planned.waterBackG, titration, water);
        for (int k = 0; k < effects.size(); k++) {
            double[] high = values(up.get(k), sweeps.get(k));
            double[] low = values(down.get(k), sweeps.get(k));
            double[] effect = new double[high.length];
            for (int j = 0; j < high.length; j++) effect[j] = (high[j] - low[j]) / (2 * step) * u;
            effects.get(k).add(effect);
        }
    }

    private static double[] values(Vessel v, Sweep sweep) {
        double[] mua = sweep.muaPerCm(v.massesG());
        double[] musp = sweep.muspPerCm(v.massesG());
        double[] both = Arrays.copyOf(mua, 2 * mua.length);
        System.arraycopy(musp, 0, both, mua.length, musp.length);
        return both;
    }

    /**
     * Coefficients, densities and the finished volume at each step. Where an ingredient's scattering goes with its absorption
     * (correlation r), the second is split in a part that follows the first and one of its own.
     */
    private List<List<double[]>> ofFigures(List<Vessel> states) {
        Set<Ingredient> all = new LinkedHashSet<>();
        states.forEach(v -> all.addAll(v.massesG().keySet()));
        List<List<double[]>> effects = new ArrayList<>();
        for (int k = 0; k < states.size(); k++) {
            Vessel v = states.get(k);
            double[] mu = values(v, sweeps.get(k));
            List<double[]> here = new ArrayList<>();
            for (Ingredient i : all) ofIngredient(i, v, sweeps.get(k), mu, here);
            here.add(Arrays.stream(mu).map(x -> x * Budget.VOLUME).toArray());
            effects.add(here);
        }
        return effects;
    }

    private static void ofIngredient(Ingredient i, Vessel v, Sweep sweep, double[] mu, List<double[]> effects) {
        int n = mu.length / 2;
        double[] withAbsorption = new double[2 * n];
        double[] alone = new double[2 * n];
        double[] density = new double[2 * n];
        if (v.massesG().containsKey(i)) {
            double[] a = sweep.muaShare(i, v.massesG());
            double[] s = sweep.muspShare(i, v.massesG());
            double r = i.uncertainty().correlation();
            for (int j = 0; j < n; j++) {
                withAbsorption[j] = a[j] * i.uncertainty().absorption();
                withAbsorption[n + j] = s[j] * i.uncertainty().scattering() * r;
                alone[n + j] = s[j] * i.uncertainty().scattering() * Math.sqrt(1 - r * r);
            }
            double share = v.massesG().get(i) / i.densityGPerMl() / v.volumeMl();
            for (int j = 0; j < mu.length; j++) density[j] = mu[j] * share * Budget.DENSITY;
        }
        effects.addAll(List.of(withAbsorption, alone, density));
    }

    private static double square(double x) {
        return x * x;
    }
}
