package org.hazewright.files;

import static org.junit.jupiter.api.Assertions.assertEquals;

import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.function.Supplier;
import java.util.stream.Stream;
import org.hazewright.brief.Brief;
import org.hazewright.brief.Series;
import org.hazewright.brief.Target;
import org.hazewright.brief.Tissue;
import org.hazewright.brief.Titration;
import org.hazewright.optics.Spectrum;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

class SeriesReaderTest {
    private static final Supplier<Tissue.Spectra> FLAT = () -> {
        Spectrum flat = new Spectrum("flat", new double[] {600, 900}, new double[] {0.1, 0.1});
        return new Tissue.Spectra(flat, flat, flat, flat);
    };

    private static final String HEAD = """
            format = 1
            title = "Blocks"
            base = "water"
            batch_ml = 100
            """;

    static final String ROWS = HEAD + """
            [[phantom]]
            name = "pale"
            wavelength_nm = 800
            mua_per_cm = 0.1
            musp_per_cm = 10
            mua_tolerance = 0.02
            [[phantom]]
            name = "dark"
            [[phantom.target]]
            wavelength_nm = 690
            mua_per_cm = 0.2
            [[phantom.target]]
            wavelength_nm = 830
            mua_per_cm = 0.3
            [[phantom]]
            name = "arm"
            [phantom.tissue]
            wavelengths_nm = [690]
            haemoglobin_umol_per_l = 0
            water_fraction = 0.5
            [titration]
            keep_musp = true
            aliquot_ml = 5
            evaporation_g_per_step = 0.2
            """;

    static final String GRID = HEAD + """
            [tolerance]
            mua = 0.1
            [series]
            wavelengths_nm = [800]
            musp_per_cm = [5, 10, 15, 20]
            mua_per_cm = [0, 0.07, 0.14, 0.21, 0.28, 0.35, 0.42, 0.49]
            mua_tolerance_per_cm = 0.01
            """;

    @TempDir
    Path folder;

    private Series read(String text) {
        return SeriesReader.read(Marked.write(folder.resolve("set.brief.toml"), text), FLAT);
    }

    /** The grid of Pifferi et al., Appl. Opt. 44, 2104 (2005), 32 blocks near 800 nm (values from memory). */
    @Test
    void aGridPairsEveryScatteringWithEveryAbsorption() {
        Series series = read(GRID);
        assertEquals(32, series.phantoms().size());
        Brief first = series.phantoms().get(0);
        assertEquals("set-A1", first.name());
        assertEquals("Blocks, A1", first.title());
        assertEquals("A1", series.ownName(first));
        Brief last = series.phantoms().get(31);
        assertEquals("D8", series.ownName(last));
        assertEquals(
                List.of(new Target(800, OptionalDouble.of(0.49), OptionalDouble.of(20), 0.01, 0.05 * 20, 1)),
                last.targets());
        assertEquals(0.07, series.phantoms().get(9).targets().get(0).muaPerCm().getAsDouble());
        assertEquals(10, series.phantoms().get(9).targets().get(0).muspPerCm().getAsDouble());
        assertEquals(Optional.empty(), series.titration());
    }

    @Test
    void aGridOfOneQuantityIsARow() {
        Series series = read(HEAD + "[series]\nwavelengths_nm = [690, 830]\nmua_per_cm = [0.1, 0.2]\n");
        assertEquals(2, series.phantoms().size());
        assertEquals(2, series.phantoms().get(1).targets().size());
        assertEquals(
                OptionalDouble.empty(),
                series.phantoms().get(1).targets().get(1).muspPerCm());
    }

    @Test
    void rowsArriveInTheirOrderWithTheirOwnTargets() {
        Series series = read(ROWS);
        assertEquals(
                List.of("pale", "dark", "arm"),
                series.phantoms().stream().map(series::ownName).toList());
        assertEquals(
                List.of(new Target(800, OptionalDouble.of(0.1), OptionalDouble.of(10), 0.002, 0.5, 1)),
                series.phantoms().get(0).targets());
        assertEquals(2, series.phantoms().get(1).targets().size());
        assertEquals(0.05, series.phantoms().get(2).targets().get(0).muaPerCm().getAsDouble(), 1e-12);
        assertEquals(Optional.of(new Titration(true, 5, 0.2)), series.titration());
    }

