package org.hazewright.desk.batch;

import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import javafx.geometry.Pos;
import javafx.scene.Node;
import javafx.scene.control.Button;
import javafx.scene.control.Label;
import javafx.scene.control.ScrollPane;
import javafx.scene.input.KeyCode;
import javafx.scene.input.KeyEvent;
import javafx.scene.layout.BorderPane;
import javafx.scene.layout.FlowPane;
import javafx.scene.layout.GridPane;
import javafx.scene.layout.HBox;
import javafx.scene.layout.Priority;
import javafx.scene.layout.Region;
import javafx.scene.layout.VBox;
import org.hazewright.batch.Batch;
import org.hazewright.batch.Correction;
import org.hazewright.bench.Weighing;
import org.hazewright.desk.model.MadeBatch;
import org.hazewright.desk.model.Words;
import org.hazewright.desk.parts.Chooser;
import org.hazewright.desk.parts.ErrorLine;
import org.hazewright.desk.parts.Field;
import org.hazewright.desk.parts.Room;
import org.hazewright.desk.parts.Say;
import org.hazewright.desk.parts.Word;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Stock;
import org.hazewright.optics.Figures;
import org.hazewright.shelf.Ingredient;

/** The view of a batch: weighed on the left, landing and measured values in the middle, what they say on the right. */
public final class BatchView extends BorderPane {
    private final MadeBatch made;
    private final VBox weighed = new VBox();
    private final VBox says = new VBox();
    private final VBox puts = new VBox();
    private final VBox teaches = new VBox();
    private final Label complaint = Say.wrapped("", "error-line");
    private final MeasuredTable table;
    private boolean asked;
    private List<Object> put = List.of();

    /** @param leave goes back to the desk */
    public BatchView(MadeBatch made, Chooser chooser, Runnable leave) {
        this.made = made;
        getStyleClass().add("balance-view");
        table = new MeasuredTable(made, chooser);
        List.of(weighed, says, puts, teaches).forEach(v -> v.getStyleClass().add("gap-s"));
        setTop(head(leave));
        boolean heated =
                made.batchProperty().get().plan().base().making().meltC().isPresent();
        Node heating = heating();
        Say.show(heating, heated);
        BorderPane columns = new BorderPane();
        setCenter(new Room(columns, 99, 30));
        columns.setLeft(column("batch-left", "side-left", Say.place("Weighed"), weighed, heating, who()));
        VBox middle = new VBox(Say.place("Landing and measured values"), table, complaint);
        middle.getStyleClass().addAll("place", "gap-m");
        columns.setCenter(scrolled(middle));
        columns.setRight(column("batch-right", "side-right", Say.place("What it says"), says, puts, teaches));
        made.batchProperty().addListener((p, before, now) -> show());
        made.seenProperty().addListener((p, before, now) -> show());
        made.correctionProperty().addListener((p, before, now) -> puts());
        made.correctingProperty().addListener((p, before, now) -> puts());
        made.complaintProperty().addListener((p, before, now) -> complain());
        addEventFilter(KeyEvent.KEY_PRESSED, e -> {
            if (e.getCode() != KeyCode.ESCAPE) return;
            leave.run();
            e.consume();
        });
        show();
        complain();
    }

    private Node head(Runnable leave) {
        Batch b = made.batchProperty().get();
        HBox head = new HBox(
                Say.label("Batch " + b.id(), "title"),
                Say.quiet(b.plan().title() + " · " + b.on()),
                Say.spring(),
                new Word("Esc: back to the desk", leave));
        head.getStyleClass().addAll("head", "gap-m");
        head.setAlignment(Pos.BASELINE_LEFT);
        return head;
    }

    private static ScrollPane scrolled(Node inside) {
        ScrollPane scroll = new ScrollPane(inside);
        scroll.setFitToWidth(true);
        scroll.setHbarPolicy(ScrollPane.ScrollBarPolicy.NEVER);
        return scroll;
    }

    private static Node column(String width, String side, Node... inside) {
        VBox all = new VBox(inside);
        all.getStyleClass().add("gap-m");
        ScrollPane scroll = scrolled(all);
        VBox.setVgrow(scroll, Priority.ALWAYS);
        VBox column = new VBox(scroll);
        column.getStyleClass().addAll("place", width, side);
        return column;
    }

    private Node who() {
        Field who = new Field(() -> made.batchProperty().get().who(), made::who, false)
                .named("who made it")
                .styled("boxed");
        who.setPromptText("name or initials");
        Field note = new Field(() -> "", text -> text.isBlank() ? Optional.empty() : made.note(text), false)
                .named("a note on this batch")
                .styled("boxed");
        note.setPromptText("a note, then Enter");
        VBox box = new VBox(Say.quiet("Made by"), who, Say.quiet("Notes"), note);
        box.getStyleClass().add("gap-xs");
        VBox notes = new VBox();
        Runnable tell = () -> notes.getChildren()
                .setAll(made.batchProperty().get().notes().stream()
                        .map(n -> (Node) Say.wrapped("– " + n, "quiet"))
                        .toList());
        made.batchProperty().addListener((p, before, now) -> tell.run());
        tell.run();
        box.getChildren().add(notes);
        return box;
    }

