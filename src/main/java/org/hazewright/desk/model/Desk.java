package org.hazewright.desk.model;

import java.nio.file.Files;
import java.nio.file.Path;
import java.time.LocalDate;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.function.Consumer;
import java.util.function.Function;
import javafx.beans.property.ReadOnlyObjectProperty;
import javafx.beans.property.ReadOnlyObjectWrapper;
import org.hazewright.batch.Batch;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Brief;
import org.hazewright.brief.SearchLimits;
import org.hazewright.brief.Tissue;
import org.hazewright.files.BatchWriter;
import org.hazewright.files.BriefReader;
import org.hazewright.files.SafeFile;
import org.hazewright.sheet.Logbook;
import org.hazewright.sheet.RecipeSheet;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Part;
import org.hazewright.shelf.Shelf;

/**
 * All that lies on the desk: the shelf, the brief that is being written, the recipe that follows it, and the papers they are kept on.
 *
 * <p>All methods are called on the interface thread; work is done elsewhere by {@link Work}.
 */
public final class Desk {
    /** The brief that is open on the first day. */
    public static final String DEMO = "forearm-block";

    private final Work work;
    private final Remembered remembered;
    private final Notices notices = new Notices();
    private final Work.Lane shelving;
    private final ReadOnlyObjectWrapper<ShelfState> shelf;
    private final Edits<Draft> edits = new Edits<>(null);
    private final BriefEditing editing = new BriefEditing(edits);
    private final Solving solving;
    private final Papers papers;
    private final Foreseeing foreseeing;
    private final ShelfRoom shelfRoom;
    private final LogbookRoom logbookRoom;
    private final Adding adding;
    private final Incoming incoming;
    private final Work.Lane preparing;
    private final ReadOnlyObjectWrapper<Optional<MadeBatch>> made = new ReadOnlyObjectWrapper<>(Optional.empty());
    private final ReadOnlyObjectWrapper<Optional<AtBalance>> weighing = new ReadOnlyObjectWrapper<>(Optional.empty());
    private Optional<Consumer<Path>> outside = Optional.empty();
    private volatile Tissue.Spectra spectra;

    public Desk(Work work, Optional<Path> shelfFolder, Remembered remembered) {
        this.work = work;
        this.remembered = remembered;
        shelving = work.lane(Work.Haste.INTERRUPT);
        preparing = work.lane(Work.Haste.FINISH);
        shelf = new ReadOnlyObjectWrapper<>(ShelfState.reading(shelfFolder));
        solving = new Solving(work, this::spectra);
        papers = new Papers(work, edits, remembered, notices, () -> shelf.get().folder());
        edits.nowProperty().addListener((p, before, now) -> solve());
        foreseeing = new Foreseeing(this);
        shelfRoom = new ShelfRoom(this);
        logbookRoom = new LogbookRoom(this);
        adding = new Adding(this);
        incoming = new Incoming(this, work);
    }

    private record Begun(ShelfState shelf, Brief brief) {}

    /** Reads the shelf and puts a first brief on the desk: the file given, or the demo. */
    public void begin(Optional<Path> file) {
        Optional<Path> folder = shelf.get().folder();
        shelving.request(
                (stop, progress) -> new Begun(ShelfState.read(folder), BriefReader.readShipped(DEMO)),
                begun -> {
                    shelf.set(begun.shelf());
                    papers.startWith(begun.brief());
                    if (file.isPresent()) open(file.get());
                    else papers.offerUntitled();
                    offerWeighing();
                },
                failure -> notices.tell(Notice.wrong("shelf", Papers.words(failure))));
    }

    /** Works from another shelf: a folder, or with nothing the one of the program. */
    public void useShelf(Optional<Path> folder) {
        shelving.request(
                (stop, progress) -> ShelfState.read(folder),
                read -> {
                    shelf.set(read);
                    spectra = null;
                    solving.clear();
                    solve();
                },
                failure -> notices.tell(Notice.wrong("shelf", Papers.words(failure))));
    }

    /** Reads the shelf again, after a file on it was written. */
    public void readShelfAgain() {
        useShelf(shelf.get().folder());
    }

    private void solve() {
        if (edits.now() == null || shelf.get().shelf().isEmpty()) return;
        solving.solve(papers.brief(), shelf.get().shelf().get(), edits.now().chosen());
    }

