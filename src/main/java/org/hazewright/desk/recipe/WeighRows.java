package org.hazewright.desk.recipe;

import java.util.ArrayList;
import java.util.List;
import javafx.geometry.Pos;
import javafx.scene.Node;
import javafx.scene.control.Label;
import javafx.scene.layout.HBox;
import javafx.scene.layout.Priority;
import javafx.scene.layout.Region;
import javafx.scene.layout.VBox;
import org.hazewright.bench.Leftover;
import org.hazewright.brief.Balance;
import org.hazewright.desk.model.Shown;
import org.hazewright.desk.model.Words;
import org.hazewright.desk.parts.Say;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;
import org.hazewright.optics.Figures;
import org.hazewright.shelf.Form;
import org.hazewright.shelf.Ingredient;

/** The weigh-out in order, and the stocks to make first. While only grams move the rows stay and their figures change. */
final class WeighRows extends VBox {
    private final List<Label> grams = new ArrayList<>();
    private final List<Label> notes = new ArrayList<>();
    private final List<HBox> rows = new ArrayList<>();
    private final Label volume = Say.quiet("");
    private final Label sum = Say.label("", "quiet", "mono");
    private final List<Label> stocks = new ArrayList<>();
    private final List<Label> leftovers = new ArrayList<>();
    private List<String> built = List.of();

    WeighRows() {
        getStyleClass().add("gap-s");
    }

    void show(Shown shown) {
        Recipe recipe = shown.recipe();
        Balance balance = shown.outlook().brief().balance();
        List<String> names = new ArrayList<>();
        recipe.items().forEach(i -> names.add(Words.item(i)));
        recipe.stocks().forEach(s -> names.add(s.id()));
        if (!names.equals(built)) build(recipe);
        built = names;
        for (int k = 0; k < recipe.items().size(); k++) {
            Item item = recipe.items().get(k);
            grams.get(k).setText(Words.grams(item.massG(), balance) + " g");
            String note = note(item, balance);
            notes.get(k).setText(note);
            Say.show(notes.get(k), !note.isEmpty());
            rows.get(k).setAccessibleText(names.get(k) + ", " + grams.get(k).getText());
        }
        volume.setText("together " + Figures.significant(volumeMl(recipe), 4) + " mL");
        sum.setText(Words.grams(recipe.items().stream().mapToDouble(Item::massG).sum(), balance) + " g");
        List<Leftover> left = Leftover.of(recipe);
        for (int k = 0; k < recipe.stocks().size(); k++) {
            stocks.get(k).setText(make(recipe, recipe.stocks().get(k), balance));
            leftovers.get(k).setText(Words.grams(left.get(k).leftG(), balance) + " g left over");
        }
    }

    private void build(Recipe recipe) {
        List<Node> all = new ArrayList<>();
        List.of(grams, notes, rows, stocks, leftovers).forEach(List::clear);
        int n = 0;
        for (Item item : recipe.items()) {
            Label note = Say.wrapped("", "quiet", "small");
            VBox words = new VBox(Say.wrapped(Words.item(item)), note);
            HBox.setHgrow(words, Priority.ALWAYS);
            Label g = Say.label("", "grams");
            g.setMinWidth(Region.USE_PREF_SIZE);
            HBox row = new HBox(Say.label(Integer.toString(++n), "number-disc"), words, g);
            row.getStyleClass().add("gap-m");
            row.setAlignment(Pos.TOP_LEFT);
            notes.add(note);
            grams.add(g);
            rows.add(row);
            all.add(row);
        }
        all.add(new HBox(volume, Say.spring(), sum));
        for (int k = 0; k < recipe.stocks().size(); k++) {
            Label make = Say.wrapped("");
            Label left = Say.wrapped("", "quiet", "small");
            VBox box = new VBox(make, left);
            box.getStyleClass().add("soft-box");
            stocks.add(make);
            leftovers.add(left);
            all.add(box);
        }
        getChildren().setAll(all);
    }

    private static String make(Recipe recipe, Stock s, Balance balance) {
        String from = s.from().map(f -> Words.stock(recipe, recipe.stock(f))).orElse(Words.shortName(s.ingredient()));
        return "first make the stock " + Words.ratio(s) + ": " + from + " " + Words.grams(s.ingredientG(), balance)
                + " g in " + Words.inSentence(s.diluent()) + " " + Words.grams(s.diluentG(), balance) + " g";
    }

    private static double volumeMl(Recipe recipe) {
        double ml = 0;
        for (var e : recipe.massesG().entrySet())
            ml += e.getValue() / e.getKey().densityGPerMl();
        return ml;
    }

    private static String note(Item item, Balance balance) {
        List<String> notes = new ArrayList<>();
        Ingredient i = item.ingredient();
        int loads = balance.loads(item.massG());
        if (loads > 1) notes.add("in " + loads + " loads");
        if (item.stock().isEmpty() && i.form() == Form.LIQUID)
            notes.add(Words.volume(item.massG() / i.densityGPerMl()));
        i.making().addBelowC().ifPresent(c -> notes.add("below " + Figures.plain(c) + " °C"));
        if (i.making().addLast()) notes.add("last");
        if (i.settles()) notes.add("settles: keep stirring");
        return String.join(" · ", notes);
    }
}
