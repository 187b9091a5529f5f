package org.hazewright.desk.model;

import java.math.BigDecimal;
import java.math.MathContext;
import java.util.OptionalDouble;
import org.hazewright.brief.Target;
import org.hazewright.optics.Figures;
import org.hazewright.optics.Refusal;

/** How far a value may be off, as the person said it: a share of the value, or a half-width in 1/cm. */
public sealed interface Allowed {

    /** A share of the wanted value, above 0 and at most 1. */
    record Share(double share) implements Allowed {
        public Share {
            if (!(share > 0 && share <= 1))
                throw new Refusal("A tolerance of " + Figures.significant(100 * share, 3)
                        + " % is not possible; it lies above 0 and is at most 100 %.");
        }

        @Override
        public double perCm(double wantedPerCm) {
            return share * wantedPerCm;
        }

        @Override
        public String text() {
            return Figures.plain(new BigDecimal(100 * share)
                            .round(new MathContext(10))
                            .doubleValue()) + " %";
        }
    }

    /** A half-width in 1/cm. */
    record PerCm(double halfWidth) implements Allowed {
        public PerCm {
            Refusal.positive("Tolerance in 1/cm", halfWidth);
        }

        @Override
        public double perCm(double wantedPerCm) {
            return halfWidth;
        }

        @Override
        public String text() {
            return Figures.plain(
                    new BigDecimal(halfWidth).round(new MathContext(10)).doubleValue());
        }
    }

    /** Half-width in 1/cm for a wanted value in 1/cm. */
    double perCm(double wantedPerCm);

    /** As it is typed: "5 %", or "0.004" for a half-width. */
    String text();

    /** "5 %" or "5" is a share; "0.004 /cm" or a number below 0.5 without a sign is a half-width. */
    static Allowed typed(String text) {
        String given = text.strip().replaceFirst("^±\\s*", "");
        if (given.endsWith("%")) return new Share(Typed.percent(given));
        double v = Typed.number(given, "/cm", "1/cm", "per cm");
        boolean perCm = given.endsWith("cm") || v < 0.5;
        if (!perCm && v > 100)
            throw new Refusal(
                    "“" + given + "” is neither a share in % nor a half-width in /cm; type 5 % or 0.005 /cm.");
        return perCm ? new PerCm(v) : new Share(v / 100);
    }

    /** What a half-width was most likely said as: a share of at most four digits when there is one, else the half-width. */
    static Allowed guessed(double halfWidthPerCm, double wantedPerCm) {
        OptionalDouble share = Target.shareOf(halfWidthPerCm, wantedPerCm);
        if (share.isPresent()) return new Share(share.getAsDouble());
        return new PerCm(halfWidthPerCm);
    }
}
