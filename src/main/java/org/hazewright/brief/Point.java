package org.hazewright.brief;

/** One wanted number: a quantity at a wavelength (nm), its value t and its half-width τ in 1/cm, and its weight. */
public record Point(Quantity quantity, double wavelengthNm, double wantedPerCm, double tolerancePerCm, double weight) {

    /** What is wanted of a phantom. */
    public enum Quantity {
        MUA("µa"),
        MUSP("µs'");

        private final String sign;

        Quantity(String sign) {
            this.sign = sign;
        }

        public String sign() {
            return sign;
        }
    }

    /** Signed difference over the half-width; within [−1, 1] is inside tolerance. */
    public double miss(double valuePerCm) {
        return (valuePerCm - wantedPerCm) / tolerancePerCm;
    }
}
