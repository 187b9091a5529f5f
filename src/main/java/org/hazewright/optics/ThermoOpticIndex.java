package org.hazewright.optics;

/**
 * An index that was measured at one temperature and moves with it: n(λ, T) = n(λ, T₀) + (T − T₀) dn/dT; k does not move.
 *
 * <p>A liquid grows when it is warmed and refracts less: dn/dT is near −1e-4 per °C for water, −4e-4 for oils and silicones, −1e-4
 * for hard plastics, +1e-5 for silica. Taken as one number over the wavelengths, which is good to a few per cent of the shift.
 * Domain: |dn/dT| ≤ 2e-3 per °C, 0 ≤ T₀ ≤ 100 °C; the range of wavelengths is that of {@code measured}. A first-order expansion, so
 * best within some 30 °C of T₀.
 *
 * @param measured the index at T₀; it is asked at T₀ only
 * @param measuredC T₀ in °C
 * @param dnPerC dn/dT in 1/°C: the thermo-optic coefficient
 */
public record ThermoOpticIndex(RefractiveIndex measured, double measuredC, double dnPerC) implements RefractiveIndex {
    private static final double MOST = 2e-3;

    public ThermoOpticIndex {
        Refusal.within("Temperature in °C at which a refractive index was measured", measuredC, 0, 100);
        Refusal.within("Change of a refractive index per °C", dnPerC, -MOST, MOST);
    }

    @Override
    public Index at(double wavelengthNm, double temperatureC) {
        Index then = measured.at(wavelengthNm, measuredC);
        return new Index(then.n() + (temperatureC - measuredC) * dnPerC, then.k());
    }

    @Override
    public double fromNm() {
        return measured.fromNm();
    }

    @Override
    public double toNm() {
        return measured.toNm();
    }
}
