package org.hazewright.picture;

import java.awt.BasicStroke;
import java.awt.Font;
import java.awt.Graphics2D;
import java.awt.geom.Line2D;
import java.awt.geom.Path2D;
import java.awt.geom.Rectangle2D;
import org.hazewright.optics.Figures;

/**
 * One plot of a picture: a rectangle on the paper, a linear range along each axis, and round numbers beside them. y from 0 unless
 * said.
 */
record PlotFrame(Rectangle2D area, double x0, double x1, double y0, double y1) {

    double px(double x) {
        return area.getX() + (x - x0) / (x1 - x0) * area.getWidth();
    }

    double py(double y) {
        return area.getMaxY() - (y - y0) / (y1 - y0) * area.getHeight();
    }

    /** Grid, numbers and the title; {@code xNumbers} when this is the lowest of several on one axis. */
    void axes(Graphics2D g, String title, boolean xNumbers, String xUnit) {
        yGrid(g);
        xTicks(g, xNumbers, xUnit);
        outline(g, title);
    }

    /** Without the grid and numbers of y, for whoever draws his own. */
    void xAxis(Graphics2D g, String title, String xUnit) {
        xTicks(g, true, xUnit);
        outline(g, title);
    }

    /** Without the numbers of x. */
    void yAxis(Graphics2D g, String title) {
        yGrid(g);
        outline(g, title);
    }

    private void yGrid(Graphics2D g) {
        g.setFont(g.getFont().deriveFont(Font.PLAIN, 11f));
        double step = RoundStep.over(y1 - y0);
        int decimals = Math.max(
                0, java.math.BigDecimal.valueOf(step).stripTrailingZeros().scale());
        for (double y = Math.ceil(y0 / step - 1e-9) * step; y <= y1 * (1 + 1e-9); y += step) {
            g.setColor(Canvas.colour(Palette.RULE));
            g.draw(new Line2D.Double(area.getX(), py(y), area.getMaxX(), py(y)));
            g.setColor(Canvas.colour(Palette.QUIET));
            right(g, Figures.fixed(y, decimals), area.getX() - 6, py(y) + 4);
        }
    }

    private void xTicks(Graphics2D g, boolean xNumbers, String xUnit) {
        g.setFont(g.getFont().deriveFont(Font.PLAIN, 11f));
        double xStep = RoundStep.over(x1 - x0);
        for (double x = Math.ceil(x0 / xStep - 1e-9) * xStep; x <= x1 * (1 + 1e-9); x += xStep) {
            g.setColor(Canvas.colour(Palette.RULE));
            g.draw(new Line2D.Double(px(x), area.getMaxY(), px(x), area.getMaxY() + 4));
            if (!xNumbers) continue;
            g.setColor(Canvas.colour(Palette.QUIET));
            centre(g, Figures.plain(x), px(x), area.getMaxY() + 18);
        }
        if (xNumbers) right(g, xUnit, area.getMaxX(), area.getMaxY() + 34);
    }

    private void outline(Graphics2D g, String title) {
        g.setColor(Canvas.colour(Palette.TRACK));
        g.draw(area);
        g.setColor(Canvas.colour(Palette.INK));
        g.setFont(g.getFont().deriveFont(Font.BOLD, 12f));
        g.drawString(title, (float) area.getX(), (float) area.getY() - 7);
        g.setFont(g.getFont().deriveFont(Font.PLAIN, 11f));
    }

    /** A curve through the points, kept inside the frame. */
    void line(Graphics2D g, double[] x, double[] y, String colour, float width) {
        Path2D path = new Path2D.Double();
        for (int i = 0; i < x.length; i++) {
            if (i == 0) path.moveTo(px(x[i]), py(y[i]));
            else path.lineTo(px(x[i]), py(y[i]));
        }
        inside(g, () -> {
            g.setColor(Canvas.colour(colour));
            g.setStroke(new BasicStroke(width, BasicStroke.CAP_ROUND, BasicStroke.JOIN_ROUND));
            g.draw(path);
            g.setStroke(new BasicStroke(1));
        });
    }

    /** The area between two curves. */
    void band(Graphics2D g, double[] x, double[] low, double[] high, java.awt.Color colour) {
        Path2D path = new Path2D.Double();
        for (int i = 0; i < x.length; i++) {
            if (i == 0) path.moveTo(px(x[i]), py(high[i]));
            else path.lineTo(px(x[i]), py(high[i]));
        }
        for (int i = x.length - 1; i >= 0; i--) path.lineTo(px(x[i]), py(low[i]));
        path.closePath();
        inside(g, () -> {
            g.setColor(colour);
            g.fill(path);
        });
    }

    private void inside(Graphics2D g, Runnable strokes) {
        java.awt.Shape before = g.getClip();
        g.clip(area);
        strokes.run();
        g.setClip(before);
    }

    static void right(Graphics2D g, String text, double x, double y) {
        g.drawString(text, (float) (x - g.getFontMetrics().stringWidth(text)), (float) y);
    }

    static void centre(Graphics2D g, String text, double x, double y) {
        g.drawString(text, (float) (x - g.getFontMetrics().stringWidth(text) / 2.0), (float) y);
    }
}
