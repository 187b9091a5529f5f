package org.hazewright.desk;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertNotEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.nio.file.Files;
import java.nio.file.Path;
import java.time.LocalDate;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import javafx.scene.Node;
import javafx.scene.control.Labeled;
import javafx.scene.image.WritableImage;
import javafx.scene.input.KeyCode;
import org.hazewright.batch.Batch;
import org.hazewright.brief.Point;
import org.hazewright.desk.model.AtBalance;
import org.hazewright.desk.spectra.SpectraPlot;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/**
 * A person who has never seen the window: first start, a target dragged, the demo weighed with one slip, found again in the logbook, measured,
 * and put right. Only what stands on the screen is read and pressed. With {@code -Dwalk.pictures=FOLDER} each step leaves its picture.
 */
class StrangerTest {
    @TempDir
    Path folder;

    private Window window;
    private Eyes eyes;
    private Hand hand;
    private int pictures;

    @AfterEach
    void close() {
        if (window != null) Stagehand.ui(() -> window.stage().close());
    }

    @Test
    void designsWeighsSlipsFindsMeasuresAndCorrects() throws Exception {
        Stagehand.startToolkit();
        hand = new Hand();
        window = Stagehand.open(
                folder.resolve("memory"), 1280, 800, Optional.empty(), Optional.of(new PlannedChooser()));
        eyes = new Eyes(window);
        Stagehand.untilSettled(window);
        Stagehand.until(
                "readings", () -> window.desk().foreseeing().foreseenProperty().get() != null);
        picture("first-start");
        assertTrue(eyes.reads("Drag an amber box"), "the hint that says so");

        dragTheFirstBoxUp();
        picture("dragged");
        String verdict = text("headline");
        assertTrue(verdict.startsWith("Lands inside every tolerance"), verdict);

        hand.click(eyes.button("Stand at the balance"));
        Stagehand.until(
                "the balance", () -> window.desk().weighingProperty().get().isPresent());
        Stagehand.pulse();
        weighWithASlip();
        picture("weighed");
        hand.press(KeyCode.ENTER); // Record this batch
        Stagehand.until("the batch", () -> window.desk().madeProperty().get().isPresent());
        Stagehand.until(
                "what it says",
                () -> window.desk().madeProperty().get().get().seenProperty().get() != null);
        picture("batch");

        hand.click(eyes.button("back to the desk"));
        hand.click(eyes.button("Logbook"));
        Stagehand.until(
                "the logbook",
                () -> window.desk().logbookRoom().pagesProperty().get().isPresent());
        picture("logbook");
        String name = "forearm-block-" + LocalDate.now();
        hand.click(eyes.button(name));
        Stagehand.until("the batch", () -> window.desk().madeProperty().get().isPresent());
        Stagehand.until(
                "what it says",
                () -> window.desk().madeProperty().get().get().seenProperty().get() != null);

        measure();
        picture("measured");
        assertTrue(eyes.reads("Measured against predicted"), "what was measured is not judged");
        hand.click(eyes.button("look for the least addition"));
        Stagehand.until(
                "a correction",
                () -> window.desk()
                        .madeProperty()
                        .get()
                        .get()
                        .correctionProperty()
                        .get()
                        .isPresent());
        picture("correction");
        assertEquals(
                "Weigh it in ⏎",
                Stagehand.onUi(() -> Eyes.name(window.stage().getScene().getFocusOwner())),
                "whoever asked for it goes on with Enter");
        hand.press(KeyCode.ENTER);
        Stagehand.until(
                "the balance again",
                () -> window.desk().weighingProperty().get().isPresent());
        Stagehand.pulse();
        picture("correcting");
        weighTheRest();
        hand.press(KeyCode.ENTER);
        Stagehand.until("the batch", () -> window.desk().madeProperty().get().isPresent());
        Stagehand.until(
                "what it says",
                () -> window.desk().madeProperty().get().get().seenProperty().get() != null);
        picture("corrected");
        Batch made = Stagehand.onUi(() ->
                window.desk().madeProperty().get().orElseThrow().batchProperty().get());
        assertEquals(1, made.correctionCount());
        assertTrue(made.weighedG().stream().allMatch(g -> g.isPresent()), "something was not weighed");
    }

