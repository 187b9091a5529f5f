package org.hazewright.desk.model;

import java.nio.file.Path;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.function.Supplier;
import javafx.beans.property.ReadOnlyObjectProperty;
import javafx.beans.property.ReadOnlyObjectWrapper;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Brief;
import org.hazewright.brief.SearchLimits;
import org.hazewright.brief.Tissue;
import org.hazewright.files.BriefReader;
import org.hazewright.files.RecipeWriter;
import org.hazewright.files.SafeFile;
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
    private final Work.Lane preparing;
    private final ReadOnlyObjectWrapper<Optional<AtBalance>> weighing = new ReadOnlyObjectWrapper<>(Optional.empty());
    private Tissue.Spectra spectra;

    public Desk(Work work, Optional<Path> shelfFolder, Remembered remembered) {
        this.work = work;
        this.remembered = remembered;
        shelving = work.lane(Work.Haste.INTERRUPT);
        preparing = work.lane(Work.Haste.FINISH);
        shelf = new ReadOnlyObjectWrapper<>(ShelfState.reading(shelfFolder));
        solving = new Solving(work);
        papers = new Papers(work, edits, remembered, notices, () -> shelf.get().folder());
        edits.nowProperty().addListener((p, before, now) -> solve());
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
        WeighingLog log =
                WeighingLog.of(papers.openProperty().get().file(), edits.now().name(), remembered.folder());
        Shelf on = shelf.get().shelf().get();
        preparing.request(
                (stop, progress) -> {
                    if (log.exists()) return Started.again(log, on, papers.spectra());
                    log.begin(shown.outlook().brief(), shown.recipe(), papers.spectra());
                    log.keep(List.of());
                    return new Started(
                            AtBalance.Prepared.of(shown.outlook().brief(), shown.recipe(), on, List.of()), false);
                },
                started -> begin(started, log, shown),
                failure -> notices.tell(Notice.wrong("balance", Papers.words(failure))));
    }

    private record Started(AtBalance.Prepared prepared, boolean again) {
        static Started again(WeighingLog log, Shelf on, Supplier<Tissue.Spectra> spectra) {
            WeighingLog.Kept kept = log.read(on, spectra);
            return new Started(AtBalance.Prepared.of(kept.brief(), kept.recipe(), on, kept.steps()), true);
        }
    }

    private void begin(Started started, WeighingLog log, Shown shown) {
        boolean other = started.again()
                && !started.prepared().recipe().massesG().equals(shown.recipe().massesG())
                && started.prepared().kept().stream().anyMatch(w -> !w.equals(Weighed.NOTHING));
        if (other)
            notices.tell(Notice.asked(
                    "balance",
                    "A weighing of an earlier recipe of “"
                            + started.prepared().recipe().title() + "” was broken off.",
                    new Notice.Way("go on with it", () -> turn(started, log)),
                    new Notice.Way("begin anew with this recipe", () -> {
                        log.drop();
                        standAtBalance();
                    })));
        else if (started.again()
                && started.prepared().kept().stream().allMatch(w -> w.equals(Weighed.NOTHING))
                && !started.prepared().recipe().massesG().equals(shown.recipe().massesG())) {
            log.drop();
            standAtBalance();
        } else turn(started, log);
    }

    private void turn(Started started, WeighingLog log) {
        remembered.keep("weighing", log.folder().toString());
        weighing.set(Optional.of(new AtBalance(started.prepared(), log, work)));
    }

    /** Goes on with a weighing that a crash broke off. */
    private void offerWeighing() {
        String kept = remembered.text("weighing", "");
        if (kept.isEmpty() || shelf.get().shelf().isEmpty()) return;
        WeighingLog log = new WeighingLog(Path.of(kept));
        if (!log.exists()) return;
        Shelf on = shelf.get().shelf().get();
        preparing.request(
                (stop, progress) -> Started.again(log, on, papers.spectra()),
                started -> {
                    long done = started.prepared().kept().stream()
                            .filter(Weighed::done)
                            .count();
                    if (done == 0) return;
                    notices.tell(Notice.asked(
                            "balance",
                            "“" + started.prepared().recipe().title() + "” was being weighed; " + done + " of "
                                    + started.prepared().steps().size() + " steps are done.",
                            new Notice.Way("go on weighing", () -> turn(started, log)),
                            new Notice.Way("later", () -> {})));
                },
                failure -> notices.tell(Notice.wrong("balance", Papers.words(failure))));
    }

    /** Back to the desk; the weighing is kept. */
    public void leaveBalance() {
        weighing.set(Optional.empty());
    }

    /** Records the batch as it was weighed and goes back to the desk. */
    public void finishWeighing() {
        AtBalance done = weighing.get().orElseThrow();
        Path folder = papers.openProperty()
                .get()
                .file()
                .map(f -> f.toAbsolutePath().getParent())
                .orElse(remembered.folder());
        preparing.request(
                (stop, progress) -> {
                    Path file = Recipes.freeName(folder, done.brief().name(), ".batch.toml");
                    RecipeWriter.write(file, done.made(), SafeFile.Overwrite.NEVER);
                    done.log().drop();
                    return file;
                },
                file -> {
                    remembered.keep("weighing", "");
                    weighing.set(Optional.empty());
                    notices.tell(Notice.told("balance", "Recorded: " + file + "."));
                },
                failure -> notices.tell(Notice.wrong("balance", Papers.words(failure))));
    }

    /** The weigh-out as a table for a spreadsheet, tabs between columns; empty when there is no recipe. */
    public Optional<String> copyText() {
        return Optional.ofNullable(solving.shownProperty().get()).map(s -> Tables.weighOut(s.outlook()));
    }

    /** Opens a file by what its name says it is. */
    public void open(Path file) {
        String name = file.getFileName().toString().toLowerCase(Locale.ROOT);
        if (name.endsWith(".toml")) papers.open(file);
        else
            notices.tell(Notice.wrong(
                    "open", file.getFileName() + " is none of the files that open here: a brief (.brief.toml)."));
    }

    /** Spectra for tissue-like values, read when first asked for. */
    public Tissue.Spectra spectra() {
        if (spectra == null) spectra = papers.spectra().get();
        return spectra;
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
}
