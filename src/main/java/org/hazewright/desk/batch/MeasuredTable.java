package org.hazewright.desk.batch;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import javafx.scene.control.Button;
import javafx.scene.control.Label;
import javafx.scene.layout.FlowPane;
import javafx.scene.layout.GridPane;
import javafx.scene.layout.Region;
import javafx.scene.layout.VBox;
import org.hazewright.batch.Batch;
import org.hazewright.batch.Measurement;
import org.hazewright.bench.Answer;
import org.hazewright.brief.Point;
import org.hazewright.desk.model.MadeBatch;
import org.hazewright.desk.model.Words;
import org.hazewright.desk.parts.Chooser;
import org.hazewright.desk.parts.Field;
import org.hazewright.desk.parts.Gauge;
import org.hazewright.desk.parts.Say;
import org.hazewright.desk.parts.Word;
import org.hazewright.learning.MeasuredValue;
import org.hazewright.learning.Quantity;
import org.hazewright.optics.Figures;

/** Where a batch lands, target by target, and beside it what was measured; values are typed into the last columns. */
public final class MeasuredTable extends VBox {
    private final MadeBatch made;
    private final GridPane grid = new GridPane();
    private final Map<String, String> typed = new HashMap<>();
    private final Map<String, Field> fields = new HashMap<>();
    private final Map<String, Gauge> gauges = new HashMap<>();
    private final Map<String, Gauge> measuredGauges = new HashMap<>();
    private final Map<String, Label> values = new HashMap<>();
    private final Map<String, Label> last = new HashMap<>();
    private String method = "";
    private String instrument = "";

    MeasuredTable(MadeBatch made, Chooser chooser) {
        this.made = made;
        getStyleClass().add("gap-m");
        grid.getStyleClass().add("measured-grid");
        grid.addRow(
                0,
                small("nm"),
                small(""),
                small("wanted /cm"),
                small("as made"),
                small("lands"),
                small("measured"),
                small(""),
                small("new /cm"),
                small("± u"));
        int row = 1;
        double before = Double.NaN;
        for (Point p : made.points()) {
            row(p, row++, p.wavelengthNm() != before);
            before = p.wavelengthNm();
        }
        Field how = new Field(() -> method, text -> keep(() -> method = text), true)
                .named("how it was measured")
                .styled("boxed")
                .columns(16);
        how.setPromptText("how: time-resolved fit");
        Field with = new Field(() -> instrument, text -> keep(() -> instrument = text), true)
                .named("with which instrument")
                .styled("boxed")
                .columns(16);
        with.setPromptText("which instrument");
        Button take = new Button("Take these values");
        take.getStyleClass().setAll("plain");
        take.setOnAction(e -> take());
        Word fromFile = new Word(
                "from a file…",
                () -> chooser.open("Measured values", "Tables", ".csv", ".txt", ".xlsx")
                        .ifPresent(p -> made.measuredFrom(p, method, instrument)));
        FlowPane line = new FlowPane(how, with, take, fromFile);
        line.getStyleClass().add("cards");
        getChildren().addAll(grid, line);
        Say.show(line, !made.points().isEmpty());
        if (made.points().isEmpty())
            getChildren()
                    .add(Say.wrapped(
                            "This batch was opened without its brief, so there are no targets to land on.", "quiet"));
        made.seenProperty().addListener((p, was, now) -> show());
        made.batchProperty().addListener((p, was, now) -> show());
        show();
    }

    private static Label small(String text) {
        Label l = Say.label(text, "quiet", "small");
        l.setMinWidth(Region.USE_PREF_SIZE);
        return l;
    }

    private static Optional<String> keep(Runnable run) {
        run.run();
        return Optional.empty();
    }

    private static String key(Point p) {
        return p.quantity() + " " + p.wavelengthNm();
    }

    private void row(Point p, int row, boolean first) {
        Gauge gauge = new Gauge();
        Gauge measured = new Gauge();
        gauge.getStyleClass().add("in-batch");
        measured.getStyleClass().add("in-batch");
        Label value = Say.label("", "lands");
        Label was = Say.label("");
        String where = Words.of(p);
        Field v = field("v " + key(p), "measured " + where + " in per cm");
        Field u = field("u " + key(p), "its standard uncertainty, " + where);
        u.setPromptText("3 %");
        gauges.put(key(p), gauge);
        measuredGauges.put(key(p), measured);
        values.put(key(p), value);
        last.put(key(p), was);
        for (Region r : List.of(value, was)) r.setMinWidth(Region.USE_PREF_SIZE);
        Label at = Say.label(first ? Figures.plain(p.wavelengthNm()) : "", "strong");
        Label sign = Say.label(Words.sign(p.quantity()), "wanted");
        Label wanted = Say.label(Figures.significant(p.wantedPerCm(), 4), "wanted");
        for (Label l : List.of(at, sign, wanted)) l.setMinWidth(Region.USE_PREF_SIZE);
        for (Region r : List.of(v, u)) r.setMinWidth(Region.USE_PREF_SIZE);
        grid.addRow(row, at, sign, wanted, value, gauge, was, measured, v, u);
    }

    private Field field(String key, String name) {
        Field f = new Field(() -> typed.getOrDefault(key, ""), text -> keep(() -> typed.put(key, text)), true)
                .named(name)
                .styled("boxed")
                .columns(5);
        fields.put(key, f);
        return f;
    }

    private void show() {
        MadeBatch.Seen seen = made.seenProperty().get();
        if (seen != null)
            for (Answer.Predicted p : seen.landing()) {
                gauges.get(key(p.point())).land(p.miss());
                values.get(key(p.point())).setText(Words.predicted(p));
                values.get(key(p.point()))
                        .setTooltip(new javafx.scene.control.Tooltip(Words.value(p.perCm(), p.uPerCm()) + " /cm"));
            }
        Batch b = made.batchProperty().get();
        if (b.measured().isEmpty()) {
            last.values().forEach(l -> l.setText(""));
            measuredGauges.values().forEach(g -> Say.show(g, false));
            return;
        }
        Measurement m = b.measured().get(b.measured().size() - 1);
        for (Point p : made.points()) {
            Optional<MeasuredValue> v = m.values().stream()
                    .filter(x -> x.wavelengthNm() == p.wavelengthNm()
                            && (x.quantity() == Quantity.ABSORPTION) == (p.quantity() == Point.Quantity.MUA))
                    .findFirst();
            last.get(key(p))
                    .setText(v.map(x -> Figures.fixed(x.perCm(), Figures.decimalsFor(Math.max(x.uPerCm(), 1e-9))))
                            .orElse("–"));
            Say.show(measuredGauges.get(key(p)), v.isPresent());
            v.ifPresent(x -> measuredGauges.get(key(p)).land(p.miss(x.perCm())));
        }
    }

    private void take() {
        List<MadeBatch.Entry> entries = new ArrayList<>();
        for (Point p : made.points())
            entries.add(new MadeBatch.Entry(
                    p.wavelengthNm(),
                    p.quantity(),
                    typed.getOrDefault("v " + key(p), ""),
                    typed.getOrDefault("u " + key(p), "")));
        if (made.measured(method, instrument, entries).isEmpty()) {
            typed.clear();
            fields.values().forEach(Field::refresh);
        }
    }
}
