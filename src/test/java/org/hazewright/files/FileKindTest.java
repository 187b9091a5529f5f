package org.hazewright.files;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import org.hazewright.reading.SetUp;
import org.hazewright.shelf.Shelf;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class FileKindTest {
    @TempDir
    Path folder;

    private Path file(String name) throws Exception {
        return Files.writeString(folder.resolve(name), "format = 1\n");
    }

    @Test
    void aFileHandedOverInPlaceOfAnotherIsToldByItsName() throws Exception {
        String recipe = assertThrows(
                        FileRefusal.class, () -> BriefReader.read(file("bath.recipe.toml"), TissueSpectra::shipped))
                .getMessage();
        assertTrue(
                recipe.endsWith("By its name (.recipe.toml) this is a recipe; what is wanted here is a brief."),
                recipe);
        String brief = assertThrows(
                        FileRefusal.class,
                        () -> RecipeReader.read(file("Bath.Brief.TOML"), new Shelf("nowhere", List.of(), List.of())))
                .getMessage();
        assertTrue(
                brief.contains("this is a brief; what is wanted here is a recipe; the command design makes one"),
                brief);
        assertThrows(FileRefusal.class, () -> SetUpReader.read(file("bath.batch.toml")));
        assertThrows(FileRefusal.class, () -> SeriesReader.read(file("bath.setup.toml"), TissueSpectra::shipped));
    }

    @Test
    void aNameThatSaysNothingIsNoMatter() throws Exception {
        Path plain = Files.writeString(
                folder.resolve("slope.toml"),
                "format = 1\nkind = \"reflectance\"\ndistances_mm = [10]\nwavelengths_nm = [690]\n");
        assertEquals(SetUp.Kind.REFLECTANCE, SetUpReader.read(plain).kind());
    }
}
