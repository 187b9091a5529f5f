package org.hazewright.optics;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

/**
 * Index forms against published values of the media whose coefficients they take.
 */
class RefractiveIndexReferenceTest {

    static final ResonanceIndex FUSED_SILICA = ResonanceIndex.sellmeier(
            "fused silica",
            1,
            new double[] {0.6961663, 0.4079426, 0.8974794},
            new double[] {0.0684043 * 0.0684043, 0.1162414 * 0.1162414, 9.896161 * 9.896161},
            210,
            6700);

    static final ResonanceIndex POLYSTYRENE =
            ResonanceIndex.sellmeier("polystyrene", 1, new double[] {1.4435}, new double[] {0.020216}, 436.8, 1052);

    static final ResonanceIndex RUTILE_O =
            ResonanceIndex.pole("rutile, ordinary", 5.913, new double[] {0.2441}, new double[] {0.0803}, 430, 1530);

    static final ResonanceIndex RUTILE_E = ResonanceIndex.pole(
            "rutile, extraordinary", 7.197, new double[] {0.3322}, new double[] {0.0843}, 430, 1530);

    /** Michels et al., Opt. Express 16, 5907, 2008. */
    static final CauchyIndex WATER_MICHELS = new CauchyIndex("water", 1.311, 1.154e4, -1.132e9, 350, 1100);

    static final CauchyIndex OIL_MICHELS = new CauchyIndex("soybean oil", 1.451, 1.154e4, -1.132e9, 350, 1100);

    private static final double ROOM = 20;

    /** IAPWS R9-97 (1997), the two computer-program verification values of its density–temperature form. */
    @Test
    void iapwsVerification() {
        assertEquals(1.39277824, IapwsWater.index(226.5, 25, 997.047435), 0.5e-8);
        assertEquals(1.00949307, IapwsWater.index(589.3, 500, 30.4758534), 0.5e-8);
    }

    /**
     * Kell, J. Chem. Eng. Data 20, 97, 1975: density of water, kg/m³. Values at 0, 4, 20, 25, 100 °C from his table 2 (from
     * memory), whose last digit is 1e-3 kg/m³ (1e-2 at 100 °C).
     */
    @ParameterizedTest
    @CsvSource({"0, 999.840, 1e-3", "4, 999.972, 1e-3", "20, 998.204, 1e-3", "25, 997.045, 1e-3", "100, 958.36, 1e-2"})
    void density(double temperatureC, double kgPerM3, double digit) {
        assertEquals(kgPerM3, IapwsWater.densityKgPerM3(temperatureC), digit);
    }

    /**
     * Water at 20.0 °C by another laboratory's measurement: Daimon & Masumura, Appl. Opt. 46, 3811, 2007, dispersion formula of
     * their sample at 20.0 °C. R9-97 states 1.5e-5 in the visible and a few 1e-5 more towards 1100 nm.
     */
    @ParameterizedTest
    @ValueSource(doubles = {400, 450, 500, 589.3, 632.8, 700, 800, 900, 1000, 1100})
    void waterMeasuredElsewhere(double nm) {
        ResonanceIndex measured = ResonanceIndex.sellmeier(
                "water",
                1,
                new double[] {0.5684027565, 0.1726177391, 0.02086189578, 0.1130748688},
                new double[] {0.005101829712, 0.01821153936, 0.02620722293, 10.69792721},
                182,
                1129);
        assertEquals(measured.at(nm, ROOM).n(), new IapwsWater().at(nm, ROOM).n(), nm < 750 ? 2e-5 : 1e-4);
    }

    /** Malitson, J. Opt. Soc. Am. 55, 1205, 1965, table I: measured fused silica at 20 °C, agreeing with his equation to 1.1e-5. */
    @ParameterizedTest
    @CsvSource({"486.1327, 1.463126", "587.5618, 1.458464", "656.2725, 1.456367", "1013.98, 1.450242"})
    void fusedSilica(double nm, double n) {
        assertEquals(n, FUSED_SILICA.at(nm, ROOM).n(), 1.1e-5);
    }

    /** DeVore, J. Opt. Soc. Am. 41, 416, 1951, by formula at 633 nm, evaluated apart from this program in 40-digit arithmetic. */
    @Test
    void rutile() {
        assertEquals(2.583580138476, RUTILE_O.at(633, ROOM).n(), 1e-12);
        assertEquals(2.871754392766, RUTILE_E.at(633, ROOM).n(), 1e-12);
    }

