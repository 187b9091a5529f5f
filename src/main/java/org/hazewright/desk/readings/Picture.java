package org.hazewright.desk.readings;

import javafx.scene.canvas.Canvas;
import javafx.scene.layout.Region;
import org.hazewright.desk.look.Look;
import org.hazewright.desk.pen.CanvasPen;
import org.hazewright.desk.pen.Pen;

/** A small drawing in a card; drawn anew when its room, its colours or what it shows change. */
final class Picture extends Region {
    /** Draws into a room of w times h px. */
    interface Drawing {
        void draw(Pen pen, double w, double h);
    }

    private final Canvas canvas = new Canvas();
    private Drawing drawing = (pen, w, h) -> {};

    Picture(Look look) {
        getChildren().add(canvas);
        canvas.setManaged(false);
        setMinSize(40, 40);
        setPrefSize(120, 80);
        look.paletteProperty().addListener((p, before, now) -> draw());
    }

    void show(Drawing what) {
        drawing = what;
        draw();
    }

    @Override
    protected void layoutChildren() {
        draw();
    }

    private void draw() {
        double w = Math.floor(getWidth());
        double h = Math.floor(getHeight());
        if (w < 10 || h < 10) return;
        canvas.setWidth(w);
        canvas.setHeight(h);
        var g = canvas.getGraphicsContext2D();
        g.clearRect(0, 0, w, h);
        drawing.draw(new CanvasPen(g), w, h);
    }
}
