package org.hazewright.files;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.Random;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** What is read plainly is what the library, which knows all of TOML 1.0, reads from the same text: values, places, order. */
class PlainTomlTest {
    private static String written(TomlPage page) {
        StringBuilder s = new StringBuilder(page.title()).append('@').append(spot(page.at()));
        page.entries().forEach((key, e) -> s.append('\n').append(key).append(written(e)));
        return s.toString();
    }

    private static String written(TomlPage.Entry e) {
        StringBuilder s = new StringBuilder("@").append(spot(e.at())).append(' ');
        if (e.value() instanceof TomlPage page)
            return s.append('{').append(written(page)).append('}').toString();
        if (e.value() instanceof List<?> list) {
            s.append('[');
            for (Object item : list) s.append(written((TomlPage.Entry) item)).append(',');
            return s.append(']').toString();
        }
        return s.append(e.value().getClass().getSimpleName())
                .append(' ')
                .append(e.value())
                .toString();
    }

    private static String spot(Place at) {
        return at.line() + ":" + at.column();
    }

    private static TextFile file(String text) {
        return new TextFile("it.toml", text, text.getBytes(StandardCharsets.UTF_8));
    }

    private static List<Path> files() throws IOException {
        List<Path> files = new ArrayList<>();
        for (String root : List.of("ingredients", "recipes-demo"))
            try (Stream<Path> all = Files.walk(Path.of(root))) {
                all.filter(p -> p.toString().endsWith(".toml")).forEach(files::add);
            }
        return files;
    }

    @Test
    void everyFileThatShipsIsPlainAndReadAsTheLibraryReadsIt() throws IOException {
        List<Path> files = files();
        assertTrue(files.size() > 80);
        for (Path f : files) {
            TextFile text = TextFile.read(f);
            Optional<TomlPage> plain = PlainToml.parse(text);
            assertTrue(plain.isPresent(), () -> f + " is not plain");
            assertEquals(written(TomlTree.byLibrary(text)), written(plain.get()), f.toString());
        }
    }

    /** Texts near the border of the grammar, by random cuts, doublings and strange characters: 4 000 of them from a fixed seed. */
    @Test
    void damagedTextIsReadAlikeOrLeftToTheLibrary() throws IOException {
        Random random = new Random(20261201);
        List<Path> files = files();
        String strange = "\"'[]{}=,.#\\\n \t\r_-+0e1x:Té\u0000\u007f\uD83D";
        int plainAndChanged = 0;
        for (int n = 0; n < 4000; n++) {
            String whole = Files.readString(files.get(random.nextInt(files.size())));
            int from = random.nextInt(Math.max(1, whole.length() - 300));
            int start = whole.lastIndexOf('\n', from) + 1;
            StringBuilder s = new StringBuilder(whole.substring(start, Math.min(whole.length(), start + 300)));
            for (int k = random.nextInt(3); k >= 0; k--) {
                int at = random.nextInt(s.length());
                switch (random.nextInt(3)) {
                    case 0 -> s.deleteCharAt(at);
                    case 1 -> s.insert(at, strange.charAt(random.nextInt(strange.length())));
                    default -> s.insert(at, s.substring(at, Math.min(s.length(), at + random.nextInt(40))));
                }
            }
            TextFile text = file(s.toString());
            Optional<TomlPage> plain = PlainToml.parse(text);
            if (plain.isEmpty()) continue;
            plainAndChanged++;
            assertEquals(written(TomlTree.byLibrary(text)), written(plain.get()), text.text());
        }
        assertTrue(plainAndChanged > 300, "only " + plainAndChanged + " were plain");
    }

    @ParameterizedTest
    @ValueSource(
            strings = {
                "a = 1\na = 2",
                "a = 01",
                "a = 1_000",
                "a = 0x1F",
                "a = 1e400",
                "a = 1e-400",
                "a = 0.0000000000000000000000000000000000001",
                "a = .5",
                "a = 5.",
                "a = inf",
                "a = 'x'",
                "a = \"\"\"x\"\"\"",
                "a = \"\\n\"",
                "a = \"\"\"\"",
                "a = \"x\u0001\"",
                "# \u0001",
                "a = 2026-02-30",
                "a = 2026-02-03T10:00:00",
                "a = 2026-02-03 10:00:00",
                "a = {b = 1,}",
                "a.b = 1",
                "\"a\" = 1",
                "[a]\n[a]",
                "[a.b]",
                "a = {b = 1}\n[a.c]",
                "a = [1]\n[[a]]",
                "[a]\n[[a]]",
                "a = 1 b = 2",
                "a = 1\r\n",
                "a = 9999999999999999999",
                "a = [1, 2",
                "= 1",
            })
    void whatIsNotPlainIsLeftToTheLibrary(String text) {
        assertTrue(PlainToml.parse(file(text)).isEmpty(), text);
    }

    @ParameterizedTest
    @ValueSource(
            strings = {
                "",
                "# only a word",
                "a = 1",
                "a=-0.5e-3 # half\n\tb = [ ]",
                "a = +7\nb = -0\nc = 1e5\nd = 0.0",
                "a = [1, # one\n  2.5,\n\n  \"three\",\n]",
                "a = {b = {c = [1, {d = 2}]}, e = 2026-03-01}",
                "a = {}\n",
                "[a]\nb = true\n[a.c]\nd = false\n[[a.e]]\nf = 1\n[[a.e]]\nf = 2\n[a.e.g]\nh = 3\n",
                " [ a ] \n 1-x_Y = \"µ\" ",
                "[[a]]\n[[a]]\nb = 1\n[c]",
                "a = [[1, 2], [3]]",
            })
    void plainTextIsReadAsTheLibraryReadsIt(String text) {
        assertEquals(
                written(TomlTree.byLibrary(file(text))),
                written(PlainToml.parse(file(text)).orElseThrow()));
    }
}
