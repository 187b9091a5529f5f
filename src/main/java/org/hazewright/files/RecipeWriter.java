package org.hazewright.files;

import java.nio.file.Path;
import java.util.List;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;

/** A recipe as a file that a person can read at the balance and that {@link RecipeReader} reads back equal. */
public final class RecipeWriter {
    private RecipeWriter() {}

    public static void write(Path file, Recipe recipe, SafeFile.Overwrite policy) {
        write(file, recipe, List.of(), policy);
    }

    /** {@code notes} stand as comments at the top, one line each. */
    public static void write(Path file, Recipe recipe, List<String> notes, SafeFile.Overwrite policy) {
        SafeFile.write(file, text(recipe, notes), policy);
    }

    public static String text(Recipe recipe, List<String> notes) {
        StringBuilder out = new StringBuilder();
        for (String note : notes) line(out, TomlText.comment(note));
        line(out, "format = 1");
        line(out, "title = " + TomlText.text(recipe.title()));
        line(out, "base = " + TomlText.text(recipe.base().id()));
        line(out, "temperature_c = " + TomlText.number(recipe.temperatureC()));
        line(out, "balance_standard_uncertainty_g = " + TomlText.number(recipe.weighingUncertaintyG()));
        recipe.briefSha256().ifPresent(sha -> line(out, "brief_sha256 = " + TomlText.text(sha)));
        for (Stock stock : recipe.stocks()) write(out, stock);
        for (Item item : recipe.items()) write(out, item);
        return out.toString();
    }

    private static void write(StringBuilder out, Stock stock) {
        line(out, "");
        line(out, "[[stock]]");
        line(out, "id = " + TomlText.text(stock.id()));
        if (stock.from().isPresent())
            line(out, "stock = " + TomlText.text(stock.from().get()));
        else
            line(
                    out,
                    "ingredient = " + TomlText.text(stock.ingredient().id())
                            + named(stock.ingredient().name()));
        stock.lot().ifPresent(lot -> line(out, "lot = " + TomlText.text(lot)));
        line(out, "ingredient_g = " + TomlText.number(stock.ingredientG()));
        line(out, "diluent = " + TomlText.text(stock.diluent().id()));
        line(out, "diluent_g = " + TomlText.number(stock.diluentG()));
    }

    private static void write(StringBuilder out, Item item) {
        line(out, "");
        line(out, "[[item]]");
        if (item.stock().isPresent())
            line(out, "stock = " + TomlText.text(item.stock().get()));
        else
            line(
                    out,
                    "ingredient = " + TomlText.text(item.ingredient().id())
                            + named(item.ingredient().name()));
        item.lot().ifPresent(lot -> line(out, "lot = " + TomlText.text(lot)));
        line(out, "mass_g = " + TomlText.number(item.massG()));
    }

    private static String named(String name) {
        return "    " + TomlText.comment(name);
    }

    private static void line(StringBuilder out, String text) {
        out.append(text).append('\n');
    }
}
