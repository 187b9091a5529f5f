package org.hazewright.sheet;

import java.util.List;
import org.hazewright.reading.Foreseen;

public final class ReadingPicture {
    private ReadingPicture() {}

    public static byte[] of(String title, List<Foreseen> foreseen, String fileName) {
        throw new UnsupportedOperationException();
    }
}
