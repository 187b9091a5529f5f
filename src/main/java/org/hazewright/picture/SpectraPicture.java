package org.hazewright.picture;

import java.awt.Color;
import java.awt.Font;
import java.awt.Graphics2D;
import java.awt.geom.Rectangle2D;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import org.hazewright.mixture.Budget;
import org.hazewright.mixture.Coefficients;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Recipe;
import org.hazewright.shelf.Ingredient;

/**
 * A recipe's spectra as a picture: µa above and µs' below on one wavelength axis in nm, the prediction as a line with its 95 % band,
 * and each ingredient's share stacked under it, named where it is widest.
 */
public final class SpectraPicture {
    private static final int WIDTH = 760;
    private static final int HEIGHT = 640;

    private SpectraPicture() {}

    /**
     * The picture as bytes, PNG or SVG by the ending of {@code fileName}.
     *
     * @param unitPerCm 1 for coefficients per cm, 0.1 for per mm; {@code unit} is the sign to show
     */
    public static byte[] of(Recipe recipe, double[] nm, String fileName, double unitPerCm, String unit) {
        Mixture mixture = Mixture.of(recipe);
        List<Coefficients> at = new ArrayList<>();
        for (double x : nm) at.add(mixture.at(x));
        Budget budget = Budget.of(recipe, nm, Double.MAX_VALUE);
        double[] uMua = budget.uMuaPerCm();
        double[] uMusp = budget.uMuspPerCm();
        return Canvas.draw(fileName, WIDTH, HEIGHT, g -> {
            g.setColor(Canvas.colour(Palette.INK));
            g.setFont(g.getFont().deriveFont(Font.BOLD, 16f));
            g.drawString(recipe.title(), 64, 30);
            panel(g, mixture, at, nm, uMua, false, new Rectangle2D.Double(64, 66, 660, 236), unitPerCm, unit);
            panel(g, mixture, at, nm, uMusp, true, new Rectangle2D.Double(64, 340, 660, 236), unitPerCm, unit);
            g.setColor(Canvas.colour(Palette.QUIET));
            g.setFont(g.getFont().deriveFont(Font.PLAIN, 11f));
            g.drawString("line: predicted; band: 95 %; grounds: each ingredient's share", 64, HEIGHT - 22);
        });
    }

    private static void panel(
            Graphics2D g,
            Mixture mixture,
            List<Coefficients> at,
            double[] nm,
            double[] u,
            boolean scattering,
            Rectangle2D area,
            double unitPerCm,
            String unit) {
        int n = nm.length;
        double[] value = new double[n];
        double[] low = new double[n];
        double[] high = new double[n];
        double top = 0;
        for (int j = 0; j < n; j++) {
            Coefficients c = at.get(j);
            value[j] = unitPerCm * (scattering ? c.muspPerCm() : c.muaPerCm());
            low[j] = Math.max(0, value[j] - 1.96 * unitPerCm * u[j]);
            high[j] = value[j] + 1.96 * unitPerCm * u[j];
            top = Math.max(top, high[j]);
        }
        PlotFrame frame = new PlotFrame(area, nm[0], nm[n - 1], 0, top > 0 ? 1.08 * top : 1);
        frame.axes(
                g, (scattering ? "reduced scattering µs' " : "absorption µa ") + unit, scattering, "wavelength in nm");
        shares(g, mixture, at, nm, scattering, unitPerCm, frame);
        frame.band(g, nm, low, high, Canvas.faint(Palette.TEAL, 70));
        frame.line(g, nm, value, Palette.TEAL, 2.2f);
    }

    /** Shares from the largest at the bottom to the smallest; those never above 2 % of the whole stay unnamed. */
    private static void shares(
            Graphics2D g,
            Mixture mixture,
            List<Coefficients> at,
            double[] nm,
            boolean scattering,
            double unitPerCm,
            PlotFrame frame) {
        record Share(Ingredient ingredient, double[] value, double mean, double most) {}
        List<Share> shares = new ArrayList<>();
        int k = 0;
        for (Ingredient i : mixture.massesG().keySet()) {
            double[] value = new double[nm.length];
            double sum = 0;
            double most = 0;
            for (int j = 0; j < nm.length; j++) {
                Coefficients.Share s = at.get(j).shares().get(k);
                Coefficients c = at.get(j);
                value[j] = unitPerCm * (scattering ? s.muspPerCm() : s.muaPerCm());
                sum += value[j];
                double whole = unitPerCm * (scattering ? c.muspPerCm() : c.muaPerCm());
                if (whole > 0) most = Math.max(most, value[j] / whole);
            }
            k++;
            if (sum > 0) shares.add(new Share(i, value, sum, most));
        }
        shares.sort(Comparator.comparingDouble(Share::mean).reversed());
        double[] below = new double[nm.length];
        Color[] grounds = {
            Canvas.colour("EAE2D2"),
            Canvas.colour("DCE7E4"),
            Canvas.colour("F1E4C8"),
            Canvas.colour("E3DDE8"),
            Canvas.colour("E8D9D2")
        };
        for (int s = 0; s < shares.size(); s++) {
            Share share = shares.get(s);
            double[] above = new double[nm.length];
            int widest = 0;
            for (int j = 0; j < nm.length; j++) {
                above[j] = below[j] + share.value()[j];
                if (share.value()[j] > share.value()[widest]) widest = j;
            }
            frame.band(g, nm, below, above, grounds[s % grounds.length]);
            frame.line(g, nm, above, Palette.TRACK, 0.6f);
            if (share.most() > 0.02) name(g, frame, share.ingredient().id(), nm, below, above, widest);
            below = above;
        }
    }

    private static void name(
            Graphics2D g, PlotFrame frame, String id, double[] nm, double[] below, double[] above, int widest) {
        g.setFont(g.getFont().deriveFont(Font.PLAIN, 10f));
        double room = frame.py(below[widest]) - frame.py(above[widest]);
        if (room < 11) return;
        double half = g.getFontMetrics().stringWidth(id) / 2.0;
        double x = Math.max(
                frame.area().getX() + half + 4, Math.min(frame.area().getMaxX() - half - 4, frame.px(nm[widest])));
        g.setColor(Canvas.colour(Palette.INK));
        PlotFrame.centre(g, id, x, frame.py((below[widest] + above[widest]) / 2) + 4);
    }
}
