package org.hazewright.mixture;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Map;
import java.util.Optional;
import org.hazewright.files.ShelfReader;
import org.hazewright.optics.ConstantIndex;
import org.hazewright.optics.Crowding;
import org.hazewright.optics.Index;
import org.hazewright.optics.SizeDistribution;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Material;
import org.hazewright.shelf.Part;
import org.hazewright.shelf.Scattering;
import org.hazewright.shelf.Shelf;
import org.hazewright.shelf.Source;
import org.hazewright.shelf.Uncertainty;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

/** What absorbs and scatters at once: carbon by Mie from its complex index and size, ink by a table of extinction and its albedo. */
class PigmentReferenceTest {
    private static final Shelf SHELF = ShelfReader.readShipped();
    private static final Source INVENTED = new Source(Source.Basis.INVENTED, "");

    private static Ingredient powder(Index index, SizeDistribution sizes, double densityGPerMl) {
        Material soot =
                new Material("soot", "soot", new ConstantIndex("soot", index.n(), index.k(), 300, 1300), INVENTED);
        return DemoIngredients.of(
                "pigment",
                Part.ABSORBER,
                densityGPerMl,
                new Uncertainty(0, 0),
                Optional.empty(),
                Optional.of(new Scattering.MieParticles(soot, 1, sizes, new Crowding.None(), 1)),
                Optional.empty());
    }

    /**
     * One strongly absorbing sphere of each size parameter, relative index 1.5 + i: Wiscombe, NCAR/TN-140 (1979), Q_ext, Q_sca and g to
     * six digits. A volume fraction φ of spheres of diameter D adds µ = φ · 3Q/(2D).
     */
    @ParameterizedTest
    @CsvSource({
        "0.055, 0.101491, 1.131687e-5, 0.000491",
        "1, 2.336321, 0.663454, 0.192136",
        "100, 2.097502, 1.283697, 0.850252",
    })
    void complexIndexAndSizeGiveBoth(double x, double qExt, double qSca, double g) {
        double host = 1.41;
        double nm = 600;
        double diameterNm = x * nm / (Math.PI * host);
        double density = 1.85;
        Ingredient pigment = powder(new Index(1.5 * host, host), new SizeDistribution.Single(diameterNm), density);
        MassSpecific k = MassSpecific.of(pigment, nm, 22, host, 0);
        double perCm = 1.5 / (diameterNm * 1e-7) / density;
        assertEquals((qExt - qSca) * perCm, k.kappaA(), 2e-6 * k.kappaA() + 1e-6 * perCm * qExt, "cm²/g absorbed");
        assertEquals(qSca * perCm, k.kappaMus(), 2e-6 * k.kappaMus(), "cm²/g scattered");
        assertEquals(qSca * (1 - g) * perCm, k.kappaMusp(), 2e-6 * k.kappaMusp() / (1 - g), "cm²/g scattered, reduced");
    }

    /**
     * Soot far smaller than the wavelength, of many sizes: µa/φ = 6π n_h/λ · Im β and µs'/φ = µs/φ = 4π⁴ n_h⁴/λ⁴ · |β|² ⟨D⁶⟩/⟨D³⟩ ·
     * with β = (m² − 1)/(m² + 2) (Bohren &amp; Huffman 1983, eqs. 5.8 and 5.11, over the mean volume); of a log-normal ⟨D⁶⟩/⟨D³⟩ =
     * median³ exp(13.5 ln² GSD) (Hatch &amp; Choate 1929). Index 1.57 + 0.53 i at 550 nm: Dalzell &amp; Sarofim, J. Heat Transfer 91, 100
     * (1969). The next terms are of order x², x below 0.03 for what counts.
     */
    @Test
    void smallGrainsGoByTheirVolumeAndItsSquare() {
        double nm = 550;
        double host = 1.41;
        double median = 2;
        double gsd = 1.3;
        double density = 1.85;
        double re = (1.57 * 1.57 - 0.53 * 0.53) / (host * host); // m²
        double im = 2 * 1.57 * 0.53 / (host * host);
        double below = (re + 2) * (re + 2) + im * im;
        double imBeta = (im * (re + 2) - im * (re - 1)) / below;
        double beta2 = ((re - 1) * (re - 1) + im * im) / below;
        double mua = 6 * Math.PI * host / (nm * 1e-7) * imBeta;
        double s = Math.log(gsd);
        double volume = Math.pow(median, 3) * Math.exp(13.5 * s * s);
        double musp = 4 * Math.pow(Math.PI * host / nm, 4) * beta2 * volume * 1e7;
        MassSpecific k = MassSpecific.of(
                powder(new Index(1.57, 0.53), new SizeDistribution.LogNormal(median, gsd), density), nm, 22, host, 0);
        assertEquals(mua / density, k.kappaA(), 3e-3 * k.kappaA());
        assertEquals(musp / density, k.kappaMus(), 3e-3 * k.kappaMus());
        assertEquals(k.kappaMus(), k.kappaMusp(), 3e-3 * k.kappaMus(), "forth as much as back");
    }

