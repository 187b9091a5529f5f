package org.hazewright.desk;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertNotNull;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.function.Predicate;
import javafx.scene.Node;
import javafx.scene.control.Button;
import javafx.scene.control.Labeled;
import javafx.scene.input.KeyCode;
import javafx.scene.layout.Region;
import org.hazewright.brief.Brief;
import org.hazewright.brief.Point;
import org.hazewright.desk.model.AtBalance;
import org.hazewright.desk.model.Draft;
import org.hazewright.desk.model.Notice;
import org.hazewright.desk.model.Shown;
import org.hazewright.desk.parts.Field;
import org.hazewright.desk.parts.Hint;
import org.hazewright.desk.spectra.SpectraPlot;
import org.hazewright.files.BriefReader;
import org.hazewright.files.RecipeReader;
import org.hazewright.files.ShelfReader;
import org.hazewright.files.TissueSpectra;
import org.hazewright.mixture.Recipe;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** The window used as a person uses it, with keys and mouse, without a display. */
class WindowTest {
    @TempDir
    Path folder;

    private final PlannedChooser chooser = new PlannedChooser();
    private Window window;
    private Hand hand;

    @BeforeEach
    void toolkit() {
        Stagehand.startToolkit();
        hand = new Hand();
    }

    @AfterEach
    void close() {
        if (window != null) Stagehand.ui(() -> window.stage().close());
    }

    private void open(Optional<Path> file) {
        window = Stagehand.open(folder.resolve("memory"), 1280, 800, file, Optional.of(chooser));
        Stagehand.untilSettled(window);
    }

    private Path bath() {
        Path file = folder.resolve("bath.brief.toml");
        Brief demo = BriefReader.readShipped("wrist-bath");
        org.hazewright.files.BriefWriter.write(
                file,
                demo,
                List.of("the daily bath"),
                TissueSpectra.of(null),
                org.hazewright.files.SafeFile.Overwrite.NEVER);
        return file;
    }

    private Shown shown() {
        return Stagehand.onUi(() -> window.desk().solving().shownProperty().get());
    }

    private Draft draft() {
        return Stagehand.onUi(() -> window.desk().edits().now());
    }

    private double wanted(double nm) {
        return draft().row(nm).orElseThrow().muaPerCm().orElseThrow();
    }

    private List<Node> all(Predicate<Node> which) {
        return new Eyes(window).all(which);
    }

    private Button button(String text) {
        return new Eyes(window).button(text);
    }

    private void focus(Node node) {
        Stagehand.ui(node::requestFocus);
        Stagehand.pulse();
    }

    private Field wantedField(double nm, Point.Quantity q) {
        return Stagehand.onUi(() -> window.brief().wantedField(nm, q));
    }

    @Test
    void onTheFirstDayADemoIsSolvedAndHintsGoAway() {
        open(Optional.empty());
        assertNotNull(shown());
        assertEquals("forearm-block", draft().name());
        List<Node> hints = all(n -> n instanceof Hint);
        assertEquals(3, hints.size(), "hints");
        for (Node h : hints) Stagehand.ui(((Hint) h)::putAway);
        assertTrue(all(n -> n instanceof Hint).isEmpty());
        Stagehand.ui(() -> window.stage().close());
        open(Optional.empty());
        assertTrue(all(n -> n instanceof Hint).isEmpty(), "hints that were put away came back");
    }