    private void show() {
        weighed();
        says();
        puts();
    }

    private void complain() {
        String words = made.complaintProperty().get();
        complaint.setText(words.isEmpty() ? "" : "✕ " + words);
        Say.show(complaint, !words.isEmpty());
    }

    private void weighed() {
        Batch b = made.batchProperty().get();
        GridPane grid = new GridPane();
        grid.getStyleClass().add("weighed-grid");
        grid.addRow(
                0,
                Say.label("", "quiet"),
                Say.label("plan g", "quiet", "small"),
                Say.label("real g", "quiet", "small"));
        List<Weighing> all = b.weighings();
        for (int n = 0; n < all.size(); n++) {
            Weighing w = all.get(n);
            OptionalDouble g = b.weighedG().get(n);
            Label name = Say.wrapped(name(b, w));
            GridPane.setHgrow(name, Priority.ALWAYS);
            Label planned = Say.label(Words.grams(w.massG(), b.balance()), "quiet");
            Label real = Say.label(g.isPresent() ? Words.grams(g.getAsDouble(), b.balance()) : "–", "lands");
            for (Label l : List.of(planned, real)) {
                l.setMinWidth(Region.USE_PREF_SIZE);
                GridPane.setHalignment(l, javafx.geometry.HPos.RIGHT);
            }
            grid.addRow(n + 1, name, planned, real);
        }
        weighed.getChildren().setAll(grid);
    }

    private static String name(Batch b, Weighing w) {
        if (w.role() == Weighing.Role.ITEM) {
            int of = b.corrections().get(w.place());
            return Words.item(b.plan().items().get(w.place())) + (of > 0 ? ", correction " + of : "");
        }
        Stock s = b.plan().stocks().get(w.place());
        String bottle = w.from().isPresent()
                ? Words.stock(b.plan(), b.plan().stock(w.from().get()))
                : Words.shortName(w.ingredient());
        return bottle + " for the stock " + Words.ratio(s);
    }

    private void says() {
        says.getChildren().clear();
        MadeBatch.Seen seen = made.seenProperty().get();
        if (seen == null) return;
        if (!seen.landing().isEmpty()) {
            boolean inside = seen.landing().stream().allMatch(p -> p.inside());
            String known = made.batchProperty().get().measured().isEmpty() ? "As weighed" : "By all that is known now";
            String words = inside
                    ? known + " it lands inside every tolerance " + Words.times(seen.chance()) + " times in 100."
                    : "✕ " + known + " it misses "
                            + seen.landing().stream().filter(p -> !p.inside()).count() + " of "
                            + seen.landing().size() + ".";
            says.getChildren().add(Say.wrapped(words, "headline", inside ? "strong" : "missed"));
        }
        seen.verdict()
                .ifPresentOrElse(
                        v -> {
                            says.getChildren().add(Say.heading("Measured against predicted"));
                            says.getChildren().add(Say.wrapped(Words.spoken(v.sentence(), bottles())));
                        },
                        () -> says.getChildren()
                                .add(Say.wrapped(
                                        "Nothing is measured yet. Type values beside the targets when it was.",
                                        "quiet")));
        teaches.getChildren().clear();
        if (!seen.beliefs().isEmpty()) {
            teaches.getChildren().add(Say.heading("What it teaches of the bottles"));
            for (MadeBatch.Belief b : seen.beliefs()) {
                teaches.getChildren()
                        .add(Say.wrapped(
                                Words.capital(b.words()) + ": " + Figures.withUncertainty(b.factor(), b.uAfter())
                                        + " times its file, known to " + Figures.significant(100 * b.uAfter(), 2)
                                        + " % in place of "
                                        + Figures.significant(100 * b.uBefore(), 2) + " %."));
            }
            seen.beliefs().stream()
                    .map(MadeBatch.Belief::ingredient)
                    .distinct()
                    .filter(made::canLearn)
                    .forEach(id -> teaches.getChildren().add(keep(id)));
        }
    }

    private Set<Ingredient> bottles() {
        return made.batchProperty().get().asMade().massesG().keySet();
    }

    /** Asks for a lot's number to keep a bottle's new figures under. */
    private Node keep(String ingredient) {
        String bottle = bottles().stream()
                .filter(i -> i.id().equals(ingredient))
                .map(Words::inSentence)
                .findFirst()
                .orElse(ingredient);
        Field number = new Field(
                        () -> "", text -> text.isBlank() ? Optional.empty() : made.learn(ingredient, text), false)
                .named("keep what was learned of " + bottle + " as a lot: its number")
                .styled("boxed")
                .columns(7);
        number.setPromptText("lot number");
        number.setMaxWidth(USE_PREF_SIZE);
        return new VBox(Say.wrapped("keep as a lot of " + bottle + ":", "quiet"), number, new ErrorLine(number));
    }

