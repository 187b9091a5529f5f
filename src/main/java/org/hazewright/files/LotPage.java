package org.hazewright.files;

import java.util.Map;
import java.util.Set;
import java.util.TreeSet;

/**
 * A lot's file laid over that of its ingredient: the keys that the lot gives, and the ingredient's for the rest.
 *
 * <p>Tables are merged key by key where only figures differ ({@code [uncertainty]}, {@code [making]}, {@code [scattering]}, {@code
 * [absorption]}). A lot's {@code [source]} stands alone, and so does a {@code [scattering]} that names its model and an {@code
 * [absorption]} that names its table. Without a name of its own the lot is called after the ingredient and its number.
 */
final class LotPage {
    private static final Set<String> MERGED = Set.of("uncertainty", "making", "absorption", "scattering");
    private static final Map<String, String> STANDS_ALONE_WITH = Map.of("scattering", "model", "absorption", "table");

    private LotPage() {}

    static TomlPage of(TomlPage lot, TomlPage ingredient) {
        Set<String> merged = new TreeSet<>(MERGED);
        STANDS_ALONE_WITH.forEach((table, key) -> {
            if (lot.table(table).map(t -> t.has(key)).orElse(false)) merged.remove(table);
        });
        TomlPage whole = lot.over(ingredient.without("format", "id", "lot"), merged);
        if (lot.has("name")) return whole;
        String number = lot.requireTable("lot").text("number");
        return whole.withText("name", ingredient.text("name") + ", lot " + number, lot.at());
    }
}
