package org.hazewright.desk.model;

import java.util.ArrayList;
import java.util.Collections;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import org.hazewright.batch.Batch;
import org.hazewright.bench.Grams;
import org.hazewright.bench.Sensitivity;
import org.hazewright.bench.Step;
import org.hazewright.bench.Steps;
import org.hazewright.bench.Weighing;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;

/** The steps of a batch at the balance: those of its recipe, then what was added to correct it. */
final class WeighingSteps {
    private static final OptionalDouble NO = OptionalDouble.empty();

    private WeighingSteps() {}

    static List<Step> of(Batch batch) {
        Recipe first = uncorrected(batch);
        List<Sensitivity> bands = batch.brief()
                .map(b -> Sensitivity.of(first, batch.balance(), b.points()))
                .orElse(List.of());
        List<Step> steps = new ArrayList<>(Steps.of(first, batch.balance(), bands));
        for (Weighing w : batch.weighings()) if (corrects(batch, first, w)) steps.add(step(batch, w));
        return steps;
    }

    /** The plan without what corrects it: stocks and items of corrections stand at the end. */
    private static Recipe uncorrected(Batch batch) {
        Recipe plan = batch.plan();
        if (batch.correctionCount() == 0) return plan;
        List<Item> items = new ArrayList<>();
        for (int k = 0; k < plan.items().size(); k++)
            if (batch.corrections().get(k) == 0) items.add(plan.items().get(k));
        List<Stock> stocks = new ArrayList<>(plan.stocks());
        while (!stocks.isEmpty() && !drawn(stocks.get(stocks.size() - 1), items, stocks))
            stocks.remove(stocks.size() - 1);
        return new Recipe(
                plan.title(),
                plan.base(),
                plan.temperatureC(),
                plan.weighingUncertaintyG(),
                plan.briefSha256(),
                stocks,
                items);
    }

    private static boolean drawn(Stock s, List<Item> items, List<Stock> stocks) {
        return items.stream().anyMatch(i -> i.stock().filter(s.id()::equals).isPresent())
                || stocks.stream().anyMatch(o -> o.from().filter(s.id()::equals).isPresent());
    }

    private static boolean corrects(Batch batch, Recipe first, Weighing w) {
        return w.role() == Weighing.Role.ITEM
                ? batch.corrections().get(w.place()) > 0
                : w.place() >= first.stocks().size();
    }

    private static Step step(Batch batch, Weighing w) {
        boolean stock = w.role() != Weighing.Role.ITEM;
        String text = "Weigh " + Grams.shown(w.massG(), batch.balance()) + " of " + w.label()
                + (stock ? " for the stock that corrects the batch." : " into the batch, and stir until it is even.");
        return new Step(
                stock ? Step.Stage.STOCKS : Step.Stage.ADD,
                text,
                Optional.of(w),
                Grams.loads(w.massG(), batch.balance()),
                Optional.empty(),
                NO,
                NO,
                NO,
                w.ingredient().handling(),
                w.ingredient().cautions());
    }

    /** What is done of each step, from what was kept and what the batch's file holds; the file has the last word on grams. */
    static List<Weighed> entries(Batch batch, List<Step> steps, List<Weighed> kept) {
        List<Weighed> entries = new ArrayList<>(Collections.nCopies(steps.size(), Weighed.NOTHING));
        List<Weighing> all = batch.weighings();
        int last = -1;
        for (int k = 0; k < steps.size(); k++) {
            Weighed was = k < kept.size() ? kept.get(k) : Weighed.NOTHING;
            Optional<Weighing> w = steps.get(k).weighing();
            if (w.isEmpty()) {
                entries.set(k, new Weighed(List.of(), was.done()));
                continue;
            }
            OptionalDouble grams = batch.weighedG().get(AtBalance.place(all, w.get()));
            if (grams.isPresent()) {
                last = k;
                boolean same = was.done() && Math.abs(was.massG() - grams.getAsDouble()) < 1e-9;
                entries.set(k, same ? was : new Weighed(List.of(grams.getAsDouble()), true));
            } else if (!was.done()) entries.set(k, was);
        }
        // what was not weighed but lies before something that was must have been done
        for (int k = 0; k < last; k++)
            if (steps.get(k).weighing().isEmpty()) entries.set(k, new Weighed(List.of(), true));
        return entries;
    }
}
