package org.hazewright.bench;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import java.util.stream.DoubleStream;
import java.util.stream.IntStream;
import org.hazewright.brief.Balance;
import org.hazewright.mixture.Stock;
import org.hazewright.shelf.Family;
import org.hazewright.shelf.Ingredient;

/**
 * The ways of dosing one ingredient that are worth judging: neat, from a stock in hand, and at most three new stocks.
 *
 * <p>A stock's ratio (grams of stock for one of what goes in) comes from {@link #RATIOS}, what goes in is 1, 2 or 5 times a power
 * of ten grams, so that both of its loads are round. A stock is at least {@value #LEAST_STOCK_G} g, at least a tenth more than is
 * drawn from it (the last of a bottle cannot be poured out), and at most {@value #MOST_STOCK_G} g. Every load is at or above the
 * balance's smallest and twenty times its last digit. Two stocks in series are tried when no single one will do, or when the best
 * single one leaves more than {@value #GOOD} relative uncertainty.
 */
final class Dilutions {
    private static final int[] RATIOS = {10, 20, 50, 100, 200, 500, 1000};
    private static final double LEAST_STOCK_G = 10;
    private static final double MOST_STOCK_G = 250;
    private static final double SPARE = 1.1;
    private static final double GOOD = 0.002;

    /** Neat weighing this good needs no stock whatever the tolerances: five parts in ten thousand. */
    private static final double NEAT_ENOUGH = 5e-4;

    private final Contents contents;
    private final Balance balance;
    private final Optional<Ingredient> liquid;
    private final double[] roundGrams; // 1, 2, 5 times powers of ten that the balance can show and trust, ascending

    Dilutions(Contents contents, Balance balance) {
        this.contents = contents;
        this.balance = balance;
        this.liquid = contents.shelf().liquidOf(contents.base());
        double least = Math.max(balance.smallestLoadG(), 20 * balance.readabilityG()) * (1 - 1e-9);
        this.roundGrams = IntStream.rangeClosed(-3, 2)
                .boxed()
                .flatMapToDouble(decade -> DoubleStream.of(1, 2, 5).map(f -> balance.rounded(f * Math.pow(10, decade))))
                .filter(g -> g >= least)
                .distinct()
                .toArray();
    }

    /** Whether the amount can be weighed as it is: at or above the smallest load, and not rounded to nothing. */
    static boolean weighable(double massG, Balance balance) {
        double shown = balance.rounded(massG);
        return shown >= balance.smallestLoadG() && shown > 0;
    }

    /**
     * A powder that settles, in a thin base: its stock is a suspension that falls out while it is drawn from. In silicone and
     * resin a masterbatch is thick enough to hold it.
     */
    static boolean settlesInStock(Ingredient i, Ingredient base) {
        return i.settles() && (base.family() == Family.LIQUID || base.family() == Family.GEL);
    }

    /**
     * Ways of dosing, most precise first. Never empty: where nothing else will do the ingredient goes in neat, below the smallest
     * load.
     */
    List<Dose> of(Ingredient i) {
        double massG = contents.massG(i);
        Dose neat = Dose.neat(i, massG);
        boolean weighable = weighable(massG, balance);
        List<Dose> doses = new ArrayList<>();
        if (weighable) doses.add(neat);
        doses.addAll(fromHand(i, massG));
        boolean precise = weighable && neat.relativeUncertainty(balance) <= NEAT_ENOUGH;
        boolean suspension = weighable && settlesInStock(i, contents.base());
        if (!precise && !suspension && liquid.isPresent() && !liquid.get().equals(i))
            doses.addAll(worthJudging(fresh(i, massG, liquid.get())));
        if (doses.isEmpty()) return List.of(neat);
        doses.sort(Comparator.comparingDouble(d -> d.relativeUncertainty(balance)));
        return doses;
    }

    private List<Dose> fromHand(Ingredient i, double massG) {
        List<Dose> doses = new ArrayList<>();
        for (Stock s : contents.inHand()) {
            if (!s.ingredient().equals(i)) continue;
            Dose dose = new Dose(i, massG, chainTo(s), true);
            if (weighable(dose.weighedG(), balance)) doses.add(dose);
        }
        return doses;
    }

