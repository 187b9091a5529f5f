package org.hazewright.bench;

import java.util.List;
import org.hazewright.brief.Balance;
import org.hazewright.mixture.Stock;
import org.hazewright.shelf.Ingredient;

/**
 * One way of getting an ingredient into the vessel: neat, or as an aliquot of the last stock of a chain.
 *
 * @param chain stocks in making order, each diluted from the one before; empty when the ingredient goes in neat
 * @param inHand the chain is made already
 */
record Dose(Ingredient ingredient, double massG, List<Stock> chain, boolean inHand) {
    Dose {
        chain = List.copyOf(chain);
    }

    static Dose neat(Ingredient ingredient, double massG) {
        return new Dose(ingredient, massG, List.of(), false);
    }

    boolean isNeat() {
        return chain.isEmpty();
    }

    /** Grams of the last stock that hold one gram of the ingredient; 1 when neat. */
    double dilution() {
        double dilution = 1;
        for (Stock s : chain) dilution *= s.ratio();
        return dilution;
    }

    /** Grams to weigh into the vessel, before rounding. */
    double weighedG() {
        return massG * dilution();
    }

    /** Loads on the balance that this way takes, those of stocks that must be made first included. */
    int weighings(Balance balance) {
        int count = balance.loads(weighedG());
        if (!inHand) for (Stock s : chain) count += balance.loads(s.ingredientG()) + balance.loads(s.diluentG());
        return count;
    }

    /** Grams of stock that are made and not drawn. */
    double leftG() {
        if (inHand) return 0;
        double left = 0;
        for (int k = 0; k < chain.size(); k++)
            left += chain.get(k).totalG()
                    - (k + 1 < chain.size() ? chain.get(k + 1).ingredientG() : weighedG());
        return left;
    }

    /**
     * Relative standard uncertainty of the grams that reach the vessel: every load of the chain with the balance's standard
     * uncertainty, and the last one rounded to its readability (rectangular, r/√12; JCGM 100:2008, 4.3.7). A stock of share
     * f = s/(s + d) moves by (1 − f)(δs/s − δd/d).
     */
    double relativeUncertainty(Balance balance) {
        double weighed = weighedG();
        double r = balance.readabilityG();
        double sum = (square(u(balance, weighed)) + r * r / 12) / (weighed * weighed);
        for (Stock s : chain) {
            double share = 1 / s.ratio();
            sum += square(1 - share)
                    * (square(u(balance, s.ingredientG()) / s.ingredientG())
                            + square(u(balance, s.diluentG()) / s.diluentG()));
        }
        return Math.sqrt(sum);
    }

    private static double u(Balance balance, double massG) {
        return balance.standardUncertaintyG() * Math.sqrt(balance.loads(massG));
    }

    private static double square(double x) {
        return x * x;
    }
}
