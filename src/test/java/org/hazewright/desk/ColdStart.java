package org.hazewright.desk;

import java.io.IOException;
import java.lang.management.ManagementFactory;
import java.nio.file.Files;
import java.util.Locale;
import java.util.Optional;
import javafx.application.Platform;
import javafx.scene.Scene;
import org.hazewright.desk.model.Remembered;

/**
 * Opens the window as the program does and says how long it took from the start of the virtual machine to the demo solved and drawn; with the
 * argument "idle" it then rests and says what an idle window takes. See DEVELOPERS.md for the command.
 */
public final class ColdStart {
    private ColdStart() {}

    public static void main(String[] args) throws IOException {
        var memory = Files.createTempDirectory("memory");
        boolean idle = args.length > 0 && args[0].equals("idle");
        Opening.watch(window -> {
            Scene scene = window.stage().getScene();
            boolean[] said = {false};
            scene.addPostLayoutPulseListener(() -> {
                var solving = window.desk().solving();
                if (said[0]
                        || solving.shownProperty().get() == null
                        || solving.curvesProperty().get() == null) return;
                said[0] = true;
                say("solved and drawn after %.2f s", since());
                if (idle) idle();
                else Platform.exit();
            });
            Platform.runLater(() -> say("first frame after %.2f s", since()));
        });
        Opening.open(Optional.empty(), Optional.empty(), Remembered.in(memory, memory.resolve("work")));
    }

    private static double since() {
        return (System.currentTimeMillis()
                        - ManagementFactory.getRuntimeMXBean().getStartTime())
                / 1000.0;
    }

    private static void idle() {
        Thread t = new Thread(() -> {
            try {
                Thread.sleep(15_000);
                long before = cpu();
                long start = System.nanoTime();
                Thread.sleep(20_000);
                say("idle: %.2f %% of a core", 100.0 * (cpu() - before) / (System.nanoTime() - start));
                var heap = ManagementFactory.getMemoryMXBean().getHeapMemoryUsage();
                say("memory: heap in use %d MiB, committed %d MiB", heap.getUsed() >> 20, heap.getCommitted() >> 20);
                if (Files.exists(java.nio.file.Path.of("/proc/self/status")))
                    say(Files.readAllLines(java.nio.file.Path.of("/proc/self/status")).stream()
                            .filter(l -> l.startsWith("VmRSS"))
                            .findFirst()
                            .orElse(""));
            } catch (InterruptedException | IOException e) {
                Thread.currentThread().interrupt();
            }
            Platform.exit();
        });
        t.setDaemon(true);
        t.start();
    }

    private static long cpu() {
        return ((com.sun.management.OperatingSystemMXBean) ManagementFactory.getOperatingSystemMXBean())
                .getProcessCpuTime();
    }

    private static void say(String form, Object... values) {
        System.out.println(String.format(Locale.ROOT, form, values));
    }
}
