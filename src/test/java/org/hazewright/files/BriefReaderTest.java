package org.hazewright.files;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.function.Supplier;
import java.util.stream.Stream;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Brief;
import org.hazewright.brief.Mould;
import org.hazewright.brief.SearchLimits;
import org.hazewright.brief.Target;
import org.hazewright.brief.Tissue;
import org.hazewright.optics.Spectrum;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

class BriefReaderTest {
    private static final Supplier<Tissue.Spectra> NONE = () -> {
        throw new AssertionError("Spectra are asked for only by a [tissue].");
    };

    @TempDir
    Path folder;

    private static final String SHORT = """
            format = 1
            base = "water"
            batch_ml = 250

            [[target]]
            wavelength_nm = 690
            mua_per_cm = 0.1
            musp_per_cm = 9.0
            """;

    private Brief read(String text) {
        return BriefReader.read(Marked.write(folder.resolve("block.brief.toml"), text), NONE);
    }

    @Test
    void whatIsLeftOutIsAsPromised() {
        Brief brief = read(SHORT);
        assertEquals("block", brief.name());
        assertEquals("block", brief.title());
        assertEquals(List.of("water"), brief.bases());
        assertEquals(250, brief.volumeMl());
        assertEquals(22, brief.temperatureC());
        assertEquals(Balance.USUAL, brief.balance());
        assertEquals(new SearchLimits(List.of(), List.of(), 2, 1, 0, 0), brief.limits());
        assertEquals(Optional.empty(), brief.tissue());
        assertEquals(
                List.of(new Target(690, OptionalDouble.of(0.1), OptionalDouble.of(9), 0.05 * 0.1, 0.05 * 9, 1)),
                brief.targets());
        assertEquals(64, brief.sha256().get().length());
    }

    @Test
    void everyKeyArrives() {
        Brief brief = read("""
                format = 1
                title = "Forearm block"
                base = ["gelatin-10", "agar-1"]
                overage = 0.05
                temperature_c = 25
                [[mould]]
                shape = "box"
                length_mm = 100
                width_mm = 50
                height_mm = 20
                count = 2
                [[mould]]
                shape = "cylinder"
                diameter_mm = 20
                height_mm = 10
                [tolerance]
                mua = 0.1
                musp = 0.2
                [[target]]
                wavelength_nm = 830
                musp_per_cm = 8
                musp_tolerance_per_cm = 0.3
                weight = 2
                [[target]]
                wavelength_nm = 690
                mua_per_cm = 0.2
                mua_tolerance = 0.03
                [[target]]
                wavelength_nm = 760
                mua_per_cm = 0
                mua_tolerance_per_cm = 0.01
                musp_per_cm = 10
                [shelf]
                use = ["ink"]
                avoid = ["salt"]
                max_absorbers = 3
                max_scatterers = 2
                max_modifiers = 0
                least_base_share = 0.7
                [balance]
                readability_g = 0.01
                standard_uncertainty_g = 0.02
                smallest_load_g = 0.1
                capacity_g = 2000
                """);
        assertEquals("Forearm block", brief.title());
        assertEquals(List.of("gelatin-10", "agar-1"), brief.bases());
        assertEquals(List.of(new Mould(Mould.Shape.BOX, 100, 50, 20, 2), Mould.cylinder(20, 10, 1)), brief.moulds());
        assertEquals(200 + Math.PI, brief.batchMl(), 1e-9);
        assertEquals(0.05, brief.overage());
        assertEquals(25, brief.temperatureC());
        assertEquals(
                List.of(
                        new Target(690, OptionalDouble.of(0.2), OptionalDouble.empty(), 0.03 * 0.2, 0, 1),
                        new Target(760, OptionalDouble.of(0), OptionalDouble.of(10), 0.01, 2, 1),
                        new Target(830, OptionalDouble.empty(), OptionalDouble.of(8), 0, 0.3, 2)),
                brief.targets());
        assertEquals(new SearchLimits(List.of("ink"), List.of("salt"), 3, 2, 0, 0.7), brief.limits());
        assertEquals(new Balance(0.01, 0.02, 0.1, 2000), brief.balance());
    }

