package org.hazewright.desk.model;

import java.util.List;

/**
 * Something to tell, with what can be done about it; it stays until one of its ways is taken or it is put away.
 *
 * @param strand a newer notice of the same strand takes its place
 */
public record Notice(Kind kind, String strand, String text, List<Way> ways) {
    public enum Kind {
        TOLD,
        ASKED,
        WRONG
    }

    /** A word to press and what it does; it also puts the notice away. */
    public record Way(String word, Runnable act) {}

    public Notice {
        ways = List.copyOf(ways);
    }

    public static Notice told(String strand, String text) {
        return new Notice(Kind.TOLD, strand, text, List.of());
    }

    public static Notice wrong(String strand, String text) {
        return new Notice(Kind.WRONG, strand, text, List.of());
    }

    public static Notice asked(String strand, String text, Way... ways) {
        return new Notice(Kind.ASKED, strand, text, List.of(ways));
    }
}
