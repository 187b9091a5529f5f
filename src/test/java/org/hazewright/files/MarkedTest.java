package org.hazewright.files;

import static org.junit.jupiter.api.Assertions.assertEquals;

import org.junit.jupiter.api.Test;

class MarkedTest {
    @Test
    void countsLinesAndColumnsFromOne() {
        assertEquals(new Marked("abc", 1, 1), Marked.of("▶abc"));
        assertEquals(new Marked("a\nbc", 2, 2), Marked.of("a\nb▶c"));
        assertEquals(new Marked("a", 0, 0), Marked.of("a"));
    }
}
