package org.hazewright.desk;

import java.nio.file.Path;
import java.time.LocalDate;
import java.util.List;
import java.util.Optional;
import java.util.function.Consumer;
import javafx.scene.Node;
import javafx.scene.Parent;
import javafx.scene.Scene;
import javafx.scene.control.ScrollPane;
import javafx.scene.input.Clipboard;
import javafx.scene.input.ClipboardContent;
import javafx.scene.input.KeyCode;
import javafx.scene.input.KeyCodeCombination;
import javafx.scene.input.KeyCombination;
import javafx.scene.input.TransferMode;
import javafx.scene.layout.BorderPane;
import javafx.scene.layout.HBox;
import javafx.scene.layout.Priority;
import javafx.scene.layout.StackPane;
import javafx.scene.layout.VBox;
import javafx.stage.Stage;
import org.hazewright.desk.balance.BalanceView;
import org.hazewright.desk.batch.BatchView;
import org.hazewright.desk.brief.BriefPlace;
import org.hazewright.desk.logbook.LogbookView;
import org.hazewright.desk.look.Look;
import org.hazewright.desk.look.Palette;
import org.hazewright.desk.model.AtBalance;
import org.hazewright.desk.model.Desk;
import org.hazewright.desk.model.Draft;
import org.hazewright.desk.model.Edits;
import org.hazewright.desk.model.Notice;
import org.hazewright.desk.model.ShelfState;
import org.hazewright.desk.model.Shown;
import org.hazewright.desk.paper.PdfPaper;
import org.hazewright.desk.paper.Printing;
import org.hazewright.desk.paper.RecipePaper;
import org.hazewright.desk.parts.Chooser;
import org.hazewright.desk.parts.Hint;
import org.hazewright.desk.parts.NoticeBar;
import org.hazewright.desk.parts.Say;
import org.hazewright.desk.parts.SystemChooser;
import org.hazewright.desk.parts.Word;
import org.hazewright.desk.pen.Pen;
import org.hazewright.desk.readings.ReadingsPlace;
import org.hazewright.desk.recipe.RecipePlace;
import org.hazewright.desk.shelf.ShelfView;
import org.hazewright.desk.spectra.SpectraPlace;
import org.hazewright.desk.spectra.SpectraPlot;
import org.hazewright.files.FaultReport;

/** The window: Brief, Spectra, Recipe and Readings side by side in the order of the work. */
public final class Window {
    private static final String BRIEFS = "Briefs, recipes and batches";

    private final Stage stage;
    private final Desk desk;
    private final Look look;
    private final Chooser chooser;
    private final StackPane whole = new StackPane();
    private final BorderPane places = new BorderPane();
    private final SpectraPlace spectra;
    private final BriefPlace brief;
    private final RecipePlace recipe;
    private final ReadingsPlace readings;
    private final Deeds deeds = new Doing();
    private BalanceView balance;
    private BatchView batch;
    private boolean shelfOpen;
    private boolean logbookOpen;
    private boolean keysOpen;
    private Node atDesk = new StackPane();
    private final Head head;

