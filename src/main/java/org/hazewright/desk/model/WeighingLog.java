package org.hazewright.desk.model;

import java.io.IOException;
import java.io.StringReader;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Properties;
import org.hazewright.batch.Batch;
import org.hazewright.files.BatchReader;
import org.hazewright.files.BatchWriter;
import org.hazewright.files.SafeFile;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Shelf;

/**
 * A weighing as it stands, kept on disk so that it goes on at the same step after a crash: the batch's own file with what was weighed, and
 * beside it {@code .ID.steps} with what that file has no place for, ticks and the loads of a mass that is not weighed to its end:
 * plain lines {@code step.N=done|open load load …}. Both are written whole after every step.
 */
public final class WeighingLog {
    private static final double MOST_G = 1e9;

    private final Path file;

    /** For a batch's file, {@code ID.batch.toml}; it need not be there yet. */
    public WeighingLog(Path file) {
        this.file = file;
    }

    public Path file() {
        return file;
    }

    private Path steps() {
        String name = file.getFileName().toString();
        return file.resolveSibling("." + name.replaceFirst("\\.batch\\.toml$", "") + ".steps");
    }

    public void keep(Batch batch, List<Weighed> entries) {
        BatchWriter.write(file, batch, SafeFile.Overwrite.REPLACE);
        StringBuilder text = new StringBuilder("# Where a weighing stands; the window goes on from here.\n");
        for (int k = 0; k < entries.size(); k++) {
            Weighed w = entries.get(k);
            if (w.equals(Weighed.NOTHING)) continue;
            text.append("step.").append(k).append('=').append(w.done() ? "done" : "open");
            w.loadsG().forEach(g -> text.append(' ').append(g));
            text.append('\n');
        }
        SafeFile.write(steps(), text.toString(), SafeFile.Overwrite.REPLACE);
    }

    /** The batch; a {@link Refusal} when its file is damaged. */
    public Batch batch(Shelf shelf) {
        return BatchReader.read(file, shelf);
    }

    /** What was kept of each step; empty when nothing is, or nothing that can be read. */
    public List<Weighed> entries() {
        Properties lines = new Properties();
        try {
            if (!Files.isRegularFile(steps())) return List.of();
            lines.load(new StringReader(Files.readString(steps())));
            int most = lines.stringPropertyNames().stream()
                    .filter(k -> k.matches("step\\.\\d{1,4}"))
                    .mapToInt(k -> Integer.parseInt(k.substring(5)))
                    .max()
                    .orElse(-1);
            List<Weighed> entries = new ArrayList<>();
            for (int k = 0; k <= most; k++) entries.add(entry(lines.getProperty("step." + k)));
            return entries;
        } catch (IOException | IllegalArgumentException e) {
            return List.of();
        }
    }

    private static Weighed entry(String line) {
        if (line == null) return Weighed.NOTHING;
        String[] words = line.strip().split("\\s+");
        List<Double> loads = Arrays.stream(words).skip(1).map(Double::valueOf).toList();
        if (loads.stream().anyMatch(g -> !(g >= 0 && g <= MOST_G)))
            throw new IllegalArgumentException("no load: " + line);
        return new Weighed(loads, words[0].equals("done"));
    }

    /** Takes the ticks away when the weighing is over; the batch stays. */
    public void over() {
        try {
            Files.deleteIfExists(steps());
        } catch (IOException e) {
            return; // a leftover does no harm
        }
    }
}
