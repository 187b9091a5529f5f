package org.hazewright.learning;

import java.util.List;
import java.util.Optional;

/**
 * What a dilution series says at one wavelength: extinction per concentration, and whether the line deserves belief.
 *
 * @param readings in the order of {@code line.points()}
 * @param linearity empty when too few dilutions are left to test it
 */
public record Extinction(
        double wavelengthNm,
        List<DilutionReading> readings,
        StraightLine line,
        Optional<Linearity> linearity,
        double albedo) {

    public Extinction {
        readings = List.copyOf(readings);
    }

    /** Extinction by mass, cm²/g: 1/cm for each g/mL. */
    public double cm2PerG() {
        return line.slope();
    }

    public double uCm2PerG() {
        return line.uSlope();
    }

    /** Absorbed part, cm²/g. */
    public double absorbedCm2PerG() {
        return (1 - albedo) * line.slope();
    }

    /** Relative standard error of the slope. */
    public double relativeU() {
        return line.uSlope() / Math.abs(line.slope());
    }

    /** Largest µs·d among the readings. */
    public double largestScatteringDepth() {
        return readings.stream()
                .mapToDouble(r -> albedo * r.opticalDepth())
                .max()
                .orElse(0);
    }

    /** Largest absorbance among the readings, base 10. */
    public double largestAbsorbance() {
        return readings.stream()
                        .mapToDouble(DilutionReading::opticalDepth)
                        .max()
                        .orElse(0)
                / Math.log(10);
    }

    /** Whether the straight line bends by the test of its quadratic term. */
    public boolean bends() {
        return linearity.map(Linearity::curved).orElse(false);
    }
}
