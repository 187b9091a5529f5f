package org.hazewright.bench;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import org.hazewright.brief.Balance;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Recipe;
import org.hazewright.shelf.Form;
import org.hazewright.shelf.Ingredient;

/** Steps as they are written down, with what every one of them needs: the balance, the bands, and words already said. */
final class StepList {
    private static final OptionalDouble NO = OptionalDouble.empty();

    final Recipe recipe;
    final Balance balance;
    final MakingFacts facts;
    private final Map<String, Sensitivity> bands = new HashMap<>();
    private final List<Step> steps = new ArrayList<>();
    private final Set<String> said = new HashSet<>(); // handling and cautions, each told once

    StepList(Recipe recipe, Balance balance, List<Sensitivity> sensitivities) {
        this.recipe = recipe;
        this.balance = balance;
        this.facts = new MakingFacts(recipe);
        sensitivities.forEach(s -> bands.put(key(s.weighing()), s));
    }

    private static String key(Weighing w) {
        return w.role() + " " + w.place();
    }

    List<Step> steps() {
        return List.copyOf(steps);
    }

    /** The weighing of an item by its place in the recipe. */
    Weighing weighing(int item) {
        return Weighing.of(recipe).get(2 * recipe.stocks().size() + item);
    }

    /**
     * Whether vessel and fill together are too much for the balance; a vessel weighs up to two thirds of what it holds (common
     * practice).
     */
    boolean heavy() {
        return Mixture.of(recipe).massG() > 0.6 * balance.capacityG();
    }

    /** What to do when it is. */
    String portions() {
        return "Filled, it is too heavy for this balance (" + Grams.plain(balance.capacityG())
                + " g): weigh each portion in a cup of its own, empty it into the vessel, weigh the cup again, and top up what stuck"
                + " to it.";
    }

    Item item(int place) {
        return recipe.items().get(place);
    }

    /** A step that weighs nothing. */
    void say(Step.Stage stage, String text, String... cautions) {
        say(stage, text, NO, NO, cautions);
    }

    void say(Step.Stage stage, String text, OptionalDouble temperatureC, OptionalDouble minutes, String... cautions) {
        steps.add(new Step(
                stage,
                text,
                Optional.empty(),
                List.of(),
                Optional.empty(),
                NO,
                temperatureC,
                minutes,
                List.of(),
                List.of(cautions).stream()
                        .map(StepList::sentence)
                        .filter(said::add)
                        .toList()));
    }

    /** {@link #weigh(Step.Stage, String, Weighing, String)} with "Weigh". */
    void weigh(Step.Stage stage, Weighing w, String end) {
        weigh(stage, "Weigh", w, end);
    }

    /**
     * A step that weighs: verb, grams and name, end, as in "Weigh", 1.410 g of Carbon ink, "into the vessel.". Handling and
     * cautions of the ingredient come with it the first time that it is met.
     */
    void weigh(Step.Stage stage, String verb, Weighing w, String end) {
        List<Double> loads = Grams.loads(w.massG(), balance);
        String text = verb + " " + Grams.shown(w.massG(), balance) + " of " + named(w) + " " + end;
        if (loads.size() > 1)
            text += " It takes " + loads.size() + " loads of about " + Grams.plain(Math.rint(loads.get(0)))
                    + " g: write each down, and end with the one that completes the sum.";
        Ingredient i = w.ingredient();
        boolean liquid = w.from().isEmpty() && i.form() == Form.LIQUID;
        List<String> handling = new ArrayList<>();
        List<String> cautions = new ArrayList<>();
        if (w.from().isEmpty()) {
            i.handling().stream().filter(said::add).forEach(handling::add);
            i.cautions().stream().filter(said::add).forEach(cautions::add);
            if (i.form() == Form.POWDER && cautions.stream().noneMatch(c -> c.contains("dust")))
                Optional.of(sentence(Cautions.POWDER)).filter(said::add).ifPresent(cautions::add);
        }
        steps.add(new Step(
                stage,
                text,
                Optional.of(w),
                loads,
                Optional.ofNullable(bands.get(key(w))).map(s -> new Step.Allowed(s.lowG(), s.highG())),
                liquid ? OptionalDouble.of(w.massG() / i.densityGPerMl()) : NO,
                NO,
                NO,
                handling,
                cautions));
    }

    /** Handling and cautions of the base itself, which as a blend is never weighed; told with the step just written. */
    void withBaseWords() {
        Step last = steps.remove(steps.size() - 1);
        List<String> handling = new ArrayList<>(last.handling());
        List<String> cautions = new ArrayList<>(last.cautions());
        recipe.base().handling().stream().filter(said::add).forEach(handling::add);
        recipe.base().cautions().stream().filter(said::add).forEach(cautions::add);
        steps.add(new Step(
                last.stage(),
                last.text(),
                last.weighing(),
                last.loadsG(),
                last.allowed(),
                last.volumeMl(),
                last.temperatureC(),
                last.minutes(),
                handling,
                cautions));
    }

    private static String sentence(String text) {
        return Character.toUpperCase(text.charAt(0)) + text.substring(1);
    }

    private static String named(Weighing w) {
        return w.from().map(s -> "stock " + s).orElseGet(() -> named(w.ingredient()));
    }

    /** A name inside a sentence: one that has a comma gets a comma behind it, and a lot its number. */
    static String named(Ingredient i) {
        String name = i.lot().map(l -> l.named(i.name())).orElse(i.name());
        return name.contains(",") ? name + "," : name;
    }

    /** Hours or minutes in words: "45 min", "12 h". */
    static String minutes(double min) {
        return min >= 120 && min % 60 == 0 ? Grams.plain(min / 60) + " h" : Grams.plain(min) + " min";
    }
}
