package org.hazewright.desk.parts;

import javafx.scene.control.Button;

/** A word to press: looks like text, works like a button. */
public final class Word extends Button {
    public Word(String text, Runnable act) {
        super(text);
        getStyleClass().setAll("word");
        setOnAction(e -> act.run());
        setMnemonicParsing(false);
        setMinWidth(USE_PREF_SIZE);
    }

    public Word named(String accessible) {
        setAccessibleText(accessible);
        return this;
    }

    public Word styled(String... classes) {
        getStyleClass().addAll(classes);
        return this;
    }
}
