package org.hazewright.desk.look;

import java.util.List;
import java.util.Locale;

/**
 * The colours of the window, as #rrggbb: milk and ink for what is there, amber for what is wanted, teal for what is predicted, brick for a
 * miss.
 *
 * <p>Text colours stand at 4.5:1 or more on milk, paper and wash; the colours of lines at 3:1 or more on milk and paper (WCAG 2.2, success
 * criteria 1.4.3 and 1.4.11). No colour means anything by itself.
 *
 * @param milk the ground
 * @param paper what is written on: plots, cards, fields
 * @param wash set back from the ground
 * @param line between things
 * @param ink letters
 * @param slate letters that stand back
 * @param amber lines of what is wanted
 * @param amberText letters of what is wanted
 * @param teal what is predicted, lines and letters
 * @param tealSoft its band
 * @param brick a miss, lines and letters
 * @param shares tints of the stacked shares, laid over paper
 */
public record Palette(
        boolean dark,
        String milk,
        String paper,
        String wash,
        String line,
        String ink,
        String slate,
        String amber,
        String amberText,
        String teal,
        String tealSoft,
        String brick,
        List<String> shares) {

    public static final Palette LIGHT = new Palette(
            false,
            "#f7f4eb",
            "#fffef8",
            "#efe9dd",
            "#e2dccb",
            "#1e2a3a",
            "#525b6a",
            "#b3741a",
            "#805000",
            "#0a6a68",
            "#bfe0da",
            "#a8362b",
            List.of("#efe9dd", "#e3dfd9", "#d9dcdd", "#e9dcc9", "#dde3d6", "#e6d8d8"));

    public static final Palette DARK = new Palette(
            true,
            "#141b26",
            "#1b2431",
            "#243040",
            "#344254",
            "#f1ede0",
            "#b0b8c4",
            "#dd9d33",
            "#e8b04c",
            "#4fc4bb",
            "#1f4f52",
            "#f08a7a",
            List.of("#2c3748", "#333a45", "#25404a", "#413a33", "#2f4038", "#43343a"));

    /** As looked-up colours of a style sheet. */
    public String css() {
        return String.format(
                Locale.ROOT,
                "-milk:%s;-paper:%s;-wash:%s;-line:%s;-ink:%s;-slate:%s;-amber:%s;-amber-text:%s;-teal:%s;-teal-soft:%s;"
                        + "-brick:%s;",
                milk,
                paper,
                wash,
                line,
                ink,
                slate,
                amber,
                amberText,
                teal,
                tealSoft,
                brick);
    }
}
