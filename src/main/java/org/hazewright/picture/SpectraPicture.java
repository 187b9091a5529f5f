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
 * and each ingredient's share stacked under it, named where it is widest and by colour below.
 */
public final class SpectraPicture {
    private static final int WIDTH = 760;
    private static final int LEGEND = 640;
    private static final int ROW = 18;
    private static final double NAMED = 0.01;
    private static final String[] COLOURS = {
        "DCE7E4", "EAE2D2", "F1E4C8", "E3DDE8", "E8D3CB", "CFDDEA", "D9E3C4", "EFD3DC", "D5D2C9"
    };

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
        return Canvas.draw(fileName, WIDTH, LEGEND + 3 * ROW, g -> {
            g.setColor(Canvas.colour(Palette.INK));
            g.setFont(g.getFont().deriveFont(Font.BOLD, 16f));
            g.drawString(recipe.title(), 64, 30);
            List<Ground> grounds = grounds(mixture, at);
            panel(g, grounds, at, nm, uMua, false, new Rectangle2D.Double(64, 66, 660, 236), unitPerCm, unit);
            panel(g, grounds, at, nm, uMusp, true, new Rectangle2D.Double(64, 340, 660, 236), unitPerCm, unit);
            g.setColor(Canvas.colour(Palette.QUIET));
            g.setFont(g.getFont().deriveFont(Font.PLAIN, 11f));
            g.drawString("line: predicted; band: 95 %; grounds: each ingredient's share", 64, 620);
            legend(g, grounds);
        });
    }

    private static void panel(
            Graphics2D g,
            List<Ground> grounds,
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
        shares(g, grounds, at, nm, scattering, unitPerCm, frame);
        frame.band(g, nm, low, high, Canvas.faint(Palette.TEAL, 70));
        frame.line(g, nm, value, Palette.TEAL, 2.2f);
    }

    /** The colour of one ingredient's share in both panels; {@code place} is its place in the mixture. */
    private record Ground(String id, int place, Color colour) {}

    /** Colours for what absorbs or scatters {@value #NAMED} of the whole at some wavelength, or more, and for the rest as it comes. */
    private static List<Ground> grounds(Mixture mixture, List<Coefficients> at) {
        List<Ground> found = new ArrayList<>();
        int place = 0;
        for (Ingredient i : mixture.massesG().keySet()) {
            boolean seen = false;
            for (Coefficients c : at) {
                Coefficients.Share s = c.shares().get(place);
                seen |= s.muaPerCm() > NAMED * c.muaPerCm() || s.muspPerCm() > NAMED * c.muspPerCm();
            }
            if (seen) found.add(new Ground(i.id(), place, Canvas.colour(COLOURS[found.size() % COLOURS.length])));
            place++;
        }
        return found;
    }

    /** One square and name an ingredient, under the panels, in as many rows as it takes. */
    private static void legend(Graphics2D g, List<Ground> grounds) {
        g.setFont(g.getFont().deriveFont(Font.PLAIN, 11f));
        int x = 64;
        int y = LEGEND;
        for (Ground ground : grounds) {
            int width = 16 + g.getFontMetrics().stringWidth(ground.id()) + 18;
            if (x > 64 && x + width > WIDTH - 30) {
                x = 64;
                y += ROW;
            }
            g.setColor(ground.colour());
            g.fillRect(x, y - 9, 10, 10);
            g.setColor(Canvas.colour(Palette.QUIET));
            g.drawRect(x, y - 9, 10, 10);
            g.drawString(ground.id(), x + 16, y);
            x += width;
        }
    }

    /** Shares from the largest at the bottom to the smallest; those never above 1 % of the whole are left out. */
    private static void shares(
            Graphics2D g,
            List<Ground> grounds,
            List<Coefficients> at,
            double[] nm,
            boolean scattering,
            double unitPerCm,
            PlotFrame frame) {
        record Share(Ground ground, double[] value, double mean, double most) {}
        List<Share> shares = new ArrayList<>();
        for (Ground ground : grounds) {
            double[] value = new double[nm.length];
            double sum = 0;
            double most = 0;
            for (int j = 0; j < nm.length; j++) {
                Coefficients.Share s = at.get(j).shares().get(ground.place());
                Coefficients c = at.get(j);
                value[j] = unitPerCm * (scattering ? s.muspPerCm() : s.muaPerCm());
                sum += value[j];
                double whole = unitPerCm * (scattering ? c.muspPerCm() : c.muaPerCm());
                if (whole > 0) most = Math.max(most, value[j] / whole);
            }
            if (sum > 0) shares.add(new Share(ground, value, sum, most));
        }
        shares.sort(Comparator.comparingDouble(Share::mean).reversed());
        double[] below = new double[nm.length];
        for (Share share : shares) {
            double[] above = new double[nm.length];
            int widest = 0;
            for (int j = 0; j < nm.length; j++) {
                above[j] = below[j] + share.value()[j];
                if (share.value()[j] > share.value()[widest]) widest = j;
            }
            frame.band(g, nm, below, above, share.ground().colour());
            frame.line(g, nm, above, Palette.TRACK, 0.6f);
            if (share.most() > 0.02) name(g, frame, share.ground().id(), nm, below, above, widest);
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
