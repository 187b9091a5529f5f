package org.hazewright.cli;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNotNull;
import static org.junit.jupiter.api.Assertions.assertNull;
import static org.junit.jupiter.api.Assertions.assertTrue;

import com.fasterxml.jackson.jr.ob.JSON;
import java.io.IOException;
import java.io.PrintWriter;
import java.io.StringWriter;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.HashSet;
import java.util.List;
import java.util.Map;
import java.util.Set;
import javax.imageio.ImageIO;
import org.hazewright.files.SetUpReader;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

/** The command readings as a person types it. */
class ReadingsCommandTest {
    private static final String TISSUE = "mua_per_cm=0.1,musp_per_cm=10,g=0.8,n=1.4";
    private static final String BATH = """
            format = 1
            title = "Bath by hand"
            base = "water"
            [[item]]
            ingredient = "water"
            mass_g = 953.9
            [[item]]
            ingredient = "lipid-emulsion-20"
            mass_g = 42.9
            [[item]]
            ingredient = "ink-demo"
            mass_g = 0.015
            """;

    @TempDir
    Path folder;

    private record Ran(int status, String out, String err) {
        List<Map<String, Object>> readings() throws IOException {
            List<Map<String, Object>> all = new ArrayList<>();
            for (Object row : (List<?>) JSON.std.mapFrom(out).get("readings")) {
                Map<String, Object> typed = new java.util.LinkedHashMap<>();
                ((Map<?, ?>) row).forEach((k, v) -> typed.put((String) k, v));
                all.add(typed);
            }
            return all;
        }

        double value(String quantity, Double mm) throws IOException {
            for (Map<String, Object> r : readings())
                if (r.get("quantity").equals(quantity)
                        && (mm == null || ((Number) r.get("distance_mm")).doubleValue() == mm))
                    return ((Number) r.get("value")).doubleValue();
            throw new AssertionError("no " + quantity + " in " + out);
        }
    }

    private static Ran run(Interruption interruption, String... args) {
        StringWriter out = new StringWriter();
        StringWriter err = new StringWriter();
        int status = Hazewright.run(new PrintWriter(out), new PrintWriter(err), interruption, args);
        return new Ran(status, out.toString(), err.toString());
    }

    private static Ran run(String... args) {
        return run(new Interruption(), args);
    }

    private Path write(String name, String text) throws IOException {
        Path file = folder.resolve(name);
        Files.writeString(file, text);
        return file;
    }

    private Ran refused(String words, String... args) {
        Ran ran = run(args);
        assertEquals(2, ran.status, ran.out + ran.err);
        assertEquals("", ran.out);
        assertEquals(1, ran.err.lines().count(), ran.err);
        assertTrue(ran.err.contains(words), words + " is missing from: " + ran.err);
        return ran;
    }

    /** Farrell, Patterson &amp; Wilson, Med. Phys. 19, 879 (1992), without a', by two independent codes: n 1.40, µa 0.1, µs' 10 /cm. */
    @ParameterizedTest
    @CsvSource({"10,1.56467e-4", "20,7.01722e-6", "30,5.36102e-7"})
    void steadyReflectance(double mm, double expected) throws IOException {
        Path probe = write(
                "probe.setup.toml",
                "format = 1\nkind = \"reflectance\"\nwavelengths_nm = [690]\ndistances_mm = [10, 20, 30]\n"
                        + "[convention]\nform = \"flux\"\n");
        Ran ran = run("readings", "--medium", TISSUE, "--setup", probe.toString(), "--json");
        assertEquals(0, ran.status, ran.err);
        assertEquals(expected, ran.value("reflectance_per_mm2", mm), 6e-6 * expected, "six digits printed");
    }

    /** H. C. van de Hulst, Multiple Light Scattering (Academic Press 1980): g 0.75, albedo 0.9, optical thickness 2, matched. */
    @Test
    void slabByTheTables() throws IOException {
        Path slab =
                write("slab.setup.toml", "format = 1\nkind = \"slab\"\nwavelengths_nm = [690]\nthickness_mm = 10\n");
        Ran ran = run(
                "readings",
                "--medium",
                "mua_per_cm=0.2,musp_per_cm=0.45,g=0.75,n=1",
                "--setup",
                slab.toString(),
                "--json");
        assertEquals(0.09739, ran.value("total_reflectance", null), 1e-5);
        assertEquals(0.66096, ran.value("total_transmittance", null), 1e-5);
        assertEquals(Math.exp(-2), ran.value("unscattered_transmittance", null), 1e-12, "Bouguer–Beer–Lambert");
    }

