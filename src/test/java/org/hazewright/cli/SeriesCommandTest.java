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
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.concurrent.atomic.AtomicLong;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** Series, titrations, several briefs at once, progress and stop, as a person meets them. */
class SeriesCommandTest {
    private static final String HEAD = """
            format = 1
            title = "Set"
            base = "water"
            batch_ml = 300
            [shelf]
            use = ["ink-demo", "lipid-emulsion-20"]
            """;

    private static final String GRID = HEAD + """
            [series]
            wavelengths_nm = [800]
            musp_per_cm = [8, 12]
            mua_per_cm = [0.1, 0.2, 0.3]
            """;

    private static final String TITRATION = GRID.replace("[8, 12]", "[10]") + """
            [titration]
            keep_musp = true
            aliquot_ml = 5
            """;

    private static final String BATH = HEAD + """
            [[target]]
            wavelength_nm = 690
            mua_per_cm = 0.1
            musp_per_cm = 10.0
            """;

    @TempDir
    Path folder;

    private record Ran(int status, String out, String err) {}

    private static Ran run(Interruption interruption, String... args) {
        StringWriter out = new StringWriter();
        StringWriter err = new StringWriter();
        int status = Hazewright.run(new PrintWriter(out), new PrintWriter(err), interruption, args);
        return new Ran(status, out.toString(), err.toString());
    }

    private String file(String name, String text) throws IOException {
        return Files.writeString(folder.resolve(name + ".brief.toml"), text).toString();
    }

    private Ran series(String text, String... more) throws IOException {
        List<String> args = new ArrayList<>(List.of(
                "series", file("set", text), "--out", folder.resolve("out").toString()));
        args.addAll(List.of(more));
        return run(new Interruption(), args.toArray(String[]::new));
    }

    private static List<Map<?, ?>> list(Object value) {
        List<Map<?, ?>> maps = new ArrayList<>();
        for (Object o : (List<?>) value) maps.add((Map<?, ?>) o);
        return maps;
    }

    @Test
    void aGridIsWrittenAsRecipesThatPredictReadsBack() throws IOException {
        Ran ran = series(GRID, "--json");
        assertEquals(0, ran.status, ran.err);
        Map<String, Object> plan = JSON.std.mapFrom(ran.out);
        List<Map<?, ?>> phantoms = list(plan.get("phantoms"));
        assertEquals(
                List.of("A1", "A2", "A3", "B1", "B2", "B3"),
                phantoms.stream().map(p -> p.get("name")).toList());
        for (Map<?, ?> p : phantoms) {
            Path recipe = folder.resolve("out/set-" + p.get("name") + ".recipe.toml");
            Ran read = run(new Interruption(), "predict", recipe.toString(), "--at", "800", "--json");
            Map<?, ?> row = list(JSON.std.mapFrom(read.out).get("rows")).get(0);
            Map<?, ?> promised = list(p.get("predicted")).get(0);
            for (String key : List.of("mua_per_cm", "musp_per_cm", "u_mua_per_cm", "u_musp_per_cm"))
                assertEquals((Double) promised.get(key), (Double) row.get(key), 1e-6, key);
        }
        double emulsionG = 0;
        for (Map<?, ?> p : phantoms)
            for (Map<?, ?> i : list(p.get("items")))
                if (i.get("ingredient").equals("lipid-emulsion-20")) emulsionG += (Double) i.get("mass_g");
        double bought = list(plan.get("buy")).stream()
                .filter(b -> b.get("ingredient").equals("lipid-emulsion-20"))
                .mapToDouble(b -> (Double) b.get("mass_g"))
                .sum();
        assertEquals(emulsionG, bought, 1e-9);
        assertTrue(Files.size(folder.resolve("out/set.series.xlsx")) > 4000);
    }

    @Test
    void aGridAsTextHasOneRowAPhantom() throws IOException {
        Ran ran = series(GRID);
        assertEquals(0, ran.status, ran.err);
        for (String name : List.of("A1", "A3", "B3"))
            assertEquals(
                    2,
                    ran.out
                            .lines()
                            .filter(l -> l.strip().startsWith(name + " "))
                            .count(),
                    name + ran.out);
        assertTrue(ran.out.contains("Written: 6 recipes"), ran.out);
    }

