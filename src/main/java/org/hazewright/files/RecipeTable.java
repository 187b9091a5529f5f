package org.hazewright.files;

import java.util.Arrays;
import java.util.List;
import org.hazewright.bench.Weighing;
import org.hazewright.mixture.Coefficients;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;

/** A recipe as CSV tables: what is weighed, in the order of work, and what it does to light. */
public final class RecipeTable {
    private RecipeTable() {}

    /** A row a weighing: grams, the lot, the stock it makes (empty for the vessel), and grams per mL of the finished volume. */
    public static String grams(Recipe recipe, Mixture mixture) {
        CsvText out = new CsvText()
                .row(List.of("number", "what", "ingredient", "lot", "into_stock", "mass_g", "concentration_g_per_ml"));
        List<Weighing> all = Weighing.of(recipe);
        for (int n = 0; n < all.size(); n++) {
            Weighing w = all.get(n);
            out.row(Arrays.asList(
                    n + 1,
                    w.label(),
                    w.ingredient().id(),
                    lot(recipe, w),
                    w.into().orElse(null),
                    w.massG(),
                    w.role() == Weighing.Role.ITEM ? w.massG() / mixture.volumeMl() : null));
        }
        return out.toString();
    }

    private static String lot(Recipe recipe, Weighing w) {
        return switch (w.role()) {
            case ITEM -> {
                Item i = recipe.items().get(w.place());
                yield i.lot()
                        .or(() -> i.ingredient().lot().map(l -> l.number()))
                        .orElse(null);
            }
            case STOCK_SUBSTANCE -> {
                Stock s = recipe.stocks().get(w.place());
                yield s.lot()
                        .or(() -> s.ingredient().lot().map(l -> l.number()))
                        .orElse(null);
            }
            case STOCK_DILUENT -> null;
        };
    }

    /** A row a wavelength, in 1/cm, with standard uncertainties in the order of {@code nm}. */
    public static String coefficients(Mixture mixture, double[] nm, double[] uMuaPerCm, double[] uMuspPerCm) {
        CsvText out = new CsvText()
                .row(List.of(
                        "wavelength_nm",
                        "mua_per_cm",
                        "u_mua_per_cm",
                        "musp_per_cm",
                        "u_musp_per_cm",
                        "mus_per_cm",
                        "g",
                        "n"));
        for (int j = 0; j < nm.length; j++) {
            Coefficients c = mixture.at(nm[j]);
            out.row(List.of(
                    nm[j],
                    c.muaPerCm(),
                    uMuaPerCm[j],
                    c.muspPerCm(),
                    uMuspPerCm[j],
                    c.musPerCm(),
                    c.g(),
                    c.boundaryIndex()));
        }
        return out.toString();
    }
}
