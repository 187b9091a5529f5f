package org.hazewright.batch;

import org.hazewright.bench.Grams;
import org.hazewright.optics.Refusal;

/**
 * Water lost while heating and given back, in g: the vessel with its contents on the balance before and after, and what was
 * poured back.
 */
public record Heating(double vesselBeforeG, double vesselAfterG, double waterBackG) {
    public Heating {
        Refusal.positive("Vessel before heating in g", vesselBeforeG);
        Refusal.positive("Vessel after heating in g", vesselAfterG);
        Refusal.notNegative("Water given back in g", waterBackG);
        if (vesselAfterG > vesselBeforeG)
            throw new Refusal("The vessel weighs " + Grams.plain(vesselAfterG) + " g after heating and "
                    + Grams.plain(vesselBeforeG)
                    + " g before; heating only loses water. Change the two round, or weigh again without the lid.");
    }

    /** Lost by heating, before anything was given back. */
    public double lostG() {
        return vesselBeforeG - vesselAfterG;
    }

    /** Missing in the end; below 0 when more was given back than was lost. */
    public double missingG() {
        return lostG() - waterBackG;
    }
}
