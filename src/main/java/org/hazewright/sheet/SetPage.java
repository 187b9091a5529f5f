package org.hazewright.sheet;

import java.util.Collection;
import java.util.List;
import java.util.Map;
import org.hazewright.bench.Cautions;
import org.hazewright.bench.Grams;
import org.hazewright.bench.Leftover;
import org.hazewright.bench.Warning;
import org.hazewright.brief.Balance;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;
import org.hazewright.optics.Figures;
import org.hazewright.picture.Palette;
import org.hazewright.shelf.Form;
import org.hazewright.shelf.Ingredient;

/** Parts that the first page of a set and that of a titration share: heading, stocks, mixtures, what to have at hand, cautions. */
final class SetPage {
    static final Face LINE = Face.TEXT.rule();
    private static final Face QUIET = Face.QUIET.points(8).rule();

    final Page page;
    private final int last;
    private final Face grams;
    int row;

    /** {@code last} is the page's last column; there are at least seven. */
    SetPage(Page page, int last, Balance balance) {
        this.page = page;
        this.last = last;
        this.grams = LINE.decimals(balance.decimals()).points(10.5).bolder().right();
    }

    void heading(String title, String summary, String verdict, boolean meets) {
        page.sentence(row++, 0, last, title, Face.TITLE);
        page.sentence(row++, 0, last, summary, Face.QUIET);
        page.sentence(row++, 0, last, verdict, Face.TEXT.points(11).bolder().ink(meets ? Palette.TEAL : Palette.BRICK));
    }

    void section(String title) {
        if (page.sheet.getRow(row - 1) != null) page.height(row++, 6);
        page.text(row, 0, title, Face.SECTION);
        page.height(row++, 16);
    }

    private void heads(String... heads) {
        for (int c = 0; c < heads.length; c++)
            page.text(
                    row,
                    c,
                    heads[c],
                    c == 2 || c == 4 ? Face.HEAD.right() : c == 3 || c == 5 ? Face.HEAD.indent() : Face.HEAD);
        page.height(row++, 12.5);
    }

    void stocks(List<Stock> stocks, List<Leftover> left) {
        if (stocks.isEmpty()) return;
        section("Make first, once for all");
        heads("stock", "take", "g", "into", "g", "makes, left over");
        for (int k = 0; k < stocks.size(); k++) {
            Stock s = stocks.get(k);
            page.text(row, 0, s.id(), LINE.bolder());
            page.text(row, 1, s.from().orElse(s.ingredient().name()), LINE.wrap());
            page.number(row, 2, s.ingredientG(), grams);
            page.text(row, 3, s.diluent().name(), LINE.wrap().indent());
            page.number(row, 4, s.diluentG(), grams);
            page.text(
                    row,
                    5,
                    Grams.plain(left.get(k).madeG()) + " g, "
                            + Grams.plain(left.get(k).leftG()) + " g",
                    QUIET.indent());
            page.span(row, 5, last);
            page.height(row, 16);
            page.roomFor(row, s.ingredient().name(), LINE, 1, 1);
            row++;
        }
    }

    void mixture(String title, Recipe recipe) {
        section(title);
        heads("no", "what", "g", "");
        int n = 0;
        double sum = 0;
        for (Item i : recipe.items()) {
            page.number(row, 0, ++n, LINE.left());
            page.text(
                    row,
                    1,
                    i.stock().map(s -> "stock " + s).orElse(i.ingredient().name()),
                    LINE.wrap());
            page.number(row, 2, i.massG(), grams);
            page.text(row, 3, ml(i.ingredient(), i.massG(), i.stock().isPresent()), QUIET.indent());
            page.height(row, 16);
            page.roomFor(row, i.ingredient().name(), LINE, 1, 1);
            row++;
            sum += i.massG();
        }
        page.text(row, 1, "together", QUIET);
        page.number(row++, 2, sum, grams);
    }

    void atHand(Map<Ingredient, Double> buyG) {
        section("To have at hand, stocks included; a little more for what clings to vessels");
        heads("ingredient", "name", "g", "");
        buyG.forEach((i, g) -> {
            page.text(row, 0, i.id(), LINE);
            page.text(row, 1, i.name(), LINE.wrap());
            page.number(row, 2, g, grams);
            page.text(row, 3, ml(i, g, false), QUIET.indent());
            page.height(row, 15);
            page.roomFor(row, i.name(), LINE, 1, 1);
            row++;
        });
    }

    /** Of a liquid bottle, the mL too. */
    private static String ml(Ingredient i, double massG, boolean ofStock) {
        return ofStock || i.form() != Form.LIQUID ? "" : Figures.significant(massG / i.densityGPerMl(), 4) + " mL";
    }

    void mind(List<String> notes, List<Warning> warnings, Collection<Ingredient> all) {
        section("Mind");
        for (String n : notes) page.sentence(row++, 0, last, n, Face.TEXT.points(8.5));
        for (Warning w : warnings) page.sentence(row++, 0, last, w.text(), Face.TEXT.points(8.5));
        Sentences.cautionsByNames(all)
                .forEach((names, cautions) ->
                        page.sentence(row++, 0, last, names + ": " + String.join(" ", cautions), Face.TEXT.points(8)));
        page.sentence(row++, 0, last, String.join(" ", Cautions.GENERAL), Face.QUIET.points(7.5));
    }

    void print(boolean landscape) {
        page.sheet.getWorkbook().setPrintArea(page.sheet.getWorkbook().getSheetIndex(page.sheet), 0, last, 0, row - 1);
        PrintSetup.onePage(page.sheet, landscape);
    }
}
