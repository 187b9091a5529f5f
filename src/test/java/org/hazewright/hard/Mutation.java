package org.hazewright.hard;

import java.io.BufferedReader;
import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.regex.Matcher;
import java.util.regex.Pattern;

/**
 * How well the rooms of the physics and the search are tested: the share of their lines that their own tests reach, and the share of small
 * faults, put into the code one at a time, that a test notices.
 *
 * <p>{@code Mutation FOLDER [ROOM …]}; a page for each room is left in the folder. Exit status 0 when every room reaches
 * {@value #WANTED_PERCENT} % of faults noticed. Tests that only repeat a fast one with more digits or more cases are left out, so that a
 * fault that nobody notices does not cost minutes.
 */
public final class Mutation {
    private static final int WANTED_PERCENT = 85;
    private static final List<String> ROOMS = List.of("optics", "mixture", "search", "design", "learning");
    private static final List<String> LEFT_OUT = List.of("*BruteForce*", "*Benchmark*", "*Exhaustion*");
    private static final Pattern LINES =
            Pattern.compile(">> Line Coverage \\(for mutated classes only\\): (\\d+)/(\\d+)");
    private static final Pattern KILLED = Pattern.compile(">> Generated (\\d+) mutations Killed (\\d+)");

    private Mutation() {}

    public static void main(String[] args) throws IOException, InterruptedException {
        Path folder = Files.createDirectories(Path.of(args[0])).toAbsolutePath();
        List<String> rooms = new ArrayList<>(List.of(args).subList(1, args.length));
        rooms.removeIf(String::isBlank);
        if (rooms.isEmpty()) rooms.addAll(ROOMS);
        boolean good = true;
        System.out.println("room       lines reached     faults noticed");
        for (String room : rooms) {
            if (!Files.isDirectory(Path.of("src/main/java/org/hazewright", room))) continue;
            good &= room(room, Files.createDirectories(folder.resolve(room)));
        }
        System.exit(good ? 0 : 1);
    }

    private static boolean room(String room, Path folder) throws IOException, InterruptedException {
        Process engine = new ProcessBuilder(
                        Path.of(System.getProperty("java.home"), "bin", "java").toString(),
                        "-Xmx1g",
                        "-cp",
                        EveryDoorTest.absoluteClassPath(),
                        "org.pitest.mutationtest.commandline.MutationCoverageReport",
                        "--reportDir=" + folder,
                        "--targetClasses=org.hazewright." + room + ".*",
                        "--targetTests=org.hazewright." + room + ".*",
                        "--excludedTestClasses=" + String.join(",", LEFT_OUT),
                        "--sourceDirs=src/main/java",
                        "--outputFormats=XML,HTML",
                        "--timestampedReports=false",
                        "--threads=2",
                        "--timeoutConst=2000",
                        "--jvmArgs=-Xmx1g,-Djunit.jupiter.extensions.autodetection.enabled=true")
                .redirectErrorStream(true)
                .start();
        StringBuilder said = new StringBuilder();
        try (BufferedReader out = engine.inputReader(StandardCharsets.UTF_8)) {
            for (String line = out.readLine(); line != null; line = out.readLine())
                said.append(line).append('\n');
        }
        Files.writeString(folder.resolve("log.txt"), said);
        Matcher lines = LINES.matcher(said);
        Matcher killed = KILLED.matcher(said);
        if (engine.waitFor() != 0 || !lines.find() || !killed.find())
            throw new IllegalStateException("The engine failed on " + room + "; see " + folder.resolve("log.txt"));
        int made = Integer.parseInt(killed.group(1));
        int noticed = Integer.parseInt(killed.group(2));
        int all = Integer.parseInt(lines.group(2));
        int reached = Integer.parseInt(lines.group(1));
        System.out.printf(
                Locale.ROOT,
                "%-9s %5d of %5d %3.0f %%  %5d of %5d %5.1f %%%n",
                room,
                reached,
                all,
                100.0 * reached / all,
                noticed,
                made,
                100.0 * noticed / made);
        return 100.0 * noticed / made >= WANTED_PERCENT;
    }
}
