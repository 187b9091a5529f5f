package org.hazewright.desk.model;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import java.util.Random;
import org.hazewright.bench.Answering;
import org.hazewright.brief.Brief;
import org.hazewright.brief.Point;
import org.hazewright.files.BriefReader;
import org.hazewright.files.BriefWriter;
import org.hazewright.files.SafeFile;
import org.hazewright.files.ShelfReader;
import org.hazewright.files.TissueSpectra;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** The desk without a window: everything runs on this thread. */
class DeskTest {
    @TempDir
    Path folder;

    private Desk desk;

    @BeforeEach
    void bath() {
        desk = new Desk(
                Work.sameThread(), Optional.empty(), Remembered.in(folder.resolve("memory"), folder.resolve("work")));
        Path file = folder.resolve("bath.brief.toml");
        BriefWriter.write(
                file,
                BriefReader.readShipped("wrist-bath"),
                List.of(),
                TissueSpectra.of(null),
                SafeFile.Overwrite.NEVER);
        desk.begin(Optional.of(file));
    }

    private Shown shown() {
        return desk.solving().shownProperty().get();
    }

    @Test
    void theSearchGivesWhatTheCommandGives() {
        var answer = Answering.to(desk.papers().brief(), ShelfReader.readShipped(), 0);
        assertEquals(grams(answer.recipe()), grams(shown().recipe()));
        assertEquals(answer.chance(), shown().outlook().chance());
    }

    private static List<String> grams(org.hazewright.mixture.Recipe r) {
        return r.items().stream().map(i -> i.label() + " " + i.massG()).toList();
    }

    /**
     * Only a tissue-like brief is said as blood. The demo's µa is allowed 12 %; what lands inside that is blood within 12 % of the amount
     * asked for, as µa less water and fat is proportional to it (Beer and Lambert).
     */
    @Test
    void aTissueLikeRecipeIsSaidAsBlood() {
        assertTrue(shown().blood().isEmpty(), "a bath without a composition has no blood");
        desk.beginAgain();
        Path file = folder.resolve("block.brief.toml");
        BriefWriter.write(
                file,
                BriefReader.readShipped("forearm-block"),
                List.of(),
                TissueSpectra.of(null),
                SafeFile.Overwrite.NEVER);
        desk.open(file);
        AsBlood blood = shown().blood().orElseThrow();
        assertEquals(60, blood.asked().haemoglobinUmolPerL());
        assertEquals(60, blood.is().umolPerL(), 0.12 * 60);
        assertEquals(0.7, blood.is().saturation(), 0.12);
        String words = blood.sentence();
        assertTrue(words.contains(" µmol/L of haemoglobin, ") && words.endsWith("Asked for: 60 µmol/L, 70 %."), words);
        desk.editing().remove(760);
        assertTrue(shown().blood().isEmpty(), "a composition whose wavelengths are targets no more says nothing");
    }

    @Test
    void sentencesNameWhatFilesCallById() {
        var shelf = ShelfReader.readShipped().ingredients();
        assertEquals(
                "The nearest, lipid emulsion, 20 % soybean oil absorption, at µs′; water stays.",
                Words.spoken("The nearest, lipid-emulsion-20 absorption, at µs'; water stays.", shelf));
        assertEquals("my-lipid-emulsion-20-b", Words.spoken("my-lipid-emulsion-20-b", shelf), "part of a longer id");
    }

    @Test
    void followingLandsWhereTheSearchLands() {
        Random random = new Random(11);
        for (int k = 0; k < 5; k++) {
            Brief before = desk.papers().brief();
            var follower = new org.hazewright.bench.Following(before, shown().recipe(), ShelfReader.readShipped());
            List<String> way = Shown.key(shown().recipe());
            desk.editing().drag(690, Point.Quantity.MUA, 0.1 * (1 + 0.06 * random.nextDouble()));
            Brief moved = desk.papers().brief();
            assertTrue(follower.suits(moved));
            if (!Shown.key(shown().recipe()).equals(way)) continue;
            double[] followed = follower.to(moved, 0).predicted().stream()
                    .mapToDouble(p -> p.miss())
                    .toArray();
            for (int j = 0; j < followed.length; j++)
                assertEquals(
                        shown().outlook().predicted().get(j).miss(),
                        followed[j],
                        0.05,
                        "within a twentieth of a half-width: host index and crowding were held");
        }
    }

