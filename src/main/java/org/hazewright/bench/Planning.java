package org.hazewright.bench;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.function.ToDoubleFunction;
import org.hazewright.brief.Balance;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;
import org.hazewright.shelf.Ingredient;

/**
 * The choice among ways of dosing: begin with the most precise way for every ingredient, then take simpler ways, simplest first,
 * for as long as the score stays alike; last, move single doses by a few of the balance's last digits while that lowers the score.
 *
 * <p>A simpler way of dosing one ingredient counts as alike when it adds no more than {@value #ALIKE} squared half-widths of
 * tolerance, or half a per cent of the score, whichever is more: under a twentieth of a half-width in quadrature, which no
 * measurement of the finished phantom can show. A weighing is worth a person's minutes when it gains {@value #WEIGHING_GAINS}
 * squared half-widths, or one per cent of the score; a way that saves weighings may add as much for each.
 */
final class Planning {
    private static final double ALIKE = 0.002;
    private static final double ALIKE_RELATIVE = 0.005;
    private static final double WEIGHING_GAINS = 0.01;
    private static final double WEIGHING_GAINS_RELATIVE = 0.01;

    /** The same where a person asks for few weighings: about the whole of a tolerance in quadrature. */
    private static final double FEWEST_GAINS = 0.5;

    /** A last digit is moved for no less, in squared half-widths or as a share: grams that do next to nothing stay as they are. */
    private static final double WORTH_A_DIGIT = 1e-4;

    private static final double WORTH_A_DIGIT_RELATIVE = 5e-4;

    /** Most calls of the judge. */
    private static final int CALLS = 39;

    /** A last digit beyond this share of the grams is worth moving. */
    private static final double COARSE = 2e-5;

    /** Most last digits that a dose is moved from its plain rounding. */
    private static final int MOST_STEPS = 3;

    private final Contents contents;
    private final Balance balance;
    private final ToDoubleFunction<Recipe> judge;
    private final Assembly assembly;
    private final StockPlan.Wish wish;
    private int judged;

    Planning(Contents contents, Balance balance, ToDoubleFunction<Recipe> judge, StockPlan.Wish wish) {
        this.contents = contents;
        this.balance = balance;
        this.judge = judge;
        this.assembly = new Assembly(contents, balance);
        this.wish = wish;
    }

    StockPlan plan() {
        Dilutions dilutions = new Dilutions(contents, balance);
        List<List<Dose>> ways = new ArrayList<>();
        List<Dose> chosen = new ArrayList<>();
        for (Ingredient i : contents.concentrationGPerMl().keySet()) {
            List<Dose> of = affordable(wished(dilutions.of(i)));
            ways.add(of);
            chosen.add(of.get(0));
        }
        makeAffordable(chosen);
        int[] steps = new int[chosen.size()];
        double score = score(assembly.require(chosen));
        score = simplify(chosen, ways, score, steps);
        score = settle(chosen, steps, score);
        Recipe recipe = assembly.recipe(chosen, steps).orElseThrow();
        return new StockPlan(
                recipe,
                score,
                weighings(recipe, chosen),
                leftovers(recipe, chosen),
                inHand(chosen),
                notes(chosen),
                judged);
    }

    private double score(Recipe recipe) {
        judged++;
        return judge.applyAsDouble(recipe);
    }

    /** The ways that the wish allows; never none. */
    private List<Dose> wished(List<Dose> ways) {
        Dose undiluted = Dose.neat(ways.get(0).ingredient(), ways.get(0).massG());
        if (wish == StockPlan.Wish.NO_NEW_STOCK && SharedStocks.neatEnough(undiluted, balance))
            return List.of(undiluted);
        boolean hand = wish == StockPlan.Wish.STOCK_IN_HAND || wish == StockPlan.Wish.NO_NEW_STOCK;
        if (!hand) return ways;
        List<Dose> inHand = ways.stream().filter(Dose::inHand).toList();
        if (!inHand.isEmpty()) return inHand;
        if (wish == StockPlan.Wish.STOCK_IN_HAND) return ways;
        List<Dose> neat = ways.stream().filter(Dose::isNeat).toList();
        return neat.isEmpty()
                ? List.of(Dose.neat(ways.get(0).ingredient(), ways.get(0).massG()))
                : neat;
    }

    /** The ways that fit the base's liquid when all else goes in neat; neat where none does. */
    private List<Dose> affordable(List<Dose> ways) {
        List<Dose> fit = ways.stream()
                .filter(d -> assembly.recipe(List.of(d), new int[1]).isPresent())
                .toList();
        Dose any = ways.get(0);
        return fit.isEmpty() ? List.of(Dose.neat(any.ingredient(), any.massG())) : fit;
    }

    /** Gives up stocks, the one that brings most liquid first, until the base can spare the rest. */
    private void makeAffordable(List<Dose> chosen) {
        while (assembly.recipe(chosen, new int[chosen.size()]).isEmpty()) {
            Optional<Dose> thirstiest =
                    chosen.stream().filter(d -> !d.isNeat()).max(Comparator.comparingDouble(Dose::weighedG));
            if (thirstiest.isEmpty()) return;
            Dose d = thirstiest.get();
            chosen.set(chosen.indexOf(d), Dose.neat(d.ingredient(), d.massG()));
        }
    }

