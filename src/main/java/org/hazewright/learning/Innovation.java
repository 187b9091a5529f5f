package org.hazewright.learning;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import org.apache.commons.math3.linear.Array2DRowRealMatrix;
import org.apache.commons.math3.linear.ArrayRealVector;
import org.apache.commons.math3.linear.CholeskyDecomposition;
import org.apache.commons.math3.linear.DecompositionSolver;
import org.apache.commons.math3.linear.MatrixUtils;
import org.apache.commons.math3.linear.RealMatrix;
import org.apache.commons.math3.linear.RealVector;
import org.hazewright.mixture.Cause;
import org.hazewright.mixture.Coefficients;
import org.hazewright.optics.Refusal;

/**
 * What batches measured beyond what was expected of them, with the covariance that was expected: r = y − H θ and S = H P Hᵀ + R.
 *
 * <p>One row a measured value. An ingredient's column holds its share of the coefficient, 1/cm; a method's column the whole
 * coefficient by the files, so that y = γ Σ θ share is taken to first order about γ = θ = 1 and stays linear; what that leaves out is
 * (γ − 1)(θ − 1). R holds each value's own u², and, within a batch, what its making adds. Rows are divided by their own u, so that R
 * and S are at least the unit matrix and the Cholesky factor of S is safe.
 */
final class Innovation {
    /** H in the order of the factors, [value][factor]. */
    final RealMatrix h;

    /** R. */
    final RealMatrix noise;

    final RealVector r;
    final RealMatrix s;
    private final DecompositionSolver solver;
    private final List<MeasuredValue> values = new ArrayList<>();
    private final List<String> batchOf = new ArrayList<>();

    /** Every factor that the batches touch must be known. */
    Innovation(Factors known, List<MeasuredBatch> batches) {
        int rows = batches.stream().mapToInt(b -> b.values().size()).sum();
        if (rows == 0) throw new Refusal("There is no measured batch to learn from.");
        h = new Array2DRowRealMatrix(rows, known.factors().size());
        r = new ArrayRealVector(rows);
        noise = MatrixUtils.createRealIdentityMatrix(rows);
        double[] mean = known.means();
        for (MeasuredBatch b : batches) add(b, known.factors(), mean);
        RealMatrix p = new Array2DRowRealMatrix(known.covariance(), false);
        s = symmetric(h.multiply(p).multiply(h.transpose()).add(noise));
        solver = new CholeskyDecomposition(s, 1e-10, 1e-13).getSolver();
    }

    private void add(MeasuredBatch b, List<Factor> factors, double[] mean) {
        int first = values.size();
        double[] nm = b.wavelengthsNm();
        Coefficients[] at = Arrays.stream(nm).mapToObj(b.mixture()::at).toArray(Coefficients[]::new);
        double[][] making = new double[b.values().size()][b.making().size()];
        for (MeasuredValue v : b.values()) {
            int row = values.size();
            int j = Arrays.binarySearch(nm, v.wavelengthNm());
            double whole = 0;
            for (Coefficients.Share share : at[j].shares()) {
                double part = MeasuredBatch.of(share, v.quantity());
                whole += part;
                h.addToEntry(row, factors.indexOf(Factor.of(share.ingredient(), v.quantity())), part / v.uPerCm());
            }
            h.setEntry(row, factors.indexOf(Factor.of(b.method(), v.quantity())), whole / v.uPerCm());
            double expected = -whole / v.uPerCm(); // the method's column counts γ, of which γ − 1 acts
            for (int i = 0; i < mean.length; i++) expected += h.getEntry(row, i) * mean[i];
            r.setEntry(row, v.perCm() / v.uPerCm() - expected);
            for (int c = 0; c < b.making().size(); c++) {
                Cause cause = b.making().get(c);
                double[] effect = v.quantity() == Quantity.ABSORPTION ? cause.muaPerCm() : cause.muspPerCm();
                making[row - first][c] = effect[j] / v.uPerCm();
            }
            values.add(v);
            batchOf.add(b.name());
        }
        for (int i = 0; i < making.length; i++)
            for (int k = 0; k < making.length; k++) {
                double shared = 0;
                for (int c = 0; c < making[i].length; c++) shared += making[i][c] * making[k][c];
                noise.addToEntry(first + i, first + k, shared);
            }
    }

    static RealMatrix symmetric(RealMatrix m) {
        return m.add(m.transpose()).scalarMultiply(0.5);
    }

    /** S⁻¹ v. */
    RealVector solve(RealVector v) {
        return solver.solve(v);
    }

    /** S⁻¹ m. */
    RealMatrix solve(RealMatrix m) {
        return solver.solve(m);
    }

    /** rᵀ S⁻¹ r: χ² of as many degrees of freedom as there are values when files and uncertainties are right. */
    double chiSquared() {
        return r.dotProduct(solve(r));
    }

    List<Comparison> comparisons() {
        List<Comparison> out = new ArrayList<>();
        for (int i = 0; i < values.size(); i++) {
            MeasuredValue v = values.get(i);
            double expected = v.perCm() - r.getEntry(i) * v.uPerCm();
            double uExpected = v.uPerCm() * Math.sqrt(Math.max(0, s.getEntry(i, i) - 1));
            out.add(new Comparison(
                    batchOf.get(i), v, expected, uExpected, r.getEntry(i) / Math.sqrt(s.getEntry(i, i))));
        }
        return out;
    }
}
