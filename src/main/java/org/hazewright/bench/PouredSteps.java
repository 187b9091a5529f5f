package org.hazewright.bench;

import java.util.ArrayList;
import java.util.List;
import java.util.OptionalDouble;
import java.util.stream.Collectors;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Mixture;
import org.hazewright.shelf.Family;
import org.hazewright.shelf.Form;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Making;
import org.hazewright.shelf.Part;

/** Liquid and gel: mixed in one vessel, with a gel heated and cooled into its window before anything sensitive goes in. */
final class PouredSteps {
    private static final Step.Stage BASE = Step.Stage.BASE;
    private static final Step.Stage ADD = Step.Stage.ADD;
    private static final Step.Stage FINISH = Step.Stage.FINISH;

    private final StepList list;
    private final Mixture mixture;
    private final boolean heated;

    private PouredSteps(StepList list) {
        this.list = list;
        this.mixture = Mixture.of(list.recipe);
        this.heated = list.facts.meltC().isPresent();
    }

    static void write(StepList list) {
        PouredSteps p = new PouredSteps(list);
        p.vessel();
        List<Integer> later = p.cold();
        if (p.heated) p.heat();
        later.forEach(p::add);
        p.finish();
    }

    private void vessel() {
        String fill = Grams.plain(mixture.volumeMl()) + " mL";
        if (list.heavy())
            list.say(BASE, "Take a clean, dry vessel that holds well over " + fill + ". " + list.portions());
        else
            list.say(
                    BASE,
                    "Weigh a clean, dry vessel that holds well over " + fill
                            + ", with its lid and stirrer, write its mass" + " down and tare.");
        list.withBaseWords();
    }

    /** What goes in cold; returns the places of what must wait. */
    private List<Integer> cold() {
        List<Integer> later = new ArrayList<>();
        boolean powders = false;
        for (int k = 0; k < list.recipe.items().size(); k++) {
            Item item = list.item(k);
            Ingredient i = item.ingredient();
            if (MakingFacts.isBase(list.recipe, item)) {
                if (i.form() == Form.POWDER) {
                    list.weigh(BASE, list.weighing(k), "and sprinkle it on the cold liquid while stirring.");
                    powders = true;
                } else list.weigh(BASE, list.weighing(k), "into the vessel.");
            } else if (heated && early(i)) {
                list.weigh(BASE, list.weighing(k), "into the vessel and stir until it is dissolved.");
            } else later.add(k);
        }
        OptionalDouble swell = list.facts.ofBase(Making::hydrateMin);
        if (swell.isPresent() && (powders || heated)) {
            OptionalDouble at = list.facts.ofBase(Making::hydrateC);
            list.say(
                    BASE,
                    "Let it swell for " + StepList.minutes(swell.getAsDouble())
                            + (at.isPresent() ? " at " + celsius(at) : "") + ", covered.",
                    at,
                    swell);
        }
        return later;
    }

    /** Preservatives and other modifiers that heat does not harm dissolve in the cold liquid. */
    private static boolean early(Ingredient i) {
        return i.part() == Part.MODIFIER
                && i.making().addBelowC().isEmpty()
                && !i.making().addLast();
    }

    private void heat() {
        String balance = list.heavy() ? " on a balance that can carry it" : "";
        list.say(
                BASE,
                "Weigh the vessel with lid, stirrer and all that is in it" + balance + ", and write the mass down.");
        OptionalDouble melt = list.facts.meltC();
        list.say(
                BASE,
                "Heat to " + celsius(melt) + " under the lid, stirring slowly, until it is clear.",
                melt,
                OptionalDouble.empty(),
                Cautions.HOT);
        coolIntoWindow();
        list.say(
                BASE,
                "Weigh the vessel again and give back the water that it lost, warm, until the mass is the one written down.");
    }

    private void coolIntoWindow() {
        OptionalDouble below = list.facts.addBelowC();
        OptionalDouble above = list.facts.stayAboveC();
        if (below.isEmpty()) return;
        boolean open = above.isEmpty() || above.getAsDouble() < below.getAsDouble();
        if (open)
            list.say(
                    BASE,
                    "Let it cool to below " + celsius(below) + " while stirring slowly"
                            + (above.isPresent() ? ", but keep it above " + celsius(above) : "") + ".",
                    below,
                    OptionalDouble.empty());
        else {
            OptionalDouble hold = OptionalDouble.of(Math.max(
                    above.getAsDouble(), list.facts.ofBase(Making::pourC).orElse(0)));
            list.say(
                    BASE,
                    "Let it cool to " + celsius(hold) + " while stirring slowly, and no further: it thickens below "
                            + celsius(above) + ".",
                    hold,
                    OptionalDouble.empty(),
                    tooWarm(above.getAsDouble()));
        }
    }

