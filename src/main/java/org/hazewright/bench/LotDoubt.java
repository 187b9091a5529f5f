package org.hazewright.bench;

import java.time.LocalDate;
import java.util.Optional;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Lot;

/** Sentences on a lot that should not be used without a second thought. */
public final class LotDoubt {
    private LotDoubt() {}

    /** When its date has passed on that day. */
    public static Optional<String> expired(Ingredient i, Lot lot, LocalDate day) {
        if (!lot.expiredOn(day)) return Optional.empty();
        return Optional.of(lot.named(i.name()) + ", expired on "
                + lot.expires().orElseThrow()
                + ". Use a fresh one, or measure it again before relying on its figures.");
    }

    /** When its figures were seen to move from batch to batch. */
    public static Optional<String> drifting(Ingredient i, Lot lot) {
        return lot.drift().map(d -> lot.named(i.name()) + ", is drifting: " + d);
    }
}
