package org.hazewright.desk.shelf;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import javafx.geometry.Pos;
import javafx.scene.Node;
import javafx.scene.canvas.Canvas;
import javafx.scene.control.CheckBox;
import javafx.scene.control.Label;
import javafx.scene.control.ScrollPane;
import javafx.scene.input.KeyCode;
import javafx.scene.input.KeyEvent;
import javafx.scene.layout.BorderPane;
import javafx.scene.layout.HBox;
import javafx.scene.layout.Priority;
import javafx.scene.layout.Region;
import javafx.scene.layout.VBox;
import org.hazewright.desk.look.Look;
import org.hazewright.desk.model.Adding;
import org.hazewright.desk.model.ShelfRoom;
import org.hazewright.desk.model.ShelfState;
import org.hazewright.desk.model.Words;
import org.hazewright.desk.parts.Chooser;
import org.hazewright.desk.parts.Field;
import org.hazewright.desk.parts.Room;
import org.hazewright.desk.parts.Say;
import org.hazewright.desk.parts.Word;
import org.hazewright.desk.pen.CanvasPen;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Part;

/** The view of the shelf: what is on it, how it compares, what is known of it. One for the life of the window, as it listens to the room. */
public final class ShelfView extends BorderPane {
    private final ShelfRoom room;
    private final Look look;
    private final Chooser chooser;
    private final Adding adding;
    private final VBox list = new VBox();
    private final Plot absorption = new Plot(false);
    private final Plot scattering = new Plot(true);
    private final VBox right = new VBox();
    private final IngredientCard card;
    private Optional<Ingredient> pressed = Optional.empty();
    private final Label place = Say.quiet("");
    private final Label checked = Say.wrapped("", "quiet", "small");

    public ShelfView(ShelfRoom room, Adding adding, Look look, Chooser chooser, Runnable leave) {
        this.room = room;
        this.adding = adding;
        this.look = look;
        this.chooser = chooser;
        getStyleClass().add("balance-view");
        card = new IngredientCard(room, new LotForm(adding, chooser));
        setTop(head(leave));
        BorderPane columns = new BorderPane();
        setCenter(new Room(columns, 95, 40));
        columns.setLeft(left());
        VBox middle = new VBox(Say.place("Side by side"), absorption, scattering);
        middle.getStyleClass().addAll("place", "gap-s");
        VBox.setVgrow(absorption, Priority.ALWAYS);
        VBox.setVgrow(scattering, Priority.ALWAYS);
        columns.setCenter(middle);
        ScrollPane scroll = scrolled(right);
        VBox.setVgrow(scroll, Priority.ALWAYS);
        VBox side = new VBox(scroll);
        side.getStyleClass().addAll("place", "recipe-width", "side-right");
        columns.setRight(side);
        right.getChildren().setAll(card);
        room.findProperty().addListener((p, before, now) -> list());
        room.shelfProperty().addListener((p, before, now) -> list());
        room.chosenProperty().addListener((p, before, now) -> {
            right.getChildren().setAll(card);
            list();
        });
        room.linesProperty().addListener((p, before, now) -> redraw());
        room.doubtsProperty().addListener((p, before, now) -> doubts());
        look.paletteProperty().addListener((p, before, now) -> redraw());
        addEventFilter(KeyEvent.KEY_PRESSED, e -> {
            if (e.getCode() != KeyCode.ESCAPE) return;
            leave.run();
            e.consume();
        });
        list();
        doubts();
    }