    @Test
    void aTitrationKeepsMusp() throws IOException {
        Ran ran = series(TITRATION, "--json");
        assertEquals(0, ran.status, ran.err);
        for (Map<?, ?> step : list(JSON.std.mapFrom(ran.out).get("steps")))
            for (Map<?, ?> p : list(step.get("predicted")))
                if (p.get("quantity").equals("musp")) assertEquals(10, (Double) p.get("per_cm"), 0.03);
        for (String name : List.of("set-bath.recipe.toml", "set-titrant.recipe.toml", "set.series.xlsx"))
            assertTrue(Files.exists(folder.resolve("out").resolve(name)), name);
        Ran text = series(TITRATION);
        assertTrue(text.out.contains("Mix the titrant"), text.out);
    }

    @Test
    void aVesselThatIsTooSmallIsRefused() throws IOException {
        Ran ran = series(TITRATION + "vessel_ml = 200\n");
        assertEquals(2, ran.status);
        assertTrue(ran.err.contains("the vessel holds 200 mL"), ran.err);
        assertFalse(Files.exists(folder.resolve("out")));
    }

    @Test
    void aBriefOfOnePhantomIsSentToDesign() throws IOException {
        Ran ran = series(BATH);
        assertEquals(2, ran.status);
        assertTrue(ran.err.contains("use the command design"), ran.err);
    }

    @Test
    void aGridThatCannotBeMetIsWrittenAllTheSame() throws IOException {
        Ran ran = series(GRID.replace("[800]", "[970]"));
        assertEquals(3, ran.status, ran.err);
        assertTrue(ran.out.contains("Outside a tolerance: A1"), ran.out);
        assertTrue(Files.exists(folder.resolve("out/set-B3.recipe.toml")));
    }

    @Test
    void severalBriefsAreOneResultEach() throws IOException {
        String good = file("good", BATH);
        String missing = file("missing", BATH.replace("0.1", "0.30").replace("690", "970"));
        String bad = file("bad", BATH.replace("ink-demo", "ink-dmeo"));
        String out = folder.resolve("out").toString();
        Ran text = run(new Interruption(), "design", good, bad, missing, "--out", out);
        assertEquals(2, text.status, "refused is worse than missed");
        assertEquals(
                1, text.err.lines().filter(l -> l.startsWith("hazewright:")).count(), text.err);
        assertTrue(text.err.contains("bad.brief.toml"), text.err);
        for (String name : List.of("good", "missing"))
            assertTrue(Files.exists(folder.resolve("out/" + name + ".xlsx")), name);
        Ran json = run(new Interruption(), "design", good, bad, missing, "--out", out, "--json");
        List<Map<?, ?>> results = list(JSON.std.mapFrom(json.out).get("results"));
        assertEquals(
                List.of("meets", "refused", "misses"),
                results.stream().map(r -> r.get("status")).toList());
        Ran alone = run(new Interruption(), "design", good, "--out", out, "--json");
        Map<String, Object> one = JSON.std.mapFrom(alone.out);
        Map<Object, Object> first = new java.util.HashMap<>(results.get(0));
        assertEquals(good, first.remove("brief"));
        assertEquals(one, first, "one of several is answered as it would be alone");
        assertFalse(one.containsKey("results"));
    }

    @Test
    void briefsThatWouldOverwriteEachOtherAreRefused() throws IOException {
        String one = file("same", BATH);
        Files.createDirectories(folder.resolve("other"));
        String two =
                Files.writeString(folder.resolve("other/same.brief.toml"), BATH).toString();
        Ran ran = run(
                new Interruption(),
                "design",
                one,
                two,
                "--out",
                folder.resolve("out").toString());
        assertEquals(2, ran.status);
        assertTrue(ran.err.contains("would write the same files"), ran.err);
        assertEquals(0, run(new Interruption(), "design", one, two).status, "beside their briefs they do not meet");
    }

