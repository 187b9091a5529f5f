package org.hazewright.desk;

import java.nio.file.Path;
import java.util.Optional;
import org.hazewright.desk.parts.Chooser;

/** Chooses what a test planned, once. */
final class PlannedChooser implements Chooser {
    private Path next;

    void next(Path path) {
        next = path;
    }

    private Optional<Path> take() {
        Path taken = next;
        next = null;
        return Optional.ofNullable(taken);
    }

    @Override
    public Optional<Path> open(String title, String kind, String... endings) {
        return take();
    }

    @Override
    public Optional<Path> save(String title, String name, String kind, String... endings) {
        return take();
    }

    @Override
    public Optional<Path> folder(String title) {
        return take();
    }
}
