package org.hazewright.picture;

import java.awt.Font;
import java.awt.Graphics2D;
import java.awt.geom.Rectangle2D;
import java.util.ArrayList;
import java.util.List;
import org.hazewright.optics.Refusal;
import org.hazewright.reading.Foreseen;
import org.hazewright.reading.Quantity;
import org.hazewright.reading.SetUp;

/**
 * What instruments will show, as a picture: reflectance, modulation and phase over distance, arrival times, bars for slabs, beams and
 * oximeters. Hollow brick marks, dashes and the word "doubtful" stand where a model is not to be trusted.
 */
public final class ReadingPicture {
    private static final int WIDTH = 920;
    private static final int PANEL = 280;
    private static final int TOP = 56;
    private static final int BOTTOM = 34;

    private ReadingPicture() {}

    /**
     * The picture as bytes, PNG or SVG by the ending of {@code fileName}.
     *
     * @param atEvery the medium is the same at every wavelength, so that none is named
     */
    public static byte[] of(String title, List<Foreseen> foreseen, boolean atEvery, String fileName) {
        List<Panel> panels = new ArrayList<>();
        for (Foreseen f : foreseen) panels.addAll(panels(f, atEvery));
        if (panels.isEmpty()) throw new Refusal("There is no reading to draw.");
        int across = panels.size() == 1 ? 1 : 2;
        int down = (panels.size() + across - 1) / across;
        int panel = panels.size() == 1 ? 420 : PANEL;
        return Canvas.draw(fileName, WIDTH, TOP + down * panel + BOTTOM, g -> {
            g.setColor(Canvas.colour(Palette.INK));
            g.setFont(g.getFont().deriveFont(Font.BOLD, 16f));
            g.drawString(title, 24, 30);
            for (int i = 0; i < panels.size(); i++) {
                double width = (double) WIDTH / across;
                double x = i % across * width;
                double y = TOP + i / across * panel;
                panels.get(i).draw(g, new Rectangle2D.Double(x + 74, y + 34, width - 98, panel - 92));
            }
            legend(g, TOP + down * panel + 14);
        });
    }

    /** One plot, drawn into its area; title above and units below stand outside it. */
    interface Panel {
        void draw(Graphics2D g, Rectangle2D area);
    }

    private static List<Panel> panels(Foreseen f, boolean atEvery) {
        SetUp.Kind kind = f.setUp().kind();
        return switch (kind) {
            case REFLECTANCE, SLOPE -> List.of(new DistancePlot(f, Quantity.REFLECTANCE_PER_MM2, atEvery));
            case FREQUENCY ->
                List.of(
                        new DistancePlot(f, Quantity.MODULATION, atEvery),
                        new DistancePlot(f, Quantity.PHASE_DEG, atEvery));
            case TIME -> List.of(new TimePlot(f, atEvery));
            case SLAB, COLLIMATED, OXIMETER -> List.of(new BarPlot(f, atEvery));
        };
    }

    private static void legend(Graphics2D g, double y) {
        g.setFont(g.getFont().deriveFont(Font.PLAIN, 11f));
        g.setColor(Canvas.colour(Palette.QUIET));
        g.drawString(
                "points and bars: readings with their 95 % interval; lines: diffusion, dashed where it does not hold; hollow: doubtful",
                24, (float) y);
    }
}
