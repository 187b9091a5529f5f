package org.hazewright.sheet;

/**
 * Text from files and people, made fit for a cell.
 *
 * <p>Characters that a workbook cannot hold (control characters, lone surrogates) are dropped, and what is longer than a cell
 * holds is cut with an ellipsis. Text that starts with = + - @ or a tab would become a formula when somebody edits the cell or
 * carries it on as CSV; {@link #startsFormula} tells, and such a cell is marked as text.
 */
final class SafeText {
    /** Characters that one cell can hold (ECMA-376, SpreadsheetML). */
    static final int LONGEST = 32767;

    private SafeText() {}

    static String of(String text) {
        StringBuilder kept = new StringBuilder(text.length());
        text.codePoints()
                .map(c -> c == '\r' ? '\n' : c)
                .filter(c -> c == '\n' || c == '\t' || c >= 0x20 && c != 0x7f && !(c >= 0x80 && c < 0xa0))
                .filter(c -> !(c >= 0xd800 && c <= 0xdfff) && c != 0xfffe && c != 0xffff)
                .forEach(kept::appendCodePoint);
        if (kept.length() <= LONGEST) return kept.toString();
        int end = LONGEST - 1;
        if (Character.isHighSurrogate(kept.charAt(end - 1))) end--;
        return kept.substring(0, end) + "…";
    }

    static boolean startsFormula(String text) {
        String t = text.stripLeading();
        return text.startsWith("\t") || !t.isEmpty() && "=+-@".indexOf(t.charAt(0)) >= 0;
    }
}
