package org.hazewright.bench;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashSet;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.function.BooleanSupplier;
import java.util.function.DoubleConsumer;
import org.hazewright.brief.Brief;
import org.hazewright.brief.Point;
import org.hazewright.brief.StockInHand;
import org.hazewright.design.Design;
import org.hazewright.design.Finding;
import org.hazewright.design.Option;
import org.hazewright.design.Score;
import org.hazewright.mixture.Coefficients;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Shelf;

/**
 * From a brief to the answer that a person weighs: search, stocks, rounding, and the final check on the full model.
 *
 * <p>The search ranks sets without stocks; a set that needs a milligram ranks low there and may be the best once a stock is made.
 * So every leading set is planned, unless what no plan can improve on (bias and ingredient terms of its optimum) is already above
 * the best plan. Offered is the plan of least score among those inside every tolerance, or of all when none is.
 */
public final class Answering {
    /** Draws behind the chance that is printed: its standard error is at most 0.25 in 100. */
    public static final int DRAWS = 40_000;

    /** Draws behind the chance while a brief is being edited, and behind that of alternatives: at most 0.8 in 100. */
    public static final int DRAWS_WHILE_EDITING = 4_000;

    /** Sets for which other ways of dosing are tried. */
    private static final int LEADING = 3;

    /** Fewer weighings of the same set are offered when they land at least this often as the best does. */
    private static final double WORTH_FEWER = 0.5;

    /** Where nothing meets every tolerance, another way may miss by so much more than the best. */
    private static final double WORTH_SHOWING = 1.2;

    /** How far tolerances are narrowed, step by step, until the rounded grams stay inside. */
    private static final double[] EDGES = {1, 0.999, 0.995, 0.98, 0.95, 0.9};

    private final Brief brief;
    private final Shelf shelf;
    private final Design design;
    private final List<Stock> inHand;
    private final int draws;

    private Answering(Brief brief, Shelf shelf, int draws, BooleanSupplier stop, DoubleConsumer progress) {
        this.brief = brief;
        this.shelf = shelf;
        this.draws = draws;
        this.design = new Design(brief, shelf, stop, progress);
        this.inHand = inHand(brief, shelf);
    }

    /** The dilutions that a brief says stand on the bench, in making order. */
    static List<Stock> inHand(Brief brief, Shelf shelf) {
        Map<String, Stock> stocks = new LinkedHashMap<>();
        for (StockInHand s : brief.stocksInHand()) {
            Ingredient holds = s.from().isPresent()
                    ? stocks.get(s.from().get()).ingredient()
                    : shelf.require(s.ingredient().orElseThrow());
            stocks.put(
                    s.id(),
                    new Stock(
                            s.id(),
                            holds,
                            WeighingOrder.lotOf(holds),
                            s.ingredientG(),
                            shelf.require(s.diluent()),
                            s.diluentG(),
                            s.from()));
        }
        return List.copyOf(stocks.values());
    }

    /** The answer, with up to {@code alternatives} other ways. */
    public static Answer to(Brief brief, Shelf shelf, int alternatives) {
        return to(brief, shelf, alternatives, () -> false, share -> {});
    }

    public static Answer to(Brief brief, Shelf shelf, int alternatives, BooleanSupplier stop, DoubleConsumer progress) {
        return new Answering(brief, shelf, DRAWS, stop, progress).answer(alternatives);
    }

    /**
     * The answer while a brief is being edited: the same search, proof, stocks and first-order uncertainties, no other ways, and
     * the chance and its intervals from {@value #DRAWS_WHILE_EDITING} draws only.
     */
    public static Answer whileEditing(Brief brief, Shelf shelf, BooleanSupplier stop) {
        return new Answering(brief, shelf, DRAWS_WHILE_EDITING, stop, share -> {}).answer(0);
    }

    /** An option made weighable. */
    private record Planned(Option option, StockPlan plan, Score score, double worstMiss) {
        Recipe recipe() {
            return plan.recipe();
        }

        boolean meets() {
            return worstMiss <= 1;
        }
    }

