package org.hazewright.learning;

import java.time.LocalDate;
import java.util.List;
import org.hazewright.mixture.Budget;
import org.hazewright.mixture.Cause;
import org.hazewright.mixture.Coefficients;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Recipe;
import org.hazewright.optics.Refusal;

/**
 * One making of a recipe and what was measured of it.
 *
 * @param mixture as made: the grams that were really weighed
 * @param making what weighing, stocks, densities and volume add to the prediction, at the wavelengths of {@link #wavelengthsNm};
 *     such errors belong to this batch alone
 */
public record MeasuredBatch(
        String name, LocalDate on, Mixture mixture, List<Cause> making, Method method, List<MeasuredValue> values) {

    public MeasuredBatch {
        making = List.copyOf(making);
        values = List.copyOf(values);
        if (values.isEmpty())
            throw new Refusal(
                    "The batch " + name + " has no measured values; give µa or µs' at one wavelength or more.");
        int points = wavelengths(values).length;
        for (Cause c : making)
            if (c.muaPerCm().length != points || c.muspPerCm().length != points)
                throw new Refusal("The batch " + name + " was measured at " + points + " wavelengths, but \"" + c.name()
                        + "\" is given at " + c.muaPerCm().length + ".");
    }

    /**
     * From the recipe as made, {@code capacityG} being the balance's. What the budget says of the ingredients' coefficients is left out:
     * those are the factors to be learned.
     */
    public static MeasuredBatch of(
            String name, LocalDate on, Recipe asMade, double capacityG, Method method, List<MeasuredValue> values) {
        Budget budget = Budget.of(asMade, wavelengths(values), capacityG);
        List<Cause> making = budget.causes().stream()
                .filter(c -> c.kind() != Cause.Kind.ABSORPTION && c.kind() != Cause.Kind.SCATTERING)
                .toList();
        return new MeasuredBatch(name, on, Mixture.of(asMade), making, method, values);
    }

    private static double[] wavelengths(List<MeasuredValue> values) {
        return values.stream()
                .mapToDouble(MeasuredValue::wavelengthNm)
                .sorted()
                .distinct()
                .toArray();
    }

    /** Wavelengths measured, in nm, ascending, each once. */
    public double[] wavelengthsNm() {
        return wavelengths(values);
    }

    /** What an ingredient adds to a coefficient, 1/cm. */
    static double of(Coefficients.Share share, Quantity quantity) {
        return quantity == Quantity.ABSORPTION ? share.muaPerCm() : share.muspPerCm();
    }
}
