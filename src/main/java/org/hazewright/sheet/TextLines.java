package org.hazewright.sheet;

/**
 * How many lines a text takes in a cell of a given width, estimated from the average widths of a plain sans-serif type and a
 * little more: a workbook's merged cells do not grow by themselves. Where a wider type stands in, columns, whose unit is the
 * width of a digit, grow with it.
 */
final class TextLines {
    private TextLines() {}

    /** Lines of {@code text} at {@code points} in {@code widthPt} points, at least 1. */
    static int count(String text, double points, boolean bold, double widthPt) {
        double room = Math.max(1, (widthPt - 6) / points / (bold ? 1.09 : 1));
        int lines = 0;
        for (String paragraph : text.split("\n", -1)) {
            lines++;
            double used = 0;
            for (String word : paragraph.split(" ")) {
                double width = width(word);
                if (used > 0 && used + SPACE + width > room) {
                    lines++;
                    used = 0;
                }
                used += (used > 0 ? SPACE : 0) + width;
                while (used > room) { // a word longer than the line is broken
                    lines++;
                    used -= room;
                }
            }
        }
        return lines;
    }

    private static final double SPACE = 0.29;

    /** In em. */
    private static double width(String word) {
        return word.codePoints().mapToDouble(TextLines::width).sum();
    }

    /** Advance widths of the common sans-serif metrics, rounded up a little. */
    private static double width(int c) {
        if ("iljI'|′".indexOf(c) >= 0) return 0.25;
        if ("tf.,:;!/[]".indexOf(c) >= 0) return 0.29;
        if ("r()-".indexOf(c) >= 0) return 0.35;
        if ("ckszvxyJ".indexOf(c) >= 0) return 0.52;
        if ("mMW%@→—".indexOf(c) >= 0) return 0.92;
        if (c == 'w') return 0.74;
        if (Character.isUpperCase(c)) return 0.72;
        return 0.57;
    }
}
