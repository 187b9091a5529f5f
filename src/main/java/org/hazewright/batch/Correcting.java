package org.hazewright.batch;

import java.util.ArrayList;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import org.hazewright.bench.Additions;
import org.hazewright.bench.Grams;
import org.hazewright.bench.Outlook;
import org.hazewright.bench.Weighing;
import org.hazewright.brief.Brief;
import org.hazewright.brief.Point;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;
import org.hazewright.mixture.Sweep;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Shelf;

/**
 * Finds the least volume to add for a wanted chance of landing.
 *
 * <p>For an added volume the grams are those of {@link Additions}; the chance is that of {@link Learned}, measured values included. Volumes
 * are tried from a two-thousandth of the vessel's up, each a fourth more than the one before, to all that it holds, and the first that
 * suffices is narrowed by halving. What the recipe draws from a stock is poured from that stock; what would be less than the balance's
 * smallest load is left out where that will do, and else diluted first. Grams are planned with the vessel's host index and crowding; every try is judged by the full model.
 */
public final class Correcting {
    private static final double LEAST_SHARE = 0.0005;
    private static final double STRIDE = 1.25;
    private static final int HALVINGS = 7;

    private final Batch batch;
    private final List<Point> points;
    private final Recipe made;
    private final Pouring pouring;
    private final Learned learned;
    private final Sweep sweep;
    private final double vesselMl;
    private final Learned.Landing now;

    private Correcting(Batch batch, Shelf shelf) {
        this.batch = batch;
        Brief brief = batch.brief()
                .orElseThrow(() -> new Refusal("The batch " + batch.id()
                        + " does not say what is wanted, so nothing can be corrected; open it with its brief, or add [[target]]"
                        + " tables to its file."));
        points = brief.points();
        made = batch.asMade();
        pouring = new Pouring(batch, made, shelf);
        learned = Learned.of(batch);
        Mixture mixture = Mixture.of(made);
        vesselMl = mixture.volumeMl();
        sweep = Sweep.of(mixture, brief.wavelengthsNm());
        now = landing(made);
    }

    /**
     * @param wantedChance share of makings, 0 to 1, that should land inside every tolerance
     * @param capacityMl that the vessel holds
     */
    public static Correction of(Batch batch, Shelf shelf, double wantedChance, double capacityMl) {
        Refusal.within("Wanted chance", wantedChance, 0, 1);
        Refusal.positive("Capacity of the vessel in mL", capacityMl);
        if (!batch.complete())
            throw new Refusal("Of the batch " + batch.id() + " " + batch.weighedCount() + " of "
                    + batch.weighedG().size()
                    + " weighings are filled in; weigh the rest first, it is planned to suit.");
        Correcting c = new Correcting(batch, shelf);
        if (capacityMl < c.vesselMl)
            throw new Refusal(
                    "The vessel holds " + Grams.plain(c.vesselMl) + " mL already, and its capacity is said to be "
                            + Grams.plain(capacityMl) + " mL; correct --capacity-ml.");
        return c.find(wantedChance, capacityMl);
    }

    /** On the full model, crowding and host index of the recipe itself. */
    private Learned.Landing landing(Recipe recipe) {
        Sweep own = Sweep.of(Mixture.of(recipe), sweep.wavelengthsNm());
        return learned.landing(recipe, points, own, batch.balance().capacityG());
    }

    private record Try(List<Stock> stocks, List<Item> items, Recipe after, double addedMl, Learned.Landing landing) {}

    private Correction find(double wanted, double capacityMl) {
        if (now.chance() >= wanted)
            return correction(
                    Correction.Outcome.NOTHING_TO_DO,
                    new Try(List.of(), List.of(), made, 0, now),
                    wanted,
                    "It lands inside every tolerance with the chance that is wanted; nothing needs adding.");
        Search inside = new Search(wanted, capacityMl - vesselMl);
        inside.run();
        if (inside.enough != null)
            return correction(
                    Correction.Outcome.ADD, inside.enough, wanted, CorrectionWords.toAdd(now, inside.enough.addedMl()));
        Search roomy = new Search(wanted, 10 * vesselMl);
        roomy.run();
        Try best = inside.best == null ? new Try(List.of(), List.of(), made, 0, now) : inside.best;
        return correction(Correction.Outcome.START_AGAIN, best, wanted, reasonToStart(best, roomy, capacityMl));
    }

    private String reasonToStart(Try best, Search roomy, double capacityMl) {
        return roomy.enough != null
                ? CorrectionWords.noRoom(now, roomy.enough.addedMl(), capacityMl - vesselMl)
                : CorrectionWords.noUse(now, best.landing());
    }

    private final class Search {
        private final double wanted;
        private final double most;
        private Try enough;
        private Try best;

        Search(double wanted, double mostMl) {
            this.wanted = wanted;
            this.most = mostMl;
        }

        void run() {
            double before = 0;
            for (double ml = LEAST_SHARE * vesselMl; enough == null; ml *= STRIDE) {
                double added = Math.min(ml, most);
                if (added <= 0) return;
                if (!look(added)) {
                    before = added;
                    if (added >= most) return;
                    continue;
                }
                double low = before;
                double high = added;
                for (int k = 0; k < HALVINGS; k++) {
                    double middle = (low + high) / 2;
                    if (look(middle)) high = middle;
                    else low = middle;
                }
            }
        }

        private boolean look(double addedMl) {
            Optional<Try> t = attempt(addedMl, wanted);
            if (t.isEmpty() || t.get().addedMl() > most * (1 + 1e-9)) return false;
            double chance = t.get().landing().chance();
            boolean nearer = best != null
                    && chance == best.landing().chance()
                    && t.get().landing().worstMiss() < best.landing().worstMiss() - 1e-6;
            if (best == null || chance > best.landing().chance() || nearer) best = t.get();
            if (chance < wanted) return false;
            enough = t.get();
            return true;
        }
    }

