package org.hazewright.reading;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Random;
import org.hazewright.optics.Refusal;
import org.hazewright.optics.Spectrum;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class OximeterTest {
    /** 1/cm per mol/L of tetramer, base 10: widely used compilation of Gratzer and Kollias (unpublished), 690 to 850 nm. */
    private static final double[] NM = {690, 730, 760, 780, 800, 830, 850};

    private static final double[] OXY = {276, 390, 586, 710, 816, 974, 1058};
    private static final double[] DEOXY = {2052, 1102.2, 1548.5, 1075.4, 761.7, 693, 691.3};

    private static Oximeter oximeter(double base) {
        return new Oximeter(
                "Gratzer and Kollias", new Spectrum("oxy", NM, OXY), new Spectrum("deoxy", NM, DEOXY), nm -> base);
    }

    /**
     * The compilation prints, for whole blood of 150 g/L and 64500 g/mol, 2.303 · 150/64500 · ε: at 850 nm oxygenated
     * 1058 → 5.666 /cm.
     */
    @Test
    void absorptionOfWholeBlood() {
        double umol = 150 / 64500.0 * 1e6;
        assertEquals(5.666, oximeter(0).muaPerCm(850, umol, 1), 0.002);
    }

    @ParameterizedTest
    @CsvSource({"60, 0.7", "25, 0.98", "2300, 0.0", "70, 1.0"})
    void readsBackWhatWasMixed(double total, double saturation) {
        Oximeter o = oximeter(0.02);
        double[] mua = new double[NM.length];
        for (int i = 0; i < mua.length; i++) mua[i] = 0.02 + o.muaPerCm(NM[i], total, saturation);
        Oximeter.Answer all = o.read(NM, mua, new double[NM.length]);
        assertEquals(total, all.haemoglobinUmolPerL(), 1e-9 * total);
        assertEquals(saturation, all.saturation(), 1e-10);
        assertEquals(0, all.residualPerCm(), 1e-12);
        double[] two = {690, 830};
        Oximeter.Answer pair = o.read(two, new double[] {mua[0], mua[5]}, new double[2]);
        assertEquals(saturation, pair.saturation(), 1e-10);
    }

    /** By hand for two wavelengths: Cramer's rule on the table's figures. */
    @Test
    void twoWavelengthsByHand() {
        double a = 0.10;
        double b = 0.12;
        double k = Math.log(10) * 1e-6;
        double det = 276 * 693.0 - 2052 * 974.0;
        double oxy = (a * 693 - b * 2052) / det / k;
        double deoxy = (276 * b - 974 * a) / det / k;
        Oximeter.Answer r = oximeter(0).read(new double[] {690, 830}, new double[] {a, b}, new double[2]);
        assertEquals(oxy, r.oxyUmolPerL(), 1e-9);
        assertEquals(deoxy, r.deoxyUmolPerL(), 1e-9);
        assertEquals(oxy / (oxy + deoxy), r.saturation(), 1e-12);
    }

    /** The stated uncertainty is the scatter of 20000 repeated readings with that noise. */
    @Test
    void uncertaintyIsTheScatterOfRepeats() {
        Oximeter o = oximeter(0.02);
        double[] nm = {690, 760, 830};
        double[] mua = new double[3];
        double[] u = {0.002, 0.003, 0.002};
        for (int i = 0; i < 3; i++) mua[i] = 0.02 + o.muaPerCm(nm[i], 60, 0.7);
        Oximeter.Answer stated = o.read(nm, mua, u);
        Random random = new Random(1);
        int n = 20_000;
        double[] s = new double[2];
        double[] s2 = new double[2];
        for (int i = 0; i < n; i++) {
            double[] noisy = new double[3];
            for (int j = 0; j < 3; j++) noisy[j] = mua[j] + u[j] * random.nextGaussian();
            Oximeter.Answer r = o.read(nm, noisy, u);
            double[] x = {r.saturation(), r.haemoglobinUmolPerL()};
            for (int k = 0; k < 2; k++) {
                s[k] += x[k];
                s2[k] += x[k] * x[k];
            }
        }
        double saturation = Math.sqrt(s2[0] / n - s[0] / n * s[0] / n);
        double haemoglobin = Math.sqrt(s2[1] / n - s[1] / n * s[1] / n);
        assertEquals(saturation, stated.uSaturation(), 0.03 * saturation);
        assertEquals(haemoglobin, stated.uHaemoglobinUmolPerL(), 0.03 * haemoglobin);
    }

    @Test
    void saysWhenWavelengthsCannotTellThemApart() {
        Spectrum same = new Spectrum("same", new double[] {700, 900}, new double[] {500, 500});
        Oximeter blind = new Oximeter("a flat table", same, same, nm -> 0);
        Refusal r = assertThrows(
                Refusal.class, () -> blind.read(new double[] {750, 850}, new double[] {0.1, 0.1}, new double[2]));
        assertTrue(r.getMessage().contains("cannot tell"));
        assertThrows(Refusal.class, () -> oximeter(0).read(new double[] {690}, new double[] {0.1}, new double[1]));
        assertThrows(
                Refusal.class,
                () -> oximeter(0.1).read(new double[] {690, 830}, new double[] {0.1, 0.1}, new double[2]));
    }
}