    private String tooWarm(double leastC) {
        String names = list.facts.added().stream()
                .filter(i -> i.making().addBelowC().orElse(leastC) < leastC)
                .map(Ingredient::name)
                .collect(Collectors.joining("; "));
        if (names.isEmpty()) names = "What is added";
        return names + " would be better off cooler, below " + celsius(list.facts.addBelowC())
                + ": add it slowly, a little at a time.";
    }

    private void add(int place) {
        Weighing w = list.weighing(place);
        Ingredient i = w.ingredient();
        OptionalDouble stir = i.making().stirMin();
        if (w.from().isPresent()) {
            list.say(ADD, StockSteps.shake(w.label(), i));
            list.weigh(ADD, w, "into the vessel.");
        } else if (i.form() == Form.POWDER && i.making().sonicateMin().isPresent()) {
            OptionalDouble min = i.making().sonicateMin();
            list.weigh(ADD, w, "into a small cup.");
            list.say(
                    ADD,
                    "Wet the powder with a little liquid out of the vessel, disperse it by ultrasound for "
                            + StepList.minutes(min.getAsDouble())
                            + ", pour it back and rinse the cup with liquid from the vessel until nothing stays behind.",
                    OptionalDouble.empty(),
                    min,
                    Cautions.ULTRASOUND);
        } else {
            if (i.part() != Part.MODIFIER) StockSteps.rouseBottle(list, ADD, i);
            list.weigh(
                    ADD,
                    w,
                    i.form() == Form.POWDER ? "into the vessel and stir until it is dissolved." : "into the vessel.");
        }
        boolean untilSet = i.settles() && list.recipe.base().family() == Family.GEL;
        String length = stir.isPresent() ? "Stir for " + StepList.minutes(stir.getAsDouble()) : "Stir well";
        list.say(
                ADD,
                length + ", without drawing in air"
                        + (i.settles()
                                ? untilSet
                                        ? ", and go on stirring until pouring: it settles"
                                        : ", and go on stirring: it settles"
                                : "")
                        + ".",
                OptionalDouble.empty(),
                stir);
    }

    private void finish() {
        if (!list.heavy())
            list.say(
                    FINISH,
                    "Check: all together should weigh " + Grams.plain(mixture.massG())
                            + " g more than the empty vessel.");
        if (list.facts.degas()) list.say(FINISH, "Let the bubbles rise, or degas, before pouring.");
        if (list.recipe.base().family() == Family.LIQUID && !heated) {
            list.say(
                    FINISH,
                    list.facts.settles()
                            ? "Keep stirring until and while it is measured; cover it against dust and drying."
                            : "Cover it against dust and drying, and stir again before it is measured.");
            label();
            return;
        }
        OptionalDouble pour = list.facts.ofBase(Making::pourC);
        list.say(
                FINISH,
                "Skim off bubbles and pour into the moulds" + (pour.isPresent() ? " at " + celsius(pour) : "")
                        + (list.facts.settles() ? ", stirring to the last, and cool the moulds quickly" : "") + ".",
                pour,
                OptionalDouble.empty());
        OptionalDouble set = list.facts.ofBase(Making::setC);
        OptionalDouble hours = list.facts.ofBase(Making::setH);
        if (set.isPresent() || hours.isPresent())
            list.say(
                    FINISH,
                    "Cover against drying and let it set" + (set.isPresent() ? " at " + celsius(set) : "")
                            + (hours.isPresent() ? " for " + Grams.plain(hours.getAsDouble()) + " h" : "") + ".",
                    set,
                    hours.isPresent() ? OptionalDouble.of(60 * hours.getAsDouble()) : OptionalDouble.empty());
        label();
    }

    private void label() {
        list.say(FINISH, "Label it: recipe, date, name, and that it is for phantoms only.");
    }

    static String celsius(OptionalDouble c) {
        return Grams.plain(c.getAsDouble()) + " °C";
    }
}
