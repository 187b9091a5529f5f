package org.hazewright.learning;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.stream.Collectors;
import org.apache.commons.math3.linear.RealVector;

/**
 * A batch as measured against its prediction, both with their uncertainties: it agrees, or the data blame a factor, or none alone.
 *
 * <p>Agreement: χ² = rᵀ S⁻¹ r of the differences r with their expected covariance S, at level {@link StraightLine#LEVEL}. Else each
 * factor in turn is set free, its file's figure and uncertainty put aside: along its column h the best shift is δ = hᵀS⁻¹r / hᵀS⁻¹h
 * and χ² falls by (hᵀS⁻¹r)²/(hᵀS⁻¹h). A factor explains the batch when what is left passes the test with one degree of freedom less and
 * the factor stays above 0. Explanations within 3.84 of the best (95 % point of χ² with one degree of freedom) cannot be told apart
 * by these values, and all are named.
 *
 * @param suspects every factor that takes part but a method's trusted scale, largest fall of χ² first; empty on agreement
 * @param rows value by value
 */
public record Verdict(
        Outcome outcome,
        double chiSquared,
        double pValue,
        List<Suspect> suspects,
        String sentence,
        List<Comparison> rows) {

    private static final double TOLD_APART = 3.84;

    /** What a verdict comes to. */
    public enum Outcome {
        AGREES,
        ONE_FACTOR,
        CANNOT_TELL_WHICH,
        NO_SINGLE_FACTOR
    }

    /**
     * What freeing one factor does.
     *
     * @param fall of χ²
     * @param left χ² that remains, and {@code pLeft} its probability
     * @param estimate of the factor from this batch alone, and {@code u} its standard uncertainty
     * @param inStandardUncertainties shift over the uncertainty that was stated for the factor; infinite where none was
     */
    public record Suspect(
            Factor factor,
            double fall,
            double left,
            double pLeft,
            double estimate,
            double u,
            double inStandardUncertainties) {
        /** Whether this factor alone brings measured and predicted together. */
        public boolean explains() {
            return pLeft >= StraightLine.LEVEL && estimate > 0;
        }
    }

    public Verdict {
        suspects = List.copyOf(suspects);
        rows = List.copyOf(rows);
    }

    public static Verdict of(Factors known, MeasuredBatch batch) {
        Factors all = known.with(batch);
        Innovation innovation = new Innovation(all, List.of(batch));
        List<Comparison> rows = innovation.comparisons();
        double chi2 = innovation.chiSquared();
        double p = StraightLine.upperTail(chi2, rows.size());
        if (p >= StraightLine.LEVEL)
            return new Verdict(Outcome.AGREES, chi2, p, List.of(), "Measured and predicted agree: " + evidence(chi2, p, rows) + ".", rows);
        List<Suspect> suspects = suspects(all, innovation, chi2, rows.size());
        List<Suspect> explain = new ArrayList<>(suspects.stream().filter(Suspect::explains).toList());
        if (!explain.isEmpty()) {
            double best = explain.get(0).fall();
            explain.removeIf(s -> s.fall() < best - TOLD_APART);
        }
        Outcome outcome = explain.isEmpty()
                ? Outcome.NO_SINGLE_FACTOR
                : explain.size() == 1 ? Outcome.ONE_FACTOR : Outcome.CANNOT_TELL_WHICH;
        String sentence = "Measured and predicted disagree: " + evidence(chi2, p, rows) + ". " + reason(explain, suspects);
        return new Verdict(outcome, chi2, p, suspects, sentence, rows);
    }

    private static List<Suspect> suspects(Factors all, Innovation innovation, double chi2, int values) {
        RealVector weighted = innovation.solve(innovation.r);
        List<Suspect> suspects = new ArrayList<>();
        for (int i = 0; i < all.factors().size(); i++) {
            Factor f = all.factors().get(i);
            RealVector h = innovation.h.getColumnVector(i);
            double stated = all.u(f);
            boolean trusted = f.kind() == Factor.Kind.METHOD && stated == 0;
            if (trusted || h.getLInfNorm() == 0) continue;
            double along = h.dotProduct(weighted);
            double information = h.dotProduct(innovation.solve(h));
            double fall = along * along / information;
            double left = Math.max(0, chi2 - fall);
            double shift = along / information;
            double u = Math.sqrt(Math.max(0, 1 / information - stated * stated));
            double estimate = all.mean(f) + shift;
            double pLeft = StraightLine.upperTail(left, values - 1);
            suspects.add(new Suspect(
                    f, fall, left, pLeft, estimate, u, stated > 0 ? shift / stated : Math.copySign(Double.POSITIVE_INFINITY, shift)));
        }
        // Equal falls (one value, or proportional columns): the factor that its own file holds least certain comes first.
        suspects.sort(Comparator.comparingDouble((Suspect s) -> -Math.rint(s.fall() * 1e6) / 1e6)
                .thenComparingDouble(s -> Math.abs(s.inStandardUncertainties())));
        return suspects;
    }

    private static String evidence(double chi2, double p, List<Comparison> rows) {
        if (rows.size() == 1) {
            double z = rows.get(0).inStandardUncertainties();
            return "one value, off by " + Figures.number(z) + " standard uncertainties (probability " + Figures.probability(p) + ")";
        }
        return rows.size() + " values, χ² " + Figures.number(chi2) + " where about " + rows.size()
                + " is expected (probability " + Figures.probability(p) + ")";
    }

    private static String reason(List<Suspect> explain, List<Suspect> suspects) {
        if (explain.isEmpty()) {
            String best = suspects.isEmpty()
                    ? ""
                    : " The nearest, " + suspects.get(0).factor().words() + ", leaves χ² "
                            + Figures.number(suspects.get(0).left()) + " (probability "
                            + Figures.probability(suspects.get(0).pLeft()) + ").";
            return "No single ingredient explains it." + best
                    + " Perhaps a slip at the balance, something not recorded, or stated uncertainties that are too small.";
        }
        if (explain.size() == 1)
            return "The data blame " + said(explain.get(0)) + "; χ² falls to " + Figures.number(explain.get(0).left()) + ".";
        return "These values cannot tell which of " + explain.size() + ": "
                + explain.stream().map(Verdict::said).collect(Collectors.joining("; or ")) + ".";
    }

    private static String said(Suspect s) {
        double off = s.estimate() - 1;
        String size = s.factor().words() + ", " + Figures.percent(Math.abs(off)) + (off < 0 ? " below " : " above ")
                + (s.factor().kind() == Factor.Kind.METHOD ? "true" : "its file's figure");
        return Double.isInfinite(s.inStandardUncertainties())
                ? size + " (held to be exact until now)"
                : size + " (" + Figures.number(Math.abs(s.inStandardUncertainties())) + " of its standard uncertainties)";
    }
}
