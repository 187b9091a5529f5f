package org.hazewright.desk.paper;

import java.util.ArrayList;
import java.util.List;
import javafx.scene.canvas.Canvas;
import org.hazewright.desk.pen.CanvasPen;
import org.hazewright.desk.pen.Pen;

/** Pages as nodes, for a printer; drawn finer than a screen. */
final class ScreenPaper implements Paper {
    /** Dots per point. */
    static final double FINE = 3;

    private final List<Canvas> pages = new ArrayList<>();

    @Override
    public Pen nextPage() {
        Canvas page = new Canvas(WIDTH * FINE, HEIGHT * FINE);
        page.getGraphicsContext2D().scale(FINE, FINE);
        pages.add(page);
        return new CanvasPen(page.getGraphicsContext2D());
    }

    List<Canvas> pages() {
        return pages;
    }
}
