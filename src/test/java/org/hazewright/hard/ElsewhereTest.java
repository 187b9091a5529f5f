package org.hazewright.hard;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import org.hazewright.cli.OneLine;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** In other countries, time zones and folders the commands print and write the same. */
class ElsewhereTest {
    private static final String[] HERE = {"-Duser.language=en", "-Duser.country=US", "-Duser.timezone=UTC"};

    @TempDir
    Path folder;

    @Test
    void everywhereTheSame() throws Exception {
        String here = says("plain", HERE);
        assertTrue(here.contains("Lands inside every tolerance"), here);
        assertEquals(
                here,
                says(
                        "Größe µ İı 100 %",
                        "-Duser.language=de", "-Duser.country=DE", "-Duser.timezone=Pacific/Kiritimati"));
        assertEquals(
                here,
                says("with  spaces", "-Duser.language=tr", "-Duser.country=TR", "-Duser.timezone=Pacific/Marquesas"));
        assertEquals(
                here,
                says(
                        "混ぜる",
                        "-Duser.language=ar",
                        "-Duser.country=EG",
                        "-Duser.timezone=Asia/Kathmandu",
                        "-Dfile.encoding=ISO-8859-1"));
    }

    private String says(String name, String... options) throws IOException, InterruptedException {
        Path place = Files.createDirectories(folder.resolve(name));
        for (String brief : new String[] {"wrist-bath", "clear-window"})
            Files.copy(Path.of("recipes-demo/" + brief + ".brief.toml"), place.resolve(brief + " µ.brief.toml"));
        List<String> command = new ArrayList<>();
        command.add(Path.of(System.getProperty("java.home"), "bin", "java").toString());
        command.addAll(List.of(options));
        command.addAll(List.of(
                "-Dsun.jnu.encoding=UTF-8",
                "-Djava.awt.headless=true",
                "-cp",
                EveryDoorTest.absoluteClassPath(),
                Traveller.class.getName()));
        ProcessBuilder builder =
                new ProcessBuilder(command).directory(place.toFile()).redirectErrorStream(true);
        builder.environment().put("LC_ALL", "C.UTF-8"); // names of files beyond ASCII need it on this system
        Process process = builder.start();
        String said = new String(process.getInputStream().readAllBytes(), StandardCharsets.UTF_8);
        assertEquals(0, process.waitFor(), said);
        return said;
    }

    /** Runs the key commands in the folder that it is started in, and prints what they print and write. */
    static final class Traveller {
        private Traveller() {}

        public static void main(String[] args) throws IOException {
            StringBuilder all = new StringBuilder();
            for (String line : List.of(
                    "design|wrist-bath µ.brief.toml",
                    "design|clear-window µ.brief.toml|--json",
                    "predict|wrist-bath µ.recipe.toml|--at|690.5,830|--units|mm",
                    "readings|--medium|mua_per_cm=0.1,musp_per_cm=10,g=0.8,n=1.4|--setup|slab-10-mm|--json",
                    "particles|polystyrene|--in|water|--diameter-nm|500.5|--at|633",
                    "ingredients|show|water",
                    "ingredients|SHOW|WATER",
                    "predict|wrist-bath µ.recipe.toml|--at|690,5x")) {
                OneLine ran = OneLine.run(line.split("\\|"));
                all.append(line)
                        .append(" ends with ")
                        .append(ran.status())
                        .append('\n')
                        .append(ran.out())
                        .append(ran.err());
            }
            all.append(Files.readString(Path.of("wrist-bath µ.recipe.toml")));
            String here = Path.of("").toAbsolutePath().toString();
            byte[] bytes = all.toString().replace(here, "HERE").getBytes(StandardCharsets.UTF_8);
            System.out.write(bytes, 0, bytes.length);
            System.out.flush();
        }
    }
}
