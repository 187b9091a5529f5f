package org.hazewright.desk.model;

import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import org.hazewright.optics.Refusal;

/**
 * Numbers as people type them: with a decimal point or comma, a sign, spaces, and their unit or none.
 *
 * <p>A comma is a decimal mark unless a point follows it ("1,250.5"); digits in groups of three with thin or ordinary spaces or
 * apostrophes are one number.
 */
public final class Typed {
    private static final Pattern NUMBER =
            Pattern.compile("([+\\-−–]?)\\s*(\\d[\\d\\s'’\u00A0\u202F.,]*|[.,]\\d+)(?:[eE]([+\\-−]?\\d+))?\\s*(.*)");

    private Typed() {}

    /** A number, refused in words; {@code units} may follow it and change nothing. */
    public static double number(String text, String... units) {
        String given = text.strip();
        if (given.isEmpty()) throw new Refusal("Type a number" + example(units) + ".");
        Matcher m = NUMBER.matcher(given);
        if (!m.matches()) throw notANumber(given, units);
        String unit = m.group(4).strip();
        boolean known = unit.isEmpty()
                || Arrays.stream(units)
                        .anyMatch(u ->
                                u.equalsIgnoreCase(unit) || u.replace(" ", "").equalsIgnoreCase(unit));
        if (!known)
            throw new Refusal("“" + unit + "” is not expected here"
                    + (units.length > 0 ? "; the number is in " + units[0] + "." : "; type a number alone."));
        String digits = m.group(2).replaceAll("[\\s'’\u00A0\u202F]", "");
        if (digits.indexOf(',') >= 0 && digits.lastIndexOf('.') > digits.indexOf(',')) digits = digits.replace(",", "");
        digits = digits.replace(',', '.');
        if (digits.chars().filter(ch -> ch == '.').count() > 1) throw notANumber(given, units);
        String sign = m.group(1).isEmpty() || m.group(1).equals("+") ? "" : "-";
        String exponent = m.group(3) == null ? "" : "e" + m.group(3).replace('−', '-');
        double value = Double.parseDouble(sign + digits + exponent);
        if (Double.isInfinite(value)) throw notANumber(given, units);
        return value;
    }

    /** A share typed in per cent ("5 %", "5") as a number: 0.05. */
    public static double percent(String text) {
        return number(text, "%", "per cent") / 100;
    }

    public static int whole(String text, int least, int most) {
        double v = number(text);
        if (v != Math.rint(v) || v < least || v > most)
            throw new Refusal("Type a whole number from " + least + " to " + most + ".");
        return (int) v;
    }

    /** Numbers with commas, semicolons or spaces between them. */
    public static List<Double> numbers(String text, String unit) {
        return Arrays.stream(text.strip().split("[;,\\s]+"))
                .filter(part -> !part.isEmpty() && !part.equalsIgnoreCase(unit))
                .map(part -> number(part, unit))
                .toList();
    }

    /**
     * Grams as a balance types them or a person does: "11.502 g", "+   11.502 g", "N  11,502g", "11502 mg". Empty when there is no
     * number in it; refused when the unit is another.
     */
    public static Optional<Double> grams(String text) {
        Matcher m = Pattern.compile("([+\\-−]?)\\s*(\\d[\\d ]*(?:[.,]\\d*)?|[.,]\\d+)\\s*([A-Za-zµ°%/]*)")
                .matcher(text);
        if (!m.find()) return Optional.empty();
        String unit = m.group(3).toLowerCase(Locale.ROOT);
        double scale = switch (unit) {
            case "", "g" -> 1;
            case "mg" -> 0.001;
            case "kg" -> 1000;
            default -> throw new Refusal("The balance sent “" + text.strip() + "”; set it to grams.");
        };
        String digits = m.group(2).replace(" ", "").replace(',', '.');
        double value = Double.parseDouble(digits) * scale;
        return Optional.of(m.group(1).isEmpty() || m.group(1).equals("+") ? value : -value);
    }

    private static Refusal notANumber(String given, String... units) {
        return new Refusal("“" + given + "” is not a number; write it like 0.108" + example(units) + ".");
    }

    private static String example(String... units) {
        return units.length > 0 ? " (" + units[0] + ")" : "";
    }
}
