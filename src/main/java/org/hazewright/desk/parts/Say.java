package org.hazewright.desk.parts;

import javafx.beans.binding.StringExpression;
import javafx.scene.Node;
import javafx.scene.control.Label;
import javafx.scene.layout.HBox;
import javafx.scene.layout.Priority;
import javafx.scene.layout.Region;

/** Labels of the few kinds that the window has. */
public final class Say {
    private Say() {}

    /** The name of a place, in spaced capitals. */
    public static Label place(String name) {
        return label(name.toUpperCase(java.util.Locale.ROOT).replaceAll("(?<=.)(?=.)", "\u200A"), "place-name");
    }

    public static Label heading(String text) {
        return label(text, "heading");
    }

    /** Text that stands back. */
    public static Label quiet(String text) {
        return label(text, "quiet");
    }

    public static Label label(String text, String... classes) {
        Label l = new Label(text);
        l.getStyleClass().addAll(classes);
        return l;
    }

    public static Label bound(StringExpression text, String... classes) {
        Label l = label("", classes);
        l.textProperty().bind(text);
        return l;
    }

    /** Text over several lines, never cut. */
    public static Label wrapped(String text, String... classes) {
        Label l = label(text, classes);
        l.setWrapText(true);
        l.setMinHeight(Region.USE_PREF_SIZE);
        return l;
    }

    public static Region spring() {
        Region r = new Region();
        HBox.setHgrow(r, Priority.ALWAYS);
        return r;
    }

    /** Shows a node and gives it room, or neither. */
    public static void show(Node node, boolean yes) {
        node.setVisible(yes);
        node.setManaged(yes);
    }
}
