package org.hazewright.bench;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.function.BooleanSupplier;
import java.util.function.DoubleConsumer;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Brief;
import org.hazewright.brief.Point;
import org.hazewright.brief.Series;
import org.hazewright.brief.Titration;
import org.hazewright.design.CommonSet;
import org.hazewright.design.Frozen;
import org.hazewright.design.Option;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;
import org.hazewright.mixture.Sweep;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Family;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Part;
import org.hazewright.shelf.Shelf;

/**
 * A series made in one vessel: the first phantom is mixed, every next one is the one before with some of a titrant added.
 *
 * <p>The titrant is the base with what the last phantom needs more than the first. With V₀ the volume of the first phantom and V_t
 * that of the titrant which is to bring it to the last, it holds c_t = c_last + (c_last − c_first) V₀/V_t of each ingredient: of the
 * absorbers only, or, when µs' is to be kept, of the scatterers too, so that it scatters as the vessel does and what the
 * absorber scatters itself is taken off. Additions are solved step by step on the full model from what the rounded grams so far
 * gave, so that roundings do not add up.
 *
 * @param stocks shared by bath and titrant, made once
 * @param start the first phantom as a recipe
 * @param titrant what is added, as a recipe; a tenth more than is used
 * @param steps the first phantom, then one for every other
 * @param vesselMl the largest volume that is in the vessel at any time
 * @param chanceOfAll that every step lands inside every tolerance
 */
