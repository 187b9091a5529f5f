package org.hazewright.cli;

import java.nio.file.Files;
import java.nio.file.Path;
import java.util.LinkedHashSet;
import java.util.Set;
import java.util.function.Supplier;
import org.hazewright.brief.Brief;
import org.hazewright.brief.Tissue;
import org.hazewright.files.ShelfReader;
import org.hazewright.files.TissueSpectra;
import org.hazewright.shelf.Shelf;
import picocli.CommandLine.Option;

/** Options that every command takes. */
final class Shared {
    /** Length unit of coefficients on the screen; files and JSON are always 1/cm. */
    enum Units {
        CM(1, "/cm"),
        MM(0.1, "/mm");

        private final double perCm;
        private final String sign;

        Units(double perCm, String sign) {
            this.perCm = perCm;
            this.sign = sign;
        }

        double of(double perCmValue) {
            return perCmValue * perCm;
        }

        String sign() {
            return sign;
        }
    }

    @Option(
            names = "--ingredients",
            paramLabel = "DIR",
            description =
                    "Shelf to use (default: the folder ingredients here, else the shelf that comes with the program).")
    Path ingredients;

    @Option(names = "--units", paramLabel = "cm|mm", description = "Show coefficients per cm (default) or per mm.")
    Units units = Units.CM;

    @Option(names = "--json", description = "Print one JSON document and nothing else; messages go to standard error.")
    boolean json;

    @Option(names = "--quiet", description = "Print no progress and no explanations.")
    boolean quiet;

    @Option(names = "--help", usageHelp = true, description = "Show this help and end.")
    boolean help;

    /** The folder of the shelf, or null for the one in the program. */
    Path shelfFolder() {
        if (ingredients != null) return ingredients;
        Path here = Path.of("ingredients");
        return Files.isDirectory(here) ? here : null;
    }

    Shelf shelf() {
        Path folder = shelfFolder();
        return folder == null ? ShelfReader.readShipped() : ShelfReader.read(folder);
    }

    /** The bottles that a brief names in {@code use} with its bases, or the whole shelf when it names none. */
    Shelf shelfFor(Brief brief) {
        if (brief.limits().use().isEmpty()) return shelf();
        Set<String> named = new LinkedHashSet<>(brief.limits().use());
        named.addAll(brief.limits().avoid());
        named.addAll(brief.bases());
        return ShelfReader.readOnly(shelfFolder(), named);
    }

    ShelfReader.Lenient lenientShelf() {
        Path folder = shelfFolder();
        return ShelfReader.readLenient(folder);
    }

    Supplier<Tissue.Spectra> tissueSpectra() {
        return TissueSpectra.of(shelfFolder());
    }
}
