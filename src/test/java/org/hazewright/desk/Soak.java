package org.hazewright.desk;

import java.io.IOException;
import java.lang.management.ManagementFactory;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Locale;
import java.util.Optional;
import java.util.Random;
import javafx.application.Platform;
import org.hazewright.brief.Point;
import org.hazewright.desk.model.AtBalance;
import org.hazewright.desk.model.Draft;
import org.hazewright.desk.model.Row;

/** Uses the window for so many minutes without a pause and says every minute how much memory it takes. See DEVELOPERS.md. */
public final class Soak {
    private Soak() {}

    public static void main(String[] args) throws IOException, InterruptedException {
        double minutes = args.length > 0 ? Double.parseDouble(args[0]) : 60;
        Path memory = Files.createTempDirectory("memory");
        Window window = Stagehand.open(memory, 1440, 900, Optional.empty(), Optional.empty());
        Random random = new Random(1);
        long start = System.nanoTime();
        long told = start;
        int deeds = 0;
        try {
            Stagehand.untilSettled(window);
            while ((System.nanoTime() - start) / 6e10 < minutes) {
                switch (random.nextInt(10)) {
                    case 0 -> shelf(window, random);
                    case 1 -> balance(window);
                    case 2 ->
                        Stagehand.ui(() -> {
                            for (int k = 0; k < 5; k++) window.desk().edits().undo();
                        });
                    default -> drag(window, random);
                }
                deeds++;
                if (random.nextInt(4) == 0) Stagehand.untilSettled(window);
                if (System.nanoTime() - told > 60_000_000_000L) {
                    told = System.nanoTime();
                    say((told - start) / 6e10, deeds);
                }
            }
            Stagehand.untilSettled(window);
            Thread.sleep(40_000);
            say((System.nanoTime() - start) / 6e10, deeds);
        } finally {
            Platform.exit();
        }
    }

    private static void drag(Window window, Random random) throws InterruptedException {
        Draft draft = Stagehand.onUi(() -> window.desk().edits().now());
        Row row = draft.rows().get(random.nextInt(draft.rows().size()));
        Point.Quantity q = random.nextBoolean() ? Point.Quantity.MUA : Point.Quantity.MUSP;
        double v = row.wanted(q).orElse(1);
        for (int k = 0; k < 40; k++) {
            double to = v * (1 + 0.002 * k * (random.nextBoolean() ? 1 : -1));
            Stagehand.ui(() -> window.desk().editing().drag(row.wavelengthNm(), q, to));
            Thread.sleep(16);
        }
        Stagehand.ui(() -> window.desk().editing().settle());
    }

    private static void shelf(Window window, Random random) throws InterruptedException {
        Stagehand.ui(() -> {
            var room = window.desk().shelfRoom();
            var all = window.desk().shelfProperty().get().shelf().orElseThrow().ingredients();
            String id = all.get(random.nextInt(all.size())).id();
            room.compare(id, !room.comparedProperty().get().contains(id));
            window.openShelf();
        });
        Thread.sleep(300);
        Stagehand.ui(window::closeShelf);
    }

    private static void balance(Window window) throws InterruptedException {
        Stagehand.untilSettled(window);
        Stagehand.ui(() -> window.desk().standAtBalance());
        Stagehand.until(
                "the balance", () -> window.desk().weighingProperty().get().isPresent());
        for (int k = 0; k < 10; k++) {
            Stagehand.ui(() -> {
                AtBalance at = window.desk().weighingProperty().get().orElseThrow();
                if (at.nowProperty().get().over()) return;
                at.enter(at.nowProperty().get().line().weighs() ? at.loadWantedG() * 1.001 + " g" : "");
            });
            Thread.sleep(50);
        }
        Stagehand.ui(() -> window.desk().leaveBalance());
    }

    private static void say(double minutes, int deeds) throws IOException {
        var heap = ManagementFactory.getMemoryMXBean().getHeapMemoryUsage();
        Path status = Path.of("/proc/self/status");
        String resident = Files.exists(status)
                ? Files.readAllLines(status).stream()
                        .filter(l -> l.startsWith("VmRSS"))
                        .findFirst()
                        .orElse("")
                        .replaceAll("\\s+", " ")
                : "";
        System.out.println(String.format(
                Locale.ROOT,
                "%.1f min, %d deeds: heap in use %d MiB, committed %d MiB; %s",
                minutes,
                deeds,
                heap.getUsed() >> 20,
                heap.getCommitted() >> 20,
                resident));
    }
}
