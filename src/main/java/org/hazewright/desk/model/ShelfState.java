package org.hazewright.desk.model;

import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import org.hazewright.files.FileRefusal;
import org.hazewright.files.ShelfReader;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Part;
import org.hazewright.shelf.Shelf;

/**
 * The shelf as it could be read.
 *
 * @param shelf empty while it is being read and when nothing on it can be used
 * @param folder empty for the shelf that comes with the program
 * @param refused what is wrong with files that cannot be used, one message a file
 * @param problem why there is no shelf to work with, in words; empty when there is one
 */
public record ShelfState(Optional<Shelf> shelf, Optional<Path> folder, List<String> refused, Optional<String> problem) {
    public ShelfState {
        refused = List.copyOf(refused);
    }

    public static ShelfState reading(Optional<Path> folder) {
        return new ShelfState(Optional.empty(), folder, List.of(), Optional.empty());
    }

    /** Reads the shelf of a folder, or the one of the program. Never throws a {@link Refusal}. */
    public static ShelfState read(Optional<Path> folder) {
        try {
            ShelfReader.Lenient read = ShelfReader.readLenient(folder.orElse(null));
            List<String> refused =
                    read.refusals().stream().map(FileRefusal::getMessage).toList();
            boolean base = read.shelf().ingredients().stream().anyMatch(i -> i.part() == Part.BASE);
            if (base) return new ShelfState(Optional.of(read.shelf()), folder, refused, Optional.empty());
            String why = refused.isEmpty()
                    ? "holds no base, and without water, a gel, a silicone or a resin there is nothing to mix into."
                    : "holds no base that can be read; " + refused.size()
                            + (refused.size() == 1 ? " file is" : " files are") + " refused.";
            return new ShelfState(
                    Optional.empty(), folder, refused, Optional.of("The shelf " + place(folder) + " " + why));
        } catch (Refusal refusal) {
            return new ShelfState(Optional.empty(), folder, List.of(), Optional.of(refusal.getMessage()));
        }
    }

    /** Where the shelf is, for a person. */
    public static String place(Optional<Path> folder) {
        return folder.map(Path::toString).orElse(ShelfReader.SHIPPED);
    }
}
