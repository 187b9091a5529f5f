package org.hazewright.hard;

import java.io.File;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardCopyOption;
import java.util.ArrayList;
import java.util.List;
import java.util.concurrent.TimeUnit;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import java.util.stream.Stream;

/**
 * Fuzzes every {@link Door}, coverage-guided, for a given time in all; what breaks the {@link Promise}, takes more than five
 * seconds of processor time, or does not fit into 512 MiB is kept as a file and counted.
 *
 * <p>{@code Fuzz FOLDER SECONDS [DOOR …]}; exit status 0 when nothing was found, 1 otherwise. What was learnt stays in the folder, so
 * a later run goes on from there.
 */
public final class Fuzz {
    private static final Pattern COVERED = Pattern.compile("#(\\d+)\\s+\\S+\\s+cov: (\\d+) ft: (\\d+)");

    /** By the wall clock, for a machine that is busy with other things; {@link FuzzTarget} counts processor time. */
    private static final int HANGS_S = 60;

    private Fuzz() {}

    public static void main(String[] args) throws IOException, InterruptedException {
        Path folder = Path.of(args[0]).toAbsolutePath();
        int seconds = Integer.parseInt(args[1]);
        List<Door> doors = new ArrayList<>();
        for (int i = 2; i < args.length; i++)
            if (!args[i].isBlank()) doors.add(Door.valueOf(args[i].toUpperCase(java.util.Locale.ROOT)));
        if (doors.isEmpty()) doors.addAll(List.of(Door.values()));
        Path things = folder.resolve("things");
        Seeds.lay(things);
        int found = 0;
        for (Door door : doors)
            found += fuzz(
                    door,
                    things,
                    Files.createDirectories(folder.resolve(door.word())),
                    Math.max(5, seconds / doors.size()));
        System.out.println(found == 0 ? "Nothing found." : found + " found; see the files found-* in " + folder);
        System.exit(found == 0 ? 0 : 1);
    }

    private static int fuzz(Door door, Path things, Path folder, int seconds) throws IOException, InterruptedException {
        Path corpus = Files.createDirectories(folder.resolve("corpus"));
        Path dictionary = Files.writeString(folder.resolve("words.dict"), Seeds.dictionary(things, door));
        Path log = folder.resolve("log.txt");
        for (Path old : files(folder, "found-").toList())
            Files.move(
                    old,
                    Files.createDirectories(folder.resolve("earlier")).resolve(old.getFileName()),
                    StandardCopyOption.REPLACE_EXISTING);
        Process engine = new ProcessBuilder(
                        Path.of(System.getProperty("java.home"), "bin", "java").toString(),
                        "-Xmx512m",
                        "-da:org.tomlj...", // its own assertions; the program is never run with them
                        "-Ddoor=" + door,
                        "-Djava.awt.headless=true",
                        "-cp",
                        absolute(System.getProperty("java.class.path")),
                        "com.code_intelligence.jazzer.Jazzer",
                        "--target_class=" + FuzzTarget.class.getName(),
                        "--instrumentation_includes=org.hazewright.**:org.tomlj.**",
                        // What computes reads nothing; watching its branches would only slow it down.
                        "--instrumentation_excludes=org.tomlj.internal.**:org.hazewright.hard.**:org.hazewright.optics.**"
                                + ":org.hazewright.mixture.**:org.hazewright.search.**:org.hazewright.design.**"
                                + ":org.hazewright.transport.**:org.hazewright.reading.**",
                        "--disabled_hooks=*",
                        "--keep_going=10",
                        "--reproducer_path=" + folder,
                        "-artifact_prefix=" + folder + "/found-",
                        "-dict=" + dictionary,
                        "-max_len=40000",
                        "-timeout=" + HANGS_S,
                        "-report_slow_units=" + HANGS_S,
                        "-rss_limit_mb=0",
                        "-max_total_time=" + seconds,
                        corpus.toString(),
                        things.resolve("seeds").resolve(door.word()).toString())
                .directory(things.toFile())
                .redirectErrorStream(true)
                .redirectOutput(log.toFile())
                .start();
        if (!engine.waitFor(seconds + 240L, TimeUnit.SECONDS))
            engine.destroyForcibly().waitFor();
        String said = Files.readString(log, java.nio.charset.StandardCharsets.ISO_8859_1);
        Matcher covered = COVERED.matcher(said);
        String runs = "0";
        String edges = "0";
        while (covered.find()) {
            runs = covered.group(1);
            edges = covered.group(2);
        }
        Matcher done = Pattern.compile("Done (\\d+) runs").matcher(said);
        if (done.find()) runs = done.group(1);
        int found = (int) files(folder, "found-").count();
        if (runs.equals("0") && found == 0)
            throw new IllegalStateException(
                    "The engine did not run; it said:\n" + said.substring(0, Math.min(4000, said.length())));
        System.out.printf(
                java.util.Locale.ROOT,
                "%-11s %9s inputs  %6s edges covered  %d found%n",
                door.word(),
                runs,
                edges,
                found);
        return found;
    }

    private static String absolute(String classPath) {
        return Stream.of(classPath.split(File.pathSeparator))
                .map(p -> Path.of(p).toAbsolutePath().toString())
                .reduce((a, b) -> a + File.pathSeparator + b)
                .orElseThrow();
    }

    private static Stream<Path> files(Path folder, String start) {
        return Seeds.files(folder).stream()
                .filter(p -> p.getFileName().toString().startsWith(start));
    }
}
