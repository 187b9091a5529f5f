package org.hazewright.transport;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import org.hazewright.optics.Refusal;
import org.junit.jupiter.api.Test;

class CollimatedTest {
    /** Bouguer–Beer–Lambert: a tenth of the light in 10 mm when µt = ln 10 /cm, 10 dB. */
    @Test
    void oneDecade() {
        Collimated c = new Collimated(new Medium(Math.log(10), 0, 0, 1.33), 1.33, 10);
        assertEquals(0.1, c.transmittance(), 1e-15);
        assertEquals(10, c.attenuationDb(), 1e-12);
        assertEquals(0, c.returned());
    }

    /** Scattering takes light out of the ray as absorption does, at its full coefficient µs = µs'/(1 − g). */
    @Test
    void scatteringCountsInFull() {
        Collimated c = new Collimated(new Medium(0.5, 0.1, 0.9, 1.4), 1.4, 10);
        assertEquals(Math.exp(-1.5), c.transmittance(), 1e-15);
    }

    /** A clear plate: T = 2n/(n² + 1) with all internal reflections (Born &amp; Wolf, incoherent sum); 0.9231 for n 1.5. */
    @Test
    void clearPlate() {
        Collimated c = new Collimated(new Medium(0, 0, 0, 1.5), 1, 2);
        assertEquals(3 / 3.25, c.transmittance(), 1e-15);
        assertEquals(1, c.transmittance() + c.returned() + c.specularReflectance(), 1e-15);
        assertEquals(0.04, c.specularReflectance(), 1e-15);
    }

    /** The decibels stay a number where the transmittance is 0. */
    @Test
    void opaque() {
        Collimated c = new Collimated(new Medium(1000, 0, 0, 1), 1, 100);
        assertEquals(0, c.transmittance());
        assertEquals(1e4 * 10 / Math.log(10), c.attenuationDb(), 1e-6);
    }

    @Test
    void refusesNegativeThickness() {
        assertThrows(Refusal.class, () -> new Collimated(new Medium(1, 1, 0, 1), 1, -1));
    }
}