    /**
     * Polystyrene measured at discrete wavelengths, three decimals printed: Nikolov & Ivanov, Appl. Opt. 39, 2067, 2000. The one-term
     * form fitted to Sultanova, Kasarova & Nikolov, Acta Phys. Pol. A 116, 585, 2009, follows it to 1.5e-3.
     */
    @ParameterizedTest
    @CsvSource({
        "486, 1.606",
        "546, 1.596",
        "588, 1.592",
        "633, 1.587",
        "703, 1.582",
        "804, 1.578",
        "879, 1.576",
        "1052, 1.572"
    })
    void polystyrene(double nm, double n) {
        assertEquals(n, POLYSTYRENE.at(nm, ROOM).n(), 1.5e-3);
    }

    /** Formula values at 633 nm, evaluated apart from this program in 40-digit arithmetic. */
    @Test
    void formulasToTheLastDigit() {
        assertEquals(1.332749701871, WATER_MICHELS.at(633, ROOM).n(), 1e-12);
        assertEquals(1.472749701871, OIL_MICHELS.at(633, ROOM).n(), 1e-12);
        assertEquals(1.587513379555, POLYSTYRENE.at(633, ROOM).n(), 1e-12);
        assertEquals(1.457012124641, FUSED_SILICA.at(633, ROOM).n(), 1e-12);
    }

    @Test
    void nothingIsExtrapolated() {
        Refusal refusal = assertThrows(Refusal.class, () -> POLYSTYRENE.at(1100, ROOM));
        assertTrue(refusal.getMessage().contains("polystyrene"), refusal.getMessage());
        assertTrue(refusal.getMessage().contains("436.8 to 1052 nm"), refusal.getMessage());
        assertThrows(Refusal.class, () -> new IapwsWater().at(1101, ROOM));
        assertThrows(Refusal.class, () -> new IapwsWater().at(600, 101));
        assertThrows(Refusal.class, () -> new ConstantIndex("resin", 1.5, 0, 400, 700).at(Double.NaN, ROOM));
    }

    @Test
    void poleInsideTheRangeIsRefused() {
        Refusal refusal = assertThrows(
                Refusal.class,
                () -> ResonanceIndex.sellmeier("glass", 1, new double[] {1}, new double[] {0.25}, 400, 700));
        assertTrue(refusal.getMessage().contains("500 nm"), refusal.getMessage());
    }

    @Test
    void tableIsLinearAndCoversWhereBothAreGiven() {
        Spectrum n = new Spectrum("n", new double[] {400, 600, 800}, new double[] {1.6, 1.5, 1.4});
        Spectrum k = new Spectrum("k", new double[] {500, 700}, new double[] {0.2, 0.4});
        TableIndex table = new TableIndex("pigment", n, k);
        assertEquals(500, table.fromNm());
        assertEquals(700, table.toNm());
        assertEquals(1.525, table.at(550, ROOM).n(), 1e-15);
        assertEquals(0.25, table.at(550, ROOM).k(), 1e-15);
        assertThrows(Refusal.class, () -> table.at(450, ROOM));
        assertEquals(0, new TableIndex("pigment", n, null).at(450, ROOM).k());
    }

    /**
     * Lorentz–Lorenz mixing of water (n 1.3330) with glycerol (n 1.4735) at equal volumes, by hand: refractions 0.2056955 and
     * 0.2807829, mean 0.2432392, n = √((1 + 2R)/(1 − R)) = 1.401522.
     */
    @Test
    void lorentzLorenz() {
        assertEquals(1.401522, LorentzLorenz.mix(new double[] {0.5, 0.5}, new double[] {1.3330, 1.4735}), 1e-6);
        assertEquals(1.3330, LorentzLorenz.mix(new double[] {1, 0}, new double[] {1.3330, 1.4735}), 1e-15);
        assertThrows(Refusal.class, () -> LorentzLorenz.mix(new double[] {0.5, 0.4}, new double[] {1.3, 1.4}));
        assertThrows(Refusal.class, () -> LorentzLorenz.mix(new double[] {1}, new double[] {1.3, 1.4}));
    }
}
