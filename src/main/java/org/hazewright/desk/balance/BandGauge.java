package org.hazewright.desk.balance;

import java.util.Optional;
import javafx.scene.AccessibleRole;
import javafx.scene.layout.Pane;
import javafx.scene.layout.Region;
import javafx.scene.shape.Circle;
import javafx.scene.shape.Line;
import javafx.scene.shape.LineTo;
import javafx.scene.shape.MoveTo;
import javafx.scene.shape.Path;
import javafx.scene.shape.Rectangle;
import javafx.scene.text.Text;
import org.hazewright.brief.Balance;
import org.hazewright.desk.model.AtBalance;
import org.hazewright.desk.model.Words;

/** The grams allowed, as an amber bracket on a rail, and the reading as a point on it; outside, the point is a cross. */
final class BandGauge extends Pane {
    private final Line rail = new Line();
    private final Rectangle inside = new Rectangle();
    private final Path low = new Path();
    private final Path high = new Path();
    private final Circle point = new Circle();
    private final Path cross = new Path();
    private final Text lowText = new Text();
    private final Text highText = new Text();
    private Optional<AtBalance.Band> band = Optional.empty();
    private Optional<Double> reading = Optional.empty();
    private Balance balance = Balance.USUAL;

    BandGauge() {
        rail.getStyleClass().add("band-rail");
        inside.getStyleClass().add("band-inside");
        low.getStyleClass().add("band-bracket");
        high.getStyleClass().add("band-bracket");
        point.getStyleClass().add("gauge-point");
        cross.getStyleClass().add("band-cross");
        lowText.getStyleClass().add("band-text");
        highText.getStyleClass().add("band-text");
        getChildren().addAll(rail, inside, low, high, point, cross, lowText, highText);
        getChildren().forEach(n -> n.setManaged(false));
        getStyleClass().add("band-gauge");
        setAccessibleRole(AccessibleRole.TEXT);
        setMinHeight(Region.USE_PREF_SIZE);
    }

    void show(Optional<AtBalance.Band> allowed, Optional<Double> read, Balance balance) {
        band = allowed;
        reading = read;
        this.balance = balance;
        setAccessibleText(allowed.map(b -> "allowed from " + Words.grams(b.lowG(), balance) + " to "
                        + Words.grams(b.highG(), balance) + " g"
                        + read.map(r -> r < b.lowG()
                                        ? "; the reading is below"
                                        : r > b.highG() ? "; the reading is above" : "; the reading is inside")
                                .orElse(""))
                .orElse("no band known"));
        requestLayout();
    }

    @Override
    protected void layoutChildren() {
        getChildren().forEach(n -> n.setVisible(false));
        if (band.isEmpty()) return;
        AtBalance.Band b = band.get();
        double w = getWidth();
        double em = lowText.getFont().getSize();
        double y = 2 * em;
        rail.setStartX(0.4 * em);
        rail.setEndX(w - 0.4 * em);
        rail.setStartY(y);
        rail.setEndY(y);
        double middle = (b.lowG() + b.highG()) / 2;
        double half = Math.max(1e-9, (b.highG() - b.lowG()) / 2);
        double unit = w * 0.155 / half;
        double lowX = w / 2 - half * unit;
        double highX = w / 2 + half * unit;
        inside.setX(lowX);
        inside.setWidth(highX - lowX);
        inside.setY(y - 0.3 * em);
        inside.setHeight(0.6 * em);
        bracket(low, lowX, y, 1.1 * em, 0.4 * em);
        bracket(high, highX, y, 1.1 * em, -0.4 * em);
        text(lowText, Words.grams(b.lowG(), balance), lowX, y + 2.6 * em);
        text(highText, Words.grams(b.highG(), balance), highX, y + 2.6 * em);
        rail.setVisible(true);
        inside.setVisible(true);
        low.setVisible(true);
        high.setVisible(true);
        reading.ifPresent(r -> {
            double x = Math.max(1.2 * em, Math.min(w - 1.2 * em, w / 2 + (r - middle) * unit));
            boolean ok = r >= b.lowG() - 1e-9 && r <= b.highG() + 1e-9;
            double radius = 0.8 * em;
            point.setCenterX(x);
            point.setCenterY(y);
            point.setRadius(radius);
            point.setVisible(ok);
            cross.getElements()
                    .setAll(
                            new MoveTo(x - radius, y - radius),
                            new LineTo(x + radius, y + radius),
                            new MoveTo(x - radius, y + radius),
                            new LineTo(x + radius, y - radius));
            cross.setVisible(!ok);
        });
    }

    private static void text(Text t, String words, double x, double y) {
        t.setText(words);
        t.setX(x - t.getLayoutBounds().getWidth() / 2);
        t.setY(y);
        t.setVisible(true);
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
