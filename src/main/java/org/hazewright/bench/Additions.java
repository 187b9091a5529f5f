package org.hazewright.bench;

import java.util.Arrays;
import java.util.List;
import java.util.Optional;
import org.hazewright.brief.Point;
import org.hazewright.search.ConvexProgramme;

/**
 * The best grams to pour onto what is in a vessel, for a given added volume: nothing can be taken out.
 *
 * <p>With x_i ≥ 0 grams of what can be poured, µ_j = (T_j + Σ x_i κ_ij)/V and V = V₀ + Σ x_i v_i. At a fixed V both the tolerances and the
 * score's squared misses are those of a convex programme in x; it is solved inside every tolerance where that can be.
 *
 * @param vesselPerCmMl T_j: µ of the vessel times its volume, 1/cm · mL, at each point
 * @param kappaCm2PerG of each pourable at each point
 * @param mlPerG volume of a gram of each pourable
 */
public record Additions(
        List<Point> points, double[] vesselPerCmMl, double vesselMl, double[][] kappaCm2PerG, double[] mlPerG) {

    /** Ties between pourables that do the same are broken towards equal volumes. */
    private static final double TIE = 1e-9;

    /** Grams of each pourable that together take {@code addedMl}; empty when the programme cannot be settled. */
    public Optional<double[]> best(double addedMl) {
        int n = mlPerG.length;
        double volume = vesselMl + addedMl;
        double[][] quadratic = new double[n][n];
        double[] linear = new double[n];
        java.util.ArrayList<ConvexProgramme.Limit> limits = new java.util.ArrayList<>();
        limits.add(new ConvexProgramme.Limit(mlPerG, addedMl, addedMl));
        java.util.ArrayList<ConvexProgramme.Limit> inside = new java.util.ArrayList<>(limits);
        for (int j = 0; j < points.size(); j++) {
            Point p = points.get(j);
            double[] row = new double[n];
            for (int i = 0; i < n; i++) row[i] = kappaCm2PerG[i][j];
            double missing = p.wantedPerCm() * volume - vesselPerCmMl[j];
            double half = p.tolerancePerCm() * volume;
            double scale = p.weight() / (half * half);
            for (int i = 0; i < n; i++) {
                linear[i] += 2 * scale * row[i] * missing;
                for (int k = 0; k < n; k++) quadratic[i][k] += 2 * scale * row[i] * row[k];
            }
            inside.add(new ConvexProgramme.Limit(row, missing - half, missing + half));
        }
        for (int i = 0; i < n; i++) quadratic[i][i] += 2 * TIE * Math.pow(mlPerG[i] / addedMl, 2);
        double[] upper = new double[n];
        Arrays.fill(upper, Double.POSITIVE_INFINITY);
        ConvexProgramme.Solution s =
                ConvexProgramme.ofAmounts(quadratic, linear, 0, upper, inside).solve();
        if (s.status() != ConvexProgramme.Status.OPTIMAL)
            s = ConvexProgramme.ofAmounts(quadratic, linear, 0, upper, limits).solve();
        return s.status() == ConvexProgramme.Status.OPTIMAL
                ? Optional.of(Arrays.stream(s.x()).map(v -> Math.max(0, v)).toArray())
                : Optional.empty();
    }
}
