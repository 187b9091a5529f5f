package org.hazewright.learning;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import org.hazewright.mixture.MassSpecific;
import org.hazewright.optics.Refusal;
import org.hazewright.optics.Spectrum;
import org.hazewright.shelf.Absorption;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Uncertainty;

/**
 * A dilution series fitted: extinction over wavelength, and one relative uncertainty for the whole spectrum.
 *
 * <p>A lot's uncertainty is one factor, alike at all wavelengths, so the scatter is taken apart. A dilution that holds 1 % too much
 * lies 1 % high at every wavelength; noise of the detector does not. The errors of two wavelengths' slopes b_j = Σ a_ij y_ij have
 * the covariance Σ_i a_ij a_ik r_ij r_ik / √((1 − h_ij)(1 − h_ik)) over the dilutions i that both share, r being residuals and h
 * leverages (the leverage-corrected sandwich: White, Econometrica 48, 817, 1980; MacKinnon &amp; White, J. Econometrics 29, 305, 1985,
 * there HC2; from memory). {@link #shared} is the root of its mean over all pairs of wavelengths, relative to the slopes; {@link #own}
 * is what a wavelength's standard error holds beyond that. With one wavelength nothing can be told apart and shared is 0.
 */
public final class DilutionFit {
    private final DilutionSeries series;
    private final List<Extinction> wavelengths;
    private final double shared;
    private final double total;

    DilutionFit(DilutionSeries series, List<Extinction> wavelengths) {
        this.series = series;
        this.wavelengths = List.copyOf(wavelengths);
        for (Extinction e : wavelengths)
            if (!(e.cm2PerG() > 0))
                throw new Refusal(
                        "The dilution series of " + series.ingredient() + " at " + Rounded.plain(e.wavelengthNm())
                                + " nm gives an extinction of " + Rounded.number(e.cm2PerG())
                                + " cm2/g: readings do not fall with concentration. Check which column is which.");
        double mean = meanPairCovariance();
        double squares = 0;
        for (Extinction e : wavelengths) squares += e.relativeU() * e.relativeU();
        this.shared = Math.sqrt(Math.max(0, mean));
        this.total = Math.max(shared, Math.sqrt(squares / wavelengths.size()));
    }

    /** Mean of the relative covariance of slopes over pairs of different wavelengths. */
    private double meanPairCovariance() {
        List<Map<String, Double>> influence = new ArrayList<>(); // by dilution: a r / √(1 − h) / slope
        for (Extinction e : wavelengths) {
            Map<String, Double> at = new HashMap<>();
            Map<String, Integer> seen = new HashMap<>();
            for (int i = 0; i < e.readings().size(); i++) {
                DilutionReading r = e.readings().get(i);
                StraightLine.FitPoint p = e.line().points().get(i);
                String dilution = r.concentrationGPerMl() + "/" + r.pathMm();
                int nth = seen.merge(dilution, 1, Integer::sum);
                double free = Math.max(1e-12, 1 - p.leverage());
                at.put(dilution + "/" + nth, p.weightInSlope() * p.residual() / Math.sqrt(free) / e.cm2PerG());
            }
            influence.add(at);
        }
        double sum = 0;
        int pairs = 0;
        for (int j = 0; j < influence.size(); j++)
            for (int k = j + 1; k < influence.size(); k++) {
                for (var entry : influence.get(j).entrySet())
                    sum += entry.getValue() * influence.get(k).getOrDefault(entry.getKey(), 0.0);
                pairs++;
            }
        return pairs == 0 ? 0 : sum / pairs;
    }

    public DilutionSeries series() {
        return series;
    }

    /** By wavelength, ascending. */
    public List<Extinction> wavelengths() {
        return wavelengths;
    }

    /** Relative standard uncertainty of the spectrum that all wavelengths share, from scatter: the dilutions. */
    public double shared() {
        return shared;
    }

    /** Relative standard uncertainty of one wavelength's figure beyond the shared part, from scatter: the detector. */
    public double own() {
        return Math.sqrt(Math.max(0, total * total - shared * shared));
    }

