package org.hazewright.sheet;

import java.util.ArrayList;
import java.util.List;
import org.apache.poi.ss.util.CellReference;
import org.hazewright.bench.Grams;
import org.hazewright.bench.Weighing;
import org.hazewright.mixture.MassSpecific;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;
import org.hazewright.shelf.Ingredient;

/**
 * What the live predictions are computed with: how weighings become grams of each ingredient, volumes, concentrations, and each
 * ingredient's mass-specific coefficients at the targets.
 *
 * <p>C_i = m_i/V, V = Σ m_i/ρ_i, µ(λ) = Σ C_i κ_i(λ). The κ hold crowding and host index as planned; a change of a per cent in
 * concentration moves them by parts in ten thousand.
 */
final class CoefficientsPage {
    private static final Face GRAM = Face.TEXT.format("0.00000");
    private static final Face FRACTION = Face.TEXT.format("0.0000000");
    private static final int ID = 0;
    private static final int NAME = 1;
    private static final int DENSITY = 2;
    private static final int GRAMS = 3;
    private static final int ML = 4;
    private static final int CONCENTRATION = 5;
    private static final int STOCKS = 6;
    private static final int PLANNED = 2;
    private static final int COUNTS = 3;
    private static final int SUBSTANCE = 2;
    private static final int DILUENT = 3;
    private static final int SHARE = 4;
    private static final int WEIGHINGS_ROW = 6;

    private final Page page;
    private final Recipe recipe;
    private final Mixture mixture;
    private final List<Weighing> weighings;
    private final List<Ingredient> ingredients;
    private final double[] nm;
    private final int stocksRow;
    private final int ingredientsRow;
    private final int muaColumn;
    private final int muspColumn;

    CoefficientsPage(Page page, Recipe recipe, Mixture mixture, List<Weighing> weighings, double[] nm) {
        this.page = page;
        this.recipe = recipe;
        this.mixture = mixture;
        this.weighings = weighings;
        this.ingredients = List.copyOf(mixture.massesG().keySet());
        this.nm = nm;
        int stocks = recipe.stocks().size();
        stocksRow = WEIGHINGS_ROW + weighings.size() + 3;
        ingredientsRow = stocks == 0 ? stocksRow + 1 : stocksRow + stocks + 5;
        muaColumn = STOCKS + stocks;
        muspColumn = muaColumn + nm.length;
    }

    /** Names the ranges; before the formulas of this and other sheets are written. */
    void name(Names names) {
        int last = ingredientsRow + ingredients.size() - 1;
        names.give(Names.DENSITY, page.address(ingredientsRow, DENSITY, last, DENSITY));
        names.give(Names.CONCENTRATION, page.address(ingredientsRow, CONCENTRATION, last, CONCENTRATION));
        names.give(Names.KAPPA_NM, page.address(ingredientsRow - 1, muaColumn, ingredientsRow - 1, muspColumn - 1));
        names.give(Names.KAPPA_MUA, page.address(ingredientsRow, muaColumn, last, muspColumn - 1));
        names.give(Names.KAPPA_MUSP, page.address(ingredientsRow, muspColumn, last, muspColumn + nm.length - 1));
        names.give(Names.MASS_G, page.address(last + 1, GRAMS));
        names.give(Names.VOLUME_ML, page.address(last + 1, ML));
    }

    void write(Page fillIn, FillInPlan plan) {
        int[] widths = new int[muspColumn + nm.length];
        java.util.Arrays.fill(widths, 92);
        widths[ID] = 170;
        widths[NAME] = 270;
        widths[CONCENTRATION] = 112;
        for (int k = 0; k < recipe.stocks().size(); k++)
            widths[STOCKS + k] = Math.max(104, 7 * recipe.stocks().get(k).id().length() + 14);
        page.columns(widths);
        page.text(0, 0, "Coefficients", Face.TITLE);
        page.height(0, 24);
        page.text(
                1,
                0,
                "What the predictions on \"Fill in\" are computed with. κ is what 1 g of an ingredient in 1 mL of phantom adds to"
                        + " µa or µs', in cm²/g, at "
                        + Grams.plain(recipe.temperatureC()) + " °C.",
                Face.QUIET);
        page.text(
                2,
                0,
                "Crowding of the particles and the index around them are those of the planned recipe: they are not computed anew"
                        + " from the grams as weighed.",
                Face.QUIET);
        weighings(fillIn, plan);
        if (!recipe.stocks().isEmpty()) stocks();
        ingredients();
        page.sheet.createFreezePane(1, 0);
        PrintSetup.onePage(page.sheet, true);
    }

