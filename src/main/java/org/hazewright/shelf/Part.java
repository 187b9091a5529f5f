package org.hazewright.shelf;

/** The part an ingredient plays in a phantom. */
public enum Part {
    BASE,
    ABSORBER,
    SCATTERER,
    MODIFIER;

    public String word() {
        return name().toLowerCase(java.util.Locale.ROOT);
    }
}
