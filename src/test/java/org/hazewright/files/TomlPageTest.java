package org.hazewright.files;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.nio.file.Path;
import java.time.LocalDate;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import java.util.function.Consumer;
import java.util.stream.Stream;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Part;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;

class TomlPageTest {
    @TempDir
    Path folder;

    private TomlPage page(String text) {
        return TomlPage.read(Marked.write(folder.resolve("page.toml"), text));
    }

    @Test
    void readsEveryTypeOfValue() {
        TomlPage page = page("""
                format = 1
                whole = 12
                real = -1.5e-3
                text = "  µs' "
                flag = true
                day = 2026-03-01
                list = [1, 2.5]
                words = ["base", "absorber"]
                one = "x"
                inline = {a = 1}
                [table]
                b = 2
                [[rows]]
                c = 3
                [[rows]]
                c = 4
                """);
        page.requireFormat();
        assertEquals(12, page.number("whole"));
        assertEquals(12, page.whole("whole", 0, 12, 0));
        assertEquals(-1.5e-3, page.number("real"));
        assertEquals("µs'", page.text("text"));
        assertTrue(page.flag("flag", false));
        assertEquals(Optional.of(LocalDate.of(2026, 3, 1)), page.date("day"));
        assertArrayEquals(new double[] {1, 2.5}, page.numbers("list"));
        assertEquals(List.of(Part.BASE, Part.ABSORBER), page.words("words", Part.class));
        assertEquals(List.of("x"), page.textOrTexts("one"));
        assertEquals(1, page.requireTable("inline").number("a"));
        assertEquals(2, page.requireTable("table").number("b"));
        assertEquals(4, page.tables("rows").get(1).number("c"));
        assertEquals(
                new Place(page.at().path(), 16, 1), page.tables("rows").get(1).at("c"));
    }

    @Test
    void whatIsNotThereIsEmptyOrAsAsked() {
        TomlPage page = page("format = 1\n");
        assertEquals(OptionalDouble.empty(), page.maybeNumber("a"));
        assertEquals(OptionalDouble.empty(), page.maybePositive("a"));
        assertEquals(OptionalDouble.empty(), page.maybeNotNegative("a"));
        assertEquals(Optional.empty(), page.maybeText("a"));
        assertEquals(Optional.empty(), page.date("a"));
        assertEquals(Optional.empty(), page.table("a"));
        assertEquals(List.of(), page.tables("a"));
        assertEquals(List.of(), page.texts("a"));
        assertEquals(7, page.number("a", 7));
        assertEquals(7, page.positive("a", 7));
        assertEquals(7, page.within("a", 0, 1, 7));
        assertEquals(7, page.whole("a", 0, 1, 7));
        assertEquals("b", page.text("a", "b"));
        assertTrue(page.flag("a", true));
    }

    static Stream<Arguments> refused() {
        return Stream.of(
                kind("a = 1\n▶b = \"0.5\"", p -> p.number("b"), "b is the text \"0.5\"", "without quotes"),
                kind("▶b = true", p -> p.number("b"), "b is true; it must be a number."),
                kind("▶b = nan", p -> p.number("b"), "b is NaN; it must be a finite number."),
                kind("▶b = -inf", p -> p.number("b"), "finite"),
                kind("[t]\n  ▶b = 0", p -> p.requireTable("t").positive("b"), "[t] b is 0; it must be above 0."),
                kind("▶b = -0.25", p -> p.notNegative("b"), "b is -0.25; it must be 0 or above."),
                kind("▶b = 1.5", p -> p.within("b", 0, 1), "b is 1.5; it must lie between 0 and 1."),
                kind("▶b = 1.5", p -> p.whole("b", 0, 8, 2), "whole number between 0 and 8"),
                kind("▶b = 9", p -> p.whole("b", 0, 8, 2), "whole number between 0 and 8"),
                kind("▶a = 1", p -> p.number("b"), "The key b is missing; it must be a number."),
                kind(
                        "a = 1\n▶[t.u]\n",
                        p -> p.requireTable("t").requireTable("u").text("v"),
                        "The key v in [t.u] is missing"),
                kind("▶b = 3", p -> p.text("b"), "b is 3; it must be text in double quotes."),
                kind("▶b = [1]", p -> p.text("b"), "b is a list"),
                kind("▶b = 1979-05-27", p -> p.text("b"), "the date or time 1979-05-27"),
                kind("▶b = \" \"", p -> p.text("b"), "b is empty"),
                kind("▶b = \"a\\nb\"", p -> p.text("b"), "line break"),
                kind("b = [\"x\", ▶3]", p -> p.texts("b"), "holds 3; it takes texts"),
                kind("▶b = \"x\"", p -> p.texts("b"), "a list of texts"),
                kind("▶b = []", p -> p.textOrTexts("b"), "at least one"),
                kind("b = [1,\n  ▶\"x\"]", p -> p.numbers("b"), "Entry 2 of b is the text \"x\""),
                kind("▶b = 1", p -> p.numbers("b"), "a list of numbers"),
                kind("▶b = \"yes\"", p -> p.flag("b", false), "true or false, without quotes"),
                kind("▶b = \"2026-03-01\"", p -> p.date("b"), "a date without quotes: 2026-03-01"),
                kind("▶b = \"scaterer\"", p -> p.word("b", Part.class), "Perhaps \"scatterer\" is meant"),
                kind(
                        "b = [\"base\", ▶\"zzzzzzz\"]",
                        p -> p.words("b", Part.class),
                        "base, absorber, scatterer, modifier"),
                kind("▶b = \"mei\"", p -> p.oneOf("b", "mie", "power"), "Perhaps \"mie\" is meant"),
                kind("▶b = 1", p -> p.table("b"), "a line [b]"),
                kind("▶a = 1", p -> p.requireTable("b"), "The table [b] is missing"),
                kind("▶b = 1", p -> p.tables("b"), "a line [[b]]"),
                kind("b = [▶1]", p -> p.tables("b"), "holds 1"),
                kind(
                        "mass_g = 1\n▶mas_g = 2",
                        p -> p.refuseUnknown("mass_g"),
                        "mas_g is not known. Perhaps mass_g is meant."),
                kind(
                        "[t]\n▶qqqqqqqqqqq = 2",
                        p -> p.requireTable("t").refuseUnknown("b", "a"),
                        "in [t] is not known. Known here: a, b."),
                kind("▶a = 1", TomlPage::requireFormat, "format is missing", "format = 1"),
                kind("▶format = 2", TomlPage::requireFormat, "format is 2", "format = 1"),
                kind("▶format = \"1\"", TomlPage::requireFormat, "format is the text \"1\""),
                kind(
                        "▶b = 1",
                        p -> p.holding("b", () -> Refusal.within("x", 3, 0, 1)),
                        "x is 3.0; it must lie between 0.0 and 1.0."));
    }

