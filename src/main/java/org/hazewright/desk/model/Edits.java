package org.hazewright.desk.model;

import java.util.ArrayDeque;
import java.util.Deque;
import java.util.Optional;
import java.util.function.UnaryOperator;
import javafx.beans.property.ReadOnlyObjectProperty;
import javafx.beans.property.ReadOnlyObjectWrapper;

/**
 * A value that is edited, with a way back and forth: every edit is kept, up to {@value #MOST}.
 *
 * <p>Edits of the same {@code strand} in a row (the strokes of one drag, the digits of one number) are one step; {@link #settle} ends the
 * strand.
 */
public final class Edits<T> {
    private static final int MOST = 500;

    private record Kept<T>(T value, String what) {}

    private final ReadOnlyObjectWrapper<T> now = new ReadOnlyObjectWrapper<>();
    private final Deque<Kept<T>> before = new ArrayDeque<>();
    private final Deque<Kept<T>> after = new ArrayDeque<>();
    private String strand = "";

    public Edits(T start) {
        now.set(start);
    }

    public ReadOnlyObjectProperty<T> nowProperty() {
        return now.getReadOnlyProperty();
    }

    public T now() {
        return now.get();
    }

    /**
     * Makes an edit.
     *
     * @param what it does, for the words of undo: "wanted µa at 690 nm"
     * @param strand what it belongs to; "" for an edit that stands alone
     */
    public void edit(T value, String what, String strand) {
        if (value.equals(now.get())) return;
        boolean goesOn = !strand.isEmpty() && strand.equals(this.strand) && !before.isEmpty();
        if (!goesOn) {
            before.push(new Kept<>(now.get(), what));
            if (before.size() > MOST) before.removeLast();
        }
        after.clear();
        this.strand = strand;
        now.set(value);
    }

    /** The next edit begins a step of its own. */
    public void settle() {
        strand = "";
    }

    /** Takes another value and forgets the way. */
    public void startAgain(T value) {
        before.clear();
        after.clear();
        strand = "";
        now.set(value);
    }

    /** Changes the value in a way that is no edit. */
    public void rename(UnaryOperator<T> change) {
        now.set(change.apply(now.get()));
    }

    /** What undo would take back; empty when there is nothing. */
    public Optional<String> undoable() {
        return Optional.ofNullable(before.peek()).map(Kept::what);
    }

    public Optional<String> redoable() {
        return Optional.ofNullable(after.peek()).map(Kept::what);
    }

    public void undo() {
        step(before, after);
    }

    public void redo() {
        step(after, before);
    }

    private void step(Deque<Kept<T>> from, Deque<Kept<T>> to) {
        Kept<T> kept = from.poll();
        if (kept == null) return;
        to.push(new Kept<>(now.get(), kept.what()));
        strand = "";
        now.set(kept.value());
    }
}
