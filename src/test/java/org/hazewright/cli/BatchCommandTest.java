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
import org.hazewright.batch.Batch;
import org.hazewright.files.BatchReader;
import org.hazewright.files.BatchWriter;
import org.hazewright.files.ShelfReader;
import org.hazewright.shelf.Shelf;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** One making as a person types it: opened, weighed, measured, corrected, learned from. */
class BatchCommandTest {
    private static final String BRIEF = """
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
    private static final Shelf SHELF = ShelfReader.readShipped();

    @TempDir
    Path folder;

    private record Ran(int status, String out, String err) {}

    private static Ran run(String... args) {
        StringWriter out = new StringWriter();
        StringWriter err = new StringWriter();
        int status = Hazewright.run(new PrintWriter(out), new PrintWriter(err), args);
        return new Ran(status, out.toString(), err.toString());
    }

    private String file(String name) {
        return folder.resolve(name).toString();
    }

    private String batch;

    @BeforeEach
    void open() throws IOException {
        Files.writeString(folder.resolve("bath.brief.toml"), BRIEF);
        assertEquals(0, run("design", file("bath.brief.toml")).status);
        Ran ran =
                run("batch", "open", file("bath.recipe.toml"), "--id", "b-1", "--who", "bench 2", "--on", "2026-03-02");
        assertEquals(0, ran.status, ran.err);
        batch = file("b-1.batch.toml");
    }

    private Batch read() {
        return BatchReader.read(Path.of(batch), SHELF);
    }

    private void weighAsPlanned(double factorOfEmulsion) {
        Batch b = read();
        for (int n = 0; n < b.weighings().size(); n++) {
            Batch now = read();
            double g = now.weighings().get(n).massG();
            boolean emulsion = now.weighings().get(n).label().startsWith("lipid");
            Ran ran = run(
                    "batch",
                    "weigh",
                    batch,
                    "--item",
                    "" + (n + 1),
                    "--grams",
                    "" + g * (emulsion ? factorOfEmulsion : 1),
                    "--no-logbook");
            assertEquals(0, ran.status, ran.err);
        }
    }

    private static Map<?, ?> row(Ran ran, String list, int k) throws IOException {
        return (Map<?, ?>) ((List<?>) JSON.std.mapFrom(ran.out).get(list)).get(k);
    }

    @Test
    void aBatchWeighedAsPlannedPredictsWhatTheRecipeDid() throws IOException {
        weighAsPlanned(1);
        Ran recipe = run("predict", file("bath.recipe.toml"), "--at", "690", "--json");
        Ran made = run("predict", batch, "--at", "690", "--json");
        assertEquals(0, made.status, made.err);
        for (String key : new String[] {"mua_per_cm", "musp_per_cm", "u_musp_per_cm"})
            assertEquals(row(recipe, "rows", 0).get(key), row(made, "rows", 0).get(key), key);
    }

    @Test
    void anOverPourOfTheFirstThingPlansTheRestAnew() {
        Batch b = read();
        int water = 2 * b.plan().stocks().size();
        double planned = b.weighings().get(water).massG();
        double emulsion = b.weighings().get(water + 1).massG();
        Ran ran = run("batch", "weigh", batch, "--item", "" + (water + 1), "--grams", "" + planned * 1.1);
        assertEquals(0, ran.status, ran.err);
        assertTrue(ran.out.contains("Planned anew"), ran.out);
        Batch now = read();
        double share = now.weighings().get(water + 1).massG() / emulsion;
        assertEquals(1.1, share, 0.01, "ten per cent more water takes about ten per cent more emulsion");
    }

    @Test
    void nothingIsMeasuredOfABatchOfWhichNothingIsWeighed() {
        String[] measure = {"batch", "measure", batch, "--method", "fit", "--value", "690,0.1,0.002,10,0.1"};
        Ran early = run(measure);
        assertEquals(2, early.status, early.out);
        assertTrue(early.err.contains("Nothing of the batch b-1 is weighed yet"), early.err);
        assertEquals(List.of(), read().measured());
        run("batch", "weigh", batch, "--item", "1", "--grams", "1.0", "--keep-plan");
        Ran half = run(measure);
        assertEquals(0, half.status, half.err);
        assertTrue(half.err.contains("No grams are recorded at weighings 2 "), half.err);
        weighAsPlanned(1);
        assertFalse(run(measure).err.contains("No grams"));
    }

    /** Measured again before a correction is poured, the values count for what is in the vessel. */
    @Test
    void aCorrectionThatIsNotPouredYetIsNotMeasured() {
        weighAsPlanned(1.1);
        Ran ran = run("correct", batch, "--chance", "0.5", "--capacity-ml", "2000", "--record");
        assertEquals(0, ran.status, ran.err);
        Ran measured = run("batch", "measure", batch, "--method", "fit", "--value", "690,0.1,0.002,11,0.1");
        assertTrue(measured.err.contains("Nothing of correction 1 is weighed yet"), measured.err);
        assertFalse(measured.err.contains("No grams"), measured.err);
        assertEquals(0, read().measured().get(0).correction());
    }

    @Test
    void aLotPastItsDateIsToldByTheNumberWrittenDown() throws IOException {
        Path shelf = folder.resolve("shelf");
        copy(Path.of("ingredients"), shelf);
        Files.writeString(shelf.resolve("ink-demo-lot-K3.toml"), """
                format = 1
                id = "ink-demo-lot-K3"
                lot_of = "ink-demo"
                [lot]
                number = "K3"
                expires = 2026-02-01
                drift = "absorption fell by 3 % in two months."
                [source]
                basis = "invented"
                [uncertainty]
                absorption = 0.03
                scattering = 0.05
                """);
        int ink = 0;
        while (!read().weighings().get(ink).ingredient().kind().equals("ink-demo")) ink++;
        Ran weigh = run(
                "batch",
                "weigh",
                batch,
                "--ingredients",
                shelf.toString(),
                "--item",
                "" + (ink + 1),
                "--grams",
                "1.0",
                "--lot",
                (ink + 1) + "=k3");
        assertEquals(0, weigh.status, weigh.err);
        Ran show = run("batch", "show", batch, "--ingredients", shelf.toString());
        for (Ran ran : List.of(weigh, show)) {
            assertTrue(ran.out.contains("lot K3, expired on 2026-02-01"), ran.out);
            assertFalse(ran.out.contains("lot K3, lot K3"), ran.out);
            assertTrue(ran.out.contains("lot K3, is drifting: absorption fell by 3 % in two months."), ran.out);
        }
        assertFalse(run("batch", "show", batch).out.contains("expired"), "this shelf does not know the lot");
    }

    @Test
    void theBatchFileReadsBackEqual() {
        weighAsPlanned(1.02);
        run(
                "batch",
                "weigh",
                batch,
                "--vessel",
                "612.3,604.1",
                "--water-back",
                "8.0",
                "--lot",
                "3=L07",
                "--no-logbook");
        run(
                "batch",
                "measure",
                batch,
                "--method",
                "slab fit",
                "--value",
                "690,0.101,0.002,9.9,0.1",
                "--on",
                "2026-03-02",
                "--no-logbook");
        Batch once = read();
        assertEquals(8.2, once.heating().orElseThrow().lostG(), 1e-9);
        assertEquals(2, once.measured().get(0).values().size());
        assertEquals(
                read().plan().massesG().get(SHELF.require("water")) - 0.2,
                once.asMade().massesG().get(SHELF.require("water")),
                0.05,
                "what heating took and nobody gave back is off the water");
        BatchWriter.write(Path.of(batch), once, org.hazewright.files.SafeFile.Overwrite.REPLACE);
        assertEquals(once, read());
    }

    @Test
    void waterAloneCorrectsWhatIsTooStrong() throws IOException {
        Batch plan = read();
        String[] grams = new String[4 + 4 * plan.weighings().size()];
        grams[0] = "batch";
        grams[1] = "weigh";
        grams[2] = batch;
        grams[3] = "--no-logbook";
        for (int n = 0; n < plan.weighings().size(); n++) {
            boolean strong = plan.weighings().get(n).role() == org.hazewright.bench.Weighing.Role.ITEM
                    && !plan.weighings().get(n).label().equals("water");
            grams[4 + 4 * n] = "--item";
            grams[5 + 4 * n] = "" + (n + 1);
            grams[6 + 4 * n] = "--grams";
            grams[7 + 4 * n] = "" + plan.weighings().get(n).massG() * (strong ? 1.10 : 1);
        }
        assertEquals(0, run(grams).status);
        run(
                "batch",
                "measure",
                batch,
                "--method",
                "slab fit",
                "--value",
                "690,0.1096,0.0005,10.95,0.05",
                "--no-logbook");
        Ran ran = run("correct", batch, "--chance", "0.95", "--capacity-ml", "700", "--json");
        assertEquals(0, ran.status, ran.err);
        Map<String, Object> c = JSON.std.mapFrom(ran.out);
        assertEquals("add", c.get("outcome"));
        assertTrue((Double) c.get("chance_then") >= 0.95, ran.out);
        double added = (Double) c.get("added_ml");
        assertTrue(added > 15 && added < 60, "about a tenth more, less what the tolerance forgives: " + added);
        // Least: visibly less water of the same does not reach the chance.
        for (Object item : (List<?>) c.get("items"))
            assertEquals("water", ((Map<?, ?>) item).get("ingredient"), "nothing else is needed");

        Ran full = run("correct", batch, "--chance", "0.95", "--capacity-ml", "510", "--json");
        assertEquals(3, full.status, "no room: start again");
        Map<String, Object> again = JSON.std.mapFrom(full.out);
        assertEquals("start-again", again.get("outcome"));
        assertTrue(again.get("reason").toString().contains("room"), full.out);
        assertTrue((Double) again.get("volume_ml") <= 510.001, full.out);
        assertTrue((Double) ((Map<?, ?>) again.get("new_batch")).get("cost") > 0, full.out);

        Ran recorded = run("correct", batch, "--chance", "0.95", "--capacity-ml", "700", "--record", "--no-logbook");
        assertEquals(0, recorded.status, recorded.err);
        assertEquals(1, read().correctionCount());
        assertFalse(read().complete(), "the correction is weighed like the rest");
    }

    @Test
    void aBadMeasurementBlamesTheBottle() {
        weighAsPlanned(1);
        Ran ran = run(
                "batch", "measure", batch, "--method", "slab fit", "--no-logbook", "--value", "690,0.13,0.001,10,0.05");
        assertEquals(0, ran.status, ran.err);
        assertTrue(ran.out.contains("ink-demo absorption"), ran.out);
        Ran learned = run("lot", "update", batch, "--out", file("shelf"));
        assertEquals(2, learned.status);
        assertTrue(learned.err.contains("hard to believe"), learned.err);
        assertFalse(Files.exists(folder.resolve("shelf")));
    }

    @Test
    void aLearnedLotMakesTheNextPredictionTighter() throws IOException {
        weighAsPlanned(1);
        run(
                "batch",
                "measure",
                batch,
                "--method",
                "slab fit",
                "--no-logbook",
                "--value",
                "690,0.1005,0.001,9.9,0.05",
                "--on",
                "2026-03-02");
        Path shelf = folder.resolve("shelf");
        copy(Path.of("ingredients"), shelf);
        Ran learned = run(
                "lot",
                "update",
                batch,
                "--ingredients",
                shelf.toString(),
                "--of",
                "lipid-emulsion-20",
                "--number",
                "L9");
        assertEquals(0, learned.status, learned.err);
        Shelf now = ShelfReader.read(shelf);
        var lot = now.require("lipid-emulsion-20-lot-L9");
        assertTrue(lot.uncertainty().scattering() < 0.015, "0.03 before, and a measurement to half a per cent");
        Files.writeString(
                folder.resolve("bath.recipe.toml"),
                Files.readString(folder.resolve("bath.recipe.toml"))
                        .replace("ingredient = \"lipid-emulsion-20\"", "ingredient = \"lipid-emulsion-20-lot-L9\""));
        Ran after =
                run("predict", file("bath.recipe.toml"), "--at", "690", "--json", "--ingredients", shelf.toString());
        assertEquals(0, after.status, after.err);
        double musp = (Double) row(after, "rows", 0).get("musp_per_cm");
        assertEquals(9.9, musp, 0.1, "the prediction goes where the measurement was");
        assertTrue((Double) row(after, "rows", 0).get("u_musp_per_cm") < 0.2, after.out);
    }

    private static void copy(Path from, Path to) throws IOException {
        try (var all = Files.walk(from)) {
            for (Path p : all.toList())
                Files.copy(p, to.resolve(from.relativize(p).toString()));
        }
    }

    @Test
    void measuredValuesComeInEitherUnitAndAreShown() throws IOException {
        weighAsPlanned(1);
        Files.writeString(
                folder.resolve("m.csv"),
                "wavelength;µa (1/mm);u(µa) /mm;µs' mm-1;u musp per mm;remark\n690;0,01005;0,0002;0,99;0,01;ok\n");
        Ran ran = run("batch", "measure", batch, "--from", file("m.csv"), "--method", "slab fit", "--no-logbook");
        assertEquals(0, ran.status, ran.err);
        assertTrue(ran.out.contains("times 10 to 1/cm") && ran.out.contains("\"remark\" is left aside"), ran.out);
        assertEquals(0.1005, read().measured().get(0).values().get(0).perCm(), 1e-12);
        assertEquals(0.1, read().measured().get(0).values().get(1).uPerCm(), 1e-12);
        Files.writeString(folder.resolve("n.csv"), "nm,mua,musp\n690,0.1,10\n");
        Ran unit = run("targets", file("n.csv"));
        assertEquals(2, unit.status);
        assertTrue(unit.err.contains("names no unit"), unit.err);
        Ran brief = run("targets", file("n.csv"), "--table-unit", "mm", "--out", file("n.brief.toml"));
        assertEquals(0, brief.status, brief.err);
        assertTrue(Files.readString(folder.resolve("n.brief.toml")).contains("musp_per_cm = 100.0"));
    }

    @Test
    void slipsAreToldInOneSentence() {
        String[][] slips = {
            {"batch", "weigh", batch, "--item", "99", "--grams", "1"},
            {"batch", "weigh", batch, "--item", "1", "--grams", "-1"},
            {"batch", "weigh", batch, "--item", "1"},
            {"batch", "weigh", batch, "--vessel", "600,610"},
            {"batch", "measure", batch, "--method", "m", "--value", "690,x,0.1,,"},
            {"batch", "measure", batch, "--method", "m", "--value", "690,0.1,0,,"},
            {"batch", "show", file("bath.recipe.toml")},
            {"batch", "open", batch},
            {"correct", batch},
            {"lot", "update", batch},
            {"lot", "fit", file("none.csv"), "--of", "ink-demo", "--number", "1"},
        };
        for (String[] slip : slips) {
            Ran ran = run(slip);
            assertEquals(2, ran.status, String.join(" ", slip) + ran.out);
            assertEquals(1, ran.err.lines().count(), ran.err);
            assertFalse(ran.err.contains("Exception"), ran.err);
        }
    }
}
