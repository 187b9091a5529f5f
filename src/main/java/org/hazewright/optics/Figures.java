package org.hazewright.optics;

import java.math.BigDecimal;
import java.math.MathContext;
import java.math.RoundingMode;
import java.util.Locale;

/**
 * Numbers as people read them: a stated count of digits, a decimal point whatever the locale, no exponent for everyday sizes.
 */
public final class Figures {
    private Figures() {}

    /** Rounded half-even to so many significant digits: 0.1004, 12.3, 4570. */
    public static String significant(double value, int digits) {
        if (value == 0) return "0";
        if (!Double.isFinite(value)) return Double.isNaN(value) ? "–" : value > 0 ? "∞" : "−∞";
        BigDecimal rounded = new BigDecimal(value).round(new MathContext(digits, RoundingMode.HALF_EVEN));
        double size = Math.abs(rounded.doubleValue());
        if (size < 1e-4 || size >= 1e7) return String.format(Locale.ROOT, "%." + (digits - 1) + "e", value);
        int scale = Math.max(0, digits - 1 - exponent(rounded));
        return rounded.setScale(scale, RoundingMode.HALF_EVEN).toPlainString();
    }

    /** So many digits after the point. */
    public static String fixed(double value, int decimals) {
        if (!Double.isFinite(value)) return significant(value, 3);
        String text = String.format(Locale.ROOT, "%." + decimals + "f", value);
        return text.startsWith("-") && text.chars().noneMatch(c -> c >= '1' && c <= '9') ? text.substring(1) : text;
    }

    /** A whole number without a point, any other with the digits it has. */
    public static String plain(double value) {
        if (!Double.isFinite(value)) return significant(value, 3);
        String text = BigDecimal.valueOf(value).stripTrailingZeros().toPlainString();
        return text.length() > 20 ? Double.toString(value) : text;
    }

    /** Decimals that show an uncertainty to two significant digits: 2 for 0.12, 4 for 0.0031. */
    public static int decimalsFor(double uncertainty) {
        if (!(uncertainty > 0) || Double.isInfinite(uncertainty)) return 4;
        return Math.max(0, Math.min(9, 1 - exponent(new BigDecimal(uncertainty).round(new MathContext(2)))));
    }

    /** "12.34 ± 0.12": the uncertainty with two significant digits, the value to the same place. */
    public static String withUncertainty(double value, double uncertainty) {
        int decimals = decimalsFor(uncertainty);
        return fixed(value, decimals) + " ± " + fixed(uncertainty, decimals);
    }

    private static int exponent(BigDecimal value) {
        return value.precision() - value.scale() - 1;
    }
}
