package org.hazewright.desk.recipe;

import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import javafx.geometry.Pos;
import javafx.scene.Node;
import javafx.scene.control.Button;
import javafx.scene.control.Label;
import javafx.scene.control.ScrollPane;
import javafx.scene.layout.ColumnConstraints;
import javafx.scene.layout.FlowPane;
import javafx.scene.layout.GridPane;
import javafx.scene.layout.HBox;
import javafx.scene.layout.Priority;
import javafx.scene.layout.Region;
import javafx.scene.layout.VBox;
import org.hazewright.bench.Leftover;
import org.hazewright.bench.Outlook;
import org.hazewright.brief.Balance;
import org.hazewright.desk.model.Desk;
import org.hazewright.desk.model.Shown;
import org.hazewright.desk.model.Words;
import org.hazewright.desk.parts.Gauge;
import org.hazewright.desk.parts.Say;
import org.hazewright.desk.parts.Word;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;
import org.hazewright.optics.Figures;
import org.hazewright.shelf.Form;
import org.hazewright.shelf.Ingredient;

/** The place Recipe. */
public final class RecipePlace extends VBox {
    /** Causes of less than this share of the variance are not listed. */
    private static final double LEAST_SHARE = 0.01;

    private static final int MOST_CAUSES = 5;

    private final Desk desk;
    private final Label verdict = Say.wrapped("", "headline");
    private final VBox weighing = new VBox();
    private final VBox stocks = new VBox();
    private final VBox causes = new VBox();
    private final VBox limits = new VBox();
    private final VBox ways = new VBox();

    public RecipePlace(Desk desk, Runnable print, Runnable saveSheet, Runnable copyGrams) {
        this.desk = desk;
        getStyleClass().addAll("place", "side-right");
        VBox all = new VBox(verdict, weighing, stocks, causes, limits, ways);
        all.getStyleClass().add("gap-l");
        ScrollPane scroll = new ScrollPane(all);
        scroll.setFitToWidth(true);
        scroll.setHbarPolicy(ScrollPane.ScrollBarPolicy.NEVER);
        VBox.setVgrow(scroll, Priority.ALWAYS);
        HBox foot = new HBox(
                4,
                new Word("Print…", print),
                Say.quiet("·"),
                new Word("Save sheet…", saveSheet),
                Say.quiet("·"),
                new Word("Copy grams", copyGrams));
        foot.setAlignment(Pos.BASELINE_LEFT);
        getStyleClass().add("gap-m");
        getChildren().addAll(Say.place("Recipe"), scroll, foot);
        verdict.setMinHeight(Region.USE_PREF_SIZE);
        weighing.getStyleClass().add("gap-s");
        List.of(stocks, causes, limits, ways).forEach(box -> box.getStyleClass().add("gap-s"));

        desk.solving().shownProperty().addListener((p, before, now) -> show(now));
        desk.solving().cardsProperty().addListener((p, before, now) -> ways());
        desk.solving().problemProperty().addListener((p, before, now) -> problem());
        desk.solving().lookingForWaysProperty().addListener((p, before, now) -> ways());
        show(desk.solving().shownProperty().get());
    }

    private void problem() {
        desk.solving()
                .problemProperty()
                .get()
                .ifPresentOrElse(
                        words -> {
                            verdict.setText("✕ " + words);
                            verdict.getStyleClass().setAll("label", "headline", "missed");
                            List.of(weighing, stocks, causes, limits, ways).forEach(box -> Say.show(box, false));
                        },
                        () -> show(desk.solving().shownProperty().get()));
    }

    private void show(Shown shown) {
        boolean any = shown != null;
        List.of(weighing, stocks, causes, limits, ways).forEach(box -> Say.show(box, any));
        if (!any) {
            verdict.setText("Looking for a recipe …");
            verdict.getStyleClass().setAll("label", "headline", "quiet");
            return;
        }
        if (desk.solving().problemProperty().get().isPresent()) return;
        Outlook o = shown.outlook();
        verdict.setText((o.meets() ? "" : "✕ ") + Words.verdict(o));
        verdict.getStyleClass().setAll("label", "headline", o.meets() ? "strong" : "missed");
        weighing(shown);
        stocks(shown);
        causes(o);
        limits(shown);
        ways();
    }

