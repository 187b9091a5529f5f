package org.hazewright.shelf;

import java.time.LocalDate;
import java.util.Optional;

/** One bottle or delivery of an ingredient: what it is a lot of, its number and its dates. */
public record Lot(
        String of,
        String number,
        Optional<LocalDate> received,
        Optional<LocalDate> opened,
        Optional<LocalDate> expires) {

    /** Whether the lot is past its date on a given day. */
    public boolean expiredOn(LocalDate day) {
        return expires.map(day::isAfter).orElse(false);
    }
}
