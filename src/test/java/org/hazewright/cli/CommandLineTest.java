package org.hazewright.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.fasterxml.jackson.jr.ob.JSON;
import java.io.IOException;
import java.io.PrintWriter;
import java.io.StringWriter;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Map;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** The commands as a person types them, start to finish. */
class CommandLineTest {
    private static final String BATH = """
            format = 1
            title = "Bath"
            base = "water"
            batch_ml = 500
            [[target]]
            wavelength_nm = 690
            mua_per_cm = 0.1
            musp_per_cm = 10.0
            [shelf]
            use = ["ink-demo", "lipid-emulsion-20"]
            """;

    @TempDir
    Path folder;

    private record Ran(int status, String out, String err) {}

    private static Ran run(String... args) {
        StringWriter out = new StringWriter();
        StringWriter err = new StringWriter();
        int status = Hazewright.run(new PrintWriter(out), new PrintWriter(err), args);
        return new Ran(status, out.toString(), err.toString());
    }

    private Ran design(String brief, String... more) throws IOException {
        Path file = folder.resolve("bath.brief.toml");
        Files.writeString(file, brief);
        String[] args = new String[more.length + 4];
        args[0] = "design";
        args[1] = file.toString();
        args[2] = "--out";
        args[3] = folder.resolve("out").toString();
        System.arraycopy(more, 0, args, 4, more.length);
        return run(args);
    }

    private void refused(String brief, String... words) throws IOException {
        Ran ran = design(brief);
        assertEquals(2, ran.status, ran.err);
        assertEquals("", ran.out);
        assertEquals(1, ran.err.lines().count(), "one message, on one line: " + ran.err);
        for (String word : words) assertTrue(ran.err.contains(word), word + " is missing from: " + ran.err);
        assertFalse(ran.err.contains("Exception"), ran.err);
        assertFalse(Files.exists(folder.resolve("out/bath.recipe.toml")), "nothing is written for a refused brief");
    }

    @Test
    void designWritesARecipeThatPredictReadsBack() throws IOException {
        Ran designed = design(BATH, "--json");
        assertEquals(0, designed.status, designed.err);
        Map<String, Object> answer = JSON.std.mapFrom(designed.out);
        assertEquals("meets", answer.get("status"));
        Ran predicted = run("predict", folder.resolve("out/bath.recipe.toml").toString(), "--at", "690", "--json");
        assertEquals(0, predicted.status, predicted.err);
        Map<?, ?> row = (Map<?, ?>) ((List<?>) JSON.std.mapFrom(predicted.out).get("rows")).get(0);
        Map<?, ?> promised = (Map<?, ?>) ((List<?>) answer.get("predicted")).get(0);
        assertEquals((Double) promised.get("mua_per_cm"), (Double) row.get("mua_per_cm"), 1e-12);
        assertEquals((Double) promised.get("musp_per_cm"), (Double) row.get("musp_per_cm"), 1e-11);
        assertEquals((Double) promised.get("u_mua_per_cm"), (Double) row.get("u_mua_per_cm"), 1e-9);
    }

    @Test
    void itemsOfTheAnswerAreGramsOfTheBalance() throws IOException {
        Map<String, Object> answer = JSON.std.mapFrom(design(BATH, "--json").out);
        for (Object item : (List<?>) answer.get("items")) {
            double g = (Double) ((Map<?, ?>) item).get("mass_g");
            assertEquals(Math.rint(g * 1000), g * 1000, 1e-6, "readability 1 mg");
        }
    }

    @Test
    void whatCannotBeMetIsWrittenAllTheSame() throws IOException {
        Ran ran = design(BATH.replace("mua_per_cm = 0.1", "mua_per_cm = 0.30").replace("690", "970"));
        assertEquals(3, ran.status, ran.err);
        assertTrue(ran.out.contains("The base alone already absorbs 0.48"), ran.out);
        assertTrue(Files.exists(folder.resolve("out/bath.recipe.toml")));
        assertTrue(Files.exists(folder.resolve("out/bath.xlsx")));
    }

    @Test
    void noTargets() throws IOException {
        refused("format = 1\ntitle = \"t\"\nbase = \"water\"\nbatch_ml = 10\n", "no target", "[[target]]");
    }

    @Test
    void negativeTarget() throws IOException {
        refused(BATH.replace("mua_per_cm = 0.1", "mua_per_cm = -0.1"), "bath.brief.toml:7", "-0.1");
    }

    @Test
    void notANumber() throws IOException {
        refused(BATH.replace("mua_per_cm = 0.1", "mua_per_cm = nan"), "bath.brief.toml:7");
        refused(BATH.replace("mua_per_cm = 0.1", "mua_per_cm = inf"), "bath.brief.toml:7");
        refused(BATH.replace("mua_per_cm = 0.1", "mua_per_cm = \"0.1 /cm\""), "bath.brief.toml:7", "0.1 /cm");
    }

    @Test
    void noScatterer() throws IOException {
        refused(BATH.replace(", \"lipid-emulsion-20\"", ""), "wants µs'", "no scatterer");
    }

    @Test
    void unknownIngredientSuggestsTheNearest() throws IOException {
        refused(BATH.replace("ink-demo", "ink-dmeo"), "ink-dmeo", "\"ink-demo\"");
    }

