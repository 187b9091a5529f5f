package org.hazewright.bench;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import org.hazewright.brief.Brief;
import org.hazewright.brief.Point;
import org.hazewright.mixture.Budget;
import org.hazewright.mixture.Cause;
import org.hazewright.mixture.Draws;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Sweep;

/**
 * What a recipe, or a batch as weighed, gives for a brief: the prediction at every wanted number, what could move it, and the
 * chance of landing.
 *
 * @param predicted one a point of the brief, in its order
 * @param budget first-order uncertainty by cause at the brief's wavelengths
 * @param chance share of Monte Carlo draws with every target inside its tolerance; NaN when none were drawn
 */
public record Outlook(Brief brief, Recipe recipe, List<Answer.Predicted> predicted, Budget budget, double chance) {
    private static final long SEED = 1;

    /** Half-width of the interval that holds 95 % of a normal distribution, in standard deviations. */
    private static final double NORMAL_95 = 1.959964;

    /** Fewer draws than this do not settle the ends of an interval; the interval is then first-order. */
    private static final int DRAWS_FOR_INTERVALS = 3000;

    /** A cause's share of the summed variance in units of tolerance, 0 to 1. */
    public record CauseShare(String name, Cause.Kind kind, double share) {}

    public Outlook {
        predicted = List.copyOf(predicted);
    }

    /** On the full model, with so many Monte Carlo draws; 0 for none. */
    public static Outlook of(Brief brief, Recipe recipe, int draws) {
        return near(brief, recipe, Sweep.of(Mixture.of(recipe), brief.wavelengthsNm()), draws);
    }

    /**
     * With coefficients as in a mixture near the recipe's, of the same ingredients; {@code sweep} holds the brief's wavelengths and
     * no others.
     */
    public static Outlook near(Brief brief, Recipe recipe, Sweep sweep, int count) {
        double[] nm = sweep.wavelengthsNm();
        double capacity = brief.balance().capacityG();
        double[] mua = sweep.muaPerCm(recipe.massesG());
        double[] musp = sweep.muspPerCm(recipe.massesG());
        Budget budget = Budget.of(recipe, sweep, capacity);
        double[] uMua = budget.uMuaPerCm();
        double[] uMusp = budget.uMuspPerCm();
        Draws draws = count == 0 ? null : Draws.of(recipe, sweep, capacity, count, SEED);
        List<Answer.Predicted> predicted = new ArrayList<>();
        double[] low = new double[2 * nm.length];
        double[] high = new double[2 * nm.length];
        Arrays.fill(low, Double.NaN);
        Arrays.fill(high, Double.NaN);
        for (Point p : brief.points()) {
            boolean scattering = p.quantity() == Point.Quantity.MUSP;
            int at = Arrays.binarySearch(nm, p.wavelengthNm());
            double value = (scattering ? musp : mua)[at];
            double u = (scattering ? uMusp : uMua)[at];
            double[] interval = count < DRAWS_FOR_INTERVALS
                    ? new double[] {value - NORMAL_95 * u, value + NORMAL_95 * u}
                    : draws.interval95(scattering, at);
            predicted.add(new Answer.Predicted(p, value, u, interval[0], interval[1], p.miss(value)));
            int row = at + (scattering ? nm.length : 0);
            low[row] = p.wantedPerCm() - p.tolerancePerCm();
            high[row] = p.wantedPerCm() + p.tolerancePerCm();
        }
        double chance = draws == null ? Double.NaN : draws.shareInside(low, high);
        return new Outlook(brief, recipe, predicted, budget, chance);
    }

    public boolean meets() {
        return predicted.stream().allMatch(Answer.Predicted::inside);
    }

    /** Largest |miss|; 1 is the edge of tolerance. */
    public double worstMiss() {
        return predicted.stream().mapToDouble(p -> Math.abs(p.miss())).max().orElse(0);
    }

    /** Shares of the variance by cause, largest first; they sum to 1. Empty when nothing is uncertain. */
    public List<CauseShare> causes() {
        double[] nm = budget.wavelengthsNm();
        List<CauseShare> shares = new ArrayList<>();
        double total = 0;
        for (Cause c : budget.causes()) {
            double sum = 0;
            for (Answer.Predicted p : predicted) {
                int at = Arrays.binarySearch(nm, p.point().wavelengthNm());
                boolean scattering = p.point().quantity() == Point.Quantity.MUSP;
                double effect = (scattering ? c.muspPerCm() : c.muaPerCm())[at]
                        / p.point().tolerancePerCm();
                sum += p.point().weight() * effect * effect;
            }
            shares.add(new CauseShare(c.name(), c.kind(), sum));
            total += sum;
        }
        if (!(total > 0)) return List.of();
        double whole = total;
        return shares.stream()
                .map(s -> new CauseShare(s.name, s.kind, s.share / whole))
                .sorted(Comparator.comparingDouble(CauseShare::share).reversed())
                .toList();
    }
}
