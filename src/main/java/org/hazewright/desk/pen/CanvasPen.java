package org.hazewright.desk.pen;

import java.util.HashMap;
import java.util.Map;
import javafx.scene.canvas.GraphicsContext;
import javafx.scene.paint.Color;
import javafx.scene.shape.StrokeLineCap;
import javafx.scene.shape.StrokeLineJoin;
import javafx.scene.text.Font;
import javafx.scene.text.FontWeight;
import javafx.scene.text.Text;
import javafx.scene.text.TextAlignment;

/** Draws on the screen. */
public final class CanvasPen implements Pen {
    private static final Map<String, Font> FONTS = new HashMap<>();

    private final GraphicsContext g;

    public CanvasPen(GraphicsContext g) {
        this.g = g;
        g.setLineJoin(StrokeLineJoin.ROUND);
    }

    static Font font(double size, boolean bold) {
        return FONTS.computeIfAbsent(
                size + (bold ? " bold" : ""),
                key -> Font.font(Font.getDefault().getFamily(), bold ? FontWeight.BOLD : FontWeight.NORMAL, size));
    }

    private static Color colour(String hex, double opacity) {
        return Color.web(hex, opacity);
    }

    @Override
    public void area(double[] x, double[] y, int count, String colour, double opacity) {
        g.setFill(colour(colour, opacity));
        g.fillPolygon(x, y, count);
    }

    @Override
    public void line(double[] x, double[] y, int count, String colour, double width, double... dash) {
        g.setStroke(colour(colour, 1));
        g.setLineWidth(width);
        g.setLineDashes(dash);
        g.setLineCap(StrokeLineCap.BUTT);
        g.strokePolyline(x, y, count);
        g.setLineDashes((double[]) null);
    }

    @Override
    public void box(
            double x,
            double y,
            double w,
            double h,
            double radius,
            String fill,
            double opacity,
            String stroke,
            double width) {
        if (fill != null) {
            g.setFill(colour(fill, opacity));
            g.fillRoundRect(x, y, w, h, 2 * radius, 2 * radius);
        }
        if (stroke != null) {
            g.setStroke(colour(stroke, 1));
            g.setLineWidth(width);
            g.strokeRoundRect(x, y, w, h, 2 * radius, 2 * radius);
        }
    }

    @Override
    public void disc(double x, double y, double radius, String colour) {
        g.setFill(colour(colour, 1));
        g.fillOval(x - radius, y - radius, 2 * radius, 2 * radius);
    }

    @Override
    public void text(String text, double x, double y, double size, boolean bold, String colour, Align align) {
        g.setFont(font(size, bold));
        g.setFill(colour(colour, 1));
        g.setTextAlign(
                switch (align) {
                    case LEFT -> TextAlignment.LEFT;
                    case CENTRE -> TextAlignment.CENTER;
                    case RIGHT -> TextAlignment.RIGHT;
                });
        g.fillText(text, x, y);
    }

    @Override
    public void clip(double x, double y, double w, double h) {
        // whole px: the toolkit clips to such a rectangle directly, to any other through a mask of the whole canvas
        double left = Math.rint(x);
        double top = Math.rint(y);
        g.save();
        g.beginPath();
        g.rect(left, top, Math.rint(x + w) - left, Math.rint(y + h) - top);
        g.clip();
    }

    @Override
    public void unclip() {
        g.restore();
    }

    @Override
    public double width(String text, double size, boolean bold) {
        Text measure = new Text(text);
        measure.setFont(font(size, bold));
        return measure.getLayoutBounds().getWidth();
    }
}