    private void weighings(Page fillIn, FillInPlan plan) {
        page.text(
                WEIGHINGS_ROW - 2,
                ID,
                "Weighings: grams as weighed, or as planned where none are filled in",
                Face.SECTION);
        heads(WEIGHINGS_ROW - 1, "what", "into", "planned g", "counts as g");
        for (int n = 0; n < weighings.size(); n++) {
            Weighing w = weighings.get(n);
            int row = WEIGHINGS_ROW + n;
            String planned = fillIn.address(plan.weighingRows().get(n), FillInPlan.PLANNED);
            String weighed = fillIn.address(plan.weighingRows().get(n), FillInPlan.WEIGHED);
            page.text(row, ID, w.label(), Face.TEXT);
            page.text(row, NAME, w.into().map(s -> "stock " + s).orElse("vessel"), Face.QUIET);
            page.formula(row, PLANNED, planned, GRAM);
            page.formula(
                    row,
                    COUNTS,
                    "IF(ISNUMBER(" + weighed + "),IF(" + weighed + ">=0," + weighed + "," + planned + ")," + planned
                            + ")",
                    GRAM);
        }
    }

    private void stocks() {
        page.text(stocksRow - 1, ID, "Stocks: the share of what each holds", Face.SECTION);
        heads(stocksRow, "stock", "holds", "of it, g", "diluent g", "share of it");
        for (int k = 0; k < recipe.stocks().size(); k++) {
            Stock s = recipe.stocks().get(k);
            int row = stocksRow + 1 + k;
            page.text(row, ID, s.id(), Face.TEXT);
            page.text(row, NAME, s.from().orElse(s.ingredient().id()), Face.QUIET);
            page.formula(row, SUBSTANCE, counts(k, Weighing.Role.STOCK_SUBSTANCE), GRAM);
            page.formula(row, DILUENT, counts(k, Weighing.Role.STOCK_DILUENT), GRAM);
            String of = cell(row, SUBSTANCE);
            page.formula(row, SHARE, of + "/(" + of + "+" + cell(row, DILUENT) + ")", FRACTION);
        }
    }

    private void ingredients() {
        page.text(ingredientsRow - 3, ID, "Ingredients in the vessel", Face.SECTION);
        if (!recipe.stocks().isEmpty()) page.text(ingredientsRow - 2, STOCKS, "g in 1 g of stock", Face.SMALL);
        page.text(ingredientsRow - 2, muaColumn, "κ of µa, cm²/g, at nm", Face.SMALL);
        page.text(ingredientsRow - 2, muspColumn, "κ of µs', cm²/g, at nm", Face.SMALL);
        int head = ingredientsRow - 1;
        heads(head, "ingredient", "", "g/mL neat", "g", "mL", "g/mL in phantom");
        for (int k = 0; k < recipe.stocks().size(); k++)
            page.text(head, STOCKS + k, recipe.stocks().get(k).id(), Face.HEAD.right());
        for (int j = 0; j < nm.length; j++) {
            page.number(head, muaColumn + j, nm[j], Face.HEAD.right());
            page.number(head, muspColumn + j, nm[j], Face.HEAD.right());
        }
        int total = ingredientsRow + ingredients.size();
        for (int n = 0; n < ingredients.size(); n++) ingredient(ingredients.get(n), ingredientsRow + n, total);
        page.text(total, ID, "together", Face.TEXT.bolder());
        for (int column : new int[] {GRAMS, ML})
            page.formula(
                    total,
                    column,
                    "SUM(" + cell(ingredientsRow, column) + ":" + cell(total - 1, column) + ")",
                    GRAM.bolder());
        page.formula(total, DENSITY, cell(total, GRAMS) + "/" + cell(total, ML), GRAM.bolder());
    }

