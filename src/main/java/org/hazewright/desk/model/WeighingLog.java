package org.hazewright.desk.model;

import java.io.IOException;
import java.io.StringReader;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.Properties;
import java.util.function.Supplier;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import org.hazewright.brief.Brief;
import org.hazewright.brief.Tissue;
import org.hazewright.files.BriefReader;
import org.hazewright.files.BriefWriter;
import org.hazewright.files.RecipeReader;
import org.hazewright.files.RecipeWriter;
import org.hazewright.files.SafeFile;
import org.hazewright.mixture.Recipe;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Shelf;

/**
 * A weighing as it stands, kept on disk so that it goes on at the same step after a crash: a folder {@code .NAME.weighing} beside the brief
 * with the brief, the recipe and a file of plain lines, {@code step.N=done|open load load …}. The lines are written whole after every step.
 */
public final class WeighingLog {
    private static final String LINES = "steps.txt";

    private final Path folder;

    public WeighingLog(Path folder) {
        this.folder = folder;
    }

    /** Where the weighing of a brief is kept; {@code file} is the brief's, when it has one. */
    public static WeighingLog of(Optional<Path> file, String name, Path otherwise) {
        return new WeighingLog(file.map(f -> f.toAbsolutePath().resolveSibling("." + name + ".weighing"))
                .orElse(otherwise.resolve(name + ".weighing")));
    }

    public Path folder() {
        return folder;
    }

    public boolean exists() {
        return Files.isRegularFile(folder.resolve(LINES));
    }

    /** A weighing taken up again. */
    public record Kept(Brief brief, Recipe recipe, List<Weighed> steps) {}

    /** Begins a weighing: writes what is weighed. */
    public void begin(Brief brief, Recipe recipe, Supplier<Tissue.Spectra> spectra) {
        SafeFile.write(
                folder.resolve("weighed.brief.toml"),
                BriefWriter.text(brief, List.of(), spectra),
                SafeFile.Overwrite.REPLACE);
        RecipeWriter.write(folder.resolve("weighed.recipe.toml"), recipe, SafeFile.Overwrite.REPLACE);
    }

    public void keep(List<Weighed> steps) {
        StringBuilder text = new StringBuilder("# Where a weighing stands; the window goes on from here.\n");
        for (int k = 0; k < steps.size(); k++) {
            Weighed w = steps.get(k);
            if (w.equals(Weighed.NOTHING)) continue;
            text.append("step.").append(k).append('=').append(w.done() ? "done" : "open");
            w.loadsG().forEach(g -> text.append(' ').append(g));
            text.append('\n');
        }
        SafeFile.write(folder.resolve(LINES), text.toString(), SafeFile.Overwrite.REPLACE);
    }

    /** Reads what was kept; a {@link Refusal} when it is damaged. */
    public Kept read(Shelf shelf, Supplier<Tissue.Spectra> spectra) {
        Brief brief = BriefReader.read(folder.resolve("weighed.brief.toml"), spectra);
        Recipe recipe = RecipeReader.read(folder.resolve("weighed.recipe.toml"), shelf);
        Properties lines = new Properties();
        try {
            lines.load(new StringReader(Files.readString(folder.resolve(LINES))));
        } catch (IOException | IllegalArgumentException e) {
            throw new Refusal("The weighing kept in " + folder + " cannot be read (" + e.getMessage() + ").");
        }
        int most = lines.stringPropertyNames().stream()
                .filter(k -> k.matches("step\\.\\d{1,4}"))
                .mapToInt(k -> Integer.parseInt(k.substring(5)))
                .max()
                .orElse(-1);
        List<Weighed> steps = new ArrayList<>();
        for (int k = 0; k <= most; k++) steps.add(step(lines.getProperty("step." + k)));
        return new Kept(brief, recipe, steps);
    }

    private Weighed step(String line) {
        if (line == null) return Weighed.NOTHING;
        String[] words = line.strip().split("\\s+");
        try {
            List<Double> loads =
                    Arrays.stream(words).skip(1).map(Double::valueOf).toList();
            return new Weighed(loads, words[0].equals("done"));
        } catch (NumberFormatException e) {
            throw new Refusal(
                    "The weighing kept in " + folder + " has the line “" + line + "”, which is not one of its own.");
        }
    }

    /** Takes the log away, when the weighing is over or given up. */
    public void drop() {
        if (!Files.isDirectory(folder)) return;
        try (Stream<Path> inside = Files.walk(folder, 1)) {
            for (Path p : inside.sorted(Comparator.reverseOrder()).collect(Collectors.toList()))
                Files.deleteIfExists(p);
        } catch (IOException e) {
            return; // a leftover is offered once more, no harm
        }
    }
}
