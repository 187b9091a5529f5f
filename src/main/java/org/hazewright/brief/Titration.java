package org.hazewright.brief;

import java.util.OptionalDouble;
import org.hazewright.optics.Refusal;

/**
 * How a series is made in one vessel: each phantom from the one before, by adding.
 *
 * @param keepMusp whether what is added carries as much scatterer as the vessel, so that µs' stays
 * @param aliquotMl mL taken out at each step before the next addition, 0 for none
 * @param evaporationGPerStep g of water lost from one step to the next and given back, 0 for none
 * @param vesselMl mL that the vessel holds, when it is known
 */
public record Titration(boolean keepMusp, double aliquotMl, double evaporationGPerStep, OptionalDouble vesselMl) {
    public Titration {
        Refusal.notNegative("[titration] aliquot_ml", aliquotMl);
        Refusal.notNegative("[titration] evaporation_g_per_step", evaporationGPerStep);
        vesselMl.ifPresent(v -> Refusal.positive("[titration] vessel_ml", v));
    }

    public Titration(boolean keepMusp, double aliquotMl, double evaporationGPerStep) {
        this(keepMusp, aliquotMl, evaporationGPerStep, OptionalDouble.empty());
    }
}
