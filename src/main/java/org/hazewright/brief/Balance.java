package org.hazewright.brief;

import org.hazewright.optics.Figures;
import org.hazewright.optics.Refusal;

/** The balance at hand, in g: its last digit, its standard uncertainty, the smallest load to trust and its capacity. */
public record Balance(double readabilityG, double standardUncertaintyG, double smallestLoadG, double capacityG) {

    /** A common laboratory balance: 1 mg, from 20 mg to 220 g. */
    public static final Balance USUAL = new Balance(0.001, 0.001, 0.020, 220);

    private static final double LEAST_G = 1e-9;
    private static final double MOST_G = 1e6;

    public Balance {
        Refusal.positive("Readability of the balance in g", readabilityG);
        Refusal.notNegative("Standard uncertainty of the balance in g", standardUncertaintyG);
        Refusal.notNegative("Smallest load of the balance in g", smallestLoadG);
        Refusal.positive("Capacity of the balance in g", capacityG);
        if (readabilityG < LEAST_G || capacityG > MOST_G)
            throw new Refusal(
                    "The balance reads to " + Figures.plain(readabilityG) + " g and up to " + Figures.plain(capacityG)
                            + " g; readabilities from 0.000000001 g and capacities up to 1000000 g are known. Check the units.");
        if (capacityG <= smallestLoadG)
            throw new Refusal("The balance's capacity of " + capacityG + " g is not above its smallest load of "
                    + smallestLoadG + " g.");
        if (readabilityG > capacityG)
            throw new Refusal("The balance's readability of " + readabilityG + " g is above its capacity of "
                    + capacityG + " g.");
    }

    /** Rounded to what the display can show. */
    public double rounded(double massG) {
        double steps = Math.rint(massG / readabilityG);
        // Decimal readabilities are not binary: multiply back through the decimal text to print 12.345, not
        // 12.345000000000001.
        return java.math.BigDecimal.valueOf(steps)
                .multiply(java.math.BigDecimal.valueOf(readabilityG))
                .doubleValue();
    }

    /** Digits after the point that the display shows. */
    public int decimals() {
        return Math.max(
                0,
                java.math.BigDecimal.valueOf(readabilityG).stripTrailingZeros().scale());
    }

    /** Loads needed for a mass: 1, or as many as the capacity asks for. */
    public int loads(double massG) {
        return (int) Math.max(1, Math.ceil(massG / capacityG - 1e-9));
    }
}
