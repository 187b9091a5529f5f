package org.hazewright.desk.brief;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.function.BiFunction;
import java.util.function.ToDoubleFunction;
import javafx.geometry.Pos;
import javafx.scene.layout.FlowPane;
import javafx.scene.layout.HBox;
import javafx.scene.layout.VBox;
import org.hazewright.brief.Mould;
import org.hazewright.desk.model.Desk;
import org.hazewright.desk.model.Draft;
import org.hazewright.desk.model.Typed;
import org.hazewright.desk.parts.ErrorLine;
import org.hazewright.desk.parts.Field;
import org.hazewright.desk.parts.Say;
import org.hazewright.desk.parts.Word;
import org.hazewright.optics.Figures;
import org.hazewright.optics.Refusal;

/** The moulds that a batch is to fill: inner sizes in mm, and how many of each; the batch is their volume. */
final class MouldPanel extends VBox {
    private final Desk desk;
    private final VBox rows = new VBox();
    private List<Mould.Shape> drawn = List.of();
    private final List<Field> fields = new ArrayList<>();

    MouldPanel(Desk desk) {
        this.desk = desk;
        getStyleClass().addAll("soft-box", "gap-s");
        rows.getStyleClass().add("gap-s");
        FlowPane add = new FlowPane(
                new Word("+ box", () -> add(new Mould(Mould.Shape.BOX, 100, 60, 20, 1))),
                new Word("+ cylinder", () -> add(Mould.cylinder(50, 40, 1))));
        add.getStyleClass().add("flow");
        getChildren().addAll(Say.label("Moulds to fill, inner sizes in mm", "strong"), rows, add);
        desk.edits().nowProperty().addListener((p, before, now) -> show(now));
        show(desk.edits().now());
    }

    private List<Mould> moulds() {
        return desk.edits().now() == null ? List.of() : desk.edits().now().moulds();
    }

    private void add(Mould m) {
        List<Mould> more = new ArrayList<>(moulds());
        more.add(m);
        desk.editing().moulds(more);
    }

    private void show(Draft draft) {
        if (draft == null) return;
        List<Mould.Shape> shapes = draft.moulds().stream().map(Mould::shape).toList();
        if (!shapes.equals(drawn)) {
            rows.getChildren().clear();
            fields.clear();
            for (int k = 0; k < shapes.size(); k++) rows.getChildren().add(row(k, shapes.get(k)));
        }
        drawn = shapes;
        fields.forEach(Field::refresh);
    }

    private VBox row(int k, Mould.Shape shape) {
        boolean box = shape == Mould.Shape.BOX;
        Field count = field(
                k,
                Mould::count,
                (m, v) -> new Mould(m.shape(), m.lengthMm(), m.widthMm(), m.heightMm(), whole(v)),
                "count");
        Field length = field(
                k,
                Mould::lengthMm,
                (m, v) -> new Mould(m.shape(), v, box ? m.widthMm() : v, m.heightMm(), m.count()),
                box ? "length in mm" : "diameter in mm");
        Field width = field(
                k,
                Mould::widthMm,
                (m, v) -> new Mould(m.shape(), m.lengthMm(), v, m.heightMm(), m.count()),
                "width in mm");
        Field height = field(
                k,
                Mould::heightMm,
                (m, v) -> new Mould(m.shape(), m.lengthMm(), m.widthMm(), v, m.count()),
                "height in mm");
        HBox line = new HBox(count, Say.quiet(box ? "boxes" : "cylinders ⌀"), length);
        if (box) line.getChildren().addAll(Say.quiet("×"), width);
        line.getChildren().addAll(Say.quiet("×"), height, new Word("×", () -> remove(k)).named("remove this mould"));
        line.setAlignment(Pos.BASELINE_LEFT);
        return new VBox(line, new ErrorLine(count, length, width, height));
    }

    private static int whole(double v) {
        if (v != Math.rint(v)) throw new Refusal("How many is a whole number.");
        return (int) v;
    }

    private void remove(int k) {
        List<Mould> fewer = new ArrayList<>(moulds());
        fewer.remove(k);
        desk.editing().moulds(fewer);
    }

    private Field field(int k, ToDoubleFunction<Mould> value, BiFunction<Mould, Double, Mould> with, String name) {
        Field f = new Field(
                        () -> k < moulds().size() ? Figures.plain(value.applyAsDouble(moulds().get(k))) : "",
                        text -> change(k, text, with),
                        true)
                .named("mould: " + name)
                .fitted(1);
        fields.add(f);
        return f;
    }

    private Optional<String> change(int k, String text, BiFunction<Mould, Double, Mould> with) {
        try {
            List<Mould> all = new ArrayList<>(moulds());
            all.set(k, with.apply(all.get(k), Typed.number(text, "mm")));
            return desk.editing().moulds(all);
        } catch (Refusal refusal) {
            return Optional.of(refusal.getMessage());
        }
    }
}
