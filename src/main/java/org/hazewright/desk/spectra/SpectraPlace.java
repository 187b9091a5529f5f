package org.hazewright.desk.spectra;

import java.util.List;
import java.util.Optional;
import javafx.scene.AccessibleRole;
import javafx.scene.Cursor;
import javafx.scene.canvas.Canvas;
import javafx.scene.control.Label;
import javafx.scene.input.KeyEvent;
import javafx.scene.input.MouseEvent;
import javafx.scene.layout.HBox;
import javafx.scene.layout.Priority;
import javafx.scene.layout.Region;
import javafx.scene.layout.VBox;
import org.hazewright.brief.Point;
import org.hazewright.desk.look.Look;
import org.hazewright.desk.model.Curves;
import org.hazewright.desk.model.Desk;
import org.hazewright.desk.parts.Say;
import org.hazewright.desk.parts.Word;
import org.hazewright.desk.pen.CanvasPen;
import org.hazewright.optics.Figures;

/** The place Spectra: the two plots, what may be shown in them, and a target moved by mouse or keys. */
public final class SpectraPlace extends VBox {
    private static final double KEY_STEP = 0.01;

    private final Desk desk;
    private final Look look;
    private final Surface surface = new Surface();
    private boolean shares;
    private boolean whole;
    private double pointerNm = Double.NaN;
    private Optional<SpectraPlot.Grip> held = Optional.empty();
    private Optional<SpectraPlot.Ends> hold = Optional.empty();
    private double handAtY;
    private double pulledPerCm;
    private boolean dragging;
    private SpectraPlot plot;

    public SpectraPlace(Desk desk, Look look, Runnable savePicture) {
        this.desk = desk;
        this.look = look;
        getStyleClass().add("place");
        setSpacing(4);
        shares = !desk.remembered().text("spectra.shares", "yes").equals("no");
        whole = desk.remembered().flag("spectra.whole");
        Word sharing = new Word("", () -> {});
        Word range = new Word("", () -> {});
        sharing.setOnAction(e -> {
            shares = !shares;
            desk.remembered().keep("spectra.shares", shares);
            name(sharing, range);
        });
        range.setOnAction(e -> {
            whole = !whole;
            desk.remembered().keep("spectra.whole", whole);
            name(sharing, range);
        });
        name(sharing, range);
        Label dot1 = Say.quiet("·");
        Label dot2 = Say.quiet("·");
        HBox head = new HBox(
                4,
                Say.place("Spectra"),
                Say.spring(),
                sharing,
                dot1,
                range,
                dot2,
                new Word("save picture…", savePicture));
        head.setAlignment(javafx.geometry.Pos.BASELINE_LEFT);
        VBox.setVgrow(surface, Priority.ALWAYS);
        getChildren().addAll(head, surface);

        desk.edits().nowProperty().addListener((p, before, now) -> {
            if (held.isPresent() && now != null && now.row(held.get().nm()).isEmpty()) held = Optional.empty();
            name(sharing, range);
        });
        desk.solving().shownProperty().addListener((p, before, now) -> surface.redraw());
        desk.solving().curvesProperty().addListener((p, before, now) -> surface.redraw());
        look.paletteProperty().addListener((p, before, now) -> surface.redraw());
        look.emProperty().addListener((p, before, now) -> surface.redraw());
    }

    private void name(Word sharing, Word range) {
        sharing.setText(shares ? "hide shares" : "show shares");
        double[] r = range();
        range.setText(Figures.plain(r[0]) + "–" + Figures.plain(r[1]) + " nm");
        range.setAccessibleText("wavelengths drawn: " + range.getText()
                + (whole ? ", press for those around the targets" : ", press for all"));
        surface.redraw();
    }

    /** Ends of the wavelengths that are drawn, nm. */
    private double[] range() {
        if (whole || desk.edits().now() == null) return new double[] {Curves.FROM_NM, Curves.TO_NM};
        var rows = desk.edits().now().rows();
        double low = rows.get(0).wavelengthNm();
        double high = rows.get(rows.size() - 1).wavelengthNm();
        double margin = Math.max(60, 0.25 * (high - low));
        double from = Math.min(low - 10, Math.max(Curves.FROM_NM, Math.floor((low - margin) / 50) * 50));
        double to = Math.max(high + 10, Math.min(Curves.TO_NM, Math.ceil((high + margin) / 50) * 50));
        return new double[] {from, to};
    }

    /** The plot as it stands on the screen; null before it was drawn. */
    public SpectraPlot plot() {
        return plot;
    }

    /** The plot for a picture of so many px, without pointer and held box. */
    public SpectraPlot picture(org.hazewright.desk.look.Palette palette, double w, double h, double em) {
        double[] r = range();
        return new SpectraPlot(
                SpectraPlot.boxes(
                        desk.edits().now(), desk.solving().shownProperty().get()),
                desk.solving().curvesProperty().get(),
                new SpectraPlot.View(r[0], r[1], !whole, shares, Double.NaN, Optional.empty()),
                Optional.empty(),
                palette,
                w,
                h,
                em);
    }

    /** Where the plots are drawn. */
    public Region surface() {
        return surface;
    }

    /** The canvas alone: its own layout root, so that drawing anew lays out nothing else. */
    private final class Drawing extends Region {
        private final Canvas canvas = new Canvas();

        Drawing() {
            setManaged(false);
            canvas.setManaged(false);
            getChildren().add(canvas);
        }

        @Override
        protected void layoutChildren() {
            surface.draw(canvas, getWidth(), getHeight());
        }
    }

