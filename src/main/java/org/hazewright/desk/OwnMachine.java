package org.hazewright.desk;

import java.io.IOException;
import java.lang.management.ManagementFactory;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalInt;

/**
 * A virtual machine of the window's own, set up for a window: it starts sooner and holds on to less memory than the usual set-up, which is
 * made for servers.
 *
 * <p>The program as it was started waits for it, so that a terminal behaves as ever. Whoever starts Java with {@code -Xmx} has said how much
 * memory there shall be: then the window opens in the machine as it is. So it does where no Java launcher is found beside the running one.
 * The installed program bounds its commands in other words ({@code src/installer}), so that its window comes here too.
 */
final class OwnMachine {
    private static final String THERE = "hazewright.window";

    /** The heap holds the shelf, the recipe and the kept angular patterns several times over; see the command that measures memory. */
    private static final String HEAP = "-Xmx176m";

    /** Where there is no graphics processor, a window as large as 3840 × 2160 keeps 100 MiB of pixels in the heap. */
    private static final String HEAP_OF_A_LARGE_WINDOW = "-Xmx288m";

    private static final double LARGE_PX = 2600 * 1500;

    private static final List<String> SET_UP = List.of(
            "-XX:+UseG1GC",
            "-XX:MaxGCPauseMillis=12",
            "-XX:TieredStopAtLevel=1",
            "-XX:-UsePerfData",
            "-D" + THERE + "=here");

    private OwnMachine() {}

    /** {@code windowPx} is how large the window was last. Runs the window elsewhere and comes back with its exit status when it is closed; empty when it has to open here. */
    static OptionalInt run(Optional<Path> shelfFolder, Optional<Path> first, double windowPx) {
        if (System.getProperty(THERE) != null) return OptionalInt.empty();
        List<String> given = ManagementFactory.getRuntimeMXBean().getInputArguments();
        if (opensHere(given)) return OptionalInt.empty();
        try {
            Optional<Path> java = launcher(Path.of(System.getProperty("java.home"), "bin"));
            if (java.isEmpty()) return OptionalInt.empty();
            Process window = new ProcessBuilder(command(java.get(), given, shelfFolder, first, windowPx))
                    .inheritIO()
                    .start();
            return OptionalInt.of(window.onExit().join().exitValue());
        } catch (IOException none) {
            return OptionalInt.empty();
        }
    }

    /** Whether the machine was started in words that the window is to open in it. */
    static boolean opensHere(List<String> given) {
        return given.stream().anyMatch(a -> a.startsWith("-Xmx") || a.startsWith("-agentlib"));
    }

    private static Optional<Path> launcher(Path bin) {
        for (String name : List.of("java", "java.exe"))
            if (Files.isExecutable(bin.resolve(name))) return Optional.of(bin.resolve(name));
        return Optional.empty();
    }

    static List<String> command(
            Path java, List<String> given, Optional<Path> shelfFolder, Optional<Path> first, double windowPx) {
        List<String> command = new ArrayList<>(List.of(java.toString()));
        command.addAll(given.stream().filter(a -> a.startsWith("-D")).toList());
        command.add(windowPx > LARGE_PX ? HEAP_OF_A_LARGE_WINDOW : HEAP);
        command.addAll(SET_UP);
        command.addAll(List.of("-cp", System.getProperty("java.class.path"), "org.hazewright.cli.Hazewright"));
        shelfFolder.ifPresent(folder ->
                command.addAll(List.of("--ingredients", folder.toAbsolutePath().toString())));
        first.ifPresent(file -> command.add(file.toAbsolutePath().toString()));
        return command;
    }
}
