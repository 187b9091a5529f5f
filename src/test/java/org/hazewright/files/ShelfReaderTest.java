package org.hazewright.files;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertInstanceOf;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;
import static org.junit.jupiter.api.Assumptions.assumeTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.LocalDate;
import java.util.EnumSet;
import java.util.List;
import java.util.Optional;
import org.hazewright.optics.Crowding;
import org.hazewright.optics.SizeDistribution;
import org.hazewright.shelf.BlendPart;
import org.hazewright.shelf.Conflict;
import org.hazewright.shelf.Family;
import org.hazewright.shelf.Form;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Making;
import org.hazewright.shelf.Part;
import org.hazewright.shelf.Scattering;
import org.hazewright.shelf.Shelf;
import org.hazewright.shelf.Source;
import org.hazewright.shelf.Uncertainty;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

class ShelfReaderTest {
    @TempDir
    Path folder;

    @BeforeEach
    void smallShelf() {
        SmallShelf.in(folder);
    }

    @Test
    void everyKeyOfAnIngredientArrives() {
        Ingredient ink = ShelfReader.read(folder).require("ink");
        assertEquals("Ink", ink.name());
        assertEquals(Part.ABSORBER, ink.part());
        assertEquals(EnumSet.of(Family.LIQUID, Family.GEL), ink.families());
        assertEquals(Form.LIQUID, ink.form());
        assertEquals(1.02, ink.densityGPerMl());
        assertEquals(0.02, ink.maxGPerMl().getAsDouble());
        assertEquals(0, ink.pricePerG().getAsDouble());
        assertTrue(ink.settles());
        assertEquals(List.of("Shake."), ink.handling());
        assertEquals(List.of("Stains."), ink.cautions());
        assertEquals(
                List.of(new Conflict("salt", "flocks", false), new Conflict("acid", "gas", true)), ink.conflicts());
        assertEquals(new Source(Source.Basis.INVENTED, "Made up. Not a bottle."), ink.source());
        assertEquals(new Uncertainty(0.02, 0.2, 0.5), ink.uncertainty());
        // 12000 /cm over 1.02 g/mL, 85 % of it absorbed
        assertEquals(0.85 * 12000 / 1.02, ink.absorption().get().kappaCm2PerG(400), 1e-9);
        assertEquals(0.15 * 12000 / 1.02, ink.absorption().get().scatteredCm2PerG(400), 1e-9);
        assertEquals(0.6, ink.absorption().get().g());
        assertTrue(ink.making().addLast());
        assertEquals(5, ink.making().stirMin().getAsDouble());
        assertFalse(ink.making().degas());
        assertEquals(Optional.empty(), ink.index());
        assertEquals(Optional.empty(), ink.lot());
    }

    @Test
    void particlesArriveWithTheirMaterialSizesAndCrowding() {
        Ingredient emulsion = ShelfReader.read(folder).require("emulsion");
        Scattering.MieParticles mie = assertInstanceOf(
                Scattering.MieParticles.class, emulsion.scattering().get());
        assertEquals("oil", mie.particle().id());
        assertEquals(0.22, mie.volumeFraction());
        assertEquals(new Crowding.PercusYevick(), mie.crowding());
        assertEquals(new SizeDistribution.LogNormal(200, 1.6), mie.sizes());
        assertEquals(1, mie.magnitude());
        assertEquals("water", emulsion.index().get().id());
        assertEquals(Making.PLAIN, emulsion.making());
    }

    @Test
    void aBlendHasItsPartsAndNothingOfItsOwn() {
        Shelf shelf = ShelfReader.read(folder);
        Ingredient gel = shelf.require("gelatin-10");
        assertEquals(List.of(new BlendPart("water", 0.9), new BlendPart("gelatin-powder", 0.1)), gel.blend());
        assertEquals(Optional.empty(), gel.absorption());
        assertEquals(Optional.empty(), gel.index());
        assertEquals(1 / (0.9 / 0.998 + 0.1 / 1.35), shelf.densityGPerMl(gel), 1e-12);
    }