    /** The same slab, thinner by option: optical thickness 4 at 20 mm (values computed by two independent codes). */
    @Test
    void thicknessOfThePhantom() throws IOException {
        Ran ran = run(
                "readings",
                "--medium",
                "mua_per_cm=0.2,musp_per_cm=0.45,g=0.75,n=1",
                "--setup",
                "slab-10-mm",
                "--thickness-mm",
                "20",
                "--json");
        assertEquals(0.14157, ran.value("total_reflectance", null), 1e-5);
        assertEquals(0.39732, ran.value("total_transmittance", null), 1e-5);
    }

    /** Haskell et al., J. Opt. Soc. Am. A 11, 2727 (1994), by an independent code: 100 MHz, 30 mm, the flux taken for the signal. */
    @Test
    void modulatedLight() throws IOException {
        Path file = write("wave.setup.toml", """
                format = 1
                kind = "frequency"
                wavelengths_nm = [690]
                distances_mm = [30]
                modulation_mhz = 100
                [convention]
                form = "flux"
                """);
        Ran ran = run("readings", "--medium", TISSUE, "--setup", file.toString(), "--json");
        assertEquals(37.013, ran.value("phase_deg", null), 6e-4, "digits printed");
        assertEquals(0.96145, ran.value("modulation", null), 6e-6);
    }

    @Test
    void fieldsOfTheDocument() throws IOException {
        Path bath = write("bath.recipe.toml", BATH);
        Ran ran = run("readings", bath.toString(), "--setup", "two-distance-probe", "--setup", "time-curve", "--json");
        assertEquals(0, ran.status, ran.err);
        assertEquals(Set.of("readings"), JSON.std.mapFrom(ran.out).keySet());
        Set<String> values = Set.of(
                "setup",
                "kind",
                "wavelength_nm",
                "distance_mm",
                "quantity",
                "value",
                "u",
                "unit",
                "model",
                "inside_range",
                "note");
        Set<String> curves = Set.of(
                "setup",
                "kind",
                "wavelength_nm",
                "distance_mm",
                "quantity",
                "x",
                "x_unit",
                "y",
                "y_unit",
                "u",
                "model",
                "inside_range",
                "note");
        Set<String> quantities = new HashSet<>();
        for (Map<String, Object> r : ran.readings()) {
            quantities.add((String) r.get("quantity"));
            boolean curve = r.get("quantity").equals("time_curve");
            assertEquals(curve ? curves : values, r.keySet());
            assertEquals(true, r.get("inside_range"));
            if (curve) {
                assertEquals(1001, ((List<?>) r.get("x")).size());
                assertEquals(1001, ((List<?>) r.get("y")).size());
                assertEquals("counts", r.get("y_unit"));
                double sum = 0;
                for (Object y : (List<?>) r.get("y")) sum += ((Number) y).doubleValue();
                assertEquals(1e6, sum, 1, "counts of the set-up");
            } else assertNotNull(r.get("u"), "a recipe's uncertainty is carried in: " + r);
        }
        assertTrue(quantities.containsAll(Set.of(
                "reflectance_per_mm2",
                "attenuation_db",
                "mean_time_ps",
                "time_variance_ps2",
                "apparent_mua_per_cm",
                "apparent_musp_per_cm")));
    }

    @Test
    void aMediumIsToldAtEveryWavelengthOfTheSetUp() throws IOException {
        Ran ran = run("readings", "--medium", TISSUE, "--setup", "two-distance-probe", "--json");
        Set<Object> nm = new HashSet<>();
        ran.readings().forEach(r -> {
            nm.add(r.get("wavelength_nm"));
            assertNull(r.get("u"), "nothing is known of its uncertainty");
        });
        assertEquals(Set.of(690.0, 830.0), nm);
        Ran known =
                run("readings", "--medium", TISSUE + ",u_mua_per_cm=0.01", "--setup", "two-distance-probe", "--json");
        for (Map<String, Object> r : known.readings()) assertNotNull(r.get("u"));
    }

    @Test
    void textSaysUncertaintyModelAndConvention() throws IOException {
        Path bath = write("bath.recipe.toml", BATH);
        Ran ran = run("readings", bath.toString(), "--setup", "slope-over-distances");
        assertEquals(0, ran.status, ran.err);
        assertTrue(ran.out.matches("(?s).*attenuation +\\d+\\.\\d+ ± \\d+\\.\\d+ dB +diffusion.*"), ran.out);
        assertTrue(
                ran.out.matches("(?s).*apparent µa +0\\.\\d+ ± 0\\.\\d+ /cm +true 0\\.\\d+ \\([+−]\\d+\\.\\d %\\).*"),
                ran.out);
        assertTrue(ran.out.contains("diffusion: flux-and-fluence, D with absorption, unit source, per power entered."));
        assertFalse(ran.out.contains("DOUBTFUL"), ran.out);
        Ran mm = run("readings", bath.toString(), "--setup", "slope-over-distances", "--units", "mm");
        assertTrue(mm.out.matches("(?s).*apparent µa +0\\.0\\d+ ± 0\\.\\d+ /mm.*"), mm.out);
    }

