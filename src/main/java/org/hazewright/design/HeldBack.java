package org.hazewright.design;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.hazewright.brief.Brief;
import org.hazewright.brief.Point;
import org.hazewright.optics.Figures;
import org.hazewright.shelf.Ingredient;

/**
 * What holds a recipe back, in sentences: which targets conflict, which limit binds, and what relaxing it would buy.
 *
 * <p>Every number is that of a problem that was solved: the search with one limit loosened or one target left out. A relaxation that
 * buys less than {@value #WORTH} half-widths is not mentioned.
 */
final class HeldBack {
    private static final double WORTH = 0.05;

    private final Brief brief;
    private final Design.Searched searched;
    private final Option best;
    private final double possible;
    private final List<Point> points;

    HeldBack(Brief brief, Design.Searched searched, Option best, double possible) {
        this.brief = brief;
        this.searched = searched;
        this.best = best;
        this.possible = possible;
        this.points = searched.columns().points();
    }

    List<String> sentences() {
        List<String> sentences = new ArrayList<>();
        if (possible > 1 + 1e-9) cannotMeet(sentences);
        else meets(sentences);
        return sentences;
    }

    private void cannotMeet(List<String> sentences) {
        sentences.add("No recipe from this shelf meets every tolerance: the best possible worst miss is "
                + widths(possible) + " half-widths.");
        floors(sentences);
        LeastWorstMiss least = searched.result().leastWorstMiss();
        List<Integer> pulling = pulling(least);
        if (pulling.size() > 1) {
            List<String> high = new ArrayList<>();
            List<String> low = new ArrayList<>();
            for (int j : pulling) (least.pointWeight()[j] > 0 ? high : low).add(name(points.get(j)));
            sentences.add(
                    high.isEmpty() || low.isEmpty()
                            ? join(high.isEmpty() ? low : high)
                                    + (high.isEmpty() ? " come out too low together." : " come out too high together.")
                            : "These targets conflict: " + join(high) + (high.size() > 1 ? " come" : " comes")
                                    + " out too high while " + join(low) + (low.size() > 1 ? " come" : " comes")
                                    + " out too low.");
        }
        relaxations(sentences, least);
        for (int j : pulling) {
            if (points.size() < 2) break;
            double without = worst(withoutPoint(j));
            if (without < possible - WORTH && (without <= 1 || without < 0.7 * possible))
                sentences.add("Without the target " + name(points.get(j)) + " the worst miss would be "
                        + widths(without) + " half-widths.");
        }
    }

    private void meets(List<String> sentences) {
        floors(sentences);
        int worst = 0;
        for (int j = 1; j < points.size(); j++)
            if (Math.abs(best.misses()[j]) > Math.abs(best.misses()[worst])) worst = j;
        double miss = best.misses()[worst];
        if (Math.abs(miss) < 0.3) return;
        sentences.add("The largest planned miss is " + name(points.get(worst)) + ": " + widths(Math.abs(miss))
                + " of its half-width too " + (miss > 0 ? "high." : "low."));
        for (SetProblem.Group group : SetProblem.Group.values()) {
            Optional<SetResult> more = oneMore(group);
            if (more.isEmpty()) continue;
            SetSolution found = more.get().best();
            double now = best.score().total();
            if (found.score() < 0.9 * now && found.worstMiss() < best.worstMiss() - WORTH)
                sentences.add("With " + ordinal(searched.problem().limits().most(group) + 1) + " " + word(group) + " ("
                        + names(found.members()) + ") the worst planned miss falls from " + widths(best.worstMiss())
                        + " to "
                        + widths(found.worstMiss()) + ".");
        }
    }

    /** Targets below what the base gives by itself. */
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

    private void relaxations(List<String> sentences, LeastWorstMiss least) {
        for (SetProblem.Group group : SetProblem.Group.values()) {
            Optional<SetResult> more = oneMore(group);
            if (more.isEmpty()) continue;
            double with = more.get().bestPossibleWorstMiss();
            if (with < possible - WORTH)
                sentences.add("With " + ordinal(searched.problem().limits().most(group) + 1) + " " + word(group)
                        + " the worst miss falls from " + widths(possible) + " to " + widths(with) + ".");
        }
        for (int k = 0; k < least.upperWeight().length; k++) {
            if (!(least.upperWeight()[k] > 1e-9)) continue;
            Ingredient i = searched.candidates().ingredients.get(k);
            double with = worst(withoutUpper(k));
            if (i.maxGPerMl().isPresent() && with < possible - WORTH)
                sentences.add("More " + i.id() + " than its limit of "
                        + Figures.significant(i.maxGPerMl().getAsDouble(), 3) + " g/mL would bring the worst miss from "
                        + widths(possible) + " to " + widths(with) + ".");
        }
        if (least.volumeWeight() > 1e-9 && searched.problem().limits().addedVolume() < 1) {
            double with = worst(withVolume());
            if (with < possible - WORTH)
                sentences.add("With less base than its least share of "
                        + Figures.significant(
                                100 * (1 - searched.problem().limits().addedVolume()), 3)
                        + " % the worst miss falls from " + widths(possible) + " to " + widths(with) + ".");
        }
    }

