package org.hazewright.hard;

import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Arrays;
import java.util.List;
import java.util.Set;
import org.hazewright.cli.OneLine;
import org.hazewright.desk.model.Remembered;
import org.hazewright.desk.model.Weighed;
import org.hazewright.desk.model.WeighingLog;
import org.hazewright.files.BatchReader;
import org.hazewright.files.BatchWriter;
import org.hazewright.files.BriefReader;
import org.hazewright.files.CoefficientTable;
import org.hazewright.files.CsvTable;
import org.hazewright.files.DilutionReader;
import org.hazewright.files.RecipeReader;
import org.hazewright.files.SeriesReader;
import org.hazewright.files.SetUpReader;
import org.hazewright.files.ShelfReader;
import org.hazewright.files.SizeTable;
import org.hazewright.files.SphereTable;
import org.hazewright.files.TissueSpectra;
import org.hazewright.learning.DilutionFit;
import org.hazewright.sheet.FilledIn;
import org.hazewright.sheet.FirstPage;
import org.hazewright.sheet.Logbook;
import org.hazewright.shelf.Ingredient;

/**
 * The ways in: each reads bytes that may be anything, and keeps the {@link Promise}.
 *
 * <p>{@code things} is a folder laid out by {@link Seeds}; every door works in its own corner of it.
 */
