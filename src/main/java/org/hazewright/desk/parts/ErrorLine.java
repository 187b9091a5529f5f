package org.hazewright.desk.parts;

import javafx.beans.binding.Bindings;
import javafx.beans.binding.StringExpression;
import javafx.scene.control.Label;

/** Where a field's complaint is said, beside it; takes no room while there is none. */
public final class ErrorLine extends Label {

    /** Says the first complaint of several fields. */
    public ErrorLine(Field... fields) {
        getStyleClass().add("error-line");
        setWrapText(true);
        setMinHeight(USE_PREF_SIZE);
        StringExpression words = Bindings.createStringBinding(
                () -> {
                    for (Field f : fields)
                        if (!f.errorProperty().get().isEmpty())
                            return "✕ " + f.errorProperty().get();
                    return "";
                },
                java.util.Arrays.stream(fields).map(Field::errorProperty).toArray(javafx.beans.Observable[]::new));
        textProperty().bind(words);
        visibleProperty().bind(words.isNotEmpty());
        managedProperty().bind(visibleProperty());
    }
}