    @Test
    void aTypedTargetMovesTheRecipeAndAWrongOneIsSaidInWords() {
        open(Optional.of(bath()));
        double before = wanted(690);
        Recipe first = shown().recipe();
        Field field = wantedField(690, Point.Quantity.MUA);
        focus(field);
        hand.typeOver("0.13");
        hand.press(KeyCode.ENTER);
        Stagehand.untilSettled(window);
        assertEquals(0.13, wanted(690));
        assertNotEquals(first.massesG(), shown().recipe().massesG());
        assertEquals(
                0.13,
                shown().outlook().predicted().get(0).point().wantedPerCm(),
                "the recipe belongs to the brief that is shown");

        hand.typeOver("0.1x");
        hand.press(KeyCode.ENTER);
        String words = Stagehand.onUi(() -> field.errorProperty().get());
        assertTrue(words.contains("x"), words);
        assertEquals(
                1,
                all(n -> n instanceof Labeled l
                                && l.getText() != null
                                && l.getText().contains(words))
                        .size(),
                "said beside the field");
        assertEquals(0.1, wanted(690), "the last value that made sense holds");
        hand.press(KeyCode.ESCAPE);
        assertEquals("", Stagehand.onUi(() -> field.errorProperty().get()));

        hand.press(KeyCode.CONTROL, KeyCode.Z);
        hand.press(KeyCode.CONTROL, KeyCode.Z);
        Stagehand.untilSettled(window);
        assertEquals(before, wanted(690));
        assertEquals(first.massesG(), shown().recipe().massesG());
        hand.press(KeyCode.CONTROL, KeyCode.SHIFT, KeyCode.Z);
        assertEquals(0.13, wanted(690));
    }

    @Test
    void aDraggedBoxTakesTheRecipeAlongAndUndoBringsBothBack() {
        open(Optional.of(bath()));
        double before = wanted(830);
        Recipe first = shown().recipe();
        SpectraPlot plot = Stagehand.onUi(() -> window.spectra().plot());
        Region surface = window.spectra().surface();
        double x = plot.xOf(830);
        double y = plot.yOf(Point.Quantity.MUA, before);
        double to = plot.yOf(Point.Quantity.MUA, before * 1.15);
        List<Boolean> followed = new ArrayList<>();
        Stagehand.ui(() ->
                window.desk().solving().shownProperty().addListener((p, was, now) -> followed.add(now.following())));
        hand.drag(surface, x, y, x, to);
        assertEquals(before * 1.15, wanted(830), 0.01 * before);
        assertTrue(followed.contains(true), "the recipe did not follow during the drag");
        Stagehand.untilSettled(window);
        assertNotEquals(first.massesG(), shown().recipe().massesG());
        hand.press(KeyCode.CONTROL, KeyCode.Z);
        Stagehand.untilSettled(window);
        assertEquals(before, wanted(830), "one drag is one step of undo");
        assertEquals(first.massesG(), shown().recipe().massesG());
    }

    /** A notice that comes while a box is held moves the plot, not the value. */
    @Test
    void whatGrowsAroundThePlotLeavesAHeldBoxAlone() {
        open(Optional.of(bath()));
        double before = wanted(830);
        SpectraPlot plot = Stagehand.onUi(() -> window.spectra().plot());
        hand.grab(window.spectra().surface(), plot.xOf(830), plot.yOf(Point.Quantity.MUA, before));
        hand.moveBy(0, -10);
        double raised = wanted(830);
        assertTrue(raised > before);
        double top = Stagehand.onUi(
                () -> window.spectra().surface().localToScreen(0, 0).getY());
        Stagehand.ui(() -> window.desk().notices().tell(Notice.told("test", "something to be told")));
        Stagehand.pulse();
        assertTrue(
                Stagehand.onUi(() ->
                                window.spectra().surface().localToScreen(0, 0).getY())
                        > top + 10,
                "the notice did not move the plot");
        hand.moveBy(0, 2);
        hand.moveBy(0, -2);
        assertEquals(raised, wanted(830), 0.01 * raised);
        hand.letGo();
    }

    @Test
    void keysMoveATargetToo() {
        open(Optional.of(bath()));
        double before = wanted(690);
        focus(window.spectra().surface());
        hand.press(KeyCode.UP);
        assertEquals(before * 1.01, wanted(690), 1e-9);
        hand.press(KeyCode.RIGHT);
        hand.press(KeyCode.DOWN);
        assertEquals(before * 1.01, wanted(690), 1e-9);
        assertTrue(wanted(830) < 0.105);
    }

