package org.hazewright.bench;

import java.util.Collection;
import java.util.HashSet;
import java.util.List;
import java.util.OptionalDouble;
import java.util.Set;
import org.hazewright.mixture.Stock;
import org.hazewright.shelf.Form;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Making;

/** Making the stocks, each in its own bottle or cup, in the order in which one is diluted from the other. */
final class StockSteps {
    private StockSteps() {}

    static void write(StepList list, Collection<String> inHand) {
        Set<Ingredient> roused = new HashSet<>();
        List<Weighing> weighings = Weighing.of(list.recipe);
        for (int k = 0; k < list.recipe.stocks().size(); k++) {
            Stock s = list.recipe.stocks().get(k);
            if (inHand.contains(s.id())) {
                list.say(Step.Stage.STOCKS, "Fetch stock " + s.id() + ", which is made already.");
                continue;
            }
            if (s.from().isPresent()) list.say(Step.Stage.STOCKS, shake(s.from().get(), s.ingredient()));
            else if (roused.add(s.ingredient())) rouseBottle(list, Step.Stage.STOCKS, s.ingredient());
            boolean cured = WeighingOrder.castAndCured(list.recipe.base());
            String bottle = cured
                    ? "into a clean cup labelled " + s.id() + "."
                    : "into a clean bottle labelled " + s.id() + ".";
            list.weigh(Step.Stage.STOCKS, weighings.get(2 * k), bottle);
            list.weigh(Step.Stage.STOCKS, "Add", weighings.get(2 * k + 1), "to it.");
            mix(list, s, cured);
        }
    }

    /** Before a stock is drawn from. */
    static String shake(String stock, Ingredient i) {
        return i.settles()
                ? "Shake stock " + stock + " hard and draw from it at once: it settles."
                : "Shake stock " + stock + " just before drawing from it.";
    }

    /** An ink or a suspension is stirred up in its own bottle; a powder is not. */
    static void rouseBottle(StepList list, Step.Stage stage, Ingredient i) {
        OptionalDouble ultrasound = i.making().sonicateMin();
        if (i.form() != Form.LIQUID || ultrasound.isEmpty()) return;
        list.say(
                stage,
                "Shake the bottle of " + StepList.named(i) + " and stand it in an ultrasonic bath for "
                        + StepList.minutes(ultrasound.getAsDouble()) + ".",
                OptionalDouble.empty(),
                ultrasound);
    }

    private static void mix(StepList list, Stock s, boolean cured) {
        Making making = s.ingredient().making();
        boolean powder = s.ingredient().form() == Form.POWDER && s.from().isEmpty();
        if (powder && making.sonicateMin().isPresent())
            list.say(
                    Step.Stage.STOCKS,
                    "Wet the powder evenly, then disperse it by ultrasound for "
                            + StepList.minutes(making.sonicateMin().getAsDouble()) + ", until no grains are seen.",
                    OptionalDouble.empty(),
                    making.sonicateMin(),
                    Cautions.ULTRASOUND);
        String how = cured || s.ingredient().form() == Form.PASTE
                ? "Stir it with a spatula, scraping wall and bottom,"
                : powder ? "Stir it until nothing is left on the bottom," : "Close it and mix it well,";
        String length = making.stirMin().isPresent()
                ? " at least " + StepList.minutes(making.stirMin().getAsDouble()) + ","
                : "";
        list.say(
                Step.Stage.STOCKS,
                how + length + " and write date and content (" + content(s) + ") on it.",
                OptionalDouble.empty(),
                making.stirMin());
    }

    private static String content(Stock s) {
        String part = s.from().map(f -> "stock " + f).orElse(s.ingredient().name());
        return part + ", 1 g in " + Grams.plain(s.ratio()) + " g";
    }
}
