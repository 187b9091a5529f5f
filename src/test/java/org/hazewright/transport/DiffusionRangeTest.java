package org.hazewright.transport;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertNotNull;
import static org.junit.jupiter.api.Assertions.assertNull;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.List;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

/** Diffusion against photon packets at the edges of the stated range. */
class DiffusionRangeTest {
    private static final Convention.Form FORM = Convention.Form.FLUX_AND_FLUENCE;
    private static final double[] DISTANCES = {5, 7, 10, 13.5};

    /** Transport length 1 mm, so that distances in mm are transport lengths; thickness 0 stands for semi-infinite. */
    @ParameterizedTest
    @CsvSource({"20, 0.5, 1.4, 0", "50, 0.7, 1.33, 0", "20, 0.5, 1.4, 10"})
    void holdsAtTheEdges(double ratio, double g, double n, double thick) {
        Double thickness = thick == 0 ? null : (Double) thick;
        Medium m = new Medium(10 / (1 + ratio), 10 * ratio / (1 + ratio), g, n);
        List<Ring> rings = new ArrayList<>();
        for (double d : DISTANCES) rings.add(Ring.around(d, 0.05 * d));
        PacketTally tally =
                new PhotonPackets(m, 1, thickness).run(PacketRun.of(150_000, 11).collecting(Side.REFLECTANCE, rings));
        Convention incident = new Convention(
                Convention.Form.FLUX_AND_FLUENCE,
                Convention.DiffusionConstant.WITH_ABSORPTION,
                Convention.SourceStrength.UNIT,
                Convention.Per.INCIDENT);
        Diffusion d = new Diffusion(m, 1, thickness, incident);
        SteadySignal steady = new SteadySignal(d);
        TimeMoments moments = new TimeMoments(d, Side.REFLECTANCE);
        for (int i = 0; i < DISTANCES.length; i++) {
            double rho = DISTANCES[i];
            assertNull(DiffusionRange.outside(m, rho, thickness, false, FORM), rho + " mm");
            PacketTally.InRing r = tally.rings().get(i);
            double error = steady.reflectancePerMm2(rho) / r.perMm2() - 1;
            double noise = 3 * r.uPerMm2() / r.perMm2();
            assertTrue(
                    Math.abs(error) < DiffusionRange.STEADY_ERROR + noise, rho + " mm: " + error + ", noise " + noise);
            if (DiffusionRange.outside(m, rho, thickness, true, FORM) != null) continue;
            double late = moments.meanPs(rho) / r.meanTimePs() - 1;
            double timeNoise = 3 * r.uMeanTimePs() / r.meanTimePs();
            assertTrue(Math.abs(late) < DiffusionRange.TIME_ERROR + timeNoise, rho + " mm: mean time " + late);
        }
    }

    /** The range is not drawn too wide: in a medium too dark, and too near the beam, diffusion is wrong by more. */
    @ParameterizedTest
    @CsvSource({"5, 3, FLUX_AND_FLUENCE", "50, 1, FLUX"})
    void failsOutside(double ratio, double rho, Convention.Form form) {
        Medium m = new Medium(10 / (1 + ratio), 10 * ratio / (1 + ratio), 0.5, 1.4);
        PacketTally tally = new PhotonPackets(m, 1, null)
                .run(PacketRun.of(60_000, 11).collecting(Side.REFLECTANCE, List.of(Ring.around(rho, 0.1 * rho))));
        PacketTally.InRing r = tally.rings().get(0);
        Convention c = new Convention(
                form,
                Convention.DiffusionConstant.WITH_ABSORPTION,
                Convention.SourceStrength.UNIT,
                Convention.Per.INCIDENT);
        double diffusion = new SteadySignal(new Diffusion(m, 1, null, c)).reflectancePerMm2(rho);
        double noise = 3 * r.uPerMm2() / r.perMm2();
        assertTrue(Math.abs(diffusion / r.perMm2() - 1) - noise > DiffusionRange.STEADY_ERROR);
        assertNotNull(DiffusionRange.outside(m, rho, null, false, form));
    }

    @Test
    void saysWhatIsOutside() {
        Medium good = new Medium(0.1, 10, 0.8, 1.4);
        assertNull(DiffusionRange.outside(good, 20, null, true, FORM));
        assertTrue(DiffusionRange.outside(good, 2, null, false, FORM).contains("transport lengths from the beam"));
        assertTrue(DiffusionRange.outside(good, 20, 3.0, false, FORM).contains("thick"));
        assertTrue(
                DiffusionRange.outside(good.withMua(2), 20, null, false, FORM).contains("µs' is 5.0 times µa"));
        assertTrue(DiffusionRange.outside(good, 500, null, false, FORM).contains("far"));
        assertEquals(null, DiffusionRange.outside(good, (Double) null));
    }
}
