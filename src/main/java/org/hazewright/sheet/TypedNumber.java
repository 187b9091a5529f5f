package org.hazewright.sheet;

import java.util.Locale;
import java.util.OptionalDouble;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/**
 * Grams that were typed as text: a unit behind them, a decimal comma, spaces between thousands.
 *
 * <p>"12,345" may be twelve grams or twelve thousand: the plan decides, and where it cannot, nothing is guessed.
 */
final class TypedNumber {
    private static final Pattern NUMBER = Pattern.compile("([+-]?[0-9.,' ]*[0-9.,])\\s*(g|mg|kg|gram|grams)?\\.?");

    private TypedNumber() {}

    /** Grams, or empty when the text is no mass that could be meant. */
    static OptionalDouble grams(String typed, double plannedG) {
        String text =
                typed.replace('\u00a0', ' ').replace('\u202f', ' ').strip().toLowerCase(Locale.ROOT);
        Matcher m = NUMBER.matcher(text);
        if (!m.matches()) return OptionalDouble.empty();
        String digits = m.group(1).replace(" ", "").replace("'", "");
        double unit = m.group(2) == null
                ? 1
                : m.group(2).equals("mg") ? 0.001 : m.group(2).equals("kg") ? 1000 : 1;
        int comma = digits.lastIndexOf(',');
        int point = digits.lastIndexOf('.');
        if (comma < 0) return parsed(digits, unit);
        if (point >= 0)
            return parsed(comma > point ? digits.replace(".", "").replace(',', '.') : digits.replace(",", ""), unit);
        OptionalDouble asDecimal = parsed(digits.replace(',', '.'), unit);
        boolean mayGroup = digits.matches("[+-]?[1-9][0-9]{0,2}(,[0-9]{3})+");
        if (!mayGroup) return asDecimal;
        OptionalDouble asThousands = parsed(digits.replace(",", ""), unit);
        boolean one = near(asDecimal, plannedG);
        boolean other = near(asThousands, plannedG);
        if (one == other) return OptionalDouble.empty();
        return one ? asDecimal : asThousands;
    }

    private static boolean near(OptionalDouble g, double plannedG) {
        return g.isPresent() && g.getAsDouble() > plannedG / 20 && g.getAsDouble() < plannedG * 20;
    }

    private static OptionalDouble parsed(String digits, double unit) {
        try {
            return OptionalDouble.of(Double.parseDouble(digits) * unit);
        } catch (NumberFormatException e) {
            return OptionalDouble.empty();
        }
    }
}
