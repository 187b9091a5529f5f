package org.hazewright.desk.model;

import java.nio.file.Path;
import java.util.Locale;
import java.util.Optional;
import org.hazewright.batch.Batch;
import org.hazewright.files.BatchWriter;
import org.hazewright.files.CoefficientTable;
import org.hazewright.files.RecipeReader;
import org.hazewright.files.SafeFile;
import org.hazewright.mixture.Recipe;
import org.hazewright.sheet.FilledIn;
import org.hazewright.shelf.Shelf;

/** Files that come onto the desk: each opens as what its name says it is. */
final class Incoming {
    private final Desk desk;
    private final Work.Lane reading;

    Incoming(Desk desk, Work work) {
        this.desk = desk;
        reading = work.lane(Work.Haste.FINISH);
    }

    void open(Path file) {
        String name = file.getFileName().toString().toLowerCase(Locale.ROOT);
        if (name.endsWith(".batch.toml")) desk.openBatch(file);
        else if (name.endsWith(".recipe.toml")) openRecipe(file);
        else if (name.endsWith(".toml")) desk.papers().open(file);
        else if (name.endsWith(".csv") || name.endsWith(".tsv") || name.endsWith(".txt")) openTable(file);
        else if (name.endsWith(".xlsx")) openSheet(file);
        else
            desk.notices()
                    .tell(
                            Notice.wrong(
                                    "open",
                                    file.getFileName()
                                            + " is none of the files that open here: a brief (.brief.toml), a recipe"
                                            + " (.recipe.toml), a batch (.batch.toml), a sheet that was filled in (.xlsx), or a table of targets (.csv)."));
    }

    private record FoundRecipe(Recipe recipe, Optional<Path> brief) {}

    /** Opens the brief that a recipe answers to when it lies beside it; else a brief that wants what the recipe gives. */
    private void openRecipe(Path file) {
        if (desk.shelfProperty().get().shelf().isEmpty()) return;
        Shelf on = desk.shelfProperty().get().shelf().get();
        reading.request(
                (stop, progress) -> {
                    Recipe recipe = RecipeReader.read(file, on);
                    return new FoundRecipe(
                            recipe,
                            Recipes.briefBeside(file, recipe, desk.papers().spectra()));
                },
                found -> {
                    if (found.brief().isPresent()) {
                        desk.papers().open(found.brief().get());
                        return;
                    }
                    desk.remembered().used(file);
                    desk.papers().startWith(Recipes.asBrief(found.recipe(), Recipes.nameOf(file)));
                    desk.edits()
                            .edit(
                                    desk.edits().now().withChosen(Optional.of(Shown.key(found.recipe()))),
                                    "keeping to the recipe's ingredients",
                                    "");
                    desk.notices()
                            .tell(
                                    Notice.told(
                                            "open",
                                            "No brief beside " + file.getFileName()
                                                    + " answers to it; the targets here are what it gives, and its ingredients are kept to."));
                },
                failure -> desk.notices().tell(Notice.wrong("open", Papers.words(failure))));
    }

    /** Takes targets from a table of coefficients. */
    private void openTable(Path file) {
        if (desk.edits().now() == null) return;
        reading.request(
                (stop, progress) -> CoefficientTable.read(file, null),
                table -> {
                    String wrong = desk.editing()
                            .targets(
                                    table.targets(0.05, 0.05),
                                    file.getFileName().toString())
                            .orElse("");
                    desk.notices()
                            .tell(
                                    wrong.isEmpty()
                                            ? Notice.told(
                                                    "open",
                                                    "Targets taken from " + file.getFileName() + ": "
                                                            + String.join("; ", table.understood())
                                                            + ". Undo brings the old ones back.")
                                            : Notice.wrong("open", wrong));
                },
                failure -> desk.notices().tell(Notice.wrong("open", Papers.words(failure))));
    }

    /** Makes a batch of a sheet that was filled in at the balance; it must be the sheet of the recipe on the desk. */
    private void openSheet(Path file) {
        Shown shown = desk.solving().shownProperty().get();
        if (shown == null
                || shown.following()
                || desk.shelfProperty().get().shelf().isEmpty()) {
            desk.notices().tell(Notice.wrong("open", "A sheet belongs to a recipe; open its brief first."));
            return;
        }
        Shelf on = desk.shelfProperty().get().shelf().get();
        Path folder = desk.papers().folder();
        String name = desk.edits().now().name();
        reading.request(
                (stop, progress) -> {
                    FilledIn sheet = FilledIn.read(file);
                    Started fresh =
                            Started.anew(shown, folder, name, desk.remembered().text("who", ""), on);
                    Batch batch = sheet.into(fresh.prepared().batch(), file);
                    BatchWriter.write(fresh.log().file(), batch, SafeFile.Overwrite.NEVER);
                    return fresh.log().file();
                },
                desk::openBatch,
                failure -> desk.notices().tell(Notice.wrong("open", Papers.words(failure))));
    }
}
