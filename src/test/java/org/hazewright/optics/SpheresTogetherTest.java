package org.hazewright.optics;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.Random;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** Many spheres at once are what each is by itself: the other way to compute it, which is held against many digits elsewhere. */
class SpheresTogetherTest {
    /** Sizes, indices and absorption over the whole domain, in packs that share a size and packs that do not; to 1e-9, near what is promised. */
    @ParameterizedTest
    @ValueSource(longs = {1, 2, 3, 4, 5, 6})
    void anySpheresInAnyOrder(long seed) {
        Random random = new Random(seed);
        int count = 300;
        double[] x = new double[count];
        double[] n = new double[count];
        double[] k = new double[count];
        for (int i = 0; i < count; i++) {
            x[i] = seed % 2 == 0
                    ? Math.exp(Math.log(1e-4) + random.nextDouble() * Math.log(5e6))
                    : 5 * seed * (1 + 0.2 * random.nextDouble());
            n[i] = random.nextInt(4) == 0 ? 0.2 + 9.8 * random.nextDouble() : 1.01 + 0.3 * random.nextDouble();
            k[i] = random.nextBoolean() ? 0 : Math.exp(-12 + 13 * random.nextDouble());
        }
        double[] sca = new double[count];
        double[] abs = new double[count];
        double[] g = new double[count];
        Mie.spheres(x, n, k, sca, abs, g);
        for (int i = 0; i < count; i++) {
            Efficiencies one = Mie.sphere(x[i], n[i], k[i]);
            String which = "x " + x[i] + ", n " + n[i] + ", k " + k[i];
            assertEquals(one.qSca(), sca[i], 1e-9 * one.qSca(), which);
            assertEquals(one.qAbs(), abs[i], 1e-9 * one.qAbs() + (k[i] == 0 ? 0 : 1e-300), which);
            assertEquals(one.g(), g[i], 1e-9, which);
            assertTrue(k[i] > 0 || abs[i] == 0, "what does not absorb absorbs nothing: " + which);
        }
    }

    /** Non-absorbing and absorbing, dense and not, at sizes alike: full lanes of each kind. */
    @ParameterizedTest
    @ValueSource(doubles = {0.01, 0.5, 3, 12, 40, 150, 900})
    void fullLanesOfEachKind(double size) {
        for (double[] index : new double[][] {{1.2, 0}, {1.2, 0.01}, {2.7, 0}, {2.7, 0.3}, {0.6, 0}, {1.8, 0.8}}) {
            int count = 70;
            double[] x = new double[count];
            double[] n = new double[count];
            double[] k = new double[count];
            for (int i = 0; i < count; i++) {
                x[i] = size * (1 + 0.004 * i);
                n[i] = index[0] * (1 + 1e-4 * (i % 7));
                k[i] = index[1];
            }
            double[] sca = new double[count];
            double[] abs = new double[count];
            double[] g = new double[count];
            Mie.spheres(x, n, k, sca, abs, g);
            for (int i = 0; i < count; i++) {
                Efficiencies one = Mie.sphere(x[i], n[i], k[i]);
                assertEquals(one.qSca(), sca[i], 1e-10 * one.qSca());
                assertEquals(one.qAbs(), abs[i], 1e-10 * one.qAbs());
                assertEquals(one.g(), g[i], 1e-10);
            }
        }
    }

    @Test
    void placesForEveryResult() {
        double[] two = {1, 2};
        double[] one = {1};
        for (int short1 = 0; short1 < 5; short1++) {
            double[][] a = {two, two, two, two, two};
            a[short1] = one;
            assertThrows(Refusal.class, () -> Mie.spheres(two, a[0], a[1], a[2], a[3], a[4]));
        }
    }
}