    private void weighing(Shown shown) {
        Recipe recipe = shown.recipe();
        Balance balance = shown.outlook().brief().balance();
        List<Node> rows = new ArrayList<>();
        int n = 0;
        for (Item item : recipe.items()) {
            Label disc = Say.label(Integer.toString(++n), "number-disc");
            Label name = Say.wrapped(Words.item(item));
            VBox words = new VBox(name);
            String note = note(item, balance);
            if (!note.isEmpty()) words.getChildren().add(Say.wrapped(note, "quiet", "small"));
            HBox.setHgrow(words, Priority.ALWAYS);
            Label grams = Say.label(Words.grams(item.massG(), balance) + " g", "grams");
            grams.setMinWidth(Region.USE_PREF_SIZE);
            HBox row = new HBox(disc, words, grams);
            row.getStyleClass().add("gap-m");
            row.setAlignment(Pos.TOP_LEFT);
            row.setAccessibleText(Words.item(item) + ", " + grams.getText());
            rows.add(row);
        }
        double sum = recipe.items().stream().mapToDouble(Item::massG).sum();
        HBox together = new HBox(
                Say.quiet("together " + Figures.significant(volumeMl(recipe), 4) + " mL"),
                Say.spring(),
                Say.label(Words.grams(sum, balance) + " g", "quiet", "mono"));
        rows.add(together);
        weighing.getChildren().setAll(rows);
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

    private void stocks(Shown shown) {
        Recipe recipe = shown.recipe();
        Balance balance = shown.outlook().brief().balance();
        List<Node> boxes = new ArrayList<>();
        for (Stock s : recipe.stocks()) {
            String from =
                    s.from().map(f -> Words.stock(recipe, recipe.stock(f))).orElse(Words.shortName(s.ingredient()));
            Label make = Say.wrapped("first make the stock " + Words.ratio(s) + ": " + from + " "
                    + Words.grams(s.ingredientG(), balance) + " g in " + Words.inSentence(s.diluent()) + " "
                    + Words.grams(s.diluentG(), balance) + " g");
            VBox box = new VBox(make);
            Leftover.of(recipe).stream()
                    .filter(l -> l.stock().equals(s.id()))
                    .findFirst()
                    .ifPresent(l -> box.getChildren()
                            .add(Say.wrapped(Words.grams(l.leftG(), balance) + " g left over", "quiet", "small")));
            box.getStyleClass().add("soft-box");
            boxes.add(box);
        }
        stocks.getChildren().setAll(boxes);
        Say.show(stocks, !boxes.isEmpty());
    }

    private void causes(Outlook o) {
        GridPane grid = new GridPane();
        grid.getStyleClass().add("bars");
        ColumnConstraints name = new ColumnConstraints();
        name.setPercentWidth(52);
        ColumnConstraints bar = new ColumnConstraints();
        bar.setHgrow(Priority.ALWAYS);
        grid.getColumnConstraints().addAll(name, bar);
        List<Outlook.CauseShare> shares = o.causes();
        double most = shares.isEmpty() ? 1 : shares.get(0).share();
        int n = 0;
        for (Outlook.CauseShare c : shares) {
            if (c.share() < LEAST_SHARE || n == MOST_CAUSES) break;
            String percent = Math.round(100 * c.share()) + " %";
            Label who = Say.wrapped(named(c.name(), o.recipe()), "quiet");
            who.setAccessibleText(who.getText() + ", " + percent);
            Region filled = new Region();
            filled.getStyleClass().add("bar");
            filled.setStyle(String.format(
                    Locale.ROOT,
                    "-fx-min-height: 1em; -fx-max-height: 1em; -fx-pref-width: %.2fem;",
                    Math.max(0.3, 9 * c.share() / most)));
            HBox line = new HBox(filled, Say.label(percent, "small"));
            line.setAlignment(Pos.CENTER_LEFT);
            line.getStyleClass().add("gap-s");
            grid.addRow(n++, who, line);
        }
        causes.getChildren().setAll(Say.heading("What could move it"), grid);
        Say.show(causes, n > 0);
    }

    /** A cause's name with the ingredient's name in place of its id. */
    private static String named(String cause, Recipe recipe) {
        for (Ingredient i : recipe.massesG().keySet()) {
            if (cause.equals(i.id()) || cause.startsWith(i.id() + " "))
                return Words.shortName(i) + cause.substring(i.id().length());
            if (cause.equals("weighing " + i.id())) return "weighing " + Words.shortName(i);
        }
        return cause;
    }

    private void limits(Shown shown) {
        List<Node> sentences = new ArrayList<>();
        sentences.add(Say.heading("What holds it back"));
        List<String> said = new ArrayList<>(shown.answer().limits());
        said.addAll(shown.answer().notes());
        if (shown.following()) said = List.of("The amounts follow; the search goes on when you rest.");
        else if (said.isEmpty()) said = List.of("Nothing: every target lands close to its middle.");
        said.forEach(s -> sentences.add(Say.wrapped(s)));
        limits.getChildren().setAll(sentences);
    }

    private void ways() {
        List<Shown.Card> cards = desk.solving().cardsProperty().get();
        boolean looking = desk.solving().lookingForWaysProperty().get();
        boolean chosen =
                desk.edits().now() != null && desk.edits().now().chosen().isPresent();
        FlowPane flow = new FlowPane();
        flow.getStyleClass().add("cards");
        for (Shown.Card c : cards) flow.getChildren().add(card(c));
        HBox head = new HBox(8, Say.heading("Other ways"));
        head.setAlignment(Pos.BASELINE_LEFT);
        if (looking) head.getChildren().add(Say.label("looking …", "quiet", "small"));
        if (chosen)
            head.getChildren()
                    .add(new Word("back to the best", () -> desk.editing().choose(java.util.Optional.empty())));
        ways.getChildren().setAll(head, flow);
        Say.show(
                ways,
                desk.solving().shownProperty().get() != null
                        && desk.solving().problemProperty().get().isEmpty()
                        && (looking || chosen || !cards.isEmpty()));
    }

    private Node card(Shown.Card c) {
        Gauge gauge = new Gauge();
        gauge.land(c.worstMiss());
        gauge.getStyleClass().add("in-card");
        boolean meets = c.outlook().meets();
        Label chance = Say.label(meets ? Words.times(c.chance()) + " in 100" : "✕ misses", meets ? "lands" : "missed");
        VBox inside = new VBox(
                Say.label(Words.capital(c.title()), "strong"),
                Say.label(c.weighings() + " weighings", "quiet", "small"),
                chance,
                gauge);
        inside.getStyleClass().add("gap-xs");
        Button button = new Button();
        button.setGraphic(inside);
        button.getStyleClass().setAll("card", "way");
        button.setAccessibleText("Choose: " + c.title() + ", " + c.weighings() + " weighings, " + chance.getText());
        javafx.scene.control.Tooltip.install(
                button, new javafx.scene.control.Tooltip(Words.capital(Words.join(c.what()))));
        button.setOnAction(e -> desk.editing().choose(java.util.Optional.of(c.key())));
        return button;
    }
}