    @Test
    void aLotHasItsOwnKeysAndTheRestOfItsIngredient() {
        Shelf shelf = ShelfReader.read(folder);
        Ingredient lot = shelf.require("emulsion-L07");
        assertEquals("Emulsion, lot L07", lot.name());
        assertEquals("emulsion", lot.kind());
        assertEquals("L07", lot.lot().get().number());
        assertEquals(Optional.of(LocalDate.of(2026, 2, 1)), lot.lot().get().received());
        assertEquals(Optional.empty(), lot.lot().get().opened());
        assertTrue(lot.lot().get().expiredOn(LocalDate.of(2027, 2, 2)));
        assertEquals(new Source(Source.Basis.MEASURED, "The bench, 2026-02-03."), lot.source());
        assertEquals(new Uncertainty(0, 0.01), lot.uncertainty());
        assertEquals(0.986, lot.densityGPerMl());
        Scattering.MieParticles mie =
                assertInstanceOf(Scattering.MieParticles.class, lot.scattering().get());
        assertEquals(1.04, mie.magnitude());
        assertEquals(0.22, mie.volumeFraction());
        assertEquals(
                1,
                ((Scattering.MieParticles)
                                shelf.require("emulsion").scattering().get())
                        .magnitude());
    }

    @Test
    void aLotWithAModelOfItsOwnTakesNothingOfTheOldOne() {
        Marked.write(folder.resolve("emulsion-L08.toml"), """
                format = 1
                id = "emulsion-L08"
                name = "My emulsion"
                lot_of = "emulsion"
                density_g_per_ml = 0.99
                [lot]
                number = "L08"
                [scattering]
                model = "power"
                musp_cm2_per_g = 210
                at_nm = 800
                exponent = 1.2
                g = 0.7
                """);
        Ingredient lot = ShelfReader.read(folder).require("emulsion-L08");
        assertEquals("My emulsion", lot.name());
        assertEquals(0.99, lot.densityGPerMl());
        assertEquals(
                new Scattering.PowerLaw(210, 800, 1.2, 0.7, 400, 1100, 1),
                lot.scattering().get());
        assertEquals(new Uncertainty(0, 0.03), lot.uncertainty());
    }

    @Test
    void aMistakeThatALotInheritsIsShownWhereItStands() {
        Path parent = folder.resolve("emulsion.toml");
        Marked marked = Marked.of(SmallShelf.EMULSION.replace("density_g_per_ml = 0.986", "▶density_g_per_ml = 0"));
        Marked.write(parent, marked.text());
        List<FileRefusal> refusals = ShelfReader.readLenient(folder).refusals();
        assertEquals(2, refusals.size());
        assertTrue(refusals.get(1).getMessage().contains("Mend that file first"));
        marked.holds(refusals.get(0), parent, "must be above 0");
    }

    @Test
    void withoutAnIndexABaseIsTakenForWhatItsFamilyUsuallyIs() throws IOException {
        assertEquals(
                "water", ShelfReader.read(folder).require("water").index().get().id());
        Files.delete(folder.resolve("materials/water.toml"));
        Files.delete(folder.resolve("emulsion.toml"));
        Files.delete(folder.resolve("emulsion-L07.toml"));
        for (String family : List.of("liquid", "silicone", "resin")) {
            Marked.write(
                    folder.resolve("my-base.toml"),
                    SmallShelf.WATER
                            .replace("id = \"water\"", "id = \"my-base\"")
                            .replace("\"liquid\"\nform", "\"" + family + "\"\nform"));
            double n = ShelfReader.read(folder)
                    .require("my-base")
                    .index()
                    .get()
                    .index()
                    .at(589, 20)
                    .n();
            // water at 20 °C, 589 nm: 1.33335 (IAPWS R9-97, table 3, from memory); silicone and resin: common practice
            assertEquals(family.equals("liquid") ? 1.33335 : family.equals("silicone") ? 1.41 : 1.54, n, 5e-5);
        }
    }

