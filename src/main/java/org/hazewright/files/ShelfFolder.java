package org.hazewright.files;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.InvalidPathException;
import java.nio.file.LinkOption;
import java.nio.file.NoSuchFileException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.concurrent.ConcurrentHashMap;
import java.util.function.Supplier;
import java.util.stream.Stream;
import org.hazewright.shelf.Nearest;

/**
 * The folder of a shelf, on disk or inside a jar: its TOML files by name, and the tables that they point to.
 *
 * <p>A table's path is relative to the folder and stays inside it, also where links lead; it must end at an ordinary file. Each
 * table is read once.
 */
final class ShelfFolder {
    private static final int MOST_FILES = 5000;
    private static final int MOST_AHEAD = 500;

    private final Path root;
    private final String shown;
    private final Path realRoot;
    private final Map<Path, Attempt<CsvTable>> tables = new ConcurrentHashMap<>();

    /** {@code shown} is how messages name the folder. */
    ShelfFolder(Path root, String shown) {
        this.root = root;
        this.shown = shown;
        Place whole = Place.whole(shown);
        if (Files.notExists(root))
            throw whole.refusal("There is no such folder; name the folder that holds the ingredient files.");
        if (!Files.isDirectory(root))
            throw whole.refusal("This is a file and not a folder; name the folder that holds the ingredient files.");
        try {
            realRoot = root.toRealPath();
        } catch (IOException e) {
            throw whole.refusal("The folder cannot be reached (" + e.getMessage() + ").");
        }
    }

    String shown() {
        return shown;
    }

    /**
     * The pages of TOML files, read on all cores, in the order given; meanwhile the tables of {@code spectra/} are read ahead, and
     * one that is broken counts only when a file asks for it.
     */
    List<Attempt<TomlPage>> pages(List<TextFileName> files, boolean tablesAhead) {
        List<Supplier<Attempt<TomlPage>>> reading = new ArrayList<>();
        for (TextFileName f : files)
            reading.add(() -> Attempt.of(() -> TomlPage.of(TextFile.read(f.file(), f.shown()))));
        for (Path table : tablesAhead ? tablesAhead() : List.<Path>of())
            reading.add(() -> {
                tables.computeIfAbsent(table, file -> attempt(file, "spectra/" + file.getFileName()));
                return null;
            });
        return reading.parallelStream().map(Supplier::get).toList().subList(0, files.size());
    }

    private List<Path> tablesAhead() {
        Path folder = realRoot.resolve("spectra");
        if (!Files.isDirectory(folder, LinkOption.NOFOLLOW_LINKS)) return List.of();
        try (Stream<Path> entries = Files.list(folder)) {
            return entries.filter(p -> p.getFileName().toString().endsWith(".csv"))
                    .filter(p -> Files.isRegularFile(p, LinkOption.NOFOLLOW_LINKS))
                    .limit(MOST_AHEAD)
                    .toList();
        } catch (IOException e) {
            return List.of(); // whoever asks for a table gets its own message
        }
    }

    private Attempt<CsvTable> attempt(Path file, String path) {
        return Attempt.of(() -> CsvTable.of(TextFile.read(file, shown + separator() + path.replace("/", separator()))));
    }

    /** The TOML files of a folder in it ("" for itself), by name; none when there is no such folder. */
    List<TextFileName> tomlFiles(String sub) {
        Path folder = sub.isEmpty() ? root : root.resolve(sub);
        if (!Files.isDirectory(folder)) return List.of();
        try (Stream<Path> entries = Files.list(folder)) {
            List<Path> files = entries.filter(p -> p.getFileName().toString().endsWith(".toml"))
                    .filter(p -> !p.getFileName().toString().startsWith("."))
                    .limit(MOST_FILES + 1L)
                    .sorted()
                    .toList();
            if (files.size() > MOST_FILES)
                throw Place.whole(shown(sub))
                        .refusal("The folder holds more than " + MOST_FILES + " TOML files; is it a shelf?");
            List<TextFileName> found = new ArrayList<>();
            for (Path file : files) found.add(new TextFileName(file, shown(sub) + separator() + file.getFileName()));
            return found;
        } catch (IOException e) {
            throw Place.whole(shown(sub))
                    .refusal("The folder cannot be listed (" + e.getMessage() + "); check its permissions.");
        }
    }

    /** A file and how messages name it. */
    record TextFileName(Path file, String shown) {
        /** The file's name without its ending: the id that it must carry. */
        String id() {
            String name = file.getFileName().toString();
            return name.substring(0, name.length() - ".toml".length());
        }
    }

    boolean holds(String table) {
        return Files.isRegularFile(root.resolve(table));
    }

    /** The table at a path that a file gives at {@code from}. */
    CsvTable table(String path, Place from) {
        Path file = inside(path, from);
        return tables.computeIfAbsent(file, f -> attempt(f, path)).get();
    }

    private Path inside(String path, Place from) {
        String rule =
                " The path of a table is relative to the shelf's folder and stays inside it: \"spectra/name.csv\".";
        if (path.contains("\\"))
            throw from.refusal("The table \"" + path + "\" is written with \\; use / between folders." + rule);
        Path file;
        try {
            file = root.resolve(path);
        } catch (InvalidPathException e) {
            throw from.refusal("\"" + path + "\" is not a path that this system knows." + rule);
        }
        if (root.getFileSystem().getPath(path).isAbsolute()
                || path.matches("^[A-Za-z]:.*")
                || !file.normalize().startsWith(root.normalize())
                || path.matches("(^|.*/)\\.\\.(/.*|$)"))
            throw from.refusal("The table \"" + path + "\" lies outside the shelf's folder." + rule);
        Path real;
        try {
            real = file.toRealPath();
            if (!real.startsWith(realRoot))
                throw from.refusal("The table \"" + path + "\" is a link that leads out of the shelf's folder." + rule);
        } catch (NoSuchFileException e) {
            throw from.refusal("There is no table \"" + path + "\" in the shelf's folder." + perhaps(file));
        } catch (IOException e) {
            throw from.refusal("The table \"" + path + "\" cannot be reached (" + e.getMessage() + ").");
        }
        if (Files.isDirectory(real))
            throw from.refusal("The table \"" + path + "\" is a folder; name a CSV file in it.");
        if (!Files.isRegularFile(real))
            throw from.refusal("The table \"" + path + "\" is a device or a pipe; it must be an ordinary CSV file.");
        return real;
    }

    private static String perhaps(Path missing) {
        Path folder = missing.getParent();
        if (folder == null || missing.getFileName() == null || !Files.isDirectory(folder)) return "";
        try (Stream<Path> entries = Files.list(folder)) {
            List<String> names = entries.limit(MOST_FILES)
                    .map(p -> p.getFileName().toString())
                    .filter(n -> n.endsWith(".csv"))
                    .toList();
            return Nearest.to(missing.getFileName().toString(), names)
                    .map(n -> " Perhaps " + n + " is meant.")
                    .orElse("");
        } catch (IOException e) {
            return "";
        }
    }

    private String shown(String sub) {
        return sub.isEmpty() ? shown : shown + separator() + sub;
    }

    private String separator() {
        return root.getFileSystem().getSeparator();
    }
}
