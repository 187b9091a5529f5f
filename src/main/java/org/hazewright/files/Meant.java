package org.hazewright.files;

import java.util.Collection;
import java.util.TreeSet;
import org.hazewright.shelf.Nearest;

/** What was meant by a key or column that is not known: the same thing in another unit, a slip of the keys, or one of a list. */
final class Meant {
    /** A known unit's ending, the ending of another unit of the same thing, and how to get from a number in that to the known one. */
    private record Conversion(String known, String other, String how) {}

    private static final Conversion[] CONVERSIONS = {
        new Conversion("_per_cm", "_per_mm", "10 times the number per mm"),
        new Conversion("_per_cm", "_per_m", "a hundredth of the number per m"),
        new Conversion("_nm", "_um", "1000 times the number in µm"),
        new Conversion("_nm", "_mm", "1 000 000 times the number in mm"),
        new Conversion("_ml", "_l", "1000 times the number in L"),
        new Conversion("_ml", "_ul", "a thousandth of the number in µL"),
        new Conversion("_g", "_mg", "a thousandth of the number in mg"),
        new Conversion("_g", "_kg", "1000 times the number in kg"),
        new Conversion("_mm", "_cm", "10 times the number in cm"),
        new Conversion("_c", "_k", "the number in kelvin less 273.15"),
    };

    private Meant() {}

    /** A sentence with a blank before it. */
    static String by(String word, Collection<String> known) {
        for (Conversion c : CONVERSIONS)
            if (word.endsWith(c.other())) {
                String same = word.substring(0, word.length() - c.other().length()) + c.known();
                if (known.contains(same)) return " Perhaps " + same + " is meant: " + c.how() + ".";
            }
        return Nearest.to(word, known)
                .map(n -> " Perhaps " + n + " is meant.")
                .orElse(" Known here: " + String.join(", ", new TreeSet<>(known)) + ".");
    }
}
