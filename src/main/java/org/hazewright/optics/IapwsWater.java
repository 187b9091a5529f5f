package org.hazewright.optics;

/**
 * Refractive index of liquid water at atmospheric pressure over wavelength and temperature; k = 0 (its absorption is a
 * table of its own).
 *
 * <p>200 to 1100 nm and 0 to 100 °C; outside either a {@link Refusal}. Index: IAPWS R9-97, Release on the Refractive Index of
 * Ordinary Water Substance (1997), eq. 1 and table 1; the release itself holds from −12 °C to 500 °C and for densities up to
 * 1060 kg/m³. Density: Kell, J. Chem. Eng. Data 20, 97, 1975, eq. 16, for liquid water at 1 atm.
 */
public record IapwsWater() implements RefractiveIndex {
    private static final DispersionForm FORM = new DispersionForm("water", 200, 1100);

    // IAPWS R9-97, table 1
    private static final double A0 = 0.244257733;
    private static final double A1 = 9.74634476e-3;
    private static final double A2 = -3.73234996e-3;
    private static final double A3 = 2.68678472e-4;
    private static final double A4 = 1.58920570e-3;
    private static final double A5 = 2.45934259e-3;
    private static final double A6 = 0.900704920;
    private static final double A7 = -1.66626219e-2;
    private static final double ULTRAVIOLET = 0.229202;
    private static final double INFRARED = 5.432937;

    @Override
    public Index at(double wavelengthNm, double temperatureC) {
        FORM.refuseOutside(wavelengthNm);
        return Index.real(index(wavelengthNm, temperatureC, densityKgPerM3(temperatureC)));
    }

    @Override
    public double fromNm() {
        return FORM.fromNm();
    }

    @Override
    public double toNm() {
        return FORM.toNm();
    }

    /** Density of liquid water at 1 atm in kg/m³, 0 to 100 °C; 998.204 at 20 °C (Kell 1975). */
    public static double densityKgPerM3(double temperatureC) {
        double t = Refusal.within("Water temperature in °C", temperatureC, 0, 100);
        double top = 999.83952
                + t * (16.945176 + t * (-7.9870401e-3 + t * (-46.170461e-6 + t * (105.56302e-9 - t * 280.54253e-12))));
        return top / (1 + 16.879850e-3 * t);
    }

    /** R9-97 eq. 1, which is (n² − 1)/(n² + 2), solved for n; for wavelength in nm, temperature in °C and density in kg/m³. */
    static double index(double wavelengthNm, double temperatureC, double densityKgPerM3) {
        double rho = densityKgPerM3 / 1000;
        double t = (temperatureC + 273.15) / 273.15;
        double l = wavelengthNm / 589;
        double l2 = l * l;
        double refraction = rho
                * (A0
                        + A1 * rho
                        + A2 * t
                        + A3 * l2 * t
                        + A4 / l2
                        + A5 / (l2 - ULTRAVIOLET * ULTRAVIOLET)
                        + A6 / (l2 - INFRARED * INFRARED)
                        + A7 * rho * rho);
        return Math.sqrt((1 + 2 * refraction) / (1 - refraction));
    }
}
