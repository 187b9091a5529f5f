package org.hazewright.desk.parts;

import javafx.scene.control.Label;
import javafx.scene.layout.HBox;
import javafx.scene.layout.Priority;
import org.hazewright.desk.model.Remembered;

/** A short hint of the first day; once put away it never comes back. */
public final class Hint extends HBox {
    private final Remembered remembered;
    private final String key;

    public Hint(Remembered remembered, String name, String text) {
        this.remembered = remembered;
        this.key = "hint." + name;
        getStyleClass().add("hint");
        Label words = Say.wrapped(text);
        HBox.setHgrow(words, Priority.ALWAYS);
        words.setMaxWidth(Double.MAX_VALUE);
        getChildren().addAll(words, new Word("got it", this::putAway).named("put this hint away: " + text));
        Say.show(this, !remembered.flag(key));
    }

    public void putAway() {
        if (!isVisible()) return;
        remembered.keep(key, true);
        Say.show(this, false);
    }
}
