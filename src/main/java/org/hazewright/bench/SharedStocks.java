package org.hazewright.bench;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Point;
import org.hazewright.design.Frozen;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Ingredient;

/**
 * Stocks that several mixtures draw from, each made once in an amount that covers all of its draws.
 *
 * <p>For every ingredient one way of dosing is chosen for all mixtures, but for those that weigh it well neat: neat, one stock, or
 * two in series with each mixture drawing from whichever suits it. A way costs the squared half-widths that its weighings add
 * over all mixtures, first-order, and {@value #PER_WEIGHING} for each weighing that makes a stock; a dose below the balance's
 * smallest load costs {@value #UNWEIGHABLE} more. Ratios are those of a single recipe's stocks; the grams that go in are the
 * smallest round ones that leave a tenth to spare and can be weighed well.
 */
final class SharedStocks {
    private static final int[] RATIOS = {10, 20, 50, 100, 200, 500, 1000};
    private static final double[] ROUND = {1, 1.2, 1.5, 2, 2.5, 3, 4, 5, 6, 8};
    private static final double LEAST_STOCK_G = 10;
    private static final double MOST_STOCK_G = 5000;
    private static final double USUAL_STOCK_G = 250;
    private static final double SPARE = 1.1;
    private static final double GOOD = 0.002;
    private static final double PER_WEIGHING = 0.01;
    private static final double UNWEIGHABLE = 10;

    /** A neat dose this good, one part in a thousand, is never drawn from a stock: it would only bring bulk. */
    private static final double NEAT_ENOUGH = 1e-3;

    static boolean neatEnough(Dose neat, Balance balance) {
        return Dilutions.weighable(neat.massG(), balance) && neat.relativeUncertainty(balance) <= NEAT_ENOUGH;
    }

    /** One mixture to be made: what it holds, and the model that judges it. */
    record Need(Contents contents, Frozen frozen) {}

    private final List<Need> needs;
    private final Balance balance;
    private final double leastLoadG;

    private SharedStocks(List<Need> needs, Balance balance) {
        this.needs = needs;
        this.balance = balance;
        this.leastLoadG = Math.max(balance.smallestLoadG(), 20 * balance.readabilityG());
    }

    /** Stocks in making order; empty when everything is best weighed neat. */
    static List<Stock> of(List<Need> needs, Balance balance) {
        SharedStocks shared = new SharedStocks(List.copyOf(needs), balance);
        Set<Ingredient> all = new LinkedHashSet<>();
        needs.forEach(n -> all.addAll(n.contents.concentrationGPerMl().keySet()));
        List<Stock> stocks = new ArrayList<>();
        for (Ingredient i : all) stocks.addAll(shared.best(i));
        return stocks;
    }

    /** The same stocks in amounts that cover what recipes draw from them; one that nothing is drawn from is left out. */
    static List<Stock> sized(List<Stock> stocks, List<Recipe> recipes, Balance balance) {
        SharedStocks shared = new SharedStocks(List.of(), balance);
        Map<String, Double> drawn = new LinkedHashMap<>();
        for (Recipe r : recipes)
            r.items().forEach(i -> i.stock().ifPresent(id -> drawn.merge(id, i.massG(), Double::sum)));
        List<Stock> sized = new ArrayList<>();
        for (int k = stocks.size() - 1; k >= 0; k--) {
            Stock s = stocks.get(k);
            double need = drawn.getOrDefault(s.id(), 0.0);
            if (need == 0) continue;
            int ratio = (int) Math.rint(s.ratio());
            Stock now = shared.stock(s, ratio, shared.roundGrams(ratio, need).orElse(s.ingredientG()));
            sized.add(0, now);
            s.from().ifPresent(id -> drawn.merge(id, now.ingredientG(), Double::sum));
        }
        return sized;
    }

    private List<Stock> best(Ingredient i) {
        List<Need> with = needs.stream().filter(n -> n.contents.massG(i) > 0).toList();
        if (with.isEmpty()) return List.of();
        Contents first = with.get(0).contents;
        Optional<Ingredient> liquid = first.shelf().liquidOf(first.base());
        List<Stock> best = List.of();
        double least = cost(i, with, best);
        boolean suspension = Dilutions.settlesInStock(i, first.base()) && least < UNWEIGHABLE;
        if (liquid.isEmpty() || liquid.get().equals(i) || suspension) return best;
        for (int ratio : RATIOS) {
            Stock one = stock(i, liquid.get(), ratio, ratio, Optional.empty());
            List<Stock> alone = List.of(one);
            double cost = cost(i, with, alone);
            if (cost < least) {
                least = cost;
                best = alone;
            }
            for (int second : RATIOS) {
                List<Stock> two =
                        List.of(one, stock(i, liquid.get(), second, (long) ratio * second, Optional.of(one.id())));
                cost = cost(i, with, two);
                if (cost < least) {
                    least = cost;
                    best = two;
                }
            }
        }
        return best;
    }

