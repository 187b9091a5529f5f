package org.hazewright.desk.model;

import java.io.IOException;
import java.io.StringReader;
import java.nio.file.Files;
import java.nio.file.InvalidPathException;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.Properties;
import java.util.TreeMap;
import java.util.stream.Collectors;
import org.hazewright.files.SafeFile;
import org.hazewright.files.WriteFailure;

/**
 * What the window remembers from one day to the next: recent files, look, favourites and stock in hand. A file of plain lines {@code
 * key=value} in the person's own configuration folder; a folder that cannot be written is borne in silence, nothing here is work.
 */
public final class Remembered {
    private static final int MOST_RECENT = 8;

    private final Path folder;
    private final Path work;
    private final Properties lines = new Properties();

    private Remembered(Path folder, Path work) {
        this.folder = folder;
        this.work = work;
    }

    /** Kept in a folder of its own; {@code work} is where results of briefs go that were never saved. */
    public static Remembered in(Path folder, Path work) {
        Remembered r = new Remembered(folder, work);
        try {
            Path file = r.file();
            if (Files.isRegularFile(file)) r.lines.load(new StringReader(Files.readString(file)));
        } catch (IOException | IllegalArgumentException e) {
            r.lines.clear();
        }
        return r;
    }

    /** The usual folder of this system for a program's settings. */
    public static Path usualFolder() {
        String os = System.getProperty("os.name", "").toLowerCase(Locale.ROOT);
        String home = System.getProperty("user.home", ".");
        String appData = System.getenv("APPDATA");
        String xdg = System.getenv("XDG_CONFIG_HOME");
        if (os.contains("win") && appData != null) return Path.of(appData, "Hazewright");
        if (os.contains("mac")) return Path.of(home, "Library", "Application Support", "Hazewright");
        return xdg != null && !xdg.isBlank() ? Path.of(xdg, "hazewright") : Path.of(home, ".config", "hazewright");
    }

    /** The usual folder for results of briefs that were never saved: one a person finds. */
    public static Path usualWorkFolder() {
        return Path.of(System.getProperty("user.home", "."), "Hazewright");
    }

    public Path workFolder() {
        return work;
    }

    /** Where what belongs to no document is kept. */
    public Path folder() {
        return folder;
    }

    private Path file() {
        return folder.resolve("desk.properties");
    }

    public String text(String key, String otherwise) {
        return lines.getProperty(key, otherwise);
    }

    public double number(String key, double otherwise) {
        try {
            double value = Double.parseDouble(text(key, ""));
            return Double.isFinite(value) ? value : otherwise;
        } catch (NumberFormatException e) {
            return otherwise;
        }
    }

    public boolean flag(String key) {
        return text(key, "").equals("yes");
    }

    public void keep(String key, String value) {
        if (value.equals(lines.getProperty(key))) return;
        lines.setProperty(key, value);
        write();
    }

    public void keep(String key, boolean value) {
        keep(key, value ? "yes" : "no");
    }

    /** Files opened or saved last, the latest first; those that are gone are left out. */
    public List<Path> recent() {
        List<Path> found = new ArrayList<>();
        for (int k = 0; k < MOST_RECENT; k++) {
            String line = lines.getProperty("recent." + k);
            if (line == null) break;
            try {
                Path p = Path.of(line);
                if (Files.isRegularFile(p)) found.add(p);
            } catch (InvalidPathException e) {
                continue;
            }
        }
        return found;
    }

    public void used(Path file) {
        List<Path> recent = new ArrayList<>(recent());
        Path whole = file.toAbsolutePath().normalize();
        recent.remove(whole);
        recent.add(0, whole);
        for (int k = 0; k < MOST_RECENT; k++) {
            if (k < recent.size())
                lines.setProperty("recent." + k, recent.get(k).toString());
            else lines.remove("recent." + k);
        }
        write();
    }

    /** Ids that a person marked as favourites. */
    public List<String> favourites() {
        return List.of(text("favourites", "").split(" ")).stream()
                .filter(id -> !id.isEmpty())
                .toList();
    }

    public void favourite(String id, boolean is) {
        List<String> ids = new ArrayList<>(favourites());
        ids.remove(id);
        if (is) ids.add(id);
        keep("favourites", String.join(" ", ids));
    }

    /** Grams in hand by ingredient. */
    public Map<String, Double> inHandG() {
        return lines.stringPropertyNames().stream()
                .filter(key -> key.startsWith("in-hand."))
                .collect(Collectors.toMap(
                        key -> key.substring("in-hand.".length()), key -> number(key, 0), (a, b) -> a, TreeMap::new));
    }

    public void inHandG(String id, Optional<Double> grams) {
        if (grams.isPresent()) keep("in-hand." + id, Double.toString(grams.get()));
        else {
            lines.remove("in-hand." + id);
            write();
        }
    }

    private void write() {
        StringBuilder text = new StringBuilder("# What the window of Hazewright remembers.\n");
        new TreeMap<>(lines)
                .forEach((key, value) -> text.append(escaped(key.toString()))
                        .append('=')
                        .append(escaped(value.toString()))
                        .append('\n'));
        try {
            SafeFile.write(file(), text.toString(), SafeFile.Overwrite.REPLACE);
        } catch (WriteFailure borne) {
            return;
        }
    }

    private static String escaped(String s) {
        StringBuilder out = new StringBuilder();
        s.chars().forEach(c -> {
            switch (c) {
                case '\\' -> out.append("\\\\");
                case '\n' -> out.append("\\n");
                case '\r' -> out.append("\\r");
                case '=', ':', '#', '!' -> out.append('\\').append((char) c);
                default -> out.append((char) c);
            }
        });
        return out.toString();
    }
}