    /**
     * The shipped powder in air at 550 nm: published carbon absorbs 4–7.5 m²/g there (from small grains of the index of Dalzell &amp;
     * Sarofim 1969 to the recommendation of Bond &amp; Bergstrom, Aerosol Sci. Technol. 40, 27, 2006; from memory); fine carbon
     * scatters 10–30 % of what it takes (same review, from memory).
     */
    @Test
    void theShippedCarbonBlackIsAsBlackAsPublished() {
        MassSpecific k = MassSpecific.of(SHELF.require("carbon-black-powder"), 550, 22, 1.0, 0);
        double m2PerG = k.kappaA() * 1e-4;
        assertTrue(m2PerG > 4 && m2PerG < 7.5, m2PerG + " m²/g");
        double albedo = k.kappaMus() / (k.kappaA() + k.kappaMus());
        assertTrue(albedo > 0.1 && albedo < 0.3, "albedo " + albedo);
        assertTrue(k.kappaMusp() > 0 && k.kappaMusp() < k.kappaMus());
    }

    /**
     * One real bottle: extinction 6182.6 /cm at 780 nm and 7104.9 /cm at 692.5 nm, albedo 0.15 (Sudakou et al., Biomed. Opt. Express 14,
     * 3506, 2023, open data), its scattered share of g = 0.6 as the file says. 1 g in 10 L: µa 0.85, µs 0.15, µs' 0.06 of the extinction.
     */
    @ParameterizedTest
    @CsvSource({"692.5, 7104.9", "780, 6182.6"})
    void inkByTableScattersByItsAlbedo(double nm, double extinctionPerCm) {
        Ingredient ink = SHELF.require("ink-published-bottle");
        Mixture m = new Mixture(Map.of(ink, 1.0, SHELF.require("water"), 9980.0), 22);
        Coefficients.Share share = m.at(nm).shares().stream()
                .filter(s -> s.ingredient().equals(ink))
                .findFirst()
                .orElseThrow();
        double extinction = extinctionPerCm / m.volumeMl();
        assertEquals(0.85 * extinction, share.muaPerCm(), 1e-9);
        assertEquals(0.15 * extinction, share.musPerCm(), 1e-9);
        assertEquals(0.06 * extinction, share.muspPerCm(), 1e-9);
        assertEquals(share.muspPerCm(), m.at(nm).muspPerCm(), 1e-12, "water scatters nothing");
    }

    /** A lot of an ink has the extinction of its own table and scatters its own share of it. */
    @ParameterizedTest
    @ValueSource(strings = {"ink-demo", "ink-demo-lot-02"})
    void aLotOfInkCarriesItsAlbedo(String id) {
        Ingredient lot = SHELF.require(id);
        MassSpecific k = MassSpecific.of(lot, 700, 22, 1.33, 0);
        double extinction = lot.absorption().orElseThrow().table().at(700) / lot.densityGPerMl();
        assertEquals(extinction, k.kappaA() + k.kappaMus(), 1e-9 * extinction);
        assertEquals(0.15, k.kappaMus() / (k.kappaA() + k.kappaMus()), 1e-12, "both files say 0.15");
        assertEquals(0.4, k.kappaMusp() / k.kappaMus(), 1e-12, "both files say g = 0.6");
    }
}
