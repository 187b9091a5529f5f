package org.hazewright.transport;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.hazewright.optics.Refusal;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class BoundaryReferenceTest {
    /** Haskell et al., J. Opt. Soc. Am. A 11, 2727 (1994), print three digits. */
    @ParameterizedTest
    @CsvSource({"1.33, 0.431", "1.40, 0.493"})
    void effectiveReflectionOfHaskell(double n, double printed) {
        assertEquals(printed, new Boundary(n, 1).effectiveReflection(), 0.0005);
    }

    /** The same integrals by adaptive quadrature in another program (double precision, 1e−13), outside indices both ways. */
    @ParameterizedTest
    @CsvSource({
        "1.33, 1.0,  0.47194914879, 0.32823852361",
        "1.40, 1.0,  0.52898548244, 0.38878282428",
        "1.33, 1.5,  0.03082276277, 0.01311049446",
        "1.40, 1.41, 0.00227712880, 0.00031247543",
        "1.02, 1.0,  0.04464846032, 0.00988137676",
        "2.50, 1.0,  0.87549865176, 0.82064020631",
    })
    void averagesByAdaptiveQuadrature(double in, double out, double fluence, double flux) {
        Boundary boundary = new Boundary(in, out);
        assertEquals(fluence, boundary.fluenceReflection(), 1e-10);
        assertEquals(flux, boundary.fluxReflection(), 1e-10);
    }

    /** Kienle &amp; Patterson, J. Opt. Soc. Am. A 14, 246 (1997): R = 0.118 Φ + 0.306 J for n = 1.40. */
    @Test
    void sharesOfKienleAndPatterson() {
        Boundary skin = new Boundary(1.4, 1);
        assertEquals(0.118, skin.fluenceShare(), 0.0005);
        assertEquals(0.306, skin.fluxShare(), 0.0005);
    }

    /** Isotropic light between two media of one index ratio: n² (1 − R inside) = 1 − R outside; reciprocity of Fresnel's law. */
    @ParameterizedTest
    @CsvSource({"1.33, 1", "1.5, 1", "1.4, 1.33"})
    void bothSidesOfOneSurfaceAgree(double a, double b) {
        double inside = 1 - new Boundary(a, b).fluenceReflection();
        double outside = 1 - new Boundary(b, a).fluenceReflection();
        assertEquals(outside, inside * (a / b) * (a / b), 1e-9);
    }

    /** Diffuse reflectance of a glass surface met from air, n = 1.5: 0.092 (Walsh 1926, in lighting handbooks; from memory). */
    @Test
    void diffuseReflectanceOfGlassFromAir() {
        assertEquals(0.092, new Boundary(1, 1.5).fluenceReflection(), 0.0005);
    }

    @Test
    void equalIndicesReflectNothing() {
        Boundary none = new Boundary(1.4, 1.4);
        assertEquals(0, none.effectiveReflection());
        assertEquals(1, none.factorA());
        assertEquals(0.25, none.fluenceShare());
        assertEquals(0.5, none.fluxShare());
        assertEquals(0, none.reflectance(0.1));
    }

    /** Brewster's angle for glass, tan θ = 1.5: only the other polarisation returns, ((n² − 1)/(n² + 1))²/2. */
    @Test
    void brewstersAngle() {
        double expected = 0.5 * Math.pow((2.25 - 1) / (2.25 + 1), 2);
        assertEquals(expected, new Boundary(1, 1.5).reflectance(1 / Math.sqrt(1 + 2.25)), 1e-14);
    }

    @Test
    void totalReflectionBeyondTheCriticalAngle() {
        Boundary water = new Boundary(1.33, 1);
        assertEquals(1, water.reflectance(water.criticalCosine() - 1e-6));
        assertTrue(water.reflectance(water.criticalCosine() + 1e-3) < 1);
        assertEquals(0, new Boundary(1.33, 1.5).criticalCosine());
    }

    @Test
    void refusesAnImpossibleIndex() {
        assertThrows(Refusal.class, () -> new Boundary(0.9, 1));
    }
}
