package org.hazewright.optics;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.BufferedReader;
import java.io.IOException;
import java.io.InputStreamReader;
import java.nio.charset.StandardCharsets;
import java.util.ArrayList;
import java.util.List;
import org.junit.jupiter.api.Test;

/**
 * One sphere over the whole promised domain against 30-digit values from arbitrary-precision Bessel functions: see the head of {@code
 * reference/mie-efficiencies.csv} and the script beside it.
 */
class MieManyDigitsReferenceTest {

    private record Row(double x, double n, double k, double qExt, double qSca, double qAbs, double g) {}

    private static List<Row> rows() throws IOException {
        List<Row> rows = new ArrayList<>();
        try (BufferedReader in = new BufferedReader(new InputStreamReader(
                MieManyDigitsReferenceTest.class.getResourceAsStream("/reference/mie-efficiencies.csv"),
                StandardCharsets.UTF_8))) {
            for (String line; (line = in.readLine()) != null; ) {
                if (line.startsWith("#") || line.startsWith("size")) continue;
                String[] c = line.split(",");
                double[] v = new double[c.length];
                for (int i = 0; i < v.length; i++) v[i] = Double.parseDouble(c[i]);
                rows.add(new Row(v[0], v[1], v[2], v[3], v[4], v[5], v[6]));
            }
        }
        return rows;
    }

    /**
     * Promised: 1e-10 relative to x = 1000, 1e-8 above. g is compared as 1 − g where it is near 1 and otherwise by its own size, but
     * not below 1e-3 of it: where g passes through zero between two orders its last digits are those of a difference.
     */
    @Test
    void efficienciesOverTheDomain() throws IOException {
        List<Row> rows = rows();
        assertTrue(rows.size() > 600, "the table holds " + rows.size() + " spheres");
        for (Row r : rows) {
            double tolerance = r.x <= 1000 ? 1e-10 : 1e-8;
            Efficiencies e = Mie.sphere(r.x, r.n, r.k);
            assertEquals(r.qExt, e.qExt(), tolerance * r.qExt, "Q_ext of " + r);
            assertEquals(r.qSca, e.qSca(), tolerance * r.qSca, "Q_sca of " + r);
            double size = Math.max(Math.abs(r.g), Math.min(1e-3, r.x * r.x));
            assertEquals(r.g, e.g(), tolerance * size, "g of " + r);
        }
    }

    /** The absorption of a weak absorber keeps its own digits, however small beside the extinction. */
    @Test
    void absorptionKeepsItsDigits() throws IOException {
        int weak = 0;
        for (Row r : rows()) {
            if (r.k == 0) continue;
            double tolerance = r.x <= 1000 ? 1e-9 : 1e-7;
            assertEquals(r.qAbs, Mie.sphere(r.x, r.n, r.k).qAbs(), tolerance * r.qAbs, "Q_abs of " + r);
            if (r.qAbs < 1e-4 * r.qExt) weak++;
        }
        assertTrue(weak > 20, "weak absorbers in the table: " + weak);
    }

    /** Spheres computed side by side keep the same promise: the whole table at once, each row among eight neighbours of its size. */
    @Test
    void sideBySide() throws IOException {
        List<Row> rows = rows();
        int copies = 9;
        double[][] v = new double[6][rows.size() * copies];
        for (int i = 0; i < v[0].length; i++) {
            Row r = rows.get(i / copies);
            v[0][i] = Math.min(Mie.X_MAX, r.x * (1 + 1e-3 * (i % copies)));
            v[1][i] = r.n;
            v[2][i] = r.k;
        }
        Mie.spheres(v[0], v[1], v[2], v[3], v[4], v[5]);
        for (int i = 0; i < rows.size(); i++) {
            Row r = rows.get(i);
            double tolerance = r.x <= 1000 ? 1e-10 : 1e-8;
            assertEquals(r.qSca, v[3][i * copies], tolerance * r.qSca, "Q_sca of " + r);
            double size = Math.max(Math.abs(r.g), Math.min(1e-3, r.x * r.x));
            assertEquals(r.g, v[5][i * copies], tolerance * size, "g of " + r);
            assertEquals(r.qAbs, v[4][i * copies], 10 * tolerance * r.qAbs, "Q_abs of " + r);
        }
    }
}
