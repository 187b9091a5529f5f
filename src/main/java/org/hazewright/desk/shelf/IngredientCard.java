package org.hazewright.desk.shelf;

import java.time.LocalDate;
import java.util.ArrayList;
import java.util.List;
import java.util.stream.Collectors;
import javafx.scene.Node;
import javafx.scene.layout.HBox;
import javafx.scene.layout.VBox;
import org.hazewright.desk.model.ShelfRoom;
import org.hazewright.desk.model.Words;
import org.hazewright.desk.parts.ErrorLine;
import org.hazewright.desk.parts.Field;
import org.hazewright.desk.parts.Say;
import org.hazewright.desk.parts.Word;
import org.hazewright.optics.Figures;
import org.hazewright.shelf.Family;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Inspection;

/** All that a shelf says of one ingredient. */
final class IngredientCard extends VBox {
    private final ShelfRoom room;
    private final LotForm lot;
    private Node favourite = this;

    IngredientCard(ShelfRoom room, LotForm lot) {
        this.room = room;
        this.lot = lot;
        getStyleClass().add("gap-s");
        room.chosenProperty().addListener((p, before, now) -> show());
        room.doubtsProperty().addListener((p, before, now) -> show());
        show();
    }

    private void show() {
        getChildren().clear();
        room.chosenProperty()
                .get()
                .ifPresentOrElse(
                        this::show,
                        () -> getChildren()
                                .add(Say.wrapped("Choose an ingredient to see what is known of it.", "quiet")));
    }

    private void show(Ingredient i) {
        List<Node> all = new ArrayList<>();
        all.add(Say.wrapped(i.name(), "headline"));
        String mixes = i.families().stream().map(Family::word).sorted().collect(Collectors.joining(", "));
        all.add(Say.wrapped(
                i.part().word() + " · " + (i.part() == org.hazewright.shelf.Part.BASE ? mixes : "mixes into " + mixes)
                        + " · " + i.form().word()
                        + (i.isBlend() ? "" : " · " + Figures.plain(i.densityGPerMl()) + " g/mL"),
                "quiet"));
        i.lot().ifPresent(l -> {
            String dates = l.expires().map(d -> ", use by " + d).orElse("");
            boolean late = l.expiredOn(LocalDate.now());
            all.add(Say.wrapped(
                    (late ? "✕ " : "") + "lot " + l.number() + dates + (late ? ", past its date" : ""),
                    late ? "missed" : "quiet"));
        });
        Word star = new Word(room.favourite(i.id()) ? "★ favourite" : "☆ make it a favourite", () -> {
            room.favourite(i.id(), !room.favourite(i.id()));
            show();
            favourite.requestFocus();
        });
        favourite = star;
        all.add(star);
        Field hand = new Field(() -> room.inHand(i.id()), text -> room.inHand(i.id(), text), false)
                .named("grams in hand")
                .styled("boxed")
                .columns(6);
        HBox inHand = new HBox(Say.quiet("in hand "), hand, Say.quiet(" g"));
        inHand.setAlignment(javafx.geometry.Pos.BASELINE_LEFT);
        all.add(inHand);
        all.add(new ErrorLine(hand));
        room.doubtsProperty().get().ifPresent(doubts -> {
            for (Inspection.Doubt d : doubts)
                if (d.ingredient().equals(i.id())) all.add(Say.wrapped("✕ " + Words.capital(d.sentence()), "missed"));
        });
        if (!i.isBlend()) {
            all.add(Say.heading("How well it is known"));
            all.add(Say.wrapped("absorption to " + percent(i.uncertainty().absorption()) + ", scattering to "
                    + percent(i.uncertainty().scattering()) + " (k = 1)"));
        } else {
            all.add(Say.heading("What it is mixed of"));
            i.blend()
                    .forEach(p -> all.add(Say.wrapped(Figures.plain(Math.round(1e4 * p.massFraction()) / 100.0) + " % "
                            + named(p.ingredient()))));
        }
        i.maxGPerMl()
                .ifPresent(v -> all.add(Say.wrapped("at most " + Figures.plain(v) + " g in a mL of phantom", "quiet")));
        i.pricePerG().ifPresent(v -> all.add(Say.wrapped("price " + Figures.plain(v) + " per g", "quiet")));
        all.add(Say.heading("Where its figures are from"));
        all.add(Say.wrapped(i.source().basis().word()
                + (i.source().citation().isEmpty() ? "" : ": " + i.source().citation())));
        section(all, "Handling", i.handling());
        section(all, "Mind", i.cautions());
        section(
                all,
                "Not with",
                i.conflicts().stream()
                        .map(c -> named(c.with()) + ": " + c.why())
                        .toList());
        lot.of(i);
        all.add(lot);
        getChildren().setAll(all);
    }

    /** The name of what goes by an id on this shelf; another word, such as that of a kind, stays. */
    private String named(String id) {
        return room.shelfProperty()
                .get()
                .shelf()
                .flatMap(s -> s.find(id))
                .map(Words::inSentence)
                .orElse(id);
    }

    private static String percent(double share) {
        return Figures.significant(100 * share, 2) + " %";
    }

    private static void section(List<Node> all, String title, List<String> sentences) {
        if (sentences.isEmpty()) return;
        all.add(Say.heading(title));
        sentences.forEach(s -> all.add(Say.wrapped(s)));
    }
}
