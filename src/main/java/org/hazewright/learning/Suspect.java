package org.hazewright.learning;

/**
 * What freeing one factor does to a batch that was measured: the figure of its file and its uncertainty put aside.
 *
 * @param fall of χ², and {@code pFall} the probability of such a fall when nothing is wrong, for this factor by itself
 * @param left χ² that remains, and {@code pLeft} the probability of what remains, by the verdict's own tests
 * @param estimate of the factor from this batch alone, and {@code u} its standard uncertainty
 * @param inStandardUncertainties shift over the uncertainty that was stated for the factor; infinite where none was
 */
public record Suspect(
        Factor factor,
        double fall,
        double pFall,
        double left,
        double pLeft,
        double estimate,
        double u,
        double inStandardUncertainties) {

    /** Whether this factor alone brings measured and predicted together. */
    public boolean explains() {
        return pLeft >= StraightLine.LEVEL && estimate > 0;
    }

    /** For a sentence: "ink-demo absorption, 12 % above its file's figure (2.4 of its standard uncertainties)". */
    String words() {
        double off = estimate - 1;
        String size = factor.words() + ", " + Rounded.percent(Math.abs(off)) + (off < 0 ? " below " : " above ")
                + (factor.kind() == Factor.Kind.METHOD ? "true" : "its file's figure");
        return Double.isInfinite(inStandardUncertainties)
                ? size + " (held to be exact until now)"
                : size + " (" + Rounded.number(Math.abs(inStandardUncertainties)) + " of its standard uncertainties)";
    }
}
