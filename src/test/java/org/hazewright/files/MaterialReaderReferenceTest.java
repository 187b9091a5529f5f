package org.hazewright.files;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.nio.file.Path;
import java.util.List;
import java.util.stream.Stream;
import org.hazewright.optics.Index;
import org.hazewright.optics.RefractiveIndex;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Material;
import org.hazewright.shelf.Source;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.Arguments;
import org.junit.jupiter.params.provider.MethodSource;

/**
 * Coefficients typed into a material file as their source prints them give the index that the source prints: nothing is lost
 * between a paper's units and the file's.
 */
class MaterialReaderReferenceTest {
    private static final String SOURCE = "\n[source]\nbasis = \"published\"\ncitation = \"See the test.\"\n";

    @TempDir
    Path folder;

    static Stream<Arguments> published() {
        return Stream.of(
                // Malitson, J. Opt. Soc. Am. 55, 1205 (1965): fused silica, table of computed n at 20 °C: 1.458464 at
                // 587.5618 nm,
                // 1.457018 at 632.8 nm (six digits printed; from memory)
                Arguments.of(SILICA, 587.5618, 1.458464, 1e-6),
                Arguments.of(SILICA, 632.8, 1.457018, 1e-6),
                // DeVore, J. Opt. Soc. Am. 41, 416 (1951): rutile, ordinary ray; the formula's value at 633 nm to
                // twelve digits by
                // an independent computation
                Arguments.of(RUTILE, 633, 2.583580138476, 1e-11),
                // Sultanova et al., Acta Phys. Pol. A 116, 585 (2009), one-term fit; n_D of polystyrene 1.590
                // (handbook), and the
                // formula's value at 633 nm by an independent computation
                Arguments.of(POLYSTYRENE, 633, 1.587513379555, 1e-11),
                Arguments.of(POLYSTYRENE, 589.3, 1.590, 2e-3),
                // Michels, Foschum & Kienle, Opt. Express 16, 5907 (2008): water, n = 1.311 + 1.154e4/λ² − 1.132e9/λ⁴,
                // λ in nm
                Arguments.of(MICHELS_WATER, 633, 1.332749701871, 1e-11),
                // IAPWS R9-97 (1997), table 3 at 0.1 MPa and 20 °C, 589 nm, as published to six digits (from memory)
                Arguments.of("form = \"iapws-water\"", 589, 1.333355, 2e-5));
    }

    private static final String SILICA = """
            form = "sellmeier"
            a = 1
            b = [0.6961663, 0.4079426, 0.8974794]
            c = [0.00467914826, 0.0135120631, 97.9340025]
            from_nm = 210
            to_nm = 3700
            """;
    private static final String RUTILE =
            "form = \"pole\"\na = 5.913\nb = [0.2441]\nc = [0.0803]\nfrom_nm = 430\nto_nm = 1530";
    private static final String POLYSTYRENE =
            "form = \"sellmeier\"\na = 1.0\nb = [1.4435]\nc = [0.020216]\nfrom_nm = 437\nto_nm = 1052";
    private static final String MICHELS_WATER =
            "form = \"cauchy\"\na = 1.311\nb = 1.154e4\nc = -1.132e9\nfrom_nm = 400\nto_nm = 900";

    @ParameterizedTest
    @MethodSource
    void published(String form, double nm, double n, double tolerance) {
        assertEquals(n, material(form).index().at(nm, 20).n(), tolerance);
    }

    @Test
    void aTableHasItsOwnRangeAndItsAbsorptionIndex() {
        SmallShelf.in(folder);
        Marked.write(folder.resolve("spectra/soot.csv"), "wavelength_nm,n,k\n400,1.5,0.5\n800,1.7,0.7\n");
        for (String form : List.of("table = \"spectra/soot.csv\"", "form = \"table\"\ntable = \"spectra/soot.csv\"")) {
            RefractiveIndex index = material(form).index();
            assertEquals(400, index.fromNm());
            assertEquals(800, index.toNm());
            assertEquals(new Index(1.6, 0.6), index.at(600, 20));
        }
    }

