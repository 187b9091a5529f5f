package org.hazewright.optics;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import org.junit.jupiter.api.Test;

/** Values that check themselves: size distributions, crowding, indices and tables at their limits, and numbers as people read them. */
class SmallValuesTest {
    private static String refused(Runnable r) {
        return assertThrows(Refusal.class, r::run).getMessage();
    }

    @Test
    void meanCubes() {
        assertEquals(8e6, new SizeDistribution.Single(200).meanCubedDiameterNm3(), 1e-3);
        // Hatch & Choate: median³ exp(4.5 ln² GSD).
        double s = Math.log(1.6);
        assertEquals(
                8e6 * Math.exp(4.5 * s * s), new SizeDistribution.LogNormal(200, 1.6).meanCubedDiameterNm3(), 1e-3);
        // Evenly from 0 to 2: ∫D³dD/2 = 2; from 2 to 4: (256 − 16)/4/2 = 30; three to one: (3·2 + 30)/4.
        assertEquals(
                9,
                new SizeDistribution.Histogram(new double[] {0, 2, 4}, new double[] {3, 1}).meanCubedDiameterNm3(),
                1e-12);
    }

    @Test
    void sizeTables() {
        SizeDistribution.Histogram h = new SizeDistribution.Histogram(new double[] {0, 2, 4}, new double[] {3, 1});
        assertArrayEquals(new double[] {0.75, 0.25}, h.weights(), 1e-15);
        assertArrayEquals(new double[] {0, 2, 4}, h.edgesNm());
        h.weights()[0] = 7;
        h.edgesNm()[0] = 7;
        assertArrayEquals(new double[] {0.75, 0.25}, h.weights(), 1e-15);
        SizeDistribution.Histogram same = new SizeDistribution.Histogram(new double[] {0, 2, 4}, new double[] {6, 2});
        assertEquals(h, same);
        assertEquals(h.hashCode(), same.hashCode());
        assertNotEquals(h, new SizeDistribution.Histogram(new double[] {0, 2, 5}, new double[] {3, 1}));
        assertNotEquals(h, new SizeDistribution.Histogram(new double[] {0, 2, 4}, new double[] {1, 3}));
        assertNotEquals(h, new SizeDistribution.Single(2));
        assertTrue(h.toString().contains("0.75"));
        assertTrue(refused(() -> new SizeDistribution.Histogram(new double[] {1}, new double[] {}))
                .contains("one bin"));
        assertTrue(refused(() -> new SizeDistribution.Histogram(new double[] {1, 2}, new double[] {1, 1}))
                .contains("2 edges and 2 weights"));
        assertTrue(refused(() -> new SizeDistribution.Histogram(new double[] {1, 2}, new double[] {0}))
                .contains("All weights"));
        refused(() -> new SizeDistribution.Histogram(new double[] {1, 2}, new double[] {-1}));
        assertTrue(refused(() -> new SizeDistribution.Histogram(new double[] {2, 2}, new double[] {1}))
                .contains("ascend"));
        refused(() -> new SizeDistribution.Histogram(new double[] {-1, 2}, new double[] {1}));
        refused(() -> new SizeDistribution.Single(0));
        refused(() -> new SizeDistribution.LogNormal(-1, 1.5));
        refused(() -> new SizeDistribution.LogNormal(100, 1));
        refused(() -> new SizeDistribution.LogNormal(100, 4.01));
        new SizeDistribution.LogNormal(100, 4);
    }

