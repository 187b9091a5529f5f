package org.hazewright.shelf;

import java.time.LocalDate;
import java.util.Optional;

/**
 * One bottle or delivery of an ingredient: what it is a lot of, its number and its dates.
 *
 * @param drift what was seen of its figures moving, as a sentence; empty for a lot that keeps still
 */
public record Lot(
        String of,
        String number,
        Optional<LocalDate> received,
        Optional<LocalDate> opened,
        Optional<LocalDate> expires,
        Optional<String> drift) {

    /** A lot of which no drift is known. */
    public Lot(
            String of,
            String number,
            Optional<LocalDate> received,
            Optional<LocalDate> opened,
            Optional<LocalDate> expires) {
        this(of, number, received, opened, expires, Optional.empty());
    }

    public Lot drifting(String sentence) {
        return new Lot(of, number, received, opened, expires, Optional.of(sentence));
    }

    /** The name of what is in the bottle with the lot's number behind it, once: a lot's file may have put it there. */
    public String named(String name) {
        String behind = ", lot " + number;
        return name.endsWith(behind) ? name : name + behind;
    }

    /** Whether the lot is past its date on a given day. */
    public boolean expiredOn(LocalDate day) {
        return expires.map(day::isAfter).orElse(false);
    }
}
