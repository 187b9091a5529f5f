package org.hazewright.sheet;

import org.apache.poi.ss.usermodel.HorizontalAlignment;
import org.hazewright.picture.Palette;

/**
 * How a cell looks: type, colours, number format, rules, and whether a person may type into it.
 *
 * @param points size of the type
 * @param ink colour of the type, RGB hex
 * @param ground colour behind it, RGB hex, or empty
 * @param indented set in from the left
 * @param format number format, or empty for General
 * @param ruled a thin line below
 * @param open not protected: a cell to fill in, drawn with a box
 */
record Face(
        double points,
        boolean bold,
        boolean mono,
        String ink,
        String ground,
        HorizontalAlignment align,
        boolean wrapped,
        boolean indented,
        String format,
        boolean ruled,
        boolean open) {

    static final Face TEXT =
            new Face(9, false, false, Palette.INK, "", HorizontalAlignment.GENERAL, false, false, "", false, false);
    static final Face QUIET = TEXT.ink(Palette.QUIET);
    static final Face SMALL = QUIET.points(8);
    static final Face TITLE = TEXT.points(16).bolder();
    static final Face SECTION = TEXT.points(10).bolder();
    static final Face HEAD = QUIET.points(8).rule();
    static final Face WRAPPED = TEXT.wrap();

    Face points(double size) {
        return new Face(size, bold, mono, ink, ground, align, wrapped, indented, format, ruled, open);
    }

    Face bolder() {
        return new Face(points, true, mono, ink, ground, align, wrapped, indented, format, ruled, open);
    }

    Face typewriter() {
        return new Face(points, bold, true, ink, ground, align, wrapped, indented, format, ruled, open);
    }

    Face ink(String hex) {
        return new Face(points, bold, mono, hex, ground, align, wrapped, indented, format, ruled, open);
    }

    Face ground(String hex) {
        return new Face(points, bold, mono, ink, hex, align, wrapped, indented, format, ruled, open);
    }

    Face right() {
        return new Face(
                points, bold, mono, ink, ground, HorizontalAlignment.RIGHT, wrapped, indented, format, ruled, open);
    }

    Face left() {
        return new Face(
                points, bold, mono, ink, ground, HorizontalAlignment.LEFT, wrapped, indented, format, ruled, open);
    }

    Face centred() {
        return new Face(
                points, bold, mono, ink, ground, HorizontalAlignment.CENTER, wrapped, indented, format, ruled, open);
    }

    Face wrap() {
        return new Face(points, bold, mono, ink, ground, align, true, indented, format, ruled, open);
    }

    /** Set in a little from the left, to stand clear of figures before it. */
    Face indent() {
        return new Face(points, bold, mono, ink, ground, HorizontalAlignment.LEFT, wrapped, true, format, ruled, open);
    }

    Face format(String code) {
        return new Face(points, bold, mono, ink, ground, align, wrapped, indented, code, ruled, open);
    }

    /** A number with so many digits after the point. */
    Face decimals(int count) {
        return format(numberFormat(count));
    }

    static String numberFormat(int decimals) {
        return decimals == 0 ? "0" : "0." + "0".repeat(decimals);
    }

    Face rule() {
        return new Face(points, bold, mono, ink, ground, align, wrapped, indented, format, true, open);
    }

    Face fillIn() {
        return new Face(points, bold, mono, ink, Palette.MILK, align, wrapped, indented, format, ruled, true);
    }
}