    @ParameterizedTest
    @MethodSource
    void refused(String text, Consumer<TomlPage> asking, String[] words) {
        Path file = folder.resolve("page.toml");
        Marked.of(text).refusedAs(file, () -> asking.accept(TomlPage.read(file)), words);
    }

    static Stream<Arguments> broken() {
        return Stream.of(
                kind("a = ▶\n", "The TOML breaks off here", "expected a value"),
                kind("a = 0▶,5\n", "Numbers take a decimal point: 0.5, not 0,5."),
                kind("a = [0,5]\nb = 1▶,25 # cm\n", "decimal point"),
                kind("form = ▶liquid\n", "Text stands in double quotes"),
                kind("a = 1\n▶a = 2\n", "a previously defined at line 1"),
                kind("[t]\n▶[t]\n", "previously defined"),
                kind("a = ▶\nb = ]\nc = [\n", "2 more errors follow."),
                kind("a = ▶\nb = ]\n", "One more error follows."),
                kind("a = {b = 1,▶\n c = 2}", "inline table"),
                kind("a = ▶1e400", "too large"),
                kind("a = ▶99999999999999999999", "too large"),
                kind("a = \"x▶\u0001\"", "\\u0001"));
    }

    @ParameterizedTest
    @MethodSource
    void broken(String text, Consumer<TomlPage> unused, String[] words) {
        Path file = folder.resolve("page.toml");
        Marked.of(text).refusedAs(file, () -> TomlPage.read(file), words);
    }

    @Test
    void deepNestingIsRefusedAndDoesNotOverflow() {
        for (String deep : new String[] {
            "a = " + "[".repeat(20_000) + "]".repeat(20_000),
            "a" + ".a".repeat(20_000) + " = 1",
            "a = " + "{b=".repeat(20_000)
        }) {
            Path file = Marked.write(folder.resolve("page.toml"), deep);
            assertThrows(FileRefusal.class, () -> TomlPage.read(file));
        }
    }

    @Test
    void windowsLineEndsCountAsOneLine() {
        TomlPage page = page("a = 1\r\nb = 2\r\n[t]\r\nc = 3\r\n");
        assertEquals(4, page.requireTable("t").at("c").line());
        assertEquals(1, page.requireTable("t").at("c").column());
    }

    @Test
    void aPageLaidOverAnotherKeepsThePlaceOfEachKey() {
        TomlPage below = TomlPage.read(
                Marked.write(folder.resolve("below.toml"), "a = 1\nb = 2\n[m]\nx = 1\ny = 2\n[r]\nz = 1\n"));
        TomlPage top = TomlPage.read(Marked.write(folder.resolve("top.toml"), "\nb = 3\n[m]\ny = 5\n[r]\nw = 1\n"));
        TomlPage both = top.over(below, Set.of("m"));
        assertEquals(1, both.number("a"));
        assertEquals(3, both.number("b"));
        assertTrue(both.at("a").path().endsWith("below.toml"));
        assertTrue(both.at("b").path().endsWith("top.toml"));
        assertEquals(1, both.requireTable("m").number("x"));
        assertEquals(5, both.requireTable("m").number("y"));
        assertEquals(Set.of("w"), both.requireTable("r").keys());
    }

    private static Arguments kind(String text, Consumer<TomlPage> asking, String... words) {
        return Arguments.of(text, asking, words);
    }

    private static Arguments kind(String text, String... words) {
        return Arguments.of(text, null, words);
    }
}
