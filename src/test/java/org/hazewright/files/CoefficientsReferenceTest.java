package org.hazewright.files;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertInstanceOf;

import java.nio.file.Path;
import org.hazewright.optics.Crowding;
import org.hazewright.optics.SizeDistribution;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Scattering;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** Each column's unit becomes cm²/g as a published pair of figures, or plain arithmetic, says it must. */
class CoefficientsReferenceTest {
    private static final String HEAD = """
            format = 1
            id = "x"
            name = "X"
            part = "absorber"
            families = ["liquid"]
            form = "liquid"
            density_g_per_ml = 1.06

            [source]
            basis = "memory"

            [uncertainty]
            absorption = 0.03
            scattering = 0.03

            """;

    @TempDir
    Path folder;

    @BeforeEach
    void smallShelf() {
        SmallShelf.in(folder);
        // Compilation of Gratzer's and Kollias' haemoglobin data, oxyhaemoglobin at 350 nm: ε = 106576 per cm per mol/L
        // (base 10,
        // tetramer of 64500 g/mol), printed beside µa = 570.8012 per cm of blood with 150 g/L, for which it takes ln 10
        // as 2.303
        Marked.write(
                folder.resolve("spectra/hbo2.csv"), "wavelength_nm,epsilon10_l_per_mol_cm\n350,106576\n352,104040\n");
    }

    @Test
    void bloodOf150GramsALitreAbsorbsAsTheCompilationSays() {
        double molPerL = 150 / 64500.0;
        Ingredient blood = read(
                "[absorption]\ntable = \"spectra/hbo2.csv\"\nmolar_mass_g_per_mol = 64500\nmol_per_l = " + molPerL);
        double muaOfTheNeatLiquid = blood.absorption().get().kappaCm2PerG(350) * 1.06;
        assertEquals(570.8012 * Math.log(10) / 2.303, muaOfTheNeatLiquid, 1e-3);
    }

    @Test
    void thePureSubstanceDissolvedToTheSameContentAbsorbsTheSame() {
        Ingredient powder = read("[absorption]\ntable = \"spectra/hbo2.csv\"\nmolar_mass_g_per_mol = 64500");
        assertEquals(570.8012 * Math.log(10) / 2.303, powder.absorption().get().kappaCm2PerG(350) * 0.150, 1e-3);
    }

    @Test
    void aTableByMassIsTakenAsItIs() {
        Marked.write(folder.resolve("spectra/t.csv"), "wavelength_nm,mua_cm2_per_g\n400,50000\n500,40000\n");
        assertEquals(
                45000,
                read("[absorption]\ntable = \"spectra/t.csv\"")
                        .absorption()
                        .get()
                        .kappaCm2PerG(450),
                1e-9);
    }

    @Test
    void tablesOfScatteringByVolumeAndByMass() {
        Marked.write(folder.resolve("spectra/v.csv"), "wavelength_nm,musp_per_cm,g\n400,300,0.5\n800,200,0.7\n");
        Marked.write(folder.resolve("spectra/m.csv"), "wavelength_nm,musp_cm2_per_g\n400,30\n800,20\n");
        Scattering.Tabulated volume = assertInstanceOf(
                Scattering.Tabulated.class,
                read("[scattering]\nmodel = \"table\"\ntable = \"spectra/v.csv\"")
                        .scattering()
                        .get());
        assertEquals(250 / 1.06, volume.muspCm2PerG(600), 1e-9);
        assertEquals(0.6, volume.gAt(600), 1e-12);
        Scattering.Tabulated mass = assertInstanceOf(
                Scattering.Tabulated.class,
                read("[scattering]\nmodel = \"table\"\ntable = \"spectra/m.csv\"\nmagnitude = 1.1")
                        .scattering()
                        .get());
        assertEquals(1.1 * 25, mass.muspCm2PerG(600), 1e-9);
        assertEquals(0, mass.gAt(600));
    }

