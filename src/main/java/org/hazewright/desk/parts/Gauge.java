package org.hazewright.desk.parts;

import javafx.beans.property.DoubleProperty;
import javafx.beans.property.SimpleDoubleProperty;
import javafx.scene.AccessibleRole;
import javafx.scene.layout.Region;
import javafx.scene.shape.Circle;
import javafx.scene.shape.Line;
import javafx.scene.shape.LineTo;
import javafx.scene.shape.MoveTo;
import javafx.scene.shape.Path;
import org.hazewright.desk.model.Words;

/**
 * The landing gauge: an amber bracket for the tolerance, a teal point for where the prediction lands; outside the bracket the point is a
 * brick cross.
 */
public final class Gauge extends Region {
    /** How far out a miss is still drawn to scale, half-widths; beyond, the cross stands at the end. */
    private static final double REACH = 1.6;

    private final DoubleProperty miss = new SimpleDoubleProperty(Double.NaN);
    private final Line rail = new Line();
    private final Path low = new Path();
    private final Path high = new Path();
    private final Circle point = new Circle();
    private final Path cross = new Path();

    public Gauge() {
        getStyleClass().add("gauge");
        rail.getStyleClass().add("gauge-rail");
        low.getStyleClass().add("gauge-bracket");
        high.getStyleClass().add("gauge-bracket");
        point.getStyleClass().add("gauge-point");
        cross.getStyleClass().add("gauge-cross");
        getChildren().addAll(rail, low, high, point, cross);
        getChildren().forEach(n -> n.setManaged(false));
        setAccessibleRole(AccessibleRole.TEXT);
        miss.addListener((p, before, now) -> {
            say();
            place(); // nothing else moves, so no layout is asked for
        });
        say();
    }

    /** Signed miss in half-widths; NaN shows the bracket alone. */
    public DoubleProperty missProperty() {
        return miss;
    }

    public void land(double at) {
        miss.set(at);
    }

    private void say() {
        double m = miss.get();
        setAccessibleText(Double.isNaN(m) ? "no prediction yet" : "lands " + Words.landing(m));
    }

    @Override
    protected double computePrefWidth(double height) {
        return 96;
    }

    @Override
    protected double computePrefHeight(double width) {
        return 16;
    }

    @Override
    protected double computeMinWidth(double height) {
        return 48;
    }

    @Override
    protected void layoutChildren() {
        place();
    }

    private void place() {
        double w = getWidth();
        double h = getHeight();
        double y = Math.rint(h / 2) + 0.5;
        double size = Math.min(h, w / 4);
        double r = Math.max(2.5, size * 0.24);
        double unit = (w / 2 - r) / REACH;
        double middle = w / 2;
        rail.setStartX(0);
        rail.setEndX(w);
        rail.setStartY(y);
        rail.setEndY(y);
        double arm = size * 0.36;
        double hook = Math.max(3, size * 0.26);
        bracket(low, middle - unit, y, arm, hook);
        bracket(high, middle + unit, y, arm, -hook);
        double m = miss.get();
        boolean known = !Double.isNaN(m);
        boolean inside = Math.abs(m) <= 1;
        point.setVisible(known && inside);
        cross.setVisible(known && !inside);
        if (!known) return;
        double x = middle + Math.max(-REACH, Math.min(REACH, m)) * unit;
        point.setCenterX(x);
        point.setCenterY(y);
        point.setRadius(r);
        cross.getElements()
                .setAll(
                        new MoveTo(x - r, y - r),
                        new LineTo(x + r, y + r),
                        new MoveTo(x - r, y + r),
                        new LineTo(x + r, y - r));
    }

    private static void bracket(Path path, double x, double y, double arm, double hook) {
        path.getElements()
                .setAll(
                        new MoveTo(x + hook, y - arm),
                        new LineTo(x, y - arm),
                        new LineTo(x, y + arm),
                        new LineTo(x + hook, y + arm));
    }
}