    @Test
    void everyEditIsTakenBack() {
        Draft start = desk.edits().now();
        BriefEditing e = desk.editing();
        List<Optional<String>> edits = List.of(
                e.title("Another title"),
                e.batchMl("500 mL"),
                e.overage("7 %"),
                e.temperatureC("25"),
                e.wanted(690, Point.Quantity.MUA, "0,12"),
                e.allowed(690, Point.Quantity.MUSP, "0.5 /cm"),
                e.weight(690, "2"),
                e.wavelength(690, "700"),
                e.addWavelength("760", desk.solving().curvesProperty().get()),
                e.remove(760),
                e.allowIngredient("dye-blue-demo", false),
                e.maxAbsorbers("1"),
                e.readability("0.01"),
                e.toggleBase("phosphate-buffered-saline"));
        for (Optional<String> wrong : edits) assertEquals(Optional.empty(), wrong);
        assertNotEquals(start, desk.edits().now());
        for (int k = 0; k < edits.size(); k++) desk.edits().undo();
        assertEquals(start, desk.edits().now());
    }

    @Test
    void nonsenseIsRefusedInWordsAndChangesNothing() {
        Draft start = desk.edits().now();
        BriefEditing e = desk.editing();
        List<Optional<String>> refused = List.of(
                e.title("  "),
                e.batchMl("-3"),
                e.batchMl("lots"),
                e.overage("300 %"),
                e.temperatureC("400"),
                e.wanted(690, Point.Quantity.MUA, "-0.1"),
                e.allowed(690, Point.Quantity.MUA, "0 %"),
                e.wavelength(690, "830"),
                e.wavelength(690, "5"),
                e.addWavelength("690", null),
                e.weight(690, "0"),
                e.readability("0"),
                e.maxScatterers("99"),
                e.toggleBase("water"));
        for (Optional<String> words : refused)
            assertTrue(words.isPresent() && words.get().length() > 10, words.toString());
        assertEquals(start, desk.edits().now());
        assertTrue(e.remove(690).isEmpty());
        assertTrue(e.remove(830).isPresent(), "the last wavelength stays");
    }

    @Test
    void aTargetThatCannotBeComputedIsSaidNotThrown() {
        assertEquals(Optional.empty(), desk.editing().wavelength(690, "2900"));
        assertTrue(desk.solving().problemProperty().get().isPresent());
        desk.edits().undo();
        assertTrue(desk.solving().problemProperty().get().isEmpty());
        assertFalse(shown().following());
    }

    @ParameterizedTest
    @ValueSource(strings = {"wrist-bath", "forearm-block", "bench-slab", "clear-window"})
    void aBriefIsWrittenAndReadBackEqual(String name) {
        Brief brief = BriefReader.readShipped(name);
        Draft draft = Draft.of(brief);
        Path file = folder.resolve(name + ".brief.toml");
        BriefWriter.write(
                file,
                draft.brief(Optional.empty()),
                List.of("note"),
                TissueSpectra.of(null),
                SafeFile.Overwrite.REPLACE);
        Brief back = BriefReader.read(file, TissueSpectra.of(null));
        assertEquals(brief.targets(), back.targets());
        assertEquals(brief.moulds(), back.moulds());
        assertEquals(brief.limits(), back.limits());
        assertEquals(brief.balance(), back.balance());
        assertEquals(brief.volumeMl(), back.volumeMl());
        assertEquals(brief.tissue().isPresent(), back.tissue().isPresent());
    }

