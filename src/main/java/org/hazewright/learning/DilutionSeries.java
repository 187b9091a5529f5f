package org.hazewright.learning;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.TreeMap;
import org.hazewright.optics.Refusal;

/**
 * A bottle diluted several times and read in collimated transmission or as absorbance, to be fitted wavelength by wavelength.
 *
 * <p>µt(C) = intercept + ε C, C in g/mL, ε in cm²/g (Bouguer–Beer–Lambert along the straight ray). The slope is the ingredient's
 * extinction whatever the blank; the intercept is what blank and cell do not share. µa = (1 − albedo) ε.
 *
 * <p>Multiple scattering: light scattered forward and light scattered back into the beam reaches the detector and makes a dilution
 * look clearer than it is. Above a scattering depth µs·d of {@value #SCATTERING_DEPTH_WARNED} light is on average scattered more than
 * once and the fit says so; above {@link #SCATTERING_DEPTH_REFUSED} = ln 100 less than 1 % of the beam crosses unscattered and a
 * spectrophotometer no longer tells it from the rest: refused. Both are common practice for detectors that accept a few degrees or
 * less; scattering by itself is single only below a depth of about 0.1 (Glossary of Meteorology, American Meteorological Society,
 * entry "single-scattering").
 *
 * @param ingredient id of what was diluted
 * @param densityGPerMl its density as bought
 * @param albedo share of the extinction that is scattering, 0 to 1, and {@code uAlbedo} its standard uncertainty
 * @param uCommon relative standard uncertainty that every reading shares and no scatter shows: the stock that all dilutions were
 *     made from, the cell's length
 */
public record DilutionSeries(
        String ingredient,
        double densityGPerMl,
        double albedo,
        double uAlbedo,
        double uCommon,
        List<DilutionReading> readings) {

    public static final double SCATTERING_DEPTH_WARNED = 1;
    public static final double SCATTERING_DEPTH_REFUSED = Math.log(100);

    /** Absorbance above which stray light in the instrument bends the line (common practice). */
    public static final double ABSORBANCE_WARNED = 2;

    public DilutionSeries {
        Refusal.positive("Density of " + ingredient + " in g/mL", densityGPerMl);
        Refusal.within("Albedo of " + ingredient, albedo, 0, 1);
        Refusal.within("Standard uncertainty of the albedo of " + ingredient, uAlbedo, 0, 1);
        Refusal.within("Relative uncertainty common to the dilutions of " + ingredient, uCommon, 0, 1);
        readings = List.copyOf(readings);
        if (readings.isEmpty()) throw new Refusal("The dilution series of " + ingredient + " has no readings.");
        long stated = readings.stream().filter(r -> r.u().isPresent()).count();
        if (stated != 0 && stated != readings.size())
            throw new Refusal("Of " + readings.size() + " readings of " + ingredient + ", " + stated
                    + " state an uncertainty; give one for all or for none.");
        for (DilutionReading r : readings) refuseTooThick(ingredient, albedo, r);
    }

    private static void refuseTooThick(String ingredient, double albedo, DilutionReading r) {
        double depth = albedo * r.opticalDepth();
        if (depth <= SCATTERING_DEPTH_REFUSED) return;
        double smaller = SCATTERING_DEPTH_WARNED / depth;
        throw new Refusal("The dilution of " + ingredient + " at " + Rounded.number(r.concentrationGPerMl())
                + " g/mL in a cell of "
                + Rounded.plain(r.pathMm()) + " mm has a scattering depth of " + Rounded.number(depth) + " at "
                + Rounded.plain(r.wavelengthNm()) + " nm; above " + Rounded.number(SCATTERING_DEPTH_REFUSED)
                + " scattered light drowns the beam. Take a cell of at most " + Rounded.number(r.pathMm() * smaller)
                + " mm, dilute below " + Rounded.number(r.concentrationGPerMl() * smaller)
                + " g/mL, or leave this reading out.");
    }

    /** The fit at every wavelength, ascending. A wavelength that cannot be fitted is refused by name. */
    public DilutionFit fit() {
        Map<Double, List<DilutionReading>> byWavelength = new TreeMap<>();
        for (DilutionReading r : readings)
            byWavelength
                    .computeIfAbsent(r.wavelengthNm(), nm -> new ArrayList<>())
                    .add(r);
        List<Extinction> fitted = new ArrayList<>();
        byWavelength.forEach((nm, list) -> fitted.add(fit(nm, list)));
        return new DilutionFit(this, fitted);
    }

    private Extinction fit(double nm, List<DilutionReading> list) {
        double[] c =
                list.stream().mapToDouble(DilutionReading::concentrationGPerMl).toArray();
        double[] mu =
                list.stream().mapToDouble(DilutionReading::extinctionPerCm).toArray();
        boolean stated = list.get(0).u().isPresent();
        double[] u =
                list.stream().mapToDouble(r -> r.uExtinctionPerCm().orElse(1)).toArray();
        double[] w = java.util.Arrays.stream(u).map(v -> 1 / (v * v)).toArray();
        try {
            StraightLine line = stated ? StraightLine.fit(c, mu, u) : StraightLine.fit(c, mu);
            Optional<Linearity> linearity = Linearity.of(c, mu, w);
            return new Extinction(nm, list, line, linearity, albedo);
        } catch (Refusal refusal) {
            throw new Refusal("The dilution series of " + ingredient + " at " + Rounded.plain(nm)
                    + " nm cannot be fitted. " + refusal.getMessage());
        }
    }
}
