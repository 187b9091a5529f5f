package org.hazewright.desk.spectra;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.hazewright.bench.Answer;
import org.hazewright.brief.Point;
import org.hazewright.desk.look.Palette;
import org.hazewright.desk.model.Curves;
import org.hazewright.desk.model.Draft;
import org.hazewright.desk.model.Row;
import org.hazewright.desk.model.Shown;
import org.hazewright.desk.model.Words;
import org.hazewright.desk.pen.Pen;
import org.hazewright.optics.Figures;

/**
 * Two plots on one wavelength axis, µa above and µs' below, in 1/cm: targets as boxes as tall as their tolerance, the prediction as a line in
 * its 95 % band, each ingredient's share below it, and hatching where no figures reach.
 *
 * <p>A picture of one moment; it says where things are, draws itself with any {@link Pen}, and knows no screen.
 */
public final class SpectraPlot {
    /** Half of the 95 % interval of a normal distribution, in standard uncertainties. */
    private static final double COVER_95 = 1.96;

    /** A target as it is drawn; {@code predictedPerCm} is NaN before there is a prediction. */
    public record Box(
            double nm, Point.Quantity quantity, double wanted, double tolerance, double predictedPerCm, double miss) {}

    /** Which box, by what it wants. */
    public record Grip(double nm, Point.Quantity quantity) {}

    /**
     * What a person chose to see.
     *
     * @param aboutTargets whether the axes are chosen for the targets rather than for all that is drawn
     * @param pointerNm where the pointer stands; NaN for nowhere
     * @param held the box that is held or chosen
     */
    public record View(
            double fromNm, double toNm, boolean aboutTargets, boolean shares, double pointerNm, Optional<Grip> held) {}

    /** Ends of both value axes, 1/cm. */
    public record Ends(double muaLow, double muaHigh, double muspLow, double muspHigh) {}

    private final List<Box> boxes;
    private final Curves curves;
    private final View view;
    private final Palette palette;
    private final double em;
    private final Scale nm;
    private final Scale mua;
    private final Scale musp;
    private final Ends ends;

    /**
     * @param curves may be null
     * @param hold ends of the axes to keep while a box is dragged, widened only where something would leave them
     */
    public SpectraPlot(
            List<Box> boxes,
            Curves curves,
            View view,
            Optional<Ends> hold,
            Palette palette,
            double w,
            double h,
            double em) {
        this.boxes = List.copyOf(boxes);
        this.curves = curves;
        this.view = view;
        this.palette = palette;
        this.em = em;
        this.ends = ends(hold);
        double left = 3.9 * em;
        double right = w - 1.4 * em;
        double bottom = h - 2.7 * em;
        double gap = 1.1 * em;
        double half = (bottom - 0.2 * em - gap) / 2;
        nm = new Scale(view.fromNm(), view.toNm(), left, right);
        mua = new Scale(ends.muaLow(), ends.muaHigh(), 0.2 * em + half, 0.2 * em);
        musp = new Scale(ends.muspLow(), ends.muspHigh(), bottom, bottom - half);
    }

    /** The targets of a draft with what is predicted for them; {@code shown} may be null or of an older draft. */
    public static List<Box> boxes(Draft draft, Shown shown) {
        List<Box> boxes = new ArrayList<>();
        for (Row row : draft.rows())
            for (Point.Quantity q : Point.Quantity.values())
                row.wanted(q).ifPresent(v -> {
                    double half = row.allowed(q).perCm(v);
                    double given = predicted(shown, row.wavelengthNm(), q);
                    boxes.add(new Box(row.wavelengthNm(), q, v, half, given, (given - v) / half));
                });
        return boxes;
    }

    private static double predicted(Shown shown, double nm, Point.Quantity q) {
        if (shown == null) return Double.NaN;
        return shown.outlook().predicted().stream()
                .filter(p -> p.point().wavelengthNm() == nm && p.point().quantity() == q)
                .mapToDouble(Answer.Predicted::perCm)
                .findFirst()
                .orElse(Double.NaN);
    }

    public Ends ends() {
        return ends;
    }

