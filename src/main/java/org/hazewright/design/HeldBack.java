package org.hazewright.design;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.function.BooleanSupplier;
import org.hazewright.brief.Brief;
import org.hazewright.brief.Point;
import org.hazewright.optics.Figures;
import org.hazewright.search.LeastWorstMiss;
import org.hazewright.search.LimitProof;
import org.hazewright.search.SetProblem;
import org.hazewright.search.SetSearch;
import org.hazewright.search.SetSolution;
import org.hazewright.shelf.Ingredient;

/**
 * What holds a recipe back, in sentences: which targets conflict, which limit binds, and what relaxing it would buy.
 *
 * <p>Every number is that of a problem that was solved: the search with one limit loosened or one target left out. A relaxation that
 * buys less than {@value #WORTH} half-widths is not mentioned.
 */
final class HeldBack {
    private static final double WORTH = 0.05;

    /** A planned miss that is worth a sentence although it lies inside its tolerance. */
    private static final double NOTABLE = 0.5;

    private final Brief brief;
    private final Design.Searched searched;
    private final Option best;
    private final double possible;
    private final List<Point> points;
    private final LimitProof proof;
    private final BooleanSupplier stop;

    /** Once {@code stop} is true no further problem is solved to its end; what a sentence then says was reached all the same. */
    HeldBack(Brief brief, Design.Searched searched, Option best, double possible, BooleanSupplier stop) {
        this.stop = stop;
        this.brief = brief;
        this.searched = searched;
        this.best = best;
        this.possible = possible;
        this.points = searched.columns().points();
        this.proof = new LimitProof(searched.problem(), searched.result().leastWorstMiss(), stop);
    }

    List<String> sentences() {
        List<String> sentences = new ArrayList<>();
        if (possible > 1 + 1e-9) {
            sentences.add("No recipe from this shelf meets every tolerance: the best possible worst miss is "
                    + widths(possible) + " half-widths.");
            floors(sentences);
            conflict(sentences);
            relaxations(sentences);
        } else {
            floors(sentences);
            largestMiss(sentences);
        }
        return sentences;
    }

    /** Targets that the base overshoots by itself. */
    private void floors(List<String> sentences) {
        for (int j = 0; j < points.size(); j++) {
            Point p = points.get(j);
            double base = p.wantedPerCm() - searched.problem().points().get(j).residual();
            if (base <= p.wantedPerCm() + p.tolerancePerCm()) continue;
            sentences.add("The base alone already " + (p.quantity() == Point.Quantity.MUA ? "absorbs " : "scatters ")
                    + Figures.significant(base, 3) + " /cm at " + Figures.plain(p.wavelengthNm())
                    + " nm, above the target "
                    + Figures.significant(p.wantedPerCm(), 3) + ".");
        }
    }

    private void conflict(List<String> sentences) {
        List<String> high = new ArrayList<>();
        List<String> low = new ArrayList<>();
        for (LimitProof.Pull pull : proof.conflict())
            (pull.weight() > 0 ? high : low).add(name(points.get(pull.point())));
        if (high.isEmpty() && low.isEmpty()) return;
        if (high.isEmpty() || low.isEmpty())
            sentences.add(
                    capital(join(high.isEmpty() ? low : high)) + (high.size() + low.size() > 1 ? " come" : " comes")
                            + " out too " + (high.isEmpty() ? "low" : "high") + ", whatever is mixed.");
        else
            sentences.add("These targets pull against each other: " + join(high)
                    + (high.size() > 1 ? " come" : " comes") + " out too high, " + join(low) + " too low.");
    }

