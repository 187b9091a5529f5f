package org.hazewright.desk.shelf;

import java.nio.file.Path;
import java.util.EnumSet;
import java.util.LinkedHashMap;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import javafx.geometry.Pos;
import javafx.scene.Node;
import javafx.scene.control.Button;
import javafx.scene.control.CheckBox;
import javafx.scene.control.Label;
import javafx.scene.control.RadioButton;
import javafx.scene.control.ToggleGroup;
import javafx.scene.layout.FlowPane;
import javafx.scene.layout.GridPane;
import javafx.scene.layout.HBox;
import javafx.scene.layout.VBox;
import org.hazewright.desk.model.Adding;
import org.hazewright.desk.parts.Chooser;
import org.hazewright.desk.parts.Field;
import org.hazewright.desk.parts.Say;
import org.hazewright.desk.parts.Word;
import org.hazewright.files.IngredientWriter;
import org.hazewright.shelf.Family;
import org.hazewright.shelf.Form;
import org.hazewright.shelf.Part;
import org.hazewright.shelf.Source;

/** Puts a new ingredient on the shelf, by form and from a file of figures. */
final class IngredientForm extends VBox {
    private final Adding adding;
    private final Map<String, String> typed = new LinkedHashMap<>();
    private final Set<Family> families = EnumSet.of(Family.LIQUID, Family.GEL);
    private final Label wrong = Say.wrapped("", "error-line");
    private final Label tableSaid = Say.quiet("no table yet");
    private Part part = Part.ABSORBER;
    private Form form = Form.LIQUID;
    private Source.Basis basis = Source.Basis.MEASURED;
    private IngredientWriter.Basis tableBasis = IngredientWriter.Basis.NEAT;
    private Optional<Path> table = Optional.empty();

    IngredientForm(Adding adding, Chooser chooser, Runnable done) {
        this.adding = adding;
        getStyleClass().add("gap-s");
        GridPane grid = new GridPane();
        grid.getStyleClass().add("form");
        Field name = ask(grid, "name", "Black ink, my bottle", 20);
        Field id = ask(grid, "id", "black-ink-mine", 20);
        name.textProperty().addListener((p, before, now) -> {
            if (!typed.getOrDefault("id", "").isEmpty() && !typed.get("id").equals(asId(before))) return;
            typed.put("id", asId(now));
            id.refresh();
        });
        choice(grid, "it is", Part.values(), part, p -> part = p);
        FlowPane into = new FlowPane();
        into.getStyleClass().add("flow");
        for (Family f : Family.values()) {
            CheckBox box = new CheckBox(f.word());
            box.setSelected(families.contains(f));
            box.setOnAction(e -> {
                if (box.isSelected()) families.add(f);
                else families.remove(f);
            });
            into.getChildren().add(box);
        }
        grid.addRow(grid.getRowCount(), called("mixes into"), into);
        choice(grid, "form", Form.values(), form, f -> form = f);
        ask(grid, "density, g/mL", "1.02", 8);
        ask(grid, "price per g", "may stay empty", 8);
        choice(grid, "figures are", Source.Basis.values(), basis, b -> basis = b);
        ask(grid, "citation", "who, where, when", 20);

        Word choose = new Word(
                        "choose a CSV file…",
                        () -> chooser.open("Table of absorption", "Tables", ".csv", ".txt", ".tsv")
                                .ifPresent(p -> {
                                    table = Optional.of(p);
                                    tableSaid.setText(p.getFileName().toString());
                                }))
                .styled("strong");
        HBox file = new HBox(choose, tableSaid);
        file.getStyleClass().add("gap-s");
        file.setAlignment(Pos.BASELINE_LEFT);
        grid.addRow(grid.getRowCount(), called("absorption"), file);
        choice(grid, "its values are", IngredientWriter.Basis.values(), tableBasis, b -> tableBasis = b);
        ask(grid, "of it scattering", "0 %", 8);
        ask(grid, "known to", "3 %", 8);
        ask(grid, "µs′, cm²/g", "may stay empty", 8);
        ask(grid, "at nm", "800", 8);
        ask(grid, "exponent", "1.2", 8);
        ask(grid, "µs′ known to", "5 %", 8);
        Say.show(wrong, false);
        Button add = new Button("Put it on the shelf");
        add.getStyleClass().setAll("go");
        add.setOnAction(e -> add(done));
        getChildren()
                .addAll(
                        Say.label("A new ingredient", "headline"),
                        Say.wrapped(
                                "The table has the wavelength in nm in its first column and the value in its second, base e.",
                                "quiet"),
                        grid,
                        wrong,
                        add,
                        new Word("leave it", done));
    }

    private static String asId(String name) {
        return name.toLowerCase(Locale.ROOT).replaceAll("[^a-z0-9]+", "-").replaceAll("^-|-$", "");
    }

    private Field ask(GridPane grid, String what, String prompt, int columns) {
        Field f = new Field(
                        () -> typed.getOrDefault(what, ""),
                        text -> {
                            typed.put(what, text);
                            return Optional.empty();
                        },
                        true)
                .named(what)
                .styled("boxed")
                .columns(columns);
        f.setPromptText(prompt);
        grid.addRow(grid.getRowCount(), called(what), f);
        return f;
    }

    /** What a row asks for; the fields give way to it. */
    private static Label called(String what) {
        Label label = Say.quiet(what);
        label.setMinWidth(USE_PREF_SIZE);
        return label;
    }

    private static <T extends Enum<T>> void choice(
            GridPane grid, String what, T[] all, T first, java.util.function.Consumer<T> take) {
        ToggleGroup group = new ToggleGroup();
        FlowPane line = new FlowPane();
        line.getStyleClass().add("flow");
        for (T t : all) {
            if (t == Part.BASE) continue;
            RadioButton b = new RadioButton(word(t));
            b.setToggleGroup(group);
            b.setSelected(t == first);
            b.setOnAction(e -> take.accept(t));
            line.getChildren().add(b);
        }
        grid.addRow(grid.getRowCount(), called(what), (Node) line);
    }

    private static String word(Enum<?> t) {
        if (t == IngredientWriter.Basis.NEAT) return "of it as bought, 1/cm";
        if (t == IngredientWriter.Basis.MASS) return "by mass, cm²/g";
        return t.name().toLowerCase(Locale.ROOT);
    }

    private String typed(String what) {
        return typed.getOrDefault(what, "");
    }

    private void add(Runnable done) {
        Optional<String> words = adding.add(new Adding.Entry(
                typed("id"),
                typed("name"),
                part,
                families,
                form,
                typed("density, g/mL"),
                typed("price per g"),
                basis,
                typed("citation"),
                typed("known to"),
                typed("µs′ known to"),
                table,
                tableBasis,
                typed("of it scattering"),
                typed("µs′, cm²/g"),
                typed("at nm"),
                typed("exponent")));
        wrong.setText(words.map(w -> "✕ " + w).orElse(""));
        Say.show(wrong, words.isPresent());
        if (words.isEmpty()) done.run();
    }
}