    private List<Stock> chainTo(Stock last) {
        List<Stock> chain = new ArrayList<>(List.of(last));
        while (chain.get(0).from().isPresent()) {
            String from = chain.get(0).from().get();
            chain.add(
                    0,
                    contents.inHand().stream()
                            .filter(s -> s.id().equals(from))
                            .findFirst()
                            .orElseThrow(() -> new org.hazewright.optics.Refusal("The stock in hand " + last.id()
                                    + " is diluted from \"" + from + "\", which is not among the stocks in hand.")));
        }
        return chain;
    }

    private List<Dose> fresh(Ingredient i, double massG, Ingredient diluent) {
        List<Dose> single = new ArrayList<>();
        for (int ratio : RATIOS)
            for (double g : roundGrams(ratio, massG * ratio))
                add(single, new Dose(i, massG, List.of(stock(i, diluent, ratio, g, ratio, Optional.empty())), false));
        double best = single.stream()
                .mapToDouble(d -> d.relativeUncertainty(balance))
                .min()
                .orElse(Double.POSITIVE_INFINITY);
        if (best <= GOOD) return single;
        List<Dose> all = new ArrayList<>(single);
        for (int first : RATIOS)
            for (int second : RATIOS)
                for (double g2 : roundGrams(second, massG * first * second))
                    for (double g1 : roundGrams(first, g2)) {
                        Stock one = stock(i, diluent, first, g1, first, Optional.empty());
                        Stock two = stock(i, diluent, second, g2, (long) first * second, Optional.of(one.id()));
                        add(all, new Dose(i, massG, List.of(one, two), false));
                    }
        return all;
    }

    /** Grams to put into a stock of this ratio so that {@code drawnG} can be drawn from it; round numbers, smallest first. */
    private List<Double> roundGrams(int ratio, double drawnG) {
        List<Double> grams = new ArrayList<>();
        double least = Math.max(LEAST_STOCK_G, SPARE * drawnG) / ratio * (1 - 1e-9);
        for (double g : roundGrams) if (g >= least && g * ratio <= MOST_STOCK_G) grams.add(g);
        return grams;
    }

    private void add(List<Dose> doses, Dose dose) {
        if (!weighable(dose.weighedG(), balance)) return;
        String id = dose.chain().get(dose.chain().size() - 1).id();
        if (contents.inHand().stream().anyMatch(s -> s.id().equals(id))) return;
        doses.add(dose);
    }

    private static Stock stock(
            Ingredient i, Ingredient diluent, int ratio, double g, long total, Optional<String> from) {
        return new Stock(i.id() + "-1-" + total, i, WeighingOrder.lotOf(i), g, diluent, decimal(g * (ratio - 1)), from);
    }

    /** Takes the noise of binary fractions off a product of round numbers. */
    private static double decimal(double g) {
        return Math.rint(g * 1e6) / 1e6;
    }

    /**
     * At most three: the most precise, and those with the fewest weighings and then the least left over among all within twice
     * and five times its uncertainty, or within 0.1 and 0.4 %, whichever is more.
     */
    private List<Dose> worthJudging(List<Dose> fresh) {
        if (fresh.isEmpty()) return fresh;
        Comparator<Dose> simplest = Comparator.<Dose>comparingInt(d -> d.weighings(balance))
                .thenComparingDouble(Dose::leftG)
                .thenComparingDouble(d -> d.relativeUncertainty(balance));
        Dose finest = fresh.stream()
                .min(Comparator.comparingDouble((Dose d) -> d.relativeUncertainty(balance))
                        .thenComparing(simplest))
                .orElseThrow();
        double u = finest.relativeUncertainty(balance);
        Set<Dose> worth = new LinkedHashSet<>();
        worth.add(finest);
        for (double within : new double[] {Math.max(2 * u, 0.001), Math.max(5 * u, 0.004)})
            worth.add(fresh.stream()
                    .filter(d -> d.relativeUncertainty(balance) <= within)
                    .min(simplest)
                    .orElseThrow());
        return List.copyOf(worth);
    }
}
