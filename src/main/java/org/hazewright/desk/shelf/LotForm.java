package org.hazewright.desk.shelf;

import java.util.LinkedHashMap;
import java.util.Map;
import java.util.Optional;
import javafx.scene.control.Button;
import javafx.scene.control.Label;
import javafx.scene.layout.GridPane;
import javafx.scene.layout.VBox;
import org.hazewright.desk.model.ShelfRoom;
import org.hazewright.desk.parts.Field;
import org.hazewright.desk.parts.Say;
import org.hazewright.desk.parts.Word;
import org.hazewright.files.LotWriter;
import org.hazewright.shelf.Ingredient;

/** Puts a new bottle of an ingredient on the shelf. */
final class LotForm extends VBox {
    private final ShelfRoom room;
    private final Map<String, String> typed = new LinkedHashMap<>();
    private final Map<String, Field> fields = new LinkedHashMap<>();
    private final VBox form = new VBox();
    private final Label wrong = Say.wrapped("", "error-line");
    private Ingredient parent;

    LotForm(ShelfRoom room) {
        this.room = room;
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
        form.getChildren().addAll(grid, wrong, add);
        Say.show(form, false);
        getChildren().addAll(new Word("add a lot of it…", () -> Say.show(form, !form.isVisible())), form);
    }

    void of(Ingredient i) {
        if (!i.equals(parent)) typed.clear();
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

    private void add() {
        Optional<String> words = room.addLot(
                parent,
                typed.getOrDefault("number", ""),
                typed.getOrDefault("received", ""),
                typed.getOrDefault("use by", ""),
                typed.getOrDefault("absorption known to", ""),
                typed.getOrDefault("scattering known to", ""));
        wrong.setText(words.map(w -> "✕ " + w).orElse(""));
        Say.show(wrong, words.isPresent());
        if (words.isEmpty()) Say.show(form, false);
    }
}
