package org.hazewright.desk;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;

/** The command that starts the window's own machine. */
class OwnMachineTest {
    @Test
    void carriesWhatWasAskedForAndBoundsTheMemory() {
        List<String> command = OwnMachine.command(
                Path.of("java"),
                List.of("-Dglass.gtk.uiScale=2", "-verbose:gc"),
                Optional.of(Path.of("ingredients")),
                Optional.of(Path.of("a.brief.toml")),
                1440 * 900);
        assertEquals("java", command.get(0));
        assertTrue(command.contains("-Dglass.gtk.uiScale=2"), "settings of the toolkit are handed on");
        assertFalse(command.contains("-verbose:gc"), "settings of the machine are its own");
        assertEquals(1, command.stream().filter(a -> a.startsWith("-Xmx")).count());
        int shelf = command.indexOf("--ingredients");
        // a bare "ingredients" would be taken for the command of that name
        assertTrue(Path.of(command.get(shelf + 1)).isAbsolute());
        assertTrue(Path.of(command.get(command.size() - 1)).isAbsolute());
    }

    private static int heapMiB(double windowPx) {
        return OwnMachine.command(Path.of("java"), List.of(), Optional.empty(), Optional.empty(), windowPx).stream()
                .filter(a -> a.startsWith("-Xmx"))
                .mapToInt(a -> Integer.parseInt(a.substring(4, a.length() - 1)))
                .findFirst()
                .orElseThrow();
    }

    /** Four bytes a pixel, three times over, is what drawing in software may keep beside the rest. */
    @Test
    void aLargeWindowHasRoomForItsPixels() {
        assertTrue((heapMiB(3840 * 2160) - heapMiB(1920 * 1080)) * 1024.0 * 1024 >= 3 * 4 * 3840.0 * 2160);
    }

    /** The installer bounds what commands take, in words that still let the window have its own machine. */
    @Test
    void theInstalledWindowHasItsOwnMachineToo() throws Exception {
        assertTrue(OwnMachine.opensHere(List.of("-Xmx2g")));
        assertFalse(OwnMachine.opensHere(List.of("-XX:MaxHeapSize=2g")));
        String installer = Files.readString(Path.of("src/installer/Installer.java"));
        assertTrue(installer.contains("\"-XX:MaxHeapSize="), "the installed program's commands are not bounded");
        assertFalse(installer.contains("\"-Xmx"), "the installed window would open in the machine of the commands");
    }
}
