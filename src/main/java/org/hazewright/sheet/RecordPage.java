package org.hazewright.sheet;

import java.util.List;
import org.hazewright.bench.Answer;
import org.hazewright.bench.Sensitivity;
import org.hazewright.bench.Weighing;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;

/**
 * The plain facts that a program needs to read a filled-in sheet back as a batch: the format's number first, then the recipe by
 * ids. Hidden, since people have the other sheets.
 */
final class RecordPage {
    /** Number of the workbook's layout; a reader refuses one that it does not know. */
    static final int FORMAT = 1;

    private RecordPage() {}

    /** Names a weighing for good: "stock:ink-1-100:substance", "stock:ink-1-100:diluent", "item:2:lipid-emulsion-20". */
    static String key(Weighing w) {
        return switch (w.role()) {
            case STOCK_SUBSTANCE -> "stock:" + w.into().orElseThrow() + ":substance";
            case STOCK_DILUENT -> "stock:" + w.into().orElseThrow() + ":diluent";
            case ITEM -> "item:" + (w.place() + 1) + ":" + w.label();
        };
    }

    static void name(Page page, Names names) {
        names.give(Names.FORMAT, page.address(0, 1));
    }

    static void write(Page page, Answer answer, List<Sensitivity> bands) {
        Recipe recipe = answer.recipe();
        page.columns(220, 170, 170, 170, 110, 90);
        int row = 0;
        page.text(row, 0, "format", Face.TEXT);
        page.number(row++, 1, FORMAT, Face.TEXT);
        row = pair(page, row, "title", recipe.title());
        row = pair(page, row, "base", recipe.base().id());
        page.text(row, 0, "temperature_c", Face.TEXT);
        page.number(row++, 1, recipe.temperatureC(), Face.TEXT);
        page.text(row, 0, "weighing_uncertainty_g", Face.TEXT);
        page.number(row++, 1, recipe.weighingUncertaintyG(), Face.TEXT);
        row = pair(page, row, "brief", answer.brief().name());
        row = pair(page, row, "brief_sha256", recipe.briefSha256().orElse(""));
        row++;
        String[] heads = {"weighing", "ingredient", "from_stock", "into_stock", "lot", "planned_g"};
        for (int c = 0; c < heads.length; c++) page.text(row, c, heads[c], Face.HEAD);
        row++;
        for (Sensitivity s : bands) {
            Weighing w = s.weighing();
            page.text(row, 0, key(w), Face.TEXT);
            page.text(row, 1, w.ingredient().id(), Face.TEXT);
            page.text(row, 2, w.from().orElse(""), Face.TEXT);
            page.text(row, 3, w.into().orElse(""), Face.TEXT);
            page.text(row, 4, lot(recipe, w), Face.TEXT);
            page.number(row++, 5, w.massG(), Face.TEXT);
        }
    }

    private static String lot(Recipe recipe, Weighing w) {
        return switch (w.role()) {
            case STOCK_SUBSTANCE -> {
                Stock s = recipe.stocks().get(w.place());
                yield s.lot().orElse("");
            }
            case STOCK_DILUENT -> "";
            case ITEM -> {
                Item i = recipe.items().get(w.place());
                yield i.lot().orElse("");
            }
        };
    }

    private static int pair(Page page, int row, String key, String value) {
        page.text(row, 0, key, Face.TEXT);
        page.text(row, 1, value, Face.TEXT);
        return row + 1;
    }
}
