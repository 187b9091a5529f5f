package org.hazewright.design;

import java.util.HashMap;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Point;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.MassSpecific;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.BlendPart;
import org.hazewright.shelf.Ingredient;

/**
 * The full model frozen at one mixture: every ingredient's mass-specific coefficients at the wanted points, with that mixture's
 * host index and crowding.
 *
 * <p>Recipes near that mixture are judged in microseconds; the mixture itself, and all recipes of the same concentrations, exactly.
 * Host index and crowding change by parts in ten thousand while grams are rounded, and the final answer is checked on {@link
 * Mixture} itself.
 */
public final class Frozen {
    private final List<Point> points;
    private final Map<Ingredient, double[]> kappa = new HashMap<>();
    private final Set<String> baseParts = new HashSet<>();
    private final Balance balance;

    public Frozen(List<Point> points, Mixture mixture, Ingredient base, Balance balance) {
        this.points = List.copyOf(points);
        this.balance = balance;
        if (base.isBlend()) for (BlendPart p : base.blend()) baseParts.add(p.ingredient());
        else baseParts.add(base.id());
        Map<Double, Double> host = new HashMap<>();
        for (Ingredient i : mixture.massesG().keySet()) {
            double phi = mixture.crowdFraction(i);
            double[] k = new double[points.size()];
            Map<Double, MassSpecific> at = new HashMap<>();
            for (int j = 0; j < k.length; j++) {
                Point p = points.get(j);
                double nm = p.wavelengthNm();
                double n = host.computeIfAbsent(nm, mixture::hostIndex);
                MassSpecific m = at.computeIfAbsent(nm, x -> MassSpecific.of(i, x, mixture.temperatureC(), n, phi));
                k[j] = of(p, m);
            }
            kappa.put(i, k);
        }
    }

    private Frozen(List<Point> points, Frozen other) {
        this.points = List.copyOf(points);
        this.balance = other.balance;
        kappa.putAll(other.kappa);
        baseParts.addAll(other.baseParts);
    }

    /** The same model judging by other values, tolerances or weights of the same quantities at the same wavelengths. */
    public Frozen judging(List<Point> others) {
        boolean same = others.size() == points.size();
        for (int j = 0; same && j < points.size(); j++)
            same = others.get(j).quantity() == points.get(j).quantity()
                    && others.get(j).wavelengthNm() == points.get(j).wavelengthNm();
        if (!same) throw new Refusal("A frozen model judges only the quantities and wavelengths that it was made for.");
        return new Frozen(others, this);
    }

    /** What is wanted, point by point. */
    public List<Point> points() {
        return points;
    }

    static double of(Point p, MassSpecific m) {
        return p.quantity() == Point.Quantity.MUA ? m.kappaA() : m.kappaMusp();
    }

    /** Mass-specific coefficient of an ingredient at each point, cm²/g. */
    public double[] kappaCm2PerG(Ingredient i) {
        return kappa.get(i).clone();
    }

    /** µ at each point, 1/cm, of masses in g. */
    public double[] valuesPerCm(Map<Ingredient, Double> massesG) {
        double volume = 0;
        double[] mu = new double[points.size()];
        for (var entry : massesG.entrySet()) {
            volume += entry.getValue() / entry.getKey().densityGPerMl();
            double[] k = kappa.get(entry.getKey());
            for (int j = 0; j < mu.length; j++) mu[j] += entry.getValue() * k[j];
        }
        for (int j = 0; j < mu.length; j++) mu[j] /= volume;
        return mu;
    }

    /** Largest |miss| over the points; 1 is the edge of tolerance. */
    public double worstMiss(Recipe recipe) {
        double[] mu = valuesPerCm(recipe.massesG());
        double worst = 0;
        for (int j = 0; j < mu.length; j++)
            worst = Math.max(worst, Math.abs(points.get(j).miss(mu[j])));
        return worst;
    }

    /** J of a recipe as weighed, stocks included: an error in making a stock is shared by every aliquot of it. */
    public Score score(Recipe recipe) {
        Map<Ingredient, Double> masses = recipe.massesG();
        double volume = 0;
        for (var entry : masses.entrySet())
            volume += entry.getValue() / entry.getKey().densityGPerMl();
        double[] mu = valuesPerCm(masses);
        double bias = 0;
        double ingredient = 0;
        for (int j = 0; j < mu.length; j++) {
            Point p = points.get(j);
            double miss = p.miss(mu[j]);
            bias += p.weight() * miss * miss;
            for (var entry : masses.entrySet()) {
                if (isBase(entry.getKey())) continue;
                double u = uncertaintyOf(entry.getKey(), p);
                double part = entry.getValue() / volume * kappa.get(entry.getKey())[j] * u / p.tolerancePerCm();
                ingredient += p.weight() * part * part;
            }
        }
        return new Score(bias, ingredient, weighing(recipe, volume));
    }

    private double weighing(Recipe recipe, double volume) {
        double sum = 0;
        double u = recipe.weighingUncertaintyG();
        Map<String, Double> used = new HashMap<>(); // grams of each stock that end up in the vessel
        for (Item item : recipe.items()) {
            double uLoad = u * Math.sqrt(balance.loads(item.massG()));
            if (item.stock().isPresent()) {
                used.merge(item.stock().get(), item.massG(), Double::sum);
                sum += effect(recipe.contentPerG(item.stock().get()), uLoad / volume);
            } else sum += effect(Map.of(item.ingredient(), 1.0), uLoad / volume);
        }
        List<Stock> stocks = recipe.stocks();
        for (int k = stocks.size() - 1; k >= 0; k--) {
            Stock s = stocks.get(k);
            double grams = used.getOrDefault(s.id(), 0.0);
            if (grams == 0) continue;
            double total = s.totalG();
            Map<Ingredient, Double> change = new HashMap<>();
            if (s.from().isPresent()) {
                recipe.contentPerG(s.from().get()).forEach((i, g) -> change.merge(i, g, Double::sum));
                used.merge(s.from().get(), grams * s.ingredientG() / total, Double::sum);
            } else change.merge(s.ingredient(), 1.0, Double::sum);
            change.merge(s.diluent(), -1.0, Double::sum);
            double perSubstance = grams * s.diluentG() / (total * total) / volume;
            double perDiluent = grams * s.ingredientG() / (total * total) / volume;
            sum += effect(change, perSubstance * u * Math.sqrt(balance.loads(s.ingredientG())));
            sum += effect(change, perDiluent * u * Math.sqrt(balance.loads(s.diluentG())));
        }
        return sum;
    }

    /** Σ_j w (Σ_i κ_ij g_i · scale)²/τ² over what is not base. */
    private double effect(Map<Ingredient, Double> grams, double scale) {
        double sum = 0;
        for (int j = 0; j < points.size(); j++) {
            Point p = points.get(j);
            double change = 0;
            for (var entry : grams.entrySet())
                if (!isBase(entry.getKey())) change += kappa.get(entry.getKey())[j] * entry.getValue();
            change *= scale / p.tolerancePerCm();
            sum += p.weight() * change * change;
        }
        return sum;
    }

    private boolean isBase(Ingredient i) {
        return baseParts.contains(i.id());
    }

    static double uncertaintyOf(Ingredient i, Point p) {
        return p.quantity() == Point.Quantity.MUA
                ? i.uncertainty().absorption()
                : i.uncertainty().scattering();
    }
}