    @Test
    void randomDraftsAreWrittenAndReadBackEqual() {
        Random random = new Random(5);
        for (int k = 0; k < 60; k++) {
            Draft d = desk.edits().now();
            for (int n = 0; n < 6; n++) {
                double nm = 500 + random.nextInt(400);
                Edits<Draft> edits = new Edits<>(d);
                BriefEditing editing = new BriefEditing(edits);
                editing.addWavelength(Double.toString(nm), null);
                editing.drag(nm, Point.Quantity.MUA, random.nextDouble());
                if (random.nextBoolean()) editing.wanted(nm, Point.Quantity.MUSP, "");
                if (random.nextBoolean())
                    editing.allowed(nm, Point.Quantity.MUA, (1 + random.nextInt(40)) / 1000.0 + " /cm");
                if (random.nextBoolean()) editing.weight(nm, Integer.toString(1 + random.nextInt(5)));
                d = edits.now();
            }
            Path file = folder.resolve("random.brief.toml");
            BriefWriter.write(
                    file, d.brief(Optional.empty()), List.of(), TissueSpectra.of(null), SafeFile.Overwrite.REPLACE);
            Brief back = BriefReader.read(file, TissueSpectra.of(null));
            assertEquals(d.brief(Optional.empty()).targets(), back.targets());
        }
    }

    @Test
    void tissueLikeValuesStayWithTheirComposition() {
        var tissue = new org.hazewright.brief.Tissue(
                new double[] {690, 760, 830}, 60, 0.7, 0.6, 0.2, java.util.OptionalDouble.of(15), 1.1);
        assertEquals(Optional.empty(), desk.editing().tissue(tissue, desk.spectra()));
        assertEquals(3, desk.edits().now().rows().size(), "690 and 830 are refilled, 760 is new");
        desk.editing().drag(760, Point.Quantity.MUA, 0.2);
        Path file = folder.resolve("tissue.brief.toml");
        BriefWriter.write(file, desk.papers().brief(), List.of(), TissueSpectra.of(null), SafeFile.Overwrite.REPLACE);
        Brief back = BriefReader.read(file, TissueSpectra.of(null));
        assertTrue(back.tissue().isPresent());
        assertEquals(desk.papers().brief().targets(), back.targets());
    }

    @Test
    void aRecipeWithoutItsBriefOpensWithWhatItGives() throws Exception {
        desk.papers().save(Optional.of(shown()), () -> {});
        Path lonely = Files.createDirectory(folder.resolve("lonely")).resolve("bath.recipe.toml");
        Files.copy(folder.resolve("bath.recipe.toml"), lonely);
        List<String> way = Shown.key(shown().recipe());
        desk.open(folder.resolve("bath.recipe.toml"));
        assertEquals(
                Optional.of(folder.resolve("bath.brief.toml")),
                desk.papers().openProperty().get().file());
        desk.open(lonely);
        assertEquals(Optional.empty(), desk.papers().openProperty().get().file());
        assertEquals(way, Shown.key(shown().recipe()));
        assertTrue(shown().outlook().meets());
    }

    @Test
    void theWeighOutPastesIntoASpreadsheet() {
        String text = desk.copyText().orElseThrow();
        String[] lines = text.split("\n");
        for (String line : lines) assertEquals(4, line.split("\t", -1).length, line);
        assertEquals(
                shown().recipe().items().get(0).massG(),
                Double.parseDouble(
                        lines[lines.length - shown().recipe().items().size()].split("\t")[3]),
                1e-9);
    }

    @Test
    void whatIsRememberedComesBack() {
        Remembered r = desk.remembered();
        r.keep("odd = key", "a\\b=c #d");
        r.favourite("ink-demo", true);
        r.inHandG("water", Optional.of(1234.5));
        Remembered again = Remembered.in(folder.resolve("memory"), folder.resolve("work"));
        assertEquals(List.of("ink-demo"), again.favourites());
        assertEquals(1234.5, again.inHandG().get("water"));
        assertEquals(List.of(folder.resolve("bath.brief.toml").toAbsolutePath().normalize()), again.recent());
    }
}