    @Test
    void brokenFilesDoNotHideTheGoodOnes() {
        Path ink = folder.resolve("ink.toml");
        Path oil = folder.resolve("materials/oil.toml");
        Marked.write(ink, "format = 1\nid = \"ink\"\nname = \n");
        Marked.write(oil, SmallShelf.OIL.replace("n = 1.47", "n = -1.47"));
        ShelfReader.Lenient read = ShelfReader.readLenient(folder);
        assertEquals(
                List.of("gelatin-10", "gelatin-powder", "water"),
                read.shelf().ingredients().stream().map(Ingredient::id).toList());
        assertEquals(
                List.of(
                        ink.toString(),
                        oil.toString(),
                        folder.resolve("emulsion-L07.toml").toString(),
                        folder.resolve("emulsion.toml").toString()),
                read.refusals().stream().map(FileRefusal::path).toList());
        assertTrue(read.refusals().get(3).getMessage().contains("The file of the material \"oil\" is refused"));
        FileRefusal first = assertThrows(FileRefusal.class, () -> ShelfReader.read(folder));
        assertEquals(read.refusals().get(0).getMessage(), first.getMessage());
    }

    @Test
    void aBlendOrALotOfABrokenFileIsRefusedToo() {
        Marked.write(folder.resolve("gelatin-powder.toml"), "format = 1\nid = [");
        Marked.write(folder.resolve("emulsion.toml"), "format = 2\nid = [");
        ShelfReader.Lenient read = ShelfReader.readLenient(folder);
        assertEquals(
                List.of("ink", "water"),
                read.shelf().ingredients().stream().map(Ingredient::id).toList());
        assertEquals(4, read.refusals().size());
        assertTrue(read.refusals().stream()
                .anyMatch(r ->
                        r.path().endsWith("gelatin-10.toml") && r.getMessage().contains("Mend that file first")));
        assertTrue(read.refusals().stream()
                .anyMatch(r -> r.path().endsWith("emulsion-L07.toml")
                        && r.line() == 3
                        && r.getMessage().contains("Mend that file first")));
    }

    @Test
    void foldersThatAreNoShelfAreRefused() throws IOException {
        Path none = folder.resolve("none");
        assertTrue(refused(none).contains("There is no such folder"));
        assertTrue(refused(folder.resolve("README.md")).contains("a file and not a folder"));
        assertTrue(refused(Files.createDirectory(none)).contains("holds no ingredient files"));
    }

    @Test
    void otherFilesAreLeftAlone() throws IOException {
        Files.writeString(folder.resolve(".hidden.toml"), "not = toml = at all");
        Files.writeString(folder.resolve("notes.txt"), "…");
        Files.writeString(folder.resolve("spectra/unused.csv"), "a;b\n1;2\n");
        assertEquals(6, ShelfReader.read(folder).ingredients().size());
    }

    @Test
    void theShelfOfTheProgramIsReadWithoutARefusal() {
        ShelfReader.Lenient read = ShelfReader.readLenient(null);
        assertEquals(List.of(), read.refusals());
        assertTrue(read.shelf().find("water").isPresent());
        assertEquals(
                read.shelf().ingredients().stream().map(Ingredient::id).toList(),
                ShelfReader.readShipped().ingredients().stream()
                        .map(Ingredient::id)
                        .toList());
    }

    @Test
    void aShelfInsideAJarIsReadLikeOneInAFolder() throws IOException {
        Path jar = folder.resolve("program.jar");
        try (var zip = new java.util.zip.ZipOutputStream(Files.newOutputStream(jar));
                var files = Files.walk(folder)) {
            for (Path file :
                    files.filter(f -> !f.equals(jar) && Files.isRegularFile(f)).toList()) {
                zip.putNextEntry(new java.util.zip.ZipEntry(
                        "shelf/" + folder.relativize(file).toString().replace('\\', '/')));
                zip.write(Files.readAllBytes(file));
            }
        }
        try (var inside = java.nio.file.FileSystems.newFileSystem(jar)) {
            Shelf shelf = ShelfReader.read(inside.getPath("/shelf"));
            assertEquals(6, shelf.ingredients().size());
            assertEquals(
                    0.0001 / 0.998, shelf.require("water").absorption().get().kappaCm2PerG(400), 1e-15);
        }
    }

