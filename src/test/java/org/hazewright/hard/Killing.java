package org.hazewright.hard;

import java.io.BufferedReader;
import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.HashSet;
import java.util.List;
import java.util.Random;
import java.util.Set;
import java.util.stream.Collectors;
import java.util.stream.Stream;
import org.hazewright.files.BatchReader;
import org.hazewright.files.BatchWriter;
import org.hazewright.files.SafeFile;
import org.hazewright.sheet.Logbook;

/**
 * Kills a program that records batches, at random instants, and looks what is left: whatever it acknowledged must be there, in the
 * batch's own file and in the logbook, and every file must be whole.
 *
 * <p>{@code Killing FOLDER TIMES SEED [WRITERS]}; with two writers they share the logbook and one of them is killed. Exit status 0 when
 * nothing was lost.
 */
public final class Killing {
    private final Path folder;
    private final Random random;
    private final Set<String> acknowledged = new HashSet<>();
    private int next = 1;

    private Killing(Path folder, long seed) {
        this.folder = folder;
        this.random = new Random(seed);
    }

    public static void main(String[] args) throws Exception {
        Outcome kept = run(
                Path.of(args[0]).toAbsolutePath(),
                Integer.parseInt(args[1]),
                Long.parseLong(args[2]),
                args.length > 3 ? Integer.parseInt(args[3]) : 1);
        System.out.println(kept.acknowledged() + " acknowledged batches, none lost, after " + args[1] + " kills; "
                + kept.inDoubt() + " more recorded whole when the program was killed before it could say so.");
    }

    /**
     * @param acknowledged batches that the programs said were kept
     * @param inDoubt batches in the logbook that nobody was told of
     */
    record Outcome(int acknowledged, int inDoubt) {}

    /** What was kept; throws when an acknowledged batch is lost or a file is broken. */
    static Outcome run(Path folder, int times, long seed, int writers) throws Exception {
        Files.createDirectories(folder);
        if (!Files.exists(folder.resolve("model.toml"))) {
            Path things = folder.resolve("things");
            Seeds.lay(things);
            Files.copy(things.resolve("bath.batch.toml"), folder.resolve("model.toml"));
        }
        Killing killing = new Killing(folder, seed);
        for (int i = 0; i < times; i++) {
            killing.killOnce(writers);
            killing.nothingLost();
        }
        killing.tidyAfterwards();
        Set<String> untold = new HashSet<>(killing.recorded());
        untold.removeAll(killing.acknowledged);
        return new Outcome(killing.acknowledged.size(), untold.size());
    }

    private void killOnce(int writers) throws IOException, InterruptedException {
        List<Process> running = new ArrayList<>();
        for (int w = 0; w < writers; w++) running.add(start(next + 1_000_000 * w));
        BufferedReader first = reader(running.get(0));
        String line = first.readLine(); // loaded and at work
        if (line == null) throw new AssertionError("The writer ended by itself.");
        acknowledged.add(line);
        Thread.sleep(random.nextInt(400), random.nextInt(1_000_000));
        kill(running.get(0));
        gather(first);
        for (Process other : running.subList(1, running.size())) {
            Thread.sleep(random.nextInt(200));
            kill(other);
            gather(reader(other));
        }
        next += 1000;
    }

    /** By its handle: a process object would close what the program still had to say. */
    private static void kill(Process p) throws InterruptedException {
        p.toHandle().destroyForcibly();
        p.waitFor();
    }

    /** Whole lines only: one that was cut was not acknowledged. */
    private void gather(BufferedReader said) throws IOException {
        StringBuilder rest = new StringBuilder();
        for (int c = said.read(); c >= 0; c = said.read())
            if (c == '\n') {
                acknowledged.add(rest.toString());
                rest.setLength(0);
            } else rest.append((char) c);
    }

    private static BufferedReader reader(Process p) {
        return new BufferedReader(new java.io.InputStreamReader(p.getInputStream(), StandardCharsets.UTF_8));
    }

    private Process start(int from) throws IOException {
        return new ProcessBuilder(
                        Path.of(System.getProperty("java.home"), "bin", "java").toString(),
                        "-Xshare:auto",
                        "-XX:TieredStopAtLevel=1",
                        "-cp",
                        EveryDoorTest.absoluteClassPath(),
                        Writer.class.getName(),
                        folder.toString(),
                        Integer.toString(from))
                .redirectError(folder.resolve("errors.txt").toFile())
                .start();
    }

    private void nothingLost() throws IOException {
        Set<String> recorded = recorded();
        for (String id : acknowledged) {
            if (!recorded.contains(id)) throw new AssertionError(id + " was acknowledged and is not recorded.");
            BatchReader.read(folder.resolve(id + ".batch.toml"), Seeds.shelf());
        }
        for (Path file : Seeds.files(folder))
            if (file.toString().endsWith(".batch.toml"))
                BatchReader.read(file, Seeds.shelf()); // whole, acknowledged or not
    }

    /** Batches in the logbook and in the records that wait beside it. */
    private Set<String> recorded() {
        Set<String> ids = new HashSet<>();
        for (Path book : Seeds.files(folder))
            if (book.getFileName().toString().matches("logbook\\.(waiting\\..*)?xlsx"))
                Logbook.batches(book).forEach(row -> ids.add(row.get("batch").toString()));
        return ids;
    }

    /** The next record takes over what waits and sweeps what was half-written of the logbook. */
    private void tidyAfterwards() throws IOException {
        Writer.write(folder, "Last");
        acknowledged.add("Last");
        nothingLost();
        try (Stream<Path> all = Files.list(folder)) {
            String left = all.map(p -> p.getFileName().toString())
                    .filter(n -> n.contains(".waiting.") || n.startsWith(".logbook") && n.endsWith(".part"))
                    .collect(Collectors.joining(", "));
            if (!left.isEmpty()) throw new AssertionError("Left behind: " + left);
        }
    }

    /** The program that is killed: records batches until then, and says each one when it is kept. */
    static final class Writer {
        private Writer() {}

        public static void main(String[] args) throws IOException {
            for (int n = Integer.parseInt(args[1]); ; n++) {
                write(Path.of(args[0]), "K" + n);
                System.out.print("K" + n + "\n");
                System.out.flush();
            }
        }

        static void write(Path folder, String id) throws IOException {
            Path file = folder.resolve(id + ".batch.toml");
            String model = Files.readString(folder.resolve("model.toml"));
            SafeFile.write(file, "id = \"" + id + "\"\n" + model, SafeFile.Overwrite.NEVER);
            var batch = BatchReader.read(file, Seeds.shelf());
            BatchWriter.write(file, batch, SafeFile.Overwrite.REPLACE);
            Logbook.record(folder.resolve("logbook.xlsx"), batch, file);
        }
    }
}
