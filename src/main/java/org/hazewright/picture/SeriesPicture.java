package org.hazewright.picture;

import java.awt.BasicStroke;
import java.awt.Color;
import java.awt.Font;
import java.awt.Graphics2D;
import java.awt.RenderingHints;
import java.awt.geom.Ellipse2D;
import java.awt.geom.Line2D;
import java.awt.image.BufferedImage;
import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.util.List;
import javax.imageio.ImageIO;
import org.hazewright.learning.DilutionFit;
import org.hazewright.learning.Extinction;
import org.hazewright.learning.StraightLine;
import org.hazewright.optics.Figures;

/**
 * A dilution series as a picture (PNG): on the left extinction over concentration with the fitted lines, what lies off the line ringed; on
 * the right the extinction that came out, over wavelength, with twice its standard uncertainty.
 */
public final class SeriesPicture {
    private static final int WIDTH = 1200;
    private static final int HEIGHT = 520;
    private static final int MOST_LINES = 5;
    private static final String[] INKS = {Palette.TEAL, Palette.AMBER_TYPE, Palette.BRICK, Palette.INK, Palette.QUIET};

    private final Graphics2D g;

    private SeriesPicture(Graphics2D g) {
        this.g = g;
    }

    public static byte[] png(DilutionFit fit) {
        BufferedImage image = new BufferedImage(WIDTH, HEIGHT, BufferedImage.TYPE_INT_RGB);
        Graphics2D g = image.createGraphics();
        g.setRenderingHint(RenderingHints.KEY_ANTIALIASING, RenderingHints.VALUE_ANTIALIAS_ON);
        g.setRenderingHint(RenderingHints.KEY_TEXT_ANTIALIASING, RenderingHints.VALUE_TEXT_ANTIALIAS_ON);
        g.setColor(colour(Palette.MILK));
        g.fillRect(0, 0, WIDTH, HEIGHT);
        SeriesPicture p = new SeriesPicture(g);
        p.lines(fit);
        p.spectrum(fit);
        g.dispose();
        ByteArrayOutputStream out = new ByteArrayOutputStream();
        try {
            ImageIO.write(image, "png", out);
        } catch (IOException e) {
            throw new UncheckedIOException("The picture could not be put together.", e);
        }
        return out.toByteArray();
    }

    /** A panel with its axes; x and y run from 0 or from {@code x0} to round ends. */
    private final class Panel {
        final int left;
        final int top = 56;
        final int width;
        final int height = 380;
        final double x0;
        final double x1;
        final double y1;

        Panel(int left, int width, double x0, double x1, double y1, String title, String xTitle) {
            this.left = left;
            this.width = width;
            double xUnit = RoundStep.over(x1 - x0);
            this.x0 = Math.floor(x0 / xUnit) * xUnit;
            this.x1 = Math.ceil(x1 / xUnit) * xUnit;
            double yUnit = RoundStep.over(y1);
            this.y1 = Math.ceil(1.02 * y1 / yUnit) * yUnit;
            text(title, left, 30, 17, true, Palette.INK);
            text(xTitle, left + width / 2 - 8 * xTitle.length() / 2, top + height + 52, 14, false, Palette.QUIET);
            for (double v = this.x0; v <= this.x1 * (1 + 1e-9); v += xUnit) {
                rule(x(v), top, x(v), top + height);
                text(
                        Figures.plain(Double.parseDouble(Figures.significant(v, 6))),
                        x(v) - 16,
                        top + height + 22,
                        13,
                        false,
                        Palette.QUIET);
            }
            for (double v = 0; v <= this.y1 * (1 + 1e-9); v += yUnit) {
                rule(left, y(v), left + width, y(v));
                text(
                        Figures.plain(Double.parseDouble(Figures.significant(v, 6))),
                        left - 52,
                        y(v) + 5,
                        13,
                        false,
                        Palette.QUIET);
            }
        }

        double x(double v) {
            return left + (v - x0) / (x1 - x0) * width;
        }

        double y(double v) {
            return top + height - v / y1 * height;
        }
    }