    @Test
    void unknownKeySuggestsTheNearest() throws IOException {
        refused(BATH.replace("batch_ml", "batch_mL"), "bath.brief.toml:4", "batch_ml");
    }

    @Test
    void outsideATable() throws IOException {
        refused(BATH.replace("690", "2000"), "2000 nm", "covers");
    }

    @Test
    void wrongFamily() throws IOException {
        refused(BATH.replace("\"water\"", "\"pdms\""), "does not mix into pdms");
    }

    @Test
    void missingBrief() {
        Ran ran = run("design", folder.resolve("nowhere.brief.toml").toString());
        assertEquals(2, ran.status);
        assertTrue(ran.err.contains("nowhere.brief.toml"), ran.err);
        assertEquals(1, ran.err.lines().count(), ran.err);
    }

    @Test
    void aFileInTheWayOfTheOutputFolder() throws IOException {
        Files.writeString(folder.resolve("out"), "in the way");
        Ran ran = design(BATH);
        assertEquals(4, ran.status, ran.err);
        assertEquals("in the way", Files.readString(folder.resolve("out")));
    }

    @Test
    void anEarlierResultIsKeptBesideTheNew() throws IOException {
        design(BATH);
        Path recipe = folder.resolve("out/bath.recipe.toml");
        Files.writeString(recipe, "# mine\n" + Files.readString(recipe));
        String mine = Files.readString(recipe);
        Ran again = design(BATH);
        assertEquals(0, again.status, again.err);
        assertEquals(mine, Files.readString(folder.resolve("out/bath.recipe.toml.previous")));
    }

    @Test
    void theSameResultAgainLeavesNoPrevious() throws IOException {
        design(BATH);
        design(BATH);
        assertFalse(Files.exists(folder.resolve("out/bath.recipe.toml.previous")));
        assertFalse(Files.exists(folder.resolve("out/bath.xlsx.previous")));
    }

    @Test
    void oneSphereToSeventeenDigits() throws IOException {
        Ran ran = run("particles", "--size-parameter", "10", "--index", "1.5", "--json");
        Map<String, Object> q = JSON.std.mapFrom(ran.out);
        assertEquals(2.881999, (Double) q.get("q_ext"), 5e-7, "Wiscombe, NCAR/TN-140 (1979)");
        assertEquals(0.742913, (Double) q.get("g"), 5e-7, "Wiscombe, NCAR/TN-140 (1979)");
    }

    @Test
    void tableOfSpheres() throws IOException {
        Path table = folder.resolve("spheres.csv");
        Files.writeString(table, "size_parameter,index,absorption_index\n10,1.5,0\n100,1.5,1\n");
        Ran ran = run("particles", "--table", table.toString());
        assertEquals(0, ran.status, ran.err);
        String[] lines = ran.out.split("\\R");
        assertEquals("size_parameter,index,absorption_index,q_ext,q_sca,g", lines[0]);
        assertEquals(2.097502, Double.parseDouble(lines[2].split(",")[3]), 5e-7, "Wiscombe, NCAR/TN-140 (1979)");
    }

    @Test
    void theShippedShelfIsWhole() {
        Ran ran = run("ingredients", "check");
        assertEquals(0, ran.status, ran.out + ran.err);
        assertTrue(ran.out.contains("0 files that cannot be used"), ran.out);
    }

    @Test
    void theListHoldsMaterialsAndShowKnowsThem() {
        Ran list = run("ingredients", "list");
        assertEquals(0, list.status, list.err);
        assertTrue(list.out.contains("lipid-emulsion-20") && list.out.contains("fused-silica"), list.out);
        Ran shown = run("ingredients", "show", "fused-silica");
        assertEquals(0, shown.status, shown.err);
        assertTrue(shown.out.contains("1.4533"), "Malitson (1965) at 800 nm, 1.45332: " + shown.out);
        assertTrue(shown.out.contains("Malitson"), shown.out);
    }

    @Test
    void anAverageThatDoesNotSettleSaysSo() {
        String[] wide = {"particles", "tio2-rutile", "--in", "water", "--lognormal-nm", "300,1.9", "--at", "633"};
        assertTrue(run(wide).out.contains("are known to 0.0"), run(wide).out);
        wide[5] = "300,1.05";
        assertFalse(run(wide).out.contains("are known to"), run(wide).out);
    }

    @Test
    void aBrokenShelfIsBlamedFileByFile() throws IOException {
        Path shelf = Files.createDirectories(folder.resolve("shelf"));
        Files.writeString(shelf.resolve("soup.toml"), "format = 1\nid = \"soup\"\nname = \n");
        Files.writeString(shelf.resolve("stew.toml"), "format = 1\nid = \"broth\"\n");
        Ran ran = run("ingredients", "check", shelf.toString());
        assertEquals(2, ran.status);
        assertTrue(ran.out.contains("soup.toml:3"), ran.out);
        assertTrue(ran.out.contains("stew.toml"), ran.out);
    }

    @Test
    void unknownOptionsAndCommandsAreOneSentence() {
        for (String[] args : List.of(new String[] {"desing"}, new String[] {"design"}, new String[] {"list", "--x"})) {
            Ran ran = run(args);
            assertEquals(2, ran.status);
            assertTrue(ran.err.lines().count() <= 2, ran.err);
            assertEquals("", ran.out);
        }
    }
}
