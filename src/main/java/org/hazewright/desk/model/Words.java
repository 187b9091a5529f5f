package org.hazewright.desk.model;

import java.util.ArrayList;
import java.util.Collection;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import org.hazewright.bench.Answer;
import org.hazewright.bench.Outlook;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Point;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;
import org.hazewright.optics.Figures;
import org.hazewright.shelf.Ingredient;

/** Sentences and labels that the window says in more than one place. */
public final class Words {
    private Words() {}

    /** The sign of a quantity as it is drawn, with a prime. */
    public static String sign(Point.Quantity q) {
        return q == Point.Quantity.MUA ? "µa" : "µs′";
    }

    /** "µa at 690 nm". */
    public static String of(Point p) {
        return sign(p.quantity()) + " at " + Figures.plain(p.wavelengthNm()) + " nm";
    }

    /** The one sentence that matters. */
    public static String verdict(Outlook o) {
        if (o.meets()) {
            return Double.isNaN(o.chance())
                    ? "Lands inside every tolerance as planned."
                    : "Lands inside every tolerance " + times(o.chance()) + " times in 100.";
        }
        long out = o.predicted().stream().filter(p -> !p.inside()).count();
        return "Misses " + out + " of " + o.predicted().size() + ": this is the closest this shelf can come.";
    }

    /** A word on the state for the head of the window. */
    public static String state(Outlook o) {
        if (o.meets()) return "recipe meets every tolerance";
        long out = o.predicted().stream().filter(p -> !p.inside()).count();
        return "✕ recipe misses " + out + " of " + o.predicted().size();
    }

    /** A share as a count in 100: never 100 for what is not certain, nor 0 for what is possible. */
    public static String times(double share) {
        if (Double.isNaN(share)) return "–";
        long count = Math.round(100 * share);
        if (count == 100 && share < 1) return "more than 99";
        if (count == 0 && share > 0) return "less than 1";
        return Long.toString(count);
    }

    /** What stands on the bottle: a stock by what it holds and its ratio, an ingredient by its name. */
    public static String item(Item item) {
        return item.stock()
                .map(s -> shortName(item.ingredient()) + ", stock" + ratio(s))
                .orElse(shortName(item.ingredient()));
    }

    private static String ratio(String stockId) {
        String[] parts = stockId.split("-1-");
        return parts.length == 2 && parts[1].matches("\\d+") ? " 1:" + parts[1] : "";
    }

    public static String stock(Recipe recipe, Stock s) {
        String what = s.from().map(f -> stock(recipe, recipe.stock(f))).orElse(shortName(s.ingredient()));
        return what + ", stock " + ratio(s);
    }

    /** "1:20". */
    public static String ratio(Stock s) {
        return "1:" + Figures.significant(s.ratio(), 3).replaceFirst("\\.0+$", "");
    }

    /** A name inside a sentence, its first letter small unless it is a sign of its own. */
    public static String inSentence(Ingredient i) {
        String name = shortName(i);
        boolean capitals = name.length() > 1 && Character.isUpperCase(name.charAt(1));
        return capitals ? name : name.substring(0, 1).toLowerCase(Locale.ROOT) + name.substring(1);
    }

    /** A volume in mL, below 1 mL in µL. */
    public static String volume(double ml) {
        return ml < 1
                ? Figures.significant(1000 * ml, 3).replaceFirst("\\.0+$", "") + " µL"
                : Figures.significant(ml, 4) + " mL";
    }

    /** A name without its afterthoughts on provenance. */
    public static String shortName(Ingredient i) {
        String name = i.name().replaceFirst(",? invented demo lot$", "").replaceFirst(", purified$", "");
        return i.lot().isPresent() && !name.contains(i.lot().get().number())
                ? name + ", lot " + i.lot().get().number()
                : name;
    }

    public static String grams(double g, Balance balance) {
        return Figures.fixed(g, balance.decimals());
    }

    /** "0.1004 ± 0.0018": value and standard uncertainty to a common place. */
    public static String value(double v, double u) {
        return Figures.withUncertainty(v, u);
    }

    /** A predicted value to the place that its tolerance asks for. */
    public static String predicted(Answer.Predicted p) {
        return Figures.fixed(
                p.perCm(),
                Figures.decimalsFor(Math.min(p.point().tolerancePerCm(), p.uPerCm() > 0 ? p.uPerCm() : 1e9)));
    }

    /** "µs′ at 690 and 730 nm lands high, µa at 830 nm lands low." – what lands outside its tolerance. */
    public static String outside(List<Answer.Predicted> predicted) {
        Map<String, List<String>> wavelengths = new LinkedHashMap<>();
        for (Answer.Predicted p : predicted)
            if (!p.inside())
                wavelengths
                        .computeIfAbsent(
                                sign(p.point().quantity()) + " at %s nm lands too " + (p.miss() > 0 ? "high" : "low"),
                                s -> new ArrayList<>())
                        .add(Figures.plain(p.point().wavelengthNm()));
        List<String> parts = new ArrayList<>();
        wavelengths.forEach((words, nm) -> parts.add(words.replace("%s", join(nm))));
        return join(parts) + ".";
    }

    /** "0.4 half-widths high, inside" – a landing said in words. */
    public static String landing(double miss) {
        String side = Math.abs(miss) < 0.05
                ? "in the middle"
                : Figures.fixed(Math.abs(miss), 1) + " half-widths " + (miss > 0 ? "high" : "low");
        return side + (Math.abs(miss) <= 1 ? ", inside" : ", outside");
    }

    /** "a, b and c". */
    public static String join(List<String> parts) {
        if (parts.size() < 2) return String.join("", parts);
        return String.join(", ", parts.subList(0, parts.size() - 1)) + " and " + parts.get(parts.size() - 1);
    }

    public static String capital(String sentence) {
        return sentence.isEmpty()
                ? sentence
                : sentence.substring(0, 1).toUpperCase(Locale.ROOT) + sentence.substring(1);
    }

    /**
     * A sentence as the window says it: names in place of the ids that files and commands use, and the prime of µs′ as it is drawn. An id that
     * is a plain word stays as it is.
     */
    public static String spoken(String sentence, Collection<Ingredient> known) {
        String said = sentence.replace("µs'", "µs′");
        List<Ingredient> longestFirst = known.stream()
                .filter(i -> i.id().contains("-") && sentence.contains(i.id()))
                .sorted(Comparator.comparing((Ingredient i) -> -i.id().length()))
                .toList();
        for (Ingredient i : longestFirst)
            said = said.replaceAll(
                    "(?<![\\w.-])" + Pattern.quote(i.id()) + "(?![\\w-])", Matcher.quoteReplacement(inSentence(i)));
        return said;
    }

    /** A cause's name with the ingredient's name in place of its id. */
    public static String named(String cause, Recipe recipe) {
        for (Ingredient i : recipe.massesG().keySet()) {
            if (cause.equals(i.id()) || cause.startsWith(i.id() + " "))
                return shortName(i) + cause.substring(i.id().length());
            if (cause.equals("weighing " + i.id())) return "weighing " + shortName(i);
        }
        return cause;
    }
}
