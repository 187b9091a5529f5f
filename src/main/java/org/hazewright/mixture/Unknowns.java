package org.hazewright.mixture;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Uncertainty;

/**
 * A recipe taken apart into the numbers that carry uncertainty, in flat arrays: ingredients, weighings and how weighings become
 * grams in the vessel. Both the first-order {@link Budget} and the Monte Carlo {@link Draws} are read off it.
 *
 * <p>µ_j = Σ_i θ_i m_i κ_ij / V, V = ν Σ m_i/ρ_i. Not known: the factors θ (absorption and scattering of each ingredient, fully
 * correlated over wavelength), every load on the balance, stocks included, the densities ρ, and the finished volume ν. The host
 * index and crowding are held at their planned values: a change of a per cent in concentration moves them by a few parts in ten
 * thousand.
 */
final class Unknowns {
    /**
     * Relative standard uncertainty of a density: handbook values at room temperature, and ± 3 °C of a water-like liquid (common
     * practice).
     */
    static final double DENSITY = 0.001;

    /** Relative standard uncertainty of the finished volume: volumes of mixing and water lost while stirring (common practice). */
    static final double VOLUME = 0.001;

    /** A mass put on the balance: into the vessel, or into a stock as the substance or as the diluent. */
    record Load(String name, double massG, double uG, int stock, Role role) {
        enum Role {
            ITEM,
            STOCK_SUBSTANCE,
            STOCK_DILUENT
        }
    }

    final double[] wavelengthsNm;
    final Ingredient[] ingredient;
    final double[] densityGPerMl;
    final Uncertainty[] uncertainty;
    final double[][] kappaA; // [ingredient][wavelength]
    final double[][] kappaS;
    final List<Load> loads = new ArrayList<>();

    /** Stocks in making order: substance (ingredient number or −1), earlier stock (or −1), diluent. */
    final int[] stockSubstance;

    final int[] stockFrom;
    final int[] stockDiluent;

    /** For each item load: the ingredient number, or −1 when it is an aliquot of {@code itemStock}. */
    final int[] itemIngredient;

    final int[] itemStock;

    final double volumeMl;

    Unknowns(Recipe recipe, double[] wavelengthsNm, double capacityG) {
        this(recipe, Sweep.of(Mixture.of(recipe), wavelengthsNm), capacityG);
    }

    Unknowns(Recipe recipe, Sweep sweep, double capacityG) {
        wavelengthsNm = sweep.wavelengthsNm();
        Map<Ingredient, Double> planned = recipe.massesG();
        Map<Ingredient, Integer> number = new LinkedHashMap<>();
        planned.keySet().forEach(i -> number.put(i, number.size()));
        int count = number.size();
        ingredient = number.keySet().toArray(Ingredient[]::new);
        densityGPerMl = new double[count];
        uncertainty = new Uncertainty[count];
        kappaA = new double[count][];
        kappaS = new double[count][];
        double volume = 0;
        for (int i = 0; i < count; i++) {
            densityGPerMl[i] = ingredient[i].densityGPerMl();
            uncertainty[i] = ingredient[i].uncertainty();
            kappaA[i] = sweep.kappaA(ingredient[i]);
            kappaS[i] = sweep.kappaMusp(ingredient[i]);
            volume += planned.get(ingredient[i]) / densityGPerMl[i];
        }
        volumeMl = volume;

        Map<String, Integer> stockNumber = new LinkedHashMap<>();
        int stocks = recipe.stocks().size();
        stockSubstance = new int[stocks];
        stockFrom = new int[stocks];
        stockDiluent = new int[stocks];
        double u = recipe.weighingUncertaintyG();
        for (Stock s : recipe.stocks()) {
            int k = stockNumber.size();
            stockNumber.put(s.id(), k);
            stockFrom[k] = s.from().map(stockNumber::get).orElse(-1);
            stockSubstance[k] = s.from().isPresent() ? -1 : number.getOrDefault(s.ingredient(), -1);
            stockDiluent[k] = number.getOrDefault(s.diluent(), -1);
            loads.add(load("stock " + s.id(), s.ingredientG(), u, capacityG, k, Load.Role.STOCK_SUBSTANCE));
            loads.add(load("stock " + s.id(), s.diluentG(), u, capacityG, k, Load.Role.STOCK_DILUENT));
        }
        itemIngredient = new int[recipe.items().size()];
        itemStock = new int[recipe.items().size()];
        int n = 0;
        for (Item item : recipe.items()) {
            itemStock[n] = item.stock().map(stockNumber::get).orElse(-1);
            itemIngredient[n] = item.stock().isPresent() ? -1 : number.get(item.ingredient());
            loads.add(load("weighing " + item.label(), item.massG(), u, capacityG, n, Load.Role.ITEM));
            n++;
        }
    }

    private static Load load(String name, double massG, double u, double capacityG, int stock, Load.Role role) {
        double loads = Math.max(1, Math.ceil(massG / capacityG - 1e-9));
        return new Load(name, massG, u * Math.sqrt(loads), stock, role);
    }

    int ingredients() {
        return ingredient.length;
    }

    /**
     * Grams of each ingredient in the vessel from grams on the balance, one for each load in order; {@code content} is work space
     * of [stocks][ingredients].
     */
    void masses(double[] loadG, double[][] content, double[] massesG) {
        int stocks = stockFrom.length;
        for (int k = 0; k < stocks; k++) {
            double substance = loadG[2 * k];
            double diluent = loadG[2 * k + 1];
            double share = substance / (substance + diluent);
            double[] c = content[k];
            for (int i = 0; i < c.length; i++) c[i] = stockFrom[k] >= 0 ? share * content[stockFrom[k]][i] : 0;
            if (stockSubstance[k] >= 0) c[stockSubstance[k]] += share;
            if (stockDiluent[k] >= 0) c[stockDiluent[k]] += 1 - share;
        }
        java.util.Arrays.fill(massesG, 0);
        for (int n = 0; n < itemIngredient.length; n++) {
            double g = loadG[2 * stocks + n];
            if (itemStock[n] < 0) massesG[itemIngredient[n]] += g;
            else for (int i = 0; i < massesG.length; i++) massesG[i] += g * content[itemStock[n]][i];
        }
    }

    double[] plannedLoadsG() {
        return loads.stream().mapToDouble(Load::massG).toArray();
    }
}
