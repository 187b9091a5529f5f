package org.hazewright.batch;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import org.hazewright.bench.Weighing;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Brief;
import org.hazewright.brief.Point;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;
import org.hazewright.mixture.Sweep;
import org.hazewright.search.ConvexProgramme;
import org.hazewright.shelf.Family;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Shelf;

/**
 * What is still to be weighed, made to suit what was weighed already.
 *
 * <p>What is in the vessel stays; the later grams move. A stock's diluent keeps the stock's ratio. Later parts of the base, and what does
 * nothing to light, keep their share of the base. What absorbs or scatters is chosen anew: with a grams of it, µ_j = (A_j + Σ x_i κ_ij)/(V₀ +
 * Σ x_i v_i), and the score's squared misses and ingredient terms are least over x ≥ 0, inside every tolerance where that can be. The
 * fraction is made linear by multiplying with the volume, which is taken from the round before; κ is held as planned.
 *
 * <p>Both the plan and what was weighed are solved, and the difference is added to the planned grams: weighings that hit the plan change
 * nothing.
 */
public final class Replan {
    private static final int ROUNDS = 6;

    /** A mass that was weighed: its role, its place in the recipe and its grams. */
    public record Done(Weighing.Role role, int place, double massG) {}

    private final Brief brief;
    private final Recipe plan;
    private final Sweep sweep;
    private final Map<Ingredient, Double> baseParts;
    private final List<Point> points;

    public Replan(Brief brief, Recipe plan, Shelf shelf) {
        this.brief = brief;
        this.plan = plan;
        this.sweep = Sweep.of(Mixture.of(plan), brief.wavelengthsNm());
        this.baseParts = shelf.partsOf(plan.base());
        this.points = brief.points();
    }

    /** Coefficients of the planned mixture at the brief's wavelengths. */
    public Sweep sweep() {
        return sweep;
    }

    /** The recipe with what was weighed, and all else made to suit, rounded to the balance. */
    public Recipe after(List<Done> done) {
        Recipe weighed = weighed(done);
        if (done.isEmpty()) return weighed;
        List<Integer> open = open(done);
        if (open.isEmpty()) return weighed;
        Balance balance = brief.balance();
        double share = baseShare(weighed, done);
        List<Item> items = new ArrayList<>(weighed.items());
        List<Integer> free = new ArrayList<>();
        for (int k : open) {
            Item i = items.get(k);
            if (followsBase(i)) items.set(k, with(i, balance.rounded(i.massG() * share)));
            else free.add(k);
        }
        Recipe following = with(weighed, items);
        if (free.isEmpty()) return following;
        double[] asPlanned = solve(plan, free);
        double[] asWeighed = solve(following, free);
        for (int n = 0; n < free.size(); n++) {
            Item i = plan.items().get(free.get(n));
            double g = Math.max(0, i.massG() + asWeighed[n] - asPlanned[n]);
            double moved = Math.abs(g - i.massG());
            items.set(free.get(n), with(i, moved < balance.readabilityG() / 2 ? i.massG() : balance.rounded(g)));
        }
        return with(following, items);
    }

    /** The plan with the masses that were weighed; diluents still to come keep their stock's ratio. */
    public Recipe weighed(List<Done> done) {
        List<Stock> stocks = new ArrayList<>();
        for (int k = 0; k < plan.stocks().size(); k++) {
            Stock s = plan.stocks().get(k);
            OptionalDouble substance = massOf(done, Weighing.Role.STOCK_SUBSTANCE, k);
            OptionalDouble diluent = massOf(done, Weighing.Role.STOCK_DILUENT, k);
            double substanceG = substance.orElse(
                    diluent.isPresent()
                            ? rounded(s.ingredientG() * diluent.getAsDouble() / s.diluentG())
                            : s.ingredientG());
            double diluentG = diluent.orElse(
                    substance.isPresent()
                            ? rounded(s.diluentG() * substance.getAsDouble() / s.ingredientG())
                            : s.diluentG());
            stocks.add(new Stock(s.id(), s.ingredient(), s.lot(), substanceG, s.diluent(), diluentG, s.from()));
        }
        List<Item> items = new ArrayList<>();
        for (int k = 0; k < plan.items().size(); k++) {
            Item i = plan.items().get(k);
            OptionalDouble g = massOf(done, Weighing.Role.ITEM, k);
            items.add(g.isPresent() ? with(i, g.getAsDouble()) : i);
        }
        return new Recipe(
                plan.title(),
                plan.base(),
                plan.temperatureC(),
                plan.weighingUncertaintyG(),
                plan.briefSha256(),
                stocks,
                items);
    }