    private void ingredient(Ingredient i, int row, int total) {
        page.text(row, ID, i.id(), Face.TEXT);
        page.text(row, NAME, i.name(), Face.QUIET);
        page.number(row, DENSITY, i.densityGPerMl(), Face.TEXT);
        page.formula(row, GRAMS, grams(i, row), GRAM);
        page.formula(row, ML, cell(row, GRAMS) + "/" + cell(row, DENSITY), GRAM);
        page.formula(row, CONCENTRATION, cell(row, GRAMS) + "/" + cell(total, ML), FRACTION);
        for (int k = 0; k < recipe.stocks().size(); k++) {
            String content = content(i, k, row);
            if (content.isEmpty()) page.number(row, STOCKS + k, 0, FRACTION);
            else page.formula(row, STOCKS + k, content, FRACTION);
        }
        for (int j = 0; j < nm.length; j++) {
            MassSpecific kappa = MassSpecific.of(
                    i, nm[j], mixture.temperatureC(), mixture.hostIndex(nm[j]), mixture.crowdFraction(i));
            page.number(row, muaColumn + j, kappa.kappaA(), sixDigits(kappa.kappaA()));
            page.number(row, muspColumn + j, kappa.kappaMusp(), sixDigits(kappa.kappaMusp()));
        }
    }

    /** Shows six significant digits; the cell holds all. */
    private static Face sixDigits(double value) {
        if (value == 0) return Face.TEXT;
        return Face.TEXT.decimals(Math.max(0, Math.min(9, 5 - (int) Math.floor(Math.log10(value)))));
    }

    /** Grams of an ingredient in the vessel: what is weighed in neat, and its share of every aliquot. */
    private String grams(Ingredient i, int row) {
        List<String> terms = new ArrayList<>();
        for (int n = 0; n < weighings.size(); n++) {
            Weighing w = weighings.get(n);
            if (w.role() != Weighing.Role.ITEM) continue;
            String counts = cell(WEIGHINGS_ROW + n, COUNTS);
            if (w.from().isPresent()) {
                int k = stockNumber(w.from().get());
                if (!content(i, k, row).isEmpty()) terms.add(counts + "*" + cell(row, STOCKS + k));
            } else if (w.ingredient().equals(i)) terms.add(counts);
        }
        return terms.isEmpty() ? "0" : String.join("+", terms);
    }

    /** Grams of an ingredient in one gram of stock k; empty when that stock holds none of it. */
    private String content(Ingredient i, int k, int row) {
        Stock s = recipe.stocks().get(k);
        String share = cell(stocksRow + 1 + k, SHARE);
        List<String> terms = new ArrayList<>();
        if (s.from().isPresent()) {
            int from = stockNumber(s.from().get());
            if (!content(i, from, row).isEmpty()) terms.add(share + "*" + cell(row, STOCKS + from));
        } else if (s.ingredient().equals(i)) terms.add(share);
        if (s.diluent().equals(i)) terms.add("(1-" + share + ")");
        return String.join("+", terms);
    }

    private String counts(int stock, Weighing.Role role) {
        for (int n = 0; n < weighings.size(); n++)
            if (weighings.get(n).role() == role && weighings.get(n).place() == stock)
                return cell(WEIGHINGS_ROW + n, COUNTS);
        throw new IllegalStateException("stock " + stock + " has no " + role);
    }

    private int stockNumber(String id) {
        return recipe.stocks().indexOf(recipe.stock(id));
    }

    private void heads(int row, String... heads) {
        for (int c = 0; c < heads.length; c++) page.text(row, c, heads[c], c < 2 ? Face.HEAD : Face.HEAD.right());
    }

    private static String cell(int row, int column) {
        return new CellReference(row, column, true, true).formatAsString();
    }
}
