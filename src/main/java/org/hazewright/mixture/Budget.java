package org.hazewright.mixture;

import java.util.ArrayList;
import java.util.List;
import org.hazewright.shelf.Uncertainty;

/**
 * First-order uncertainty of a recipe's prediction, by cause: the law of propagation of uncertainty (JCGM 100:2008, eq. 10 and
 * 13).
 *
 * <p>Standard uncertainties in 1/cm at each wavelength asked for; {@link #causes} sum in squares to them.
 */
public final class Budget {
    /** Relative standard uncertainties that every mixture has: of each density, and of the finished volume. */
    public static final double DENSITY = Unknowns.DENSITY;

    public static final double VOLUME = Unknowns.VOLUME;

    private final double[] wavelengthsNm;
    private final List<Cause> causes;

    private Budget(double[] wavelengthsNm, List<Cause> causes) {
        this.wavelengthsNm = wavelengthsNm;
        this.causes = List.copyOf(causes);
    }

    /** {@code capacityG} is the balance's: a mass above it takes several loads. */
    public static Budget of(Recipe recipe, double[] wavelengthsNm, double capacityG) {
        return of(new Unknowns(recipe, wavelengthsNm, capacityG));
    }

    /** With coefficients as in a mixture that holds the same ingredients, at its wavelengths. */
    public static Budget of(Recipe recipe, Sweep sweep, double capacityG) {
        return of(new Unknowns(recipe, sweep, capacityG));
    }

    private static Budget of(Unknowns x) {
        int points = x.wavelengthsNm.length;
        double[] planned = x.plannedLoadsG();
        double[] masses = new double[x.ingredients()];
        double[][] content = new double[x.stockFrom.length][x.ingredients()];
        x.masses(planned, content, masses);
        double[] mua = new double[points];
        double[] musp = new double[points];
        for (int j = 0; j < points; j++)
            for (int i = 0; i < masses.length; i++) {
                mua[j] += masses[i] * x.kappaA[i][j] / x.volumeMl;
                musp[j] += masses[i] * x.kappaS[i][j] / x.volumeMl;
            }
        List<Cause> causes = new ArrayList<>();
        for (int i = 0; i < masses.length; i++) factors(x, i, masses[i], causes);
        for (int k = 0; k < planned.length; k++) {
            double u = x.loads.get(k).uG();
            double step = Math.max(planned[k] * 1e-4, u);
            if (u == 0 || step == 0) continue;
            double[] up = moved(x, planned, k, step);
            double[] down = moved(x, planned, k, -Math.min(step, planned[k] / 2));
            double[] a = new double[points];
            double[] s = new double[points];
            double width = step + Math.min(step, planned[k] / 2);
            for (int j = 0; j < points; j++) {
                a[j] = (up[j] - down[j]) / width * u;
                s[j] = (up[points + j] - down[points + j]) / width * u;
            }
            Cause.Kind kind = x.loads.get(k).role() == Unknowns.Load.Role.ITEM ? Cause.Kind.WEIGHING : Cause.Kind.STOCK;
            causes.add(new Cause(x.loads.get(k).name(), kind, a, s));
        }
        for (int i = 0; i < masses.length; i++) {
            double share = masses[i] / x.densityGPerMl[i] / x.volumeMl; // a denser part leaves less volume
            causes.add(new Cause(
                    x.ingredient[i].id() + " density",
                    Cause.Kind.DENSITY,
                    times(mua, share * Unknowns.DENSITY),
                    times(musp, share * Unknowns.DENSITY)));
        }
        causes.add(new Cause(
                "finished volume", Cause.Kind.VOLUME, times(mua, -Unknowns.VOLUME), times(musp, -Unknowns.VOLUME)));
        return new Budget(x.wavelengthsNm, causes);
    }

    /**
     * Absorption and scattering of one ingredient; when they are correlated by r the second is split in a part that follows the
     * first and a part of its own (Cholesky), so that causes stay independent.
     */
    private static void factors(Unknowns x, int i, double massG, List<Cause> causes) {
        Uncertainty u = x.uncertainty[i];
        int points = x.wavelengthsNm.length;
        double[] a = new double[points];
        double[] sWithA = new double[points];
        double[] sAlone = new double[points];
        boolean absorbs = false;
        boolean scatters = false;
        for (int j = 0; j < points; j++) {
            a[j] = massG * x.kappaA[i][j] / x.volumeMl * u.absorption();
            double s = massG * x.kappaS[i][j] / x.volumeMl * u.scattering();
            sWithA[j] = s * u.correlation();
            sAlone[j] = s * Math.sqrt(1 - u.correlation() * u.correlation());
            absorbs |= a[j] != 0 || sWithA[j] != 0;
            scatters |= sAlone[j] != 0;
        }
        String id = x.ingredient[i].id();
        if (absorbs) causes.add(new Cause(id + " absorption", Cause.Kind.ABSORPTION, a, sWithA));
        if (scatters) causes.add(new Cause(id + " scattering", Cause.Kind.SCATTERING, new double[points], sAlone));
    }

    private static double[] moved(Unknowns x, double[] planned, int k, double by) {
        double[] loads = planned.clone();
        loads[k] += by;
        double[] masses = new double[x.ingredients()];
        x.masses(loads, new double[x.stockFrom.length][x.ingredients()], masses);
        double volume = 0;
        for (int i = 0; i < masses.length; i++) volume += masses[i] / x.densityGPerMl[i];
        int points = x.wavelengthsNm.length;
        double[] mu = new double[2 * points];
        for (int j = 0; j < points; j++)
            for (int i = 0; i < masses.length; i++) {
                mu[j] += masses[i] * x.kappaA[i][j] / volume;
                mu[points + j] += masses[i] * x.kappaS[i][j] / volume;
            }
        return mu;
    }

    private static double[] times(double[] values, double factor) {
        double[] out = values.clone();
        for (int j = 0; j < out.length; j++) out[j] *= factor;
        return out;
    }

    /** What is not known, each independent of the others. */
    public List<Cause> causes() {
        return causes;
    }

    /** The wavelengths in nm, in the order asked for. */
    public double[] wavelengthsNm() {
        return wavelengthsNm.clone();
    }

    /** Standard uncertainty of µa at each wavelength, 1/cm. */
    public double[] uMuaPerCm() {
        double[] u = new double[wavelengthsNm.length];
        for (Cause c : causes) for (int j = 0; j < u.length; j++) u[j] += c.muaPerCm()[j] * c.muaPerCm()[j];
        for (int j = 0; j < u.length; j++) u[j] = Math.sqrt(u[j]);
        return u;
    }

    /** Standard uncertainty of µs' at each wavelength, 1/cm. */
    public double[] uMuspPerCm() {
        double[] u = new double[wavelengthsNm.length];
        for (Cause c : causes) for (int j = 0; j < u.length; j++) u[j] += c.muspPerCm()[j] * c.muspPerCm()[j];
        for (int j = 0; j < u.length; j++) u[j] = Math.sqrt(u[j]);
        return u;
    }
}
