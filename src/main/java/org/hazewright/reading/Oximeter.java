package org.hazewright.reading;

import java.util.function.DoubleUnaryOperator;
import org.apache.commons.math3.linear.Array2DRowRealMatrix;
import org.apache.commons.math3.linear.LUDecomposition;
import org.apache.commons.math3.linear.RealMatrix;
import org.apache.commons.math3.linear.SingularMatrixException;
import org.apache.commons.math3.linear.SingularValueDecomposition;
import org.hazewright.optics.Refusal;
import org.hazewright.optics.Spectrum;

/**
 * Absorption at two or more wavelengths read as haemoglobin: oxygenated and deoxygenated concentrations, and saturation.
 *
 * <p>µa(λ) − µa,base(λ) = ln 10 (ε_oxy c_oxy + ε_deoxy c_deoxy), least squares. The tables hold molar extinction, base 10, in
 * 1/cm per mol/L of tetramer (64.5 kg/mol); a table per haem is a quarter of that and must be multiplied by 4 first. The base's
 * absorption (as a rule that of water) in 1/cm is taken off. Concentrations in µmol/L are not forced to be positive: a phantom
 * whose dye is not haemoglobin may read below 0 or above 100 %, and the person should see that.
 */
public record Oximeter(String name, Spectrum oxy, Spectrum deoxy, DoubleUnaryOperator basePerCm) {
    /** 1/cm, base e, per µmol/L from molar extinction of base 10. */
    private static final double PER_UMOL = Math.log(10) * 1e-6;

    public Oximeter {
        if (name == null || oxy == null || deoxy == null || basePerCm == null)
            throw new Refusal("An oximeter needs a name, two extinction tables and the base's absorption.");
    }

    /**
     * Oxygenated and deoxygenated concentration, their sum (µmol/L) and the oxygenated share, with standard uncertainties;
     * {@code residualPerCm} is the root mean square of what haemoglobin cannot explain, 0 for two wavelengths.
     */
    public record Answer(
            double oxyUmolPerL,
            double deoxyUmolPerL,
            double haemoglobinUmolPerL,
            double saturation,
            double uOxyUmolPerL,
            double uDeoxyUmolPerL,
            double uHaemoglobinUmolPerL,
            double uSaturation,
            double residualPerCm) {}

    /** Absorption of the given blood solution without the base, 1/cm: the forward direction. */
    public double muaPerCm(double nm, double haemoglobinUmolPerL, double saturation) {
        return PER_UMOL * haemoglobinUmolPerL * (saturation * oxy.at(nm) + (1 - saturation) * deoxy.at(nm));
    }

    /**
     * From total absorption at each wavelength and its standard uncertainty (0 where none). Where all uncertainties are above 0
     * they weigh the fit; else all points count the same.
     */
    public Answer read(double[] wavelengthNm, double[] muaPerCm, double[] uMuaPerCm) {
        int m = wavelengthNm.length;
        if (m < 2 || muaPerCm.length != m || uMuaPerCm.length != m)
            throw new Refusal(
                    "An oximeter reading needs absorption and its uncertainty at 2 wavelengths or more; there are " + m
                            + ".");
        boolean weighed = true;
        for (double u : uMuaPerCm) weighed &= u > 0;
        RealMatrix a = new Array2DRowRealMatrix(m, 2);
        double[] y = new double[m];
        double[] w = new double[m];
        for (int i = 0; i < m; i++) {
            double nm = wavelengthNm[i];
            a.setEntry(i, 0, PER_UMOL * oxy.at(nm));
            a.setEntry(i, 1, PER_UMOL * deoxy.at(nm));
            y[i] = muaPerCm[i] - basePerCm.applyAsDouble(nm);
            w[i] = weighed ? 1 / (uMuaPerCm[i] * uMuaPerCm[i]) : 1;
        }
        RealMatrix g = gain(a, w, wavelengthNm);
        double[] c = g.operate(y);
        RealMatrix u2 = new Array2DRowRealMatrix(m, m);
        for (int i = 0; i < m; i++) u2.setEntry(i, i, uMuaPerCm[i] * uMuaPerCm[i]);
        RealMatrix v = g.multiply(u2).multiply(g.transpose());
        return answer(c, v, residual(a, c, y));
    }

    /** (AᵀWA)⁻¹AᵀW. */
    private RealMatrix gain(RealMatrix a, double[] w, double[] wavelengthNm) {
        double condition = new SingularValueDecomposition(a).getConditionNumber();
        if (!(condition < 1e6))
            throw new Refusal("At these " + wavelengthNm.length + " wavelengths " + name
                    + " cannot tell oxygenated from deoxygenated haemoglobin: the two absorb alike. Choose wavelengths on both"
                    + " sides of 800 nm.");
        RealMatrix at = a.transpose();
        for (int i = 0; i < w.length; i++) for (int k = 0; k < 2; k++) at.multiplyEntry(k, i, w[i]);
        try {
            return new LUDecomposition(at.multiply(a)).getSolver().getInverse().multiply(at);
        } catch (SingularMatrixException e) {
            throw new Refusal("The wavelengths do not separate oxygenated from deoxygenated haemoglobin.", e);
        }
    }

    private static double residual(RealMatrix a, double[] c, double[] y) {
        double[] fit = a.operate(c);
        double sum = 0;
        for (int i = 0; i < y.length; i++) sum += (y[i] - fit[i]) * (y[i] - fit[i]);
        return Math.sqrt(sum / y.length);
    }

    private static Answer answer(double[] c, RealMatrix v, double residual) {
        double total = c[0] + c[1];
        if (total == 0)
            throw new Refusal(
                    "There is no absorption beyond the base's, so there is no saturation to read. Add an absorber.");
        double s = c[0] / total;
        double ds0 = c[1] / (total * total);
        double ds1 = -c[0] / (total * total);
        double v00 = v.getEntry(0, 0);
        double v01 = v.getEntry(0, 1);
        double v11 = v.getEntry(1, 1);
        return new Answer(
                c[0],
                c[1],
                total,
                s,
                Math.sqrt(v00),
                Math.sqrt(v11),
                Math.sqrt(Math.max(0, v00 + 2 * v01 + v11)),
                Math.sqrt(Math.max(0, ds0 * ds0 * v00 + 2 * ds0 * ds1 * v01 + ds1 * ds1 * v11)),
                residual);
    }
}