    /** Vegetable oil loses 0.0038 of its index when it is warmed by ten degrees (refractometry, common practice, from memory). */
    @Test
    void anIndexMovesWithTemperatureAsItsFileSays() {
        String oil = "form = \"constant\"\nn = 1.4735\nk = 0.001\nfrom_nm = 400\nto_nm = 900\n";
        RefractiveIndex warmed =
                material(oil + "dn_dt_per_c = -3.8e-4\nat_c = 20").index();
        assertEquals(1.4735, warmed.at(600, 20).n(), 1e-15);
        assertEquals(1.4697, warmed.at(600, 30).n(), 1e-12);
        assertEquals(0.001, warmed.at(600, 30).k());
        assertEquals(400, warmed.fromNm());
        assertEquals(900, warmed.toNm());
        assertEquals(1.4735, material(oil).index().at(600, 30).n(), 0, "without a coefficient it stays");
        assertThrows(Refusal.class, () -> material(oil + "dn_dt_per_c = -3.8e-4"));
        assertThrows(Refusal.class, () -> material(oil + "dn_dt_per_c = -3.8\nat_c = 20"));
        assertThrows(Refusal.class, () -> material("form = \"iapws-water\"\ndn_dt_per_c = -1e-4\nat_c = 20"));
    }

    @Test
    void aRangeThatAFileNarrowsIsKeptTo() {
        RefractiveIndex water =
                material("form = \"iapws-water\"\nfrom_nm = 400\nto_nm = 900").index();
        assertEquals(material("form = \"iapws-water\"").index().at(900, 22), water.at(900, 22));
        assertTrue(water.covers(400) && !water.covers(399));
        Refusal refusal = assertThrows(Refusal.class, () -> water.at(901, 22));
        assertTrue(
                refusal.getMessage().contains("not known at 901 nm: its file says 400 to 900 nm"),
                refusal.getMessage());
    }

    @Test
    void theNoteOfASourceStaysBehindItsCitation() {
        Material material =
                material("form = \"constant\"\nn = 1.5\nfrom_nm = 400\nto_nm = 900\n" + SOURCE + "note = \"Odd.\"");
        assertEquals(new Source(Source.Basis.PUBLISHED, "See the test. Odd."), material.source());
    }

    static Stream<Arguments> mistakes() {
        return Stream.of(
                of("form = \"constant\"\nfrom_nm = 400\nto_nm = 900", "key n is missing"),
                of("form = \"constant\"\n▶n = 0\nfrom_nm = 400\nto_nm = 900", "above 0"),
                of("form = \"constant\"\nn = 1.3\n▶k = -0.1\nfrom_nm = 400\nto_nm = 900", "between 0 and 1000"),
                of("form = \"constant\"\nn = 1.3\nto_nm = 900", "key from_nm is missing"),
                of("form = \"constant\"\nn = 1.3\n▶from_nm = 900\nto_nm = 400", "from 900 to 400 nm"),
                of("▶form = \"caushy\"\na = 1.3", "Perhaps \"cauchy\""),
                of("form = \"cauchy\"\n▶n = 1.3\nfrom_nm = 400\nto_nm = 900", "The key n is not known"),
                of("form = \"pole\"\na = 1\nb = [1, 2]\n▶c = [0.01]\nfrom_nm = 400\nto_nm = 900", "each b needs its c"),
                of("form = \"sellmeier\"\na = 1\nb = [1]\n▶c = [0.36]\nfrom_nm = 400\nto_nm = 900", "pole at 600 nm"),
                of(
                        "form = \"cauchy\"\n▶a = 1.3\nb = 1.2e9\nfrom_nm = 400\nto_nm = 900",
                        "check the coefficients' units"),
                of("form = \"iapws-water\"\n▶from_nm = 100", "between 200 and 1100"),
                of("▶table = \"spectra/none.csv\"", "There is no table"),
                of("name = \"X\"", "The key form is missing"));
    }

    @ParameterizedTest
    @MethodSource
    void mistakes(String form, String[] words) {
        SmallShelf.in(folder);
        Path file = folder.resolve("materials").resolve("x.toml");
        Marked marked = Marked.of("format = 1\nid = \"x\"\n" + form + SOURCE);
        if (marked.line() == 0) marked = new Marked(marked.text(), 1, 1);
        marked.refusedAs(file, () -> ShelfReader.read(folder), words);
    }

    private static Arguments of(String form, String... words) {
        return Arguments.of(form, words);
    }

    private Material material(String form) {
        SmallShelf.in(folder);
        Marked.write(
                folder.resolve("materials/x.toml"),
                "format = 1\nid = \"x\"\n" + form + (form.contains("[source]") ? "" : "\n" + SOURCE));
        return ShelfReader.read(folder).requireMaterial("x");
    }
}
