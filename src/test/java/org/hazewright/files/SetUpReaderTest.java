package org.hazewright.files;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.EnumSet;
import java.util.List;
import java.util.Set;
import org.hazewright.optics.Refusal;
import org.hazewright.reading.SetUp;
import org.hazewright.transport.Convention;
import org.hazewright.transport.TimeAxis;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class SetUpReaderTest {
    private static final String PROBE = """
            format = 1
            title = "Probe"
            kind = "reflectance"
            wavelengths_nm = [690, 830]
            distances_mm = [20, 30]
            thickness_mm = 40
            model = "auto"
            packets = 5000
            seed = 7
            [convention]
            form = "flux"
            per = "incident"
            """;
    private static final String CURVE = """
            format = 1
            kind = "time"
            wavelengths_nm = [690]
            distances_mm = [25]
            time_ps = {from = 0, to = 4000, step = 5}
            response = "lamp.csv"
            counts = 1e5
            """;

    @TempDir
    Path folder;

    private Path write(String text) throws IOException {
        Path file = folder.resolve("probe.setup.toml");
        Files.writeString(file, text);
        return file;
    }

    private void refused(String text, String place, String... words) throws IOException {
        Path file = write(text);
        Refusal refusal = assertThrows(Refusal.class, () -> SetUpReader.read(file));
        String message = refusal.getMessage();
        assertTrue(message.startsWith(folder + "/" + place), message);
        for (String word : words) assertTrue(message.contains(word), word + " is missing from: " + message);
        assertEquals(1, message.lines().count());
    }

    @Test
    void everyKeyArrives() throws IOException {
        SetUp s = SetUpReader.read(write(PROBE));
        assertEquals("Probe", s.title());
        assertEquals(SetUp.Kind.REFLECTANCE, s.kind());
        assertEquals(List.of(690.0, 830.0), s.wavelengthsNm());
        assertEquals(List.of(20.0, 30.0), s.distancesMm());
        assertEquals(1, s.outsideIndex());
        assertEquals(40, s.thicknessMm());
        assertEquals(5000, s.packets());
        assertEquals(7, s.seed());
        assertEquals(Convention.Form.FLUX, s.convention().form());
        assertEquals(Convention.Per.INCIDENT, s.convention().per());
        assertEquals(
                Convention.DiffusionConstant.WITH_ABSORPTION,
                s.convention().diffusion(),
                "what a convention leaves out stays the default");
    }

    @Test
    void aResponseIsFoundBesideTheSetUp() throws IOException {
        Files.writeString(folder.resolve("lamp.csv"), "# measured\ntime_ps,counts\n-50,0\n0,100\n50,0\n");
        SetUp s = SetUpReader.read(write(CURVE));
        assertEquals("probe", s.title(), "without a title the file's name");
        assertEquals(new TimeAxis(0, 4000, 5), s.time());
        assertEquals(0, s.response().meanPs(), 1e-12);
        assertEquals(50.0 * 50 / 6, s.response().variancePs2(), 1e-9, "variance of a triangle of half base 50");
        assertEquals(1e5, s.counts());
    }

    @Test
    void faultsOfAResponseAreToldInItsTable() throws IOException {
        refused(CURVE, "probe.setup.toml:6:1", "no table \"lamp.csv\"");
        Files.writeString(folder.resolve("lamp.csv"), "time_ps,counts\n0,1\n50,-1\n");
        refused(CURVE, "lamp.csv:3", "-1");
        Files.writeString(folder.resolve("lamp.csv"), "time_ps,counts\n0,1\n0,2\n");
        refused(CURVE, "lamp.csv:3", "ascend");
        Files.writeString(folder.resolve("lamp.csv"), "time_ps,signal\n0,1\n1,2\n");
        refused(CURVE, "lamp.csv:1", "signal");
        Files.writeString(folder.resolve("lamp.csv"), "time_ps,counts\n0,0\n50,0\n");
        refused(CURVE, "lamp.csv:1", "0 everywhere");
    }

    @ParameterizedTest
    @CsvSource(
            delimiter = '|',
            value = {
                "kind = \"reflectance\"|kind = \"reflectence\"|:3:|\"reflectance\" is meant",
                "distances_mm = [20, 30]|distances_mm = [20, 0]|:5:21|Entry 2 of distances_mm is 0",
                "distances_mm = [20, 30]|distances_mm = [20, 20]|:5:21|stands there before",
                "distances_mm = [20, 30]|distances_mm = []|:5:1|needs 1 to 1000",
                "distances_mm = [20, 30]|distance_mm = [20, 30]|:5:1|Perhaps distances_mm",
                "wavelengths_nm = [690, 830]|wavelengths_nm = [690, 8.3]|:4:24|8.3",
                "wavelengths_nm = [690, 830]|wavelengths_nm = \"690\"|:4:1|a list of numbers",
                "thickness_mm = 40|thickness_mm = -40|:6:1|-40",
                "thickness_mm = 40|modulation_mhz = 100|:6:1|no use for modulation_mhz",
                "thickness_mm = 40|time_ps = {from = 0, to = 1, step = 1}|:6:1|no use for time_ps",
                "thickness_mm = 40|outside_index = 0.5|:6:1|between 1 and 4",
                "model = \"auto\"|model = \"transport\"|:7:1|totals only",
                "model = \"auto\"|model = \"rays\"|:7:1|auto, diffusion, transport, packets",
                "packets = 5000|packets = 10|:8:1|between 1000",
                "packets = 5000|packets = 5000.5|:8:1|whole number",
                "seed = 7|seed = -1|:9:1|between 0",
                "form = \"flux\"|form = \"fluence\"|:11:1|flux-and-fluence, flux",
                "form = \"flux\"|shape = \"flux\"|:11:1|not known",
                "format = 1|format = 2|:1:1|format = 1",
            })
    void faultsAreToldWhereTheyStand(String good, String bad, String place, String words) throws IOException {
        assertTrue(PROBE.contains(good));
        refused(PROBE.replace(good, bad), "probe.setup.toml" + place, words);
    }

    @Test
    void whatAKindNeeds() throws IOException {
        refused(CURVE.replaceFirst("time_ps = .*\\n", ""), "probe.setup.toml:1:1", "time_ps is missing");
        refused(CURVE.replace("to = 4000", "to = 0"), "probe.setup.toml:5", "must go forward");
        refused(CURVE.replace("step = 5", "step = 0"), "probe.setup.toml:5", "above 0");
        refused(CURVE.replace("step = 5", "step = 1e-3"), "probe.setup.toml:5", "100000 points");
        refused(
                PROBE.replace("\"reflectance\"", "\"slope\"").replace("[20, 30]", "[20]"),
                "probe.setup.toml:5:1",
                "1 entry");
        refused(
                "format = 1\nkind = \"slab\"\nwavelengths_nm = [690]\n",
                "probe.setup.toml:1:1",
                "thickness_mm is missing");
        refused(
                "format = 1\nkind = \"frequency\"\nwavelengths_nm = [690]\ndistances_mm = [20]\n",
                "probe.setup.toml:1:1",
                "modulation_mhz");
        refused("format = 1\nkind = \"oximeter\"\nwavelengths_nm = [690]\n", "probe.setup.toml:3:1", "needs 2");
        refused("format = 1\nwavelengths_nm = [690]\n", "probe.setup.toml:1:1", "kind", "missing");
    }

    @Test
    void theProgramBringsOneOfEveryKind() {
        Set<SetUp.Kind> kinds = EnumSet.noneOf(SetUp.Kind.class);
        for (String name : SetUpReader.shipped()) {
            SetUp s = SetUpReader.readShipped(name);
            kinds.add(s.kind());
            assertFalse(s.title().equals(name), "a title for people: " + name);
            assertEquals(s, SetUpReader.named(name));
            assertTrue(SetUpReader.shippedText(name).startsWith("#"), "says what it is: " + name);
        }
        assertEquals(EnumSet.allOf(SetUp.Kind.class), kinds);
    }

    @Test
    void anUnknownNameIsAnsweredWithTheKnownOnes() {
        Refusal refusal = assertThrows(Refusal.class, () -> SetUpReader.named("two-distance-prob"));
        assertTrue(refusal.getMessage().contains("Perhaps \"two-distance-probe\""), refusal.getMessage());
        assertTrue(refusal.getMessage().contains("near-probe"), refusal.getMessage());
        assertThrows(
                Refusal.class,
                () -> SetUpReader.named(folder.resolve("none.setup.toml").toString()));
    }
}
