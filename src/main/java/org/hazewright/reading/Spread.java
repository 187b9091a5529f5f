package org.hazewright.reading;

import org.hazewright.optics.Refusal;

/** Standard uncertainties of µa and µs', 1/cm, 0 or above; taken as independent of each other. */
public record Spread(double uMuaPerCm, double uMuspPerCm) {
    public static final Spread NONE = new Spread(0, 0);

    public Spread {
        Refusal.notNegative("Standard uncertainty of µa in 1/cm", uMuaPerCm);
        Refusal.notNegative("Standard uncertainty of µs' in 1/cm", uMuspPerCm);
    }
}
