package org.hazewright.transport;

import static org.junit.jupiter.api.Assertions.assertArrayEquals;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.concurrent.atomic.AtomicInteger;
import org.hazewright.optics.Refusal;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class PhotonPacketsTest {
    private static final List<Ring> RINGS = List.of(new Ring(0, 1), new Ring(1, 2), new Ring(4, 5));

    /** Every book of a block, roulette's included, adds up to the packets that met the surface. */
    @ParameterizedTest
    @CsvSource({
        "0.1, 10, 0.9, 1.4, 5",
        "5, 5, 0, 1.33, 1",
        "0, 20, 0.5, 1.5, 2",
        "0.01, 10, -0.3, 1, 20",
        "3, 0, 0, 1.4, 3"
    })
    void energyIsConservedToRounding(double mua, double musp, double g, double n, double thickness) {
        PhotonPackets problem = new PhotonPackets(new Medium(mua, musp, g, n), 1, thickness);
        PacketTally tally = problem.run(PacketRun.of(5000, 3).onThreads(1));
        assertEquals(1, tally.budget(), 1e-12);
        assertEquals(5000, tally.packets());
    }

    @Test
    void theSameToTheLastBitForAnyNumberOfThreads() {
        PhotonPackets problem = new PhotonPackets(new Medium(0.3, 10, 0.8, 1.4), 1, 4.0);
        PacketRun run =
                PacketRun.of(21_000, 42).collecting(Side.TRANSMITTANCE, RINGS).over(new TimeAxis(0, 500, 10));
        PacketTally one = problem.run(run.onThreads(1));
        for (int threads : new int[] {2, 3, 7}) {
            PacketTally many = problem.run(run.onThreads(threads));
            assertEquals(one.light(), many.light());
            assertEquals(one.absorbed(), many.absorbed());
            assertEquals(one.scatterings(), many.scatterings());
            assertEquals(one.uTotalTransmittance(), many.uTotalTransmittance());
            for (int i = 0; i < RINGS.size(); i++) {
                assertEquals(one.rings().get(i).perMm2(), many.rings().get(i).perMm2());
                assertEquals(
                        one.rings().get(i).meanTimePs(), many.rings().get(i).meanTimePs());
                assertArrayEquals(
                        one.rings().get(i).histogram(), many.rings().get(i).histogram());
            }
        }
        assertTrue(one.light().diffuseReflectance()
                != problem.run(PacketRun.of(21_000, 43)).light().diffuseReflectance());
    }

    /** A stopped run is the beginning of the whole one. */
    @Test
    void stopsBetweenBlocksAndKeepsWhatIsDone() {
        PhotonPackets problem = new PhotonPackets(new Medium(0.3, 10, 0.8, 1.4), 1, 4.0);
        AtomicInteger told = new AtomicInteger();
        PacketRun run = PacketRun.of(1_000_000_000L, 42)
                .onThreads(1)
                .watched(share -> told.incrementAndGet(), () -> told.get() >= 3);
        PacketTally stopped = problem.run(run);
        assertEquals(3L * PhotonPackets.BLOCK, stopped.packets());
        assertEquals(problem.run(PacketRun.of(3L * PhotonPackets.BLOCK, 42)).light(), stopped.light());
    }

    @Test
    void progressEndsAtOne() {
        double[] last = new double[1];
        new PhotonPackets(new Medium(1, 10, 0, 1.4), 1, 1.0)
                .run(PacketRun.of(5001, 1).onThreads(1).watched(share -> last[0] = share, () -> false));
        assertEquals(1, last[0]);
    }

    /** Against the transport equation solved without chance, within four standard errors; a wrong percent would show. */
    @ParameterizedTest
    @CsvSource({
        "1, 10, 0.9, 1.4, 1, 1",
        "0.1, 10, 0.8, 1.33, 1, 10",
        "2, 10, 0, 1.5, 1, 2",
        "1, 5, -0.4, 1.4, 1.33, 1",
        "1, 5, 0.5, 1.33, 1.5, 2"
    })
    void totalsAgreeWithAddingAndDoubling(double mua, double musp, double g, double n, double out, double thickness) {
        Medium m = new Medium(mua, musp, g, n);
        PacketTally tally = new PhotonPackets(m, out, thickness).run(PacketRun.of(60_000, 8));
        SlabLight exact = AddingDoubling.slab(m, out, thickness);
        assertEquals(exact.totalReflectance(), tally.light().totalReflectance(), 4 * tally.uTotalReflectance() + 1e-5);
        assertEquals(
                exact.totalTransmittance(), tally.light().totalTransmittance(), 4 * tally.uTotalTransmittance() + 1e-5);
        assertTrue(tally.uTotalReflectance() < 0.004);
        double seen = tally.light().unscatteredTransmittance();
        double p = exact.unscatteredTransmittance();
        assertEquals(p, seen, 4 * Math.sqrt(p * (1 - p) / 60_000) + 1e-9);
    }

    /** Van de Hulst, Multiple Light Scattering (1980): g 0.75, albedo 0.9, optical thickness 2, matched. */
    @Test
    void vanDeHulst() {
        PacketTally tally = new PhotonPackets(new Medium(2, 4.5, 0.75, 1), 1, 1.0).run(PacketRun.of(200_000, 5));
        assertEquals(0.09739, tally.light().totalReflectance(), 4 * tally.uTotalReflectance());
        assertEquals(0.66096, tally.light().totalTransmittance(), 4 * tally.uTotalTransmittance());
    }

    /** Bouguer–Beer–Lambert where nothing scatters. */
    @Test
    void absorptionAlone() {
        PacketTally tally = new PhotonPackets(new Medium(10, 0, 0, 1), 1, 1.0).run(PacketRun.of(100_000, 5));
        assertEquals(Math.exp(-1), tally.light().totalTransmittance(), 4 * Math.sqrt(0.368 * 0.632 / 1e5));
        assertEquals(0, tally.light().diffuseTransmittance());
    }

    /** The spread of results over many seeds is what the standard errors say. */
    @Test
    void standardErrorsAreHonest() {
        PhotonPackets problem = new PhotonPackets(new Medium(1, 10, 0, 1.4), 1, 2.0);
        int runs = 60;
        double sum = 0;
        double squares = 0;
        double claimed = 0;
        for (int i = 0; i < runs; i++) {
            PacketTally t = problem.run(PacketRun.of(20_000, 100 + i).collecting(Side.REFLECTANCE, RINGS));
            double r = t.rings().get(1).perMm2();
            sum += r;
            squares += r * r;
            claimed += t.rings().get(1).uPerMm2() * t.rings().get(1).uPerMm2();
        }
        double variance = (squares - sum * sum / runs) / (runs - 1);
        // the ratio of two variances with 60 and 9·60 degrees of freedom: 0.55 to 1.6 holds in 999 of 1000
        double ratio = variance / (claimed / runs);
        assertTrue(ratio > 0.5 && ratio < 1.8, "ratio " + ratio);
    }

    /** Rings that cover the surface hold all the light; their histograms hold all of it that is early enough. */
    @Test
    void ringsAddUpToTheTotal() {
        PhotonPackets problem = new PhotonPackets(new Medium(1, 10, 0.5, 1.4), 1, 3.0);
        List<Ring> rings = List.of(new Ring(0, 1), new Ring(1, 3), new Ring(3, 500));
        PacketTally t = problem.run(
                PacketRun.of(20_000, 9).collecting(Side.REFLECTANCE, rings).over(new TimeAxis(0, 5000, 5)));
        double sum = 0;
        double timed = 0;
        for (PacketTally.InRing r : t.rings()) {
            sum += r.perMm2() * r.ring().areaMm2();
            for (double h : r.histogram()) timed += h * 5 * r.ring().areaMm2();
        }
        double all = t.light().diffuseReflectance() + t.light().unscatteredReflectance();
        assertEquals(all, sum, 1e-12);
        assertEquals(all, timed, 1e-9);
    }

    /** The mean path is −∂ ln R/∂µa and the score µs ∂ ln R/∂µs: both against differences of two exact totals. */
    @Test
    void slopesFromPathsAndScatterings() {
        Medium m = new Medium(1, 10, 0.5, 1.4);
        PacketTally t = new PhotonPackets(m, 1, 3.0)
                .run(PacketRun.of(200_000, 9).collecting(Side.REFLECTANCE, List.of(new Ring(0, 1e4))));
        PacketTally.InRing all = t.rings().get(0);
        double h = 1e-3;
        double r = AddingDoubling.slab(m, 1, 3).diffuseReflectance();
        double byMua = (AddingDoubling.slab(m.withMua(1 + h), 1, 3).diffuseReflectance()
                        - AddingDoubling.slab(m.withMua(1 - h), 1, 3).diffuseReflectance())
                / (2 * h);
        double byMusp = (AddingDoubling.slab(m.withMusp(10 + h), 1, 3).diffuseReflectance()
                        - AddingDoubling.slab(m.withMusp(10 - h), 1, 3).diffuseReflectance())
                / (2 * h);
        assertEquals(-byMua / r * 10, all.meanPathMm(), 0.02 * all.meanPathMm());
        assertEquals(10 * byMusp / r, all.score(), 0.02);
    }

    @Test
    void pathsThatNeverEndArePutAside() {
        PhotonPackets endless = new PhotonPackets(new Medium(0, 10, 0, 1.4), 1, null, 100);
        PacketTally t = endless.run(PacketRun.of(4000, 1));
        assertTrue(t.unfinished() > 0.02 && t.unfinished() < 0.5);
        assertEquals(1, t.budget(), 1e-12);
    }

    @Test
    void refusals() {
        assertThrows(Refusal.class, () -> new PhotonPackets(new Medium(0, 0, 0, 1.4), 1, 1.0));
        assertThrows(Refusal.class, () -> PacketRun.of(0, 1));
        assertThrows(Refusal.class, () -> new Ring(2, 2));
    }
}
