package org.hazewright.desk;

import java.nio.file.Path;
import java.time.LocalDate;
import java.util.Optional;
import java.util.function.Consumer;
import javafx.scene.input.Clipboard;
import javafx.scene.input.ClipboardContent;
import org.hazewright.desk.look.Look;
import org.hazewright.desk.look.Palette;
import org.hazewright.desk.model.Desk;
import org.hazewright.desk.model.Notice;
import org.hazewright.desk.model.Shown;
import org.hazewright.desk.paper.PdfPaper;
import org.hazewright.desk.paper.Printing;
import org.hazewright.desk.paper.RecipePaper;
import org.hazewright.desk.parts.Chooser;
import org.hazewright.desk.pen.Pen;
import org.hazewright.desk.spectra.SpectraPlot;

/** Does what a person sets going: opens, saves, prints, copies, and asks before anything would be lost. */
final class Doing implements Deeds {
    private static final String BRIEFS = "Briefs, recipes and batches";

    private final Window window;
    private final Desk desk;
    private final Look look;
    private final Chooser chooser;

    Doing(Window window, Desk desk, Look look, Chooser chooser) {
        this.window = window;
        this.desk = desk;
        this.look = look;
        this.chooser = chooser;
    }

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
                window.spectra().picture(Palette.LIGHT, RecipePaper.spectraWidth(), RecipePaper.spectraHeight(), 9.5);
        return plot::draw;
    }

    private Optional<Shown> settled() {
        return Optional.ofNullable(desk.solving().shownProperty().get()).filter(s -> !s.following());
    }

    @Override
    public void savePicture() {
        new Pictures(desk, look, chooser).save(window.spectra());
    }

    @Override
    public void print() {
        settled()
                .flatMap(s -> Printing.print(window.stage(), s.outlook(), s.answer(), spectraOnPaper()))
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
        window.openShelf();
    }

    @Override
    public void logbook() {
        window.openLogbook();
    }

    @Override
    public void dark(boolean yes) {
        look.paletteProperty().set(yes ? Palette.DARK : Palette.LIGHT);
        desk.remembered().keep("dark", yes);
    }

    @Override
    public void keys() {
        window.openKeys();
    }

    /** Asks before the window closes over changes that are not saved. */
    void askBeforeClosing() {
        desk.notices()
                .tell(Notice.asked(
                        "closing",
                        "“" + desk.edits().now().title() + "” has changes that are not saved.",
                        new Notice.Way("save and close", () -> saveThen(window.stage()::close)),
                        new Notice.Way("close without saving", () -> {
                            desk.papers().giveUp();
                            window.stage().close();
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
}