enum Door {
    BRIEF {
        @Override
        void open(Path things, byte[] bytes) {
            Path file = laid(things, "fuzzed.brief.toml", bytes);
            read(bytes, () -> BriefReader.read(file, TissueSpectra.of(null)));
        }
    },
    SERIES {
        @Override
        void open(Path things, byte[] bytes) {
            Path file = laid(things, "fuzzed.brief.toml", bytes);
            read(bytes, () -> SeriesReader.read(file, TissueSpectra.of(null)));
        }
    },
    RECIPE {
        @Override
        void open(Path things, byte[] bytes) {
            Path file = laid(things, "fuzzed.recipe.toml", bytes);
            read(bytes, () -> RecipeReader.read(file, Seeds.shelf()));
        }
    },
    BATCH {
        @Override
        void open(Path things, byte[] bytes) {
            Path file = laid(things, "fuzzed.batch.toml", bytes);
            read(bytes, () -> BatchWriter.text(BatchReader.read(file, Seeds.shelf())));
        }
    },
    SETUP {
        @Override
        void open(Path things, byte[] bytes) {
            Path file = laid(things, "fuzzed.setup.toml", bytes);
            read(bytes, () -> SetUpReader.read(file));
        }
    },
    INGREDIENT {
        @Override
        void open(Path things, byte[] bytes) {
            laid(things.resolve("shelf"), "fuzzed.toml", bytes);
            shelf(things.resolve("shelf"), bytes);
        }
    },
    MATERIAL {
        @Override
        void open(Path things, byte[] bytes) {
            laid(things.resolve("shelf-of-materials").resolve("materials"), "fuzzed.toml", bytes);
            shelf(things.resolve("shelf-of-materials"), bytes);
        }
    },
    /** A table of a shelf: an absorption that an ingredient points to. */
    SPECTRUM {
        @Override
        void open(Path things, byte[] bytes) {
            laid(things.resolve("shelf-of-tables").resolve("spectra"), "fuzzed.csv", bytes);
            shelf(things.resolve("shelf-of-tables"), bytes);
        }
    },
    /** Tables that a command names: any, sizes of particles, spheres. */
    TABLE {
        @Override
        void open(Path things, byte[] bytes) {
            Path file = laid(things, "fuzzed.csv", bytes);
            read(bytes, () -> CsvTable.read(file));
            read(bytes, () -> SizeTable.read(file));
            read(bytes, () -> SphereTable.read(file));
        }
    },
    /** Wanted or measured coefficients as people have them in tables: any heading, separator and unit. */
    COEFFICIENTS {
        @Override
        void open(Path things, byte[] bytes) {
            Path file = laid(things, "fuzzed.csv", bytes);
            read(bytes, () -> CoefficientTable.read(file, null));
            read(bytes, () -> CoefficientTable.read(file, "mm"));
        }
    },
    /** A dilution series, read and fitted. */
    DILUTION {
        @Override
        void open(Path things, byte[] bytes) {
            Path file = laid(things, "fuzzed.csv", bytes);
            Ingredient ink = Seeds.shelf().require("ink-demo");
            read(bytes, () -> {
                DilutionFit fit = DilutionReader.read(file, new DilutionReader.About(ink, 0.998, 0.15, 0.02, 0.01))
                        .fit();
                fit.warnings().forEach(w -> Promise.wellSaid(w, ""));
                fit.uncertainty();
            });
        }
    },
    /** The absorption of haemoglobin in a shelf, from which tissue-like targets are made. */
    TISSUE {
        @Override
        void open(Path things, byte[] bytes) {
            Path shelf = things.resolve("shelf-of-tables");
            laid(shelf.resolve("spectra"), "haemoglobin-oxy-molar.csv", bytes);
            read(bytes, () -> TissueSpectra.read(shelf));
        }
    },
    /** What the window keeps for itself: its settings, and where a weighing stands. Whatever is wrong there is as if it were not. */
    WINDOW {
        @Override
        void open(Path things, byte[] bytes) {
            laid(things, "desk.properties", bytes);
            Remembered memory = Remembered.in(things, things);
            memory.recent();
            memory.favourites();
            memory.inHandG();
            if (!Double.isFinite(memory.number("width", 1))) throw new AssertionError("A size that is no number.");
            laid(things, ".fuzzed.steps", bytes);
            for (Weighed w : new WeighingLog(things.resolve("fuzzed.batch.toml")).entries())
                if (!(w.massG() >= 0) || Double.isInfinite(w.massG())) throw new AssertionError("A load of " + w);
        }
    },
    /** A recipe sheet with one part replaced: the part's name on the first line, then the part. */
    SHEET {
        @Override
        void open(Path things, byte[] bytes) {
            Path file = laid(things, "fuzzed.xlsx", Parts.replaced(things.resolve("seed.xlsx"), bytes));
            read(bytes, () -> FilledIn.read(file));
        }
    },
    /** Somebody's workbook with a table on its first page, one part replaced. */
    PAGE {
        @Override
        void open(Path things, byte[] bytes) {
            Path file = laid(things, "fuzzed.xlsx", Parts.replaced(things.resolve("page.xlsx"), bytes));
            read(bytes, () -> FirstPage.cells(file));
        }
    },
    LOGBOOK {
        @Override
        void open(Path things, byte[] bytes) {
            Path file = laid(things, "fuzzed.xlsx", Parts.replaced(things.resolve("logbook.xlsx"), bytes));
            read(bytes, () -> Logbook.batches(file));
        }
    },
    /** The words of a command line, one a line, run in the folder itself; what reaches out of it is left out. */
    COMMAND {
        @Override
        void open(Path things, byte[] bytes) {
            String[] words = new String(bytes, StandardCharsets.UTF_8).split("\n", -1);
            if (words.length > 30 || !OneLine.commands().contains(words[0])) return;
            if (Arrays.stream(words).anyMatch(w -> w.contains("..") || w.matches(".*(^|[=@])[/~].*"))) return;
            OneLine ran = OneLine.run(words);
            if (!STATUSES.contains(ran.status()))
                throw new AssertionError("Exit status " + ran.status() + "\n" + ran.err());
            if (ran.status() == 2 || ran.status() == 4)
                Promise.wellSaid(
                        ran.out().startsWith("{") ? "JSON." + ran.err() : ran.out() + ran.err(),
                        String.join("\n", words));
            Promise.nothingHalfWritten(Path.of(""));
        }
    };

    private static final Set<Integer> STATUSES = Set.of(0, 2, 3, 4);

    /** Processor time that an input may take: a reader reads, a command also computes, and says so while it does. */
    double mostSeconds() {
        return this == COMMAND ? 60 : 5;
    }

    /** Reads these bytes; throws only when the promise is broken. */
    abstract void open(Path things, byte[] bytes);

    /** How it is called on the command line and in folders. */
    String word() {
        return name().toLowerCase(java.util.Locale.ROOT);
    }

    List<Path> seeds(Path things) {
        return Seeds.files(things.resolve("seeds").resolve(word()));
    }

    private static void read(byte[] bytes, Runnable reading) {
        Promise.refusesAtMost(reading, new String(bytes, StandardCharsets.UTF_8));
    }

    private static void shelf(Path folder, byte[] bytes) {
        String input = new String(bytes, StandardCharsets.UTF_8);
        ShelfReader.readLenient(folder).refusals().forEach(r -> Promise.wellSaid(r.getMessage(), input));
    }

    private static Path laid(Path folder, String name, byte[] bytes) {
        try {
            return Files.write(folder.resolve(name), bytes);
        } catch (IOException e) {
            throw new UncheckedIOException(e);
        }
    }
}
