package org.hazewright.files;

import java.util.function.Supplier;
import org.hazewright.optics.Refusal;

/** A spot in a file: lines and columns count from 1; line 0 is the file as a whole. */
record Place(String path, int line, int column) {

    static Place whole(String path) {
        return new Place(path, 0, 0);
    }

    FileRefusal refusal(String complaint) {
        return new FileRefusal(path, line, column, complaint);
    }

    /** What {@code maker} makes; a refusal that has no place yet gets this one. */
    <T> T of(Supplier<T> maker) {
        try {
            return maker.get();
        } catch (FileRefusal placed) {
            throw placed;
        } catch (Refusal unplaced) {
            throw new FileRefusal(path, line, column, unplaced.getMessage(), unplaced);
        }
    }
}
