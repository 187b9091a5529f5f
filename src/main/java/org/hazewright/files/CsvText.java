package org.hazewright.files;

import java.math.BigDecimal;
import java.math.MathContext;
import java.util.Collection;

/**
 * A table as CSV text, row by row: commas, quotes where they are needed, numbers with a decimal point and twelve digits, days as
 * 2026-03-02 (RFC 4180, with line feeds).
 *
 * <p>A text that a spreadsheet program would run as a formula begins with an apostrophe; numbers are not texts and keep their sign. Lines
 * within a cell are parted by "; ", so that a row is a line.
 */
public final class CsvText {
    private final StringBuilder out = new StringBuilder();

    /** Adds a row of texts, numbers and dates; null is an empty cell. */
    public CsvText row(Collection<?> cells) {
        boolean first = true;
        for (Object cell : cells) {
            if (!first) out.append(',');
            first = false;
            if (cell instanceof Double d) out.append(number(d));
            else if (cell instanceof String s) out.append(quoted(s));
            else if (cell != null) out.append(cell);
        }
        out.append('\n');
        return this;
    }

    /** Twelve digits, far finer than anything weighed or measured; whole numbers without a point. */
    private static String number(double d) {
        double rounded = new BigDecimal(d).round(new MathContext(12)).doubleValue();
        return rounded == Math.rint(rounded) && Math.abs(rounded) < 1e12
                ? Long.toString((long) rounded)
                : Double.toString(rounded);
    }

    private static String quoted(String s) {
        String line = s.strip().replaceAll("\\s*[\n\r]+\\s*", "; ").replaceAll("\\p{Cntrl}", " ");
        String safe = !line.isEmpty() && "=+-@|%＝＋－＠".indexOf(line.charAt(0)) >= 0 ? "'" + line : line;
        return safe.matches("[^,;\"]*") ? safe : '"' + safe.replace("\"", "\"\"") + '"';
    }

    @Override
    public String toString() {
        return out.toString();
    }
}