    @Test
    void anotherWayCanBeChosenAndGivenUp() {
        open(Optional.of(bath()));
        Recipe best = shown().recipe();
        List<Node> cards = all(n -> n.getStyleClass().contains("way"));
        assertFalse(cards.isEmpty(), "no other ways are offered");
        Stagehand.ui(((Button) cards.get(0))::fire);
        Stagehand.untilSettled(window);
        assertNotEquals(Shown.key(best), Shown.key(shown().recipe()));
        Stagehand.ui(button("back to the best")::fire);
        Stagehand.untilSettled(window);
        assertEquals(Shown.key(best), Shown.key(shown().recipe()));
    }

    @Test
    void whatIsSavedComesBackAndNothingIsOverwrittenUnasked() throws Exception {
        Path file = bath();
        byte[] original = Files.readAllBytes(file);
        open(Optional.of(file));
        focus(wantedField(690, Point.Quantity.MUA));
        hand.typeOver("0.11");
        hand.press(KeyCode.ENTER);
        Path side = folder.resolve(".bath.brief.toml.unsaved");
        Stagehand.until("autosave", () -> Files.exists(side));
        assertEquals(
                new String(original, StandardCharsets.UTF_8),
                Files.readString(file),
                "the brief itself was written unasked");
        Stagehand.untilSettled(window);
        hand.press(KeyCode.CONTROL, KeyCode.S);
        Stagehand.until("saved", () -> !window.desk().papers().changedProperty().get());
        assertFalse(Files.exists(side), "the side file outlived the save");
        assertEquals(
                new String(original, StandardCharsets.UTF_8),
                Files.readString(folder.resolve("bath.brief.toml.previous")));
        assertTrue(Files.readString(file).startsWith("# the daily bath\n"), "comments at the top are kept");

        Brief back = BriefReader.read(file, TissueSpectra.of(null));
        assertEquals(0.11, back.targets().get(0).muaPerCm().orElseThrow());
        Recipe recipe = RecipeReader.read(folder.resolve("bath.recipe.toml"), ShelfReader.readShipped());
        assertEquals(back.sha256(), recipe.briefSha256(), "the recipe answers to the brief as saved");
        Stagehand.ui(() -> window.stage().close());
        open(Optional.of(file));
        assertEquals(0.11, wanted(690));
    }

    @Test
    void unsavedChangesAreOfferedAfterACrash() throws Exception {
        Path file = bath();
        open(Optional.of(file));
        focus(wantedField(690, Point.Quantity.MUA));
        hand.typeOver("0.12");
        hand.press(KeyCode.ENTER);
        Stagehand.until("autosave", () -> Files.exists(folder.resolve(".bath.brief.toml.unsaved")));
        Stagehand.ui(() -> window.stage().close()); // the program ends without asking
        open(Optional.of(file));
        assertEquals(0.1, wanted(690));
        Stagehand.until(
                "the offer",
                () -> window.desk().notices().all().stream()
                        .anyMatch(n -> n.strand().equals("unsaved")));
        Stagehand.ui(button("take them up")::fire);
        assertEquals(0.12, wanted(690));
    }

