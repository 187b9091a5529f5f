package org.hazewright.learning;

/**
 * A measured value against what was predicted of it.
 *
 * @param predictedPerCm 1/cm, by what was known before
 * @param uPredictedPerCm its standard uncertainty: lots, making and the method's scale, without the value's own
 * @param inStandardUncertainties measured − predicted over the standard uncertainty of that difference
 */
public record Comparison(
        String batch,
        MeasuredValue value,
        double predictedPerCm,
        double uPredictedPerCm,
        double inStandardUncertainties) {}
