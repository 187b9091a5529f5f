package org.hazewright.brief;

import java.util.List;
import java.util.stream.Collectors;
import org.hazewright.optics.Figures;
import org.hazewright.optics.Refusal;

/** A mould to fill, inner sizes in mm: a box (length, width, height) or a cylinder (diameter, height), {@code count} of it. */
public record Mould(Shape shape, double lengthMm, double widthMm, double heightMm, int count) {
    /** For a cylinder {@code lengthMm} and {@code widthMm} are both its diameter. */
    public enum Shape {
        BOX,
        CYLINDER
    }

    public Mould {
        Refusal.positive("Length of a mould in mm", lengthMm);
        Refusal.positive("Width of a mould in mm", widthMm);
        Refusal.positive("Height of a mould in mm", heightMm);
        if (count < 1 || count > 1000)
            throw new Refusal("Count of a mould is " + count + "; it must lie between 1 and 1000.");
    }

    public static Mould cylinder(double diameterMm, double heightMm, int count) {
        return new Mould(Shape.CYLINDER, diameterMm, diameterMm, heightMm, count);
    }

    public double volumeMl() {
        double areaMm2 = shape == Shape.BOX ? lengthMm * widthMm : Math.PI / 4 * lengthMm * lengthMm;
        return count * areaMm2 * heightMm / 1000;
    }

    /** As a person says it: {@code 2 moulds of 120 × 80 × 20 mm}, inner sizes. */
    public String words() {
        String sizes = shape == Shape.BOX
                ? Figures.plain(lengthMm) + " × " + Figures.plain(widthMm) + " × " + Figures.plain(heightMm) + " mm"
                : Figures.plain(lengthMm) + " mm across and " + Figures.plain(heightMm) + " mm high";
        return (count == 1 ? "a mould of " : count + " moulds of ") + sizes;
    }

    /** Several, joined; empty for none. */
    public static String words(List<Mould> moulds) {
        return moulds.stream().map(Mould::words).collect(Collectors.joining(" and "));
    }

    /** The way that light would go through: the shortest inner size. */
    public double thicknessMm() {
        return Math.min(heightMm, Math.min(lengthMm, widthMm));
    }
}
