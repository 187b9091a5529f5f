package org.hazewright.picture;

import java.awt.BasicStroke;
import java.awt.Color;
import java.awt.Graphics2D;
import java.awt.geom.Ellipse2D;
import java.awt.geom.Line2D;

/** Marks of readings on a plot: filled where the model holds, hollow and brick where it is doubtful; whiskers for 95 %. */
final class Marks {
    /** Coverage factor of a 95 % interval of a normal quantity (JCGM 100:2008, table G.1). */
    static final double K95 = 1.96;

    private Marks() {}

    static Color of(int wavelength) {
        return Canvas.colour(Palette.ofWavelength(wavelength));
    }

    static void point(Graphics2D g, double x, double y, Color colour, boolean trusted) {
        Ellipse2D dot = new Ellipse2D.Double(x - 4, y - 4, 8, 8);
        g.setColor(trusted ? colour : Canvas.colour(Palette.MILK));
        g.fill(dot);
        g.setColor(trusted ? colour : Canvas.colour(Palette.BRICK));
        g.setStroke(new BasicStroke(1.6f));
        g.draw(dot);
        g.setStroke(new BasicStroke(1));
    }

    static void whisker(Graphics2D g, double x, double low, double high, Color colour) {
        g.setColor(colour);
        g.setStroke(new BasicStroke(1.2f));
        g.draw(new Line2D.Double(x, low, x, high));
        for (double y : new double[] {low, high}) g.draw(new Line2D.Double(x - 3, y, x + 3, y));
        g.setStroke(new BasicStroke(1));
    }

    static void dashed(Graphics2D g, boolean dashes, float width) {
        g.setStroke(
                dashes
                        ? new BasicStroke(width, BasicStroke.CAP_BUTT, BasicStroke.JOIN_ROUND, 1, new float[] {4, 4}, 0)
                        : new BasicStroke(width, BasicStroke.CAP_ROUND, BasicStroke.JOIN_ROUND));
    }

    /** The word "doubtful" at the upper right of a plot that holds a doubtful reading, below {@code keys} lines. */
    static void doubtful(Graphics2D g, java.awt.geom.Rectangle2D area, int keys) {
        g.setColor(Canvas.colour(Palette.BRICK));
        PlotFrame.right(g, "doubtful", area.getMaxX() - 8, area.getY() + 18 + 14 * keys);
    }
}