    private void dragTheFirstBoxUp() {
        double before = wanted();
        SpectraPlot plot = Stagehand.onUi(() -> window.spectra().plot());
        double x = plot.xOf(690);
        hand.drag(
                window.spectra().surface(),
                x,
                plot.yOf(Point.Quantity.MUA, before),
                x,
                plot.yOf(Point.Quantity.MUA, before * 1.1));
        Stagehand.untilSettled(window);
        assertEquals(before * 1.1, wanted(), 0.02 * before, "the box did not follow the hand");
    }

    private double wanted() {
        return Stagehand.onUi(() ->
                window.desk().edits().now().row(690).orElseThrow().muaPerCm().orElseThrow());
    }

    /** Types what the screen asks for, as a balance would; of the emulsion four per cent too much. */
    private void weighWithASlip() throws Exception {
        AtBalance at =
                Stagehand.onUi(() -> window.desk().weighingProperty().get().orElseThrow());
        boolean slipped = false;
        for (int steps = 0; !over(); steps++) {
            assertTrue(steps < 100, "the steps do not end");
            boolean slip = !slipped && weighs() && text("step-name").startsWith("Lipid");
            if (!slip) {
                if (weighs()) hand.type(text("step-grams"));
                hand.press(KeyCode.ENTER);
                continue;
            }
            slipped = true;
            picture("at-the-balance");
            double asked = Double.parseDouble(text("step-grams").split(" ")[0]);
            List<Double> later = later(at);
            hand.type(String.format(Locale.ROOT, "%.3f g", asked * 1.04));
            picture("too-much");
            hand.press(KeyCode.ENTER);
            Stagehand.pulse();
            picture("planned-anew");
            assertNotEquals(later, later(at), "later steps stayed as planned");
            assertTrue(eyes.reads("after what was weighed"), "nothing says that the plan has changed");
        }
        assertTrue(slipped, "no step asked for the emulsion");
    }

    private static List<Double> later(AtBalance at) {
        return Stagehand.onUi(() -> {
            AtBalance.Now now = at.nowProperty().get();
            return now.lines().stream()
                    .filter(l -> l.weighs() && Double.isNaN(l.weighedG()))
                    .map(AtBalance.Line::wantedG)
                    .skip(1)
                    .toList();
        });
    }

    private void weighTheRest() {
        for (int steps = 0; !over(); steps++) {
            assertTrue(steps < 100, "the steps do not end");
            if (weighs()) hand.type(text("step-grams"));
            hand.press(KeyCode.ENTER);
        }
    }

    /** Types values that are eight per cent over what was wanted, each known to two per cent, from field to field by Tab. */
    private void measure() {
        List<Point> points = Stagehand.onUi(
                () -> window.desk().madeProperty().get().orElseThrow().points());
        Node first = eyes.all(n ->
                        n.getAccessibleText() != null && n.getAccessibleText().startsWith("measured µa"))
                .get(0);
        hand.click(first);
        for (Point p : points) {
            hand.type(String.format(Locale.ROOT, "%.4f", p.wantedPerCm() * 1.08));
            hand.press(KeyCode.TAB);
            hand.type(String.format(Locale.ROOT, "%.4f", p.wantedPerCm() * 0.02));
            hand.press(KeyCode.TAB);
        }
        hand.click(eyes.button("Take these values"));
        Stagehand.until(
                "a verdict",
                () -> window.desk()
                        .madeProperty()
                        .get()
                        .orElseThrow()
                        .seenProperty()
                        .get()
                        .verdict()
                        .isPresent());
        Stagehand.pulse();
    }

    private boolean weighs() {
        return !eyes.all(n -> n.getStyleClass().contains("step-grams")).isEmpty();
    }

    private boolean over() {
        return eyes.reads("Record this batch");
    }

    private String text(String styleClass) {
        return Stagehand.onUi(() -> ((Labeled)
                        eyes.all(n -> n.getStyleClass().contains(styleClass)).get(0))
                .getText()
                .replace('\u00A0', ' '));
    }

    private void picture(String name) throws Exception {
        Stagehand.pulse(); // what is looked at is laid out, with a picture of it or without
        String to = System.getProperty("walk.pictures");
        if (to == null) return;
        byte[] png = Stagehand.onUi(() -> {
            WritableImage image = window.stage().getScene().snapshot(null);
            return Pictures.bytes(image);
        });
        Files.createDirectories(Path.of(to));
        Files.write(Path.of(to).resolve(String.format(Locale.ROOT, "%02d-%s.png", ++pictures, name)), png);
    }
}