    @Test
    void aPowerLawHoldsInItsOwnRange() {
        Scattering law =
                read("[scattering]\nmodel = \"power\"\nmusp_cm2_per_g = 24.0\nat_nm = 800\nexponent = 1.2\ng = 0.7\n"
                                + "from_nm = 500\nto_nm = 900")
                        .scattering()
                        .get();
        assertEquals(new Scattering.PowerLaw(24, 800, 1.2, 0.7, 500, 900, 1), law);
    }

    @Test
    void aHistogramFromListsAndFromATableIsTheSame() {
        String mie =
                "[scattering]\nmodel = \"mie\"\nparticle = \"oil\"\nparticle_volume_fraction = 0.1\ncrowding = \"polynomial\"\n"
                        + "crowding_coefficients = [-1.5, 0.4]\ncrowding_max_volume_fraction = 0.05\n[scattering.size]\nkind = \"histogram\"\n";
        Marked.write(folder.resolve("spectra/sizes.csv"), "from_nm,to_nm,weight\n100,200,1\n200,300,3\n300,500,0\n");
        Scattering.MieParticles lists = assertInstanceOf(
                Scattering.MieParticles.class,
                read(mie + "edges_nm = [100, 200, 300, 500]\nweights = [1, 3, 0]")
                        .scattering()
                        .get());
        Scattering.MieParticles table = assertInstanceOf(
                Scattering.MieParticles.class,
                read(mie + "table = \"spectra/sizes.csv\"").scattering().get());
        assertEquals(lists.sizes(), table.sizes());
        assertArrayEquals(new double[] {0.25, 0.75, 0}, ((SizeDistribution.Histogram) lists.sizes()).weights());
        assertEquals(new Crowding.Polynomial(new double[] {-1.5, 0.4}, 0.05), lists.crowding());
    }

    @Test
    void mistakesInTablesAreShownByLine() {
        sizes("from_nm,to_nm,weight\n100,200,1\n▶210,300,3\n", "bins must touch");
        sizes("from_nm,to_nm,weight\n100,200,1\n▶200,200,3\n", "to_nm must be above from_nm");
        sizes("from_nm,to_nm,weight\n100,200,1\n▶200,300,-3\n", "weight is -3");
        sizes("▶from_nm,to_nm,weight\n100,200,0\n", "All weights of the size bins are 0");
        Path table = folder.resolve("spectra").resolve("t.csv");
        Marked.of("▶wavelength_nm,mua_per_mm\n400,1\n500,2\n")
                .refusedAs(table, () -> read("[absorption]\ntable = \"spectra/t.csv\""), "Perhaps mua_per_cm is meant");
        Marked.of("▶wavelength_nm,mua_per_cm,mua_cm2_per_g\n400,1,1\n500,2,2\n")
                .refusedAs(table, () -> read("[absorption]\ntable = \"spectra/t.csv\""), "exactly one");
        Marked.of("wavelength_nm,mua_per_cm\n400,1\n▶500,-2\n")
                .refusedAs(table, () -> read("[absorption]\ntable = \"spectra/t.csv\""), "0 or above");
    }

    @Test
    void aMolarTableNeedsItsMolarMassAndAPossibleContent() {
        Path file = folder.resolve("x.toml");
        Marked.of(HEAD + "▶[absorption]\ntable = \"spectra/hbo2.csv\"\nmol_per_l = 0.002")
                .refusedAs(file, () -> ShelfReader.read(folder), "molar_mass_g_per_mol in [absorption] is missing");
        Marked.of(HEAD + "[absorption]\ntable = \"spectra/hbo2.csv\"\nmolar_mass_g_per_mol = 64500\n▶mol_per_l = 2.3")
                .refusedAs(file, () -> ShelfReader.read(folder), "it can be at most 1");
    }

    private void sizes(String text, String words) {
        Path file = folder.resolve("sizes.csv");
        Marked.of(text).refusedAs(file, () -> SizeTable.read(file), words);
    }

    private Ingredient read(String tables) {
        Marked.write(folder.resolve("x.toml"), HEAD + tables + "\n");
        return ShelfReader.read(folder).require("x");
    }
}
