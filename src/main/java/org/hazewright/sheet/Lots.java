package org.hazewright.sheet;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.hazewright.bench.Batch;
import org.hazewright.bench.Weighing;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;

/** The lots that were really used, as typed at the balance, put into a batch's plan. */
final class Lots {
    private Lots() {}

    /** {@code lots} by the key of the weighing; a stock's goes on to what is drawn from it. */
    static Batch used(Batch batch, Map<String, String> lots) {
        if (lots.isEmpty()) return batch;
        Recipe r = batch.plan();
        List<Stock> stocks = new ArrayList<>(r.stocks());
        List<Item> items = new ArrayList<>(r.items());
        for (Weighing w : batch.weighings()) {
            String lot = lots.get(RecordPage.key(w));
            if (lot == null) continue;
            switch (w.role()) {
                case STOCK_SUBSTANCE -> {
                    Stock s = stocks.get(w.place());
                    stocks.set(
                            w.place(),
                            new Stock(
                                    s.id(),
                                    s.ingredient(),
                                    Optional.of(lot),
                                    s.ingredientG(),
                                    s.diluent(),
                                    s.diluentG(),
                                    s.from()));
                    for (int k = 0; k < items.size(); k++) {
                        Item i = items.get(k);
                        if (i.stock().filter(s.id()::equals).isPresent())
                            items.set(k, new Item(i.ingredient(), i.stock(), Optional.of(lot), i.massG()));
                    }
                }
                case STOCK_DILUENT -> {}
                case ITEM -> {
                    Item i = items.get(w.place());
                    if (i.stock().isEmpty())
                        items.set(w.place(), new Item(i.ingredient(), i.stock(), Optional.of(lot), i.massG()));
                }
            }
        }
        return batch.withPlan(new Recipe(
                r.title(), r.base(), r.temperatureC(), r.weighingUncertaintyG(), r.briefSha256(), stocks, items));
    }
}
