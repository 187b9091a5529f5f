package org.hazewright.desk;

import java.util.Optional;
import javafx.scene.layout.HBox;
import javafx.scene.layout.StackPane;
import javafx.scene.layout.VBox;
import org.hazewright.desk.model.Desk;
import org.hazewright.desk.model.ShelfState;
import org.hazewright.desk.parts.Chooser;
import org.hazewright.desk.parts.Say;
import org.hazewright.desk.parts.Word;

/** What stands in the window when there is no shelf to work from: why, and what can be done. */
final class NoShelf extends StackPane {
    private final HBox ways;

    NoShelf(Desk desk, ShelfState shelf, Chooser chooser) {
        VBox box = new VBox(
                Say.label("There is no shelf to work from", "headline"),
                Say.wrapped(shelf.problem().orElse("")),
                Say.wrapped(
                        "A shelf is a folder with one file for each ingredient; a recipe is made of what is on it.",
                        "quiet"));
        for (String words :
                shelf.refused().subList(0, Math.min(8, shelf.refused().size())))
            box.getChildren().add(Say.wrapped("✕ " + words, "missed"));
        ways = new HBox();
        ways.getStyleClass().add("gap-m");
        if (shelf.folder().isPresent()) {
            ways.getChildren()
                    .add(new Word("use the shelf of the program", () -> desk.useShelf(Optional.empty()))
                            .styled("strong"));
            ways.getChildren().add(new Word("read it again", desk::readShelfAgain).styled("strong"));
        }
        ways.getChildren()
                .add(new Word(
                                "choose a folder…",
                                () -> chooser.folder("Choose the folder of a shelf")
                                        .ifPresent(p -> desk.useShelf(Optional.of(p))))
                        .styled("strong"));
        box.getChildren().add(ways);
        box.getStyleClass().addAll("place", "gap-m");
        box.getStyleClass().add("no-shelf");
        getChildren().add(box);
    }

    void focusFirst() {
        ways.getChildren().get(0).requestFocus();
    }
}