    private Answer answer(int alternatives) {
        Finding finding = design.find(alternatives == 0);
        List<Planned> planned = new ArrayList<>();
        double best = Double.POSITIVE_INFINITY;
        for (Option option : finding.options()) {
            if (option.meets() != finding.best().meets()) continue;
            double unbeatable = option.score().bias() + option.score().ingredient();
            if (alternatives == 0 && unbeatable > best) continue;
            Planned p = plan(option);
            planned.add(p);
            if (p.meets() == option.meets()) best = Math.min(best, p.score().total());
        }
        planned.sort(Comparator.comparing((Planned p) -> !p.meets())
                .thenComparingDouble(p -> p.score().total()));
        Planned offered = planned.get(0);
        return assemble(finding, offered, new OtherWays(planned).others(alternatives));
    }

    private Planned plan(Option option) {
        return plan(option, StockPlan.Wish.LEAST_SCORE);
    }

    private Planned plan(Option option, StockPlan.Wish wish) {
        Planned last = null;
        for (double edge : EDGES) {
            Optional<Option> narrowed = edge == 1 ? Optional.of(option) : design.narrowed(option, edge);
            if (narrowed.isEmpty()) break;
            Planned now = planned(narrowed.get(), option, wish);
            if (last == null || now.worstMiss() < last.worstMiss()) last = now;
            if (!option.meets() || now.meets()) break;
        }
        return last;
    }

    private Planned planned(Option option, Option exact, StockPlan.Wish wish) {
        Contents contents = new Contents(
                brief.title(),
                shelf,
                option.base(),
                option.concentrationGPerMl(),
                brief.volumeMl(),
                brief.temperatureC(),
                brief.sha256(),
                inHand);
        StockPlan plan = StockPlan.of(
                contents,
                brief.balance(),
                recipe -> {
                    double outside = Math.max(0, option.frozen().worstMiss(recipe) - 1);
                    double fine = exact.meets() ? 1e3 * outside : 0;
                    return option.frozen().score(recipe).total() + fine;
                },
                wish);
        Score score = option.frozen().score(plan.recipe());
        return new Planned(exact, plan, score, worstMiss(plan.recipe()));
    }

    private double worstMiss(Recipe recipe) {
        double[] values = values(Mixture.of(recipe));
        double worst = 0;
        for (int j = 0; j < values.length; j++)
            worst = Math.max(worst, Math.abs(brief.points().get(j).miss(values[j])));
        return worst;
    }

    private double[] values(Mixture mixture) {
        Map<Double, Coefficients> at = new LinkedHashMap<>();
        List<Point> points = brief.points();
        double[] values = new double[points.size()];
        for (int j = 0; j < values.length; j++) {
            Coefficients c = at.computeIfAbsent(points.get(j).wavelengthNm(), mixture::at);
            values[j] = points.get(j).quantity() == Point.Quantity.MUA ? c.muaPerCm() : c.muspPerCm();
        }
        return values;
    }

    private Answer assemble(Finding finding, Planned offered, List<Answer.Alternative> others) {
        Recipe recipe = offered.recipe();
        Outlook outlook = Outlook.of(brief, recipe, draws);
        double bias = 0;
        for (Answer.Predicted p : outlook.predicted()) bias += p.point().weight() * p.miss() * p.miss();
        Score score =
                new Score(bias, offered.score().ingredient(), offered.score().weighing());
        Option exact = offered.option();
        return new Answer(
                brief,
                recipe,
                Mixture.of(recipe),
                outlook.predicted(),
                score,
                new Answer.Exact(exact.score(), exact.concentrationGPerMl()),
                outlook.worstMiss(),
                Math.min(finding.bestPossibleWorstMiss(), outlook.worstMiss()),
                outlook.chance(),
                outlook.budget(),
                exact == finding.best() ? finding.limits() : design.heldBack(exact),
                others,
                finding.leftOut(),
                new Answer.SearchCount(finding.admissible(), finding.solved(), finding.cut(), finding.proven()),
                offered.plan().notes());
    }

    /** Plans worth offering beside the best: none beaten by another in score, weighings, cost and chance at once. */
    private final class OtherWays {
        private record Way(Planned planned, double chance, double cost) {
            int weighings() {
                return planned.plan().weighings();
            }

