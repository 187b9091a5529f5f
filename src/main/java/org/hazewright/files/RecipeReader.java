package org.hazewright.files;

import java.nio.file.Path;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.Optional;
import java.util.stream.Collectors;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Part;
import org.hazewright.shelf.Shelf;

/**
 * A recipe or batch file to a {@link Recipe}, its ingredients found on a shelf.
 *
 * <p>An item's or stock's {@code lot} whose number the shelf has a file of brings that lot's figures; another number is only
 * carried along. A file called {@code *.batch.toml} is a {@link BatchReader batch}, and then the recipe is what was made: grams as weighed, what
 * heating took, corrections.
 */
public final class RecipeReader {
    private static final double USUAL_UNCERTAINTY_G = 0.001;

    private final TomlPage page;
    private final Shelf shelf;
    private final boolean batch;

    private RecipeReader(TomlPage page, Shelf shelf, boolean batch) {
        this.page = page;
        this.shelf = shelf;
        this.batch = batch;
    }

    public static Recipe read(Path file, Shelf shelf) {
        if (isBatch(file)) return BatchReader.asMade(file, shelf);
        return new RecipeReader(TomlPage.read(file), shelf, false).recipe();
    }

    /** Whether a file is a batch by its name. */
    public static boolean isBatch(Path file) {
        return file.toString().toLowerCase(Locale.ROOT).endsWith(".batch.toml");
    }

    /** The grams as planned of a batch's page. */
    static Recipe planned(TomlPage page, Shelf shelf) {
        return new RecipeReader(page, shelf, true).recipe();
    }

    private Recipe recipe() {
        page.requireFormat(batch ? FileKind.BATCH : FileKind.RECIPE);
        known(
                page,
                List.of(
                        "format",
                        "title",
                        "base",
                        "temperature_c",
                        "brief_sha256",
                        "balance_standard_uncertainty_g",
                        "stock",
                        "item"),
                BatchReader.KEYS);
        String title = page.text("title", page.has("base") ? page.text("base") : "");
        Ingredient base = ingredient(page, "base");
        if (base.part() != Part.BASE)
            throw page.refusal(
                    "base",
                    "\"" + base.id() + "\" is no base (its file says part = \""
                            + base.part().word()
                            + "\"); the base of a recipe must be one of "
                            + shelf.ingredients().stream()
                                    .filter(i -> i.part() == Part.BASE)
                                    .map(Ingredient::id)
                                    .collect(Collectors.joining(", "))
                            + ".");
        double temperatureC = page.within("temperature_c", 0, 100, 22);
        double uncertainty = page.has("balance_standard_uncertainty_g")
                ? page.notNegative("balance_standard_uncertainty_g")
                : USUAL_UNCERTAINTY_G;
        Optional<String> sha = page.maybeText("brief_sha256");
        if (sha.isPresent() && !sha.get().matches("[0-9a-f]{64}"))
            throw page.refusal(
                    "brief_sha256",
                    "brief_sha256 must be 64 hexadecimal digits in lower case; take the line out if the"
                            + " recipe was written by hand.");
        Map<String, Stock> stocks = new LinkedHashMap<>();
        for (TomlPage table : page.tables("stock")) {
            Stock stock = stock(table, stocks);
            if (stocks.put(stock.id(), stock) != null)
                throw table.refusal("id", "Two stocks are called \"" + stock.id() + "\"; give each its own id.");
        }
        List<Item> items = new ArrayList<>();
        for (TomlPage table : page.tables("item")) items.add(item(table, stocks));
        if (items.isEmpty())
            throw page.at()
                    .refusal(
                            "The recipe has no [[item]]; there is nothing to weigh. The base is an item like the rest.");
        return page.at()
                .of(() -> new Recipe(title, base, temperatureC, uncertainty, sha, List.copyOf(stocks.values()), items));
    }

    private void known(TomlPage table, List<String> always, List<String> inBatches) {
        List<String> known = new ArrayList<>(always);
        if (batch) known.addAll(inBatches);
        table.refuseUnknown(known);
    }

