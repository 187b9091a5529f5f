package org.hazewright.desk;

import javafx.scene.input.KeyCode;
import javafx.scene.input.KeyEvent;
import javafx.scene.layout.GridPane;
import javafx.scene.layout.HBox;
import javafx.scene.layout.StackPane;
import javafx.scene.layout.VBox;
import org.hazewright.desk.look.Keys;
import org.hazewright.desk.parts.Say;
import org.hazewright.desk.parts.Word;

/** The list of keys, over everything else until it is put away. */
final class KeysView extends StackPane {

    KeysView(Runnable leave) {
        getStyleClass().add("balance-view");
        GridPane grid = new GridPane();
        grid.getStyleClass().add("keys-grid");
        for (Keys.Key k : Keys.ALL) grid.addRow(grid.getRowCount(), Say.label(k.key(), "strong"), Say.label(k.does()));
        HBox head = new HBox(Say.label("Keys", "title"), Say.spring(), new Word("Esc: back", leave));
        VBox all = new VBox(head, grid);
        all.getStyleClass().addAll("place", "gap-l");
        all.setMaxWidth(USE_PREF_SIZE);
        all.setMaxHeight(USE_PREF_SIZE);
        getChildren().add(all);
        addEventFilter(KeyEvent.KEY_PRESSED, e -> {
            if (e.getCode() != KeyCode.ESCAPE && e.getCode() != KeyCode.F1) return;
            leave.run();
            e.consume();
        });
    }
}
