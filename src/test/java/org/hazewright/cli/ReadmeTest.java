package org.hazewright.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;

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
import org.junit.jupiter.api.DynamicTest;
import org.junit.jupiter.api.TestFactory;
import org.junit.jupiter.api.io.TempDir;

/** What the README shows is what the commands print. */
class ReadmeTest {
    private static final Path README = Path.of("README.md");
    private static final Pattern SHOWN = Pattern.compile("<!-- prints: (.+?) -->\\R```\\R(.*?)```", Pattern.DOTALL);

    @TempDir
    static Path folder;

    @TestFactory
    Stream<DynamicTest> shownIsPrinted() throws IOException {
        List<DynamicTest> tests = new ArrayList<>();
        Matcher shown = SHOWN.matcher(Files.readString(README));
        while (shown.find()) {
            String command = shown.group(1);
            String text = shown.group(2);
            tests.add(DynamicTest.dynamicTest(command, () -> assertEquals(text, print(command))));
        }
        assertFalse(tests.isEmpty(), "the README shows no output");
        return tests.stream();
    }

    /** The output without the lines that name written files. */
    private static String print(String command) {
        List<String> args = new ArrayList<>(List.of(command.split(" ")));
        if (args.get(0).equals("design")) args.addAll(List.of("--out", folder.toString(), "--quiet"));
        StringWriter out = new StringWriter();
        Hazewright.run(new PrintWriter(out), new PrintWriter(new StringWriter()), args.toArray(String[]::new));
        return out.toString().replace("\r\n", "\n");
    }

    /** Puts what the commands print now into the README: {@code mvn -q test-compile exec:java -Dexec.classpathScope=test
     * -Dexec.mainClass=org.hazewright.cli.ReadmeTest}; read the difference before committing it. */
    public static void main(String[] args) throws IOException {
        folder = Files.createTempDirectory("readme");
        Matcher shown = SHOWN.matcher(Files.readString(README));
        String text = shown.replaceAll(m ->
                Matcher.quoteReplacement("<!-- prints: " + m.group(1) + " -->\n```\n" + print(m.group(1)) + "```"));
        Files.writeString(README, text);
    }
}