    @Test
    void aTargetBesideTheSetIsWantedOfEveryPhantom() {
        Series grid = read(GRID + "[[target]]\nwavelength_nm = 690\nmusp_per_cm = 12\nmusp_tolerance = 0.1\n");
        Target shared = new Target(690, OptionalDouble.empty(), OptionalDouble.of(12), 0, 0.1 * 12, 1);
        for (Brief b : grid.phantoms())
            assertEquals(
                    List.of(800.0, 690.0),
                    b.targets().stream().map(Target::wavelengthNm).toList());
        for (Brief b : grid.phantoms()) assertEquals(shared, b.targets().get(1));
        Series row = read(HEAD + "[series]\nwavelengths_nm = [690, 830]\nmua_per_cm = [0.1, 0.2]\n[[target]]\n"
                + "wavelength_nm = 830\nmusp_per_cm = 8\n");
        assertEquals(
                List.of(
                        new Target(690, OptionalDouble.of(0.2), OptionalDouble.empty(), 0.05 * 0.2, 0, 1),
                        new Target(830, OptionalDouble.of(0.2), OptionalDouble.of(8), 0.05 * 0.2, 0.05 * 8, 1)),
                row.phantoms().get(1).targets(),
                "one that only names the other quantity joins the phantom's own");
    }

    static Stream<Mistake> mistakes() {
        return Stream.of(
                of("▶" + HEAD, "no phantoms", "use the command design"),
                of(
                        "▶" + HEAD + "[[target]]\nwavelength_nm = 690\nmua_per_cm = 0.1\n",
                        "no phantoms",
                        "use the command design"),
                of(GRID + "▶[[target]]\nwavelength_nm = 690\n", "neither mua_per_cm nor musp_per_cm"),
                of(
                        GRID + "▶[[target]]\nwavelength_nm = 800\nmua_per_cm = 0.1\n",
                        "A1 has its own µa at 800 nm already"),
                of(
                        ROWS + "▶[[target]]\nwavelength_nm = 830\nmua_per_cm = 0.1\n",
                        "dark has its own µa at 830 nm already"),
                of(GRID + "▶[tissue]\nsaturation = 0.5\n", "write it as [phantom.tissue]"),
                of(GRID + "▶[[phantom]]\nname = \"x\"\n", "keep one of them"),
                of(GRID.replace("wavelengths_nm = [800]", "wavelengths_nm = [▶0.8]"), "100 or above"),
                of(GRID.replace("wavelengths_nm = [800]", "▶wavelengths_nm = []"), "at least one number"),
                of(GRID.replace("[5, 10", "[5, ▶-10"), "0 or above"),
                of(GRID.replace("[5, 10", "[5, ▶5, 10"), "5 stands twice"),
                of(
                        GRID.replace("mua_tolerance_per_cm = 0.01", "")
                                .replace("mua_per_cm = [0,", "▶mua_per_cm = [0,"),
                        "give mua_tolerance_per_cm"),
                of(GRID.replace("mua_tolerance_per_cm", "▶mua_tolerance"), "Perhaps mua_tolerance_per_cm"),
                of(HEAD + "▶[series]\nwavelengths_nm = [800]\n", "neither mua_per_cm nor musp_per_cm"),
                of(
                        HEAD + "▶[series]\nwavelengths_nm = [800]\nmua_per_cm = " + list(21) + "\nmusp_per_cm = "
                                + list(20),
                        "420 phantoms"),
                of(ROWS.replace("name = \"dark\"", "▶name = \"pale\""), "at line 6 already"),
                of(ROWS.replace("name = \"dark\"", "▶name = \"a/b\""), "cannot be used"),
                of(
                        ROWS.replace("name = \"dark\"\n", "")
                                .replaceFirst("mua_tolerance = 0.02\n\\[\\[", "mua_tolerance = 0.02\n▶[["),
                        "The key name in [phantom] is missing"),
                of(ROWS.replace("mua_tolerance = 0.02", "▶mua_tol = 0.02"), "Perhaps mua_tolerance is meant"),
                of(
                        ROWS.replace("name = \"dark\"", "name = \"dark\"\n▶mua_per_cm = 1"),
                        "The key mua_per_cm in [phantom] is not known"),
                of(ROWS.replace("aliquot_ml = 5", "▶aliquot_ml = -5"), "0 or above"),
                of(ROWS.replace("keep_musp", "▶keep_mua"), "Perhaps keep_musp is meant"),
                of(ROWS.replace("batch_ml = 100", "▶batch_ml = 0"), "above 0"));
    }

    @ParameterizedTest
    @MethodSource
    void mistakes(Mistake mistake) {
        Path file = folder.resolve("set.brief.toml");
        Marked.of(mistake.text).refusedAs(file, () -> SeriesReader.read(file, FLAT), mistake.words);
    }

    private record Mistake(String text, String[] words) {
        @Override
        public String toString() {
            return String.join(" … ", words);
        }
    }

    private static Mistake of(String text, String... words) {
        return new Mistake(text, words);
    }

    private static String list(int count) {
        StringBuilder out = new StringBuilder("[");
        for (int i = 1; i <= count; i++) out.append(i).append(", ");
        return out.append("]").toString();
    }
}
