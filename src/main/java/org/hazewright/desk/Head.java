package org.hazewright.desk;

import java.nio.file.Path;
import java.util.Optional;
import javafx.beans.binding.Bindings;
import javafx.geometry.Pos;
import javafx.scene.control.Button;
import javafx.scene.control.CheckMenuItem;
import javafx.scene.control.Label;
import javafx.scene.control.Menu;
import javafx.scene.control.MenuButton;
import javafx.scene.control.MenuItem;
import javafx.scene.control.ProgressBar;
import javafx.scene.control.SeparatorMenuItem;
import javafx.scene.input.KeyCombination;
import javafx.scene.layout.HBox;
import javafx.scene.layout.Region;
import org.hazewright.desk.look.Look;
import org.hazewright.desk.model.Desk;
import org.hazewright.desk.model.Shown;
import org.hazewright.desk.model.Words;
import org.hazewright.desk.parts.Field;
import org.hazewright.desk.parts.Say;
import org.hazewright.desk.parts.Word;

/** The head of the window: what is open, how it stands, and the way to the balance. */
final class Head extends HBox {
    private final Desk desk;
    private final Label state = Say.label("", "lands");
    private final MenuButton file = new MenuButton();

    Head(Desk desk, Look look, Deeds deeds) {
        this.desk = desk;
        getStyleClass().addAll("head", "gap-m");
        setAlignment(Pos.CENTER_LEFT);
        Field title = new Field(
                        () -> desk.edits().now() == null
                                ? ""
                                : desk.edits().now().title(),
                        desk.editing()::title,
                        false)
                .named("title of the brief")
                .styled("title")
                .fitted(6);
        desk.edits().nowProperty().addListener((p, before, now) -> title.refresh());
        file.getStyleClass().setAll("menu-word");
        file.setMnemonicParsing(false);
        file.setMinWidth(USE_PREF_SIZE);
        file.showingProperty().addListener((p, was, is) -> {
            if (is) fill(look, deeds);
        });
        file.getItems().add(new MenuItem(""));
        desk.papers().openProperty().addListener((p, before, now) -> name());
        desk.papers().changedProperty().addListener((p, before, now) -> name());
        name();
        Button balance = new Button("Stand at the balance ⏎");
        balance.getStyleClass().setAll("go");
        balance.setMinWidth(USE_PREF_SIZE);
        balance.setOnAction(e -> deeds.balance());
        balance.disableProperty()
                .bind(Bindings.createBooleanBinding(
                        () -> desk.solving().shownProperty().get() == null,
                        desk.solving().shownProperty()));
        state.setMinWidth(Region.USE_PREF_SIZE);
        getChildren()
                .addAll(
                        title,
                        state,
                        busy(),
                        Say.spring(),
                        file,
                        new Word("Shelf", deeds::shelf),
                        new Word("Logbook", deeds::logbook),
                        balance);
        desk.solving().shownProperty().addListener((p, before, now) -> state(now));
        desk.solving()
                .problemProperty()
                .addListener(
                        (p, before, now) -> state(desk.solving().shownProperty().get()));
    }

    private HBox busy() {
        ProgressBar bar = new ProgressBar();
        bar.setMinWidth(40);
        bar.setPrefWidth(90);
        bar.progressProperty()
                .bind(Bindings.createDoubleBinding(
                        () -> desk.solving().progressProperty().get() > 0
                                ? desk.solving().progressProperty().get()
                                : ProgressBar.INDETERMINATE_PROGRESS,
                        desk.solving().progressProperty()));
        bar.setAccessibleText("searching");
        HBox box = new HBox(bar, new Word("stop", desk.solving()::stop).named("stop the search"));
        box.getStyleClass().add("gap-s");
        box.setAlignment(Pos.CENTER_LEFT);
        // shown only for work that a person would notice, so that typing does not flicker
        javafx.animation.PauseTransition patience =
                new javafx.animation.PauseTransition(javafx.util.Duration.millis(600));
        patience.setOnFinished(
                e -> Say.show(box, desk.solving().searchingProperty().get()));
        Say.show(box, false);
        desk.solving().searchingProperty().addListener((p, was, is) -> {
            if (is) patience.playFromStart();
            else {
                patience.stop();
                Say.show(box, false);
            }
        });
        return box;
    }

    private void name() {
        String saved = desk.papers().changedProperty().get() ? ", changed" : "";
        file.setText(desk.papers().shownName() + saved);
        file.setAccessibleText("Files: " + file.getText() + "; press for what can be done");
    }

    private void state(Shown shown) {
        boolean problem = desk.solving().problemProperty().get().isPresent();
        if (problem || shown == null) {
            state.setText(problem ? "✕ no recipe for this brief" : "");
            state.getStyleClass().setAll("label", "missed");
            return;
        }
        state.setText(Words.state(shown.outlook()));
        state.getStyleClass().setAll("label", shown.outlook().meets() ? "lands" : "missed");
    }

    private void fill(Look look, Deeds deeds) {
        Menu recent = new Menu("Open recent");
        for (Path p : desk.remembered().recent()) {
            MenuItem item = new MenuItem(p.getFileName() + "   "
                    + Optional.ofNullable(p.getParent()).map(Path::toString).orElse(""));
            item.setMnemonicParsing(false);
            item.setOnAction(e -> deeds.open(p));
            recent.getItems().add(item);
        }
        recent.setDisable(recent.getItems().isEmpty());
        CheckMenuItem dark = new CheckMenuItem("Dark");
        dark.setSelected(look.palette().dark());
        dark.setOnAction(e -> deeds.dark(dark.isSelected()));
        file.getItems()
                .setAll(
                        item("Open…", "Shortcut+O", deeds::open),
                        recent,
                        item("New brief", "Shortcut+N", deeds::begin),
                        new SeparatorMenuItem(),
                        item("Save", "Shortcut+S", deeds::save),
                        item("Save as…", "Shortcut+Shift+S", deeds::saveAs),
                        item("Save recipe sheet…", null, deeds::saveSheet),
                        item("Save picture of the spectra…", null, deeds::savePicture),
                        item("Print…", "Shortcut+P", deeds::print),
                        new SeparatorMenuItem(),
                        undo(),
                        redo(),
                        item("Copy grams", "Shortcut+G", deeds::copyGrams),
                        item("Copy targets", "Shortcut+T", deeds::copyTargets),
                        new SeparatorMenuItem(),
                        dark,
                        item("Larger letters", "Shortcut+Plus", () -> look.larger(true)),
                        item("Smaller letters", "Shortcut+Minus", () -> look.larger(false)),
                        item("Keys", "F1", deeds::keys));
    }

    private MenuItem undo() {
        Optional<String> what = desk.edits().undoable();
        MenuItem item = item(
                "Undo" + what.map(w -> ": " + w).orElse(""),
                "Shortcut+Z",
                () -> desk.edits().undo());
        item.setDisable(what.isEmpty());
        return item;
    }

    private MenuItem redo() {
        Optional<String> what = desk.edits().redoable();
        MenuItem item = item(
                "Redo" + what.map(w -> ": " + w).orElse(""),
                "Shortcut+Shift+Z",
                () -> desk.edits().redo());
        item.setDisable(what.isEmpty());
        return item;
    }

    private static MenuItem item(String text, String key, Runnable act) {
        MenuItem item = new MenuItem(text);
        item.setMnemonicParsing(false);
        if (key != null) item.setAccelerator(KeyCombination.valueOf(key));
        item.setOnAction(e -> act.run());
        return item;
    }
}