    /** 1 − 2φ + 3φ² at 0.1 is 0.83. */
    @Test
    void crowdingPolynomials() {
        Crowding.Polynomial p = new Crowding.Polynomial(new double[] {-2, 3}, 0.4);
        assertEquals(0.83, p.factor(0.1), 1e-15);
        assertEquals(1, p.factor(0));
        assertEquals(1 - 0.8 + 0.48, p.factor(0.4), 1e-15);
        assertTrue(refused(() -> p.factor(0.41)).contains("0.4"));
        refused(() -> p.factor(-0.1));
        assertArrayEquals(new double[] {-2, 3}, p.coefficients());
        p.coefficients()[0] = 9;
        assertEquals(0.83, p.factor(0.1), 1e-15);
        assertEquals(0.4, p.maxVolumeFraction());
        Crowding.Polynomial same = new Crowding.Polynomial(new double[] {-2, 3}, 0.4);
        assertEquals(p, same);
        assertEquals(p.hashCode(), same.hashCode());
        assertNotEquals(p.hashCode(), new Crowding.Polynomial(new double[] {-2, 3.1}, 0.4).hashCode());
        assertNotEquals(p, new Crowding.Polynomial(new double[] {-2, 3}, 0.3));
        assertNotEquals(p, new Crowding.Polynomial(new double[] {-2}, 0.4));
        assertNotEquals(p, new Crowding.None());
        assertTrue(p.toString().contains("0.4"));
        assertTrue(
                refused(() -> new Crowding.Polynomial(new double[] {-3}, 0.4)).contains("stay above 0"));
        refused(() -> new Crowding.Polynomial(new double[] {Double.NaN}, 0.4));
        refused(() -> new Crowding.Polynomial(new double[] {-1}, 0));
        refused(() -> new Crowding.Polynomial(new double[] {-0.1}, 1.1));
        new Crowding.Polynomial(new double[] {-0.1}, 1);
    }

    @Test
    void indices() {
        // 4π 0.001/628.3 nm = 2e-5 per nm, 200 per cm (π to four digits).
        assertEquals(200.0, new Index(1.5, 0.001).muaPerCm(628.3185307), 1e-6);
        assertEquals(new Index(1.5, 0), Index.real(1.5));
        refused(() -> new Index(0, 0));
        refused(() -> new Index(1.5, -1e-9));
        double[] b = {1};
        double[] c = {0.01};
        for (List<RefractiveIndex> three : List.of(
                List.<RefractiveIndex>of(
                        ResonanceIndex.pole("a", 2, b, c, 300, 900),
                        ResonanceIndex.pole("a", 2, b, c, 300, 900),
                        ResonanceIndex.pole("a", 2.1, b, c, 300, 900),
                        ResonanceIndex.pole("a", 2, new double[] {1.1}, c, 300, 900),
                        ResonanceIndex.pole("a", 2, b, new double[] {0.02}, 300, 900),
                        ResonanceIndex.pole("b", 2, b, c, 300, 900),
                        new ConstantIndex("a", 1.5, 0, 300, 900)),
                List.<RefractiveIndex>of(
                        ResonanceIndex.sellmeier("a", 2, b, c, 300, 900),
                        ResonanceIndex.sellmeier("a", 2, b, c, 300, 900),
                        ResonanceIndex.sellmeier("a", 2.1, b, c, 300, 900),
                        ResonanceIndex.sellmeier("a", 2, new double[] {1.1}, c, 300, 900),
                        ResonanceIndex.sellmeier("a", 2, b, new double[] {0.02}, 300, 900),
                        ResonanceIndex.sellmeier("b", 2, b, c, 300, 900),
                        new ConstantIndex("a", 1.5, 0, 300, 900)))) {
            assertEquals(three.get(0), three.get(1));
            assertEquals(three.get(0).hashCode(), three.get(1).hashCode());
            for (RefractiveIndex other : three.subList(2, three.size())) assertNotEquals(three.get(0), other);
            for (RefractiveIndex other : three.subList(3, three.size()))
                assertNotEquals(three.get(0).hashCode(), other.hashCode());
            assertTrue(three.get(0).toString().contains("0.01"));
            assertEquals(300, three.get(0).fromNm());
            assertEquals(900, three.get(0).toNm());
        }
        // By hand at 500 nm: λ² = 0.25 µm²; 2 + 1/0.24 and 2 + 0.25/0.24.
        assertEquals(
                Math.sqrt(2 + 1 / 0.24),
                ResonanceIndex.pole("a", 2, b, c, 300, 900).at(500, 20).n(),
                1e-14);
        assertEquals(
                Math.sqrt(2 + 0.25 / 0.24),
                ResonanceIndex.sellmeier("a", 2, b, c, 300, 900).at(500, 20).n(),
                1e-14);
        refused(() -> ResonanceIndex.pole("a", 2, b, new double[] {0.01, 0.02}, 300, 900));
        refused(() -> ResonanceIndex.pole("a", 2, new double[] {Double.NaN}, c, 300, 900));
        refused(() -> ResonanceIndex.pole("a", -9, b, c, 300, 900).at(800, 20));
        refused(() -> new ConstantIndex("a", 1.5, 0, 900, 300));
        ResonanceIndex.pole("a", 2, new double[] {0}, new double[] {0.25}, 300, 900); // no pole without a strength
    }

