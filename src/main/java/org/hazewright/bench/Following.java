package org.hazewright.bench;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import org.hazewright.brief.Brief;
import org.hazewright.brief.Point;
import org.hazewright.design.Frozen;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Sweep;
import org.hazewright.search.ConvexProgramme;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Shelf;

/**
 * A recipe that follows while what is wanted is being moved: the same ingredients in amounts that suit, in about a millisecond.
 *
 * <p>The full model is frozen at the recipe's mixture (host index and crowding held), the convex programme of the score is solved for
 * the amounts of the ingredients that are in it, inside every tolerance where that can be, and the grams are rounded with the stocks
 * that suit. It answers briefs that want the same quantities at the same wavelengths of the same base; which ingredients are
 * best is left to the search.
 */
public final class Following {
    private final Recipe recipe;
    private final Shelf shelf;
    private final Frozen frozen;
    private final Sweep sweep;
    private final Map<Ingredient, Double> baseParts;
    private final double baseDensityGPerMl;
    private final List<Ingredient> added = new ArrayList<>();

    /** Freezes the model at a recipe that answers a brief. */
    public Following(Brief brief, Recipe recipe, Shelf shelf) {
        this.recipe = recipe;
        this.shelf = shelf;
        Mixture mixture = Mixture.of(recipe);
        frozen = new Frozen(brief.points(), mixture, recipe.base(), brief.balance());
        sweep = Sweep.of(mixture, brief.wavelengthsNm());
        baseParts = shelf.partsOf(recipe.base());
        baseDensityGPerMl = shelf.densityGPerMl(recipe.base());
        for (Ingredient i : mixture.massesG().keySet()) if (!baseParts.containsKey(i)) added.add(i);
    }

    /** Whether a brief differs only in what can be followed: values, tolerances, weights, amount and balance. */
    public boolean suits(Brief changed) {
        List<Point> ours = frozen.points();
        List<Point> theirs = changed.points();
        if (ours.size() != theirs.size()
                || !changed.bases().contains(recipe.base().id())) return false;
        for (int j = 0; j < ours.size(); j++)
            if (ours.get(j).quantity() != theirs.get(j).quantity()
                    || ours.get(j).wavelengthNm() != theirs.get(j).wavelengthNm()) return false;
        return changed.temperatureC() == recipe.temperatureC()
                && Answering.inHand(changed, shelf).stream()
                        .allMatch(s -> sweep.covers(List.of(s.diluent())) || !added.contains(s.ingredient()))
                && added.stream().noneMatch(i -> changed.limits().avoid().contains(i.id()))
                && baseParts.keySet().stream().allMatch(sweepKnows());
    }

    private java.util.function.Predicate<Ingredient> sweepKnows() {
        return i -> sweep.covers(List.of(i));
    }

    /** The recipe for a brief that {@link #suits}, with so many draws behind its chance (0 for none). */
    public Outlook to(Brief changed, int draws) {
        Frozen judge = frozen.judging(changed.points());
        double[] c = amounts(changed);
        Map<Ingredient, Double> concentrations = new LinkedHashMap<>();
        for (int k = 0; k < c.length; k++) concentrations.put(added.get(k), c[k]);
        Contents contents = new Contents(
                changed.title(),
                shelf,
                recipe.base(),
                concentrations,
                changed.volumeMl(),
                changed.temperatureC(),
                changed.sha256(),
                Answering.inHand(changed, shelf));
        Recipe rounded = StockPlan.of(
                        contents,
                        changed.balance(),
                        r -> judge.score(r).total() + 1e3 * Math.max(0, judge.worstMiss(r) - 1))
                .recipe();
        return Outlook.near(changed, rounded, sweep, draws);
    }

    /** Concentrations of {@link #added}, g/mL. */
    private double[] amounts(Brief changed) {
        List<Point> points = changed.points();
        int n = added.size();
        if (n == 0) return new double[0];
        double[] base = new double[points.size()];
        for (var part : baseParts.entrySet()) {
            double[] k = frozen.kappaCm2PerG(part.getKey());
            for (int j = 0; j < base.length; j++) base[j] += baseDensityGPerMl * part.getValue() * k[j];
        }
        double[][] effect = new double[n][points.size()];
        double[] upper = new double[n];
        double[] volume = new double[n];
        double[][] quadratic = new double[n][n];
        double[] linear = new double[n];
        for (int i = 0; i < n; i++) {
            Ingredient ingredient = added.get(i);
            volume[i] = 1 / ingredient.densityGPerMl();
            upper[i] = ingredient.maxGPerMl().orElse(Double.POSITIVE_INFINITY);
            double[] k = frozen.kappaCm2PerG(ingredient);
            for (int j = 0; j < base.length; j++) effect[i][j] = k[j] - volume[i] * base[j];
        }
        for (int j = 0; j < base.length; j++) {
            Point p = points.get(j);
            double scale = p.weight() / (p.tolerancePerCm() * p.tolerancePerCm());
            for (int i = 0; i < n; i++) {
                linear[i] += 2 * scale * effect[i][j] * (p.wantedPerCm() - base[j]);
                for (int l = 0; l < n; l++) quadratic[i][l] += 2 * scale * effect[i][j] * effect[l][j];
                double own = frozen.kappaCm2PerG(added.get(i))[j] * uncertainty(added.get(i), p);
                quadratic[i][i] += 2 * scale * own * own;
            }
        }
        List<ConvexProgramme.Limit> limits = new ArrayList<>();
        double leastShare =
                Math.max(recipe.base().leastShare(), changed.limits().leastBaseShare());
        limits.add(new ConvexProgramme.Limit(volume, Double.NEGATIVE_INFINITY, Math.min(1 - leastShare, 0.999)));
        List<ConvexProgramme.Limit> inside = new ArrayList<>(limits);
        for (int j = 0; j < base.length; j++) {
            double[] row = new double[n];
            for (int i = 0; i < n; i++) row[i] = effect[i][j];
            Point p = points.get(j);
            double middle = p.wantedPerCm() - base[j];
            inside.add(new ConvexProgramme.Limit(row, middle - p.tolerancePerCm(), middle + p.tolerancePerCm()));
        }
        ConvexProgramme.Solution s =
                ConvexProgramme.ofAmounts(quadratic, linear, 0, upper, inside).solve();
        if (s.status() != ConvexProgramme.Status.OPTIMAL)
            s = ConvexProgramme.ofAmounts(quadratic, linear, 0, upper, limits).solve();
        return Arrays.stream(s.x()).map(x -> Math.max(0, x)).toArray();
    }

    private static double uncertainty(Ingredient i, Point p) {
        return p.quantity() == Point.Quantity.MUA
                ? i.uncertainty().absorption()
                : i.uncertainty().scattering();
    }
}
