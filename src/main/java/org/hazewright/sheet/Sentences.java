package org.hazewright.sheet;

import java.util.ArrayList;
import java.util.Collection;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.stream.Collectors;
import org.hazewright.bench.Answer;
import org.hazewright.bench.Grams;
import org.hazewright.bench.Outlook;
import org.hazewright.bench.Weighing;
import org.hazewright.brief.Brief;
import org.hazewright.brief.Mould;
import org.hazewright.optics.Figures;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Making;
import org.hazewright.shelf.Source;

/** What a recipe sheet says in words. */
final class Sentences {
    private Sentences() {}

    /** "Lands inside every tolerance 93 times in 100." */
    static String chance(double chance) {
        long times = Math.round(100 * chance);
        String often = times + (times == 1 ? " time" : " times");
        if (times == 100 && chance < 1) often = "more than 99 times";
        if (times == 0 && chance > 0) often = "less than 1 time";
        return "Lands inside every tolerance " + often + " in 100.";
    }

    /** Whether it meets the brief, and if not how near it comes. */
    static String verdict(Answer answer) {
        String stopped =
                answer.search().proven() ? "" : " The search was stopped: this is the best so far, not proven.";
        if (answer.meets())
            return "As planned, every target lies inside its tolerance; the worst miss is "
                    + Figures.fixed(answer.worstMiss(), 2) + " half-widths." + stopped;
        long outside = answer.predicted().stream().filter(p -> !p.inside()).count();
        String how = outside + " of " + answer.predicted().size() + " targets " + (outside == 1 ? "lies" : "lie")
                + " outside; the worst miss is " + Figures.fixed(answer.worstMiss(), 2) + " half-widths";
        double best = answer.bestPossibleWorstMiss();
        if (!answer.search().proven()) return "Not every tolerance is met: " + how + "." + stopped;
        if (best > 1)
            return "No recipe from this shelf meets every tolerance; this is the closest. " + how
                    + "; no recipe can come below " + Figures.fixed(best, 2) + ".";
        return "The rounded recipe does not meet every tolerance: " + how + ". Before rounding to the balance "
                + Figures.fixed(best, 2) + " can be reached.";
    }

    /** "ink-demo absorption 62 %, weighing ink-demo 9 %, …": shares of the variance, the first five of 2 % and more. */
    static Optional<String> couldMove(Answer answer) {
        Outlook outlook =
                new Outlook(answer.brief(), answer.recipe(), answer.predicted(), answer.budget(), answer.chance());
        String shares = outlook.causes().stream()
                .filter(c -> c.share() >= 0.02)
                .limit(5)
                .map(c -> c.name() + " " + Math.round(100 * c.share()) + " %")
                .collect(Collectors.joining(", "));
        return shares.isEmpty() ? Optional.empty() : Optional.of(shares + " of the variance.");
    }

    /** Digits after the point that show both the tolerance and the uncertainty of a prediction. */
    static int decimals(Answer.Predicted p) {
        return Math.max(Figures.decimalsFor(p.point().tolerancePerCm()), Figures.decimalsFor(p.uPerCm()));
    }

    /** "Gelatin gel, 10 % · 262.5 mL (250 mL and 5 % more) · 22 °C · balance 0.001 g". */
    static String summary(Answer answer) {
        Brief brief = answer.brief();
        String amount = Grams.plain(brief.volumeMl()) + " mL";
        if (brief.overage() > 0)
            amount +=
                    " (" + Grams.plain(brief.batchMl()) + " mL and " + Grams.plain(100 * brief.overage()) + " % more)";
        if (!brief.moulds().isEmpty()) amount += " for " + Mould.words(brief.moulds());
        return answer.recipe().base().name() + " · " + amount + " · " + Grams.plain(brief.temperatureC())
                + " °C · balance reads to "
                + Figures.fixed(brief.balance().readabilityG(), brief.balance().decimals())
                + " g";
    }

    /** What hands must know while weighing this: few words, from the balance and the ingredient's own file. */
    static String note(Answer answer, Weighing w) {
        Ingredient i = w.ingredient();
        List<String> notes = new ArrayList<>();
        int loads = answer.brief().balance().loads(w.massG());
        if (loads > 1) notes.add("in " + loads + " loads");
        if (w.role() == Weighing.Role.ITEM) {
            Making m = i.making();
            if (answer.recipe().base().making().meltC().isPresent())
                temperature(m).ifPresent(notes::add);
            m.disperseIn().ifPresent(part -> notes.add("dispersed in " + part));
            boolean last = w.place() == answer.recipe().items().size() - 1;
            if (m.addLast() && last) notes.add("last");
            if (i.settles()) notes.add("settles");
        }
        return String.join(", ", notes);
    }

    /** In a base that is melted: at which temperatures it may go in. */
    private static Optional<String> temperature(Making m) {
        if (m.addAboveC().isPresent() && m.addBelowC().isPresent())
            return Optional.of("at " + Grams.plain(m.addAboveC().getAsDouble()) + " to "
                    + Grams.plain(m.addBelowC().getAsDouble()) + " °C");
        if (m.addBelowC().isPresent())
            return Optional.of("at or below " + Grams.plain(m.addBelowC().getAsDouble()) + " °C");
        if (m.addAboveC().isPresent())
            return Optional.of("at or above " + Grams.plain(m.addAboveC().getAsDouble()) + " °C");
        return Optional.empty();
    }

    /** "published: IAPWS R9-97 (1997)". */
    static String source(Source source) {
        return source.basis().word() + (source.citation().isEmpty() ? "" : ": " + source.citation());
    }

    static String lot(Optional<String> lot) {
        return lot.map(l -> "lot " + l).orElse("");
    }

    /** Each caution of the ingredients' files once, with the names of all that it holds for. */
    static Map<String, List<String>> cautionsByNames(Collection<Ingredient> all) {
        Map<String, List<String>> names = new LinkedHashMap<>();
        for (Ingredient i : all)
            for (String c : i.cautions())
                names.computeIfAbsent(c, k -> new ArrayList<>()).add(i.name());
        Map<String, List<String>> cautions = new LinkedHashMap<>();
        names.forEach((caution, of) -> cautions.computeIfAbsent(String.join("; ", of), k -> new ArrayList<>())
                .add(caution));
        return cautions;
    }
}
