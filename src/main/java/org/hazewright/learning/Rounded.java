package org.hazewright.learning;

import java.math.BigDecimal;
import java.math.MathContext;

/** Numbers inside sentences: few digits, decimal point, no thousands. */
final class Rounded {
    private Rounded() {}

    /** Three significant digits: 0.0123, 41.2, 1230, 3.2e-7. */
    static String number(double value) {
        if (!Double.isFinite(value)) return Double.toString(value);
        if (value == 0) return "0";
        BigDecimal rounded = new BigDecimal(value).round(new MathContext(3)).stripTrailingZeros();
        double size = Math.abs(value);
        if (size >= 1e-4 && size < 1e7) return rounded.toPlainString();
        int exponent = rounded.precision() - rounded.scale() - 1;
        return rounded.movePointLeft(exponent).stripTrailingZeros().toPlainString() + "e" + exponent;
    }

    /** As it was given, without a needless ".0": a wavelength of 692.5 nm, a cell of 10 mm. */
    static String plain(double value) {
        return Double.isFinite(value)
                ? BigDecimal.valueOf(value).stripTrailingZeros().toPlainString()
                : number(value);
    }

    /** A share in per cent, two significant digits: 0.0312 is "3.1 %". */
    static String percent(double share) {
        if (!Double.isFinite(share)) return share + " %";
        if (share == 0) return "0 %";
        return new BigDecimal(100 * share)
                        .round(new MathContext(2))
                        .stripTrailingZeros()
                        .toPlainString() + " %";
    }

    /** A probability, two significant digits, with what lies under 1e-9 said so. */
    static String probability(double p) {
        if (p < 1e-9) return "below 1e-9";
        if (p > 0.999) return "above 0.999";
        BigDecimal rounded = new BigDecimal(p).round(new MathContext(2)).stripTrailingZeros();
        if (p >= 1e-4) return rounded.toPlainString();
        return number(rounded.doubleValue());
    }
}