    @Test
    void tables() {
        Spectrum s = new Spectrum("t", new double[] {500, 600.5}, new double[] {1, 3});
        assertEquals("t", s.name());
        assertEquals(1, s.at(500));
        assertEquals(3, s.at(600.5));
        assertEquals(1 + 2 * 50 / 100.5, s.at(550), 1e-14);
        assertTrue(s.covers(500) && s.covers(600.5) && !s.covers(499.9) && !s.covers(601));
        assertTrue(refused(() -> s.at(601)).contains("601 nm: it covers 500 to 600.5 nm"));
        assertArrayEquals(new double[] {500, 600.5}, s.wavelengthsNm());
        assertArrayEquals(new double[] {1, 3}, s.values());
        s.values()[0] = 9;
        s.wavelengthsNm()[0] = 9;
        assertEquals(1, s.at(500));
        refused(() -> new Spectrum("t", new double[] {1, 2}, new double[] {1}));
        refused(() -> new Spectrum("t", new double[] {1}, new double[] {1}));
        refused(() -> new Spectrum("t", new double[] {2, 2}, new double[] {1, 1}));
        refused(() -> new Spectrum("t", new double[] {0, 2}, new double[] {1, 1}));
        refused(() -> new Spectrum("t", new double[] {1, 2}, new double[] {1, Double.NaN}));
    }

    @Test
    void numbersAsPeopleReadThem() {
        assertEquals("0.1004", Figures.significant(0.10042, 4));
        assertEquals("12.3", Figures.significant(12.34, 3));
        assertEquals("4570", Figures.significant(4573, 3));
        assertEquals("10.0", Figures.significant(9.999, 3));
        assertEquals("0", Figures.significant(0, 3));
        assertEquals("1.23e-05", Figures.significant(1.234e-5, 3));
        assertEquals("0.000100", Figures.significant(1e-4, 3));
        assertEquals("1.23e+07", Figures.significant(1.234e7, 3));
        assertEquals("9990000", Figures.significant(9.994e6, 3));
        assertEquals("–", Figures.significant(Double.NaN, 3));
        assertEquals("∞", Figures.significant(Double.POSITIVE_INFINITY, 3));
        assertEquals("−∞", Figures.significant(Double.NEGATIVE_INFINITY, 3));
        assertEquals("1.50", Figures.fixed(1.5, 2));
        assertEquals("0.00", Figures.fixed(-0.001, 2), "nothing has no sign");
        assertEquals("-0.01", Figures.fixed(-0.011, 2));
        assertEquals("-9.00", Figures.fixed(-9, 2));
        assertEquals("∞", Figures.fixed(Double.POSITIVE_INFINITY, 2));
        assertEquals("690", Figures.plain(690));
        assertEquals("690.5", Figures.plain(690.5));
        assertEquals("–", Figures.plain(Double.NaN));
        assertEquals("1.0E-30", Figures.plain(1e-30));
        assertEquals(2, Figures.decimalsFor(0.12));
        assertEquals(4, Figures.decimalsFor(0.0031));
        assertEquals(0, Figures.decimalsFor(31));
        assertEquals(9, Figures.decimalsFor(1e-20));
        assertEquals(4, Figures.decimalsFor(0));
        assertEquals(4, Figures.decimalsFor(Double.POSITIVE_INFINITY));
        assertEquals("12.34 ± 0.12", Figures.withUncertainty(12.3412, 0.1234));
    }

    /** The oldest goes when there is too much; what was used last stays; a value put again counts once. */
    @Test
    void whatIsRememberedIsBounded() {
        BoundedCache<String, Integer> cache = new BoundedCache<>(10, v -> v);
        cache.put("a", 4);
        cache.put("b", 4);
        assertEquals(4, cache.get("a"));
        cache.put("c", 2);
        assertEquals(3, cache.entries());
        cache.put("c", 2);
        assertEquals(3, cache.entries(), "10 of 10");
        cache.put("d", 1);
        assertEquals(null, cache.get("b"), "used longest ago");
        assertEquals(4, cache.get("a"));
        cache.put("e", 50);
        assertEquals(1, cache.entries());
        assertEquals(50, cache.get("e"), "one is kept however large");
    }
}