    @Test
    void aWrongWeighingMovesTheLaterStepsAndACrashLosesNothing() {
        open(Optional.of(bath()));
        hand.press(KeyCode.CONTROL, KeyCode.ENTER);
        Stagehand.until(
                "the balance", () -> window.desk().weighingProperty().get().isPresent());
        AtBalance at =
                Stagehand.onUi(() -> window.desk().weighingProperty().get().orElseThrow());
        toStep(at, "Lipid");
        AtBalance.Now before = Stagehand.onUi(() -> at.nowProperty().get());
        double wanted = before.line().wantedG();
        List<Double> later = later(before);
        focus(window.balance().field());
        String over =
                String.format(java.util.Locale.ROOT, "%.3f", wanted * 1.04).replace('.', ',') + " g";
        hand.type(over);
        hand.press(KeyCode.ENTER);
        AtBalance.Now after = Stagehand.onUi(() -> at.nowProperty().get());
        assertEquals(before.at() + 1, after.at(), "Enter goes on");
        assertEquals(wanted * 1.04, after.lines().get(before.at()).weighedG(), 6e-4);
        assertNotEquals(later, later(after), "later steps stayed as planned");

        Stagehand.until("kept", () -> Files.exists(batchFile()));
        Stagehand.pulse();
        Stagehand.ui(() -> window.stage().close()); // the crash
        open(Optional.empty());
        Stagehand.until(
                "the offer",
                () -> window.desk().notices().all().stream()
                        .anyMatch(n -> n.strand().equals("balance")));
        Stagehand.ui(button("go on weighing")::fire);
        Stagehand.until(
                "the balance", () -> window.desk().weighingProperty().get().isPresent());
        AtBalance.Now again = Stagehand.onUi(() -> window.desk()
                .weighingProperty()
                .get()
                .orElseThrow()
                .nowProperty()
                .get());
        assertEquals(after.at(), again.at(), "it goes on at the same step");
        assertEquals(later(after), later(again));

        AtBalance second =
                Stagehand.onUi(() -> window.desk().weighingProperty().get().orElseThrow());
        Stagehand.ui(() -> {
            while (!second.nowProperty().get().over()) {
                AtBalance.Line line = second.nowProperty().get().line();
                second.enter(line.weighs() ? second.loadWantedG() + " g" : "");
            }
        });
        Stagehand.pulse();
        hand.press(KeyCode.ENTER);
        Stagehand.until("the batch", () -> window.desk().madeProperty().get().isPresent());
        assertTrue(Files.exists(folder.resolve("logbook.xlsx")), "the batch is not in a logbook beside the brief");
    }

    private Path batchFile() {
        try (var files = Files.list(folder)) {
            return files.filter(p -> p.toString().endsWith(".batch.toml"))
                    .findFirst()
                    .orElse(folder.resolve("none"));
        } catch (java.io.IOException e) {
            throw new IllegalStateException(e);
        }
    }

    private static List<Double> later(AtBalance.Now now) {
        return now
                .lines()
                .subList(Math.min(now.at(), now.lines().size()), now.lines().size())
                .stream()
                .filter(AtBalance.Line::weighs)
                .map(AtBalance.Line::wantedG)
                .toList();
    }

    private void toStep(AtBalance at, String name) {
        Stagehand.ui(() -> {
            while (!at.nowProperty().get().line().name().startsWith(name)) {
                AtBalance.Line line = at.nowProperty().get().line();
                at.enter(line.weighs() ? at.loadWantedG() + " g" : "");
            }
        });
        Stagehand.pulse();
    }

    /** Only what stands on the screen is read and pressed: no file, no menu, no key but Enter. */
    @Test
    void aStrangerDesignsTheDemoWeighsItAndFindsItInTheLogbook() {
        open(Optional.empty());
        focus(wantedField(690, Point.Quantity.MUA));
        hand.typeOver("0.12");
        hand.press(KeyCode.ENTER);
        Stagehand.untilSettled(window);
        assertTrue(said("headline").startsWith("Lands inside every tolerance"), said("headline"));
        hand.click(button("Stand at the balance"));
        Stagehand.until(
                "the balance", () -> window.desk().weighingProperty().get().isPresent());
        Stagehand.pulse();
        int steps = 0;
        while (all(n -> n instanceof Button b
                        && b.getText() != null
                        && b.getText().startsWith("Record this batch"))
                .isEmpty()) {
            assertTrue(++steps < 100, "the steps do not end");
            List<Node> grams = all(n -> n.getStyleClass().contains("step-grams"));
            if (!grams.isEmpty()) hand.type(((Labeled) grams.get(0)).getText());
            hand.press(KeyCode.ENTER);
        }
        assertTrue(steps >= 7, "seven things are weighed");
        hand.click(button("Record this batch"));
        Stagehand.until("the batch", () -> window.desk().madeProperty().get().isPresent());
        Stagehand.pulse();
        hand.click(button("back to the desk"));
        hand.click(button("Logbook"));
        Stagehand.until(
                "the logbook",
                () -> window.desk().logbookRoom().pagesProperty().get().isPresent());
        Stagehand.pulse();
        assertTrue(shows("Forearm block"), "the batch's title is not in the logbook");
        String landing = said("logbook-landing");
        assertTrue(landing.matches("lands \\d+ times in 100"), landing);
        hand.click(button("forearm-block-" + java.time.LocalDate.now()));
        Stagehand.until("the batch", () -> window.desk().madeProperty().get().isPresent());
        Stagehand.pulse();
        assertTrue(shows("Batch forearm-block-" + java.time.LocalDate.now()));
    }

