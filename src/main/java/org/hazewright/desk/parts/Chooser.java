package org.hazewright.desk.parts;

import java.nio.file.Path;
import java.util.Optional;

/** Asks a person for a place on disk. */
public interface Chooser {
    Optional<Path> open(String title, String kind, String... endings);

    Optional<Path> save(String title, String name, String kind, String... endings);

    Optional<Path> folder(String title);
}