    /** A window on a stage of its own; call {@link #show}. */
    public Window(Stage stage, Desk desk, Look look, Optional<Chooser> chooser) {
        this.stage = stage;
        this.desk = desk;
        this.look = look;
        this.chooser = chooser.orElseGet(() -> new SystemChooser(stage));
        look.paletteProperty().set(desk.remembered().flag("dark") ? Palette.DARK : Palette.LIGHT);
        look.scaleProperty().set(desk.remembered().number("letters", 1));
        look.scaleProperty().addListener((p, before, now) -> desk.remembered().keep("letters", now.toString()));
        brief = new BriefPlace(desk, deeds::shelf);
        spectra = new SpectraPlace(desk, look, deeds::savePicture);
        readings = new ReadingsPlace(desk.foreseeing(), look, desk.remembered());
        recipe = new RecipePlace(desk, deeds::print, deeds::saveSheet, deeds::copyGrams);
        head = new Head(desk, look, deeds);
        places.setTop(new VBox(head, new NoticeBar(desk.notices())));
        whole.getChildren().add(places);
        lay();
        desk.shelfProperty().addListener((p, before, now) -> lay());
        desk.solving()
                .faultProperty()
                .addListener((p, before, now) ->
                        now.ifPresent(f -> desk.notices().tell(Notice.wrong("fault", FaultReport.of(f)))));
        desk.weighingProperty().addListener((p, before, now) -> turn());
        desk.madeProperty().addListener((p, before, now) -> turn());
        Scene scene = new Scene(
                whole,
                desk.remembered().number("window.width", 1440),
                desk.remembered().number("window.height", 900));
        stage.setOnHidden(e -> {
            desk.remembered().keep("window.width", Double.toString(scene.getWidth()));
            desk.remembered().keep("window.height", Double.toString(scene.getHeight()));
        });
        look.dress(scene);
        keys(scene);
        drops(scene);
        stage.setScene(scene);
        stage.setMinWidth(900);
        stage.setMinHeight(560);
        stage.setTitle("Hazewright");
        desk.edits()
                .nowProperty()
                .addListener(
                        (p, before, now) -> stage.setTitle(now == null ? "Hazewright" : now.title() + " – Hazewright"));
        stage.setOnCloseRequest(e -> {
            if (!desk.papers().changedProperty().get()) return;
            e.consume();
            askBeforeClosing();
        });
    }

    /** How a file is opened with the program that the system has for it. */
    public void opensOutside(Consumer<Path> opener) {
        desk.opensOutside(opener);
    }

    public void show() {
        stage.show();
        if (desk.edits().now() != null) brief.focusFirst();
        else
            desk.edits().nowProperty().addListener(new javafx.beans.value.ChangeListener<>() {
                @Override
                public void changed(javafx.beans.value.ObservableValue<? extends Draft> p, Draft before, Draft now) {
                    desk.edits().nowProperty().removeListener(this);
                    brief.focusFirst();
                }
            });
    }

    private void lay() {
        ShelfState shelf = desk.shelfProperty().get();
        if (shelf.problem().isPresent()) {
            atDesk = noShelf(shelf);
            turn();
            return;
        }
        if (!shelf.refused().isEmpty())
            desk.notices()
                    .tell(Notice.asked(
                            "shelf",
                            shelf.refused().size() == 1
                                    ? "One file of the shelf cannot be used: "
                                            + shelf.refused().get(0)
                                    : shelf.refused().size() + " files of the shelf cannot be used; the first: "
                                            + shelf.refused().get(0),
                            new Notice.Way("read it again", desk::readShelfAgain),
                            new Notice.Way("go on without", () -> {})));
        if (atDesk.getId() != null) return;
        BorderPane desktop = new BorderPane();
        desktop.setId("places");
        brief.getStyleClass().add("brief-width");
        recipe.getStyleClass().add("recipe-width");
        brief.getChildren().add(0, hint("wish", "Say here what is wanted."));
        recipe.getChildren().add(0, hint("weigh", "These grams give it. When they look right, stand at the balance."));
        readings.narrowWhen(spectra.widthProperty());
        VBox middle = new VBox(hint("drag", "Drag an amber box, or type on the left: the recipe follows."), spectra);
        middle.getChildren().add(readings);
        middle.getStyleClass().add("middle");
        VBox.setVgrow(spectra, Priority.ALWAYS);
        desktop.setLeft(brief);
        desktop.setCenter(middle);
        desktop.setRight(recipe);
        atDesk = desktop;
        turn();
    }

    private Hint hint(String name, String words) {
        return new Hint(desk.remembered(), name, words);
    }

