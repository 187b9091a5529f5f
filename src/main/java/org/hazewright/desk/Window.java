package org.hazewright.desk;

import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import java.util.function.Consumer;
import javafx.scene.Node;
import javafx.scene.Scene;
import javafx.scene.control.TextField;
import javafx.scene.layout.BorderPane;
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
import org.hazewright.desk.model.Notice;
import org.hazewright.desk.model.ShelfState;
import org.hazewright.desk.parts.Chooser;
import org.hazewright.desk.parts.Hint;
import org.hazewright.desk.parts.NoticeBar;
import org.hazewright.desk.parts.Room;
import org.hazewright.desk.parts.Say;
import org.hazewright.desk.parts.SystemChooser;
import org.hazewright.desk.readings.ReadingsPlace;
import org.hazewright.desk.recipe.RecipePlace;
import org.hazewright.desk.shelf.ShelfView;
import org.hazewright.desk.spectra.SpectraPlace;
import org.hazewright.files.FaultReport;

/** The window: Brief, Spectra, Recipe and Readings side by side in the order of the work. */
public final class Window {
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
    private final Doing deeds;
    private final KeysAndDrops keysAndDrops;
    private BalanceView balance;
    private BatchView batch;
    /** Views that listen to what outlives them are made once, when first wanted. */
    private ShelfView shelfView;

    private LogbookView logbookView;
    private boolean shelfOpen;
    private boolean logbookOpen;
    private boolean keysOpen;
    private Node atDesk = new StackPane();
    /** Where the focus stood when the desk was left. */
    private Node focusAtDesk;

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
        deeds = new Doing(this, desk, look, this.chooser);
        keysAndDrops = new KeysAndDrops(this, desk, deeds);
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
        keysAndDrops.on(scene, look);
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
            deeds.askBeforeClosing();
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
            atDesk = new NoShelf(desk, shelf, chooser);
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
        if (atDesk instanceof Room) return;
        BorderPane desktop = new BorderPane();
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
        atDesk = new Room(desktop, 99, 51);
        turn();
    }

    private Hint hint(String name, String words) {
        return new Hint(desk.remembered(), name, words);
    }

    /** Turns to the balance, to a batch, or back to the places. */
    private void turn() {
        Optional<AtBalance> weighing = desk.weighingProperty().get();
        if (weighing.isPresent()) {
            balance = new BalanceView(weighing.get(), desk::leaveBalance, desk::finishWeighing);
            look.fit(balance, 84, 54);
            center(balance, false);
            balance.focusField();
        } else if (desk.madeProperty().get().isPresent()) {
            batch = new BatchView(desk.madeProperty().get().get(), chooser, desk::leaveBatch);
            center(batch, false);
            begin(batch);
        } else if (shelfOpen) {
            if (shelfView == null)
                shelfView = new ShelfView(desk.shelfRoom(), desk.adding(), look, chooser, () -> shelf(false));
            center(shelfView, false);
            begin(shelfView);
        } else if (logbookOpen) {
            if (logbookView == null)
                logbookView = new LogbookView(desk.logbookRoom(), desk.logbookRoom()::open, () -> logbook(false));
            center(logbookView, false);
            begin(logbookView);
        } else if (keysOpen) {
            KeysView view = new KeysView(() -> keys(false));
            center(view, false);
            begin(view);
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
        if (places.getCenter() == view) return;
        Scene scene = whole.getScene();
        if (places.getCenter() == atDesk && scene != null) focusAtDesk = scene.getFocusOwner();
        places.setCenter(view);
        Say.show(this.head, head);
        if (head && scene != null) comeBack();
    }

    /** Puts the focus where the work of a view begins: its first field, or what comes first. */
    private static void begin(Node view) {
        view.applyCss(); // what lies in scroll panes is part of the scene only now
        KeysAndDrops.first(view, n -> n instanceof TextField)
                .or(() -> KeysAndDrops.first(view, n -> true))
                .ifPresent(Node::requestFocus);
    }

    /** Puts the focus where it stood when the desk was left. */
    private void comeBack() {
        if (focusAtDesk != null && focusAtDesk.getScene() != null && focusAtDesk.isVisible())
            focusAtDesk.requestFocus();
        else if (atDesk instanceof NoShelf none) none.focusFirst();
        else if (desk.edits().now() != null) brief.focusFirst();
    }

    /** Turns to the shelf. */
    void openShelf() {
        shelf(true);
    }

    /** Turns to the list of keys. */
    void openKeys() {
        keys(true);
    }

    /** The four places in the order of the work. */
    List<Node> places() {
        return List.of(brief, spectra.surface(), recipe, readings);
    }

    /** Files that are dropped on the window open as from the menu; whether there was one. */
    boolean drop(List<java.io.File> files) {
        return keysAndDrops.drop(files);
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
}
