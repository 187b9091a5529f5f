package org.hazewright.desk.model;

import java.nio.file.Path;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.OptionalDouble;
import javafx.beans.property.ReadOnlyObjectProperty;
import javafx.beans.property.ReadOnlyObjectWrapper;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Brief;
import org.hazewright.brief.SearchLimits;
import org.hazewright.brief.Tissue;
import org.hazewright.files.BriefReader;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Part;

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
    private Tissue.Spectra spectra;

    public Desk(Work work, Optional<Path> shelfFolder, Remembered remembered) {
        this.work = work;
        this.remembered = remembered;
        shelving = work.lane(Work.Haste.INTERRUPT);
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
        solving.solve(
                papers.brief(), shelf.get().shelf().get(), edits.now().chosen());
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
                        List.of(shelf.get().shelf().flatMap(s -> s.find("water")).map(i -> i.id()).orElseGet(this::anyBase)),
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
