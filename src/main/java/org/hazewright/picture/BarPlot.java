package org.hazewright.picture;

import java.awt.Color;
import java.awt.Graphics2D;
import java.awt.geom.Line2D;
import java.awt.geom.Rectangle2D;
import java.util.ArrayList;
import java.util.List;
import org.hazewright.optics.Figures;
import org.hazewright.reading.Foreseen;
import org.hazewright.reading.Quantity;
import org.hazewright.reading.Reading;
import org.hazewright.reading.SetUp;

/** Shares of light, or a saturation, as bars, each with its value and 95 % whisker. */
final class BarPlot implements ReadingPicture.Panel {
    private final Foreseen foreseen;
    private final boolean atEvery;
    private final double scale;
    private final List<Reading> bars = new ArrayList<>();

    BarPlot(Foreseen foreseen, boolean atEvery) {
        this.foreseen = foreseen;
        this.atEvery = atEvery;
        this.scale = foreseen.setUp().kind() == SetUp.Kind.OXIMETER ? 100 : 1;
        List<Quantity> shown = switch (foreseen.setUp().kind()) {
            case SLAB -> List.of(Quantity.TOTAL_REFLECTANCE, Quantity.TOTAL_TRANSMITTANCE);
            case COLLIMATED -> List.of(Quantity.UNSCATTERED_TRANSMITTANCE);
            default -> List.of(Quantity.SATURATION);
        };
        for (Quantity q : shown)
            for (Reading r : foreseen.readings()) if (r.quantity() == q && r.value() != null) bars.add(r);
    }

    @Override
    public void draw(Graphics2D g, Rectangle2D area) {
        double most = scale;
        double least = 0;
        for (Reading r : bars) {
            most = Math.max(most, 1.05 * scale * r.value());
            least = Math.min(least, 1.05 * scale * r.value());
        }
        PlotFrame frame = new PlotFrame(area, 0, Math.max(1, bars.size()), least, most);
        frame.yAxis(g, foreseen.setUp().title() + ": " + what());
        for (int i = 0; i < bars.size(); i++) bar(g, frame, i, bars.get(i));
        if (bars.stream().anyMatch(r -> !r.insideRange())) Marks.doubtful(g, area, 0);
    }

    private String what() {
        return switch (foreseen.setUp().kind()) {
            case SLAB -> "share of the light";
            case COLLIMATED -> "unscattered share";
            default -> "saturation, %";
        };
    }

    private void bar(Graphics2D g, PlotFrame frame, int i, Reading r) {
        Color colour = r.wavelengthNm() == null
                ? Marks.of(0)
                : Marks.of(foreseen.setUp().wavelengthsNm().indexOf(r.wavelengthNm()));
        double half = Math.min(0.3, 26 / (frame.px(1) - frame.px(0)));
        double left = frame.px(i + 0.5 - half);
        double right = frame.px(i + 0.5 + half);
        double y = frame.py(scale * r.value());
        double zero = frame.py(0);
        Rectangle2D body = new Rectangle2D.Double(left, Math.min(y, zero), right - left, Math.abs(zero - y));
        g.setColor(r.insideRange() ? colour : Canvas.colour(Palette.MILK));
        g.fill(body);
        g.setColor(r.insideRange() ? colour : Canvas.colour(Palette.BRICK));
        g.draw(body);
        double middle = frame.px(i + 0.5);
        double above = y;
        if (r.u() != null && r.u() > 0) {
            above = frame.py(Math.min(frame.y1(), scale * (r.value() + Marks.K95 * r.u())));
            double below = frame.py(Math.max(frame.y0(), scale * (r.value() - Marks.K95 * r.u())));
            Marks.whisker(g, middle, below, above, Canvas.colour(Palette.INK));
        }
        g.setColor(Canvas.colour(Palette.INK));
        String value = scale == 100
                ? Figures.fixed(100 * r.value(), 1) + " %"
                : r.value() != 0 && Math.abs(r.value()) < 5e-4
                        ? Figures.significant(r.value(), 2)
                        : Figures.fixed(r.value(), 3);
        double over = above - 6 < frame.area().getY() + 10 ? y + 16 : above - 6;
        if (over > above) g.setColor(Canvas.colour(r.insideRange() ? Palette.MILK : Palette.INK));
        PlotFrame.centre(g, value, middle, over);
        g.setColor(Canvas.colour(Palette.QUIET));
        PlotFrame.centre(g, first(r), middle, frame.area().getMaxY() + 16);
        if (r.wavelengthNm() != null && !atEvery)
            PlotFrame.centre(
                    g,
                    Figures.plain(r.wavelengthNm()) + " nm",
                    middle,
                    frame.area().getMaxY() + 30);
        g.setColor(Canvas.colour(Palette.TRACK));
        g.draw(new Line2D.Double(frame.area().getX(), zero, frame.area().getMaxX(), zero));
    }

    private String first(Reading r) {
        if (foreseen.setUp().kind() == SetUp.Kind.OXIMETER)
            return String.join(
                            ", ",
                            foreseen.setUp().wavelengthsNm().stream()
                                    .map(Figures::plain)
                                    .toList()) + " nm";
        return switch (r.quantity()) {
            case TOTAL_REFLECTANCE -> "reflected";
            case TOTAL_TRANSMITTANCE -> "transmitted";
            default -> "unscattered";
        };
    }
}
