package org.hazewright.desk.look;

import java.util.List;

/** What keys do, in words. */
public final class Keys {
    private Keys() {}

    /** A key and what it does. */
    public record Key(String key, String does) {}

    public static final List<Key> ALL = List.of(
            new Key("F6, Shift+F6", "next place, place before"),
            new Key("Tab, Shift+Tab", "next field, field before"),
            new Key("Ctrl+Enter", "stand at the balance"),
            new Key("Ctrl+L, Ctrl+J", "the shelf, the logbook"),
            new Key("Esc", "back to the desk; in a field: the value as it was"),
            new Key("← → in the spectra", "choose a target"),
            new Key("↑ ↓ in the spectra", "move what is wanted by 1 %, with Shift by 0.1 %"),
            new Key("Ctrl+Z, Ctrl+Shift+Z", "undo, redo; at the balance: one step back"),
            new Key("Ctrl+O, Ctrl+S, Ctrl+Shift+S", "open, save, save as"),
            new Key("Ctrl+N", "new brief"),
            new Key("Ctrl+P", "print"),
            new Key("Ctrl+G, Ctrl+T", "copy the grams, copy the targets, for a spreadsheet"),
            new Key("Ctrl++, Ctrl+−", "larger, smaller letters"),
            new Key("F1", "this list"));
}