    @Test
    void aBalanceKnownOnlyByItsReadabilityIsTakenToBeThatUncertain() {
        Balance balance = read(SHORT + "[balance]\nreadability_g = 0.01\n").balance();
        assertEquals(0.01, balance.standardUncertaintyG());
        assertEquals(Balance.USUAL.capacityG(), balance.capacityG());
    }

    private static final String TISSUE = """
            format = 1
            base = "gelatin-10"
            batch_ml = 250
            [tissue]
            wavelengths_nm = [690, 760, 830]
            haemoglobin_umol_per_l = 60
            saturation = 0.70
            water_fraction = 0.60
            fat_fraction = 0.20
            musp_per_cm_at_500nm = 15.0
            scatter_power = 1.1
            """;

    /** Flat spectra, so that the composition's absorption is one sum that can be done by hand. */
    private static final Supplier<Tissue.Spectra> FLAT =
            () -> new Tissue.Spectra(flat("oxy", 1000), flat("deoxy", 2000), flat("water", 0.02), flat("fat", 0.1));

    private static Spectrum flat(String name, double value) {
        return new Spectrum(name, new double[] {650, 900}, new double[] {value, value});
    }

    @Test
    void aTissueMakesTargetsAndOwnTargetsTakeTheirPlaceQuantityByQuantity() {
        Path file = Marked.write(folder.resolve("arm.brief.toml"), TISSUE + """
                [[target]]
                wavelength_nm = 760
                mua_per_cm = 0.3
                mua_tolerance = 0.01
                weight = 3
                [[target]]
                wavelength_nm = 800
                musp_per_cm = 7
                """);
        Brief brief = BriefReader.read(file, FLAT);
        // ln 10 · 60e-6 mol/L · (0.7 · 1000 + 0.3 · 2000) + 0.6 · 0.02 + 0.2 · 0.1, and 15 (λ/500)^−1.1
        double mua = Math.log(10) * 60e-6 * 1300 + 0.012 + 0.02;
        assertEquals(4, brief.targets().size());
        Target first = brief.targets().get(0);
        assertEquals(690, first.wavelengthNm());
        assertEquals(mua, first.muaPerCm().getAsDouble(), 1e-12);
        assertEquals(0.05 * mua, first.muaTolerancePerCm(), 1e-12);
        assertEquals(15 * Math.pow(690 / 500.0, -1.1), first.muspPerCm().getAsDouble(), 1e-12);
        Target own = brief.targets().get(1);
        assertEquals(0.3, own.muaPerCm().getAsDouble());
        assertEquals(0.003, own.muaTolerancePerCm(), 1e-15);
        assertEquals(3, own.weight());
        assertEquals(15 * Math.pow(760 / 500.0, -1.1), own.muspPerCm().getAsDouble(), 1e-12);
        assertEquals(OptionalDouble.empty(), brief.targets().get(2).muaPerCm());
        assertTrue(brief.tissue().isPresent());
    }

    @Test
    void theSpectraOfTheProgramGiveATissueItsTargets() {
        Path file = Marked.write(
                folder.resolve("arm.brief.toml"),
                TISSUE.replace("0.60", "1")
                        .replace("0.20", "0")
                        .replace("haemoglobin_umol_per_l = 60", "haemoglobin_umol_per_l = 0"));
        Brief brief = BriefReader.read(file, TissueSpectra.of(null));
        // Water alone, Kou et al., Appl. Opt. 32, 3531 (1993): 0.0288 per cm at 760 nm within 5 % (from memory)
        assertEquals(0.0288, brief.targets().get(1).muaPerCm().getAsDouble(), 0.05 * 0.0288);
        Path blood = Marked.write(
                folder.resolve("blood.brief.toml"),
                TISSUE.replace("water_fraction = 0.60", "water_fraction = 0")
                        .replace("fat_fraction = 0.20", "fat_fraction = 0")
                        .replace("0.70", "1")
                        .replace("760, ", ""));
        // Gratzer's and Kollias' compilation: oxyhaemoglobin 276 per cm per mol/L at 690 nm, 974 at 830 nm, base 10,
        // tetramer
        List<Target> targets = BriefReader.read(blood, TissueSpectra.of(null)).targets();
        assertEquals(Math.log(10) * 60e-6 * 276, targets.get(0).muaPerCm().getAsDouble(), 1e-9);
        assertEquals(Math.log(10) * 60e-6 * 974, targets.get(1).muaPerCm().getAsDouble(), 1e-9);
    }