    @Test
    void aPlainWordWhereTheModelIsNotToBeTrusted() throws IOException {
        Path near = write("near.setup.toml", """
                format = 1
                title = "Near"
                kind = "reflectance"
                wavelengths_nm = [690]
                distances_mm = [1, 20]
                model = "diffusion"
                """);
        Ran ran = run("readings", "--medium", TISSUE, "--setup", near.toString());
        String one = ran.out
                .lines()
                .filter(l -> l.strip().startsWith("1 "))
                .findFirst()
                .orElseThrow();
        String twenty = ran.out
                .lines()
                .filter(l -> l.contains("20  reflectance"))
                .findFirst()
                .orElseThrow();
        assertTrue(one.contains("DOUBTFUL"), ran.out);
        assertFalse(twenty.contains("DOUBTFUL"), ran.out);
        assertTrue(ran.out.contains("transport lengths from the beam"), ran.out);
    }

    @Test
    void aSetUpFollowsOtherWavelengths() throws IOException {
        Path bath = write("bath.recipe.toml", BATH);
        Ran ran = run("readings", bath.toString(), "--setup", "two-distance-probe", "--at", "760,850", "--json");
        Set<Object> nm = new HashSet<>();
        ran.readings().forEach(r -> nm.add(r.get("wavelength_nm")));
        assertEquals(Set.of(760.0, 850.0), nm);
    }

    /** A block of 20 mm whose brief stands beside the recipe is read as such; another brief's mould only when it is named. */
    @Test
    void theMouldOfTheBrief() throws IOException {
        Path brief = Path.of("recipes-demo/bench-slab.brief.toml");
        Files.copy(brief, folder.resolve("bench-slab.brief.toml"));
        Ran designed = run("design", folder.resolve("bench-slab.brief.toml").toString(), "--quiet");
        assertEquals(0, designed.status, designed.err);
        String recipe = folder.resolve("bench-slab.recipe.toml").toString();
        Ran own = run("readings", recipe, "--setup", "slab-10-mm");
        assertTrue(own.out.contains("20 mm thick, nearest side wall 40 mm"), own.out);
        Ran thinner = run("readings", recipe, "--setup", "slab-10-mm", "--thickness-mm", "5", "--json");
        Ran thick = run("readings", recipe, "--setup", "slab-10-mm", "--json");
        assertTrue(thinner.value("total_transmittance", null) > 2 * thick.value("total_transmittance", null));
        Files.delete(folder.resolve("bench-slab.brief.toml"));
        assertTrue(run("readings", recipe, "--setup", "slab-10-mm").out.contains("10 mm thick"));
        Ran named = run("readings", recipe, "--setup", "slab-10-mm", "--brief", brief.toString());
        assertTrue(named.out.contains("20 mm thick"), named.out);
        assertEquals("", named.err);
        Path small = write("small.brief.toml", """
                format = 1
                base = "pdms"
                [[mould]]
                shape = "cylinder"
                diameter_mm = 30
                height_mm = 30
                [[target]]
                wavelength_nm = 690
                mua_per_cm = 0.1
                """);
        Ran other = run("readings", recipe, "--setup", "two-distance-probe", "--brief", small.toString());
        assertTrue(other.err.contains("not made for"), other.err);
        assertTrue(other.out.contains("nearest side wall is 15.0 mm away"), other.out);
    }

