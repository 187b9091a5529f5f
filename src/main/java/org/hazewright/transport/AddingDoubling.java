package org.hazewright.transport;

import org.hazewright.optics.Refusal;

/**
 * Total reflectance and transmittance of a slab from the transport equation, by adding and doubling.
 *
 * <p>Any albedo, any thickness from 0 mm up, Henyey–Greenstein phase function, |g| ≤ 0.99, smooth faces with any outside
 * index. The forward peak beyond the highest moment followed goes straight on (delta-M: Wiscombe, J. Atmos. Sci. 34, 1408,
 * 1977); the unscattered beam is kept apart exactly. Error of each share at most 1e−5 for g from −0.5 to 0.95 and index ratio 1.6,
 * 1e−4 beyond. The semi-infinite medium is the limit of thick layers.
 *
 * <p>Plass, Kattawar &amp; Catchings, Appl. Opt. 12, 314 (1973); van de Hulst, Multiple Light Scattering, Academic Press (1980).
 */
public final class AddingDoubling {
    private AddingDoubling() {}

    /** A slab, mm thick. */
    public static SlabLight slab(Medium medium, double outsideIndex, double thicknessMm) {
        return slab(medium, outsideIndex, thicknessMm, directions(medium.g(), new Boundary(medium.n(), outsideIndex)));
    }

    /** The same with a chosen number of directions. */
    static SlabLight slab(Medium medium, double outsideIndex, double thicknessMm, int count) {
        Refusal.notNegative("Thickness in mm", thicknessMm);
        Collimated beam = new Collimated(medium, outsideIndex, thicknessMm);
        if (medium.muspPerCm() == 0 || thicknessMm == 0)
            return new SlabLight(beam.specularReflectance(), beam.returned(), 0, beam.transmittance(), 0);
        return solve(medium, outsideIndex, beam, medium.mutPerMm() * thicknessMm, count);
    }

    /** The semi-infinite medium. */
    public static SlabLight semiInfinite(Medium medium, double outsideIndex) {
        double specular = new Boundary(medium.n(), outsideIndex).normalReflectance();
        if (medium.muspPerCm() == 0) return new SlabLight(specular, 0, 0, 0, 0);
        if (medium.muaPerCm() == 0) return new SlabLight(specular, 0, 1 - specular, 0, 0);
        int count = directions(medium.g(), new Boundary(medium.n(), outsideIndex));
        return solve(medium, outsideIndex, null, Double.POSITIVE_INFINITY, count);
    }

    private static SlabLight solve(Medium medium, double outsideIndex, Collimated beam, double depth, int count) {
        Boundary boundary = new Boundary(medium.n(), outsideIndex);
        Directions directions = Directions.of(count, boundary);
        int orders = boundary.criticalCosine() == 0 ? 2 * count : 19 * count / 10;
        double forward = medium.g() > 0 ? Math.pow(medium.g(), orders) : 0;
        double[] moment = new double[orders];
        for (int l = 0; l < orders; l++) moment[l] = (Math.pow(medium.g(), l) - forward) / (1 - forward);
        double a = medium.albedo();
        double scaledAlbedo = a * (1 - forward) / (1 - a * forward);
        double scaledDepth = depth * (1 - a * forward);
        Layer layer = beam == null
                ? Layer.deep(directions, scaledAlbedo, moment)
                : Layer.of(directions, scaledAlbedo, moment, scaledDepth);
        return new Faces(directions, layer, scaledDepth, boundary.normalReflectance()).light(beam);
    }

    /** Directions enough for 1e−5, by comparison with many more; with the beam's, a multiple of 8, which suits the processor. */
    private static int directions(double g, Boundary boundary) {
        double sharp = Math.abs(g);
        if (boundary.criticalCosine() == 0) return sharp <= 0.95 ? 23 : 39;
        if (sharp <= 0.8) return 23;
        if (sharp <= 0.9) return 31;
        return sharp <= 0.95 ? 39 : 47;
    }

    /** Adds the reflecting faces to a bare layer. Upward light U meets the near face from inside, downward light D the far one. */
    private record Faces(Directions directions, Layer layer, double depth, double normal) {

        SlabLight light(Collimated beam) {
            int n = directions.count() - 1;
            double pass = Math.exp(-depth);
            double down = (1 - normal) / (1 - normal * normal * pass * pass);
            double up = down * normal * pass;
            double[] near = new double[n];
            double[] far = new double[n];
            int beamRow = n * (n + 1);
            for (int i = 0; i < n; i++) {
                double flux = 2 * directions.cosine()[i] * directions.weight()[i];
                double back = layer.reflection[beamRow + i] / flux;
                double through = layer.transmission[beamRow + i] / flux;
                near[i] = back * down + through * up;
                far[i] = through * down + back * up;
            }
            double[] cross = scatterAcross(n, near, far);
            double[] twice = Square.product(n, cross, cross);
            double[] up1 = add(near, times(n, cross, far));
            double[] down1 = add(far, times(n, cross, near));
            double[] both = new double[2 * n];
            for (int i = 0; i < n; i++) {
                both[2 * i] = up1[i];
                both[2 * i + 1] = down1[i];
            }
            Square.solve(n, Square.onePlus(n, -1, twice), 2, both);
            double reflected = up * pass * (1 - normal);
            double transmitted = down * pass * (1 - normal);
            for (int i = 0; i < n; i++) {
                double out = 2
                        * directions.cosine()[i]
                        * directions.weight()[i]
                        * (1 - directions.reflectance()[i]);
                reflected += out * both[2 * i];
                transmitted += out * both[2 * i + 1];
            }
            if (beam == null) return new SlabLight(normal, 0, share(reflected), 0, 0);
            double back = beam.returned();
            double through = beam.transmittance();
            return new SlabLight(normal, back, share(reflected - back), through, share(transmitted - through));
        }

        /**
         * With ρ the face's reflectance: near and far become (1 − Rρ)⁻¹ times themselves, and (1 − Rρ)⁻¹Tρ is returned, which
         * takes light from one face to the other. Kept apart from each other, so that the little that crosses a thick slab
         * keeps its digits.
         */
        private double[] scatterAcross(int n, double[] near, double[] far) {
            double[] a = new double[n * n];
            int m = n + 2;
            double[] right = new double[n * m];
            for (int i = 0; i < n; i++) {
                for (int j = 0; j < n; j++) {
                    int k = i * (n + 1) + j;
                    double rho = directions.reflectance()[j];
                    a[i * n + j] = (i == j ? 1 : 0) - layer.reflection[k] * rho;
                    right[i * m + j] = layer.transmission[k] * rho;
                }
                right[i * m + n] = near[i];
                right[i * m + n + 1] = far[i];
            }
            Square.solve(n, a, m, right);
            double[] cross = new double[n * n];
            for (int i = 0; i < n; i++) {
                System.arraycopy(right, i * m, cross, i * n, n);
                near[i] = right[i * m + n];
                far[i] = right[i * m + n + 1];
            }
            return cross;
        }

        private static double[] times(int n, double[] a, double[] x) {
            double[] y = new double[n];
            for (int i = 0; i < n; i++) for (int j = 0; j < n; j++) y[i] += a[i * n + j] * x[j];
            return y;
        }

        private static double[] add(double[] a, double[] b) {
            double[] c = new double[a.length];
            for (int i = 0; i < c.length; i++) c[i] = a[i] + b[i];
            return c;
        }

        /** Rounding may leave −1e−17 of a share that is nothing. */
        private static double share(double x) {
            return Math.min(1, Math.max(0, x));
        }
    }
}