    private Stock stock(TomlPage table, Map<String, Stock> earlier) {
        known(
                table,
                List.of("id", "ingredient", "stock", "lot", "ingredient_g", "diluent", "diluent_g"),
                List.of("ingredient_weighed_g", "diluent_weighed_g"));
        String id = table.text("id");
        Optional<String> lot = table.maybeText("lot");
        double grams = grams(table, "ingredient_g", "ingredient_weighed_g");
        if (!(grams > 0))
            throw table.refusal(
                    "ingredient_g", "ingredient_g is 0; a stock holds something. Write its grams, or delete it.");
        Optional<Stock> from = source(table, earlier);
        Ingredient ingredient =
                from.isPresent() ? from.get().ingredient() : lotOf(weighable(table, "ingredient"), lot, table);
        Ingredient diluent = weighable(table, "diluent");
        double diluentG = grams(table, "diluent_g", "diluent_weighed_g");
        if (!(diluentG > 0))
            throw table.refusal(
                    "diluent_g", "diluent_g is 0; a stock is diluted. Weigh the ingredient itself instead.");
        Optional<String> ownLot = lot.isPresent() ? lot : from.flatMap(Stock::lot);
        return table.at().of(() -> new Stock(id, ingredient, ownLot, grams, diluent, diluentG, from.map(Stock::id)));
    }

    private Item item(TomlPage table, Map<String, Stock> stocks) {
        known(table, List.of("ingredient", "stock", "lot", "mass_g"), List.of("weighed_g", "correction", "note"));
        Optional<Stock> from = source(table, stocks);
        double grams = grams(table, "mass_g", "weighed_g");
        Optional<String> lot = table.maybeText("lot");
        if (from.isPresent())
            return new Item(
                    from.get().ingredient(),
                    Optional.of(from.get().id()),
                    lot.isPresent() ? lot : from.get().lot(),
                    grams);
        Ingredient ingredient = weighable(table, "ingredient");
        return new Item(lotOf(ingredient, lot, table), Optional.empty(), lot, grams);
    }

    /** The stock that {@code stock = "…"} names; empty when the table has an {@code ingredient} instead. */
    private Optional<Stock> source(TomlPage table, Map<String, Stock> stocks) {
        if (table.has("ingredient") && table.has("stock"))
            throw table.refusal("stock", "Here stand an ingredient and a stock; keep the one that is really weighed.");
        if (!table.has("ingredient") && !table.has("stock"))
            throw table.at().refusal("Here stands neither an ingredient nor a stock; say what is weighed.");
        if (!table.has("stock")) return Optional.empty();
        String id = table.text("stock");
        Stock stock = stocks.get(id);
        if (stock == null)
            throw table.refusal(
                    "stock",
                    "No [[stock]] before this line is called \"" + id + "\""
                            + (stocks.isEmpty()
                                    ? "; add it above."
                                    : "; there are " + String.join(", ", stocks.keySet()) + "."));
        return Optional.of(stock);
    }

    private double grams(TomlPage table, String planned, String weighed) {
        if (batch && table.has(weighed) && !table.has(planned)) return table.notNegative(weighed);
        return table.notNegative(planned);
    }

    private Ingredient ingredient(TomlPage table, String key) {
        String id = table.text(key);
        return table.holding(key, () -> shelf.require(id));
    }

    private Ingredient weighable(TomlPage table, String key) {
        Ingredient found = ingredient(table, key);
        if (found.isBlend())
            throw table.refusal(
                    key,
                    "\"" + found.id() + "\" is a blend and is weighed as its parts; for each gram of it: "
                            + found.blend().stream()
                                    .map(p -> TomlPage.plain(p.massFraction()) + " g " + p.ingredient())
                                    .collect(Collectors.joining(", "))
                            + ". Write one entry for each.");
        return found;
    }

    private Ingredient lotOf(Ingredient named, Optional<String> number, TomlPage table) {
        if (number.isEmpty()) return named;
        if (named.lot().isPresent()) {
            if (!named.lot().get().number().equals(number.get()))
                throw table.refusal(
                        "lot",
                        "The lot is \"" + number.get() + "\", and \"" + named.id() + "\" is the lot \""
                                + named.lot().get().number() + "\"; make the two agree.");
            return named;
        }
        return shelf.ingredients().stream()
                .filter(i -> i.lot().isPresent()
                        && i.kind().equals(named.id())
                        && i.lot().get().number().equals(number.get()))
                .findFirst()
                .orElse(named);
    }
}
