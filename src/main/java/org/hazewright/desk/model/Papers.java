package org.hazewright.desk.model;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.LocalTime;
import java.time.ZoneId;
import java.time.format.DateTimeFormatter;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.function.Supplier;
import javafx.beans.property.ReadOnlyBooleanProperty;
import javafx.beans.property.ReadOnlyBooleanWrapper;
import javafx.beans.property.ReadOnlyObjectProperty;
import javafx.beans.property.ReadOnlyObjectWrapper;
import org.hazewright.brief.Brief;
import org.hazewright.brief.Tissue;
import org.hazewright.files.BriefReader;
import org.hazewright.files.BriefWriter;
import org.hazewright.files.FaultReport;
import org.hazewright.files.RecipeWriter;
import org.hazewright.files.SafeFile;
import org.hazewright.files.TissueSpectra;
import org.hazewright.files.WriteFailure;
import org.hazewright.optics.Refusal;

/**
 * The brief's file: opened, saved, and kept safe in between.
 *
 * <p>While there are changes that are not saved, they are written to a file of their own beside the brief ({@code .NAME.unsaved}), never over
 * the brief itself; saving takes it away. Saving keeps the previous version beside the file.
 */
public final class Papers {
    private static final long AUTOSAVE_MS = 2000;

    /**
     * What is open.
     *
     * @param file empty for a brief that was never saved
     * @param saved the draft as the file holds it
     * @param sha256 of the file
     * @param comments that stand at the top of the file
     */
    public record Open(Optional<Path> file, Draft saved, Optional<String> sha256, List<String> comments) {}

    private final Edits<Draft> edits;
    private final Remembered remembered;
    private final Notices notices;
    private final Supplier<Optional<Path>> shelfFolder;
    private final Work.Lane reading;
    private final Work.Lane writing;
    private final Work.Lane keeping;
    private final ReadOnlyObjectWrapper<Open> open = new ReadOnlyObjectWrapper<>();
    private final ReadOnlyBooleanWrapper changed = new ReadOnlyBooleanWrapper(false);

    Papers(
            Work work,
            Edits<Draft> edits,
            Remembered remembered,
            Notices notices,
            Supplier<Optional<Path>> shelfFolder) {
        this.edits = edits;
        this.remembered = remembered;
        this.notices = notices;
        this.shelfFolder = shelfFolder;
        reading = work.lane(Work.Haste.INTERRUPT);
        writing = work.lane(Work.Haste.FINISH);
        keeping = work.lane(Work.Haste.INTERRUPT);
        edits.nowProperty().addListener((p, before, now) -> edited(now));
    }

    public ReadOnlyObjectProperty<Open> openProperty() {
        return open.getReadOnlyProperty();
    }

    /** Whether there are changes that are not saved. */
    public ReadOnlyBooleanProperty changedProperty() {
        return changed.getReadOnlyProperty();
    }

    /** The file's name, or what a brief without one is called. */
    public String shownName() {
        Open o = open.get();
        return o == null ? "" : o.file().map(f -> f.getFileName().toString()).orElse("not saved yet");
    }

    /** The brief as it stands; it carries its file's checksum only when it is what the file holds. */
    public Brief brief() {
        Draft d = edits.now();
        Open o = open.get();
        return d.brief(o != null && same(d, o.saved()) ? o.sha256() : Optional.empty());
    }

    /** What is chosen is no part of the file. */
    private static boolean same(Draft one, Draft other) {
        return one.withChosen(Optional.empty()).equals(other.withChosen(Optional.empty()));
    }

    /** The folder that results go to: beside the brief, or for one that was never saved the person's own folder. */
    public Path folder() {
        return open.get().file().map(f -> f.toAbsolutePath().getParent()).orElse(remembered.workFolder());
    }

    Supplier<Tissue.Spectra> spectra() {
        return TissueSpectra.of(shelfFolder.get().orElse(null));
    }

    /** Puts a brief on the desk that has no file yet. */
    public void startWith(Brief brief) {
        begin(new Open(Optional.empty(), Draft.of(brief), Optional.empty(), List.of()));
    }

    private void begin(Open o) {
        open.set(o);
        edits.startAgain(o.saved());
        changed.set(false);
        keeping.stop();
    }

    private record Found(Brief brief, List<String> comments, Optional<Unsaved> unsaved) {}

    private record Unsaved(Brief brief, LocalTime when) {}

    /** Opens a brief file; unsaved changes that were kept beside it are offered. */
    public void open(Path file) {
        Path side = side(file);
        reading.request(
                (stop, progress) -> {
                    Brief brief = BriefReader.read(file, spectra());
                    return new Found(brief, comments(file), unsaved(side, brief));
                },
                found -> {
                    begin(new Open(
                            Optional.of(file),
                            Draft.of(found.brief()),
                            found.brief().sha256(),
                            found.comments()));
                    remembered.used(file);
                    notices.putAway("open");
                    found.unsaved().ifPresent(u -> offer(u, side));
                },
                failure -> notices.tell(Notice.wrong("open", words(failure))));
    }

    /** Offers what an untitled brief left when the program ended without saving. */
    public void offerUntitled() {
        Path side = untitledSide();
        if (!Files.isRegularFile(side)) return;
        reading.request(
                (stop, progress) -> unsaved(side, null),
                found -> found.ifPresent(u -> offer(u, side)),
                failure -> notices.tell(Notice.wrong("open", words(failure))));
    }