    /** The best of that volume; what is too little to weigh is left out where that does, and diluted first where it does not. */
    private Optional<Try> attempt(double addedMl, double wanted) {
        Optional<Try> without = attempt(addedMl, Set.of(), true);
        if (without.isPresent() && without.get().landing().chance() >= wanted) return without;
        Optional<Try> with = attempt(addedMl, Set.of(), false);
        if (with.isEmpty()) return without;
        boolean better = without.isEmpty()
                || with.get().landing().chance() > without.get().landing().chance() + 0.005;
        return better ? with : without;
    }

    private Optional<Try> attempt(double addedMl, Set<String> known, boolean leaveOut) {
        List<Pourable> pourables = pouring.list(known, leaveOut);
        Optional<double[]> grams = additions(pourables).best(addedMl);
        if (grams.isEmpty()) return Optional.empty();
        Set<String> small = new LinkedHashSet<>(known);
        for (int i = 1; i < pourables.size(); i++) { // the first is fresh base
            double g = grams.get()[i];
            boolean diluted = pourables.get(i).toMake().isPresent();
            if (!diluted
                    && g >= batch.balance().readabilityG() / 2
                    && g < batch.balance().smallestLoadG())
                small.add(pourables.get(i).label());
        }
        return small.size() > known.size()
                ? attempt(addedMl, small, leaveOut)
                : Optional.of(rounded(pourables, grams.get()));
    }

    private Additions additions(List<Pourable> pourables) {
        int n = pourables.size();
        double[][] kappa = new double[n][points.size()];
        double[] ml = new double[n];
        double[] nm = sweep.wavelengthsNm();
        for (int i = 0; i < n; i++)
            for (var part : pourables.get(i).perG().entrySet()) {
                Ingredient what = part.getKey();
                ml[i] += part.getValue() / what.densityGPerMl();
                Map<Ingredient, Double> gram = Map.of(what, 1.0);
                double[] mua = sweep.muaPerCm(gram);
                double[] musp = sweep.muspPerCm(gram);
                for (int j = 0; j < points.size(); j++) {
                    Point p = points.get(j);
                    int at = java.util.Arrays.binarySearch(nm, p.wavelengthNm());
                    boolean absorbs = p.quantity() == Point.Quantity.MUA;
                    double perG = (absorbs ? mua : musp)[at] / what.densityGPerMl();
                    kappa[i][j] += part.getValue() * perG * learned.factor(what, p.quantity());
                }
            }
        double[] vessel =
                now.predicted().stream().mapToDouble(p -> p.perCm() * vesselMl).toArray();
        return new Additions(points, vessel, vesselMl, kappa, ml);
    }

    private Try rounded(List<Pourable> pourables, double[] grams) {
        List<Stock> stocks = new ArrayList<>();
        List<Item> items = new ArrayList<>();
        for (int i = pourables.size() - 1;
                i >= 0;
                i--) { // fresh base last in the list of pourables, first to weigh below
            Pourable p = pourables.get(i);
            if (p.stock().isPresent()) {
                double g = batch.balance().rounded(grams[i]);
                if (!(g > 0)) continue;
                p.toMake().ifPresent(stocks::add);
                items.add(0, Item.ofStock(p.stock().get(), g));
            } else
                for (var part : p.perG().entrySet()) {
                    double g = batch.balance().rounded(grams[i] * part.getValue());
                    Ingredient what = part.getKey();
                    if (g > 0)
                        items.add(0, new Item(what, Optional.empty(), what.lot().map(l -> l.number()), g));
                }
        }
        if (items.isEmpty()) return new Try(List.of(), List.of(), made, 0, now);
        List<Stock> allStocks = new ArrayList<>(made.stocks());
        allStocks.addAll(stocks);
        List<Item> allItems = new ArrayList<>(made.items());
        allItems.addAll(items);
        Recipe after = new Recipe(
                made.title(),
                made.base(),
                made.temperatureC(),
                made.weighingUncertaintyG(),
                made.briefSha256(),
                allStocks,
                allItems);
        double ml = Mixture.of(after).volumeMl() - vesselMl;
        return new Try(stocks, items, after, ml, landing(after));
    }

    private Correction correction(Correction.Outcome outcome, Try t, double wanted, String reason) {
        return new Correction(
                outcome,
                t.stocks(),
                t.items(),
                t.after(),
                t.addedMl(),
                vesselMl + t.addedMl(),
                now,
                t.landing(),
                wanted,
                reason,
                CorrectionWords.notes(made, t.items()),
                fresh());
    }

    private Correction.Fresh fresh() {
        Recipe plan = firstPlan();
        double cost = 0;
        List<String> unpriced = new ArrayList<>();
        double grams = 0;
        for (var e : plan.massesG().entrySet()) {
            grams += e.getValue();
            if (e.getKey().pricePerG().isPresent())
                cost += e.getValue() * e.getKey().pricePerG().getAsDouble();
            else unpriced.add(e.getKey().id());
        }
        double chance = Outlook.of(batch.brief().orElseThrow(), plan, 8_000).chance();
        return new Correction.Fresh(grams, Weighing.of(plan).size(), cost, unpriced, chance);
    }

    /** The plan without corrections. */
    private Recipe firstPlan() {
        List<Item> items = new ArrayList<>();
        for (int k = 0; k < batch.plan().items().size(); k++)
            if (batch.corrections().get(k) == 0) items.add(batch.plan().items().get(k));
        Recipe p = batch.plan();
        return new Recipe(
                p.title(), p.base(), p.temperatureC(), p.weighingUncertaintyG(), p.briefSha256(), p.stocks(), items);
    }
}