    /**
     * Relative standard uncertainty of the extinction as one factor: shared and own scatter and {@code uCommon} together. Own
     * noise is counted as if it were common: on the safe side for a recipe at several wavelengths, right for one.
     */
    public double relativeU() {
        return Math.hypot(total, series.uCommon());
    }

    /**
     * Relative standard uncertainties of the absorbed and of the scattered share of the extinction, for a lot file, and their
     * correlation.
     *
     * <p>κa = (1 − a) ε and κs = a ε, so u²(κa)/κa² = u²(ε)/ε² + u²(a)/(1 − a)², u²(κs)/κs² = u²(ε)/ε² + u²(a)/a², and their
     * covariance is u²(ε)/ε² − u²(a)/(a(1 − a)). A share of nothing has uncertainty 0.
     */
    public Uncertainty uncertainty() {
        double extinction = relativeU() * relativeU();
        double a = series.albedo();
        double ua = series.uAlbedo();
        double absorption = a < 1 ? extinction + Math.pow(ua / (1 - a), 2) : 0;
        double scattering = a > 0 ? extinction + Math.pow(ua / a, 2) : 0;
        double covariance = extinction - ua * ua / (a * (1 - a));
        double correlation = absorption > 0 && scattering > 0 ? covariance / Math.sqrt(absorption * scattering) : 0;
        return new Uncertainty(
                Math.min(1, Math.sqrt(absorption)),
                Math.min(1, Math.sqrt(scattering)),
                Math.max(-1, Math.min(1, correlation)));
    }

    /**
     * The extinction of the ingredient as bought, 1/cm: slope times density. Needs two wavelengths or more; {@code name} is what the
     * table is called in messages.
     */
    public Spectrum neatExtinctionPerCm(String name) {
        return new Spectrum(
                name,
                wavelengths.stream().mapToDouble(Extinction::wavelengthNm).toArray(),
                wavelengths.stream()
                        .mapToDouble(e -> e.cm2PerG() * series.densityGPerMl())
                        .toArray());
    }

    /** The lot's absorption as the shelf holds it: the neat extinction with its albedo; {@code g} of its scattered share. */
    public Absorption absorption(String name, double g) {
        return Absorption.neat(neatExtinctionPerCm(name), series.densityGPerMl(), series.albedo(), g);
    }

    /**
     * Measured over modelled extinction of a scatterer, one number for the whole spectrum: what its lot's magnitude is multiplied by.
     *
     * <p>Modelled: µa + µs of the dilute ingredient in a host of the given index, at a temperature in °C. Weights are those of the
     * wavelengths' own standard errors; χ² says whether the spectral shape agrees.
     */
    public Magnitude magnitudeOf(Ingredient ingredient, double hostIndex, double temperatureC) {
        double sw = 0;
        double swr = 0;
        double swrr = 0;
        for (Extinction e : wavelengths) {
            MassSpecific k = MassSpecific.of(ingredient, e.wavelengthNm(), temperatureC, hostIndex, 0);
            double modelled = k.kappaA() + k.kappaMus();
            if (!(modelled > 0))
                throw new Refusal(ingredient.id() + " has no extinction at " + Rounded.plain(e.wavelengthNm())
                        + " nm by its own figures, so measured over modelled has no meaning.");
            double ratio = e.cm2PerG() / modelled;
            double u = Math.max(e.uCm2PerG() / modelled, 1e-9 * ratio);
            sw += 1 / (u * u);
            swr += ratio / (u * u);
            swrr += ratio * ratio / (u * u);
        }
        double mean = swr / sw;
        double chi2 = Math.max(0, swrr - swr * mean);
        return new Magnitude(mean, mean * relativeU(), chi2, wavelengths.size() - 1);
    }

    /** Measured over modelled magnitude, its standard uncertainty, and how well the shape fits: χ² with its degrees of freedom. */
    public record Magnitude(double ratio, double u, double chiSquared, int degreesOfFreedom) {
        public double pValue() {
            return StraightLine.upperTail(chiSquared, degreesOfFreedom);
        }
    }

    /** What a person should know before using the figures: plain sentences, empty when there is nothing. */
    public List<String> warnings() {
        return DilutionWarnings.of(this);
    }
}
