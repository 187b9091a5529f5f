package org.hazewright.cli;

import java.io.PrintWriter;
import java.util.ArrayList;
import java.util.List;

/** Columns of text that line up in a terminal: words to the left, numbers to the right. */
final class TextTable {
    private final String indent;
    private final boolean[] right;
    private final List<String[]> rows = new ArrayList<>();

    /** {@code align} has one letter a column: l or r. */
    TextTable(String indent, String align) {
        this.indent = indent;
        right = new boolean[align.length()];
        for (int i = 0; i < right.length; i++) right[i] = align.charAt(i) == 'r';
    }

    TextTable row(String... cells) {
        rows.add(cells);
        return this;
    }

    void print(PrintWriter out) {
        int[] width = new int[right.length];
        for (String[] row : rows) for (int i = 0; i < row.length; i++) width[i] = Math.max(width[i], length(row[i]));
        for (String[] row : rows) {
            StringBuilder line = new StringBuilder(indent);
            for (int i = 0; i < row.length; i++) {
                String pad = " ".repeat(width[i] - length(row[i]));
                if (i > 0) line.append("  ");
                line.append(right[i] ? pad + row[i] : row[i] + pad);
            }
            out.println(line.toString().stripTrailing());
        }
    }

    private static int length(String text) {
        return text.codePointCount(0, text.length());
    }
}