    static Stream<Mistake> mistakes() {
        return Stream.of(
                of(SHORT, "batch_ml", "▶batch_m", "Perhaps batch_ml is meant"),
                of(SHORT, "batch_ml = 250", "▶batch_ml = 0", "above 0"),
                of(
                        SHORT,
                        "format = 1\nbase = \"water\"\nbatch_ml = 250",
                        "▶format = 1\nbase = \"water\"",
                        "how much to make"),
                of(
                        SHORT,
                        "batch_ml = 250",
                        "▶batch_ml = 250\n[[mould]]\nshape = \"box\"\nlength_mm = 1\nwidth_mm = 1\nheight_mm = 1",
                        "keep one"),
                of(SHORT, "batch_ml = 250", "[[mould]]\n▶shape = \"ball\"", "box, cylinder"),
                of(
                        SHORT,
                        "batch_ml = 250",
                        "[[mould]]\nshape = \"cylinder\"\n▶length_mm = 20\nheight_mm = 1",
                        "The key length_mm"),
                of(
                        SHORT,
                        "batch_ml = 250",
                        "[[mould]]\nshape = \"box\"\n▶length_mm = -2\nwidth_mm = 1\nheight_mm = 1",
                        "above 0"),
                of(
                        SHORT,
                        "batch_ml = 250",
                        "[[mould]]\nshape = \"cylinder\"\ndiameter_mm = 2\nheight_mm = 1\n▶count = 0.5",
                        "whole number"),
                of(SHORT, "base = \"water\"", "▶base = []", "at least one entry"),
                of(SHORT, "base = \"water\"", "base = [▶3]", "holds 3"),
                of(SHORT, "batch_ml = 250", "batch_ml = 250\n▶overage = 5", "between 0 and 2"),
                of(SHORT, "batch_ml = 250", "batch_ml = 250\n▶temperature_c = 295", "between 0 and 100"),
                of(
                        SHORT,
                        "[[target]]\nwavelength_nm = 690\nmua_per_cm = 0.1\nmusp_per_cm = 9.0",
                        "",
                        "no targets",
                        "[[target]]",
                        "[tissue]"),
                of(SHORT, "mua_per_cm = 0.1\nmusp_per_cm = 9.0", "", "wants neither mua_per_cm nor musp_per_cm")
                        .at(5, 1),
                of(SHORT, "mua_per_cm = 0.1", "▶mua_per_cm = -0.1", "0 or above"),
                of(SHORT, "mua_per_cm = 0.1", "▶mua_per_cm = inf", "finite"),
                of(SHORT, "mua_per_cm = 0.1", "▶mua_per_cm = 0", "give mua_tolerance_per_cm"),
                of(SHORT, "musp_per_cm = 9.0", "▶musp_per_cm = 0", "give musp_tolerance_per_cm"),
                of(SHORT, "mua_per_cm = 0.1", "mua_per_cm = 0.1\n▶mua_tolerance = 5", "a share: 0.05 is 5 %"),
                of(
                        SHORT,
                        "mua_per_cm = 0.1",
                        "mua_per_cm = 0.1\nmua_tolerance = 0.1\n▶mua_tolerance_per_cm = 0.1",
                        "keep one"),
                of(SHORT, "mua_per_cm = 0.1", "▶mua_tolerance = 0.1", "without mua_per_cm"),
                of(SHORT, "mua_per_cm = 0.1", "mua_per_cm = 0.1\n▶weight = 0", "above 0"),
                of(
                        SHORT,
                        "mua_per_cm = 0.1",
                        "▶mua_per_mm = 0.1",
                        "Perhaps mua_per_cm is meant: 10 times the number per mm"),
                of(SHORT, "wavelength_nm = 690", "▶wavelength_nm = 0.69", "between 100 and 20000"),
                of(
                                SHORT,
                                "[[target]]",
                                "[[target]]\nwavelength_nm = 690\nmua_per_cm = 1\n[[target]]",
                                "A target at 690 nm stands at line 6 already")
                        .at(9, 1),
                of(SHORT, "[[target]]", "[tolerance]\n▶mua = 0\n[[target]]", "above 0"),
                of(SHORT, "[[target]]", "[tolerance]\n▶muspp = 0.1\n[[target]]", "Perhaps musp is meant"),
                of(SHORT, "[[target]]", "[shelf]\n▶max_absorbers = 9\n[[target]]", "whole number between 0 and 8"),
                of(
                        SHORT,
                        "[[target]]",
                        "[shelf]\nuse = [\"a\"]\navoid = [\"b\", ▶\"a\"]\n[[target]]",
                        "in use and in avoid"),
                of(SHORT, "[[target]]", "▶[balance]\ncapacity_g = 0.001\n[[target]]", "not above its smallest load"),
                of(
                        SHORT,
                        "[[target]]",
                        "[balance]\n▶readability_mg = 1\n[[target]]",
                        "Perhaps readability_g is meant: a thousandth"),
                of(SHORT, "[[target]]", "▶[[phantom]]\nname = \"A\"\n[[target]]", "use the command series"),
                of(TISSUE, "[690, 760, 830]", "[690, ▶690]", "stands twice"),
                of(TISSUE, "[690, 760, 830]", "[690, ▶0.8]", "between 100 and 20000"),
                of(
                        TISSUE,
                        "[tissue]\nwavelengths_nm = [690, 760, 830]",
                        "▶[tissue]\nwavelengths_nm = []",
                        "no wavelengths_nm"),
                of(TISSUE, "wavelengths_nm = [690, 760, 830]", "▶wavelengths_nm = [690, 950]", "no value at 950 nm"),
                of(TISSUE, "saturation = 0.70", "▶saturation = 70", "between 0 and 1"),
                of(TISSUE, "[tissue]", "▶[tissue]", "sum to").with("water_fraction = 0.60", "water_fraction = 0.90"),
                of(
                        TISSUE,
                        "musp_per_cm_at_500nm = 15.0\nscatter_power",
                        "▶scatter_power",
                        "without musp_per_cm_at_500nm"),
                of(TISSUE, "\nscatter_power = 1.1", "", "scatter_power in [tissue] is missing")
                        .at(4, 1),
                of(TISSUE, "[tissue]", "▶[tissue]", "absorbs nothing at 690 nm")
                        .with("haemoglobin_umol_per_l = 60", "haemoglobin_umol_per_l = 0")
                        .with("water_fraction = 0.60\nfat_fraction = 0.20", ""),
                of(
                        TISSUE,
                        "haemoglobin_umol_per_l",
                        "▶hemoglobin_umol_per_l",
                        "Perhaps haemoglobin_umol_per_l is meant"));
    }