    private Node noShelf(ShelfState shelf) {
        VBox box = new VBox(
                Say.label("There is no shelf to work from", "headline"),
                Say.wrapped(shelf.problem().orElse("")),
                Say.wrapped(
                        "A shelf is a folder with one file for each ingredient; a recipe is made of what is on it.",
                        "quiet"));
        for (String words :
                shelf.refused().subList(0, Math.min(8, shelf.refused().size())))
            box.getChildren().add(Say.wrapped("✕ " + words, "missed"));
        HBox ways = new HBox();
        ways.getStyleClass().add("gap-m");
        if (shelf.folder().isPresent()) {
            ways.getChildren()
                    .add(new Word("use the shelf of the program", () -> desk.useShelf(Optional.empty()))
                            .styled("strong"));
            ways.getChildren().add(new Word("read it again", desk::readShelfAgain).styled("strong"));
        }
        ways.getChildren()
                .add(new Word(
                                "choose a folder…",
                                () -> chooser.folder("Choose the folder of a shelf")
                                        .ifPresent(p -> desk.useShelf(Optional.of(p))))
                        .styled("strong"));
        box.getChildren().add(ways);
        box.getStyleClass().addAll("place", "gap-m");
        box.setMaxWidth(720);
        StackPane middle = new StackPane(box);
        return middle;
    }

    /** Turns to the balance, to a batch, or back to the places. */
    private void turn() {
        Optional<AtBalance> weighing = desk.weighingProperty().get();
        if (weighing.isPresent()) {
            balance = new BalanceView(weighing.get(), desk::leaveBalance, desk::finishWeighing);
            center(balance, false);
            balance.focusField();
        } else if (desk.madeProperty().get().isPresent()) {
            batch = new BatchView(desk.madeProperty().get().get(), chooser, desk::leaveBatch);
            center(batch, false);
            batch.requestFocus();
        } else if (shelfOpen) {
            ShelfView view = new ShelfView(
                    desk.shelfRoom(),
                    desk.adding(),
                    ShelfState.place(desk.shelfProperty().get().folder()),
                    look,
                    chooser,
                    () -> shelf(false));
            center(view, false);
            view.requestFocus();
        } else if (logbookOpen) {
            LogbookView view = new LogbookView(desk.logbookRoom(), desk.logbookRoom()::open, () -> logbook(false));
            center(view, false);
            view.requestFocus();
        } else if (keysOpen) {
            KeysView view = new KeysView(() -> keys(false));
            center(view, false);
            view.requestFocus();
        } else center(atDesk, true);
    }

    private void shelf(boolean open) {
        shelfOpen = open;
        turn();
    }

    private void logbook(boolean open) {
        logbookOpen = open;
        if (open) desk.logbookRoom().read();
        turn();
    }

    private void keys(boolean open) {
        keysOpen = open;
        turn();
    }

    /** Puts one view in the window; the head belongs to the desk. */
    private void center(Node view, boolean head) {
        places.setCenter(view);
        Say.show(this.head, head);
    }

    /** Turns to the shelf. */
    void openShelf() {
        shelf(true);
    }

    /** Turns to the logbook. */
    void openLogbook() {
        logbook(true);
    }

    /** Turns back from the shelf. */
    void closeShelf() {
        shelf(false);
    }

    /** The view of the batch that was looked at last; null before the first. */
    public BatchView batch() {
        return batch;
    }

    /** The view at the balance that was opened last; null before the first. */
    public BalanceView balance() {
        return balance;
    }

    private void keys(Scene scene) {
        on(scene, "Shortcut+O", deeds::open);
        on(scene, "Shortcut+N", deeds::begin);
        on(scene, "Shortcut+S", deeds::save);
        on(scene, "Shortcut+Shift+S", deeds::saveAs);
        on(scene, "Shortcut+P", deeds::print);
        on(scene, "Shortcut+G", deeds::copyGrams);
        on(scene, "Shortcut+T", deeds::copyTargets);
        on(scene, "Shortcut+Plus", () -> look.larger(true));
        on(scene, "Shortcut+Equals", () -> look.larger(true));
        on(scene, "Shortcut+Minus", () -> look.larger(false));
        on(scene, "F1", deeds::keys);
        on(scene, "Shortcut+Enter", deeds::balance);
        on(scene, "Shortcut+L", deeds::shelf);
        on(scene, "Shortcut+J", deeds::logbook);
        on(scene, "F6", () -> nextPlace(1));
        on(scene, "Shift+F6", () -> nextPlace(-1));
        scene.addEventFilter(javafx.scene.input.KeyEvent.KEY_PRESSED, e -> {
            boolean undo = new KeyCodeCombination(KeyCode.Z, KeyCombination.SHORTCUT_DOWN).match(e);
            boolean redo =
                    new KeyCodeCombination(KeyCode.Z, KeyCombination.SHORTCUT_DOWN, KeyCombination.SHIFT_DOWN).match(e)
                            || new KeyCodeCombination(KeyCode.Y, KeyCombination.SHORTCUT_DOWN).match(e);
            if (!undo && !redo) return;
            e.consume();
            if (desk.weighingProperty().get().isPresent()) {
                if (undo) desk.weighingProperty().get().get().back();
                return;
            }
            desk.madeProperty().get().ifPresentOrElse(made -> step(made.edits(), undo), () -> step(desk.edits(), undo));
        });
    }

