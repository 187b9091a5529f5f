package org.hazewright.desk.recipe;

import java.time.LocalDate;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import javafx.geometry.Pos;
import javafx.scene.Node;
import javafx.scene.control.Button;
import javafx.scene.control.Label;
import javafx.scene.control.ScrollPane;
import javafx.scene.control.Tooltip;
import javafx.scene.layout.ColumnConstraints;
import javafx.scene.layout.FlowPane;
import javafx.scene.layout.GridPane;
import javafx.scene.layout.HBox;
import javafx.scene.layout.Priority;
import javafx.scene.layout.Region;
import javafx.scene.layout.VBox;
import org.hazewright.bench.Cautions;
import org.hazewright.bench.Outlook;
import org.hazewright.bench.Warning;
import org.hazewright.bench.Warnings;
import org.hazewright.desk.model.Desk;
import org.hazewright.desk.model.Shown;
import org.hazewright.desk.model.Words;
import org.hazewright.desk.parts.Gauge;
import org.hazewright.desk.parts.Say;
import org.hazewright.desk.parts.Word;
import org.hazewright.mixture.Recipe;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Shelf;

/** The place Recipe. */
public final class RecipePlace extends VBox {
    /** Causes of less than this share of the variance are not listed. */
    private static final double LEAST_SHARE = 0.01;

    private static final int MOST_CAUSES = 5;

    private final Desk desk;
    private final Label verdict = Say.wrapped("", "headline");
    private final WeighRows weighing = new WeighRows();
    private final VBox blood = new VBox();
    private final VBox causes = new VBox();
    private final VBox limits = new VBox();
    private final VBox ways = new VBox();
    private final VBox mind = new VBox();
    private boolean following;

    public RecipePlace(Desk desk, Runnable print, Runnable saveSheet, Runnable copyGrams) {
        this.desk = desk;
        getStyleClass().addAll("place", "side-right");
        VBox all = new VBox(verdict, weighing, blood, causes, limits, ways, mind);
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
        List.of(blood, causes, limits, ways, mind)
                .forEach(box -> box.getStyleClass().add("gap-s"));

        desk.solving().shownProperty().addListener((p, before, now) -> show(now));
        desk.solving().cardsProperty().addListener((p, before, now) -> ways());
        desk.solving().problemProperty().addListener((p, before, now) -> problem());
        desk.solving().lookingForWaysProperty().addListener((p, before, now) -> ways());
        show(desk.solving().shownProperty().get());
    }

    private void say(String words, String tone) {
        verdict.setText(words.replace(" times in 100", "\u00A0times\u00A0in\u00A0100"));
        if (!verdict.getStyleClass().contains(tone)) verdict.getStyleClass().setAll("label", "headline", tone);
    }

    private void showAll(boolean yes) {
        List.of(weighing, blood, causes, limits, ways, mind).forEach(box -> Say.show(box, yes));
    }

    private void problem() {
        Optional<String> words = desk.solving().problemProperty().get();
        if (words.isPresent()) {
            say("✕ " + words.get(), "missed");
            showAll(false);
        } else show(desk.solving().shownProperty().get());
    }

    private void show(Shown shown) {
        if (shown == null) {
            showAll(false);
            say("Looking for a recipe …", "quiet");
            following = false;
            return;
        }
        if (desk.solving().problemProperty().get().isPresent()) return;
        Outlook o = shown.outlook();
        say((o.meets() ? "" : "✕ ") + Words.verdict(o), o.meets() ? "strong" : "missed");
        Say.show(weighing, true);
        weighing.show(shown);
        if (shown.following() && following) return; // the rest follows when the hand rests
        following = shown.following();
        blood.setDisable(following);
        if (following) {
            limits.getChildren()
                    .setAll(
                            Say.heading("What holds it back"),
                            Say.wrapped("The amounts follow; the search goes on when you rest.", "quiet"));
            return;
        }
        blood(shown);
        causes(o);
        limits(shown);
        ways();
        mind(o.recipe());
    }

    private void blood(Shown shown) {
        shown.blood()
                .ifPresent(b ->
                        blood.getChildren().setAll(Say.heading("As blood"), Say.wrapped(b.sentence(), "as-blood")));
        Say.show(blood, shown.blood().isPresent());
    }

    private void mind(Recipe recipe) {
        mind.getChildren().setAll(Say.heading("Mind"));
        for (Warning w : Warnings.of(recipe, LocalDate.now()))
            mind.getChildren().add(Say.wrapped(w.text()));
        for (String caution : Cautions.GENERAL) mind.getChildren().add(Say.wrapped(caution, "quiet", "small"));
        Say.show(mind, true);
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
            Label who = Say.wrapped(Words.named(c.name(), o.recipe()), "quiet");
            who.setAccessibleText(who.getText() + ", " + percent);
            Region filled = new Region();
            filled.getStyleClass().add("bar");
            filled.setStyle(String.format(Locale.ROOT, "-fx-pref-width: %.2fem;", Math.max(0.3, 9 * c.share() / most)));
            HBox line = new HBox(filled, Say.label(percent, "small"));
            line.setAlignment(Pos.CENTER_LEFT);
            line.getStyleClass().add("gap-s");
            grid.addRow(n++, who, line);
        }
        causes.getChildren().setAll(Say.heading("What could move it"), grid);
        Say.show(causes, n > 0);
    }

    private void limits(Shown shown) {
        List<Node> sentences = new ArrayList<>();
        sentences.add(Say.heading("What holds it back"));
        List<String> said = new ArrayList<>(shown.answer().limits());
        said.addAll(shown.answer().notes());
        if (said.isEmpty()) said.add("Nothing: every target lands close to its middle.");
        List<Ingredient> known =
                desk.shelfProperty().get().shelf().map(Shelf::ingredients).orElse(List.of());
        said.forEach(s -> sentences.add(Say.wrapped(Words.spoken(s, known))));
        limits.getChildren().setAll(sentences);
        Say.show(limits, true);
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
                    .add(new Word("back to the best", () -> desk.editing().choose(Optional.empty())));
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
        button.setTooltip(new Tooltip(Words.capital(Words.join(c.what()))));
        button.setOnAction(e -> desk.editing().choose(Optional.of(c.key())));
        return button;
    }
}