    @ParameterizedTest
    @MethodSource
    void mistakes(Mistake mistake) {
        Path file = folder.resolve("block.brief.toml");
        mistake.marked().refusedAs(file, () -> BriefReader.read(file, FLAT), mistake.words);
    }

    @Test
    void aMissingBriefIsRefused() {
        Path file = folder.resolve("none.brief.toml");
        assertThrows(FileRefusal.class, () -> BriefReader.read(file, NONE));
    }

    /** A brief changed in one place. */
    record Mistake(String text, int line, int column, String[] words) {
        Marked marked() {
            Marked marked = Marked.of(text);
            return marked.line() > 0 ? marked : new Marked(text, line, column);
        }

        Mistake at(int otherLine, int otherColumn) {
            return new Mistake(text, otherLine, otherColumn, words);
        }

        Mistake with(String piece, String instead) {
            if (!text.contains(piece)) throw new IllegalArgumentException(piece);
            return new Mistake(text.replace(piece, instead), line, column, words);
        }

        @Override
        public String toString() {
            return String.join(" … ", words);
        }
    }

    private static Mistake of(String whole, String piece, String instead, String... words) {
        int at = whole.indexOf(piece);
        if (at < 0) throw new IllegalArgumentException("The brief has no " + piece);
        return new Mistake(whole.substring(0, at) + instead + whole.substring(at + piece.length()), 1, 1, words);
    }
}
