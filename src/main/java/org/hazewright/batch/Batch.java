package org.hazewright.batch;

import java.time.LocalDate;
import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import org.hazewright.bench.Grams;
import org.hazewright.bench.Weighing;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Brief;
import org.hazewright.brief.SearchLimits;
import org.hazewright.brief.Target;
import org.hazewright.learning.MeasuredBatch;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.BlendPart;
import org.hazewright.shelf.Form;
import org.hazewright.shelf.Ingredient;

/**
 * One making of a recipe: what was planned, what was really weighed, what was measured.
 *
 * @param id names it for good, in the logbook too
 * @param plan grams as planned, corrections included, in the order of work; lots as used
 * @param weighedG one a weighing, in the order of {@link Weighing#of}; empty where nothing is weighed yet
 * @param corrections one an item: 0 for the recipe's own, 1 for those of the first correction
 * @param volumeMl finished volume that is wanted
 * @param targets what is wanted; empty when the recipe was opened without its brief
 */
public record Batch(
        String id,
        Recipe plan,
        List<OptionalDouble> weighedG,
        List<Integer> corrections,
        double volumeMl,
        List<Target> targets,
        Balance balance,
        String who,
        LocalDate on,
        Optional<Heating> heating,
        List<Measurement> measured,
        List<String> notes) {

    public Batch {
        weighedG = List.copyOf(weighedG);
        corrections = List.copyOf(corrections);
        targets = List.copyOf(targets);
        measured = List.copyOf(measured);
        notes = List.copyOf(notes);
        if (id.isBlank()) throw new Refusal("A batch has no id; give it one that is on its label, such as bath-07.");
        int weighings = Weighing.of(plan).size();
        if (weighedG.size() != weighings)
            throw new Refusal("The batch " + id + " has " + weighings + " weighings and " + weighedG.size()
                    + " places for grams; one for each is needed.");
        if (corrections.size() != plan.items().size())
            throw new Refusal("The batch " + id + " does not say of every item to which correction it belongs.");
        int before = 0;
        for (int c : corrections) {
            if (c < before || c > before + 1)
                throw new Refusal("The corrections of the batch " + id
                        + " are out of order; items of the recipe come first, then correction 1, then 2.");
            before = c;
        }
        Refusal.positive("Volume of the batch " + id + " in mL", volumeMl);
        for (OptionalDouble g : weighedG)
            g.ifPresent(v -> Refusal.notNegative("Grams as weighed of the batch " + id, v));
        for (Measurement m : measured)
            if (m.correction() > before)
                throw new Refusal("A measurement of the batch " + id + " follows correction " + m.correction()
                        + ", and there are " + before + ".");
        if (heating.isPresent()) heating.get().missingG();
    }

    /** A batch of a recipe of which nothing is weighed yet. */
    public static Batch open(String id, Recipe recipe, Optional<Brief> brief, String who, LocalDate on) {
        return new Batch(
                id,
                recipe,
                Collections.nCopies(Weighing.of(recipe).size(), OptionalDouble.empty()),
                Collections.nCopies(recipe.items().size(), 0),
                brief.map(Brief::volumeMl).orElse(Mixture.of(recipe).volumeMl()),
                brief.map(Brief::targets).orElse(List.of()),
                brief.map(Brief::balance).orElse(Balance.USUAL),
                who,
                on,
                Optional.empty(),
                List.of(),
                List.of());
    }

    /** What is wanted, as a brief of the one base; empty without targets. */
    public Optional<Brief> brief() {
        if (targets.isEmpty()) return Optional.empty();
        return Optional.of(new Brief(
                id,
                plan.title(),
                List.of(plan.base().id()),
                volumeMl,
                0,
                plan.temperatureC(),
                targets,
                List.of(),
                SearchLimits.USUAL,
                balance,
                Optional.empty(),
                plan.briefSha256()));
    }

    /** Corrections of which something is weighed. */
    public int correctionsBegun() {
        int begun = 0;
        List<Weighing> all = weighings();
        for (int n = 0; n < all.size(); n++)
            if (weighed(n) && all.get(n).role() == Weighing.Role.ITEM)
                begun = Math.max(begun, corrections.get(all.get(n).place()));
        return begun;
    }

    public List<Weighing> weighings() {
        return Weighing.of(plan);
    }

    /** Corrections so far. */
    public int correctionCount() {
        return corrections.get(corrections.size() - 1);
    }

    public boolean weighed(int n) {
        return weighedG.get(n).isPresent();
    }

    public int weighedCount() {
        return (int) weighedG.stream().filter(OptionalDouble::isPresent).count();
    }

    public boolean complete() {
        return weighedCount() == weighedG.size();
    }

    /** As weighed, as planned where nothing is weighed yet; what heating took and nobody gave back is off the liquid. */
    public Recipe asMade() {
        return asMade(correctionCount());
    }

    /** The same as it stood after so many corrections. */
    public Recipe asMade(int after) {
        List<Weighing> weighings = weighings();
        List<Stock> stocks = new ArrayList<>();
        for (int k = 0; k < plan.stocks().size(); k++) {
            Stock s = plan.stocks().get(k);
            double substance = weighedG.get(2 * k).orElse(s.ingredientG());
            double diluent = weighedG.get(2 * k + 1).orElse(s.diluentG());
            stocks.add(new Stock(s.id(), s.ingredient(), s.lot(), substance, s.diluent(), diluent, s.from()));
        }
        List<Item> items = new ArrayList<>();
        for (int n = 2 * plan.stocks().size(); n < weighings.size(); n++) {
            int place = weighings.get(n).place();
            if (corrections.get(place) > after) continue;
            Item i = plan.items().get(place);
            items.add(
                    new Item(i.ingredient(), i.stock(), i.lot(), weighedG.get(n).orElse(i.massG())));
        }
        heating.ifPresent(h -> takeOff(items, h.missingG()));
        return recipe(stocks, items);
    }

    private Recipe recipe(List<Stock> stocks, List<Item> items) {
        return new Recipe(
                plan.title(),
                plan.base(),
                plan.temperatureC(),
                plan.weighingUncertaintyG(),
                plan.briefSha256(),
                stocks,
                items);
    }

    private void takeOff(List<Item> items, double missingG) {
        int liquid = -1;
        for (int k = 0; k < items.size(); k++)
            if (isBaseLiquid(items.get(k))
                    && (liquid < 0 || items.get(k).massG() > items.get(liquid).massG())) liquid = k;
        if (liquid < 0)
            throw new Refusal("The batch " + id + " lost water by heating, and its base "
                    + plan.base().id() + " has no liquid part that it could have come from. Take the heating out.");
        Item i = items.get(liquid);
        if (missingG >= i.massG())
            throw new Refusal("The batch " + id + " lost " + Grams.plain(missingG) + " g by heating, and holds only "
                    + Grams.plain(i.massG()) + " g of " + i.ingredient().id() + ". Check the vessel's two weights.");
        items.set(liquid, new Item(i.ingredient(), i.stock(), i.lot(), i.massG() - missingG));
    }

    private boolean isBaseLiquid(Item i) {
        if (i.stock().isPresent() || i.ingredient().form() != Form.LIQUID) return false;
        return isBasePart(i.ingredient());
    }

    boolean isBasePart(Ingredient i) {
        if (i.equals(plan.base()) || i.kind().equals(plan.base().id())) return true;
        for (BlendPart p : plan.base().blend())
            if (p.ingredient().equals(i.id()) || p.ingredient().equals(i.kind())) return true;
        return false;
    }

    /** With grams at the weighing of that place (from 0). */
    public Batch withWeighed(int n, double massG) {
        if (n < 0 || n >= weighedG.size())
            throw new Refusal(
                    "The batch " + id + " has no weighing " + (n + 1) + "; it has 1 to " + weighedG.size() + ".");
        Refusal.notNegative("Grams as weighed", massG);
        List<OptionalDouble> grams = new ArrayList<>(weighedG);
        grams.set(n, OptionalDouble.of(massG));
        return with(plan, grams, corrections, heating, measured, notes);
    }

    /** With another plan of the same weighings: steps still to come made to suit, or lots as used. */
    public Batch withPlan(Recipe other) {
        return with(other, weighedG, corrections, heating, measured, notes);
    }

    /** With a correction planned: stocks to make and things to add, none of them weighed yet. */
    public Batch withCorrection(List<Stock> stocks, List<Item> items) {
        List<Stock> allStocks = new ArrayList<>(plan.stocks());
        allStocks.addAll(stocks);
        List<Item> allItems = new ArrayList<>(plan.items());
        allItems.addAll(items);
        List<OptionalDouble> grams =
                new ArrayList<>(weighedG.subList(0, 2 * plan.stocks().size()));
        for (int k = 0; k < 2 * stocks.size(); k++) grams.add(OptionalDouble.empty());
        grams.addAll(weighedG.subList(2 * plan.stocks().size(), weighedG.size()));
        items.forEach(i -> grams.add(OptionalDouble.empty()));
        List<Integer> of = new ArrayList<>(corrections);
        int next = correctionCount() + 1;
        items.forEach(i -> of.add(next));
        return with(recipe(allStocks, allItems), grams, of, heating, measured, notes);
    }

    /** With the lot that was used at the weighing of that place (from 0); a stock's goes on to what is drawn from it. */
    public Batch withLot(int n, String lot) {
        if (n < 0 || n >= weighedG.size())
            throw new Refusal(
                    "The batch " + id + " has no weighing " + (n + 1) + "; it has 1 to " + weighedG.size() + ".");
        Weighing w = weighings().get(n);
        List<Stock> stocks = new ArrayList<>(plan.stocks());
        List<Item> items = new ArrayList<>(plan.items());
        Optional<String> number = Optional.of(lot);
        if (w.role() == Weighing.Role.ITEM && w.from().isEmpty()) {
            Item i = items.get(w.place());
            items.set(w.place(), new Item(i.ingredient(), i.stock(), number, i.massG()));
        } else if (w.role() == Weighing.Role.STOCK_SUBSTANCE && w.from().isEmpty()) {
            Stock s = stocks.get(w.place());
            stocks.set(
                    w.place(),
                    new Stock(s.id(), s.ingredient(), number, s.ingredientG(), s.diluent(), s.diluentG(), s.from()));
            for (int k = 0; k < items.size(); k++) {
                Item i = items.get(k);
                if (i.stock().filter(s.id()::equals).isPresent())
                    items.set(k, new Item(i.ingredient(), i.stock(), number, i.massG()));
            }
        } else
            throw new Refusal(
                    "Weighing " + (n + 1) + " of the batch " + id + " is not out of a bottle whose lot is kept ("
                            + w.label() + "); give the lot where the bottle itself is weighed.");
        return withPlan(recipe(stocks, items));
    }

    public Batch withHeating(Heating h) {
        return with(plan, weighedG, corrections, Optional.of(h), measured, notes);
    }

    /**
     * With measured values. They count for what was in the vessel: a correction of which nothing is weighed is not in it yet. Refused
     * before anything is weighed.
     */
    public Batch withMeasured(Measurement m) {
        if (weighedCount() == 0)
            throw new Refusal("Nothing of the batch " + id
                    + " is weighed yet, so there is nothing that measured values could be set against. Record its grams first,"
                    + " typed or from the filled-in sheet, then what was measured.");
        List<Measurement> all = new ArrayList<>(measured);
        all.add(
                m.correction() <= correctionsBegun()
                        ? m
                        : new Measurement(m.on(), m.method(), m.instrument(), correctionsBegun(), m.values()));
        return with(plan, weighedG, corrections, heating, all, notes);
    }

    public Batch withNote(String text) {
        String note = text.replaceAll("\\p{Cntrl}", " ").strip();
        if (note.isBlank() || notes.contains(note)) return this;
        List<String> all = new ArrayList<>(notes);
        all.add(note);
        return with(plan, weighedG, corrections, heating, measured, all);
    }

    public Batch madeBy(String name, LocalDate day) {
        return new Batch(
                id, plan, weighedG, corrections, volumeMl, targets, balance, name, day, heating, measured, notes);
    }

    private Batch with(
            Recipe recipe,
            List<OptionalDouble> grams,
            List<Integer> of,
            Optional<Heating> heat,
            List<Measurement> values,
            List<String> remarks) {
        return new Batch(id, recipe, grams, of, volumeMl, targets, balance, who, on, heat, values, remarks);
    }

    /** A measurement with the mixture that it was made of, for a verdict or for learning. */
    public MeasuredBatch measuredBatch(Measurement m) {
        return MeasuredBatch.of(id, m.on(), asMade(m.correction()), balance.capacityG(), m.method(), m.values());
    }

    /** The steps still to come made to suit what is weighed; the same batch without targets or when all is weighed. */
    public Batch replanned(org.hazewright.shelf.Shelf shelf) {
        if (brief().isEmpty() || weighedCount() == 0 || complete()) return this;
        List<Replan.Done> done = new ArrayList<>();
        List<Weighing> weighings = weighings();
        for (int n = 0; n < weighings.size(); n++)
            if (weighed(n))
                done.add(new Replan.Done(
                        weighings.get(n).role(),
                        weighings.get(n).place(),
                        weighedG.get(n).getAsDouble()));
        Recipe after = new Replan(brief().get(), plan, shelf).after(done);
        List<Stock> stocks = new ArrayList<>();
        for (int k = 0; k < plan.stocks().size(); k++) {
            Stock old = plan.stocks().get(k);
            Stock now = after.stocks().get(k);
            stocks.add(new Stock(
                    old.id(),
                    old.ingredient(),
                    old.lot(),
                    weighed(2 * k) ? old.ingredientG() : now.ingredientG(),
                    old.diluent(),
                    weighed(2 * k + 1) ? old.diluentG() : now.diluentG(),
                    old.from()));
        }
        List<Item> items = new ArrayList<>();
        for (int k = 0; k < plan.items().size(); k++) {
            boolean in = weighed(2 * stocks.size() + k);
            items.add(in ? plan.items().get(k) : after.items().get(k));
        }
        return withPlan(recipe(stocks, items));
    }
}