    @Test
    void stoppedWorkGivesTheBestSoFarAndSaysSo() throws IOException {
        Interruption asked = new Interruption();
        asked.ask();
        Ran ran = run(
                asked,
                "design",
                file("bath", BATH),
                "--out",
                folder.resolve("out").toString());
        assertEquals(0, ran.status, ran.err);
        assertTrue(ran.out.contains("the best is not proven, the search was stopped"), ran.out);
        assertTrue(Files.exists(folder.resolve("out/bath.recipe.toml")));
        Ran set = run(
                asked,
                "series",
                file("set", GRID),
                "--out",
                folder.resolve("out").toString());
        assertTrue(set.out.contains("not proven"), set.out);
    }

    /** What was not searched to its end is not called impossible. */
    @Test
    void aStoppedMissClaimsNothingOfTheShelf() throws IOException {
        Interruption asked = new Interruption();
        asked.ask();
        String brief = BATH.replace("0.1", "0.30").replace("690", "970");
        Ran ran = run(
                asked,
                "design",
                file("bath", brief),
                "--out",
                folder.resolve("out").toString());
        assertEquals(3, ran.status, ran.err);
        assertTrue(ran.out.contains("before the search was stopped"), ran.out);
        assertFalse(ran.out.contains("no recipe from this shelf meets"), ran.out);
        assertFalse(ran.out.contains("best possible"), ran.out);
    }

    @Test
    void progressSpeaksSeldomAndOnlyWhenItTakesLong() {
        AtomicLong clock = new AtomicLong();
        StringWriter err = new StringWriter();
        LongWork work = new LongWork(new PrintWriter(err), false, new Interruption(), clock::get);
        for (int tenth = 0; tenth < 10; tenth++) {
            clock.set(tenth * 100_000_000L);
            assertFalse(work.stop());
        }
        assertEquals("", err.toString(), "nothing in the first second");
        work.progress(0.25);
        for (int tenth = 10; tenth < 100; tenth++) {
            clock.set(tenth * 100_000_000L);
            work.stop();
        }
        assertEquals(4, err.toString().lines().count(), "after 1, 2, 4 and 8 s: " + err);
        assertTrue(err.toString().contains("25 % done"), err.toString());
        StringWriter silent = new StringWriter();
        LongWork quiet = new LongWork(new PrintWriter(silent), true, new Interruption(), clock::get);
        clock.addAndGet(60_000_000_000L);
        quiet.stop();
        assertEquals("", silent.toString());
    }

    @Test
    void aStockInHandIsUsedAndNotMadeAgain() throws IOException {
        String brief = BATH + """
                [[stock_in_hand]]
                id = "ink-of-monday"
                ingredient = "ink-demo"
                ingredient_g = 1
                diluent = "water"
                diluent_g = 49
                """;
        Ran ran = run(
                new Interruption(),
                "design",
                file("bath", brief),
                "--out",
                folder.resolve("out").toString(),
                "--json");
        assertEquals(0, ran.status, ran.err);
        Map<String, Object> answer = JSON.std.mapFrom(ran.out);
        List<Map<?, ?>> ways = new ArrayList<>(list(answer.get("alternatives")));
        boolean best = drawsFrom(answer, "ink-of-monday");
        assertTrue(
                best
                        || ways.stream()
                                .anyMatch(w ->
                                        w.get("why").equals("from stock in hand") && drawsFrom(w, "ink-of-monday")),
                ran.out);
        Ran mistyped = run(new Interruption(), "design", file("bath", brief.replace("diluent_g", "diluent_ml")));
        assertEquals(2, mistyped.status);
        assertTrue(mistyped.err.contains("diluent_ml"), mistyped.err);
    }

    private static boolean drawsFrom(Map<?, ?> recipe, String stock) {
        return list(recipe.get("items")).stream().anyMatch(i -> stock.equals(i.get("from_stock")));
    }

    @Test
    void theTextSaysWhatASlipDoesAndWhatIsWorthKnowing() throws IOException {
        Ran ran = run(
                new Interruption(),
                "design",
                file("bath", BATH),
                "--out",
                folder.resolve("out").toString());
        assertTrue(ran.out.contains("What a slip does"), ran.out);
        assertTrue(ran.out.contains("Worth knowing better: with half the uncertainty of the scattering of"), ran.out);
    }
}
