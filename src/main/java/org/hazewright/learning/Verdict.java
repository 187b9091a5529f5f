package org.hazewright.learning;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.stream.Collectors;
import org.apache.commons.math3.linear.RealVector;

/**
 * A batch as measured against its prediction, both with their uncertainties: it agrees, or the data blame a factor, or none alone.
 *
 * <p>r are the differences and S their expected covariance. Two tests, at half of {@link StraightLine#LEVEL} each: χ² = rᵀ S⁻¹ r of all
 * values together, and the factor that lowers it most. Freeing a factor of column h shifts it by δ = hᵀS⁻¹r / hᵀS⁻¹h and lets χ² fall by
 * (hᵀS⁻¹r)²/(hᵀS⁻¹h), which is χ² of one degree of freedom when nothing is wrong; the largest of k falls counts k times its probability
 * (Bonferroni). The second test sees seven values that all lean one way where the first sees seven small differences.
 *
 * <p>A factor explains the batch when what is left passes the same two tests, with one degree of freedom less, and the factor stays above
 * 0. Among explanations within 3.84 of the best (95 % point of χ² of one degree of freedom) the data cannot choose; of those, one that
 * needs more than {@value #FAR_FETCHED} times as many of its own standard uncertainties as another is left out. What then remains is
 * named.
 *
 * @param chiSquared of all values together, {@code pTogether} its probability, {@code pLeaning} that of the largest fall
 * @param suspects every factor that takes part but a method's trusted scale, largest fall first
 * @param named those that the sentence names; empty on agreement and when none explains it
 * @param rows value by value
 */
