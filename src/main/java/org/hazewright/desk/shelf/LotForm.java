package org.hazewright.desk.shelf;

import java.util.LinkedHashMap;
import java.util.Map;
import java.util.Optional;
import javafx.scene.control.Button;
import javafx.scene.control.Label;
import javafx.scene.layout.GridPane;
import javafx.scene.layout.VBox;
import org.hazewright.desk.model.Adding;
import org.hazewright.desk.parts.Chooser;
import org.hazewright.desk.parts.Field;
import org.hazewright.desk.parts.Say;
import org.hazewright.desk.parts.Word;
import org.hazewright.files.LotWriter;
import org.hazewright.shelf.Ingredient;

/** Puts a new bottle of an ingredient on the shelf. */
final class LotForm extends VBox {
    private final Adding adding;
    private final Chooser chooser;
    private final VBox found = new VBox();
    private final Map<String, String> typed = new LinkedHashMap<>();
    private final Map<String, Field> fields = new LinkedHashMap<>();
    private final VBox form = new VBox();
    private final Label wrong = Say.wrapped("", "error-line");
    private Ingredient parent;

    LotForm(Adding adding, Chooser chooser) {
        this.adding = adding;
        this.chooser = chooser;
        getStyleClass().add("gap-s");
        GridPane grid = new GridPane();
        grid.getStyleClass().add("form");
        ask(grid, "number", "as on the bottle");
        ask(grid, "received", "2026-03-31");
        ask(grid, "use by", "2027-03-31");
        ask(grid, "absorption known to", "5 %");
        ask(grid, "scattering known to", "3 %");
        Button add = new Button("Put it on the shelf");
        add.getStyleClass().setAll("plain");
        add.setOnAction(e -> add());
        Say.show(wrong, false);
        form.getStyleClass().addAll("soft-box", "gap-s");
        found.getStyleClass().add("gap-s");
        form.getChildren()
                .addAll(grid, wrong, add, new Word("measured as a dilution series in water…", this::series), found);
        adding.fittedProperty().addListener((p, before, now) -> found());
        Say.show(form, false);
        getChildren().addAll(new Word("add a lot of it…", () -> Say.show(form, !form.isVisible())), form);
    }

    void of(Ingredient i) {
        if (!i.equals(parent)) {
            typed.clear();
            found.getChildren().clear();
        }
        parent = i;
        Say.show(this, LotWriter.canBeLot(i));
        fields.values().forEach(Field::refresh);
    }

    private void ask(GridPane grid, String what, String prompt) {
        Field f = new Field(
                        () -> typed.getOrDefault(what, ""),
                        text -> {
                            typed.put(what, text);
                            return Optional.empty();
                        },
                        true)
                .named("lot: " + what)
                .styled("boxed")
                .columns(10);
        f.setPromptText(prompt);
        fields.put(what, f);
        grid.addRow(grid.getRowCount(), Say.quiet(what), f);
    }

    /** Fits a series to the lot whose number is typed. */
    private void series() {
        chooser.open("Choose a dilution series", "Dilution series", ".csv", ".xlsx")
                .ifPresent(file -> adding.fit(parent, typed.getOrDefault("number", ""), file, this::say));
    }

    private void found() {
        found.getChildren().clear();
        adding.fittedProperty().get().filter(f -> f.parent().equals(parent)).ifPresent(f -> {
            say("");
            f.says().forEach(s -> found.getChildren().add(Say.wrapped(s)));
            f.minds().forEach(m -> found.getChildren().add(Say.wrapped("✕ " + m, "missed")));
            Button put = new Button("Put this measured lot on the shelf");
            put.getStyleClass().setAll("plain");
            put.setOnAction(e -> {
                Optional<String> words = adding.addFitted();
                say(words.orElse(""));
                if (words.isEmpty()) Say.show(form, false);
            });
            found.getChildren().add(put);
        });
    }

    private void say(String words) {
        wrong.setText(words.isEmpty() ? "" : "✕ " + words);
        Say.show(wrong, !words.isEmpty());
    }

    private void add() {
        Optional<String> words = adding.addLot(
                parent,
                typed.getOrDefault("number", ""),
                typed.getOrDefault("received", ""),
                typed.getOrDefault("use by", ""),
                typed.getOrDefault("absorption known to", ""),
                typed.getOrDefault("scattering known to", ""));
        say(words.orElse(""));
        if (words.isEmpty()) Say.show(form, false);
    }
}
