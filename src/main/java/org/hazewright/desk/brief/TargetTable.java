package org.hazewright.desk.brief;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import javafx.css.PseudoClass;
import javafx.geometry.HPos;
import javafx.scene.Node;
import javafx.scene.control.Button;
import javafx.scene.control.Label;
import javafx.scene.layout.ColumnConstraints;
import javafx.scene.layout.GridPane;
import javafx.scene.layout.Priority;
import javafx.scene.layout.Region;
import javafx.scene.layout.VBox;
import org.hazewright.bench.Answer;
import org.hazewright.brief.Point;
import org.hazewright.desk.model.Desk;
import org.hazewright.desk.model.Draft;
import org.hazewright.desk.model.Row;
import org.hazewright.desk.model.Shown;
import org.hazewright.desk.model.Words;
import org.hazewright.desk.parts.ErrorLine;
import org.hazewright.desk.parts.Field;
import org.hazewright.desk.parts.Gauge;
import org.hazewright.desk.parts.Say;
import org.hazewright.optics.Figures;

/** The table of targets: wavelength, wanted value, tolerance and where the recipe lands, each edited where it stands. */
final class TargetTable extends VBox {
    private static final PseudoClass NEAR = PseudoClass.getPseudoClass("near");

    private final Desk desk;
    private final GridPane grid = new GridPane();
    private final Map<String, Gauge> gauges = new HashMap<>();
    private final Map<String, Field> fields = new HashMap<>();
    private List<Double> built = List.of();

    TargetTable(Desk desk) {
        this.desk = desk;
        getStyleClass().add("gap-s");
        grid.getStyleClass().add("targets");
        ColumnConstraints cross = new ColumnConstraints();
        ColumnConstraints nm = new ColumnConstraints();
        ColumnConstraints sign = new ColumnConstraints();
        ColumnConstraints wanted = new ColumnConstraints();
        ColumnConstraints allowed = new ColumnConstraints();
        ColumnConstraints lands = new ColumnConstraints();
        lands.setHgrow(Priority.ALWAYS);
        for (ColumnConstraints c : List.of(cross, nm, sign, wanted, allowed)) c.setMinWidth(Region.USE_PREF_SIZE);
        grid.getColumnConstraints().addAll(nm, sign, wanted, allowed, lands, cross);
        getChildren().add(grid);
        desk.edits().nowProperty().addListener((p, before, now) -> show(now));
        desk.solving().shownProperty().addListener((p, before, now) -> land(now));
        show(desk.edits().now());
    }

    private void show(Draft draft) {
        if (draft == null) return;
        List<Double> now = draft.rows().stream().map(Row::wavelengthNm).toList();
        if (!now.equals(built)) {
            Optional<String> focused = fields.entrySet().stream()
                    .filter(e -> e.getValue().isFocused())
                    .map(Map.Entry::getKey)
                    .findFirst();
            build(draft);
            built = now;
            focused.map(fields::get).ifPresent(Node::requestFocus);
        }
        fields.values().forEach(Field::refresh);
        land(desk.solving().shownProperty().get());
    }

    private void build(Draft draft) {
        grid.getChildren().clear();
        gauges.clear();
        fields.clear();
        Label tolerance = Say.label("±", "quiet", "small", "cell");
        Label wanted = Say.label("wanted /cm", "quiet", "small", "cell");
        Label lands = Say.label("lands", "quiet", "small");
        grid.addRow(0, Say.label("nm", "quiet", "small", "cell"), new Label(), wanted, tolerance, lands);
        Region rule = new Region();
        rule.getStyleClass().add("rule");
        grid.add(rule, 0, 1, 6, 1);
        int at = 2;
        for (Row row : draft.rows()) at = row(row.wavelengthNm(), at);
    }