public record Verdict(
        Outcome outcome,
        double chiSquared,
        double pTogether,
        double pLeaning,
        List<Suspect> suspects,
        List<Suspect> named,
        String sentence,
        List<Comparison> rows) {

    private static final double TOLD_APART = 3.84;
    private static final double FAR_FETCHED = 3;

    /** What a verdict comes to. */
    public enum Outcome {
        AGREES,
        ONE_FACTOR,
        CANNOT_TELL_WHICH,
        NO_SINGLE_FACTOR
    }

    public Verdict {
        suspects = List.copyOf(suspects);
        named = List.copyOf(named);
        rows = List.copyOf(rows);
    }

    public static Verdict of(Factors known, MeasuredBatch batch) {
        Factors all = known.with(batch);
        Innovation innovation = new Innovation(all, List.of(batch));
        List<Comparison> rows = innovation.comparisons();
        double chi2 = innovation.chiSquared();
        double pTogether = StraightLine.upperTail(chi2, rows.size());
        List<Suspect> suspects = suspects(all, innovation, chi2);
        double pLeaning =
                leaning(suspects.stream().mapToDouble(Suspect::pFall).min().orElse(1), suspects.size());
        String evidence = evidence(chi2, pTogether, pLeaning, rows);
        if (both(pTogether, pLeaning, rows.size()) >= StraightLine.LEVEL) {
            String sentence = "Measured and predicted agree: " + evidence + ".";
            return new Verdict(Outcome.AGREES, chi2, pTogether, pLeaning, suspects, List.of(), sentence, rows);
        }
        List<Suspect> named = named(suspects);
        Outcome outcome = named.isEmpty()
                ? Outcome.NO_SINGLE_FACTOR
                : named.size() == 1 ? Outcome.ONE_FACTOR : Outcome.CANNOT_TELL_WHICH;
        String sentence = "Measured and predicted disagree: " + evidence + ". " + reason(named, suspects);
        return new Verdict(outcome, chi2, pTogether, pLeaning, suspects, named, sentence, rows);
    }

    /** Probability of the largest of several falls. */
    private static double leaning(double least, int tests) {
        return Math.min(1, least * Math.max(1, tests));
    }

    /** Probability of the two tests together; of one value the second says nothing new. */
    private static double both(double pTogether, double pLeaning, int degreesOfFreedom) {
        return degreesOfFreedom <= 1 ? pTogether : Math.min(1, 2 * Math.min(pTogether, pLeaning));
    }

    private static List<Suspect> suspects(Factors all, Innovation innovation, double chi2) {
        List<Factor> factors = new ArrayList<>();
        List<RealVector> columns = new ArrayList<>();
        List<RealVector> weighted = new ArrayList<>(); // S⁻¹ h
        for (int i = 0; i < all.factors().size(); i++) {
            Factor f = all.factors().get(i);
            RealVector h = innovation.h.getColumnVector(i);
            boolean trusted = f.kind() == Factor.Kind.METHOD && all.u(f) == 0;
            if (trusted || h.getLInfNorm() == 0) continue;
            factors.add(f);
            columns.add(h);
            weighted.add(innovation.solve(h));
        }
        List<Suspect> suspects = new ArrayList<>();
        for (int i = 0; i < factors.size(); i++) {
            double along = weighted.get(i).dotProduct(innovation.r);
            double information = weighted.get(i).dotProduct(columns.get(i));
            double fall = along * along / information;
            double left = Math.max(0, chi2 - fall);
            double shift = along / information;
            double least = 1;
            for (int k = 0; k < factors.size(); k++) {
                if (k == i) continue;
                // The same for another factor once this one is free: its column without what lies along this one.
                double shared = weighted.get(i).dotProduct(columns.get(k)) / information;
                double own = weighted.get(k).dotProduct(columns.get(k));
                double rest = own - shared * shared * information;
                if (rest <= 1e-9 * own) continue;
                double further = weighted.get(k).dotProduct(innovation.r) - shared * along;
                least = Math.min(least, StraightLine.upperTail(further * further / rest, 1));
            }
            int dof = innovation.r.getDimension() - 1;
            double pLeft = both(StraightLine.upperTail(left, dof), leaning(least, factors.size() - 1), dof);
            double stated = all.u(factors.get(i));
            suspects.add(new Suspect(
                    factors.get(i),
                    fall,
                    StraightLine.upperTail(fall, 1),
                    left,
                    pLeft,
                    all.mean(factors.get(i)) + shift,
                    Math.sqrt(Math.max(0, 1 / information - stated * stated)),
                    stated > 0 ? shift / stated : Math.copySign(Double.POSITIVE_INFINITY, shift)));
        }
        suspects.sort(Comparator.comparingDouble(s -> -s.fall()));
        return suspects;
    }

    private static List<Suspect> named(List<Suspect> suspects) {
        List<Suspect> explain =
                new ArrayList<>(suspects.stream().filter(Suspect::explains).toList());
        if (explain.isEmpty()) return explain;
        double best = explain.get(0).fall();
        explain.removeIf(s -> s.fall() < best - TOLD_APART);
        explain.sort(Comparator.comparingDouble(s -> Math.abs(s.inStandardUncertainties())));
        double nearest = Math.abs(explain.get(0).inStandardUncertainties());
        explain.removeIf(s -> Math.abs(s.inStandardUncertainties()) > FAR_FETCHED * nearest);
        return explain;
    }

    private static String evidence(double chi2, double pTogether, double pLeaning, List<Comparison> rows) {
        if (rows.size() == 1)
            return "one value, off by " + Rounded.number(rows.get(0).inStandardUncertainties())
                    + " standard uncertainties (probability " + Rounded.probability(pTogether) + ")";
        String together = rows.size() + " values, χ² " + Rounded.number(chi2) + " where about " + rows.size()
                + " is expected (probability " + Rounded.probability(pTogether) + ")";
        boolean onlyLeaning = pTogether >= StraightLine.LEVEL / 2 && pLeaning < StraightLine.LEVEL / 2;
        return onlyLeaning
                ? together + ", but they lean one way together (probability " + Rounded.probability(pLeaning) + ")"
                : together;
    }

    private static String reason(List<Suspect> named, List<Suspect> suspects) {
        if (named.isEmpty()) {
            String nearest = suspects.isEmpty()
                    ? ""
                    : " The nearest, " + suspects.get(0).factor().words() + ", leaves χ² "
                            + Rounded.number(suspects.get(0).left()) + ".";
            return "No single ingredient explains it." + nearest
                    + " Perhaps a slip at the balance, something not recorded, or stated uncertainties that are too small.";
        }
        if (named.size() == 1)
            return "The data blame " + named.get(0).words() + "; χ² falls to "
                    + Rounded.number(named.get(0).left()) + ".";
        return "These values cannot tell which of " + named.size() + ": "
                + named.stream().map(Suspect::words).collect(Collectors.joining("; or ")) + ".";
    }
}
