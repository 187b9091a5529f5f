package org.hazewright.batch;

import java.util.ArrayList;
import java.util.HashSet;
import java.util.List;
import java.util.Set;
import java.util.stream.Collectors;
import org.hazewright.bench.Weighing;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Stock;

/** What measured values rest on while a batch is not wholly weighed: planned grams, or the batch before a correction. */
public final class Unweighed {
    private Unweighed() {}

    /** A sentence for each gap; none when everything that was in the vessel is weighed. */
    public static List<String> of(Batch batch) {
        List<String> sentences = new ArrayList<>();
        int begun = batch.correctionsBegun();
        List<String> open = new ArrayList<>();
        Set<String> stocks = stocks(batch, begun);
        List<Weighing> all = batch.weighings();
        for (int n = 0; n < all.size(); n++) {
            Weighing w = all.get(n);
            boolean counts = w.into().map(stocks::contains).orElse(true)
                    && (w.role() != Weighing.Role.ITEM || batch.corrections().get(w.place()) <= begun);
            if (counts && !batch.weighed(n)) open.add((n + 1) + " " + w.label());
        }
        if (!open.isEmpty())
            sentences.add("No grams are recorded at " + (open.size() == 1 ? "weighing " : "weighings ")
                    + open.stream().collect(Collectors.joining(", "))
                    + ", so the planned grams stand in for them; what was predicted is only as good as that.");
        if (begun < batch.correctionCount())
            sentences.add("Nothing of correction " + (begun + 1)
                    + " is weighed yet, so these values count for the batch before it.");
        return sentences;
    }

    /** Stocks that something of the first corrections is drawn from, those that a stock is made of included. */
    private static Set<String> stocks(Batch batch, int begun) {
        Set<String> used = new HashSet<>();
        List<Item> items = batch.plan().items();
        for (int k = 0; k < items.size(); k++)
            if (batch.corrections().get(k) <= begun) items.get(k).stock().ifPresent(used::add);
        List<Stock> stocks = batch.plan().stocks();
        for (int k = stocks.size() - 1; k >= 0; k--)
            if (used.contains(stocks.get(k).id())) stocks.get(k).from().ifPresent(used::add);
        return used;
    }
}
