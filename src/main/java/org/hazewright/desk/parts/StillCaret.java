package org.hazewright.desk.parts;

import javafx.application.Platform;
import javafx.scene.control.TextField;
import javafx.scene.control.skin.TextInputControlSkin;
import javafx.scene.input.KeyEvent;

/** A cursor that does not blink: a blinking one keeps the whole window drawing sixty times a second while nobody types. */
public final class StillCaret {
    private StillCaret() {}

    public static void in(TextField field) {
        Runnable still = () -> {
            if (field.getSkin() instanceof TextInputControlSkin<?> skin) skin.setCaretAnimating(false);
        };
        Runnable soon = () -> Platform.runLater(still);
        field.focusedProperty().addListener((p, was, is) -> soon.run());
        field.skinProperty().addListener((p, was, is) -> soon.run());
        field.caretPositionProperty().addListener((p, was, is) -> soon.run());
        field.addEventHandler(KeyEvent.ANY, e -> soon.run());
    }
}
