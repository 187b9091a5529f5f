package org.hazewright.desk.pen;

/** Draws in px from the upper left; colours are #rrggbb, opacity 0 to 1. */
public interface Pen {
    /** Where a text stands about its point. */
    enum Align {
        LEFT,
        CENTRE,
        RIGHT
    }

    /** A filled shape through points. */
    void area(double[] x, double[] y, int count, String colour, double opacity);

    /** A line through points; {@code dash} alternates on and off, empty for a whole line. */
    void line(double[] x, double[] y, int count, String colour, double width, double... dash);

    default void line(double x1, double y1, double x2, double y2, String colour, double width, double... dash) {
        line(new double[] {x1, x2}, new double[] {y1, y2}, 2, colour, width, dash);
    }

    /** A rectangle with round corners; {@code fill} or {@code stroke} may be null. */
    void box(
            double x,
            double y,
            double w,
            double h,
            double radius,
            String fill,
            double opacity,
            String stroke,
            double width);

    void disc(double x, double y, double radius, String colour);

    /** One line of text, its baseline at y. */
    void text(String text, double x, double y, double size, boolean bold, String colour, Align align);

    /** What follows is seen only inside a rectangle, until {@link #unclip}. */
    void clip(double x, double y, double w, double h);

    void unclip();

    /** Width of a text, px. */
    double width(String text, double size, boolean bold);
}