    private String said(String styleClass) {
        return ((Labeled) all(n -> n.getStyleClass().contains(styleClass)).get(0)).getText();
    }

    private boolean shows(String text) {
        return !all(n -> n instanceof Labeled l && text.equals(l.getText())).isEmpty();
    }

    @Test
    void stocksInHandAreKeptEditedAndTakenBack() throws Exception {
        Path file = bath();
        Files.writeString(file, Files.readString(file) + """

                        [[stock_in_hand]]
                        id = "ink-1-20"
                        ingredient = "ink-demo"
                        ingredient_g = 1
                        diluent = "water"
                        diluent_g = 19
                        """);
        open(Optional.of(file));
        assertEquals(1, draft().stocks().size());
        assertTrue(
                shown().recipe().stocks().stream().anyMatch(s -> s.id().equals("ink-1-20")),
                "the recipe does not use what stands ready");
        hand.click(button("ink-1-20"));
        hand.click(all(n -> "remove the stock ink-1-20".equals(n.getAccessibleText()))
                .get(0));
        assertTrue(draft().stocks().isEmpty());
        hand.press(KeyCode.CONTROL, KeyCode.Z);
        assertEquals("ink-1-20", draft().stocks().get(0).id());
        focus(wantedField(690, Point.Quantity.MUA));
        hand.typeOver("0.11");
        hand.press(KeyCode.ENTER);
        Stagehand.untilSettled(window);
        hand.press(KeyCode.CONTROL, KeyCode.S);
        Stagehand.until("saved", () -> !window.desk().papers().changedProperty().get());
        assertEquals(
                List.of("ink-1-20"),
                BriefReader.read(file, TissueSpectra.of(null)).stocksInHand().stream()
                        .map(org.hazewright.brief.StockInHand::id)
                        .toList());
    }

    private void drop(Path file) {
        assertTrue(Stagehand.onUi(() -> window.drop(List.of(file.toFile()))));
    }

    @Test
    void droppedFilesOpenAsWhatTheyAre() throws Exception {
        Path file = bath();
        open(Optional.empty());
        assertFalse(Stagehand.onUi(() -> window.drop(List.of())));
        drop(file);
        Stagehand.until("the brief", () -> window.desk().edits().now().name().equals("bath"));
        Stagehand.untilSettled(window);
        hand.press(KeyCode.CONTROL, KeyCode.S);
        Path recipe = folder.resolve("bath.recipe.toml");
        Stagehand.until("saved", () -> Files.exists(recipe));
        assertEquals(
                file.toAbsolutePath(),
                Stagehand.onUi(() -> window.desk().remembered().recent().get(0)));

        Path table = folder.resolve("wanted.csv");
        Files.writeString(table, "wavelength_nm,mua_per_cm,musp_per_cm\n700,0.2,11\n800,0.15,9\n");
        drop(table);
        Stagehand.until("the table", () -> window.desk().edits().now().row(700).isPresent());
        hand.press(KeyCode.CONTROL, KeyCode.Z);
        assertTrue(draft().row(690).isPresent(), "undo brings the targets back");
        Stagehand.untilSettled(window);

        drop(recipe);
        Stagehand.until(
                "the recipe's brief",
                () -> window.desk().papers().openProperty().get().file().isPresent());
        Path sheet = folder.resolve("bath.xlsx");
        chooser.next(sheet);
        Stagehand.untilSettled(window);
        Stagehand.ui(button("Save sheet")::fire);
        Stagehand.until("the sheet", () -> Files.exists(sheet));
        drop(sheet);
        Stagehand.until(
                "an answer to a sheet that nobody filled in, or its batch",
                () -> window.desk().weighingProperty().get().isPresent()
                        || window.desk().madeProperty().get().isPresent()
                        || window.desk().notices().all().stream()
                                .anyMatch(n -> n.strand().equals("open")));
        drop(folder.resolve("holiday.mp3"));
        assertTrue(window.desk().notices().all().stream().anyMatch(n -> n.text().contains("holiday.mp3")));
    }

