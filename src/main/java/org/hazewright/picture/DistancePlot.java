package org.hazewright.picture;

import java.awt.BasicStroke;
import java.awt.Color;
import java.awt.Graphics2D;
import java.awt.Shape;
import java.awt.geom.Line2D;
import java.awt.geom.Rectangle2D;
import java.util.List;
import java.util.function.ToDoubleFunction;
import org.hazewright.optics.Figures;
import org.hazewright.reading.Foreseen;
import org.hazewright.reading.Quantity;
import org.hazewright.reading.Reading;

/** Readings over distance in mm, with diffusion's line; reflectance on a scale of powers of ten. */
final class DistancePlot implements ReadingPicture.Panel {
    private final Foreseen foreseen;
    private final Quantity quantity;
    private final boolean atEvery;
    private final boolean logarithmic;
    private final List<Reading> points;
    private final List<Reading> line;

    DistancePlot(Foreseen foreseen, Quantity quantity, boolean atEvery) {
        this.foreseen = foreseen;
        this.quantity = quantity;
        this.atEvery = atEvery;
        this.logarithmic = quantity == Quantity.REFLECTANCE_PER_MM2;
        this.points = of(foreseen.readings());
        this.line = of(foreseen.line());
    }

    private List<Reading> of(List<Reading> all) {
        return all.stream()
                .filter(r -> r.quantity() == quantity && r.distanceMm() != null && r.value() != null)
                .filter(r -> !logarithmic || r.value() > 0)
                .toList();
    }

    @Override
    public void draw(Graphics2D g, Rectangle2D area) {
        PlotFrame frame = frame(area);
        String what = switch (quantity) {
            case PHASE_DEG -> "phase lag, °";
            case MODULATION -> "modulation";
            default -> "reflectance, /mm²";
        };
        String title = foreseen.setUp().title() + ": " + what;
        if (logarithmic) decades(g, frame, title);
        else frame.axes(g, title, true, "distance in mm");
        List<Double> nm = foreseen.setUp().wavelengthsNm();
        for (int w = 0; w < nm.size(); w++) {
            double here = nm.get(w);
            Color colour = Marks.of(w);
            curve(g, frame, line.stream().filter(r -> r.wavelengthNm() == here).toList(), colour);
            for (Reading r : points) if (r.wavelengthNm() == here) mark(g, frame, r, colour);
            if (atEvery) continue;
            g.setColor(colour);
            // above the falling curve of a reflectance, below a rising one
            PlotFrame.right(g, Figures.plain(here) + " nm", area.getMaxX() - 8, keyY(area, w, nm.size()));
        }
        if (points.stream().anyMatch(r -> !r.insideRange()))
            Marks.doubtful(g, area, quantity == Quantity.PHASE_DEG ? 0 : nm.size());
    }

    private double keyY(Rectangle2D area, int w, int count) {
        return quantity == Quantity.PHASE_DEG ? area.getMaxY() - 10 - 14 * (count - 1 - w) : area.getY() + 18 + 14 * w;
    }

    private PlotFrame frame(Rectangle2D area) {
        double most = foreseen.setUp().distancesMm().stream()
                .mapToDouble(x -> x)
                .max()
                .orElse(1);
        double low = Double.MAX_VALUE;
        double high = -Double.MAX_VALUE;
        for (List<Reading> some : List.of(points, line))
            for (Reading r : some) {
                low = Math.min(low, r.value());
                high = Math.max(high, r.value());
            }
        if (low > high) return new PlotFrame(area, 0, 1.15 * most, logarithmic ? -6 : 0, logarithmic ? 0 : 1);
        if (logarithmic)
            return new PlotFrame(area, 0, 1.15 * most, Math.floor(Math.log10(low)), Math.ceil(Math.log10(high) + 0.05));
        if (quantity == Quantity.MODULATION)
            return new PlotFrame(area, 0, 1.15 * most, Math.max(0, 1 - 1.2 * (1 - low)), 1);
        return new PlotFrame(area, 0, 1.15 * most, 0, 1.08 * high);
    }

    private double y(PlotFrame frame, double value) {
        return frame.py(logarithmic ? Math.log10(value) : value);
    }

    /** Grid lines at powers of ten; the x axis is the frame's own. */
    private static void decades(Graphics2D g, PlotFrame frame, String title) {
        new PlotFrame(frame.area(), frame.x0(), frame.x1(), 0, 1).xAxis(g, title, "distance in mm");
        for (int d = (int) frame.y0(); d <= frame.y1(); d++) {
            g.setColor(Canvas.colour(Palette.RULE));
            g.draw(new Line2D.Double(
                    frame.area().getX(), frame.py(d), frame.area().getMaxX(), frame.py(d)));
            g.setColor(Canvas.colour(Palette.QUIET));
            PlotFrame.right(g, "1e" + d, frame.area().getX() - 6, frame.py(d) + 4);
        }
        g.setColor(Canvas.colour(Palette.TRACK));
        g.draw(frame.area());
    }

    private void curve(Graphics2D g, PlotFrame frame, List<Reading> along, Color colour) {
        Shape before = g.getClip();
        g.clip(frame.area());
        g.setColor(colour);
        for (int i = 1; i < along.size(); i++) {
            Reading a = along.get(i - 1);
            Reading b = along.get(i);
            Marks.dashed(g, !(a.insideRange() && b.insideRange()), 1.6f);
            g.draw(new Line2D.Double(
                    frame.px(a.distanceMm()), y(frame, a.value()), frame.px(b.distanceMm()), y(frame, b.value())));
        }
        g.setStroke(new BasicStroke(1));
        g.setClip(before);
    }

    private void mark(Graphics2D g, PlotFrame frame, Reading r, Color colour) {
        double x = frame.px(r.distanceMm());
        if (r.u() != null) {
            ToDoubleFunction<Double> end = k -> {
                double v = r.value() + k * Marks.K95 * r.u();
                return y(frame, logarithmic ? Math.max(v, r.value() * 1e-3) : v);
            };
            Shape before = g.getClip();
            g.clip(frame.area());
            Marks.whisker(g, x, end.applyAsDouble(-1.0), end.applyAsDouble(1.0), colour);
            g.setClip(before);
        }
        Marks.point(g, x, y(frame, r.value()), colour, r.insideRange());
    }
}
