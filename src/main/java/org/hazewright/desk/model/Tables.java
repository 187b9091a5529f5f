package org.hazewright.desk.model;

import java.util.List;
import org.hazewright.bench.Answer;
import org.hazewright.bench.Outlook;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Point;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;
import org.hazewright.optics.Figures;

/** Tables as text that a spreadsheet takes when pasted: tabs between columns, a line a row, a head with units. */
public final class Tables {
    private Tables() {}

    /** What is weighed, stocks first, in g. */
    public static String weighOut(Outlook o) {
        Recipe recipe = o.recipe();
        Balance balance = o.brief().balance();
        StringBuilder text = new StringBuilder();
        line(text, "into", "what", "lot", "mass_g");
        for (Stock s : recipe.stocks()) {
            String into = Words.stock(recipe, s);
            String from =
                    s.from().map(f -> Words.stock(recipe, recipe.stock(f))).orElse(Words.shortName(s.ingredient()));
            line(text, into, from, s.lot().orElse(""), Words.grams(s.ingredientG(), balance));
            line(text, into, Words.shortName(s.diluent()), "", Words.grams(s.diluentG(), balance));
        }
        for (Item i : recipe.items())
            line(text, "vessel", Words.item(i), i.lot().orElse(""), Words.grams(i.massG(), balance));
        return text.toString();
    }

    /** What is wanted and what is predicted, in 1/cm; the miss in half-widths. */
    public static String targets(Outlook o) {
        StringBuilder text = new StringBuilder();
        line(
                text,
                "wavelength_nm",
                "quantity",
                "wanted_per_cm",
                "tolerance_per_cm",
                "predicted_per_cm",
                "u_per_cm",
                "miss");
        for (Answer.Predicted p : o.predicted())
            line(
                    text,
                    Figures.plain(p.point().wavelengthNm()),
                    p.point().quantity() == Point.Quantity.MUA ? "mua" : "musp",
                    Figures.significant(p.point().wantedPerCm(), 6),
                    Figures.significant(p.point().tolerancePerCm(), 6),
                    Figures.significant(p.perCm(), 6),
                    Figures.significant(p.uPerCm(), 3),
                    Figures.significant(p.miss(), 3));
        return text.toString();
    }

    private static void line(StringBuilder text, String... cells) {
        text.append(String.join(
                        "\t",
                        List.of(cells).stream()
                                .map(c -> c.replaceAll("[\t\r\n]", " "))
                                .toList()))
                .append('\n');
    }
}