    /** Puts a short new brief on the desk. */
    public void beginAgain() {
        Row first = new Row(
                690,
                OptionalDouble.of(0.1),
                OptionalDouble.of(10),
                new Allowed.Share(0.05),
                new Allowed.Share(0.05),
                1);
        papers.startWith(new Draft(
                        "phantom",
                        "New phantom",
                        List.of(shelf.get()
                                .shelf()
                                .flatMap(s -> s.find("water"))
                                .map(i -> i.id())
                                .orElseGet(this::anyBase)),
                        250,
                        List.of(),
                        0,
                        22,
                        List.of(first),
                        Optional.empty(),
                        SearchLimits.USUAL,
                        Balance.USUAL,
                        List.of(),
                        Optional.empty())
                .brief(Optional.empty()));
    }

    private String anyBase() {
        return shelf.get().shelf().stream()
                .flatMap(s -> s.ingredients().stream())
                .filter(i -> i.part() == Part.BASE)
                .map(Ingredient::id)
                .findFirst()
                .orElse("water");
    }

    // at the balance

    /** The weighing that is going on; empty at the desk. */
    public ReadOnlyObjectProperty<Optional<AtBalance>> weighingProperty() {
        return weighing.getReadOnlyProperty();
    }

    /** Turns to the balance with the recipe on the desk; a weighing of it that was broken off goes on at its step. */
    public void standAtBalance() {
        Shown shown = solving.shownProperty().get();
        if (shown == null
                || shown.following()
                || shelf.get().shelf().isEmpty()
                || weighing.get().isPresent()) return;
        Shelf on = shelf.get().shelf().get();
        Path folder = papers.folder();
        String name = edits.now().name();
        Optional<Path> before = unfinished();
        preparing.request(
                (stop, progress) -> {
                    Optional<Started> kept = before.map(f -> Started.again(new WeighingLog(f), on))
                            .filter(s -> s.prepared().batch().plan().equals(shown.recipe()));
                    return kept.orElseGet(() -> Started.anew(shown, folder, name, remembered.text("who", ""), on));
                },
                this::turn,
                failure -> notices.tell(Notice.wrong("balance", Papers.words(failure))));
    }

    private void turn(Started started) {
        remembered.keep("weighing", started.log().file().toString());
        weighing.set(Optional.of(new AtBalance(started.prepared(), started.log(), work)));
    }

    /** The file of a weighing that was not finished. */
    private Optional<Path> unfinished() {
        String kept = remembered.text("weighing", "");
        return kept.isEmpty() ? Optional.empty() : Optional.of(Path.of(kept)).filter(Files::isRegularFile);
    }

    /** Offers to go on with a weighing that a crash or an evening broke off. */
    private void offerWeighing() {
        Optional<Path> file = unfinished();
        if (file.isEmpty() || shelf.get().shelf().isEmpty()) return;
        Shelf on = shelf.get().shelf().get();
        preparing.request(
                (stop, progress) -> Started.again(new WeighingLog(file.get()), on),
                started -> {
                    long done = started.prepared().kept().stream()
                            .filter(Weighed::done)
                            .count();
                    notices.tell(Notice.asked(
                            "balance",
                            "“" + started.prepared().batch().plan().title() + "” was being weighed; " + done + " of "
                                    + started.prepared().steps().size() + " steps are done.",
                            new Notice.Way("go on weighing", () -> turn(started)),
                            new Notice.Way("later", () -> {})));
                },
                failure -> notices.tell(Notice.wrong("balance", Papers.words(failure))));
    }

    /** Opens a batch's file: at the balance while it is being weighed, else as a batch that is made. */
    void openBatch(Path file) {
        if (shelf.get().shelf().isEmpty()) return;
        Shelf on = shelf.get().shelf().get();
        preparing.request(
                (stop, progress) -> Started.again(new WeighingLog(file), on),
                started -> {
                    remembered.used(file);
                    if (started.prepared().batch().complete())
                        made.set(Optional.of(new MadeBatch(
                                this, started.log().file(), started.prepared().batch())));
                    else turn(started);
                },
                failure -> notices.tell(Notice.wrong("open", Papers.words(failure))));
    }

    /** Back to the desk; the weighing is kept. */
    public void leaveBalance() {
        weighing.set(Optional.empty());
    }

