package org.hazewright.shelf;

/** How an ingredient comes out of its bottle. */
public enum Form {
    LIQUID,
    POWDER,
    PASTE;

    public String word() {
        return name().toLowerCase(java.util.Locale.ROOT);
    }
}
