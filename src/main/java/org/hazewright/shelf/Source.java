package org.hazewright.shelf;

import org.hazewright.optics.Refusal;

/** Where an ingredient's or a material's figures come from, and how far that may be trusted. */
public record Source(Basis basis, String citation) {

    /** What stands behind a figure; {@code PUBLISHED} and {@code MEASURED} need a citation. */
    public enum Basis {
        PUBLISHED,
        MEASURED,
        MEMORY,
        INVENTED;

        public String word() {
            return name().toLowerCase(java.util.Locale.ROOT);
        }
    }

    public Source {
        citation = citation == null ? "" : citation.strip();
        if (citation.isEmpty() && (basis == Basis.PUBLISHED || basis == Basis.MEASURED))
            throw new Refusal("A source with the basis \"" + basis.word() + "\" has no citation;"
                    + " name author, journal, volume, page and year, or who measured it and when.");
    }
}
