package org.hazewright.files;

import java.nio.charset.StandardCharsets;
import java.nio.file.Path;
import java.time.Duration;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;

/**
 * How long a cold program takes to read and check the whole shipped shelf: each figure is a process of its own, timed from before
 * the first read until the shelf stands; the start of the virtual machine is stated apart. Without arguments it starts 11 processes
 * as they are and 11 with the quick compiler only, and prints the least and the median of each.
 */
public final class ShelfColdStart {
    private static final int RUNS = 11;

    private ShelfColdStart() {}

    public static void main(String[] args) throws Exception {
        if (args.length > 0) {
            once(Long.parseLong(args[0]));
            return;
        }
        report("plain", List.of());
        report("-XX:TieredStopAtLevel=1", List.of("-XX:TieredStopAtLevel=1"));
    }

    private static void once(long launchedMs) {
        long entered = System.currentTimeMillis();
        Duration before = cpu();
        long start = System.nanoTime();
        int size = ShelfReader.readShipped().ingredients().size();
        double wall = (System.nanoTime() - start) / 1e6;
        Duration used = cpu().minus(before);
        System.out.printf(Locale.ROOT, "%.1f %d %d %d%n", wall, used.toMillis(), entered - launchedMs, size);
    }

    private static Duration cpu() {
        return ProcessHandle.current().info().totalCpuDuration().orElse(Duration.ZERO);
    }

    private static void report(String name, List<String> options) throws Exception {
        double[][] seen = new double[4][RUNS];
        for (int run = 0; run < RUNS; run++) {
            List<String> command = new ArrayList<>();
            command.add(Path.of(System.getProperty("java.home"), "bin", "java").toString());
            command.addAll(options);
            command.addAll(List.of(
                    "-cp",
                    System.getProperty("java.class.path"),
                    ShelfColdStart.class.getName(),
                    Long.toString(System.currentTimeMillis())));
            Process process = new ProcessBuilder(command)
                    .redirectError(ProcessBuilder.Redirect.INHERIT)
                    .start();
            String[] printed = new String(process.getInputStream().readAllBytes(), StandardCharsets.UTF_8)
                    .strip()
                    .split(" ");
            if (process.waitFor() != 0) throw new IllegalStateException("the process failed");
            for (int i = 0; i < seen.length; i++) seen[i][run] = Double.parseDouble(printed[i]);
        }
        for (double[] column : seen) Arrays.sort(column);
        System.out.printf(
                Locale.ROOT,
                "%-24s %.0f ingredients: wall least %.0f, median %.0f ms; CPU of all threads least %.0f, median %.0f ms;"
                        + " start of the virtual machine before it, median %.0f ms%n",
                name,
                seen[3][0],
                seen[0][0],
                seen[0][RUNS / 2],
                seen[1][0],
                seen[1][RUNS / 2],
                seen[2][RUNS / 2]);
    }
}
