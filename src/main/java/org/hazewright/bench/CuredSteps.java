package org.hazewright.bench;

import java.util.LinkedHashMap;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Mixture;
import org.hazewright.shelf.Form;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Making;

/** Silicone and resin: pigments dispersed in part A, hardener last, no air, poured within the pot life and cured. */
final class CuredSteps {
    private static final Step.Stage BASE = Step.Stage.BASE;
    private static final Step.Stage ADD = Step.Stage.ADD;
    private static final Step.Stage FINISH = Step.Stage.FINISH;

    private final StepList list;
    private final Mixture mixture;
    private final Optional<Ingredient> hardener;

    private CuredSteps(StepList list) {
        this.list = list;
        this.mixture = Mixture.of(list.recipe);
        Map<Ingredient, Double> parts = new LinkedHashMap<>();
        mixture.massesG().forEach((i, g) -> {
            if (MakingFacts.isBase(list.recipe, Item.neat(i, g))) parts.put(i, g);
        });
        this.hardener = WeighingOrder.hardenerOf(list.recipe.base(), parts);
    }

    static void write(StepList list) {
        CuredSteps c = new CuredSteps(list);
        c.cup();
        for (int k = 0; k < list.recipe.items().size(); k++) if (!c.isHardener(k)) c.into(k);
        c.beforeHardener();
        for (int k = 0; k < list.recipe.items().size(); k++) if (c.isHardener(k)) c.harden(k);
        c.finish();
    }

    private boolean isHardener(int place) {
        return MakingFacts.isBase(list.recipe, list.item(place))
                && hardener.isPresent()
                && hardener.get().equals(list.item(place).ingredient());
    }

    private void cup() {
        String room = list.facts.degas()
                ? "three to four times " + Grams.plain(mixture.volumeMl()) + " mL, since it foams when degassed"
                : "well over " + Grams.plain(mixture.volumeMl()) + " mL";
        list.say(
                BASE,
                "Take a clean, dry mixing cup that holds " + room
                        + ". Weigh everything in it by difference; nothing so thick can be pipetted.",
                Cautions.HARDENER);
        list.withBaseWords();
        if (list.heavy()) list.say(BASE, list.portions());
    }

    private void into(int place) {
        Weighing w = list.weighing(place);
        Ingredient i = w.ingredient();
        if (MakingFacts.isBase(list.recipe, list.item(place))) {
            list.weigh(BASE, w, "into the cup.");
            return;
        }
        if (w.from().isPresent()) list.say(ADD, "Stir stock " + w.label() + " well, down to the bottom.");
        list.weigh(ADD, w, "into the cup.");
        OptionalDouble ultrasound = i.making().sonicateMin();
        boolean powder = w.from().isEmpty() && i.form() == Form.POWDER;
        String where = i.making().disperseIn().map(d -> " in " + d).orElse("");
        if (powder && ultrasound.isPresent())
            list.say(
                    ADD,
                    "Wet the powder with a spatula, then disperse it" + where + " by ultrasound for "
                            + StepList.minutes(ultrasound.getAsDouble()) + ", until no grains are seen.",
                    OptionalDouble.empty(),
                    ultrasound,
                    Cautions.ULTRASOUND);
        else
            list.say(
                    ADD,
                    "Stir it in slowly" + where + ", scraping wall and bottom"
                            + i.making().stirMin().stream()
                                    .mapToObj(m -> ", for " + StepList.minutes(m))
                                    .findFirst()
                                    .orElse("")
                            + ".",
                    OptionalDouble.empty(),
                    i.making().stirMin());
    }

    private void beforeHardener() {
        boolean warmed = list.recipe.items().stream()
                .anyMatch(i -> i.stock().isEmpty()
                        && i.ingredient().form() == Form.POWDER
                        && i.ingredient().making().sonicateMin().isPresent());
        if (warmed && hardener.isPresent())
            list.say(
                    ADD,
                    "Let the mix cool to " + Grams.plain(list.recipe.temperatureC())
                            + " °C: warm, it would cure too fast.",
                    OptionalDouble.of(list.recipe.temperatureC()),
                    OptionalDouble.empty());
        if (list.facts.degas() && hardener.isPresent())
            list.say(ADD, "Degas the mix until no more bubbles rise, before the hardener starts the clock.");
    }

    private void harden(int place) {
        Weighing w = list.weighing(place);
        list.weigh(ADD, w, "into the cup, last. " + ratio(w.ingredient()));
        OptionalDouble potLife = list.facts.ofBase(Making::potLifeMin);
        OptionalDouble stir = list.facts.ofBase(Making::stirMin);
        list.say(
                ADD,
                (potLife.isPresent()
                                ? "Note the time: pouring must be done within "
                                        + StepList.minutes(potLife.getAsDouble()) + " (pot life). "
                                : "Note the time: it cures from now on. ")
                        + "Stir slowly, scraping wall and bottom"
                        + (stir.isPresent() ? ", for " + StepList.minutes(stir.getAsDouble()) : "") + ".",
                OptionalDouble.empty(),
                stir);
    }

    /** The parts' ratio by mass, what stocks brought included. */
    private String ratio(Ingredient last) {
        double rest = 0;
        double hard = 0;
        for (var entry : mixture.massesG().entrySet()) {
            if (entry.getKey().equals(last)) hard += entry.getValue();
            else if (MakingFacts.isBase(list.recipe, Item.neat(entry.getKey(), entry.getValue())))
                rest += entry.getValue();
        }
        return "Base to hardener is 100 : " + Grams.plain(100 * hard / rest) + " by mass"
                + (list.recipe.stocks().isEmpty() ? "." : ", the base in the stocks counted.");
    }

    private void finish() {
        if (list.facts.degas())
            list.say(
                    FINISH,
                    "Degas until the foam has collapsed and no bubbles rise, letting air in three or four times.");
        list.say(
                FINISH,
                "Pour slowly, in a thin stream, down the wall of the mould"
                        + (list.facts.settles() ? "; turn the mould while it thickens, since powder sinks" : "") + ".");
        OptionalDouble at = list.facts.ofBase(Making::cureC);
        OptionalDouble hours = list.facts.ofBase(Making::cureH);
        if (at.isPresent() || hours.isPresent())
            list.say(
                    FINISH,
                    "Let it cure" + (at.isPresent() ? " at " + PouredSteps.celsius(at) : "")
                            + (hours.isPresent() ? " for " + Grams.plain(hours.getAsDouble()) + " h" : "")
                            + ", level and covered.",
                    at,
                    hours.isPresent() ? OptionalDouble.of(60 * hours.getAsDouble()) : OptionalDouble.empty());
        list.say(FINISH, "Label it: recipe, date, name, and that it is for phantoms only.");
    }
}
