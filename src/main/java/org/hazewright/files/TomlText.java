package org.hazewright.files;

import java.math.BigDecimal;

/** Text of TOML values: what a person likes to read and a parser reads back to the same bits. */
final class TomlText {
    private TomlText() {}

    /** The shortest decimal that reads back as the same double; without an exponent from 1e-6 to 1e9. */
    static String number(double v) {
        if (!Double.isFinite(v)) throw new IllegalArgumentException("Not a finite number: " + v);
        double size = Math.abs(v);
        if (v != 0 && (size < 1e-6 || size >= 1e9)) return Double.toString(v).replace('E', 'e');
        String plain = new BigDecimal(Double.toString(v)).stripTrailingZeros().toPlainString();
        return plain.contains(".") ? plain : plain + ".0";
    }

    /** A basic string in double quotes. */
    static String text(String s) {
        StringBuilder out = new StringBuilder("\"");
        for (int i = 0; i < s.length(); i++) {
            char c = s.charAt(i);
            switch (c) {
                case '"' -> out.append("\\\"");
                case '\\' -> out.append("\\\\");
                case '\n' -> out.append("\\n");
                case '\t' -> out.append("\\t");
                case '\r' -> out.append("\\r");
                default -> {
                    if (c < 0x20 || c == 0x7F) out.append("\\u").append(hex(c));
                    else out.append(c);
                }
            }
        }
        return out.append('"').toString();
    }

    /** A comment that stays on its line. */
    static String comment(String s) {
        StringBuilder out = new StringBuilder("# ");
        s.chars().forEach(c -> out.append(Character.isISOControl(c) ? ' ' : (char) c));
        return out.toString();
    }

    private static String hex(char c) {
        String digits = Integer.toHexString(c);
        return "0".repeat(4 - digits.length()) + digits;
    }
}
