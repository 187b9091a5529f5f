package org.hazewright.desk.spectra;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.ByteArrayInputStream;
import java.nio.charset.StandardCharsets;
import java.util.List;
import java.util.Optional;
import java.util.Random;
import javax.xml.parsers.DocumentBuilderFactory;
import org.hazewright.brief.Point;
import org.hazewright.desk.look.Palette;
import org.hazewright.desk.pen.SvgPen;
import org.junit.jupiter.api.Test;

class SpectraPlotTest {
    private static SpectraPlot plot(List<SpectraPlot.Box> boxes, double w, double h) {
        return new SpectraPlot(
                boxes,
                null,
                new SpectraPlot.View(600, 1000, true, false, Double.NaN, Optional.empty()),
                Optional.empty(),
                Palette.LIGHT,
                w,
                h,
                13);
    }

    private static SpectraPlot.Box box(double nm, Point.Quantity q, double v) {
        return new SpectraPlot.Box(nm, q, v, 0.05 * v, v, 0);
    }

    @Test
    void aBoxIsTakenHoldOfWhereItIsDrawn() {
        Random random = new Random(2);
        for (int k = 0; k < 200; k++) {
            List<SpectraPlot.Box> boxes = List.of(
                    box(650, Point.Quantity.MUA, 0.02 + random.nextDouble()),
                    box(750, Point.Quantity.MUA, 0.02 + random.nextDouble()),
                    box(650, Point.Quantity.MUSP, 1 + 20 * random.nextDouble()),
                    box(900, Point.Quantity.MUSP, 1 + 20 * random.nextDouble()));
            SpectraPlot plot = plot(boxes, 400 + random.nextInt(1500), 300 + random.nextInt(1200));
            for (SpectraPlot.Box b : boxes) {
                double x = plot.xOf(b.nm());
                double y = plot.yOf(b.quantity(), b.wanted());
                assertEquals(Optional.of(new SpectraPlot.Grip(b.nm(), b.quantity())), plot.gripAt(x, y));
                assertEquals(b.wanted(), plot.valueAt(b.quantity(), y), 1e-9 * b.wanted());
                assertEquals(b.nm(), plot.nmAt(x).orElseThrow(), 1e-6);
            }
        }
    }

    @Test
    void boxesAreAsTallAsTheirToleranceAndInsideThePlot() {
        SpectraPlot plot = plot(List.of(box(690, Point.Quantity.MUA, 0.1), box(830, Point.Quantity.MUSP, 8)), 700, 500);
        double up = plot.yOf(Point.Quantity.MUA, 0.105);
        double middle = plot.yOf(Point.Quantity.MUA, 0.1);
        double down = plot.yOf(Point.Quantity.MUA, 0.095);
        assertEquals(down - middle, middle - up, 1e-9);
        assertTrue(up > 0 && down < plot.yOf(Point.Quantity.MUA, 0));
        assertTrue(plot.yOf(Point.Quantity.MUSP, 8.4) > plot.yOf(Point.Quantity.MUA, 0), "µs' lies below µa");
    }

    @Test
    void thePictureIsWellFormedXmlWhateverNamesHold() throws Exception {
        SvgPen pen = new SvgPen(700, 500);
        plot(List.of(box(690, Point.Quantity.MUA, 0.1)), 700, 500).draw(pen);
        pen.text("a < b & \"c\"", 10, 10, 12, true, "#000000", org.hazewright.desk.pen.Pen.Align.RIGHT);
        String svg = pen.picture("title <&>");
        var document = DocumentBuilderFactory.newInstance()
                .newDocumentBuilder()
                .parse(new ByteArrayInputStream(svg.getBytes(StandardCharsets.UTF_8)));
        assertEquals("svg", document.getDocumentElement().getTagName());
        assertTrue(svg.contains("µa"));
    }
}