    private double simplify(List<Dose> chosen, List<List<Dose>> ways, double best, int[] steps) {
        double alike = Math.max(ALIKE, ALIKE_RELATIVE * Math.abs(best));
        double gains = wish == StockPlan.Wish.FEWEST_WEIGHINGS
                ? FEWEST_GAINS
                : Math.max(WEIGHING_GAINS, WEIGHING_GAINS_RELATIVE * Math.abs(best));
        double score = best;
        Comparator<Dose> simplest =
                Comparator.<Dose>comparingInt(d -> d.weighings(balance)).thenComparingDouble(Dose::leftG);
        for (int k = 0; k < chosen.size(); k++) {
            Dose precise = chosen.get(k);
            for (Dose way : ways.get(k).stream().sorted(simplest).toList()) {
                if (way.equals(precise) || judged >= CALLS) break;
                chosen.set(k, way);
                Optional<Recipe> recipe = assembly.recipe(chosen, steps);
                double s = recipe.isPresent() ? score(recipe.get()) : Double.POSITIVE_INFINITY;
                int saved = Math.max(0, precise.weighings(balance) - way.weighings(balance));
                if (s <= score + alike + saved * gains) {
                    score = s;
                    break;
                }
                chosen.set(k, precise);
            }
        }
        return score;
    }

    /** Coordinate search over the last digit of coarse grams, two passes at most. */
    private double settle(List<Dose> chosen, int[] steps, double best) {
        double score = best;
        for (int pass = 0; pass < 2; pass++) {
            double before = score;
            for (int k = 0; k < steps.length; k++) {
                if (balance.readabilityG() <= COARSE * chosen.get(k).weighedG()) continue;
                for (int direction : new int[] {1, -1}) {
                    double moved = slide(chosen, steps, k, direction, score);
                    if (moved < score) {
                        score = moved;
                        break;
                    }
                }
            }
            if (score >= before) break;
        }
        return score;
    }

    /** Moves one dose in one direction for as long as that helps; the score it ends with. */
    private double slide(List<Dose> chosen, int[] steps, int k, int direction, double score) {
        double best = score;
        while (judged < CALLS && Math.abs(steps[k] + direction) <= MOST_STEPS) {
            steps[k] += direction;
            double g = balance.rounded(chosen.get(k).weighedG()) + steps[k] * balance.readabilityG();
            Optional<Recipe> recipe =
                    Dilutions.weighable(g, balance) ? assembly.recipe(chosen, steps) : Optional.empty();
            double s = recipe.isPresent() ? score(recipe.get()) : Double.POSITIVE_INFINITY;
            if (!(s < best - Math.max(WORTH_A_DIGIT, WORTH_A_DIGIT_RELATIVE * Math.abs(best)))) {
                steps[k] -= direction;
                break;
            }
            best = s;
        }
        return best;
    }

    private int weighings(Recipe recipe, List<Dose> chosen) {
        List<String> inHand = inHand(chosen);
        int count =
                recipe.items().stream().mapToInt(i -> balance.loads(i.massG())).sum();
        for (Stock s : recipe.stocks())
            if (!inHand.contains(s.id())) count += balance.loads(s.ingredientG()) + balance.loads(s.diluentG());
        return count;
    }

    private static List<Leftover> leftovers(Recipe recipe, List<Dose> chosen) {
        List<String> inHand = inHand(chosen);
        return Leftover.of(recipe).stream()
                .filter(l -> !inHand.contains(l.stock()))
                .toList();
    }

    private static List<String> inHand(List<Dose> chosen) {
        return chosen.stream()
                .filter(Dose::inHand)
                .flatMap(d -> d.chain().stream())
                .map(Stock::id)
                .distinct()
                .toList();
    }

    private List<String> notes(List<Dose> chosen) {
        List<String> notes = new ArrayList<>();
        for (Dose d : chosen) {
            String name = d.ingredient().name();
            if (d.isNeat() && !Dilutions.weighable(d.massG(), balance)) {
                String why = contents.shelf().liquidOf(contents.base()).isEmpty()
                        ? contents.base().name() + " has no liquid to make a stock in"
                        : "no stock of it fits into the base's liquid";
                String end = balance.rounded(d.massG()) > 0
                        ? "it is weighed neat and is uncertain; make a larger batch or use a finer balance."
                        : "it is left out, since the balance shows it as 0; make a larger batch or use a finer balance.";
                notes.add(name + ": " + Grams.small(d.massG()) + " is below the smallest load of "
                        + Grams.small(balance.smallestLoadG()) + ", and " + why + "; " + end);
            }
            if (!d.isNeat() && Dilutions.settlesInStock(d.ingredient(), contents.base()))
                notes.add(name
                        + " settles: its stock is a suspension. Shake it and draw at once, each time; a larger batch"
                        + " would let it be weighed neat.");
        }
        return notes;
    }
}