    @Test
    void aTableStaysInsideTheFolderAlsoThroughLinks() throws IOException {
        Path outside = Files.createTempDirectory("outside");
        Path secret = Files.writeString(outside.resolve("secret.csv"), "wavelength_nm,mua_per_cm\n400,1\n500,2\n");
        try {
            for (String path : List.of(
                    secret.toString().replace('\\', '/'),
                    "../" + folder.getFileName() + "/spectra/ink.csv",
                    "spectra/../../x.csv",
                    "..",
                    "C:/x.csv")) ink("▶table = \"" + path + "\"", "lies outside the shelf's folder", "stays inside it");
            ink("▶table = \"spectra\\\\ink.csv\"", "use / between folders");
            ink("▶table = \"spectra\"", "is a folder");
            ink("▶table = \"spectra/inc.csv\"", "There is no table", "Perhaps ink.csv is meant");
            ink("▶table = \"spectra/a\\u0000b.csv\"", "control character");
            link(folder.resolve("spectra/linked.csv"), secret);
            ink("▶table = \"spectra/linked.csv\"", "a link that leads out");
            link(folder.resolve("elsewhere"), outside);
            ink("▶table = \"elsewhere/secret.csv\"", "a link that leads out");
            link(folder.resolve("spectra/astray.csv"), folder.resolve("spectra/nowhere.csv"));
            ink("▶table = \"spectra/astray.csv\"", "There is no table");
            if (Files.exists(Path.of("/dev/zero"))) {
                link(folder.resolve("spectra/device.csv"), Path.of("/dev/zero"));
                ink("▶table = \"spectra/device.csv\"", "a link that leads out");
            }
            link(folder.resolve("spectra/inside.csv"), folder.resolve("spectra/ink.csv"));
            Marked.write(folder.resolve("ink.toml"), SmallShelf.INK.replace("spectra/ink.csv", "spectra/inside.csv"));
            assertTrue(ShelfReader.read(folder).find("ink").isPresent());
        } finally {
            for (String link : List.of("spectra/linked.csv", "elsewhere", "spectra/astray.csv", "spectra/device.csv"))
                Files.deleteIfExists(folder.resolve(link));
            Files.delete(secret);
            Files.delete(outside);
        }
    }

    @Test
    void aMistakeInATableIsShownInTheTable() {
        Path table = folder.resolve("spectra").resolve("ink.csv");
        Marked marked = Marked.of("wavelength_nm,mua_per_cm\n400,1\n500,▶2.x\n");
        FileRefusal refusal = marked.refusedAs(table, () -> ShelfReader.read(folder), "mua_per_cm is \"2.x\"");
        assertFalse(refusal.getMessage().contains("ink.toml"));
    }

    private void ink(String table, String... words) {
        Path file = folder.resolve("ink.toml");
        Marked.of(SmallShelf.INK.replace("table = \"spectra/ink.csv\"", table))
                .refusedAs(file, () -> ShelfReader.read(folder), words);
    }

    private String refused(Path shelf) {
        FileRefusal refusal = assertThrows(FileRefusal.class, () -> ShelfReader.read(shelf));
        assertEquals(shelf.toString(), refusal.path());
        assertEquals(0, refusal.line());
        return refusal.getMessage();
    }

    private static void link(Path link, Path to) {
        try {
            Files.createSymbolicLink(link, to);
        } catch (IOException | UnsupportedOperationException e) {
            assumeTrue(false, "this system makes no links");
        }
    }
}
