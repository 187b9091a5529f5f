package org.hazewright.bench;

import java.math.BigDecimal;
import java.math.MathContext;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import org.hazewright.brief.Balance;

/** Grams as the balance shows them, and loads that it can carry. */
public final class Grams {
    private Grams() {}

    /** "1.410 g": as many digits as the display has, a point for the decimal mark in every country. */
    public static String shown(double massG, Balance balance) {
        return String.format(Locale.ROOT, "%." + balance.decimals() + "f g", massG);
    }

    /** "1.403 to 1.417 g". */
    public static String band(double lowG, double highG, Balance balance) {
        return String.format(Locale.ROOT, "%." + balance.decimals() + "f to ", lowG) + shown(highG, balance);
    }

    /** A number to at most four digits, without zeros behind the point: 14.02, 250, 0.0045. */
    public static String plain(double value) {
        if (value == 0) return "0";
        return new BigDecimal(value)
                .round(new MathContext(4))
                .stripTrailingZeros()
                .toPlainString();
    }

    /** An amount too small for grams in mg, the rest in g. */
    public static String small(double massG) {
        return massG < 1 ? plain(1000 * massG) + " mg" : plain(massG) + " g";
    }

    /**
     * The loads that a mass is weighed in: one, or as few equal ones as the capacity allows, each a number that the display can
     * show; they sum to the mass, the last one taking what rounding leaves.
     */
    public static List<Double> loads(double massG, Balance balance) {
        int count = balance.loads(massG);
        List<Double> loads = new ArrayList<>(count);
        double left = massG;
        for (int n = count; n > 1; n--) {
            double load = balance.rounded(left / n);
            loads.add(load);
            left -= load;
        }
        loads.add(balance.rounded(left));
        return loads;
    }
}
