package org.hazewright.batch;

import java.util.ArrayList;
import java.util.List;
import org.hazewright.bench.Answer;
import org.hazewright.bench.Grams;
import org.hazewright.bench.Leftover;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Recipe;
import org.hazewright.optics.Figures;
import org.hazewright.shelf.Family;

/** Why a correction is what it is, and what to mind with it, in words for a person. */
final class CorrectionWords {
    private CorrectionWords() {}

    static String toAdd(Learned.Landing now, double addedMl) {
        return "It is off most in " + words(worst(now)) + ". Adding " + Figures.significant(addedMl, 3)
                + " mL is the least that gives the wanted chance.";
    }

    /** More would have to be added than the vessel has room for. */
    static String noRoom(Learned.Landing now, double neededMl, double roomMl) {
        return off(now) + "To put it right " + Figures.significant(neededMl, 3)
                + " mL would have to be added, and the vessel has room for " + Figures.significant(roomMl, 3) + " mL.";
    }

    /** No volume gives the wanted chance. */
    static String noUse(Learned.Landing now, Learned.Landing best) {
        String most = best.chance() > now.chance()
                ? "At best adding reaches " + percent(best.chance()) + ", "
                : "Adding does not help: ";
        double unsure = best.predicted().stream()
                .mapToDouble(p -> p.uPerCm() / p.point().tolerancePerCm())
                .max()
                .orElse(0);
        if (best.worstMiss() <= 1 && unsure > 0.4)
            return off(now) + most + "because what is in the vessel is not known well enough ("
                    + Figures.significant(unsure, 2)
                    + " of a half-width is uncertain). Measure it, or measure it better, before pouring it away.";
        return off(now) + most + "because " + words(worst(best)) + " stays, and nothing can be taken out.";
    }

    private static String off(Learned.Landing now) {
        return "What is off most is " + words(worst(now)) + ". ";
    }

    /** What to mind while adding these to what was made. */
    static List<String> notes(Recipe made, List<Item> added) {
        List<String> notes = new ArrayList<>();
        Family family = made.base().family();
        if (!added.isEmpty() && family == Family.GEL)
            notes.add(
                    "A gel that has set must be melted again before anything is stirred in; weigh the vessel before and after.");
        if (!added.isEmpty() && (family == Family.SILICONE || family == Family.RESIN))
            notes.add(
                    "Only before it cures: what has cured cannot be corrected. Keep to the pot life that the data sheet gives.");
        for (Leftover l : Leftover.of(made)) {
            double drawn = added.stream()
                    .filter(i -> i.stock().filter(l.stock()::equals).isPresent())
                    .mapToDouble(Item::massG)
                    .sum();
            if (drawn > l.leftG())
                notes.add("Of the stock " + l.stock() + " " + Grams.plain(drawn) + " g are needed and "
                        + Grams.plain(Math.max(0, l.leftG()))
                        + " g are left; make it again in the same ratio, or add less.");
        }
        return notes;
    }

    private static Answer.Predicted worst(Learned.Landing landing) {
        return landing.predicted().stream()
                .max((a, b) -> Double.compare(Math.abs(a.miss()), Math.abs(b.miss())))
                .orElseThrow();
    }

    private static String words(Answer.Predicted p) {
        return p.point().quantity().sign() + " at " + Grams.plain(p.point().wavelengthNm()) + " nm, "
                + Figures.significant(Math.abs(p.miss()), 2) + " half-widths too " + (p.miss() > 0 ? "high" : "low");
    }

    private static String percent(double chance) {
        return Figures.significant(100 * chance, 2) + " in 100";
    }
}
