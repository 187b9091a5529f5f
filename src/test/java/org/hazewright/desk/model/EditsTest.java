package org.hazewright.desk.model;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.Random;
import org.junit.jupiter.api.Test;

class EditsTest {
    @Test
    void everyEditGoesBackAndForth() {
        Random random = new Random(3);
        Edits<Integer> edits = new Edits<>(0);
        List<Integer> way = new ArrayList<>(List.of(0));
        for (int k = 1; k <= 100; k++) {
            int next = 1000 * k + random.nextInt(1000);
            edits.edit(next, "edit " + k, "");
            way.add(next);
        }
        for (int k = 99; k >= 0; k--) {
            edits.undo();
            assertEquals(way.get(k), edits.now());
        }
        edits.undo();
        assertEquals(0, edits.now());
        for (int k = 1; k <= 100; k++) {
            edits.redo();
            assertEquals(way.get(k), edits.now());
        }
    }

    @Test
    void oneStrandIsOneStep() {
        Edits<String> edits = new Edits<>("a");
        edits.edit("b", "drag", "box");
        edits.edit("c", "drag", "box");
        edits.settle();
        edits.edit("d", "drag", "box");
        edits.undo();
        assertEquals("c", edits.now());
        edits.undo();
        assertEquals("a", edits.now());
        assertEquals(Optional.of("drag"), edits.redoable());
    }

    @Test
    void aNewEditForgetsWhatWasUndone() {
        Edits<String> edits = new Edits<>("a");
        edits.edit("b", "x", "");
        edits.undo();
        edits.edit("c", "y", "");
        assertEquals(Optional.empty(), edits.redoable());
        edits.undo();
        assertEquals("a", edits.now());
    }
}
