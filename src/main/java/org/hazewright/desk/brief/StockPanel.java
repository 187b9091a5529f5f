package org.hazewright.desk.brief;

import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.function.Predicate;
import java.util.stream.Collectors;
import javafx.geometry.Pos;
import javafx.scene.control.Button;
import javafx.scene.control.Label;
import javafx.scene.control.MenuButton;
import javafx.scene.control.MenuItem;
import javafx.scene.layout.GridPane;
import javafx.scene.layout.HBox;
import javafx.scene.layout.VBox;
import org.hazewright.brief.StockInHand;
import org.hazewright.desk.model.Desk;
import org.hazewright.desk.model.Draft;
import org.hazewright.desk.model.Words;
import org.hazewright.desk.parts.Field;
import org.hazewright.desk.parts.Say;
import org.hazewright.desk.parts.Word;
import org.hazewright.optics.Figures;
import org.hazewright.shelf.Form;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Part;

/** The stocks that stand made already: they cost no weighing. One line each, and a form for another. */
final class StockPanel extends VBox {
    private final Desk desk;
    private final VBox rows = new VBox();
    private final Map<String, String> typed = new LinkedHashMap<>();
    private final Map<String, Field> fields = new LinkedHashMap<>();
    private final MenuButton of = new MenuButton();
    private final MenuButton in = new MenuButton();
    private final Label wrong = Say.wrapped("", "error-line");
    private String ofId = "";
    private String inId = "water";
    private List<Object> drawn = List.of();

    StockPanel(Desk desk) {
        this.desk = desk;
        getStyleClass().addAll("soft-box", "gap-s");
        rows.getStyleClass().add("gap-xs");
        GridPane grid = new GridPane();
        grid.getStyleClass().add("form");
        ask(grid, "name", "ink-1-100", "");
        choice(grid, "of", of);
        ask(grid, "amount of it", "1", "g");
        choice(grid, "in", in);
        ask(grid, "amount around it", "99", "g");
        Button add = new Button("Put it in hand");
        add.getStyleClass().setAll("plain");
        add.setOnAction(e -> add());
        Say.show(wrong, false);
        getChildren().addAll(Say.label("Stocks in hand", "strong"), rows, grid, wrong, add);
        desk.edits().nowProperty().addListener((p, before, now) -> show());
        desk.shelfProperty().addListener((p, before, now) -> show());
        show();
    }

    /** What stands ready, in a few words. */
    static String inWords(Draft draft) {
        if (draft == null || draft.stocks().isEmpty()) return "none made yet…";
        return draft.stocks().stream().map(StockInHand::id).collect(Collectors.joining(", "));
    }

    private void ask(GridPane grid, String what, String prompt, String unit) {
        Field field = new Field(
                        () -> typed.getOrDefault(what, ""),
                        text -> {
                            typed.put(what, text);
                            return Optional.empty();
                        },
                        true)
                .named("stock in hand: " + what + (unit.isEmpty() ? "" : " in " + unit))
                .styled("boxed")
                .columns(7);
        field.setPromptText(prompt);
        fields.put(what, field);
        grid.addRow(grid.getRowCount(), Say.quiet(what), field, Say.label(unit, "quiet", "small"));
    }

    private static void choice(GridPane grid, String what, MenuButton menu) {
        menu.getStyleClass().setAll("menu-word", "value");
        menu.setMnemonicParsing(false);
        menu.setAccessibleText("stock in hand: " + what + "; press to choose");
        int at = grid.getRowCount();
        grid.add(Say.quiet(what), 0, at);
        grid.add(menu, 1, at, 2, 1);
    }

    private void show() {
        Draft draft = desk.edits().now();
        if (draft == null) return;
        List<Object> now = List.of(
                draft.stocks(), draft.bases(), desk.shelfProperty().get().shelf());
        if (now.equals(drawn)) return;
        drawn = now;
        rows.getChildren().setAll(draft.stocks().stream().map(this::row).toList());
        if (draft.stocks().isEmpty())
            rows.getChildren().add(Say.wrapped("A stock that is made already costs no weighing.", "quiet", "small"));
        of.getItems().clear();
        draft.stocks().forEach(s -> of.getItems().add(item(s.id(), s.id(), of)));
        offer(of, i -> i.part() != Part.BASE);
        in.getItems().clear();
        offer(in, i -> i.form() == Form.LIQUID && !i.isBlend());
        if (ofId.isEmpty()) of.setText("choose…");
        in.setText(name(inId));
    }

    private void offer(MenuButton menu, Predicate<Ingredient> which) {
        desk.shelfProperty().get().shelf().stream()
                .flatMap(s -> s.ingredients().stream())
                .filter(which)
                .sorted(Comparator.comparing((Ingredient i) -> i.part() != Part.BASE)
                        .thenComparing(Words::shortName))
                .forEach(i -> menu.getItems().add(item(i.id(), Words.shortName(i), menu)));
    }

    private MenuItem item(String id, String name, MenuButton menu) {
        MenuItem item = new MenuItem(name);
        item.setMnemonicParsing(false);
        item.setOnAction(e -> {
            if (menu == of) ofId = id;
            else inId = id;
            menu.setText(name);
        });
        return item;
    }

    private String name(String id) {
        return desk.shelfProperty()
                .get()
                .shelf()
                .flatMap(s -> s.find(id))
                .map(Words::shortName)
                .orElse(id);
    }

    private HBox row(StockInHand s) {
        Label words = Say.wrapped(s.id() + ": " + Figures.plain(s.ingredientG()) + " g "
                + s.ingredient().map(this::name).orElseGet(() -> s.from().orElse("")) + " in "
                + Figures.plain(s.diluentG()) + " g " + name(s.diluent()));
        HBox row = new HBox(
                words,
                Say.spring(),
                new Word("×", () -> say(desk.editing().removeStock(s.id()))).named("remove the stock " + s.id()));
        row.setAlignment(Pos.TOP_LEFT);
        return row;
    }

    private void add() {
        if (ofId.isEmpty()) {
            say(Optional.of("Choose what the stock is of."));
            return;
        }
        Optional<String> words = desk.editing()
                .addStock(
                        typed.getOrDefault("name", ""),
                        ofId,
                        typed.getOrDefault("amount of it", ""),
                        inId,
                        typed.getOrDefault("amount around it", ""));
        say(words);
        if (words.isPresent()) return;
        typed.clear();
        ofId = "";
        of.setText("choose…");
        fields.values().forEach(Field::refresh);
    }

    private void say(Optional<String> words) {
        wrong.setText(words.map(w -> "✕ " + w).orElse(""));
        Say.show(wrong, words.isPresent());
    }
}