    private void lines(DilutionFit fit) {
        List<Extinction> all = fit.wavelengths();
        double most = 0;
        double high = 0;
        for (Extinction e : all)
            for (StraightLine.FitPoint p : e.line().points()) {
                most = Math.max(most, p.x());
                high = Math.max(high, p.y());
            }
        Panel panel = new Panel(80, 460, 0, most, high, "extinction, 1/cm", "concentration, g/mL");
        int shown = Math.min(MOST_LINES, all.size());
        for (int k = 0; k < shown; k++) {
            Extinction e = all.get(shown == 1 ? 0 : k * (all.size() - 1) / (shown - 1));
            g.setColor(colour(INKS[k]));
            g.setStroke(new BasicStroke(2));
            g.draw(new Line2D.Double(
                    panel.x(0),
                    panel.y(Math.max(0, e.line().at(0))),
                    panel.x(most),
                    panel.y(e.line().at(most))));
            for (StraightLine.FitPoint p : e.line().points()) {
                dot(panel.x(p.x()), panel.y(p.y()), 4, INKS[k], true);
                if (p.outlier()) dot(panel.x(p.x()), panel.y(p.y()), 9, Palette.BRICK, false);
            }
            text(Figures.plain(e.wavelengthNm()) + " nm", panel.left + 12, panel.top + 22 + 18 * k, 14, true, INKS[k]);
        }
    }

    private void spectrum(DilutionFit fit) {
        List<Extinction> all = fit.wavelengths();
        double high = 0;
        for (Extinction e : all) high = Math.max(high, e.cm2PerG() + 2 * e.uCm2PerG());
        double from = all.get(0).wavelengthNm();
        double to = all.get(all.size() - 1).wavelengthNm();
        if (to <= from) {
            from -= 50;
            to += 50;
        }
        Panel panel = new Panel(
                690,
                470,
                from,
                to,
                high,
                fit.series().ingredient() + ", extinction by mass, cm²/g, ± "
                        + Figures.significant(100 * fit.relativeU(), 2) + " %",
                "wavelength, nm");
        g.setColor(colour(Palette.TEAL));
        g.setStroke(new BasicStroke(2));
        for (int k = 0; k + 1 < all.size(); k++)
            g.draw(new Line2D.Double(
                    panel.x(all.get(k).wavelengthNm()),
                    panel.y(all.get(k).cm2PerG()),
                    panel.x(all.get(k + 1).wavelengthNm()),
                    panel.y(all.get(k + 1).cm2PerG())));
        for (Extinction e : all) {
            double u = 2 * e.uCm2PerG();
            g.setColor(colour(Palette.TEAL));
            g.draw(new Line2D.Double(
                    panel.x(e.wavelengthNm()),
                    panel.y(Math.max(0, e.cm2PerG() - u)),
                    panel.x(e.wavelengthNm()),
                    panel.y(e.cm2PerG() + u)));
            dot(panel.x(e.wavelengthNm()), panel.y(e.cm2PerG()), 4, Palette.TEAL, true);
        }
    }

    private void dot(double x, double y, double r, String ink, boolean filled) {
        g.setColor(colour(ink));
        g.setStroke(new BasicStroke(2));
        Ellipse2D circle = new Ellipse2D.Double(x - r, y - r, 2 * r, 2 * r);
        if (filled) g.fill(circle);
        else g.draw(circle);
    }

    private void rule(double x1, double y1, double x2, double y2) {
        g.setColor(colour(Palette.RULE));
        g.setStroke(new BasicStroke(1));
        g.draw(new Line2D.Double(x1, y1, x2, y2));
    }

    private void text(String s, double x, double y, int size, boolean bold, String ink) {
        g.setColor(colour(ink));
        g.setFont(new Font(Font.SANS_SERIF, bold ? Font.BOLD : Font.PLAIN, size));
        g.drawString(s, (float) x, (float) y);
    }

    private static Color colour(String hex) {
        return new Color(Integer.parseInt(hex, 16));
    }
}