    private int row(double nm, int at) {
        String shownNm = Figures.plain(nm);
        Field wavelength = new Field(() -> shownNm, text -> desk.editing().wavelength(nm, text), false)
                .named("wavelength in nm")
                .styled("strong")
                .fitted(4);
        fields.put("nm " + nm, wavelength);
        Button cross = new Button("×");
        cross.getStyleClass().setAll("cross");
        cross.setAccessibleText("remove " + shownNm + " nm");
        Label refused = Say.wrapped("", "error-line");
        Say.show(refused, false);
        cross.setOnAction(e -> desk.editing().remove(nm).ifPresent(words -> {
            refused.setText("✕ " + words);
            Say.show(refused, true);
        }));
        grid.add(wavelength, 0, at);
        grid.add(cross, 5, at);
        List<Node> ofRow = new ArrayList<>(List.of(wavelength, cross));
        List<Field> complaining = new ArrayList<>(List.of(wavelength));
        for (Point.Quantity q : Point.Quantity.values()) {
            Label sign = Say.label(Words.sign(q), "wanted");
            Field wanted = new Field(() -> wanted(nm, q), text -> desk.editing().wanted(nm, q, text), true)
                    .named("wanted " + Words.sign(q) + " at " + shownNm + " nm, per cm")
                    .styled("wanted")
                    .columns(5)
                    .onDone(() -> desk.editing().settle());
            wanted.setPromptText("–");
            Field allowed = new Field(
                            () -> allowed(nm, q), text -> desk.editing().allowed(nm, q, text), true)
                    .named("tolerance of " + Words.sign(q) + " at " + shownNm + " nm")
                    .styled("quiet")
                    .columns(4)
                    .onDone(() -> desk.editing().settle());
            allowed.setPromptText("–");
            Gauge gauge = new Gauge();
            gauge.getStyleClass().add("in-table");
            GridPane.setHalignment(gauge, HPos.RIGHT);
            grid.add(sign, 1, at);
            grid.add(wanted, 2, at);
            grid.add(allowed, 3, at);
            grid.add(gauge, 4, at);
            at++;
            gauges.put(key(nm, q), gauge);
            fields.put("wanted " + key(nm, q), wanted);
            fields.put("allowed " + key(nm, q), allowed);
            complaining.addAll(List.of(wanted, allowed));
            ofRow.addAll(List.of(sign, wanted, allowed, gauge));
        }
        for (Node n : ofRow) {
            n.hoverProperty().addListener((p, was, is) -> cross.pseudoClassStateChanged(NEAR, is));
            n.focusedProperty().addListener((p, was, is) -> cross.pseudoClassStateChanged(NEAR, is));
        }
        ErrorLine line = new ErrorLine(complaining.toArray(Field[]::new));
        grid.add(line, 0, at++, 6, 1);
        grid.add(refused, 0, at++, 6, 1);
        return at;
    }

    private static String key(double nm, Point.Quantity q) {
        return q + " " + nm;
    }

    private String wanted(double nm, Point.Quantity q) {
        return desk.edits()
                .now()
                .row(nm)
                .map(r -> r.wanted(q).isPresent() ? figure(r.wanted(q).getAsDouble()) : "")
                .orElse("");
    }

    /** At most four significant digits, as people write them; the full value stays in the brief. */
    private static String figure(double v) {
        String full = Figures.plain(v);
        return full.replaceFirst("^0?\\.0*", "").replace(".", "").length() > 5 ? Figures.significant(v, 4) : full;
    }

    private String allowed(double nm, Point.Quantity q) {
        return desk.edits()
                .now()
                .row(nm)
                .map(r -> r.wanted(q).isPresent() ? r.allowed(q).text() : "")
                .orElse("");
    }

    private void land(Shown shown) {
        Map<String, Double> misses = new HashMap<>();
        if (shown != null)
            for (Answer.Predicted p : shown.outlook().predicted())
                misses.put(key(p.point().wavelengthNm(), p.point().quantity()), p.miss());
        gauges.forEach((key, gauge) -> gauge.land(misses.getOrDefault(key, Double.NaN)));
    }

    void focusFirst() {
        if (!built.isEmpty()) wantedField(built.get(0), Point.Quantity.MUA).requestFocus();
    }

    /** The field of a wanted value, for a test to type in. */
    Field wantedField(double nm, Point.Quantity q) {
        return fields.get("wanted " + key(nm, q));
    }
}