    private Node head(Runnable leave) {
        HBox head =
                new HBox(Say.label("Shelf", "title"), place, Say.spring(), new Word("Esc: back to the desk", leave));
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

    private Node left() {
        Field find = new Field(
                        () -> room.findProperty().get(),
                        text -> {
                            room.findProperty().set(text);
                            return Optional.empty();
                        },
                        true)
                .named("find an ingredient")
                .styled("boxed");
        find.setPromptText("find");
        list.getStyleClass().add("gap-xs");
        ScrollPane scroll = scrolled(list);
        VBox.setVgrow(scroll, Priority.ALWAYS);
        Word add = new Word("add an ingredient…", this::add).styled("strong");
        Word check = new Word("check the shelf", room::check).styled("strong");
        HBox foot = new HBox(add, Say.quiet("·"), check);
        foot.getStyleClass().add("gap-s");
        foot.setAlignment(Pos.BASELINE_LEFT);
        VBox left = new VBox(find, scroll, checked, foot);
        left.getStyleClass().addAll("place", "brief-width", "side-left", "gap-m");
        return left;
    }

    private void add() {
        if (adding.own()) {
            right.getChildren()
                    .setAll(new IngredientForm(
                            adding, chooser, () -> right.getChildren().setAll(card)));
            return;
        }
        VBox ask = new VBox(
                Say.label("The shelf of the program is not written into", "headline"),
                Say.wrapped(
                        "Make a shelf of your own first: a copy of this one in a folder that you choose. It is used from"
                                + " then on."),
                new Word(
                                "choose a folder…",
                                () -> chooser.folder("Choose an empty folder for your shelf")
                                        .ifPresent(adding::makeOwn))
                        .styled("strong"));
        ask.getStyleClass().add("gap-m");
        right.getChildren().setAll(ask);
    }

    private void list() {
        place.setText(ShelfState.place(room.shelfProperty().get().folder()));
        List<Node> all = new ArrayList<>();
        for (Part part : new Part[] {Part.ABSORBER, Part.SCATTERER, Part.MODIFIER, Part.BASE}) {
            List<Ingredient> found = room.found(part);
            if (found.isEmpty()) continue;
            all.add(Say.heading(Words.capital(part.word()) + "s"));
            found.forEach(i -> all.add(row(i)));
        }
        if (all.isEmpty()) all.add(Say.wrapped("Nothing on this shelf is called that.", "quiet"));
        list.getChildren().setAll(all);
        pressed = Optional.empty();
    }

    private Node row(Ingredient i) {
        CheckBox tick = new CheckBox();
        tick.setSelected(room.comparedProperty().get().contains(i.id()));
        tick.setAccessibleText("draw the spectrum of " + i.name());
        tick.setDisable(i.isBlend());
        tick.setOnAction(e -> room.compare(i.id(), tick.isSelected()));
        boolean chosen = room.chosenProperty().get().filter(i::equals).isPresent();
        Word name = new Word((room.favourite(i.id()) ? "★ " : "") + Words.shortName(i), () -> {
            pressed = Optional.of(i);
            room.choose(i);
        });
        name.setMinWidth(0);
        name.setMaxWidth(Double.MAX_VALUE);
        name.setAlignment(Pos.BASELINE_LEFT);
        if (chosen) name.getStyleClass().add("strong");
        HBox.setHgrow(name, Priority.ALWAYS);
        String hand = room.inHand(i.id());
        Label grams = Say.label(hand.isEmpty() ? "" : hand + " g", "quiet", "small");
        grams.setMinWidth(Region.USE_PREF_SIZE);
        HBox row = new HBox(tick, name, grams);
        row.setAlignment(Pos.CENTER_LEFT);
        if (pressed.filter(i::equals)
                .isPresent()) // the list is made anew; whoever walks through it by keys stays where they are
        javafx.application.Platform.runLater(name::requestFocus);
        return row;
    }

    private void doubts() {
        checked.setText(room.doubtsProperty()
                .get()
                .map(d -> d.isEmpty()
                        ? "Checked: nothing looks wrong."
                        : d.size() + (d.size() == 1 ? " figure looks" : " figures look") + " doubtful: "
                                + d.get(0).ingredient() + ", " + d.get(0).sentence()
                                + (d.size() > 1 ? " The others stand with their ingredients." : ""))
                .orElse(""));
        Say.show(checked, !checked.getText().isEmpty());
    }

    private void redraw() {
        absorption.draw();
        scattering.draw();
    }

    /** One of the two plots. */
    private final class Plot extends Region {
        private final Canvas canvas = new Canvas();
        private final boolean scatters;

        Plot(boolean scatters) {
            this.scatters = scatters;
            canvas.setManaged(false);
            getChildren().add(canvas);
            setPrefSize(200, 200);
            setMinSize(100, 100);
        }

        @Override
        protected void layoutChildren() {
            draw();
        }

        private void draw() {
            double w = Math.floor(getWidth());
            double h = Math.floor(getHeight());
            if (w < 60 || h < 60) return;
            canvas.setWidth(w);
            canvas.setHeight(h);
            canvas.getGraphicsContext2D().clearRect(0, 0, w, h);
            new ComparePlot(room.linesProperty().get(), scatters, look.palette(), w, h, look.em())
                    .draw(new CanvasPen(canvas.getGraphicsContext2D()));
            setAccessibleText((scatters ? "reduced scattering of " : "absorption of ")
                    + Words.join(room.linesProperty().get().stream()
                            .map(l -> Words.shortName(l.ingredient()))
                            .toList()));
        }
    }
}
