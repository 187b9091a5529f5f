package org.hazewright.desk.shelf;

import java.util.List;
import org.hazewright.desk.look.Palette;
import org.hazewright.desk.model.Curves;
import org.hazewright.desk.model.ShelfRoom;
import org.hazewright.desk.model.Words;
import org.hazewright.desk.pen.Pen;

/**
 * Spectra of several ingredients on one plot, per gram in a millilitre of phantom, cm²/g, over decades: lines told apart by their dashes and
 * by their names at the lines' ends.
 */
final class ComparePlot {
    private static final double[][] DASHES = {{}, {7, 4}, {2, 3}, {10, 3, 2, 3}, {14, 4}, {4, 4}};

    private final List<ShelfRoom.Line> lines;
    private final boolean scattering;
    private final Palette palette;
    private final double w;
    private final double h;
    private final double em;

    ComparePlot(List<ShelfRoom.Line> lines, boolean scattering, Palette palette, double w, double h, double em) {
        this.lines = lines;
        this.scattering = scattering;
        this.palette = palette;
        this.w = w;
        this.h = h;
        this.em = em;
    }

    private double[] values(ShelfRoom.Line line) {
        return scattering ? line.kappaMusp() : line.kappaA();
    }

    void draw(Pen pen) {
        double left = 4.2 * em;
        double right = w - 0.8 * em;
        double top = 0.3 * em;
        double bottom = h - 2.4 * em;
        double most = 0;
        double least = Double.POSITIVE_INFINITY;
        for (ShelfRoom.Line l : lines)
            for (double v : values(l))
                if (v > 0) {
                    most = Math.max(most, v);
                    least = Math.min(least, v);
                }
        pen.box(left, top, right - left, bottom - top, 0, palette.paper(), 1, palette.line(), 1.5);
        String title = scattering ? "reduced scattering µs′, cm²/g" : "absorption µa, cm²/g";
        pen.text(title, left + 0.8 * em, top + 1.4 * em, em, true, palette.ink(), Pen.Align.LEFT);
        wavelengths(pen, left, right, bottom);
        if (!(most > 0)) {
            String words = lines.isEmpty()
                    ? "Tick ingredients on the left to see them side by side."
                    : "None of these " + (scattering ? "scatters." : "absorbs.");
            pen.text(words, (left + right) / 2, (top + bottom) / 2, em, false, palette.slate(), Pen.Align.CENTRE);
            return;
        }
        double high = Math.ceil(Math.log10(most) + 0.05);
        double low = Math.max(Math.floor(Math.log10(least)), high - 6);
        for (double decade = low; decade <= high; decade++) {
            double y = bottom - (decade - low) / (high - low) * (bottom - top);
            if (decade > low && decade < high) pen.line(left, y, right, y, palette.wash(), 1);
            pen.text(power(decade), left - 0.5 * em, y + 0.32 * em, 0.92 * em, false, palette.slate(), Pen.Align.RIGHT);
        }
        pen.clip(left, top, right - left, bottom - top);
        String[] ink = {palette.teal(), palette.ink(), palette.amber(), palette.brick(), palette.slate()};
        for (int n = 0; n < lines.size(); n++) {
            ShelfRoom.Line l = lines.get(n);
            double[] v = values(l);
            double[] x = new double[v.length];
            double[] y = new double[v.length];
            int count = 0;
            for (int k = 0; k < v.length; k++) {
                if (!(v[k] > 0)) continue;
                x[count] = left + (l.nm()[k] - Curves.FROM_NM) / (Curves.TO_NM - Curves.FROM_NM) * (right - left);
                y[count++] = bottom - (Math.max(low - 1, Math.log10(v[k])) - low) / (high - low) * (bottom - top);
            }
            if (count < 2) continue;
            String colour = ink[n % ink.length];
            pen.line(x, y, count, colour, 0.15 * em, DASHES[n % DASHES.length]);
            int at = (int) (count * (0.12 + 0.16 * (n % 5)));
            String name = Words.shortName(l.ingredient());
            double wide = pen.width(name, 0.92 * em, false);
            double nx = Math.min(right - wide - 0.4 * em, x[at]);
            double ny = Math.max(top + 3 * em, y[at] - 0.5 * em);
            pen.box(nx - 3, ny - 0.9 * em, wide + 6, 1.2 * em, 3, palette.paper(), 0.85, null, 0);
            pen.text(name, nx, ny, 0.92 * em, false, colour, Pen.Align.LEFT);
        }
        pen.unclip();
    }

    private void wavelengths(Pen pen, double left, double right, double bottom) {
        for (int nm = 400; nm <= 1100; nm += 100) {
            double x = left + (nm - Curves.FROM_NM) / (Curves.TO_NM - Curves.FROM_NM) * (right - left);
            pen.text(Integer.toString(nm), x, bottom + 1.15 * em, 0.92 * em, false, palette.slate(), Pen.Align.CENTRE);
        }
        pen.text("nm", right, bottom + 2.2 * em, 0.92 * em, false, palette.slate(), Pen.Align.RIGHT);
    }

    private static String power(double decade) {
        int d = (int) decade;
        if (d >= -3 && d <= 4) return d >= 0 ? Long.toString((long) Math.pow(10, d)) : "0." + "0".repeat(-d - 1) + "1";
        return "1e" + d;
    }
}
