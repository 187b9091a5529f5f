package org.hazewright.sheet;

import org.apache.poi.xssf.usermodel.XSSFRichTextString;
import org.hazewright.picture.Palette;

/**
 * Where a prediction lands in its tolerance, drawn in letters: a bracket for the tolerance, a point for the prediction, an arrow
 * when it is off the track.
 *
 * <p>{@code ────[───●─┼─────]────}: {@value #LENGTH} characters of a typewriter face, brackets at ±1 half-width. A point inside
 * tolerance always stands between the brackets and one outside never does, however close to the edge.
 */
final class LandingGauge {
    static final int LENGTH = 21;
    private static final String TRACK = "────[─────┼─────]────";
    private static final int MIDDLE = 10;
    private static final int BRACKET = 6;

    private LandingGauge() {}

    /** Signed place of the point from the middle, −10 to 10; ±10 is an arrow. */
    static int place(double miss) {
        double size = Math.abs(miss);
        long place = size <= 1
                ? (long) Math.floor(5 * size + 0.5)
                : (long) Math.min(MIDDLE, BRACKET + 1 + Math.floor((size - 1) * 5));
        return (int) (miss < 0 ? -place : place);
    }

    static String text(double miss) {
        int place = place(miss);
        String sign = place == MIDDLE ? "►" : place == -MIDDLE ? "◄" : "●";
        int at = MIDDLE + place;
        return TRACK.substring(0, at) + sign + TRACK.substring(at + 1);
    }

    /** The same from the miss in a cell, as a spreadsheet computes it. */
    static String formula(String missCell) {
        String place = "IF(ABS(" + missCell + ")<=1,ROUND(5*" + missCell + ",0),SIGN(" + missCell + ")*MIN(" + MIDDLE
                + "," + (BRACKET + 1) + "+INT((ABS(" + missCell + ")-1)*5)))";
        String sign =
                "IF(" + missCell + ">=1.6,\"►\",IF(" + missCell + "<=-1.6,\"◄\",\"●\"))"; // place ±10 begins at 1.6
        return "REPLACE(\"" + TRACK + "\"," + (MIDDLE + 1) + "+" + place + ",1," + sign + ")";
    }

    /** Coloured: track faint, bracket amber, point teal or, outside, brick. */
    static XSSFRichTextString drawn(double miss, double points, Looks looks) {
        String text = text(miss);
        int at = MIDDLE + place(miss);
        XSSFRichTextString rich = new XSSFRichTextString(text);
        rich.applyFont(0, LENGTH, looks.font(points, false, true, Palette.TRACK));
        for (int bracket : new int[] {MIDDLE - BRACKET, MIDDLE + BRACKET})
            rich.applyFont(bracket, bracket + 1, looks.font(points, true, true, Palette.AMBER));
        rich.applyFont(at, at + 1, looks.font(points, true, true, Math.abs(miss) <= 1 ? Palette.TEAL : Palette.BRICK));
        return rich;
    }
}