    private final class Surface extends Region {
        private final Drawing drawing = new Drawing();

        Surface() {
            getChildren().add(drawing);
            getStyleClass().add("plots");
            setFocusTraversable(true);
            setAccessibleRole(AccessibleRole.IMAGE_VIEW);
            setAccessibleRoleDescription("plots; left and right choose a target, up and down move what is wanted");
            setMinSize(120, 160);
            addEventHandler(MouseEvent.MOUSE_MOVED, this::moved);
            addEventHandler(MouseEvent.MOUSE_EXITED, e -> {
                if (!dragging) point(Double.NaN);
            });
            addEventHandler(MouseEvent.MOUSE_PRESSED, this::pressed);
            addEventHandler(MouseEvent.MOUSE_DRAGGED, this::dragged);
            addEventHandler(MouseEvent.MOUSE_RELEASED, this::released);
            addEventHandler(KeyEvent.KEY_PRESSED, this::typed);
            focusedProperty().addListener((p, before, now) -> {
                if (now && held.isEmpty()) choose(0);
                redraw();
            });
        }

        @Override
        protected void layoutChildren() {
            drawing.resizeRelocate(0, 0, getWidth(), getHeight());
            drawing.requestLayout();
        }

        void redraw() {
            drawing.requestLayout();
        }

        private void draw(Canvas canvas, double width, double height) {
            double w = Math.floor(width);
            double h = Math.floor(height);
            if (canvas.getWidth() != w) canvas.setWidth(w);
            if (canvas.getHeight() != h) canvas.setHeight(h);
            if (w < 60 || h < 60 || desk.edits().now() == null) return;
            double[] r = range();
            plot = new SpectraPlot(
                    SpectraPlot.boxes(
                            desk.edits().now(), desk.solving().shownProperty().get()),
                    desk.solving().curvesProperty().get(),
                    new SpectraPlot.View(
                            r[0], r[1], !whole, shares, pointerNm, isFocused() || dragging ? held : Optional.empty()),
                    hold,
                    look.palette(),
                    w,
                    h,
                    look.em());
            var g = canvas.getGraphicsContext2D();
            g.clearRect(0, 0, w, h);
            plot.draw(new CanvasPen(g));
            setAccessibleText(plot.inWords());
        }

        private void point(double nm) {
            pointerNm = nm;
            redraw();
        }

        private void moved(MouseEvent e) {
            if (plot == null) return;
            setCursor(plot.gripAt(e.getX(), e.getY()).isPresent() ? Cursor.V_RESIZE : Cursor.CROSSHAIR);
            point(plot.nmAt(e.getX()).orElse(Double.NaN));
        }

        private void pressed(MouseEvent e) {
            requestFocus();
            if (plot == null) return;
            Optional<SpectraPlot.Grip> grip = plot.gripAt(e.getX(), e.getY());
            grip.ifPresent(g -> {
                held = grip;
                dragging = true;
                hold = Optional.of(plot.ends());
                plot.boxes().stream()
                        .filter(b -> b.nm() == g.nm() && b.quantity() == g.quantity())
                        .findFirst()
                        .ifPresent(b -> pulledPerCm = b.wanted());
                handAtY = e.getScreenY();
                desk.editing().settle();
                point(g.nm());
            });
        }

        private void dragged(MouseEvent e) {
            if (!dragging || held.isEmpty()) return;
            SpectraPlot.Grip g = held.get();
            // by how far the hand went, not by where the plot now lies: what is around the plot may grow meanwhile
            double perPx = plot.valueAt(g.quantity(), 1) - plot.valueAt(g.quantity(), 0);
            pulledPerCm += perPx * (e.getScreenY() - handAtY);
            handAtY = e.getScreenY();
            desk.editing().drag(g.nm(), g.quantity(), Math.max(0, pulledPerCm));
        }

        private void released(MouseEvent e) {
            if (!dragging) return;
            dragging = false;
            hold = Optional.empty();
            desk.editing().settle();
            redraw();
        }

        private void typed(KeyEvent e) {
            double step = e.isShiftDown() ? KEY_STEP / 10 : KEY_STEP;
            switch (e.getCode()) {
                case LEFT -> choose(-1);
                case RIGHT -> choose(1);
                case UP -> nudge(step);
                case DOWN -> nudge(-step);
                case PAGE_UP -> nudge(5 * step);
                case PAGE_DOWN -> nudge(-5 * step);
                default -> {
                    return;
                }
            }
            e.consume();
        }

        private void nudge(double share) {
            held.ifPresent(g -> desk.editing().nudge(g.nm(), g.quantity(), share));
        }

        /** Takes the next box, {@code by} places on; µa from left to right, then µs'. */
        private void choose(int by) {
            if (desk.edits().now() == null) return;
            List<SpectraPlot.Grip> all = SpectraPlot.boxes(desk.edits().now(), null).stream()
                    .map(b -> new SpectraPlot.Grip(b.nm(), b.quantity()))
                    .sorted(java.util.Comparator.comparing((SpectraPlot.Grip g) -> g.quantity() == Point.Quantity.MUSP)
                            .thenComparingDouble(SpectraPlot.Grip::nm))
                    .toList();
            if (all.isEmpty()) return;
            int at = held.map(all::indexOf).orElse(0);
            held = Optional.of(all.get(Math.floorMod(Math.max(0, at) + by, all.size())));
            desk.editing().settle();
            point(held.get().nm());
        }
    }
}
