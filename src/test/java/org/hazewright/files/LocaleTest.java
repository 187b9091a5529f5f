package org.hazewright.files;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.nio.charset.StandardCharsets;
import java.nio.file.Path;
import java.util.List;
import java.util.Locale;
import java.util.OptionalDouble;
import org.hazewright.brief.Brief;
import org.hazewright.mixture.Recipe;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Shelf;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** Files are read, written and refused the same wherever the program runs: Turkish dotless i, German decimal comma. */
class LocaleTest {
    @TempDir
    Path folder;

    @ParameterizedTest
    @CsvSource({"tr,TR", "de,DE", "ar,EG"})
    void everyWhereTheSame(String language, String country) throws Exception {
        SmallShelf.in(folder);
        assertEquals(says(folder, "en", "US"), says(folder, language, country));
    }

    private static String says(Path folder, String language, String country) throws Exception {
        Process process = new ProcessBuilder(
                        Path.of(System.getProperty("java.home"), "bin", "java").toString(),
                        "-Duser.language=" + language,
                        "-Duser.country=" + country,
                        "-cp",
                        System.getProperty("java.class.path"),
                        Reader.class.getName(),
                        folder.toString())
                .redirectErrorStream(true)
                .start();
        String said = new String(process.getInputStream().readAllBytes(), StandardCharsets.UTF_8);
        assertEquals(0, process.waitFor(), said);
        return said;
    }

    /** Reads everything and prints what came of it, in a Java machine of its own. */
    static final class Reader {
        public static void main(String[] args) {
            Path folder = Path.of(args[0]);
            StringBuilder out = new StringBuilder();
            Shelf shelf = ShelfReader.read(folder);
            out.append(shelf.require("ink").absorption().get().kappaCm2PerG(650))
                    .append('\n');
            out.append(shelf.require("emulsion-L07").scattering()).append('\n');
            Path brief = Marked.write(
                    folder.resolve("FOREARM-I.BRIEF.TOML"),
                    "format = 1\nbase = \"water\"\nbatch_ml = 250\n[[target]]\nwavelength_nm = 690\nmua_per_cm = 0.12345\n");
            Brief read = BriefReader.read(brief, TissueSpectra.of(null));
            if (!read.targets().get(0).muaPerCm().equals(OptionalDouble.of(0.12345))) throw new AssertionError();
            out.append(read).append('\n');
            Path recipe = Marked.write(
                    folder.resolve("I.BATCH.TOML"),
                    "format = 1\nbase = \"water\"\n[[item]]\ningredient = \"water\"\nmass_g = 1234.5\nweighed_g = 1234567.5\n");
            Recipe made = RecipeReader.read(recipe, shelf);
            out.append(RecipeWriter.text(made, List.of("note")));
            for (String broken : List.of(
                    "FORMAT = 1", "format = 1\nbase = \"water\"\nbatch_ml = -1234.5\n", "format = 1\nbatch_ml = 1,5\n"))
                try {
                    BriefReader.read(Marked.write(brief, broken), TissueSpectra.of(null));
                    throw new AssertionError(broken);
                } catch (Refusal refusal) {
                    out.append(refusal.getMessage()).append('\n');
                }
            byte[] bytes = (Locale.getDefault().getLanguage().isEmpty() ? "no locale" : out.toString())
                    .getBytes(StandardCharsets.UTF_8);
            System.out.write(bytes, 0, bytes.length);
            System.out.flush();
        }
    }
}