    private void relaxations(List<String> sentences) {
        for (LimitProof.Relaxation r : proof.whatHelps()) {
            double after = r.loosening() == LimitProof.Loosening.TARGET_LEFT_OUT
                    ? r.after().value()
                    : settled(r.after());
            if (possible - after < Math.max(WORTH, WORTH * possible)) continue;
            String fall = " the worst miss falls from " + widths(possible) + " to " + widths(after) + " half-widths.";
            switch (r.loosening()) {
                case ONE_MORE -> {
                    SetProblem.Group group = SetProblem.Group.values()[r.index()];
                    sentences.add("With " + ordinal(searched.problem().limits().most(group) + 1) + " " + word(group)
                            + " (" + names(r.after().members(), group) + ")" + fall);
                }
                case UPPER_LIFTED -> {
                    Ingredient i = ingredient(r.index());
                    if (i.maxGPerMl().isPresent())
                        sentences.add("With more " + i.id() + " than its limit of "
                                + Figures.significant(i.maxGPerMl().getAsDouble(), 3) + " g/mL" + fall);
                }
                case TARGET_LEFT_OUT -> {
                    if (after <= 1 || possible - after > 0.3 * possible)
                        sentences.add("Without the target " + name(points.get(r.index())) + fall);
                }
                case BASE_SHARE_LIFTED ->
                    sentences.add("With less base than its least share of "
                            + Figures.significant(
                                    100 * (1 - searched.problem().limits().addedVolume()), 3) + " % of the volume"
                            + fall);
                case CONFLICTS_LIFTED ->
                    sentences.add("Were " + ingredient(r.index()).id() + " free of its conflicts," + fall);
            }
        }
    }

    /** The relaxed answer's worst miss on the full model, where a modifier also moves the host index. */
    private double settled(LeastWorstMiss relaxed) {
        if (relaxed.members().length == 0) return relaxed.value();
        return new FixedPoint(brief, searched.columns(), searched.candidates())
                .leastWorstMiss(Design.concentrations(searched, relaxed.members(), relaxed.amounts()))
                .map(Option::worstMiss)
                .orElse(relaxed.value());
    }

    private void largestMiss(List<String> sentences) {
        int worst = 0;
        for (int j = 1; j < points.size(); j++)
            if (Math.abs(best.misses()[j]) > Math.abs(best.misses()[worst])) worst = j;
        double miss = best.misses()[worst];
        if (Math.abs(miss) < NOTABLE) return;
        sentences.add("Even in the best amounts of these ingredients " + name(points.get(worst)) + " lies "
                + widths(Math.abs(miss)) + " of its half-width too " + (miss > 0 ? "high" : "low")
                + ", before rounding to the balance.");
        for (SetProblem.Group group : SetProblem.Group.values()) {
            SetProblem p = searched.problem();
            long available = p.candidates().stream()
                    .filter(c -> c.group() == group && c.upper() > 0)
                    .count();
            if (available <= p.limits().most(group)) continue;
            SetSolution more = new SetSearch(new SetProblem(
                            p.points(), p.candidates(), p.limits().oneMore(group)))
                    .run(0, stop, done -> {})
                    .best();
            if (more.score() < 0.9 * best.score().total() && more.worstMiss() < Math.abs(miss) - WORTH)
                sentences.add("With " + ordinal(p.limits().most(group) + 1) + " " + word(group) + " ("
                        + names(more.members(), group) + ") it would be " + widths(more.worstMiss()) + ".");
        }
    }

    private Ingredient ingredient(int candidate) {
        return searched.candidates().ingredients.get(candidate);
    }

    /** The members of a group by id: the one more and its peers. */
    private String names(int[] members, SetProblem.Group group) {
        List<String> names = new ArrayList<>();
        for (int m : members)
            if (searched.problem().candidates().get(m).group() == group)
                names.add(ingredient(m).id());
        return names.isEmpty() ? "none of which is needed" : join(names);
    }

    private static String name(Point p) {
        return p.quantity().sign() + " at " + Figures.plain(p.wavelengthNm()) + " nm";
    }

    private static String capital(String text) {
        return text.startsWith("µ") ? text : text.substring(0, 1).toUpperCase(Locale.ROOT) + text.substring(1);
    }

    private static String join(List<String> parts) {
        if (parts.size() == 1) return parts.get(0);
        return String.join(", ", parts.subList(0, parts.size() - 1)) + " and " + parts.get(parts.size() - 1);
    }

    /** Two digits, and as many as it takes to be seen beside 1. */
    private static String widths(double miss) {
        double off = Math.abs(miss - 1);
        int digits = off < 0.0005 ? 5 : off < 0.005 ? 4 : off < 0.05 ? 3 : miss < 10 ? 2 : 3;
        return Figures.significant(miss, digits);
    }

    private static String word(SetProblem.Group group) {
        return group.name().toLowerCase(Locale.ROOT);
    }

    private static String ordinal(int n) {
        String[] words = {
            "", "a first", "a second", "a third", "a fourth", "a fifth", "a sixth", "a seventh", "an eighth", "a ninth"
        };
        return words[n];
    }
}