    @Test
    void viewsThatWereLeftAreForgotten() throws Exception {
        open(Optional.of(bath()));
        List<java.lang.ref.WeakReference<Node>> left = new ArrayList<>();
        for (int k = 0; k < 3; k++) {
            Stagehand.ui(() -> window.openShelf());
            Stagehand.pulse();
            left.add(new java.lang.ref.WeakReference<>(
                    all(n -> n.getClass().getSimpleName().equals("ShelfView")).get(0)));
            Stagehand.ui(() -> window.closeShelf());
            Stagehand.ui(() -> window.desk().standAtBalance());
            Stagehand.until(
                    "the balance", () -> window.desk().weighingProperty().get().isPresent());
            Stagehand.pulse();
            left.add(new java.lang.ref.WeakReference<>(
                    all(n -> n.getClass().getSimpleName().equals("BalanceView")).get(0)));
            Stagehand.ui(() -> window.desk().leaveBalance());
        }
        // the window keeps one of each kind
        Stagehand.until("the garbage to be collected", () -> {
            System.gc();
            return left.stream()
                            .map(java.lang.ref.WeakReference::get)
                            .filter(java.util.Objects::nonNull)
                            .distinct()
                            .count()
                    <= 2;
        });
    }

    /** Seven dilutions of a bottle of invented strength; Beer and Lambert's law gives that strength back by hand. */
    @Test
    void aDilutionSeriesMakesALot() throws Exception {
        StringBuilder rows = new StringBuilder("mass_fraction,path_mm,wavelength_nm,absorbance,u\n");
        for (int nm = 600; nm <= 900; nm += 50)
            for (int k = 0; k <= 6; k++) {
                double absorbance = 0.12 * k * Math.pow(nm / 600.0, -1.2) + 0.0004 * ((k * 7 + nm / 50) % 3 - 1);
                rows.append(String.format(java.util.Locale.ROOT, "%.6f,10,%d,%.5f,0.001%n", 2e-5 * k, nm, absorbance));
            }
        Path series = folder.resolve("series.csv");
        Files.writeString(series, rows.toString());
        open(Optional.empty());
        Path own = folder.resolve("shelf");
        Stagehand.ui(() -> window.desk().adding().makeOwn(own));
        Stagehand.until("a shelf of one's own", () -> window.desk().adding().own());
        Stagehand.untilSettled(window);
        Stagehand.ui(() -> {
            window.openShelf();
            window.desk()
                    .shelfRoom()
                    .choose(window.desk()
                            .shelfProperty()
                            .get()
                            .shelf()
                            .orElseThrow()
                            .require("ink-demo"));
        });
        Stagehand.pulse();
        Stagehand.ui(button("add a lot of it")::fire);
        Stagehand.pulse();
        focus(all(n -> "lot: number".equals(n.getAccessibleText())).get(0));
        hand.type("07");
        chooser.next(series);
        Stagehand.ui(button("measured as a dilution series")::fire);
        Stagehand.until(
                "the fit", () -> window.desk().adding().fittedProperty().get().isPresent());
        Stagehand.pulse();
        Stagehand.ui(button("Put this measured lot on the shelf")::fire);
        Stagehand.until(
                "the lot",
                () -> window.desk().shelfProperty().get().shelf().stream()
                        .flatMap(s -> s.ingredients().stream())
                        .anyMatch(i ->
                                i.lot().filter(l -> l.number().equals("07")).isPresent()));
        var lot = window.desk().shelfProperty().get().shelf().orElseThrow().ingredients().stream()
                .filter(i -> i.lot().filter(l -> l.number().equals("07")).isPresent())
                .findFirst()
                .orElseThrow();
        // Beer and Lambert: absorbance × ln 10 / path over concentration; 0.12 per 2e-5 by mass in water of 0.998 g/mL,
        // 1 cm
        double slope = 0.12 * Math.log(10) / (2e-5 * 0.998);
        var at = org.hazewright.mixture.MassSpecific.of(lot, 600, 22, 1.333, 0);
        double extinction = at.kappaA() / (1 - lot.absorption().orElseThrow().albedo());
        assertEquals(slope, extinction, 0.02 * slope);
    }

