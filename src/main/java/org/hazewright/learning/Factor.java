package org.hazewright.learning;

import org.hazewright.shelf.Ingredient;

/**
 * A number near 1 that is not known exactly: what an ingredient's absorption or scattering is over what its file says, or what a
 * method reads over what is there.
 *
 * <p>One for the whole spectrum, without unit. {@code name} is the ingredient's id or the method's name.
 */
public record Factor(Kind kind, String name, Quantity quantity) {

    /** Whose factor it is. */
    public enum Kind {
        INGREDIENT,
        METHOD
    }

    public static Factor of(Ingredient ingredient, Quantity quantity) {
        return new Factor(Kind.INGREDIENT, ingredient.id(), quantity);
    }

    public static Factor of(Method method, Quantity quantity) {
        return new Factor(Kind.METHOD, method.name(), quantity);
    }

    /** For a sentence: "ink-demo absorption", "the µa scale of time-resolved fit". */
    public String words() {
        return kind == Kind.INGREDIENT ? name + " " + quantity.word() : "the " + quantity.sign() + " scale of " + name;
    }
}