    private Optional<Unsaved> unsaved(Path side, Brief unless) {
        if (!Files.isRegularFile(side)) return Optional.empty();
        try {
            Brief kept = BriefReader.read(side, spectra());
            if (unless != null) kept = renamed(kept, unless.name());
            if (unless != null && same(Draft.of(kept), Draft.of(unless))) return Optional.empty();
            LocalTime when = LocalTime.ofInstant(Files.getLastModifiedTime(side).toInstant(), ZoneId.systemDefault());
            return Optional.of(new Unsaved(kept, when));
        } catch (Refusal | IOException unreadable) {
            return Optional.empty();
        }
    }

    private static Brief renamed(Brief b, String name) {
        return Draft.of(b).withName(name).brief(Optional.empty());
    }

    private void offer(Unsaved u, Path side) {
        notices.tell(Notice.asked(
                "unsaved",
                "Changes to “" + u.brief().title() + "” from "
                        + DateTimeFormatter.ofPattern("HH:mm", Locale.ROOT).format(u.when()) + " were never saved.",
                new Notice.Way(
                        "take them up",
                        () -> edits.edit(
                                Draft.of(u.brief()).withName(edits.now().name()), "taking up unsaved changes", "")),
                new Notice.Way("throw them away", () -> drop(side))));
    }

    private static List<String> comments(Path file) {
        try {
            List<String> comments = new ArrayList<>();
            for (String line : Files.readAllLines(file)) {
                if (!line.startsWith("#")) break;
                comments.add(line.substring(1).strip());
            }
            return comments;
        } catch (IOException e) {
            return List.of();
        }
    }

    /** Saves to the brief's own file; {@code recipe} goes beside it when there is one. False when there is no file yet. */
    public boolean save(Optional<Shown> recipe, Runnable saved) {
        Optional<Path> file = open.get().file();
        file.ifPresent(f -> saveAs(f, recipe, saved));
        return file.isPresent();
    }

    private record Written(Brief brief, List<String> names) {}

    /** Saves to a file, which becomes the brief's own. */
    public void saveAs(Path file, Optional<Shown> recipe, Runnable saved) {
        Draft draft = edits.now();
        List<String> comments = open.get().comments();
        Optional<Path> left = open.get().file();
        edits.settle();
        writing.request(
                (stop, progress) -> write(file, draft, comments, recipe),
                written -> {
                    drop(side(file));
                    if (left.isEmpty()) drop(untitledSide());
                    Draft held = draft.withName(written.brief().name());
                    open.set(new Open(Optional.of(file), held, written.brief().sha256(), comments));
                    if (edits.now().equals(draft)) edits.rename(d -> d.withName(held.name()));
                    changed.set(!same(edits.now(), held));
                    remembered.used(file);
                    notices.putAway("open");
                    notices.tell(Notice.told("saved", "Saved: " + String.join(" and ", written.names()) + "."));
                    saved.run();
                },
                failure -> notices.tell(Notice.wrong("saved", words(failure))));
    }

    private Written write(Path file, Draft draft, List<String> comments, Optional<Shown> recipe) {
        BriefWriter.write(file, draft.brief(Optional.empty()), comments, spectra(), SafeFile.Overwrite.KEEP_PREVIOUS);
        Brief back = BriefReader.read(file, spectra());
        List<String> names = new ArrayList<>(List.of(file.getFileName().toString()));
        recipe.filter(r -> !r.following()).ifPresent(r -> {
            Path beside = file.resolveSibling(back.name() + ".recipe.toml");
            RecipeWriter.write(
                    beside, Recipes.answering(r.recipe(), back.sha256()), List.of(), SafeFile.Overwrite.KEEP_PREVIOUS);
            names.add(beside.getFileName().toString());
        });
        return new Written(back, names);
    }

    private void edited(Draft now) {
        Open o = open.get();
        if (o == null) return;
        changed.set(!same(now, o.saved()));
        Path side = o.file().map(Papers::side).orElse(untitledSide());
        if (!changed.get()) {
            keeping.stop();
            drop(side);
            return;
        }
        keeping.requestAfter(
                AUTOSAVE_MS,
                (stop, progress) -> {
                    BriefWriter.write(
                            side, now.brief(Optional.empty()), o.comments(), spectra(), SafeFile.Overwrite.REPLACE);
                    return side;
                },
                kept -> notices.putAway("autosave"),
                failure -> notices.tell(
                        Notice.wrong("autosave", "Unsaved changes could not be kept safe. " + words(failure))));
    }

    /** Gives up changes that are not saved, on closing without saving. */
    public void giveUp() {
        keeping.stop();
        Open o = open.get();
        if (o != null) drop(o.file().map(Papers::side).orElse(untitledSide()));
    }

    static Path side(Path file) {
        return file.toAbsolutePath().resolveSibling("." + file.getFileName() + ".unsaved");
    }

    private Path untitledSide() {
        return remembered.folder().resolve("unsaved.brief.toml");
    }

    private static void drop(Path side) {
        try {
            Files.deleteIfExists(side);
        } catch (IOException e) {
            return; // a leftover that is offered once more does no harm
        }
    }

    static String words(Throwable failure) {
        if (failure instanceof Refusal || failure instanceof WriteFailure) return failure.getMessage();
        return FaultReport.of(failure);
    }
}
