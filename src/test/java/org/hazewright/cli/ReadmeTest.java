package org.hazewright.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.io.PrintWriter;
import java.io.StringWriter;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import java.util.stream.Stream;
import org.hazewright.bench.Cautions;
import org.junit.jupiter.api.DynamicTest;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.TestFactory;
import org.junit.jupiter.api.io.TempDir;

/** What the README shows is what the commands print, run one after the other as a reader would, in a copy of the demo. */
class ReadmeTest {
    private static final Path README = Path.of("README.md");

    /** A block of output with its command in the mark above it, or in its own first line. */
    private static final Pattern SHOWN = Pattern.compile(
            "<!-- prints: (?<above>.+?) -->\\R```\\R(?<printed>.*?)```|<!-- tour -->\\R```\\R\\$ hazewright (?<typed>.+?)\\R(?<told>.*?)```",
            Pattern.DOTALL);

    @TempDir
    static Path folder;

    @TestFactory
    Stream<DynamicTest> shownIsPrinted() throws IOException {
        copyDemo();
        List<DynamicTest> tests = new ArrayList<>();
        boolean tour = false;
        Matcher shown = SHOWN.matcher(Files.readString(README));
        while (shown.find()) {
            String command = command(shown);
            String text = shown.group("typed") == null ? shown.group("printed") : shown.group("told");
            tour |= shown.group("typed") != null;
            tests.add(DynamicTest.dynamicTest(command, () -> assertEquals(text, print(command))));
        }
        assertTrue(tour, "the README shows no tour");
        return tests.stream();
    }

    private static String command(Matcher shown) {
        return shown.group("typed") == null ? shown.group("above") : shown.group("typed");
    }

    /** The output with folders as the reader has them, and without the lines that name a recipe's files. */
    private static String print(String command) {
        List<String> args = new ArrayList<>();
        for (String word : command.split(" "))
            args.add(word.startsWith("recipes-demo/") || word.startsWith("first-recipe/") ? folder + "/" + word : word);
        if (args.get(0).equals("design")) args.addAll(List.of("--out", folder + "/first-recipe", "--quiet"));
        StringWriter out = new StringWriter();
        Hazewright.run(new PrintWriter(out), new PrintWriter(out), args.toArray(String[]::new));
        return out.toString().replace("\r\n", "\n").replace(folder + "/", "");
    }

    @Test
    void cautionsAreThoseOfTheSheet() throws IOException {
        String flowing = Files.readString(README).replaceAll("\\s+", " ");
        for (String caution : Cautions.GENERAL) assertTrue(flowing.contains("- " + caution), caution);
    }

    private static void copyDemo() throws IOException {
        Path demo = Path.of("recipes-demo");
        try (Stream<Path> files = Files.walk(demo)) {
            for (Path file :
                    files.filter(f -> f.toString().matches(".*\\.(toml|csv)")).toList()) {
                Path to = folder.resolve(file.toString());
                Files.createDirectories(to.getParent());
                Files.copy(file, to);
            }
        }
    }

    /** Puts what the commands print now into the README: {@code mvn -q test-compile exec:java -Dexec.classpathScope=test
     * -Dexec.mainClass=org.hazewright.cli.ReadmeTest}; read the difference before committing it. */
    public static void main(String[] args) throws IOException {
        folder = Files.createTempDirectory("readme");
        copyDemo();
        Matcher shown = SHOWN.matcher(Files.readString(README));
        String text = shown.replaceAll(m -> {
            Matcher block = (Matcher) m;
            String mark = block.group("typed") == null
                    ? "<!-- prints: " + command(block) + " -->\n```\n"
                    : "<!-- tour -->\n```\n$ hazewright " + command(block) + "\n";
            return Matcher.quoteReplacement(mark + print(command(block)) + "```");
        });
        Files.writeString(README, text);
    }
}