    @Test
    void sheetsAndPicturesAreWritten() throws Exception {
        open(Optional.of(bath()));
        for (String name : List.of("bath.xlsx", "bath.pdf")) {
            chooser.next(folder.resolve(name));
            Stagehand.ui(button("Save sheet")::fire);
            Stagehand.until(name, () -> Files.exists(folder.resolve(name)));
        }
        assertEquals(
                "%PDF", new String(Files.readAllBytes(folder.resolve("bath.pdf")), 0, 4, StandardCharsets.US_ASCII));
        for (String name : List.of("bath.png", "bath.svg")) {
            chooser.next(folder.resolve(name));
            Stagehand.ui(button("save picture")::fire);
            assertTrue(Files.size(folder.resolve(name)) > 2000, name);
        }
        assertNotNull(javax.imageio.ImageIO.read(folder.resolve("bath.png").toFile()));
        javax.xml.parsers.DocumentBuilderFactory.newInstance()
                .newDocumentBuilder()
                .parse(folder.resolve("bath.svg").toFile());
    }

    @Test
    void anEmptyShelfIsExplained() throws Exception {
        Path empty = Files.createDirectory(folder.resolve("empty"));
        Stagehand.ui(() -> {});
        window = Stagehand.onUi(() -> {
            var desk = new org.hazewright.desk.model.Desk(
                    org.hazewright.desk.model.Work.threaded(javafx.application.Platform::runLater),
                    Optional.of(empty),
                    org.hazewright.desk.model.Remembered.in(folder.resolve("memory"), folder.resolve("work")));
            Window w = new Window(
                    new javafx.stage.Stage(), desk, new org.hazewright.desk.look.Look(), Optional.of(chooser));
            desk.begin(Optional.empty());
            w.show();
            return w;
        });
        Stagehand.until(
                "words", () -> window.desk().shelfProperty().get().problem().isPresent());
        Stagehand.pulse();
        Stagehand.ui(button("use the shelf of the program")::fire);
        Stagehand.untilSettled(window);
        assertNotNull(shown());
    }

    @Test
    void closingWithChangesAsksFirst() {
        open(Optional.of(bath()));
        focus(wantedField(690, Point.Quantity.MUA));
        hand.typeOver("0.14");
        hand.press(KeyCode.ENTER);
        Stagehand.ui(() -> javafx.event.Event.fireEvent(
                window.stage(),
                new javafx.stage.WindowEvent(window.stage(), javafx.stage.WindowEvent.WINDOW_CLOSE_REQUEST)));
        assertTrue(Stagehand.onUi(() -> window.stage().isShowing()));
        assertTrue(Stagehand.onUi(
                () -> window.desk().notices().all().stream().anyMatch(n -> n.kind() == Notice.Kind.ASKED)));
        Stagehand.ui(button("close without saving")::fire);
        assertFalse(Stagehand.onUi(() -> window.stage().isShowing()));
    }
}
