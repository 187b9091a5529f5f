package org.hazewright.files;

import static org.junit.jupiter.api.Assertions.assertNotNull;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.junit.jupiter.api.Assertions.fail;

import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Random;
import org.hazewright.brief.Tissue;
import org.hazewright.optics.Refusal;
import org.hazewright.optics.Spectrum;
import org.hazewright.shelf.Shelf;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** Whatever happens to a file's text, reading it gives a value or one refusal with a message: never another exception. */
class MutationTest {
    private static final int ROUNDS = 800;
    private static final String[] PIECES = {
        "\"",
        "'",
        "[",
        "]",
        "[[",
        "]]",
        "{",
        "}",
        "=",
        ",",
        ".",
        "#",
        "\n",
        "\r",
        "\t",
        " ",
        "-",
        "+",
        "1e400",
        "nan",
        "inf",
        "0x1",
        "true",
        "1979-05-27",
        "\\u0000",
        "\\",
        "µ",
        "\uD83D\uDE00",
        "\uFEFF",
        "..",
        "/",
        "99999999999999999999",
        "-1",
        "0",
        "[[item]]",
        "[tissue]",
        "\"\"\"",
        "1e-320",
        "a.b.c = 1",
        "format = 2",
        ";",
        "0,5"
    };

    @TempDir
    Path folder;

    private static final String BRIEF = """
            format = 1
            title = "Block"
            base = ["gelatin-10", "water"]
            overage = 0.05
            [[mould]]
            shape = "box"
            length_mm = 100
            width_mm = 50
            height_mm = 20
            [tolerance]
            mua = 0.1
            [[target]]
            wavelength_nm = 830
            musp_per_cm = 8
            musp_tolerance_per_cm = 0.3
            [tissue]
            wavelengths_nm = [690, 760]
            haemoglobin_umol_per_l = 60
            saturation = 0.70
            water_fraction = 0.60
            musp_per_cm_at_500nm = 15.0
            scatter_power = 1.1
            [shelf]
            avoid = ["salt"]
            [balance]
            readability_g = 0.01
            """;

    private static final String RECIPE = """
            format = 1
            base = "water"
            [[stock]]
            id = "s"
            ingredient = "ink"
            ingredient_g = 1.0
            diluent = "water"
            diluent_g = 99.0
            [[item]]
            stock = "s"
            lot = "x"
            mass_g = 12.34
            [[item]]
            ingredient = "water"
            mass_g = 200
            """;

    @Test
    void briefs() {
        Spectrum flat = new Spectrum("flat", new double[] {600, 900}, new double[] {1, 1});
        Tissue.Spectra spectra = new Tissue.Spectra(flat, flat, flat, flat);
        mutate(folder.resolve("b.brief.toml"), BRIEF, 1, file -> BriefReader.read(file, () -> spectra));
    }

    @Test
    void series() {
        Spectrum flat = new Spectrum("flat", new double[] {600, 900}, new double[] {1, 1});
        Tissue.Spectra spectra = new Tissue.Spectra(flat, flat, flat, flat);
        Path file = folder.resolve("s.brief.toml");
        mutate(file, SeriesReaderTest.GRID, 4, f -> SeriesReader.read(f, () -> spectra));
        mutate(file, SeriesReaderTest.ROWS, 5, f -> SeriesReader.read(f, () -> spectra));
    }

    @Test
    void recipesAndBatches() {
        Shelf shelf = ShelfReader.read(SmallShelf.in(folder));
        mutate(folder.resolve("r.recipe.toml"), RECIPE, 2, file -> RecipeReader.read(file, shelf));
        mutate(folder.resolve("r.batch.toml"), RECIPE, 3, file -> RecipeReader.read(file, shelf));
    }

    @Test
    void ingredientsLotsMaterialsAndTables() {
        SmallShelf.in(folder);
        List<String> files = List.of(
                "ink.toml",
                "emulsion.toml",
                "emulsion-L07.toml",
                "gelatin-10.toml",
                "water.toml",
                "materials/oil.toml",
                "spectra/ink.csv");
        for (int i = 0; i < files.size(); i++) {
            Path file = folder.resolve(files.get(i));
            String text = read(file);
            mutate(
                    file,
                    text,
                    10 + i,
                    f -> {
                        ShelfReader.Lenient lenient = ShelfReader.readLenient(folder);
                        for (FileRefusal refusal : lenient.refusals()) wellSaid(refusal);
                        return lenient;
                    },
                    ROUNDS / 10);
            Marked.write(file, text);
        }
    }

    @Test
    void bytesThatAreNoText() throws Exception {
        Random random = new Random(99);
        Path file = folder.resolve("b.brief.toml");
        for (int i = 0; i < 500; i++) {
            byte[] bytes = BRIEF.getBytes(StandardCharsets.UTF_8);
            for (int k = 0; k <= random.nextInt(3); k++)
                bytes[random.nextInt(bytes.length)] = (byte) random.nextInt(256);
            Files.write(file, bytes);
            attempt(file, f -> BriefReader.read(f, TissueSpectra.of(null)), "");
        }
    }

    private interface Reading {
        Object of(Path file);
    }

    private static void mutate(Path file, String text, long seed, Reading reading) {
        mutate(file, text, seed, reading, ROUNDS);
    }

    private static void mutate(Path file, String text, long seed, Reading reading, int rounds) {
        Random random = new Random(seed);
        Marked.write(file, text);
        assertNotNull(reading.of(file), "unchanged it is read");
        for (int i = 0; i < rounds; i++) {
            String mutated = text;
            for (int k = 0; k <= random.nextInt(3); k++) mutated = mutated(mutated, random);
            Marked.write(file, mutated);
            attempt(file, reading, mutated);
        }
    }

    private static void attempt(Path file, Reading reading, String text) {
        try {
            assertNotNull(reading.of(file));
        } catch (FileRefusal refusal) {
            wellSaid(refusal);
        } catch (Refusal refusal) {
            fail("A refusal without a place: " + refusal.getMessage() + "\n" + text, refusal);
        } catch (RuntimeException | StackOverflowError other) {
            fail(other + "\n" + text, other);
        }
    }

    private static void wellSaid(FileRefusal refusal) {
        String message = refusal.getMessage();
        assertTrue(message.startsWith(refusal.path()), message);
        assertTrue(refusal.line() >= 0 && refusal.column() >= 0, message);
        assertTrue(message.endsWith(".") || message.endsWith("?"), message);
        assertTrue(!message.contains("Exception") && !message.contains("null"), message);
    }

    private static String mutated(String text, Random random) {
        int at = random.nextInt(text.length() + 1);
        int to = Math.min(text.length(), at + random.nextInt(12));
        String piece = PIECES[random.nextInt(PIECES.length)];
        return switch (random.nextInt(6)) {
            case 0 -> text.substring(0, at) + text.substring(to);
            case 1 -> text.substring(0, at) + piece + text.substring(at);
            case 2 -> text.substring(0, at) + piece + text.substring(to);
            case 3 -> text.substring(0, at);
            case 4 -> text.substring(0, to) + text.substring(at);
            default -> swapLines(text, random);
        };
    }

    private static String swapLines(String text, Random random) {
        String[] lines = text.split("\n", -1);
        int a = random.nextInt(lines.length);
        int b = random.nextInt(lines.length);
        String line = lines[a];
        lines[a] = lines[b];
        lines[b] = line;
        return String.join("\n", lines);
    }

    private static String read(Path file) {
        return TextFile.read(file).text();
    }
}
