package org.hazewright.shelf;

/** What a base is, and so what mixes into it. */
public enum Family {
    LIQUID,
    GEL,
    SILICONE,
    RESIN;

    public String word() {
        return name().toLowerCase(java.util.Locale.ROOT);
    }
}
