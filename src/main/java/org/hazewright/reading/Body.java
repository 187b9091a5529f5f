package org.hazewright.reading;

import java.util.Arrays;
import org.hazewright.optics.Refusal;

/**
 * What a phantom is cast in, as far as light feels it: its thickness along the beam, and the way from the middle of the lit face to
 * the nearest side wall, both mm. {@code wallMm} is infinite where nothing is known of walls.
 */
public record Body(double thicknessMm, double wallMm) {
    public Body {
        Refusal.within("Thickness in mm", thicknessMm, 1e-3, 1e4);
        if (!(wallMm > 0)) throw new Refusal("Way to the side wall in mm is " + wallMm + "; it must be above 0.");
    }

    /** A slab whose walls are far away. */
    public static Body slab(double thicknessMm) {
        return new Body(thicknessMm, Double.POSITIVE_INFINITY);
    }

    /** A block lit in the middle of its largest face: its shortest side is the way through. */
    public static Body box(double lengthMm, double widthMm, double heightMm) {
        double[] sides = {lengthMm, widthMm, heightMm};
        Arrays.sort(sides);
        return new Body(sides[0], sides[1] / 2);
    }

    /** A cylinder lit in the middle of its flat face. */
    public static Body cylinder(double diameterMm, double heightMm) {
        return new Body(heightMm, diameterMm / 2);
    }
}
