package org.hazewright.hard;

import com.sun.management.OperatingSystemMXBean;
import java.io.IOException;
import java.lang.management.ManagementFactory;
import java.nio.file.Files;
import java.nio.file.Path;

/** What the fuzzing engine calls, once an input; the door is a system property, its folder the one it is run in. */
public final class FuzzTarget {
    private static final double MOST_S = 5;
    private static final Door DOOR = Door.valueOf(System.getProperty("door"));
    private static final Path THINGS = Path.of("");
    private static final OperatingSystemMXBean SYSTEM =
            (OperatingSystemMXBean) ManagementFactory.getOperatingSystemMXBean();

    private FuzzTarget() {}

    /** Loads what is loaded once, so that no input is charged for it. */
    public static void fuzzerInitialize() throws IOException {
        for (Path seed : DOOR.seeds(THINGS)) DOOR.open(THINGS, Files.readAllBytes(seed));
    }

    public static void fuzzerTestOneInput(byte[] bytes) {
        long before = SYSTEM.getProcessCpuTime();
        DOOR.open(THINGS, bytes);
        double seconds = (SYSTEM.getProcessCpuTime() - before) * 1e-9;
        if (seconds > MOST_S) throw new AssertionError("Took " + seconds + " s of processor time.");
    }
}
