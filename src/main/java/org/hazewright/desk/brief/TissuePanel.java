package org.hazewright.desk.brief;

import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.stream.Collectors;
import javafx.geometry.Pos;
import javafx.scene.control.Button;
import javafx.scene.control.Label;
import javafx.scene.layout.GridPane;
import javafx.scene.layout.HBox;
import javafx.scene.layout.Priority;
import javafx.scene.layout.VBox;
import org.hazewright.brief.Tissue;
import org.hazewright.desk.model.Desk;
import org.hazewright.desk.model.Draft;
import org.hazewright.desk.model.Typed;
import org.hazewright.desk.parts.ErrorLine;
import org.hazewright.desk.parts.Field;
import org.hazewright.desk.parts.Say;
import org.hazewright.optics.Figures;
import org.hazewright.optics.Refusal;

/** A composition that fills the table of targets while it is typed. */
final class TissuePanel extends VBox {
    private static final String HOW = "Fills the table as you type. µs′ follows (λ/500 nm) to the minus scatter power.";

    private final Desk desk;
    private final Map<String, Field> fields = new LinkedHashMap<>();
    private final Map<String, String> texts = new LinkedHashMap<>();
    private final Label said = Say.wrapped("", "quiet", "small");
    private boolean own;

    TissuePanel(Desk desk) {
        this.desk = desk;
        getStyleClass().addAll("soft-box", "gap-s");
        GridPane grid = new GridPane();
        grid.getStyleClass().add("form");
        ask(grid, "wavelengths", "nm", "690, 760, 830");
        ask(grid, "haemoglobin", "µmol/L", "60");
        ask(grid, "oxygen saturation", "%", "70");
        ask(grid, "water", "% vol", "60");
        ask(grid, "fat", "% vol", "20");
        ask(grid, "µs′ at 500 nm", "/cm", "15");
        ask(grid, "scatter power", "", "1.1");
        said.setText(HOW);
        Button fill = new Button("Fill the table");
        fill.getStyleClass().setAll("plain");
        fill.setOnAction(e -> fill());
        getChildren().addAll(Say.label("Tissue-like values", "strong"), grid, fill, said);
        desk.edits().nowProperty().addListener((p, before, now) -> {
            if (before == null || now == null || before.tissue() != now.tissue()) take(now);
        });
        take(desk.edits().now());
    }

    private void ask(GridPane grid, String what, String unit, String start) {
        texts.put(what, start);
        Field field = new Field(() -> texts.get(what), text -> typed(what, text), true)
                .named(what + (unit.isEmpty() ? "" : " in " + unit))
                .styled("boxed")
                .columns(5);
        fields.put(what, field);
        int at = grid.getRowCount();
        Label name = Say.quiet(what);
        Label of = Say.label(unit, "quiet", "small");
        name.setMinWidth(USE_PREF_SIZE);
        of.setMinWidth(USE_PREF_SIZE);
        if (what.equals("wavelengths")) { // a list needs the whole width
            name.setText("at, nm");
            HBox line = new HBox(name, field);
            line.setAlignment(Pos.BASELINE_LEFT);
            line.getStyleClass().add("gap-s");
            HBox.setHgrow(field, Priority.ALWAYS);
            grid.add(line, 0, at, 3, 1);
        } else grid.addRow(at, name, field, of);
        grid.add(new ErrorLine(field), 0, at + 1, 3, 1);
    }

    /** Shows the composition of a draft that has one. */
    private void take(Draft draft) {
        if (own || draft == null || draft.tissue().isEmpty()) return;
        Tissue t = draft.tissue().get();
        texts.put(
                "wavelengths",
                java.util.Arrays.stream(t.wavelengthsNm())
                        .mapToObj(Figures::plain)
                        .collect(Collectors.joining(", ")));
        texts.put("haemoglobin", Figures.plain(t.haemoglobinUmolPerL()));
        texts.put("oxygen saturation", percent(t.saturation()));
        texts.put("water", percent(t.waterFraction()));
        texts.put("fat", percent(t.fatFraction()));
        texts.put(
                "µs′ at 500 nm",
                t.muspPerCmAt500Nm().isPresent()
                        ? Figures.plain(t.muspPerCmAt500Nm().getAsDouble())
                        : "");
        texts.put("scatter power", Figures.plain(t.scatterPower()));
        fields.values().forEach(Field::refresh);
    }

    private static String percent(double share) {
        return Figures.plain(new java.math.BigDecimal(100 * share)
                .round(new java.math.MathContext(6))
                .doubleValue());
    }

    private Optional<String> typed(String what, String text) {
        own = true;
        try {
            Map<String, String> trying = new LinkedHashMap<>(texts);
            trying.put(what, text);
            Tissue tissue = tissue(trying);
            Optional<String> wrong = desk.editing().tissue(tissue, desk.spectra());
            if (wrong.isEmpty()) texts.put(what, text);
            return wrong;
        } catch (Refusal refusal) {
            return Optional.of(refusal.getMessage().replace("[tissue] ", ""));
        } finally {
            own = false;
        }
    }

    /** Fills the table with what stands here. */
    private void fill() {
        Optional<String> wrong = typed("haemoglobin", texts.get("haemoglobin"));
        said.setText(wrong.map(w -> "✕ " + w).orElse(HOW));
    }

    private static Tissue tissue(Map<String, String> t) {
        List<Double> nm = Typed.numbers(t.get("wavelengths"), "nm");
        if (nm.isEmpty()) throw new Refusal("Type at least one wavelength.");
        for (double x : nm)
            if (x < 400 || x > 1100) throw new Refusal(Figures.plain(x) + " nm lies outside 400 to 1100 nm.");
        String musp = t.get("µs′ at 500 nm");
        return new Tissue(
                nm.stream().mapToDouble(Double::doubleValue).sorted().distinct().toArray(),
                Typed.number(t.get("haemoglobin"), "µmol/L", "umol/L", "µM", "uM"),
                Typed.percent(t.get("oxygen saturation")),
                Typed.percent(t.get("water")),
                Typed.percent(t.get("fat")),
                musp.isBlank() ? OptionalDouble.empty() : OptionalDouble.of(Typed.number(musp, "/cm")),
                Typed.number(t.get("scatter power")));
    }
}