    private Ends ends(Optional<Ends> hold) {
        double[] a = span(Point.Quantity.MUA);
        double[] s = span(Point.Quantity.MUSP);
        Ends fresh = new Ends(0, above(a[1]), view.shares() ? 0 : below(s[0], s[1]), above(s[1]));
        if (hold.isEmpty()) return fresh;
        Ends held = hold.get();
        return new Ends(
                held.muaLow(),
                a[1] > held.muaHigh() ? fresh.muaHigh() : held.muaHigh(),
                s[0] < held.muspLow() ? fresh.muspLow() : held.muspLow(),
                s[1] > held.muspHigh() ? fresh.muspHigh() : held.muspHigh());
    }

    /**
     * Least and most of what is drawn of a quantity, 1/cm. When the view is about the targets, so are the axes: a peak away from them may
     * leave the plot.
     */
    private double[] span(Point.Quantity q) {
        double low = Double.POSITIVE_INFINITY;
        double high = 0;
        double from = view.fromNm();
        double to = view.toNm();
        if (view.aboutTargets() && !boxes.isEmpty()) {
            from = boxes.stream().mapToDouble(Box::nm).min().getAsDouble() - 15;
            to = boxes.stream().mapToDouble(Box::nm).max().getAsDouble() + 15;
        }
        for (int k = 0; curves != null && k < curves.size(); k++) {
            if (curves.nm(k) < from || curves.nm(k) > to) continue;
            low = Math.min(low, curves.value(q, k) - COVER_95 * curves.u(q, k));
            high = Math.max(high, curves.value(q, k) + COVER_95 * curves.u(q, k));
        }
        for (Box b : boxes)
            if (b.quantity() == q && b.nm() >= view.fromNm() && b.nm() <= view.toNm()) {
                low = Math.min(low, b.wanted() - b.tolerance());
                high = Math.max(high, b.wanted() + b.tolerance());
            }
        return high > 0 ? new double[] {Math.max(0, low), high} : new double[] {0, 1};
    }

    private static double above(double high) {
        double step = Scale.step(high, 8);
        return Math.ceil(1.1 * high / step) * step;
    }

    private static double below(double low, double high) {
        if (low < 0.35 * high) return 0;
        double step = Scale.step(high - low, 5);
        return Math.max(0, Math.floor((low - 0.04 * (high - low)) / step) * step);
    }

    public double xOf(double wavelengthNm) {
        return nm.px(wavelengthNm);
    }

    public double yOf(Point.Quantity q, double perCm) {
        return scale(q).px(perCm);
    }

    /** The wavelength under a point, when it lies over the plots. */
    public Optional<Double> nmAt(double x) {
        double v = nm.value(x);
        return v >= view.fromNm() && v <= view.toNm() ? Optional.of(v) : Optional.empty();
    }

    /** The value that a height stands for, on the plot of a quantity; 0 at the least. */
    public double valueAt(Point.Quantity q, double y) {
        return Math.max(0, scale(q).value(y));
    }

    private Scale scale(Point.Quantity q) {
        return q == Point.Quantity.MUA ? mua : musp;
    }

    /** The box that a press at a point takes hold of. */
    public Optional<Grip> gripAt(double x, double y) {
        Grip nearest = null;
        double best = Double.POSITIVE_INFINITY;
        for (Box b : boxes) {
            double dx = Math.abs(x - xOf(b.nm()));
            double dy = Math.abs(y - yOf(b.quantity(), b.wanted()));
            double tall = Math.abs(yOf(b.quantity(), b.tolerance()) - yOf(b.quantity(), 0));
            if (dx > 0.95 * em || dy > Math.max(tall, 0.35 * em) + 0.4 * em) continue;
            if (dx + 0.3 * dy < best) {
                best = dx + 0.3 * dy;
                nearest = new Grip(b.nm(), b.quantity());
            }
        }
        return Optional.ofNullable(nearest);
    }

    public List<Box> boxes() {
        return boxes;
    }

    public void draw(Pen pen) {
        plot(pen, Point.Quantity.MUA, "absorption µa /cm");
        plot(pen, Point.Quantity.MUSP, "reduced scattering µs′ /cm");
        wavelengths(pen);
        pointer(pen);
    }

