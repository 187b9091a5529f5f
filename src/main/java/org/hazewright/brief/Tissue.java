package org.hazewright.brief;

import java.util.ArrayList;
import java.util.List;
import java.util.OptionalDouble;
import org.hazewright.optics.Refusal;
import org.hazewright.optics.Spectrum;

/**
 * Tissue-like composition that targets are made from.
 *
 * <p>µa(λ) = c_t [S µ_HbO2(λ) + (1 − S) µ_Hb(λ)] + W µ_water(λ) + F µ_fat(λ), with c_t the total haemoglobin in µmol/L of tissue
 * (tetramer), S the saturation, W and F the volume fractions of water and fat; µs'(λ) = a (λ/500 nm)^−b in 1/cm. The four
 * spectra are published tables that the caller passes in.
 */
public record Tissue(
        double[] wavelengthsNm,
        double haemoglobinUmolPerL,
        double saturation,
        double waterFraction,
        double fatFraction,
        OptionalDouble muspPerCmAt500Nm,
        double scatterPower) {

    /**
     * Spectra that the composition is made of: decadic molar absorptivity of the haemoglobin tetramer in L/(mol cm), and µa of
     * pure water and fat in 1/cm.
     */
    public record Spectra(Spectrum oxyEpsilon, Spectrum deoxyEpsilon, Spectrum waterMua, Spectrum fatMua) {}

    public Tissue {
        wavelengthsNm = wavelengthsNm.clone();
        if (wavelengthsNm.length == 0)
            throw new Refusal("[tissue] has no wavelengths_nm; give the wavelengths at which targets are wanted.");
        for (double nm : wavelengthsNm) Refusal.positive("[tissue] wavelength in nm", nm);
        Refusal.within("[tissue] haemoglobin_umol_per_l", haemoglobinUmolPerL, 0, 5000);
        Refusal.within("[tissue] saturation", saturation, 0, 1);
        Refusal.within("[tissue] water_fraction", waterFraction, 0, 1);
        Refusal.within("[tissue] fat_fraction", fatFraction, 0, 1);
        if (waterFraction + fatFraction > 1 + 1e-9)
            throw new Refusal("[tissue] water_fraction and fat_fraction sum to " + (waterFraction + fatFraction)
                    + "; together they can be at most 1.");
        muspPerCmAt500Nm.ifPresent(v -> Refusal.positive("[tissue] musp_per_cm_at_500nm", v));
        Refusal.within("[tissue] scatter_power", scatterPower, -4, 6);
    }

    /** Absorption of the composition at a wavelength in nm, 1/cm. */
    public double muaPerCm(double nm, Spectra spectra) {
        double molPerL = haemoglobinUmolPerL * 1e-6;
        double haemoglobin = molPerL == 0
                ? 0
                : Math.log(10)
                        * molPerL
                        * (saturation * spectra.oxyEpsilon().at(nm)
                                + (1 - saturation) * spectra.deoxyEpsilon().at(nm));
        return haemoglobin + bloodlessPerCm(nm, spectra);
    }

    /** Absorption of its water and fat alone at a wavelength in nm, 1/cm. */
    public double bloodlessPerCm(double nm, Spectra spectra) {
        double water =
                waterFraction == 0 ? 0 : waterFraction * spectra.waterMua().at(nm);
        double fat = fatFraction == 0 ? 0 : fatFraction * spectra.fatMua().at(nm);
        return water + fat;
    }

    /** Targets with relative tolerances {@code muaTolerance} and {@code muspTolerance}. */
    public List<Target> targets(Spectra spectra, double muaTolerance, double muspTolerance) {
        List<Target> targets = new ArrayList<>();
        for (double nm : wavelengthsNm) {
            double mua = muaPerCm(nm, spectra);
            OptionalDouble musp = muspPerCmAt500Nm.isPresent()
                    ? OptionalDouble.of(muspPerCmAt500Nm.getAsDouble() * Math.pow(nm / 500, -scatterPower))
                    : OptionalDouble.empty();
            targets.add(new Target(
                    nm, OptionalDouble.of(mua), musp, muaTolerance * mua, muspTolerance * musp.orElse(0), 1));
        }
        return targets;
    }
}
