package org.hazewright.desk;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

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
                Optional.of(Path.of("a.brief.toml")));
        assertEquals("java", command.get(0));
        assertTrue(command.contains("-Dglass.gtk.uiScale=2"), "settings of the toolkit are handed on");
        assertFalse(command.contains("-verbose:gc"), "settings of the machine are its own");
        assertTrue(command.stream().anyMatch(a -> a.startsWith("-Xmx")));
        int shelf = command.indexOf("--ingredients");
        // a bare "ingredients" would be taken for the command of that name
        assertTrue(Path.of(command.get(shelf + 1)).isAbsolute());
        assertTrue(Path.of(command.get(command.size() - 1)).isAbsolute());
    }
}