    private void plot(Pen pen, Point.Quantity q, String title) {
        Scale s = scale(q);
        double left = nm.at0();
        double width = nm.at1() - left;
        double top = s.at1();
        double height = s.at0() - top;
        pen.box(left, top, width, height, 0, palette.paper(), 1, null, 0);
        pen.clip(left, top, width, height);
        gaps(pen, top, height);
        SharesBelow below = new SharesBelow(curves, nm, s, view, palette, em);
        List<SharesBelow.Band> named = view.shares() ? below.draw(pen, q) : List.of();
        pen.unclip();
        double step = Scale.step(s.high() - s.low(), 4);
        for (double v : s.ticks(4)) {
            double y = Math.rint(s.px(v)) + 0.5;
            if (v > s.low() + 1e-9 && v < s.high() - 1e-9 * step) pen.line(left, y, left + width, y, palette.wash(), 1);
            pen.text(
                    Figures.fixed(v, Scale.decimals(step)),
                    left - 0.5 * em,
                    y + 0.32 * em,
                    0.92 * em,
                    false,
                    palette.slate(),
                    Pen.Align.RIGHT);
        }
        pen.clip(left, top, width, height);
        named.forEach(b -> below.name(pen, b));
        prediction(pen, q);
        for (Box b : boxes) if (b.quantity() == q) box(pen, b);
        pen.unclip();
        pen.box(left, top, width, height, 0, null, 1, palette.line(), 1.5);
        double size = 1.0 * em;
        double letters = pen.width(title, size, true);
        pen.box(left + 0.5 * em, top + 0.45 * em, letters + 0.6 * em, 1.5 * em, 3, palette.paper(), 0.8, null, 0);
        pen.text(title, left + 0.8 * em, top + 1.5 * em, size, true, palette.ink(), Pen.Align.LEFT);
    }

    private void gaps(Pen pen, double top, double height) {
        if (curves == null) return;
        for (Curves.Gap g : curves.gaps()) {
            double from = nm.px(Math.max(g.fromNm(), view.fromNm()));
            double to = nm.px(Math.min(g.toNm(), view.toNm()));
            if (!(to > from)) continue;
            pen.clip(from, top, to - from, height);
            for (double x = from - height; x < to; x += 0.7 * em)
                pen.line(x, top + height, x + height, top, palette.line(), 1);
            pen.unclip();
        }
    }

    private void prediction(Pen pen, Point.Quantity q) {
        if (curves == null) return;
        Scale s = scale(q);
        SharesBelow drawn = new SharesBelow(curves, nm, s, view, palette, em);
        int[] in = drawn.inside();
        for (int[] run : drawn.runs(in)) {
            int n = run[1] - run[0] + 1;
            if (n < 2) continue;
            double[] x = new double[2 * n];
            double[] y = new double[2 * n];
            double[] lineX = new double[n];
            double[] lineY = new double[n];
            for (int k = 0; k < n; k++) {
                int at = in[run[0] + k];
                double v = curves.value(q, at);
                double u = COVER_95 * curves.u(q, at);
                x[k] = nm.px(curves.nm(at));
                y[k] = s.px(v + u);
                x[2 * n - 1 - k] = x[k];
                y[2 * n - 1 - k] = s.px(Math.max(0, v - u));
                lineX[k] = x[k];
                lineY[k] = s.px(v);
            }
            pen.area(x, y, 2 * n, palette.tealSoft(), 0.75);
            pen.line(lineX, lineY, n, palette.teal(), 0.15 * em);
        }
    }

    private void box(Pen pen, Box b) {
        double x = nm.px(b.nm());
        double half = 0.65 * em;
        double y = yOf(b.quantity(), b.wanted());
        double tall = Math.max(0.22 * em, Math.abs(yOf(b.quantity(), b.wanted() + b.tolerance()) - y));
        boolean held = view.held()
                .filter(g -> g.nm() == b.nm() && g.quantity() == b.quantity())
                .isPresent();
        pen.box(x - half, y - tall, 2 * half, 2 * tall, 2, null, 0, palette.amber(), held ? 0.26 * em : 0.15 * em);
        if (held) {
            pen.line(x - half - 0.5 * em, y, x - half, y, palette.amber(), 0.15 * em);
            pen.line(x + half, y, x + half + 0.5 * em, y, palette.amber(), 0.15 * em);
        }
        if (Double.isNaN(b.predictedPerCm())) return;
        double at = yOf(b.quantity(), b.predictedPerCm());
        if (Math.abs(b.miss()) <= 1) pen.disc(x, at, 0.2 * em, palette.teal());
        else {
            double r = 0.26 * em;
            pen.line(x - r, at - r, x + r, at + r, palette.brick(), 0.2 * em);
            pen.line(x - r, at + r, x + r, at - r, palette.brick(), 0.2 * em);
        }
    }

