package org.hazewright.hard;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.google.common.jimfs.Configuration;
import com.google.common.jimfs.Jimfs;
import java.io.IOException;
import java.nio.file.FileSystem;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.stream.Stream;
import org.hazewright.brief.Brief;
import org.hazewright.cli.OneLine;
import org.hazewright.files.BatchReader;
import org.hazewright.files.BriefReader;
import org.hazewright.files.FileNames;
import org.hazewright.files.RecipeReader;
import org.hazewright.files.SafeFile;
import org.hazewright.files.ShelfReader;
import org.hazewright.files.TissueSpectra;
import org.hazewright.files.WriteFailure;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/**
 * Paths, names and line ends as Windows and macOS have them, on file systems in memory that keep their rules (jimfs): drives and backslashes,
 * case that does not count, composed and decomposed letters.
 */
class OtherSystemsTest {
    @TempDir
    Path folder;

    private static List<FileSystem> systems() {
        return List.of(Jimfs.newFileSystem(Configuration.windows()), Jimfs.newFileSystem(Configuration.osX()));
    }

    private static Path home(FileSystem system) throws IOException {
        return Files.createDirectories(system.getRootDirectories()
                .iterator()
                .next()
                .resolve("Users")
                .resolve("Ünal Größe")
                .resolve("with  spaces"));
    }

    @Test
    void writtenReplacedKeptAndRefused() throws IOException {
        for (FileSystem system : systems())
            try (system) {
                Path file = home(system).resolve("not there yet").resolve("bath.recipe.toml");
                SafeFile.write(file, "one", SafeFile.Overwrite.NEVER);
                SafeFile.write(file, "two", SafeFile.Overwrite.KEEP_PREVIOUS);
                assertEquals("two", Files.readString(file));
                assertEquals("one", Files.readString(file.resolveSibling("bath.recipe.toml.previous")));
                SafeFile.write(file, "three", SafeFile.Overwrite.REPLACE);
                // Case does not count there: the same file by another spelling.
                Path shouted = file.resolveSibling("BATH.recipe.toml");
                WriteFailure failure = assertThrows(
                        WriteFailure.class, () -> SafeFile.write(shouted, "four", SafeFile.Overwrite.NEVER));
                assertTrue(failure.getMessage().contains("already there"), failure.getMessage());
                assertEquals("three", Files.readString(shouted));
                try (Stream<Path> left = Files.list(file.getParent())) {
                    assertEquals(2, left.count());
                }
            }
    }

    /** The shelf, a brief with Windows line ends and a byte order mark, a recipe and a batch are read as they are here. */
    @Test
    void readAsHere() throws IOException {
        Seeds.lay(folder);
        Brief here = BriefReader.read(Path.of("recipes-demo/wrist-bath.brief.toml"), TissueSpectra.of(null));
        for (FileSystem system : systems())
            try (system) {
                Path home = home(system);
                Path brief = Files.writeString(
                        home.resolve("wrist-bath.brief.toml"),
                        "\uFEFF"
                                + Files.readString(Path.of("recipes-demo/wrist-bath.brief.toml"))
                                        .replace("\n", "\r\n"));
                Brief there = BriefReader.read(brief, TissueSpectra.of(null));
                assertEquals(here.targets(), there.targets());
                assertEquals(here.limits(), there.limits());
                assertEquals(here.name(), there.name());
                Path recipe = Files.writeString(
                        home.resolve("a.recipe.toml"),
                        Files.readString(folder.resolve("bath.recipe.toml")).replace("\n", "\r\n"));
                assertEquals(
                        RecipeReader.read(folder.resolve("bath.recipe.toml"), Seeds.shelf())
                                .items(),
                        RecipeReader.read(recipe, Seeds.shelf()).items());
                Path batch = Files.writeString(
                        home.resolve("a.batch.toml"),
                        Files.readString(folder.resolve("bath.batch.toml")).replace("\n", "\r\n"));
                assertEquals(
                        BatchReader.read(folder.resolve("bath.batch.toml"), Seeds.shelf())
                                .weighings(),
                        BatchReader.read(batch, Seeds.shelf()).weighings());
                Path shelf = copy(Path.of("ingredients"), home.resolve("my shelf"));
                ShelfReader.Lenient read = ShelfReader.readLenient(shelf);
                assertEquals(List.of(), read.refusals());
                assertEquals(
                        Seeds.shelf().ingredients().size(),
                        read.shelf().ingredients().size());
            }
    }

