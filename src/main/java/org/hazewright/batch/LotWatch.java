package org.hazewright.batch;

import java.time.LocalDate;
import java.util.ArrayList;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import org.hazewright.bench.LotDoubt;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Lot;
import org.hazewright.shelf.Shelf;

/**
 * Lots that should not be used without a second thought: past their date on the day of making, or with figures that were seen to move.
 *
 * <p>A bottle's lot is the lot file that a recipe names, or the one on the shelf with the number that was written down at the balance.
 */
public final class LotWatch {
    private LotWatch() {}

    /** A sentence for every doubtful lot of a batch on its own day; empty when there is none. */
    public static List<String> of(Batch batch, Shelf shelf) {
        Set<String> sentences = new LinkedHashSet<>();
        Recipe made = batch.asMade();
        for (Stock s : made.stocks()) watch(s.ingredient(), s.lot(), batch.on(), shelf, sentences);
        for (Stock s : made.stocks()) watch(s.diluent(), Optional.empty(), batch.on(), shelf, sentences);
        for (Item i : made.items()) watch(i.ingredient(), i.lot(), batch.on(), shelf, sentences);
        return new ArrayList<>(sentences);
    }

    private static void watch(Ingredient i, Optional<String> typed, LocalDate day, Shelf shelf, Set<String> sentences) {
        Optional<Ingredient> bottle =
                i.lot().isPresent() && typed.filter(n -> !isNumber(i, n)).isEmpty()
                        ? Optional.of(i)
                        : typed.flatMap(number -> shelf.ingredients().stream()
                                .filter(k -> k.kind().equals(i.kind()) && isNumber(k, number))
                                .findFirst());
        bottle.ifPresent(b -> {
            Lot lot = b.lot().orElseThrow();
            LotDoubt.expired(b, lot, day).ifPresent(sentences::add);
            LotDoubt.drifting(b, lot).ifPresent(sentences::add);
        });
    }

    private static boolean isNumber(Ingredient i, String number) {
        return i.lot().filter(l -> l.number().equalsIgnoreCase(number.strip())).isPresent();
    }
}
