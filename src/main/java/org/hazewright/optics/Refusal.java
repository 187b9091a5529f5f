package org.hazewright.optics;

/**
 * Input that cannot be used, said once, in words for the person who gave it: what was found, what is allowed, how to mend.
 *
 * <p>Domain values throw it from their constructors and models throw it outside their range; readers of files add the file
 * and line ({@code files.FileRefusal}). The message is shown as it stands, so it names no class and no method.
 */
public class Refusal extends RuntimeException {
    public Refusal(String message) {
        super(message);
    }

    public Refusal(String message, Throwable cause) {
        super(message, cause);
    }

    /** Refuses numbers that are not finite or not above zero; {@code what} names the quantity with its unit. */
    public static double positive(String what, double value) {
        if (!(value > 0) || Double.isInfinite(value))
            throw new Refusal(what + " is " + value + "; it must be a number above 0.");
        return value;
    }

    /** Refuses numbers that are not finite or are below zero. */
    public static double notNegative(String what, double value) {
        if (!(value >= 0) || Double.isInfinite(value))
            throw new Refusal(what + " is " + value + "; it must be a number, 0 or above.");
        return value;
    }

    /** Refuses numbers outside the closed interval [{@code low}, {@code high}]. */
    public static double within(String what, double value, double low, double high) {
        if (!(value >= low && value <= high))
            throw new Refusal(what + " is " + value + "; it must lie between " + low + " and " + high + ".");
        return value;
    }
}