    /** Σ over mixtures of what dosing adds to the score, and the making of the stocks; infinite when a stock cannot be made. */
    private double cost(Ingredient i, List<Need> with, List<Stock> stocks) {
        int[] from = new int[with.size()];
        double[] drawn = new double[stocks.size()];
        for (int n = 0; n < from.length; n++) {
            double most = Double.POSITIVE_INFINITY;
            from[n] = -1;
            if (neatEnough(dose(i, with.get(n), stocks, -1), balance)) continue;
            for (int level = stocks.isEmpty() ? -1 : 0; level < stocks.size(); level++) {
                double cost = cost(i, with.get(n), stocks, level);
                if (cost < most) {
                    most = cost;
                    from[n] = level;
                }
            }
            if (from[n] >= 0)
                drawn[from[n]] += dose(i, with.get(n), stocks, from[n]).weighedG();
        }
        List<Stock> sized = new ArrayList<>(stocks);
        double sum = 0;
        for (int k = stocks.size() - 1; k >= 0; k--) {
            if (drawn[k] == 0) return Double.POSITIVE_INFINITY; // a level nobody needs
            int ratio = (int) Math.rint(stocks.get(k).ratio());
            OptionalDouble g = roundGrams(ratio, drawn[k]);
            if (g.isEmpty()) return Double.POSITIVE_INFINITY;
            if (k > 0) drawn[k - 1] += g.getAsDouble();
            Stock s = stock(stocks.get(k), ratio, g.getAsDouble());
            sized.set(k, s);
            sum += PER_WEIGHING * (balance.loads(s.ingredientG()) + balance.loads(s.diluentG()));
        }
        for (int n = 0; n < from.length; n++) sum += cost(i, with.get(n), sized, from[n]);
        return sum;
    }

    /** What dosing one mixture from a level (−1 for neat) adds to its score. */
    private double cost(Ingredient i, Need n, List<Stock> stocks, int level) {
        Dose d = dose(i, n, stocks, level);
        double u = Math.min(1, d.relativeUncertainty(balance));
        double cost = u * u * effect(i, n);
        if (!Dilutions.weighable(d.weighedG(), balance)) cost += UNWEIGHABLE;
        if (level >= 0
                && new Assembly(n.contents, balance)
                        .recipe(List.of(d), new int[1])
                        .isEmpty()) cost += 2 * UNWEIGHABLE;
        return cost;
    }

    private static Dose dose(Ingredient i, Need n, List<Stock> stocks, int level) {
        double massG = n.contents.massG(i);
        return level < 0 ? Dose.neat(i, massG) : new Dose(i, massG, stocks.subList(0, level + 1), true);
    }

    /** Σ_j w_j (µ_ij/τ_j)²: squared half-widths for a relative error of 1 in the ingredient's grams. */
    private static double effect(Ingredient i, Need n) {
        double[] kappa = n.frozen.kappaCm2PerG(i);
        double c = n.contents.concentrationGPerMl().get(i);
        double sum = 0;
        for (int j = 0; j < kappa.length; j++) {
            Point p = n.frozen.points().get(j);
            double e = kappa[j] * c / p.tolerancePerCm();
            sum += p.weight() * e * e;
        }
        return sum;
    }

    /**
     * The smallest round grams of what goes in so that {@code drawnG} can be drawn and the load itself is good to {@value #GOOD}, as
     * far as that takes no more than {@value #USUAL_STOCK_G} g of stock; empty when the stock would be too large.
     */
    private OptionalDouble roundGrams(int ratio, double drawnG) {
        double precise = Math.min(balance.standardUncertaintyG() / GOOD, USUAL_STOCK_G / ratio);
        double least =
                Math.max(Math.max(leastLoadG, precise), Math.max(LEAST_STOCK_G, SPARE * drawnG) / ratio) * (1 - 1e-9);
        for (int decade = -3; decade <= 3; decade++)
            for (double f : ROUND) {
                double g = balance.rounded(f * Math.pow(10, decade));
                if (g < least) continue;
                return g * ratio <= MOST_STOCK_G ? OptionalDouble.of(g) : OptionalDouble.empty();
            }
        return OptionalDouble.empty();
    }

    private Stock stock(Stock like, int ratio, double g) {
        return new Stock(like.id(), like.ingredient(), like.lot(), g, like.diluent(), diluentG(ratio, g), like.from());
    }

    private Stock stock(Ingredient i, Ingredient diluent, int ratio, long total, Optional<String> from) {
        double g = Math.max(1, balance.rounded(leastLoadG));
        if (!(g > 0)) throw new Refusal("The balance's smallest load rounds to 0 g.");
        return new Stock(i.id() + "-1-" + total, i, WeighingOrder.lotOf(i), g, diluent, diluentG(ratio, g), from);
    }

    private double diluentG(int ratio, double g) {
        return balance.rounded(g * (ratio - 1));
    }
}