    private static void step(Edits<?> edits, boolean back) {
        if (back) edits.undo();
        else edits.redo();
    }

    private static void on(Scene scene, String keys, Runnable act) {
        scene.getAccelerators().put(KeyCombination.valueOf(keys), act);
    }

    private void drops(Scene scene) {
        scene.setOnDragOver(e -> {
            if (e.getDragboard().hasFiles()) e.acceptTransferModes(TransferMode.COPY);
            e.consume();
        });
        scene.setOnDragDropped(e -> {
            boolean some =
                    e.getDragboard().hasFiles() && !e.getDragboard().getFiles().isEmpty();
            if (some) deeds.open(e.getDragboard().getFiles().get(0).toPath());
            e.setDropCompleted(some);
            e.consume();
        });
    }

    private void askBeforeClosing() {
        desk.notices()
                .tell(Notice.asked(
                        "closing",
                        "“" + desk.edits().now().title() + "” has changes that are not saved.",
                        new Notice.Way("save and close", () -> saveThen(stage::close)),
                        new Notice.Way("close without saving", () -> {
                            desk.papers().giveUp();
                            stage.close();
                        }),
                        new Notice.Way("stay", () -> {})));
    }

    private void saveThen(Runnable then) {
        Optional<Shown> shown =
                Optional.ofNullable(desk.solving().shownProperty().get());
        if (desk.papers().save(shown, then)) return;
        chooser.save("Save the brief", desk.edits().now().name() + ".brief.toml", "Briefs", ".brief.toml")
                .ifPresent(p -> desk.papers().saveAs(named(p), shown, then));
    }

    private static Path named(Path p) {
        String name = p.getFileName().toString();
        return name.endsWith(".toml") ? p : p.resolveSibling(name + ".brief.toml");
    }

    public Desk desk() {
        return desk;
    }

    public Look look() {
        return look;
    }

    public SpectraPlace spectra() {
        return spectra;
    }

    public BriefPlace brief() {
        return brief;
    }

    public Stage stage() {
        return stage;
    }

    private final class Doing implements Deeds {
        @Override
        public void open() {
            chooser.open("Open", BRIEFS, ".brief.toml", ".recipe.toml", ".batch.toml", ".toml", ".csv", ".xlsx")
                    .ifPresent(this::open);
        }

        @Override
        public void open(Path file) {
            String name = file.getFileName().toString().toLowerCase(java.util.Locale.ROOT);
            boolean replaces = name.endsWith(".toml") && !name.endsWith(".batch.toml");
            if (replaces) ifSaved(() -> desk.open(file));
            else desk.open(file);
        }

        /** Runs at once when nothing would be lost, else asks first. */
        private void ifSaved(Runnable run) {
            if (!desk.papers().changedProperty().get()) {
                run.run();
                return;
            }
            desk.notices()
                    .tell(Notice.asked(
                            "closing",
                            "“" + desk.edits().now().title() + "” has changes that are not saved.",
                            new Notice.Way("save first", () -> saveThen(run)),
                            new Notice.Way("leave them", () -> {
                                desk.papers().giveUp();
                                run.run();
                            }),
                            new Notice.Way("stay", () -> {})));
        }

        @Override
        public void begin() {
            ifSaved(desk::beginAgain);
        }

        @Override
        public void save() {
            saveThen(() -> {});
        }

