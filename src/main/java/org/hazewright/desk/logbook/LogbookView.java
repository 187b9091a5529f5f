package org.hazewright.desk.logbook;

import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import java.util.function.Consumer;
import javafx.geometry.Pos;
import javafx.geometry.VPos;
import javafx.scene.Node;
import javafx.scene.control.Label;
import javafx.scene.control.ScrollPane;
import javafx.scene.input.KeyCode;
import javafx.scene.input.KeyEvent;
import javafx.scene.layout.BorderPane;
import javafx.scene.layout.GridPane;
import javafx.scene.layout.HBox;
import javafx.scene.layout.Priority;
import javafx.scene.layout.VBox;
import org.hazewright.desk.model.LogbookRoom;
import org.hazewright.desk.model.Notice;
import org.hazewright.desk.parts.Say;
import org.hazewright.desk.parts.Word;

/** The view of the logbook: the batches that were made, the latest first; each opens. */
public final class LogbookView extends BorderPane {
    private final LogbookRoom room;
    private final Consumer<Path> openBatch;
    private final VBox books = new VBox();

    /**
     * @param openBatch turns to a batch of the logbook
     * @param leave goes back to the desk
     */
    public LogbookView(LogbookRoom room, Consumer<Path> openBatch, Runnable leave) {
        this.room = room;
        this.openBatch = openBatch;
        getStyleClass().add("balance-view");
        HBox head = new HBox(
                Say.label("Logbook", "title"),
                Say.quiet("what was made"),
                Say.spring(),
                new Word("Esc: back to the desk", leave));
        head.getStyleClass().addAll("head", "gap-m");
        head.setAlignment(Pos.BASELINE_LEFT);
        setTop(head);
        books.getStyleClass().add("gap-l");
        ScrollPane scroll = new ScrollPane(books);
        scroll.setFitToWidth(true);
        scroll.setHbarPolicy(ScrollPane.ScrollBarPolicy.NEVER);
        VBox.setVgrow(scroll, Priority.ALWAYS);
        VBox place = new VBox(scroll);
        place.getStyleClass().add("place");
        setCenter(place);
        room.pagesProperty().addListener((p, before, now) -> show(now));
        addEventFilter(KeyEvent.KEY_PRESSED, e -> {
            if (e.getCode() != KeyCode.ESCAPE) return;
            leave.run();
            e.consume();
        });
        show(room.pagesProperty().get());
    }

    private void show(Optional<List<LogbookRoom.Pages>> pages) {
        books.getChildren().clear();
        if (pages.isEmpty()) books.getChildren().add(Say.quiet("Reading …"));
        else if (pages.get().isEmpty())
            books.getChildren()
                    .add(Say.wrapped(
                            "No batch has been recorded yet. Stand at the balance with a recipe; what was weighed stands"
                                    + " here when you are done."));
        else pages.get().forEach(p -> books.getChildren().add(book(p)));
    }

    private Node book(LogbookRoom.Pages pages) {
        HBox head = new HBox(Say.label(pages.logbook().toString(), "quiet", "small"));
        head.getStyleClass().add("gap-m");
        head.setAlignment(Pos.BASELINE_LEFT);
        for (Notice.Way way : room.showing(pages.logbook()))
            head.getChildren().add(new Word("open the workbook", way.act()));
        VBox box = new VBox(head);
        box.getStyleClass().add("gap-s");
        pages.wrong().ifPresent(w -> box.getChildren().add(Say.wrapped("✕ " + w, "missed")));
        if (pages.lines().isEmpty()) return box;
        GridPane grid = new GridPane();
        grid.getStyleClass().add("logbook-grid");
        grid.addRow(
                0,
                quiet("day"),
                quiet("batch"),
                quiet("of"),
                quiet("by"),
                quiet("state"),
                quiet("as made"),
                quiet("measured"));
        for (LogbookRoom.Line l : pages.lines())
            grid.addRow(
                    grid.getRowCount(),
                    whole(l.on().map(Object::toString).orElse("")),
                    batch(l),
                    whole(l.title()),
                    whole(l.who()),
                    whole(l.state()),
                    whole(l.landing(), "logbook-landing"),
                    Say.wrapped(room.spoken(l.verdict())));
        grid.getChildren().forEach(n -> GridPane.setValignment(n, VPos.BASELINE));
        box.getChildren().add(grid);
        return box;
    }

    private Node batch(LogbookRoom.Line l) {
        if (l.file().isEmpty()) return whole(l.batch());
        return new Word(l.batch(), () -> openBatch.accept(l.file().get()))
                .named("open the batch " + l.batch())
                .styled("strong");
    }

    /** Text that is never cut; the last column gives way. */
    private static Label whole(String text, String... classes) {
        Label label = Say.label(text, classes);
        label.setMinWidth(USE_PREF_SIZE);
        return label;
    }

    private static Node quiet(String text) {
        return whole(text, "quiet", "small");
    }
}
