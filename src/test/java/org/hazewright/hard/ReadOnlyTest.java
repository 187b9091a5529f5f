package org.hazewright.hard;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.junit.jupiter.api.Assumptions.assumeTrue;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.attribute.PosixFilePermissions;
import java.util.ArrayList;
import java.util.List;
import java.util.stream.Stream;
import org.hazewright.cli.OneLine;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/**
 * Folders and files that a person may not write or read. An administrator may do both everywhere, so where the tests run as one the commands
 * are started as the user nobody (setpriv of util-linux), on copies of the classes that nobody can read.
 */
class ReadOnlyTest {
    private static final String NOBODY = "65534";

    @TempDir
    Path folder;

    @Test
    void whatMayNotBeWrittenOrRead() throws Exception {
        assumeTrue(Files.getFileStore(folder).supportsFileAttributeView("posix"), "a system with permissions");
        Path open = Files.createDirectories(folder.resolve("open"));
        allow(folder, "rwxr-xr-x");
        copy(Path.of("recipes-demo/wrist-bath.brief.toml"), open.resolve("a.brief.toml"));
        Path shut = Files.createDirectories(folder.resolve("shut"));
        Files.writeString(shut.resolve("old.recipe.toml"), "# mine\n");
        allow(shut, "r-xr-xr-x");
        Path secret = copy(open.resolve("a.brief.toml"), open.resolve("secret.brief.toml"));
        allow(secret, "---------");
        allow(open, "rwxrwxrwx");
        List<String> said = asSomebody(
                open,
                "design|a.brief.toml|--out|" + shut,
                "design|secret.brief.toml",
                "design|a.brief.toml|--out|.",
                "batch|open|a.recipe.toml|--id|B1",
                "LOCK|logbook.xlsx",
                "batch|weigh|B1.batch.toml|--lot|1=L07",
                "ingredients|check|" + Files.createDirectories(shelf()));
        assertTrue(said.get(0).startsWith("4 "), said.get(0));
        assertTrue(said.get(0).contains("does not let you write"), said.get(0));
        assertTrue(said.get(1).startsWith("2 "), said.get(1));
        assertTrue(said.get(1).contains("secret.brief.toml"), said.get(1));
        assertTrue(said.get(2).startsWith("0 "), said.get(2));
        assertTrue(said.get(3).startsWith("0 "), said.get(3));
        assertTrue(said.get(5).startsWith("4 ") && said.get(5).contains("write-protected"), said.get(5));
        assertTrue(said.get(6).startsWith("2 ") && said.get(6).contains("locked.toml"), said.get(6));
        for (int k : new int[] {0, 1, 5, 6}) Promise.wellSaid(said.get(k), "");
        assertEquals("# mine\n", Files.readString(shut.resolve("old.recipe.toml")));
        Promise.nothingHalfWritten(folder);
        allow(secret, "rw-------");
        allow(shut, "rwx------");
    }

    private Path shelf() throws IOException {
        Path shelf = Files.createDirectories(folder.resolve("open/shelf"));
        Path locked = Files.writeString(shelf.resolve("locked.toml"), "format = 1\n");
        allow(locked, "---------");
        return shelf;
    }

    /** What each line ends with and says, as a user who is no administrator. */
    private List<String> asSomebody(Path place, String... lines) throws IOException, InterruptedException {
        List<String> command = new ArrayList<>();
        if ("root".equals(System.getProperty("user.name"))) {
            assumeTrue(
                    Files.isExecutable(Path.of("/usr/bin/setpriv")), "an administrator who cannot become another user");
            command.addAll(List.of("/usr/bin/setpriv", "--reuid", NOBODY, "--regid", NOBODY, "--clear-groups"));
        }
        command.addAll(List.of(
                Path.of(System.getProperty("java.home"), "bin", "java").toString(),
                "-Djava.awt.headless=true",
                "-Duser.home=" + place,
                "-cp",
                readableClasses(),
                Somebody.class.getName()));
        command.addAll(List.of(lines));
        Process process = new ProcessBuilder(command)
                .directory(place.toFile())
                .redirectErrorStream(true)
                .start();
        String said = new String(process.getInputStream().readAllBytes(), StandardCharsets.UTF_8);
        assertEquals(0, process.waitFor(), said);
        List<String> answers = List.of(said.split("\u0001"));
        assertEquals(lines.length, answers.size(), said);
        return answers;
    }

    /** Libraries may lie in a home folder that nobody may enter. */
    private String readableClasses() throws IOException {
        Path to = Files.createDirectories(folder.resolve("classes"));
        List<String> all = new ArrayList<>();
        for (String entry : EveryDoorTest.absoluteClassPath().split(java.io.File.pathSeparator)) {
            Path from = Path.of(entry);
            if (!Files.exists(from)) continue;
            Path copy = to.resolve(all.size() + "-" + from.getFileName());
            try (Stream<Path> tree = Files.walk(from)) {
                for (Path p : tree.toList())
                    copy(p, copy.resolve(from.relativize(p).toString()));
            }
            all.add(copy.toString());
        }
        return String.join(java.io.File.pathSeparator, all);
    }

    private static Path copy(Path from, Path to) throws IOException {
        if (Files.isDirectory(from)) Files.createDirectories(to);
        else Files.copy(from, to);
        allow(to, Files.isDirectory(to) ? "rwxr-xr-x" : "rw-r--r--");
        return to;
    }

    private static void allow(Path path, String permissions) throws IOException {
        Files.setPosixFilePermissions(path, PosixFilePermissions.fromString(permissions));
    }

    /** Runs lines of words parted by bars, and prints the status and the words of each. */
    static final class Somebody {
        private Somebody() {}

        public static void main(String[] lines) throws IOException {
            StringBuilder all = new StringBuilder();
            for (String line : lines) {
                String[] words = line.split("\\|");
                if (words[0].equals("LOCK")) {
                    allow(Path.of(words[1]), "r--r--r--");
                    all.append("0 locked\u0001");
                    continue;
                }
                OneLine ran = OneLine.run(words);
                all.append(ran.status())
                        .append(' ')
                        .append(ran.out())
                        .append(ran.err())
                        .append('\u0001');
            }
            byte[] bytes = all.toString().getBytes(StandardCharsets.UTF_8);
            System.out.write(bytes, 0, bytes.length);
            System.out.flush();
        }
    }
}
