package org.hazewright.transport;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import java.util.concurrent.TimeUnit;

/**
 * Throughput of photon packets beside a plain C program of the same physics, one run of both, taking turns.
 *
 * <p>Builds {@code src/test/c/packets.c} with {@code gcc -O3}, then for a slab of 1 mm, one of 10 mm and the semi-infinite
 * medium (µa 0.1, µs 100 /cm, g 0.9, n 1.4 in air; totals and 50 rings of 1 mm) runs C, one thread and two threads after each
 * other, several times, and prints the medians. Run: {@code java -cp … org.hazewright.transport.PacketsBesideC [rounds]}, from
 * the project's folder, on an idle machine.
 */
public final class PacketsBesideC {
    private static final Medium MEDIUM = new Medium(0.1, 10, 0.9, 1.4);

    private PacketsBesideC() {}

    public static void main(String[] args) throws IOException, InterruptedException {
        int rounds = args.length > 0 ? Integer.parseInt(args[0]) : 5;
        Path built = Files.createTempFile("packets", "");
        Process gcc = new ProcessBuilder("gcc", "-O3", "-o", built.toString(), "src/test/c/packets.c", "-lm")
                .inheritIO()
                .start();
        if (gcc.waitFor() != 0) throw new IOException("gcc could not build src/test/c/packets.c");
        List<Ring> rings = new ArrayList<>();
        for (int i = 0; i < 50; i++) rings.add(new Ring(i, i + 1));
        row("slab", "C", "1 thread", "2 threads", "Java/C", "2/1");
        for (double mm : new double[] {1, 10, 0}) {
            long packets = mm == 1 ? 1_000_000 : mm == 10 ? 200_000 : 60_000;
            PhotonPackets problem = new PhotonPackets(MEDIUM, 1, mm == 0 ? null : (Double) mm);
            PacketRun run = PacketRun.of(packets, 1).collecting(Side.REFLECTANCE, rings);
            double[][] rate = new double[3][rounds];
            java(problem, run.onThreads(1));
            for (int i = 0; i < rounds; i++) {
                rate[0][i] = c(built, mm, packets);
                rate[1][i] = java(problem, run.onThreads(1));
                rate[2][i] = java(problem, run.onThreads(2));
            }
            for (double[] r : rate) Arrays.sort(r);
            double peer = rate[0][rounds / 2];
            double one = rate[1][rounds / 2];
            double two = rate[2][rounds / 2];
            row(mm == 0 ? "endless" : mm + " mm", text(peer), text(one), text(two), text(one / peer), text(two / one));
        }
        Files.delete(built);
    }

    /** Packets per second of processor-bound work, by the wall clock. */
    private static double java(PhotonPackets problem, PacketRun run) {
        long start = System.nanoTime();
        PacketTally tally = problem.run(run);
        return tally.packets() / ((System.nanoTime() - start) * 1e-9);
    }

    private static double c(Path program, double mm, long packets) throws IOException, InterruptedException {
        Process p = new ProcessBuilder(
                        program.toString(),
                        "0.01",
                        "10",
                        "0.9",
                        "1.4",
                        Double.toString(mm),
                        Long.toString(packets),
                        "1")
                .start();
        String[] words = new String(p.getInputStream().readAllBytes(), StandardCharsets.UTF_8)
                .trim()
                .split(" ");
        if (!p.waitFor(10, TimeUnit.MINUTES)) throw new IOException("the C program does not end");
        return Double.parseDouble(words[0]);
    }

    private static String text(double x) {
        return String.format(Locale.ROOT, "%.3g", x);
    }

    private static void row(String... cells) {
        StringBuilder line = new StringBuilder();
        for (String cell : cells) line.append(String.format(Locale.ROOT, "%12s", cell));
        System.out.println(line);
    }
}