    private void wavelengths(Pen pen) {
        double y = musp.at0() + 1.15 * em;
        int wish = (int) Math.max(3, Math.min(9, (nm.at1() - nm.at0()) / (5 * em)));
        for (double v : nm.ticks(wish))
            pen.text(Figures.plain(v), nm.px(v), y, 0.92 * em, false, palette.slate(), Pen.Align.CENTRE);
        pen.text("nm", nm.at1(), y + 1.2 * em, 0.92 * em, false, palette.slate(), Pen.Align.RIGHT);
    }

    private void pointer(Pen pen) {
        double at = view.pointerNm();
        if (Double.isNaN(at) || at < view.fromNm() || at > view.toNm()) return;
        double x = Math.rint(nm.px(at)) + 0.5;
        pen.line(x, mua.at1(), x, musp.at0(), palette.ink(), 1, 2, 3);
        Optional<Curves.Gap> gap = curves == null
                ? Optional.empty()
                : curves.gaps().stream()
                        .filter(g -> at > g.fromNm() && at < g.toNm())
                        .findFirst();
        for (Point.Quantity q : Point.Quantity.values()) {
            List<String> lines = new ArrayList<>();
            if (q == Point.Quantity.MUA) lines.add(Figures.plain(Math.rint(at)) + " nm");
            double[] v = curves == null ? new double[] {Double.NaN, Double.NaN} : curves.at(q, at);
            if (!Double.isNaN(v[0])) lines.add(Words.sign(q) + " " + Words.value(v[0], v[1]) + " /cm");
            else if (gap.isPresent()) lines.add("no figures reach here");
            if (!lines.isEmpty()) bubble(pen, lines, x, q);
        }
    }

    private void bubble(Pen pen, List<String> lines, double x, Point.Quantity q) {
        double size = 0.98 * em;
        double width = 0;
        for (String line : lines) width = Math.max(width, pen.width(line, size, true));
        width += 1.5 * em;
        double height = (1.35 * lines.size() + 0.75) * em;
        double left = x + 0.8 * em + width > nm.at1() ? x - 0.8 * em - width : x + 0.8 * em;
        double top = scale(q).at1() + (q == Point.Quantity.MUA ? 2.4 : 2.2) * em;
        pen.box(left, top, width, height, 5, palette.paper(), 0.95, palette.line(), 1.3);
        double y = top + 1.4 * em;
        for (int k = 0; k < lines.size(); k++, y += 1.35 * em) {
            boolean head = q == Point.Quantity.MUA && k == 0;
            pen.text(
                    lines.get(k),
                    left + 0.75 * em,
                    y,
                    size,
                    head,
                    head ? palette.ink() : palette.teal(),
                    Pen.Align.LEFT);
        }
    }

    /** What the plots show, in a sentence for those who do not see them. */
    public String inWords() {
        StringBuilder s = new StringBuilder("Spectra from " + Figures.plain(view.fromNm()) + " to "
                + Figures.plain(view.toNm()) + " nm, " + boxes.size() + " targets.");
        view.held()
                .ifPresent(g -> boxes.stream()
                        .filter(b -> b.nm() == g.nm() && b.quantity() == g.quantity())
                        .findFirst()
                        .ifPresent(b -> {
                            s.append(" Held: ")
                                    .append(Words.sign(b.quantity()))
                                    .append(" at ")
                                    .append(Figures.plain(b.nm()));
                            s.append(" nm, wanted ")
                                    .append(Figures.significant(b.wanted(), 4))
                                    .append(" /cm");
                            if (!Double.isNaN(b.predictedPerCm()))
                                s.append(", lands ").append(Words.landing(b.miss()));
                            s.append('.');
                        }));
        return s.toString();
    }
}