        @Override
        public void saveAs() {
            chooser.save("Save the brief as", desk.edits().now().name() + ".brief.toml", "Briefs", ".brief.toml")
                    .ifPresent(p -> desk.papers()
                            .saveAs(
                                    named(p),
                                    Optional.ofNullable(
                                            desk.solving().shownProperty().get()),
                                    () -> {}));
        }

        @Override
        public void saveSheet() {
            if (settled().isEmpty()) return;
            chooser.save(
                            "Save the recipe's sheet",
                            desk.edits().now().name() + ".xlsx",
                            "Workbooks and PDF",
                            ".xlsx",
                            ".pdf")
                    .ifPresent(p -> {
                        Consumer<Pen> plots = spectraOnPaper();
                        desk.saveSheet(p, shown -> pdf(shown, plots));
                    });
        }

        private byte[] pdf(Shown shown, Consumer<Pen> plots) {
            try (PdfPaper paper = new PdfPaper(shown.outlook().brief().title())) {
                new RecipePaper(paper, shown.outlook(), shown.answer(), LocalDate.now()).draw(plots);
                return paper.bytes();
            }
        }

        /** Draws the spectra in the room that paper has for them. */
        private Consumer<Pen> spectraOnPaper() {
            SpectraPlot plot =
                    spectra.picture(Palette.LIGHT, RecipePaper.spectraWidth(), RecipePaper.spectraHeight(), 9.5);
            return plot::draw;
        }

        private Optional<Shown> settled() {
            return Optional.ofNullable(desk.solving().shownProperty().get()).filter(s -> !s.following());
        }

        @Override
        public void savePicture() {
            new Pictures(desk, look, chooser).save(spectra);
        }

        @Override
        public void print() {
            settled()
                    .flatMap(s -> Printing.print(stage, s.outlook(), s.answer(), spectraOnPaper()))
                    .ifPresent(words -> desk.notices()
                            .tell(Notice.asked(
                                    "print",
                                    words,
                                    new Notice.Way("save as PDF…", this::saveSheet),
                                    new Notice.Way("leave it", () -> {}))));
        }

        @Override
        public void copyGrams() {
            copy(desk.copyText(), "The grams are");
        }

        @Override
        public void copyTargets() {
            copy(desk.copyTargets(), "The targets are");
        }

        private void copy(Optional<String> text, String what) {
            if (text.isEmpty()) return;
            ClipboardContent content = new ClipboardContent();
            content.putString(text.get());
            Clipboard.getSystemClipboard().setContent(content);
            desk.notices().tell(Notice.told("copied", what + " on the clipboard; paste them into a spreadsheet."));
        }

        @Override
        public void balance() {
            desk.standAtBalance();
        }

        @Override
        public void shelf() {
            Window.this.shelf(true);
        }

        @Override
        public void logbook() {
            Window.this.logbook(true);
        }

        @Override
        public void dark(boolean yes) {
            look.paletteProperty().set(yes ? Palette.DARK : Palette.LIGHT);
            desk.remembered().keep("dark", yes);
        }

        @Override
        public void keys() {
            Window.this.keys(true);
        }
    }

    /** Puts the focus into the next place; a place's own first field or the plots take it. */
    private void nextPlace(int by) {
        List<Node> order = List.of(brief, spectra.surface(), recipe, readings);
        Node focused = stage.getScene().getFocusOwner();
        int at = -1;
        for (Node n = focused; n != null && at < 0; n = n.getParent()) at = order.indexOf(n);
        Node next = order.get(Math.floorMod(at < 0 ? 0 : at + by, order.size()));
        if (next == brief) brief.focusFirst();
        else if (next.isFocusTraversable()) next.requestFocus();
        else first(next).ifPresent(Node::requestFocus);
    }

    private static Optional<Node> first(Node in) {
        if (in.isFocusTraversable() && in.isVisible() && !in.isDisabled() && !(in instanceof ScrollPane))
            return Optional.of(in);
        if (!(in instanceof Parent p) || !in.isVisible()) return Optional.empty();
        for (Node child : p.getChildrenUnmodifiable()) {
            Optional<Node> found = first(child);
            if (found.isPresent()) return found;
        }
        return Optional.empty();
    }
}
