package org.hazewright.bench;

import java.util.ArrayList;
import java.util.Collection;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.TreeSet;
import java.util.function.BooleanSupplier;
import java.util.function.DoubleConsumer;
import java.util.stream.Collectors;
import java.util.stream.IntStream;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Brief;
import org.hazewright.brief.Series;
import org.hazewright.design.CommonSet;
import org.hazewright.design.Design;
import org.hazewright.design.Option;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;
import org.hazewright.optics.Figures;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Shelf;

/**
 * A whole set of phantoms made weighable: one list of bottles where possible ({@link CommonSet}), stocks made once for all
 * ({@link SharedStocks}), what to buy, and one recipe a phantom.
 *
 * @param phantoms in the order of the series
 * @param stocks made once, in making order; every recipe that draws from one names it in these amounts
 * @param leftovers of the stocks after all phantoms
 * @param buyG grams of each ingredient that all phantoms and stocks take together, base's parts first
 * @param notes why these bottles, which phantoms need others, what a person should know of the stocks
 * @param leftOut ingredients of the shelf that could not take part, and why
 * @param proven whether every phantom's own search came to its end
 */
public record SeriesPlan(
        Series series,
        Ingredient base,
        Set<String> ingredients,
        List<Phantom> phantoms,
        List<Stock> stocks,
        List<Leftover> leftovers,
        Map<Ingredient, Double> buyG,
        List<String> notes,
        Map<String, String> leftOut,
        boolean proven) {

    /** Draws behind each phantom's chance: its standard error is at most 0.5 in 100. */
    private static final int DRAWS = 10_000;

    private static final double[] EDGES = {1, 0.999, 0.995, 0.98, 0.95, 0.9};

    /** One phantom of the set: its own name, its recipe, and what that gives. */
    public record Phantom(String name, Brief brief, Recipe recipe, Outlook outlook) {
        public boolean meets() {
            return outlook.meets();
        }

        /** Grams of a column of the weighing table; 0 when the phantom takes nothing of it. */
        public double massG(String label) {
            return recipe.items().stream()
                    .filter(i -> i.label().equals(label))
                    .mapToDouble(Item::massG)
                    .sum();
        }
    }

    public SeriesPlan {
        phantoms = List.copyOf(phantoms);
        stocks = List.copyOf(stocks);
        leftovers = List.copyOf(leftovers);
        notes = List.copyOf(notes);
    }

    /** The plan of a series that is not a titration. */
    public static SeriesPlan of(Series series, Shelf shelf) {
        return of(series, shelf, () -> false, share -> {});
    }

    /** Once {@code stop} is true it ends with the best so far, marked as not proven. */
    public static SeriesPlan of(Series series, Shelf shelf, BooleanSupplier stop, DoubleConsumer progress) {
        List<Brief> briefs = series.phantoms();
        CommonSet.Found found = CommonSet.find(briefs, shelf, stop, progress);
        List<Option> options = IntStream.range(0, briefs.size())
                .mapToObj(
                        k -> found.own().getOrDefault(k, found.best().options().get(k)))
                .toList();
        Balance balance = briefs.get(0).balance();
        List<SharedStocks.Need> needs = IntStream.range(0, briefs.size())
                .mapToObj(k -> new SharedStocks.Need(
                        contents(briefs.get(k), options.get(k), shelf, List.of()),
                        options.get(k).frozen()))
                .toList();
        List<Stock> wanted = SharedStocks.of(needs, balance);
        List<StockPlan> plans = IntStream.range(0, briefs.size())
                .parallel()
                .mapToObj(k -> plan(briefs.get(k), options.get(k), shelf, wanted))
                .toList();
        List<Stock> stocks =
                SharedStocks.sized(wanted, plans.stream().map(StockPlan::recipe).toList(), balance);
        List<Phantom> phantoms = IntStream.range(0, briefs.size())
                .parallel()
                .mapToObj(k -> {
                    Brief brief = briefs.get(k);
                    Recipe recipe = drawing(plans.get(k).recipe(), stocks);
                    return new Phantom(series.ownName(brief), brief, recipe, Outlook.of(brief, recipe, DRAWS));
                })
                .toList();
        List<Recipe> recipes = phantoms.stream().map(Phantom::recipe).toList();
        return new SeriesPlan(
                series,
                found.best().base(),
                used(options),
                phantoms,
                stocks,
                leftovers(stocks, recipes),
                buy(stocks, recipes),
                notes(found, phantoms, plans),
                found.leftOut(),
                found.proven());
    }

    public boolean meets() {
        return phantoms.stream().allMatch(Phantom::meets);
    }

    /** How many phantoms land on average: the sum of their chances, which holds however their errors go together. */
    public double expectedToLand() {
        return phantoms.stream().mapToDouble(p -> p.outlook.chance()).sum();
    }

    public Balance balance() {
        return phantoms.get(0).brief.balance();
    }

    /** Columns of the weighing table in weighing order: labels of the bottles and stocks that any phantom takes from. */
    public List<String> columns() {
        List<String> columns = new ArrayList<>();
        phantoms.stream()
                .map(Phantom::recipe)
                .sorted(java.util.Comparator.comparingInt(r -> -r.items().size()))
                .forEach(r -> {
                    int at = 0;
                    for (Item i : r.items()) {
                        int known = columns.indexOf(i.label());
                        if (known < 0) columns.add(at++, i.label());
                        else at = known + 1;
                    }
                });
        return columns;
    }

    /** Sum of a column of the weighing table, g. */
    public double sumG(String label) {
        return phantoms.stream().mapToDouble(p -> p.massG(label)).sum();
    }

    private static Contents contents(Brief brief, Option option, Shelf shelf, List<Stock> stocks) {
        return new Contents(
                brief.title(),
                shelf,
                option.base(),
                option.concentrationGPerMl(),
                brief.volumeMl(),
                brief.temperatureC(),
                brief.sha256(),
                stocks);
    }

    /** Rounded to the balance, with tolerances narrowed until the grams stay inside. */
    private static StockPlan plan(Brief brief, Option option, Shelf shelf, List<Stock> stocks) {
        StockPlan best = null;
        double least = Double.POSITIVE_INFINITY;
        for (double edge : EDGES) {
            Optional<Option> narrowed =
                    edge == 1 ? Optional.of(option) : new Design(brief, shelf).narrowed(option, edge);
            if (narrowed.isEmpty()) break;
            Option o = narrowed.get();
            StockPlan plan = StockPlan.of(
                    contents(brief, o, shelf, stocks),
                    brief.balance(),
                    recipe -> o.frozen().score(recipe).total()
                            + (option.meets() ? 1e3 * Math.max(0, o.frozen().worstMiss(recipe) - 1) : 0),
                    StockPlan.Wish.NO_NEW_STOCK);
            double worst = Outlook.of(brief, plan.recipe(), 0).worstMiss();
            if (worst < least) {
                least = worst;
                best = plan;
            }
            if (!option.meets() || worst <= 1) break;
        }
        return best;
    }

    /** A recipe with its stocks in the amounts of the whole series. */
    static Recipe drawing(Recipe recipe, List<Stock> stocks) {
        Set<String> needed = new LinkedHashSet<>();
        recipe.items().forEach(i -> i.stock().ifPresent(needed::add));
        for (int k = stocks.size() - 1; k >= 0; k--)
            if (needed.contains(stocks.get(k).id())) stocks.get(k).from().ifPresent(needed::add);
        return new Recipe(
                recipe.title(),
                recipe.base(),
                recipe.temperatureC(),
                recipe.weighingUncertaintyG(),
                recipe.briefSha256(),
                stocks.stream().filter(s -> needed.contains(s.id())).toList(),
                recipe.items());
    }

    private static Set<String> used(Collection<Option> options) {
        Set<String> ids = new TreeSet<>();
        options.forEach(o -> ids.addAll(o.ids()));
        return ids;
    }

    static List<Leftover> leftovers(List<Stock> stocks, List<Recipe> recipes) {
        List<Leftover> left = new ArrayList<>();
        for (Stock s : stocks) {
            double used = 0;
            for (Recipe r : recipes)
                for (Item i : r.items()) if (i.stock().filter(s.id()::equals).isPresent()) used += i.massG();
            for (Stock later : stocks) if (later.from().filter(s.id()::equals).isPresent()) used += later.ingredientG();
            left.add(new Leftover(s.id(), s.totalG(), used));
        }
        return left;
    }

    static Map<Ingredient, Double> buy(List<Stock> stocks, List<Recipe> recipes) {
        Map<Ingredient, Double> buy = new LinkedHashMap<>();
        for (Recipe r : recipes)
            for (Item i : r.items()) if (i.stock().isEmpty()) buy.merge(i.ingredient(), i.massG(), Double::sum);
        for (Stock s : stocks) {
            if (s.from().isEmpty()) buy.merge(s.ingredient(), s.ingredientG(), Double::sum);
            buy.merge(s.diluent(), s.diluentG(), Double::sum);
        }
        return buy;
    }

    private static List<String> notes(CommonSet.Found found, List<Phantom> phantoms, List<StockPlan> plans) {
        List<String> notes = new ArrayList<>();
        long all = phantoms.size();
        long inside = found.best().meeting();
        String bottles = found.best().ids().isEmpty()
                ? "no bottle but the base"
                : String.join(", ", found.best().ids());
        String why = "One list of bottles for the set: " + bottles + "; it brings " + inside + " of " + all
                + " inside every tolerance. "
                + (found.ofAll()
                        ? "Of the " + found.compared() + " sets of bottles that the brief allows none does better"
                        : "It is the best of the " + found.compared()
                                + " sets that lead for any phantom; that no other set does better for all is not proven");
        if (found.next().isPresent()) {
            CommonSet.Way next = found.next().get();
            why += "; the next best (" + (next.ids().isEmpty() ? "the base alone" : String.join(", ", next.ids()))
                    + " in " + next.base().id() + ") brings " + next.meeting()
                    + (next.meeting() == inside ? ", but misses by more or is known less well" : "");
        }
        notes.add(why + ".");
        found.own()
                .forEach((k, option) ->
                        notes.add(phantoms.get(k).name() + " cannot be met with these bottles; it is made with "
                                + option.ids().stream().sorted().collect(Collectors.joining(", ")) + " instead."));
        List<Phantom> outside = phantoms.stream().filter(p -> !p.meets()).toList();
        if (!outside.isEmpty()) {
            Phantom worst = outside.stream()
                    .max(java.util.Comparator.comparingDouble(p -> p.outlook().worstMiss()))
                    .orElseThrow();
            Answer.Predicted p = worst.outlook().predicted().stream()
                    .max(java.util.Comparator.comparingDouble(x -> Math.abs(x.miss())))
                    .orElseThrow();
            notes.add("Outside a tolerance: "
                    + outside.stream().map(Phantom::name).collect(Collectors.joining(", "))
                    + ". Farthest is " + worst.name() + ", "
                    + p.point().quantity().sign() + " at "
                    + Figures.plain(p.point().wavelengthNm()) + " nm: " + Figures.significant(p.perCm(), 3)
                    + " /cm in place of " + Figures.significant(p.point().wantedPerCm(), 3)
                    + "; ask for that phantom alone (design) to read what holds it back.");
        }
        plans.stream().flatMap(p -> p.notes().stream()).distinct().forEach(notes::add);
        return notes;
    }
}
