package org.hazewright.desk.shelf;

import java.util.ArrayList;
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
        double right = w - 1.4 * em;
        double top = 0.7 * em;
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
        List<Label> labels = new ArrayList<>();
        String[] ink = {palette.teal(), palette.ink(), palette.amberText(), palette.brick(), palette.slate()};
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
            labels.add(new Label(Words.shortName(l.ingredient()), colour, x, y, count));
        }
        pen.unclip();
        List<double[]> taken = new ArrayList<>();
        for (Label label : labels) name(pen, label, labels, left, right, top, bottom, taken);
    }

    /** A line's name, waiting for a place. */
    private record Label(String name, String colour, double[] x, double[] y, int count) {

        /** How many of the line's points, and middles between them, lie in a box. */
        long within(double[] box) {
            long in = 0;
            for (int k = 0; k < count; k++) {
                if (inside(x[k], y[k], box)) in++;
                if (k > 0 && inside((x[k - 1] + x[k]) / 2, (y[k - 1] + y[k]) / 2, box)) in++;
            }
            return in;
        }

        private static boolean inside(double x, double y, double[] box) {
            return x > box[0] && x < box[2] && y > box[1] && y < box[3];
        }
    }

    /** Writes a name by its line where no other name stands and the fewest lines pass; left out when there is no such place. */
    private void name(
            Pen pen,
            Label l,
            List<Label> all,
            double left,
            double right,
            double top,
            double bottom,
            List<double[]> taken) {
        double size = 0.92 * em;
        double wide = pen.width(l.name(), size, false);
        double[] best = null;
        long fewest = Long.MAX_VALUE;
        for (double share = 0.04; share < 1 && fewest > 0; share += 0.04) {
            int at = (int) (l.count() * share);
            for (double back : new double[] {0, wide / 2, wide}) {
                for (double up : new double[] {-0.6 * em, 1.3 * em}) {
                    double nx = l.x()[at] - back;
                    double ny = l.y()[at] + up;
                    double[] box = {nx - 3, ny - 0.9 * em, nx + wide + 3, ny + 0.3 * em};
                    if (box[2] > right - 4 || box[1] < top + 1.9 * em || box[3] > bottom - 2 || box[0] < left + 2)
                        continue;
                    if (taken.stream().anyMatch(t -> box[0] < t[2] && t[0] < box[2] && box[1] < t[3] && t[1] < box[3]))
                        continue;
                    long passing = all.stream().mapToLong(o -> o.within(box)).sum();
                    if (passing >= fewest) continue;
                    fewest = passing;
                    best = box;
                }
            }
        }
        if (best == null) return;
        taken.add(best);
        if (fewest > 0)
            pen.box(best[0], best[1], best[2] - best[0], best[3] - best[1], 3, palette.paper(), 0.8, null, 0);
        pen.text(l.name(), best[0] + 3, best[3] - 0.3 * em, size, false, l.colour(), Pen.Align.LEFT);
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
        if (d >= -3 && d <= 5) return d >= 0 ? Long.toString((long) Math.pow(10, d)) : "0." + "0".repeat(-d - 1) + "1";
        return "1e" + d;
    }
}
