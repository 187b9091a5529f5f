package org.hazewright.transport;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertNotNull;
import static org.junit.jupiter.api.Assertions.assertNull;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;

class SideWallsTest {
    private static final Medium TYPICAL = new Medium(0.1, 10, 0.8, 1.4);

    @Test
    void smallMouldsAreNoted() {
        assertNotNull(SideWalls.note(TYPICAL, 10, 20));
        assertNull(SideWalls.note(TYPICAL, 60, 20));
        assertTrue(SideWalls.note(TYPICAL, 10, 20).contains("10.0 mm")
                || SideWalls.note(TYPICAL, 10, 20).contains("10 mm"));
    }

    /** What the note asks for is enough. */
    @Test
    void theNeededDistanceIsEnough() {
        for (double mua : new double[] {0, 0.005, 0.1, 1}) {
            Medium m = TYPICAL.withMua(mua);
            String note = SideWalls.note(m, 1, 15);
            double needed = Double.parseDouble(note.replaceAll(".*at least ([0-9.e+]+) mm.*", "$1"));
            assertNull(SideWalls.note(m, needed * 1.01, 15), "µa " + mua + ", " + needed);
            assertNotNull(SideWalls.note(m, needed * 0.98, 15), "µa " + mua + ", " + needed);
        }
    }

    /** 1 % is what it says: an absorbing wall, an image source beyond it, takes at most 1.1 % at the needed distance. */
    @Test
    void onePercentByAnImageSource() {
        double rho = 20;
        double wall = 0.5 * (4.6 / TYPICAL.muEffPerMm() + rho);
        SteadySignal s = new SteadySignal(new Diffusion(TYPICAL, 1));
        double lost = s.reflectancePerMm2(2 * wall) / s.reflectancePerMm2(rho);
        assertTrue(lost < 0.011, "lost " + lost);
        assertEquals(null, SideWalls.note(TYPICAL, wall * 1.001, rho));
    }
}
