package org.hazewright.desk;

import java.util.ArrayList;
import java.util.List;
import java.util.function.Predicate;
import javafx.scene.Node;
import javafx.scene.Parent;
import javafx.scene.control.Button;
import javafx.scene.control.Labeled;

/** Finds what stands in a window. */
final class Eyes {
    private final Window window;

    Eyes(Window window) {
        this.window = window;
    }

    /** Every visible node of some kind, in the order in which they lie in the scene. */
    List<Node> all(Predicate<Node> which) {
        return Stagehand.onUi(() -> {
            List<Node> found = new ArrayList<>();
            collect(window.stage().getScene().getRoot(), which, found);
            return found;
        });
    }

    private static void collect(Node node, Predicate<Node> which, List<Node> found) {
        if (!node.isVisible()) return;
        if (which.test(node)) found.add(node);
        if (node instanceof Parent p) p.getChildrenUnmodifiable().forEach(n -> collect(n, which, found));
    }

    Button button(String text) {
        return (Button) all(n -> n instanceof Button b
                        && b.getText() != null
                        && b.getText().contains(text))
                .stream()
                .findFirst()
                .orElseThrow(() -> new AssertionError("There is no button “" + text + "”."));
    }

    /** Whether a text stands in the window, alone or within another. */
    boolean reads(String text) {
        return !all(n -> n instanceof Labeled l
                        && l.getText() != null
                        && l.getText().contains(text))
                .isEmpty();
    }

    /** What a node is called by a screen reader: its accessible text, else its own. */
    static String name(Node n) {
        if (n.getAccessibleText() != null && !n.getAccessibleText().isBlank()) return n.getAccessibleText();
        return n instanceof Labeled l && l.getText() != null ? l.getText() : "";
    }
}