    private Node heating() {
        String[] typed = {"", "", ""};
        Field before = gram(typed, 0, "vessel before heating in g", "before");
        Field after = gram(typed, 1, "vessel after heating in g", "after");
        Field back = gram(typed, 2, "water given back in g", "given back");
        Button take = new Button("Take");
        take.getStyleClass().setAll("plain");
        take.setAccessibleText("take the vessel's weights");
        take.setOnAction(e -> made.heating(typed[0], typed[1], typed[2]));
        FlowPane line = new FlowPane(before, after, back, take);
        line.getStyleClass().add("cards");
        VBox box = new VBox(
                Say.wrapped("Vessel with lid before and after heating, and water given back, in g", "quiet"), line);
        box.getStyleClass().add("gap-xs");
        Label now = Say.wrapped("", "quiet", "small");
        Runnable tell = () -> {
            now.setText(made.batchProperty()
                    .get()
                    .heating()
                    .map(h -> "lost " + Figures.significant(h.lostG(), 4) + " g, missing in the end "
                            + Figures.significant(h.missingG(), 3) + " g")
                    .orElse(""));
            Say.show(now, !now.getText().isEmpty());
        };
        made.batchProperty().addListener((p, was, is) -> tell.run());
        tell.run();
        box.getChildren().add(now);
        return box;
    }

    private static Field gram(String[] typed, int k, String name, String prompt) {
        Field f = new Field(
                        () -> typed[k],
                        text -> {
                            typed[k] = text;
                            return Optional.empty();
                        },
                        true)
                .named(name)
                .styled("boxed")
                .columns(6);
        f.setPromptText(prompt);
        return f;
    }

    /** Made anew, and the focus with it: whoever asked for a correction goes on to weigh it. */
    private void puts() {
        List<Object> now = List.of(
                made.batchProperty().get(),
                made.correctingProperty().get(),
                made.correctionProperty().get());
        if (now.equals(put)) return; // a button that is being pressed stays
        put = now;
        Node focused = getScene() == null ? null : getScene().getFocusOwner();
        boolean within = asked;
        for (Node n = focused; n != null; n = n.getParent()) within |= n == puts;
        fillPuts();
        asked = within && made.correctingProperty().get();
        if (!within) return;
        if (asked) requestFocus();
        else
            puts.getChildren().stream()
                    .filter(Node::isFocusTraversable)
                    .findFirst()
                    .ifPresent(Node::requestFocus);
    }

    private void fillPuts() {
        puts.getChildren().clear();
        if (made.points().isEmpty()) return;
        HBox head = new HBox(Say.heading("What would put it right"));
        head.getStyleClass().add("gap-m");
        head.setAlignment(Pos.BASELINE_LEFT);
        puts.getChildren().add(head);
        if (made.correctingProperty().get()) {
            puts.getChildren().add(Say.quiet("looking …"));
            return;
        }
        if (made.correctionProperty().get().isEmpty()) {
            puts.getChildren().add(new Word("look for the least addition", made::correct).styled("strong"));
            return;
        }
        Correction c = made.correctionProperty().get().get();
        Batch b = made.batchProperty().get();
        puts.getChildren().add(Say.wrapped(Words.spoken(c.reason(), bottles())));
        for (Stock s : c.stocks())
            puts.getChildren()
                    .add(Say.wrapped("First make a stock: " + Words.grams(s.ingredientG(), b.balance()) + " g "
                            + Words.inSentence(s.ingredient()) + " in " + Words.grams(s.diluentG(), b.balance()) + " g "
                            + Words.inSentence(s.diluent()) + "."));
        for (Item i : c.items()) {
            HBox row = new HBox(
                    Say.wrapped(Words.item(i)),
                    Say.spring(),
                    Say.label("+ " + Words.grams(i.massG(), b.balance()) + " g", "grams"));
            row.setAlignment(Pos.BASELINE_LEFT);
            puts.getChildren().add(row);
        }
        c.notes().forEach(n -> puts.getChildren().add(Say.wrapped("Mind: " + Words.spoken(n, bottles()), "quiet")));
        if (c.outcome() == Correction.Outcome.ADD) {
            puts.getChildren()
                    .add(Say.wrapped(
                            "Then it lands " + Words.times(c.then().chance()) + " times in 100, in "
                                    + Figures.significant(c.volumeMl(), 4) + " mL.",
                            "lands"));
            Button go = new Button("Weigh it in ⏎");
            go.getStyleClass().setAll("go");
            go.setOnAction(e -> made.weighCorrection());
            puts.getChildren().add(go);
        }
    }

    /** The fields of measured values, for a test to type in. */
    public MeasuredTable table() {
        return table;
    }
}