    /** Records the batch in the logbook beside it and turns to it. */
    public void finishWeighing() {
        AtBalance done = weighing.get().orElseThrow();
        Batch batch = done.batch();
        Path file = done.log().file();
        preparing.request(
                (stop, progress) -> {
                    BatchWriter.write(file, batch, SafeFile.Overwrite.REPLACE);
                    done.log().over();
                    return Logbook.record(MadeBatch.logbook(file), batch, file);
                },
                recorded -> {
                    remembered.keep("weighing", "");
                    remembered.used(file);
                    weighing.set(Optional.empty());
                    made.set(Optional.of(new MadeBatch(this, file, batch)));
                    MadeBatch.tell(this, recorded);
                },
                failure -> notices.tell(Notice.wrong("balance", Papers.words(failure))));
    }

    // a batch that is made

    /** The batch that is looked at; empty at the desk. */
    public ReadOnlyObjectProperty<Optional<MadeBatch>> madeProperty() {
        return made.getReadOnlyProperty();
    }

    public void leaveBatch() {
        made.set(Optional.empty());
    }

    /** Goes to the balance with a correction that was planned. */
    void weighCorrection(Path file, Batch batch) {
        Shelf on = shelf.get().shelf().orElseThrow();
        preparing.request(
                (stop, progress) -> {
                    BatchWriter.write(file, batch, SafeFile.Overwrite.KEEP_PREVIOUS);
                    return Started.again(new WeighingLog(file), on);
                },
                started -> {
                    made.set(Optional.empty());
                    turn(started);
                },
                failure -> notices.tell(Notice.wrong("balance", Papers.words(failure))));
    }

    /** Writes the recipe's workbook, or with the ending .pdf its pages, on which {@code paper} draws. */
    public void saveSheet(Path file, Function<Shown, byte[]> paper) {
        Shown shown = solving.shownProperty().get();
        boolean pdf = file.toString().toLowerCase(Locale.ROOT).endsWith(".pdf");
        Path named =
                pdf || file.toString().endsWith(".xlsx") ? file : file.resolveSibling(file.getFileName() + ".xlsx");
        preparing.request(
                (stop, progress) -> {
                    byte[] bytes = pdf ? paper.apply(shown) : RecipeSheet.write(shown.answer(), LocalDate.now());
                    SafeFile.write(named, bytes, SafeFile.Overwrite.REPLACE);
                    return named;
                },
                written -> notices.tell(
                        new Notice(Notice.Kind.TOLD, "sheet", "Saved: " + written + ".", showing(written))),
                failure -> notices.tell(Notice.wrong("sheet", Papers.words(failure))));
    }

    /** The weigh-out as a table for a spreadsheet, tabs between columns; empty when there is no recipe. */
    public Optional<String> copyText() {
        return Optional.ofNullable(solving.shownProperty().get()).map(s -> Tables.weighOut(s.outlook()));
    }

    /** The targets with their predictions as a table for a spreadsheet; empty when there is no recipe. */
    public Optional<String> copyTargets() {
        return Optional.ofNullable(solving.shownProperty().get()).map(s -> Tables.targets(s.outlook()));
    }

    /** Opens a file by what its name says it is. */
    public void open(Path file) {
        incoming.open(file);
    }

    /** Spectra for tissue-like values and oximeters, read when first asked for; on any thread. */
    public Tissue.Spectra spectra() {
        Tissue.Spectra known = spectra;
        if (known == null) spectra = known = papers.spectra().get();
        return known;
    }

    /** Says how a file is opened with another program. */
    public void opensOutside(Consumer<Path> opener) {
        outside = Optional.of(opener);
    }

    /** A way to see a file that was written; none where no other program can be asked. */
    List<Notice.Way> showing(Path file) {
        return outside.map(o -> List.of(new Notice.Way("show it", () -> o.accept(file))))
                .orElse(List.of());
    }

    public Work work() {
        return work;
    }

    public Remembered remembered() {
        return remembered;
    }

    public Notices notices() {
        return notices;
    }

    public ReadOnlyObjectProperty<ShelfState> shelfProperty() {
        return shelf.getReadOnlyProperty();
    }

    public Edits<Draft> edits() {
        return edits;
    }

    public BriefEditing editing() {
        return editing;
    }

    public Solving solving() {
        return solving;
    }

    public Papers papers() {
        return papers;
    }

    public ShelfRoom shelfRoom() {
        return shelfRoom;
    }

    public Adding adding() {
        return adding;
    }

    public LogbookRoom logbookRoom() {
        return logbookRoom;
    }

    public Foreseeing foreseeing() {
        return foreseeing;
    }
}
