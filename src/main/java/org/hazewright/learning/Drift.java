package org.hazewright.learning;

import java.time.LocalDate;
import java.util.ArrayList;
import java.util.List;
import org.apache.commons.math3.distribution.NormalDistribution;
import org.hazewright.optics.Refusal;

/**
 * Whether a lot's figure moves from update to update by more than its uncertainties say.
 *
 * <p>When a factor does not change, its successive estimates m_k with standard uncertainties u_k make independent steps m_k − m_{k−1} of
 * variance u²_{k−1} − u²_k (the innovation property of the linear-Gaussian update). Two tests at half of {@link StraightLine#LEVEL}
 * each: Σ z² of the steps z against χ², for a lot that jumps about, and Σ z/√n against the normal distribution, for one that goes one way. The
 * step from the file to the first update is left out: it says that the lot is not as filed, not that it changes.
 *
 * @param first date of the first update, {@code last} of the last
 * @param move relative change of the figure between them, and {@code uMove} the standard uncertainty that a steady lot would have for it
 * @param oneWay whether the common direction makes up more than half of Σ z²: a drift rather than jumps
 * @param pJumps probability of such steps from a steady lot, and {@code pTrend} of such a trend
 */
public record Drift(
        Factor factor,
        LocalDate first,
        LocalDate last,
        int steps,
        double move,
        double uMove,
        boolean oneWay,
        double pJumps,
        double pTrend) {

    /** The factor after one update, all relative to the same file, with its standard uncertainty. */
    public record Estimate(LocalDate on, double factor, double u) {
        public Estimate {
            Refusal.positive("Factor of a lot on " + on, factor);
            Refusal.notNegative("Standard uncertainty of a lot's factor on " + on, u);
        }

        public static Estimate of(LocalDate on, Factors after, Factor factor) {
            return new Estimate(on, after.mean(factor), after.u(factor));
        }
    }

    /** Estimates after each update, oldest first; fewer than 2 show no drift. */
    public static Drift of(Factor factor, List<Estimate> estimates) {
        if (estimates.isEmpty()) throw new Refusal("There is no update of " + factor.words() + " yet.");
        List<Double> z = new ArrayList<>();
        for (int k = 1; k < estimates.size(); k++) {
            Estimate before = estimates.get(k - 1);
            Estimate now = estimates.get(k);
            if (now.on().isBefore(before.on()))
                throw new Refusal("Updates of " + factor.words() + " are not in order: " + now.on() + " comes after "
                        + before.on() + ".");
            // A file keeps few digits: a hair more is the same, and a step is known no better than a thousandth of u.
            if (now.u() > before.u() * 1.001)
                throw new Refusal("The uncertainty of " + factor.words() + " grows from " + Rounded.number(before.u())
                        + " to " + Rounded.number(now.u()) + " on " + now.on()
                        + ": these are not updates of one another. Start the history anew there.");
            double least = Math.max(1e-3 * before.u(), 1e-9);
            double variance = Math.max(before.u() * before.u() - now.u() * now.u(), least * least);
            z.add((now.factor() - before.factor()) / Math.sqrt(variance));
        }
        double squares = z.stream().mapToDouble(v -> v * v).sum();
        double sum = z.stream().mapToDouble(Double::doubleValue).sum();
        double trend = z.isEmpty() ? 0 : sum / Math.sqrt(z.size());
        Estimate first = estimates.get(0);
        Estimate last = estimates.get(estimates.size() - 1);
        return new Drift(
                factor,
                first.on(),
                last.on(),
                z.size(),
                last.factor() / first.factor() - 1,
                Math.sqrt(Math.max(0, first.u() * first.u() - last.u() * last.u())) / first.factor(),
                trend * trend > squares / 2,
                z.isEmpty() ? 1 : StraightLine.upperTail(squares, z.size()),
                2 * new NormalDistribution(null, 0, 1).cumulativeProbability(-Math.abs(trend)));
    }

    public boolean drifting() {
        return Math.min(pJumps, pTrend) < StraightLine.LEVEL / 2;
    }

    public String sentence() {
        String moved = Rounded.percent(Math.abs(move)) + (move < 0 ? " down" : " up") + " from " + first + " to " + last
                + " in "
                + steps + (steps == 1 ? " step" : " steps") + ", where a steady lot would move by about "
                + Rounded.percent(uMove);
        if (!drifting()) return factor.words() + " is steady: " + moved + ".";
        return factor.words() + (oneWay ? " drifts: " : " jumps about: ") + moved + " (probability "
                + Rounded.probability(Math.min(pJumps, pTrend)) + "). Measure the bottle again or take a fresh one.";
    }
}