    private Optional<SetResult> oneMore(SetProblem.Group group) {
        SetProblem p = searched.problem();
        long available = p.candidates().stream()
                .filter(c -> c.group() == group && c.upper() > 0)
                .count();
        if (available <= p.limits().most(group)) return Optional.empty();
        return Optional.of(
                solve(new SetProblem(p.points(), p.candidates(), p.limits().oneMore(group))));
    }

    private SetProblem withoutPoint(int left) {
        SetProblem p = searched.problem();
        List<SetProblem.Point> rows = new ArrayList<>(p.points());
        rows.remove(left);
        List<SetProblem.Candidate> columns = new ArrayList<>();
        for (SetProblem.Candidate c : p.candidates()) {
            double[] effect = new double[rows.size()];
            for (int j = 0, n = 0; j < c.effect().length; j++) if (j != left) effect[n++] = c.effect()[j];
            columns.add(new SetProblem.Candidate(
                    effect, c.ingredientTerm(), c.weighingTerm(), c.upper(), c.specificVolume(), c.group()));
        }
        return new SetProblem(rows, columns, p.limits());
    }

    private SetProblem withoutUpper(int k) {
        SetProblem p = searched.problem();
        List<SetProblem.Candidate> columns = new ArrayList<>(p.candidates());
        SetProblem.Candidate c = columns.get(k);
        columns.set(
                k,
                new SetProblem.Candidate(
                        c.effect(),
                        c.ingredientTerm(),
                        c.weighingTerm(),
                        Double.POSITIVE_INFINITY,
                        c.specificVolume(),
                        c.group()));
        return new SetProblem(p.points(), columns, p.limits());
    }

    private SetProblem withVolume() {
        SetProblem p = searched.problem();
        SetProblem.Limits l = p.limits();
        return new SetProblem(
                p.points(),
                p.candidates(),
                new SetProblem.Limits(
                        l.mostAbsorbers(), l.mostScatterers(), l.mostModifiers(), l.mostTogether(), 1, l.conflicts()));
    }

    private static double worst(SetProblem problem) {
        return solve(problem).bestPossibleWorstMiss();
    }

    private static SetResult solve(SetProblem problem) {
        return new SetSearch(problem).run(1);
    }

    /** Points that hold the worst miss up, heaviest first. */
    private List<Integer> pulling(LeastWorstMiss least) {
        List<Integer> pulling = new ArrayList<>();
        for (int j = 0; j < points.size(); j++) if (Math.abs(least.pointWeight()[j]) > 1e-6) pulling.add(j);
        pulling.sort((a, b) -> Double.compare(Math.abs(least.pointWeight()[b]), Math.abs(least.pointWeight()[a])));
        return pulling;
    }

    private String names(int[] members) {
        List<String> names = new ArrayList<>();
        for (int m : members) names.add(searched.candidates().ingredients.get(m).id());
        return join(names);
    }

    static String name(Point p) {
        return p.quantity().sign() + " at " + Figures.plain(p.wavelengthNm()) + " nm";
    }

    private static String join(List<String> parts) {
        if (parts.size() == 1) return parts.get(0);
        return String.join(", ", parts.subList(0, parts.size() - 1)) + " and " + parts.get(parts.size() - 1);
    }

    private static String widths(double miss) {
        return miss < 10 ? Figures.significant(miss, 2) : Figures.significant(miss, 3);
    }

    private static String word(SetProblem.Group group) {
        return group.name().toLowerCase(java.util.Locale.ROOT);
    }

    private static String ordinal(int n) {
        String[] words = {
            "", "a first", "a second", "a third", "a fourth", "a fifth", "a sixth", "a seventh", "an eighth"
        };
        return n < words.length ? words[n] : "a " + n + "th";
    }
}