            boolean beats(Way other) {
                boolean noWorse =
                        planned.score().total() <= other.planned.score().total()
                                && weighings() <= other.weighings()
                                && !(cost > other.cost)
                                && chance >= other.chance - 0.005;
                return noWorse
                        && (planned.score().total() < other.planned.score().total()
                                || weighings() < other.weighings()
                                || cost < other.cost);
            }
        }

        private final List<Planned> planned;

        OtherWays(List<Planned> planned) {
            this.planned = planned;
        }

        List<Answer.Alternative> others(int most) {
            if (most == 0) return List.of();
            List<Way> ways = new ArrayList<>();
            List<Planned> all = new ArrayList<>(planned);
            all.addAll(otherDosing());
            for (Planned p : all) {
                double chance =
                        Outlook.of(brief, p.recipe(), DRAWS_WHILE_EDITING).chance();
                ways.add(new Way(p, chance, cost(p.plan())));
            }
            Way best = ways.get(0);
            List<Answer.Alternative> others = new ArrayList<>();
            for (Way way : ways.subList(1, ways.size())) {
                if (others.size() == most) break;
                if (ways.stream().anyMatch(other -> other != way && other.beats(way))) continue;
                if (!way.planned.meets() && way.planned.worstMiss() > WORTH_SHOWING * best.planned.worstMiss())
                    continue;
                boolean fewer = way.weighings() < best.weighings() && way.planned.option() == best.planned.option();
                if (fewer && way.chance < WORTH_FEWER * best.chance) continue;
                others.add(new Answer.Alternative(
                        why(way, best),
                        way.planned.recipe(),
                        way.planned.score(),
                        way.planned.worstMiss(),
                        way.chance,
                        way.weighings(),
                        way.cost));
            }
            return others;
        }

        /** The leading sets dosed with fewer weighings, and from the stocks in hand, where that is another recipe. */
        private List<Planned> otherDosing() {
            List<Planned> others = new ArrayList<>();
            for (Planned p : planned.subList(0, Math.min(LEADING, planned.size()))) {
                if (p.option().meets() != p.meets()) continue;
                Planned fewer = plan(p.option(), StockPlan.Wish.FEWEST_WEIGHINGS);
                if (fewer.plan().weighings() < p.plan().weighings() && fewer.meets() == p.meets()) others.add(fewer);
                if (inHand.isEmpty()) continue;
                Planned fromHand = plan(p.option(), StockPlan.Wish.STOCK_IN_HAND);
                boolean another =
                        !fromHand.plan().stocksInHand().equals(p.plan().stocksInHand());
                if (another && fromHand.meets() == p.meets()) others.add(fromHand);
            }
            return others;
        }

        private String why(Way way, Way best) {
            if (!way.planned.plan().stocksInHand().isEmpty()
                    && best.planned.plan().stocksInHand().isEmpty()) return "from stock in hand";
            if (way.chance > best.chance + 0.01) return "likelier to land";
            if (way.weighings() < best.weighings()) return "fewer weighings";
            if (way.cost < 0.95 * best.cost) return "costs less";
            Set<Ingredient> news =
                    new HashSet<>(way.planned.option().concentrationGPerMl().keySet());
            news.removeAll(best.planned.option().concentrationGPerMl().keySet());
            return news.isEmpty()
                    ? "another base"
                    : "with "
                            + news.stream()
                                    .map(Ingredient::id)
                                    .sorted()
                                    .findFirst()
                                    .orElseThrow();
        }
    }

    /** Price of what is weighed in, the rest of new stocks included; NaN when an ingredient has no price. */
    private static double cost(StockPlan plan) {
        Map<Ingredient, Double> grams = new LinkedHashMap<>(plan.recipe().massesG());
        for (Leftover left : plan.leftovers())
            plan.recipe()
                    .contentPerG(left.stock())
                    .forEach((i, perG) -> grams.merge(i, perG * left.leftG(), Double::sum));
        double cost = 0;
        for (var entry : grams.entrySet()) cost += entry.getKey().pricePerG().orElse(Double.NaN) * entry.getValue();
        return cost;
    }
}
