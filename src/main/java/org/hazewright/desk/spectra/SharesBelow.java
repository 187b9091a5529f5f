package org.hazewright.desk.spectra;

import java.util.ArrayList;
import java.util.List;
import org.hazewright.brief.Point;
import org.hazewright.desk.look.Palette;
import org.hazewright.desk.model.Curves;
import org.hazewright.desk.model.Words;
import org.hazewright.desk.pen.Pen;

/** What each ingredient adds to one quantity, stacked over wavelength: drawn first, named once the grid lines are there. */
final class SharesBelow {
    private final Curves curves;
    private final Scale nm;
    private final Scale s;
    private final SpectraPlot.View view;
    private final Palette palette;
    private final double em;

    SharesBelow(Curves curves, Scale nm, Scale value, SpectraPlot.View view, Palette palette, double em) {
        this.curves = curves;
        this.nm = nm;
        this.s = value;
        this.view = view;
        this.palette = palette;
        this.em = em;
    }

    /** Draws the shares; gives those to be named. */
    List<Band> draw(Pen pen, Point.Quantity q) {
        if (curves == null) return List.of();
        int[] in = inside();
        if (in.length < 2) return List.of();
        double[] below = new double[in.length];
        int tint = 0;
        List<Band> labels = new ArrayList<>();
        for (Curves.Share share : curves.shares()) {
            double[] part = q == Point.Quantity.MUA ? share.mua() : share.musp();
            double most = 0;
            for (int k : in) most = Math.max(most, part[k]);
            if (most <= 0.004 * (s.high() - s.low())) continue;
            String colour = palette.shares().get(tint++ % palette.shares().size());
            for (int[] run : runs(in)) {
                int n = run[1] - run[0] + 1;
                double[] x = new double[2 * n];
                double[] y = new double[2 * n];
                for (int k = 0; k < n; k++) {
                    int at = run[0] + k;
                    x[k] = nm.px(curves.nm(in[at]));
                    y[k] = s.px(below[at] + part[in[at]]);
                    x[2 * n - 1 - k] = x[k];
                    y[2 * n - 1 - k] = s.px(below[at]);
                }
                pen.area(x, y, 2 * n, colour, 1);
                double[] edgeX = java.util.Arrays.copyOf(x, n);
                double[] edgeY = java.util.Arrays.copyOf(y, n);
                pen.line(edgeX, edgeY, n, palette.line(), 1);
            }
            labels.add(new Band(Words.shortName(share.ingredient()), below.clone(), part));
            for (int k = 0; k < in.length; k++) below[k] += part[in[k]];
        }
        return labels;
    }

    /** A share as it is stacked: what lies below it and its own part, 1/cm. */
    record Band(String name, double[] below, double[] part) {}

    /** A share's name at the place where it has most room; left out where it would not fit. */
    void name(Pen pen, Band b) {
        int[] in = inside();
        double size = 0.9 * em;
        String name = b.name().length() > 26 ? b.name().replaceFirst(",.*", "") : b.name();
        double half = pen.width(name, size, false) / 2 + 0.3 * em;
        double best = 1.25 * em;
        double bestX = Double.NaN;
        double bestY = 0;
        for (int k : in) {
            double x = nm.px(curves.nm(k));
            if (x - half < nm.at0() || x + half > nm.at1()) continue;
            double top = s.at1();
            double bottom = s.at0();
            for (int j = 0; j < in.length; j++) {
                if (Math.abs(nm.px(curves.nm(in[j])) - x) > half) continue;
                top = Math.max(top, s.px(b.below()[j] + b.part()[in[j]]));
                bottom = Math.min(bottom, s.px(b.below()[j]));
            }
            if (bottom - top > best) {
                best = bottom - top;
                bestX = x;
                bestY = (top + bottom) / 2;
            }
        }
        if (!Double.isNaN(bestX))
            pen.text(name, bestX, bestY + 0.32 * em, size, false, palette.slate(), Pen.Align.CENTRE);
    }

    /** Indices of the curve inside the range drawn. */
    int[] inside() {
        List<Integer> in = new ArrayList<>();
        for (int k = 0; k < curves.size(); k++)
            if (curves.nm(k) >= view.fromNm() && curves.nm(k) <= view.toNm()) in.add(k);
        return in.stream().mapToInt(Integer::intValue).toArray();
    }

    /** First and last place of each stretch without a gap. */
    List<int[]> runs(int[] in) {
        List<int[]> runs = new ArrayList<>();
        int from = 0;
        for (int k = 1; k <= in.length; k++) {
            boolean broken = k == in.length;
            if (!broken)
                for (Curves.Gap g : curves.gaps())
                    broken |= g.fromNm() >= curves.nm(in[k - 1]) - 1e-9 && g.toNm() <= curves.nm(in[k]) + 1e-9;
            if (broken) {
                runs.add(new int[] {from, k - 1});
                from = k;
            }
        }
        return runs;
    }
}