    /** Ways out of a shelf as Windows would take them. */
    @ParameterizedTest
    @ValueSource(
            strings = {
                "..\\\\..\\\\secret.csv",
                "spectra\\\\..\\\\..\\\\secret.csv",
                "C:\\\\secret.csv",
                "C:secret.csv",
                "\\\\\\\\server\\\\share\\\\secret.csv",
                "\\\\secret.csv",
                "../../secret.csv",
                "spectra/x.csv:stream",
                "nul"
            })
    void aTableStaysInsideItsShelfThereToo(String table) throws IOException {
        try (FileSystem windows = Jimfs.newFileSystem(Configuration.windows())) {
            Path shelf = Files.createDirectories(windows.getPath("C:\\lab\\shelf"));
            for (String place : new String[] {"C:\\secret.csv", "C:\\lab\\secret.csv"})
                Files.writeString(windows.getPath(place), "wavelength_nm,mua_per_cm\n400,424242\n900,424242\n");
            Files.writeString(
                    shelf.resolve("powder.toml"),
                    "format = 1\nid = \"powder\"\nname = \"Powder\"\npart = \"absorber\"\nfamilies = [\"liquid\"]\n"
                            + "form = \"powder\"\ndensity_g_per_ml = 2\n[source]\nbasis = \"invented\"\n[uncertainty]\n"
                            + "absorption = 0.1\nscattering = 0.1\n[absorption]\ntable = \"" + table + "\"\n");
            var read = ShelfReader.readLenient(shelf);
            assertEquals(1, read.refusals().size(), table);
            assertFalse(read.refusals().get(0).getMessage().contains("424242"));
            Promise.wellSaid(read.refusals().get(0).getMessage(), table);
        }
    }

    @Test
    void namesThatNotEverySystemTakes() throws IOException {
        for (String bad : List.of("con", "CON", "nul.1", "Aux", "com1", "LPT9.x", "com¹", "b1.", "b1 ", "prn .a"))
            assertFalse(FileNames.everywhere(bad), bad);
        for (String good : List.of("b1", "console", "com10", "null", "lpt", "a.con", "Größe µ"))
            assertTrue(FileNames.everywhere(good), good);
        OneLine made =
                OneLine.run("design", "recipes-demo/wrist-bath.brief.toml", "--out", folder.toString(), "--quiet");
        assertEquals(0, made.status(), made.err());
        OneLine opened = OneLine.run(
                "batch", "open", folder.resolve("wrist-bath.recipe.toml").toString(), "--id", "nul");
        assertEquals(2, opened.status(), opened.toString());
        assertTrue(opened.err().contains("keep it for a device"), opened.err());
        Path shelf = copy(Path.of("ingredients/materials"), folder.resolve("shelf/materials"));
        Files.writeString(shelf.resolveSibling("con.toml"), "format = 1\nid = \"con\"\n");
        OneLine checked = OneLine.run("ingredients", "check", shelf.getParent().toString());
        assertTrue((checked.out() + checked.err()).contains("no name for a file on every system"), checked.toString());
    }

    private static Path copy(Path from, Path to) throws IOException {
        try (Stream<Path> all = Files.walk(from)) {
            for (Path p : all.toList()) {
                Path target = to.resolve(from.relativize(p).toString());
                if (Files.isDirectory(p)) Files.createDirectories(target);
                else Files.write(target, Files.readAllBytes(p));
            }
        }
        return to;
    }
}
