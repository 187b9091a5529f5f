package org.hazewright.desk;

import java.io.IOException;
import java.lang.management.ManagementFactory;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.TreeMap;
import java.util.concurrent.ConcurrentLinkedQueue;
import javafx.application.Platform;
import org.hazewright.brief.Point;
import org.hazewright.desk.model.Draft;
import org.hazewright.desk.model.Row;

/**
 * Drags a target up and down at sixty moves a second and measures, for each move, the time until the window has been laid out and drawn
 * with a recipe for it or for a newer one; meanwhile it measures how long the interface thread keeps others waiting. Then it rests and
 * measures what an idle window takes. See DEVELOPERS.md for the command.
 */
public final class DragBenchmark {
    private static final int MOVES = 900;
    private static final long EVERY_NS = 16_666_667;

    private DragBenchmark() {}

    public static void main(String[] args) throws IOException, InterruptedException {
        Path memory = Files.createTempDirectory("memory");
        Optional<Path> file = args.length > 0 ? Optional.of(Path.of(args[0])) : Optional.empty();
        Window window = Stagehand.open(memory, 1440, 900, file, Optional.empty());
        try {
            Stagehand.untilSettled(window);
            drag(window, 300); // the compiler warms up
            Stagehand.untilSettled(window);
            report(drag(window, MOVES));
            Stagehand.untilSettled(window);
            idle();
            memory();
        } finally {
            Platform.exit();
        }
    }

    private record Run(double[] latenciesMs, double[] blockedMs, double uiMsPerMove, double allMsPerMove) {}

    private static Run drag(Window window, int moves) throws InterruptedException {
        Draft start = Stagehand.onUi(() -> window.desk().edits().now());
        Row row = start.rows().get(start.rows().size() / 2);
        double wanted = row.muaPerCm().orElseThrow();
        TreeMap<Integer, Long> asked = new TreeMap<>();
        double[] value = new double[moves];
        List<Double> latencies = new ArrayList<>();
        int[] drawn = {-1};
        Runnable pulse = () -> {
            var shown = window.desk().solving().shownProperty().get();
            double has = shown.outlook().predicted().stream()
                    .filter(p -> p.point().wavelengthNm() == row.wavelengthNm()
                            && p.point().quantity() == Point.Quantity.MUA)
                    .findFirst()
                    .orElseThrow()
                    .point()
                    .wantedPerCm();
            int upTo = -1;
            for (int k : asked.keySet()) if (value[k] == has) upTo = k;
            if (upTo <= drawn[0]) return;
            long now = System.nanoTime();
            for (int k : asked.headMap(upTo, true).keySet())
                if (k > drawn[0]) latencies.add((now - asked.get(k)) / 1e6);
            drawn[0] = upTo;
        };
        ConcurrentLinkedQueue<Double> blocked = new ConcurrentLinkedQueue<>();
        Thread watch = watch(blocked);
        Stagehand.ui(() -> window.stage().getScene().addPostLayoutPulseListener(pulse));
        watch.start();
        long uiBefore = Stagehand.onUi(() -> ManagementFactory.getThreadMXBean().getCurrentThreadCpuTime());
        long allBefore = cpu();
        long next = System.nanoTime();
        for (int k = 0; k < moves; k++) {
            int move = k;
            double to = wanted * (1 + 0.08 * Math.sin(k / 40.0) + 1e-4 * (k % 7));
            Platform.runLater(() -> {
                asked.put(move, System.nanoTime());
                window.desk().editing().drag(row.wavelengthNm(), Point.Quantity.MUA, to);
                value[move] = window.desk()
                        .edits()
                        .now()
                        .row(row.wavelengthNm())
                        .orElseThrow()
                        .muaPerCm()
                        .orElseThrow();
            });
            next += EVERY_NS;
            long left = next - System.nanoTime();
            if (left > 0) Thread.sleep(left / 1_000_000, (int) (left % 1_000_000));
        }
        Thread.sleep(400);
        watch.interrupt();
        watch.join();
        double ui = (Stagehand.onUi(() -> ManagementFactory.getThreadMXBean().getCurrentThreadCpuTime()) - uiBefore)
                / 1e6
                / moves;
        double all = (cpu() - allBefore) / 1e6 / moves;
        Stagehand.ui(() -> {
            window.stage().getScene().removePostLayoutPulseListener(pulse);
            window.desk().editing().settle();
        });
        return new Run(
                latencies.stream().mapToDouble(d -> d).sorted().toArray(),
                blocked.stream().mapToDouble(d -> d).sorted().toArray(),
                ui,
                all);
    }

    /** Asks the interface thread for a moment every 2 ms and notes how long it took to get it. */
    private static Thread watch(ConcurrentLinkedQueue<Double> blocked) {
        return new Thread(() -> {
            try {
                while (!Thread.currentThread().isInterrupted()) {
                    long asked = System.nanoTime();
                    Platform.runLater(() -> blocked.add((System.nanoTime() - asked) / 1e6));
                    Thread.sleep(2);
                }
            } catch (InterruptedException over) {
                Thread.currentThread().interrupt();
            }
        });
    }

    private static void report(Run run) {
        say(
                "drag, edit to redrawn: %d moves, median %.1f ms, 99 %% %.1f ms, most %.1f ms",
                run.latenciesMs.length, at(run.latenciesMs, 0.5), at(run.latenciesMs, 0.99), at(run.latenciesMs, 1));
        say(
                "processor time: %.2f ms a move on the interface thread, %.2f ms on all threads",
                run.uiMsPerMove, run.allMsPerMove);
        long over = Arrays.stream(run.blockedMs).filter(ms -> ms > 16).count();
        say(
                "interface thread: a moment was had after %.2f ms (median), %.1f ms (99 %%), %.1f ms at most; %d of %d above 16 ms",
                at(run.blockedMs, 0.5), at(run.blockedMs, 0.99), at(run.blockedMs, 1), over, run.blockedMs.length);
    }

    private static double at(double[] sorted, double share) {
        return sorted.length == 0
                ? Double.NaN
                : sorted[(int) Math.min(sorted.length - 1, Math.floor(share * sorted.length))];
    }

    private static void idle() throws InterruptedException {
        Thread.sleep(2000);
        long before = cpu();
        long start = System.nanoTime();
        Thread.sleep(10_000);
        say("idle: %.2f %% of a core", 100.0 * (cpu() - before) / (System.nanoTime() - start));
    }

    private static long cpu() {
        return ((com.sun.management.OperatingSystemMXBean) ManagementFactory.getOperatingSystemMXBean())
                .getProcessCpuTime();
    }

    private static void memory() throws IOException {
        System.gc();
        var heap = ManagementFactory.getMemoryMXBean().getHeapMemoryUsage();
        String resident = Files.exists(Path.of("/proc/self/status"))
                ? Files.readAllLines(Path.of("/proc/self/status")).stream()
                        .filter(l -> l.startsWith("VmRSS"))
                        .findFirst()
                        .orElse("")
                        .replaceAll("\\s+", " ")
                : "";
        say(
                "memory: heap in use %d MiB, committed %d MiB; %s",
                heap.getUsed() >> 20, heap.getCommitted() >> 20, resident);
    }

    private static void say(String form, Object... values) {
        System.out.println(String.format(Locale.ROOT, form, values));
    }
}
