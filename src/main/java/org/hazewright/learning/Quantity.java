package org.hazewright.learning;

/** What an ingredient adds to a phantom and a method measures of it: absorption µa or reduced scattering µs', 1/cm. */
public enum Quantity {
    ABSORPTION("absorption", "µa"),
    SCATTERING("scattering", "µs'");

    private final String word;
    private final String sign;

    Quantity(String word, String sign) {
        this.word = word;
        this.sign = sign;
    }

    public String word() {
        return word;
    }

    public String sign() {
        return sign;
    }
}