    /** Each shipped set-up gives a reading on each demo recipe, with its picture. */
    @ParameterizedTest
    @ValueSource(strings = {"wrist-bath", "forearm-block", "bench-slab", "clear-window"})
    void everySetUpOnEveryDemo(String name) throws IOException {
        run("design", "recipes-demo/" + name + ".brief.toml", "--out", folder.toString(), "--quiet");
        Path picture = folder.resolve(name + ".png");
        Ran ran = run(
                "readings",
                folder.resolve(name + ".recipe.toml").toString(),
                "--json",
                "--picture",
                picture.toString());
        assertEquals(0, ran.status, ran.err);
        assertEquals("", ran.err, "nothing is left out");
        for (String setUp : SetUpReader.shipped()) {
            String title = SetUpReader.readShipped(setUp).title();
            List<Map<String, Object>> own = ran.readings().stream()
                    .filter(r -> r.get("setup").equals(title))
                    .toList();
            assertFalse(own.isEmpty(), title);
            for (Map<String, Object> r : own) {
                assertTrue(r.get("value") != null || r.get("y") != null, title + " is silent: " + r);
                boolean cuvette = title.startsWith("Collimated"); // too milky for 1 mm, and says so
                assertTrue(cuvette || title.startsWith("Oximeter") || (Boolean) r.get("inside_range"), r.toString());
            }
        }
        assertTrue(ImageIO.read(picture.toFile()).getWidth() > 1000);
    }

    @Test
    void picturesOfBothKinds() throws IOException {
        Path svg = folder.resolve("p.svg");
        Ran ran = run("readings", "--medium", TISSUE, "--setup", "two-distance-probe", "--picture", svg.toString());
        assertEquals(0, ran.status, ran.err);
        String drawn = Files.readString(svg);
        assertTrue(drawn.contains("<svg") && drawn.contains("viewBox=\"0 0 "), "it can be made larger");
        assertTrue(drawn.contains("<text"), "text stays text");
        assertFalse(drawn.contains("<!DOCTYPE"), "a viewer looks for nothing on the network");
        assertTrue(ran.out.contains("Written: " + svg));
        refused(
                "ends with neither",
                "readings",
                "--medium",
                TISSUE,
                "--picture",
                folder.resolve("p.pdf").toString());
        assertFalse(Files.exists(folder.resolve("p.pdf")));
    }

    /** Ctrl-C during packets: what there is, and a word for what is not. */
    @Test
    void aStoppedRunTellsWhatThereIs() throws IOException {
        Path near = write("near.setup.toml", """
                format = 1
                title = "Near"
                kind = "reflectance"
                wavelengths_nm = [690]
                distances_mm = [1, 20]
                packets = 1000000000
                """);
        Interruption stopped = new Interruption();
        stopped.ask();
        Ran ran = run(stopped, "readings", "--medium", TISSUE, "--setup", near.toString(), "--json");
        assertEquals(0, ran.status, ran.err);
        for (Map<String, Object> r : ran.readings()) {
            if (!r.get("quantity").equals("reflectance_per_mm2")) continue;
            boolean far = ((Number) r.get("distance_mm")).doubleValue() == 20;
            assertEquals(far, r.get("inside_range"), r.toString());
        }
    }

    @Test
    void listsAndShowsTheShippedOnes() throws IOException {
        Ran list = run("readings", "--list");
        assertEquals(SetUpReader.shipped().size(), list.out.lines().count());
        Ran shown = run("readings", "--show", "time-curve");
        Path mine = write("mine.setup.toml", shown.out);
        assertEquals(SetUpReader.readShipped("time-curve"), SetUpReader.read(mine));
    }

    @Test
    void refusals() throws IOException {
        Path bath = write("bath.recipe.toml", BATH);
        refused("Name a recipe or batch, or give --medium", "readings");
        refused("one of the two", "readings", bath.toString(), "--medium", TISSUE);
        refused("Perhaps \"near-probe\"", "readings", bath.toString(), "--setup", "near-prob");
        refused("does not say n", "readings", "--medium", "mua_per_cm=0.1,musp_per_cm=10,g=0.8");
        refused("Perhaps mua_per_cm", "readings", "--medium", "mua_per_mm=0.1,musp_per_cm=10,g=0.8,n=1.4");
        refused("must be a number", "readings", "--medium", "mua_per_cm=low,musp_per_cm=10,g=0.8,n=1.4");
        refused("Absorption coefficient", "readings", "--medium", "mua_per_cm=-1,musp_per_cm=10,g=0.8,n=1.4");
        refused("Thickness", "readings", "--medium", TISSUE, "--setup", "slab-10-mm", "--thickness-mm", "-3");
        Ran outside = refused("2500 nm", "readings", bath.toString(), "--setup", "slab-10-mm", "--at", "2500");
        assertTrue(outside.err.contains("covers"), outside.err);
        refused("No set-up", "readings", bath.toString(), "--at", "2500", "--quiet");
        Path broken =
                write("broken.setup.toml", "format = 1\nkind = \"slab\"\nwavelengths_nm = [690]\nthickness_mm = 0\n");
        refused("broken.setup.toml:4:1", "readings", bath.toString(), "--setup", broken.toString());
        refused("no such file", "readings", folder.resolve("none.recipe.toml").toString());
    }
}
