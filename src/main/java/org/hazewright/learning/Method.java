package org.hazewright.learning;

import org.hazewright.optics.Refusal;

/**
 * How a phantom was measured: a name, and the relative standard uncertainties of its scale for µa and µs'.
 *
 * <p>A scale error is the same for every value and every batch measured by the method: a wrong source distance, a wrong index.
 * It does not average out, so it is carried as a {@link Factor} of its own. 0 means that the scale is trusted.
 */
public record Method(String name, double uMuaScale, double uMuspScale) {
    public Method {
        if (name.isBlank()) throw new Refusal("A measuring method has no name; say how the values were measured.");
        Refusal.within("Relative uncertainty of the µa scale of " + name, uMuaScale, 0, 1);
        Refusal.within("Relative uncertainty of the µs' scale of " + name, uMuspScale, 0, 1);
    }

    public double uScale(Quantity quantity) {
        return quantity == Quantity.ABSORPTION ? uMuaScale : uMuspScale;
    }
}