public record TitrationPlan(
        Series series,
        Ingredient base,
        List<Stock> stocks,
        List<Leftover> leftovers,
        Recipe start,
        Recipe titrant,
        List<Step> steps,
        double chanceOfAll,
        double vesselMl,
        Map<Ingredient, Double> buyG,
        List<String> notes,
        boolean proven) {

    /** Volume of the titrant over that of the bath, as little as the balance can dose well. */
    private static final double[] GROWTH = {0.02, 0.05, 0.10, 0.20};

    /** The smallest addition in standard uncertainties of the balance: half a per cent. */
    private static final double LEAST_DOSE = 200;

    private static final double SPARE = 1.1;
    private static final double NORMAL_95 = 1.959964;

    /**
     * One phantom of the titration.
     *
     * @param takenOutMl of the phantom before, 0 for the first
     * @param waterBackG water given back before adding
     * @param addG titrant to add, 0 for the first
     * @param contentG all that is in the vessel afterwards
     * @param chance that every target of this step lies inside its tolerance, first-order ({@link Landings}), earlier errors
     *     included
     */
    public record Step(
            String name,
            Brief brief,
            double takenOutMl,
            double waterBackG,
            double addG,
            double contentG,
            double contentMl,
            List<Answer.Predicted> predicted,
            double chance) {
        public Step {
            predicted = List.copyOf(predicted);
        }

        public boolean meets() {
            return predicted.stream().allMatch(Answer.Predicted::inside);
        }

        public double worstMiss() {
            return predicted.stream().mapToDouble(p -> Math.abs(p.miss())).max().orElse(0);
        }
    }

    public TitrationPlan {
        stocks = List.copyOf(stocks);
        leftovers = List.copyOf(leftovers);
        steps = List.copyOf(steps);
        notes = List.copyOf(notes);
    }

    public boolean meets() {
        return steps.stream().allMatch(Step::meets);
    }

    public Balance balance() {
        return steps.get(0).brief.balance();
    }

    /** Grams of titrant that all steps take. */
    public double titrantUsedG() {
        return steps.stream().mapToDouble(Step::addG).sum();
    }

    public static TitrationPlan of(Series series, Shelf shelf) {
        return of(series, shelf, () -> false, share -> {});
    }

    public static TitrationPlan of(Series series, Shelf shelf, BooleanSupplier stop, DoubleConsumer progress) {
        Titration titration = series.titration()
                .orElseThrow(() -> new Refusal("The series \"" + series.title() + "\" has no [titration]."));
        if (series.phantoms().size() < 2)
            throw new Refusal(
                    "A titration needs at least two phantoms: the first is mixed, the next are reached by adding.");
        CommonSet.Found found = CommonSet.find(series.phantoms(), shelf, stop, progress);
        Ingredient base = found.best().base();
        if (base.family() != Family.LIQUID)
            throw new Refusal("A titration needs a base that stays liquid, and " + base.id() + " is a "
                    + base.family().word()
                    + "; choose a liquid base, or take [titration] out to make the phantoms one by one.");
        return new Making(series, shelf, titration, found).plan();
    }

    /** The work of one plan. */
    private static final class Making {
        private final Series series;
        private final Shelf shelf;
        private final Titration titration;
        private final CommonSet.Found found;
        private final List<Brief> briefs;
        private final Balance balance;
        private final Ingredient base;
        private final Ingredient water;

        Making(Series series, Shelf shelf, Titration titration, CommonSet.Found found) {
            this.series = series;
            this.shelf = shelf;
            this.titration = titration;
            this.found = found;
            this.briefs = series.phantoms();
            this.balance = briefs.get(0).balance();
            this.base = found.best().base();
            this.water = shelf.liquidOf(base).orElse(base);
        }

        TitrationPlan plan() {
            TitrationPlan last = null;
            for (double growth : GROWTH) {
                Optional<Contents> titrant = titrant(growth);
                if (titrant.isEmpty()) continue;
                last = plan(titrant.get());
                double least = last.steps.stream()
                        .skip(1)
                        .mapToDouble(Step::addG)
                        .min()
                        .orElse(0);
                double enough = Math.max(2 * balance.smallestLoadG(), LEAST_DOSE * balance.standardUncertaintyG());
                if (least >= enough) break;
            }
            if (last == null)
                throw new Refusal("No titrant can be mixed that brings the first phantom to the last with up to "
                        + Grams.plain(100 * GROWTH[GROWTH.length - 1])
                        + " % more volume; take phantoms that lie closer together, or a stronger absorber.");
            titration.vesselMl().ifPresent(refuseSmallVessel(last.vesselMl));
            return last;
        }

        private static java.util.function.DoubleConsumer refuseSmallVessel(double neededMl) {
            return holds -> {
                if (neededMl > holds)
                    throw new Refusal("The titration comes to " + Grams.plain(neededMl) + " mL, and the vessel holds "
                            + Grams.plain(holds)
                            + " mL; begin with less (batch_ml), take aliquots out, or use a larger vessel.");
            };
        }

        /** What the titrant holds when it is to add so much of the bath's volume; empty when it cannot be mixed. */
        private Optional<Contents> titrant(double growth) {
            Option first = found.best().options().get(0);
            Option last = found.best().options().get(briefs.size() - 1);
            Map<Ingredient, Double> c = new LinkedHashMap<>();
            for (Ingredient i : last.concentrationGPerMl().keySet()) {
                boolean absorber = i.part() == Part.ABSORBER;
                if (!absorber && !titration.keepMusp()) continue;
                double end = last.concentrationGPerMl().get(i);
                double begin = first.concentrationGPerMl().getOrDefault(i, 0.0);
                double inTitrant = end + (end - begin) / growth;
                if (absorber && !(end > begin)) inTitrant = 0;
                if (inTitrant > 0) c.put(i, inTitrant);
            }
            if (c.keySet().stream().noneMatch(i -> i.part() == Part.ABSORBER))
                throw new Refusal("Nothing has to be added to come from the phantom \"" + series.ownName(briefs.get(0))
                        + "\" to \"" + series.ownName(briefs.get(briefs.size() - 1))
                        + "\": a titration goes from less to more µa. Put the phantoms in that order.");
            double added = c.entrySet().stream()
                    .mapToDouble(e -> e.getValue() / e.getKey().densityGPerMl())
                    .sum();
            if (added > 0.5) return Optional.empty();
            double volumeMl = roundUp(SPARE * growth * briefs.get(0).volumeMl());
            return Optional.of(contents(series.title() + ", titrant", c, volumeMl, List.of()));
        }

        /** Up to two digits. */
        private static double roundUp(double ml) {
            double digit = Math.pow(10, Math.floor(Math.log10(ml)) - 1);
            return Math.ceil(ml / digit - 1e-9) * digit;
        }

        private Contents contents(String title, Map<Ingredient, Double> c, double volumeMl, List<Stock> stocks) {
            Brief b = briefs.get(0);
            return new Contents(title, shelf, base, c, volumeMl, b.temperatureC(), b.sha256(), stocks);
        }

        private TitrationPlan plan(Contents titrant) {
            Option first = found.best().options().get(0);
            Brief b = briefs.get(0);
            Contents bath = contents(b.title(), first.concentrationGPerMl(), b.volumeMl(), List.of());
            Frozen judge = judge(titrant);
            List<Stock> wanted = SharedStocks.of(
                    List.of(new SharedStocks.Need(bath, first.frozen()), new SharedStocks.Need(titrant, judge)),
                    balance);
            StockPlan bathPlan = weighable(bath.withStocks(wanted), first.frozen());
            StockPlan titrantPlan = weighable(titrant.withStocks(wanted), judge);
            List<Recipe> recipes = List.of(bathPlan.recipe(), titrantPlan.recipe());
            List<Stock> stocks = SharedStocks.sized(wanted, recipes, balance);
            Recipe start = SeriesPlan.drawing(bathPlan.recipe(), stocks);
            Recipe added = SeriesPlan.drawing(titrantPlan.recipe(), stocks);
            List<Double> doses = doses(start, added);
            Run run = run(start, added, doses);
            List<Step> steps = run.steps;
            double largest = steps.stream().mapToDouble(Step::contentMl).max().orElse(0);
            List<Recipe> both = List.of(start, added);
            Map<Ingredient, Double> buy = SeriesPlan.buy(stocks, both);
            double back = titration.evaporationGPerStep() * (briefs.size() - 1);
            if (back > 0) buy.merge(water, back, Double::sum);
            return new TitrationPlan(
                    series,
                    base,
                    stocks,
                    SeriesPlan.leftovers(stocks, both),
                    start,
                    added,
                    steps,
                    run.chanceOfAll,
                    largest,
                    buy,
                    notes(steps, List.of(bathPlan, titrantPlan)),
                    found.proven());
        }

        private StockPlan weighable(Contents contents, Frozen judge) {
            return StockPlan.of(contents, balance, r -> judge.score(r).total(), StockPlan.Wish.NO_NEW_STOCK);
        }

        /** Judges the titrant's grams: what it is planned to do, to the share that the last phantom allows. */
        private Frozen judge(Contents titrant) {
            Assembly assembly = new Assembly(titrant, Balance.USUAL);
            List<Dose> neat = titrant.concentrationGPerMl().keySet().stream()
                    .map(i -> Dose.neat(i, titrant.massG(i)))
                    .toList();
            Map<Ingredient, Double> masses =
                    new LinkedHashMap<>(assembly.require(neat).massesG());
            titrant.concentrationGPerMl().keySet().forEach(i -> masses.put(i, titrant.massG(i)));
            Mixture mixture = new Mixture(masses, titrant.temperatureC());
            List<Point> points = new ArrayList<>();
            for (Point p : briefs.get(briefs.size() - 1).points()) {
                boolean absorption = p.quantity() == Point.Quantity.MUA;
                if (!absorption && !titration.keepMusp() || !(p.wantedPerCm() > 0)) continue;
                var at = mixture.at(p.wavelengthNm());
                double value = absorption ? at.muaPerCm() : at.muspPerCm();
                double share = p.tolerancePerCm() / p.wantedPerCm();
                if (value > 0) points.add(new Point(p.quantity(), p.wavelengthNm(), value, share * value, p.weight()));
            }
            return new Frozen(points, mixture, base, balance);
        }

        /** Grams of titrant for every step but the first, each solved from what the rounded ones before gave. */
        private List<Double> doses(Recipe start, Recipe titrant) {
            Map<Ingredient, Double> perG = Vessel.perG(titrant.massesG());
            Vessel v = new Vessel(start.massesG());
            List<Double> doses = new ArrayList<>();
            for (Brief b : briefs.subList(1, briefs.size())) {
                v = v.without(titration.aliquotMl());
                double g = 0;
                for (int round = 0; round < 3; round++) { // host index and crowding of the answer, not of the guess
                    Mixture near = new Mixture(v.plus(perG, g).massesG(), b.temperatureC());
                    Frozen model = new Frozen(b.points(), near, base, balance);
                    g = v.doseG(perG, model, v.massG());
                }
                double rounded = balance.rounded(g);
                doses.add(rounded);
                v = v.plus(perG, rounded);
            }
            return doses;
        }

        private record Run(List<Step> steps, double chanceOfAll) {}

        private Run run(Recipe start, Recipe titrant, List<Double> doses) {
            List<Double> back = new ArrayList<>(
                    java.util.Collections.nCopies(doses.size(), balance.rounded(titration.evaporationGPerStep())));
            TitrationDoubt.Loads loads = new TitrationDoubt.Loads(start, titrant, doses, back);
            List<Vessel> states = TitrationDoubt.run(loads, back, titration, water);
            List<Sweep> sweeps = new ArrayList<>();
            for (int k = 0; k < states.size(); k++) {
                Brief b = briefs.get(k);
                sweeps.add(Sweep.of(new Mixture(states.get(k).massesG(), b.temperatureC()), b.wavelengthsNm()));
            }
            List<double[][]> effects = new TitrationDoubt(loads, titration, water, balance, sweeps).effectsPerCm();
            List<List<Answer.Predicted>> predicted = new ArrayList<>();
            List<Landings.Doubt> doubts = new ArrayList<>();
            for (int k = 0; k < states.size(); k++) {
                predicted.add(
                        predicted(briefs.get(k), states.get(k), sweeps.get(k), TitrationDoubt.uPerCm(effects.get(k))));
                doubts.add(doubt(briefs.get(k), predicted.get(k), effects.get(k)));
            }
            Landings landings = Landings.of(doubts);
            List<Step> steps = new ArrayList<>();
            for (int k = 0; k < states.size(); k++) {
                Vessel v = states.get(k);
                Brief b = briefs.get(k);
                steps.add(new Step(
                        series.ownName(b),
                        b,
                        k == 0 ? 0 : titration.aliquotMl(),
                        k == 0 ? 0 : back.get(k - 1),
                        k == 0 ? 0 : doses.get(k - 1),
                        v.massG(),
                        v.volumeMl(),
                        predicted.get(k),
                        landings.each()[k]));
            }
            return new Run(steps, landings.all());
        }

        /** A step's misses, and what moves them, in half-widths. */
        private static Landings.Doubt doubt(Brief b, List<Answer.Predicted> predicted, double[][] effects) {
            double[] nm = b.wavelengthsNm();
            double[] misses = new double[predicted.size()];
            double[][] moved = new double[effects.length][misses.length];
            for (int j = 0; j < misses.length; j++) {
                Point p = predicted.get(j).point();
                int at = Arrays.binarySearch(nm, p.wavelengthNm())
                        + (p.quantity() == Point.Quantity.MUSP ? nm.length : 0);
                misses[j] = predicted.get(j).miss();
                for (int c = 0; c < moved.length; c++) moved[c][j] = effects[c][at] / p.tolerancePerCm();
            }
            return new Landings.Doubt(misses, moved);
        }

        private static List<Answer.Predicted> predicted(Brief b, Vessel v, Sweep sweep, double[] u) {
            double[] mua = sweep.muaPerCm(v.massesG());
            double[] musp = sweep.muspPerCm(v.massesG());
            double[] nm = b.wavelengthsNm();
            List<Answer.Predicted> predicted = new ArrayList<>();
            for (Point p : b.points()) {
                boolean scattering = p.quantity() == Point.Quantity.MUSP;
                int at = Arrays.binarySearch(nm, p.wavelengthNm());
                double value = (scattering ? musp : mua)[at];
                double uOf = u[scattering ? nm.length + at : at];
                predicted.add(new Answer.Predicted(
                        p, value, uOf, value - NORMAL_95 * uOf, value + NORMAL_95 * uOf, p.miss(value)));
            }
            return predicted;
        }

        private List<String> notes(List<Step> steps, List<StockPlan> plans) {
            List<String> notes = new ArrayList<>();
            notes.add(
                    titration.keepMusp()
                            ? "The titrant scatters as the bath does, so that µs' stays while µa rises."
                            : "The titrant carries no scatterer: µs' falls as the volume grows. With keep_musp = true it stays.");
            notes.add(
                    "Weigh each addition by difference from the titrant's bottle. Whatever is really weighed, write it down: an"
                            + " error of an early addition stays for the later ones, and the uncertainties count it.");
            List<String> outside =
                    steps.stream().filter(s -> !s.meets()).map(Step::name).toList();
            if (!outside.isEmpty()) notes.add("Outside a tolerance: " + String.join(", ", outside) + ".");
            plans.stream().flatMap(p -> p.notes().stream()).distinct().forEach(notes::add);
            return notes;
        }
    }
}