    /**
     * Grams of a liquid base to add when a recipe misses a tolerance and that much more of it would bring every target inside; empty when
     * none is needed, when it would not help, and for bases that are not poured as one liquid.
     */
    public Optional<Double> moreBaseG(Recipe recipe) {
        boolean pourable = plan.base().family() == Family.LIQUID && baseParts.size() == 1;
        if (!pourable || worst(recipe.massesG()) <= 1) return Optional.empty();
        Ingredient base = baseParts.keySet().iterator().next();
        double whole = recipe.massesG().getOrDefault(base, 0.0);
        double best = Double.POSITIVE_INFINITY;
        double bestG = 0;
        for (double share = 0.001; share <= 0.5; share *= 1.02) {
            Map<Ingredient, Double> masses = new LinkedHashMap<>(recipe.massesG());
            masses.merge(base, whole * share, Double::sum);
            double miss = worst(masses);
            if (miss < best) {
                best = miss;
                bestG = whole * share;
            }
        }
        return best <= 1 ? Optional.of(rounded(bestG)) : Optional.empty();
    }

    private double worst(Map<Ingredient, Double> massesG) {
        double worst = 0;
        double[] mua = sweep.muaPerCm(massesG);
        double[] musp = sweep.muspPerCm(massesG);
        double[] nm = sweep.wavelengthsNm();
        for (Point p : points) {
            int at = Arrays.binarySearch(nm, p.wavelengthNm());
            worst = Math.max(worst, Math.abs(p.miss((p.quantity() == Point.Quantity.MUA ? mua : musp)[at])));
        }
        return worst;
    }

    /** Places of the items that are not weighed yet. */
    private List<Integer> open(List<Done> done) {
        List<Integer> open = new ArrayList<>();
        for (int k = 0; k < plan.items().size(); k++)
            if (massOf(done, Weighing.Role.ITEM, k).isEmpty()) open.add(k);
        return open;
    }

    private static OptionalDouble massOf(List<Done> done, Weighing.Role role, int place) {
        return done.stream()
                .filter(d -> d.role() == role && d.place() == place)
                .mapToDouble(Done::massG)
                .reduce((earlier, later) -> later);
    }

    /** How much of the base's weighed parts there is, over what was planned of them; 1 before the first. */
    private double baseShare(Recipe weighed, List<Done> done) {
        double planned = 0;
        double actual = 0;
        for (int k = 0; k < plan.items().size(); k++) {
            Item i = plan.items().get(k);
            if (i.stock().isPresent() || !baseParts.containsKey(i.ingredient())) continue;
            if (massOf(done, Weighing.Role.ITEM, k).isEmpty()) continue;
            planned += i.massG();
            actual += weighed.items().get(k).massG();
        }
        return planned > 0 ? actual / planned : 1;
    }

    /** Whether an item keeps its share of the base: the base's own parts, and what does nothing to light. */
    private boolean followsBase(Item i) {
        if (i.stock().isPresent()) return false;
        if (baseParts.containsKey(i.ingredient())) return true;
        Map<Ingredient, Double> gram = Map.of(i.ingredient(), 1.0);
        return Arrays.stream(sweep.muaPerCm(gram)).allMatch(v -> v == 0)
                && Arrays.stream(sweep.muspPerCm(gram)).allMatch(v -> v == 0);
    }

    private double rounded(double g) {
        return brief.balance().rounded(g);
    }

    /** Best grams of the free items when all else is as in a recipe. */
    private double[] solve(Recipe recipe, List<Integer> free) {
        int n = free.size();
        double[] nm = sweep.wavelengthsNm();
        List<Map<Ingredient, Double>> content = new ArrayList<>();
        for (int k : free) {
            Item i = recipe.items().get(k);
            content.add(i.stock().isPresent() ? recipe.contentPerG(i.stock().get()) : Map.of(i.ingredient(), 1.0));
        }
        List<Item> fixed = new ArrayList<>(recipe.items());
        for (int k : free) fixed.set(k, with(fixed.get(k), 0));
        boolean any = fixed.stream().anyMatch(i -> i.massG() > 0);
        Map<Ingredient, Double> fixedG = any ? with(recipe, fixed).massesG() : Map.of();
        double fixedMl = volumeMl(fixedG);
        double[] x =
                free.stream().mapToDouble(k -> recipe.items().get(k).massG()).toArray();
        for (int round = 0; round < ROUNDS; round++) {
            double volume = fixedMl;
            for (int i = 0; i < n; i++) volume += x[i] * volumeMl(content.get(i));
            x = programme(nm, fixedG, fixedMl, content, volume).orElse(x);
        }
        return x;
    }

