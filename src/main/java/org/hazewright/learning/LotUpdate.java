package org.hazewright.learning;

import java.util.List;
import org.apache.commons.math3.linear.Array2DRowRealMatrix;
import org.apache.commons.math3.linear.RealMatrix;
import org.apache.commons.math3.linear.RealVector;

/**
 * What measured batches teach of the lots that went into them: the linear-Gaussian update of the factors.
 *
 * <p>Factors θ ~ N(m, P); a batch gives y = H θ + e, e ~ N(0, R), H from the shares of the mixture as made. Then with S = H P Hᵀ + R
 * and K = P Hᵀ S⁻¹: m' = m + K (y − H m), P' = (1 − K H) P (1 − K H)ᵀ + K R Kᵀ (the conjugate normal update, as in Kalman, J. Basic
 * Eng. 82, 35, 1960; the second form keeps P' symmetric and non-negative). One update with several batches equals updates one
 * after the other in any order, as long as the covariance is passed on whole.
 *
 * @param before the factors as they stood, with those that the batches brought in
 * @param chiSquared (y − H m)ᵀ S⁻¹ (y − H m), with as many degrees of freedom as there are values
 */
public record LotUpdate(Factors before, Factors after, double chiSquared, List<Comparison> rows) {

    public LotUpdate {
        rows = List.copyOf(rows);
    }

    public static LotUpdate of(Factors known, MeasuredBatch batch) {
        return of(known, List.of(batch));
    }

    public static LotUpdate of(Factors known, List<MeasuredBatch> batches) {
        Factors before = known;
        for (MeasuredBatch b : batches) before = before.with(b);
        Innovation innovation = new Innovation(before, batches);
        RealMatrix p = new Array2DRowRealMatrix(before.covariance(), false);
        RealMatrix gain = innovation.solve(innovation.h.multiply(p)).transpose();
        RealVector shift = gain.operate(innovation.r);
        double[] mean = before.means();
        RealMatrix kept = gain.multiply(innovation.h).scalarMultiply(-1);
        for (int i = 0; i < mean.length; i++) {
            mean[i] += shift.getEntry(i);
            kept.addToEntry(i, i, 1);
        }
        RealMatrix after = kept.multiply(p)
                .multiply(kept.transpose())
                .add(gain.multiply(innovation.noise).multiply(gain.transpose()));
        return new LotUpdate(
                before,
                new Factors(before.factors(), mean, Innovation.symmetric(after).getData()),
                innovation.chiSquared(),
                innovation.comparisons());
    }

    public int degreesOfFreedom() {
        return rows.size();
    }

    /** Probability of data at least so far from what was predicted, were files and uncertainties right. */
    public double pValue() {
        return StraightLine.upperTail(chiSquared, rows.size());
    }

    /** Whether the data are hard to believe: then look for the cause ({@link Verdict}) before a new lot file is written. */
    public boolean surprising() {
        return pValue() < StraightLine.LEVEL;
    }
}
