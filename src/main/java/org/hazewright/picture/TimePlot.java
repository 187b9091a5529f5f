package org.hazewright.picture;

import java.awt.Graphics2D;
import java.awt.geom.Rectangle2D;
import java.util.ArrayList;
import java.util.List;
import org.hazewright.optics.Figures;
import org.hazewright.reading.Foreseen;
import org.hazewright.reading.Reading;

/** Curves of arrival times in ps, each with its 95 % band, scaled to the highest. */
final class TimePlot implements ReadingPicture.Panel {
    /** Times are shown until all curves are below this share of their peak. */
    private static final double END = 0.002;

    private final Foreseen foreseen;
    private final boolean atEvery;
    private final List<Reading> curves;

    TimePlot(Foreseen foreseen, boolean atEvery) {
        this.foreseen = foreseen;
        this.atEvery = atEvery;
        this.curves =
                foreseen.readings().stream().filter(r -> r.curve() != null).toList();
    }

    @Override
    public void draw(Graphics2D g, Rectangle2D area) {
        double top = 0;
        double end = 1;
        double from = 0;
        for (Reading r : curves) {
            Reading.Curve c = r.curve();
            double peak = 0;
            for (double y : c.y()) peak = Math.max(peak, y);
            top = Math.max(top, peak);
            from = Math.min(c.x()[0], from);
            for (int i = 0; i < c.x().length; i++) if (c.y()[i] > END * peak) end = Math.max(end, c.x()[i]);
        }
        String unit = curves.isEmpty() ? "" : curves.get(0).curve().yUnit();
        String written = unit.equals("counts") ? ", counts in a step" : ", /(mm² ps)";
        // beside a scale of tiny numbers a share of the peak is easier to read
        boolean share = top > 0 && top < 0.1;
        double scale = share ? 1 / top : 1;
        PlotFrame frame = new PlotFrame(area, from, end, 0, top > 0 ? 1.08 * top * scale : 1);
        String title = foreseen.setUp().title() + ": " + (share ? "share of the highest peak" : "arrivals" + written);
        frame.axes(g, title, true, "time in ps");
        List<Double> nm = foreseen.setUp().wavelengthsNm();
        int place = 0;
        for (Reading r : curves) {
            int w = nm.indexOf(r.wavelengthNm());
            draw(g, frame, r, Palette.ofWavelength(w), scale);
            g.setColor(Marks.of(w));
            String key = (atEvery ? "" : Figures.plain(r.wavelengthNm()) + " nm, ") + Figures.plain(r.distanceMm())
                    + " mm" + (r.insideRange() ? "" : ", doubtful");
            PlotFrame.right(g, key, area.getMaxX() - 8, area.getY() + 18 + 14 * place++);
        }
    }

    private static void draw(Graphics2D g, PlotFrame frame, Reading r, String colour, double scale) {
        Reading.Curve c = r.curve();
        double[] y = scaled(c.y(), scale);
        if (c.u() != null) {
            double[] low = new double[y.length];
            double[] high = new double[y.length];
            for (int i = 0; i < y.length; i++) {
                low[i] = Math.max(0, y[i] - Marks.K95 * scale * c.u()[i]);
                high[i] = y[i] + Marks.K95 * scale * c.u()[i];
            }
            frame.band(g, c.x(), low, high, Canvas.faint(colour, 50));
        }
        if (r.insideRange()) frame.line(g, c.x(), y, colour, 1.8f);
        else dashed(g, frame, c.x(), y, colour);
    }

    private static void dashed(Graphics2D g, PlotFrame frame, double[] x, double[] y, String colour) {
        List<double[]> pieces = new ArrayList<>();
        int step = Math.max(1, x.length / 120);
        for (int i = 0; i + step < x.length; i += 2 * step) pieces.add(new double[] {i, i + step});
        for (double[] p : pieces) {
            int a = (int) p[0];
            int n = (int) p[1] - a + 1;
            double[] px = new double[n];
            double[] py = new double[n];
            System.arraycopy(x, a, px, 0, n);
            System.arraycopy(y, a, py, 0, n);
            frame.line(g, px, py, colour, 1.8f);
        }
    }

    private static double[] scaled(double[] y, double scale) {
        double[] out = y.clone();
        for (int i = 0; i < out.length; i++) out[i] *= scale;
        return out;
    }
}