    private Optional<double[]> programme(
            double[] nm,
            Map<Ingredient, Double> fixedG,
            double fixedMl,
            List<Map<Ingredient, Double>> content,
            double volumeMl) {
        int n = content.size();
        double[][] quadratic = new double[n][n];
        double[] linear = new double[n];
        List<ConvexProgramme.Limit> inside = new ArrayList<>();
        for (Point p : points) {
            int at = Arrays.binarySearch(nm, p.wavelengthNm());
            double scale = p.weight() / Math.pow(p.tolerancePerCm() * volumeMl, 2);
            double wanted = p.wantedPerCm();
            double missing = wanted * fixedMl - amount(fixedG, p, at);
            double[] row = new double[n];
            for (int i = 0; i < n; i++) row[i] = amount(content.get(i), p, at) - wanted * volumeMl(content.get(i));
            for (int i = 0; i < n; i++) {
                linear[i] += 2 * scale * row[i] * missing;
                for (int k = 0; k < n; k++) quadratic[i][k] += 2 * scale * row[i] * row[k];
            }
            uncertain(content, p, at, scale, quadratic);
            double half = p.tolerancePerCm() * volumeMl;
            inside.add(new ConvexProgramme.Limit(row, missing - half, missing + half));
        }
        double[] upper = new double[n];
        Arrays.fill(upper, Double.POSITIVE_INFINITY);
        ConvexProgramme.Solution s =
                ConvexProgramme.ofAmounts(quadratic, linear, 0, upper, inside).solve();
        if (s.status() != ConvexProgramme.Status.OPTIMAL)
            s = ConvexProgramme.ofAmounts(quadratic, linear, 0, upper, List.of())
                    .solve();
        return s.status() == ConvexProgramme.Status.OPTIMAL
                ? Optional.of(Arrays.stream(s.x()).map(v -> Math.max(0, v)).toArray())
                : Optional.empty();
    }

    /** Adds what is not known of each ingredient of the free items: (Σ x_i share_ik κ_kj u_k)² for each ingredient k. */
    private void uncertain(List<Map<Ingredient, Double>> content, Point p, int at, double scale, double[][] quadratic) {
        for (Ingredient k : sweepIngredients(content)) {
            if (baseParts.containsKey(k)) continue;
            double u = p.quantity() == Point.Quantity.MUA
                    ? k.uncertainty().absorption()
                    : k.uncertainty().scattering();
            double perG = amount(Map.of(k, 1.0), p, at) * u;
            for (int i = 0; i < quadratic.length; i++)
                for (int j = 0; j < quadratic.length; j++)
                    quadratic[i][j] += 2
                            * scale
                            * perG
                            * perG
                            * content.get(i).getOrDefault(k, 0.0)
                            * content.get(j).getOrDefault(k, 0.0);
        }
    }

    private static List<Ingredient> sweepIngredients(List<Map<Ingredient, Double>> content) {
        return content.stream().flatMap(c -> c.keySet().stream()).distinct().toList();
    }

    /** Σ m κ at a point, cm²: µ times the volume. */
    private double amount(Map<Ingredient, Double> massesG, Point p, int at) {
        if (massesG.isEmpty()) return 0;
        double[] mu = p.quantity() == Point.Quantity.MUA ? sweep.muaPerCm(massesG) : sweep.muspPerCm(massesG);
        return mu[at] * volumeMl(massesG);
    }

    private static double volumeMl(Map<Ingredient, Double> massesG) {
        double ml = 0;
        for (var e : massesG.entrySet()) ml += e.getValue() / e.getKey().densityGPerMl();
        return ml;
    }

    private static Item with(Item i, double massG) {
        return new Item(i.ingredient(), i.stock(), i.lot(), massG);
    }

    private static Recipe with(Recipe r, List<Item> items) {
        return new Recipe(
                r.title(), r.base(), r.temperatureC(), r.weighingUncertaintyG(), r.briefSha256(), r.stocks(), items);
    }
}
