package org.hazewright.desk;

import java.io.File;
import java.util.List;
import java.util.Optional;
import java.util.function.Predicate;
import javafx.scene.Node;
import javafx.scene.Parent;
import javafx.scene.Scene;
import javafx.scene.control.ScrollPane;
import javafx.scene.input.KeyCode;
import javafx.scene.input.KeyCodeCombination;
import javafx.scene.input.KeyCombination;
import javafx.scene.input.TransferMode;
import org.hazewright.desk.look.Look;
import org.hazewright.desk.model.Desk;
import org.hazewright.desk.model.Edits;

/** What keys do anywhere in the window, and files that are dropped on it. */
final class KeysAndDrops {
    private final Window window;
    private final Desk desk;
    private final Deeds deeds;

    KeysAndDrops(Window window, Desk desk, Deeds deeds) {
        this.window = window;
        this.desk = desk;
        this.deeds = deeds;
    }

    void on(Scene scene, Look look) {
        keys(scene, look);
        drops(scene);
    }

    private void keys(Scene scene, Look look) {
        on(scene, "Shortcut+O", deeds::open);
        on(scene, "Shortcut+N", deeds::begin);
        on(scene, "Shortcut+S", deeds::save);
        on(scene, "Shortcut+Shift+S", deeds::saveAs);
        on(scene, "Shortcut+P", deeds::print);
        on(scene, "Shortcut+G", deeds::copyGrams);
        on(scene, "Shortcut+T", deeds::copyTargets);
        on(scene, "Shortcut+Plus", () -> look.larger(true));
        on(scene, "Shortcut+Equals", () -> look.larger(true));
        on(scene, "Shortcut+Minus", () -> look.larger(false));
        on(scene, "F1", deeds::keys);
        on(scene, "Shortcut+Enter", deeds::balance);
        on(scene, "Shortcut+L", deeds::shelf);
        on(scene, "Shortcut+J", deeds::logbook);
        on(scene, "F6", () -> nextPlace(1));
        on(scene, "Shift+F6", () -> nextPlace(-1));
        scene.addEventFilter(javafx.scene.input.KeyEvent.KEY_PRESSED, e -> {
            boolean undo = new KeyCodeCombination(KeyCode.Z, KeyCombination.SHORTCUT_DOWN).match(e);
            boolean redo =
                    new KeyCodeCombination(KeyCode.Z, KeyCombination.SHORTCUT_DOWN, KeyCombination.SHIFT_DOWN).match(e)
                            || new KeyCodeCombination(KeyCode.Y, KeyCombination.SHORTCUT_DOWN).match(e);
            if (!undo && !redo) return;
            e.consume();
            if (desk.weighingProperty().get().isPresent()) {
                if (undo) desk.weighingProperty().get().get().back();
                return;
            }
            desk.madeProperty().get().ifPresentOrElse(made -> step(made.edits(), undo), () -> step(desk.edits(), undo));
        });
    }

    private static void step(Edits<?> edits, boolean back) {
        if (back) edits.undo();
        else edits.redo();
    }

    private static void on(Scene scene, String keys, Runnable act) {
        scene.getAccelerators().put(KeyCombination.valueOf(keys), act);
    }

    private void drops(Scene scene) {
        scene.setOnDragOver(e -> {
            if (e.getDragboard().hasFiles()) e.acceptTransferModes(TransferMode.COPY);
            e.consume();
        });
        scene.setOnDragDropped(e -> {
            e.setDropCompleted(drop(e.getDragboard().getFiles()));
            e.consume();
        });
    }

    /** Puts the focus into the next place; a place's own first field or the plots take it. */
    private void nextPlace(int by) {
        List<Node> order = window.places();
        Node focused = window.stage().getScene().getFocusOwner();
        int at = -1;
        for (Node n = focused; n != null && at < 0; n = n.getParent()) at = order.indexOf(n);
        Node next = order.get(Math.floorMod(at < 0 ? 0 : at + by, order.size()));
        if (next == window.brief()) window.brief().focusFirst();
        else if (next.isFocusTraversable()) next.requestFocus();
        else first(next, n -> true).ifPresent(Node::requestFocus);
    }

    /** The first of some kind that takes the focus. */
    static Optional<Node> first(Node in, Predicate<Node> which) {
        boolean takes = in.isFocusTraversable() && in.isVisible() && !in.isDisabled() && !(in instanceof ScrollPane);
        if (takes && which.test(in)) return Optional.of(in);
        if (!(in instanceof Parent p) || !in.isVisible()) return Optional.empty();
        for (Node child : p.getChildrenUnmodifiable()) {
            Optional<Node> found = first(child, which);
            if (found.isPresent()) return found;
        }
        return Optional.empty();
    }

    /** Opens the first of the files that were dropped; whether there was one. */
    boolean drop(List<File> files) {
        if (files.isEmpty()) return false;
        deeds.open(files.get(0).toPath());
        return true;
    }
}
