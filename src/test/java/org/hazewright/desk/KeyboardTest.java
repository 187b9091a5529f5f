package org.hazewright.desk;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import javafx.event.Event;
import javafx.geometry.Bounds;
import javafx.scene.Node;
import javafx.scene.control.RadioButton;
import javafx.scene.control.ScrollPane;
import javafx.scene.image.PixelFormat;
import javafx.scene.image.WritableImage;
import javafx.scene.input.KeyCode;
import javafx.scene.input.KeyEvent;
import javafx.scene.paint.Color;
import org.hazewright.brief.Point;
import org.hazewright.desk.model.AtBalance;
import org.hazewright.desk.model.MadeBatch;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.BeforeEach;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.EnumSource;

/**
 * The keyboard alone reaches everything in every view, shows where it is, and everything it reaches has a name for a screen reader (WCAG 2.2,
 * success criteria 2.1.1, 2.4.7 and 4.1.2).
 */
class KeyboardTest {
    @TempDir
    Path folder;

    private Window window;
    private Eyes eyes;
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

    private void open() {
        window = Stagehand.open(
                folder.resolve("memory"), 1280, 800, Optional.empty(), Optional.of(new PlannedChooser()));
        eyes = new Eyes(window);
        Stagehand.untilSettled(window);
    }

    /** The views that a person comes to, each as it stands when there is most in it. */
    enum View {
        DESK {
            @Override
            void open(KeyboardTest t) {
                t.open();
                for (String panel : List.of("for moulds", "to 220 g", "none made yet", "from tissue-like"))
                    Stagehand.ui(() -> t.eyes.button(panel).fire());
                Stagehand.ui(() -> t.eyes.button("+ box").fire());
                Stagehand.untilSettled(t.window);
                Stagehand.ui(() -> t.window.brief().focusFirst());
            }
        },
        SHELF {
            @Override
            void open(KeyboardTest t) {
                t.openOwnShelf();
                Stagehand.ui(() -> t.eyes.button("add a lot of it").fire());
            }
        },
        INGREDIENT {
            @Override
            void open(KeyboardTest t) {
                t.openOwnShelf();
                Stagehand.ui(() -> t.eyes.button("add an ingredient").fire());
            }
        },
        TASK {
            @Override
            void open(KeyboardTest t) {
                t.openBalance();
            }
        },
        WEIGHING {
            @Override
            void open(KeyboardTest t) {
                AtBalance at = t.openBalance();
                Stagehand.ui(() -> {
                    while (!at.nowProperty().get().line().weighs()) at.enter("");
                });
            }
        },
        WEIGHED {
            @Override
            void open(KeyboardTest t) {
                t.weighAll(t.openBalance());
            }
        },
        BATCH {
            @Override
            void open(KeyboardTest t) {
                t.openMeasured();
            }
        },
        LOGBOOK {
            @Override
            void open(KeyboardTest t) {
                t.openMeasured();
                Stagehand.ui(() -> {
                    t.window.desk().leaveBatch();
                    t.window.openLogbook();
                });
                Stagehand.until(
                        "the logbook",
                        () -> t.window
                                .desk()
                                .logbookRoom()
                                .pagesProperty()
                                .get()
                                .isPresent());
            }
        },
        KEYS {
            @Override
            void open(KeyboardTest t) {
                t.open();
                Stagehand.ui(() -> t.window.openKeys());
            }
        },
        NO_SHELF {
            @Override
            void open(KeyboardTest t) {
                Path empty = t.folder.resolve("empty");
                try {
                    Files.createDirectory(empty);
                } catch (java.io.IOException e) {
                    throw new java.io.UncheckedIOException(e);
                }
                t.window = Stagehand.openOn(t.folder.resolve("memory"), 1280, 800, empty);
                t.eyes = new Eyes(t.window);
                Stagehand.until(
                        "words",
                        () -> t.window.desk().shelfProperty().get().problem().isPresent());
            }
        };

        abstract void open(KeyboardTest t);
    }

    private void openOwnShelf() {
        open();
        Stagehand.ui(() -> window.desk().adding().makeOwn(folder.resolve("shelf")));
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
    }

    private AtBalance openBalance() {
        open();
        Stagehand.ui(() -> window.desk().standAtBalance());
        Stagehand.until(
                "the balance", () -> window.desk().weighingProperty().get().isPresent());
        AtBalance at =
                Stagehand.onUi(() -> window.desk().weighingProperty().get().orElseThrow());
        Stagehand.until("an outlook", () -> at.outlookProperty().get() != null);
        return at;
    }

    private void weighAll(AtBalance at) {
        Stagehand.ui(() -> {
            while (!at.nowProperty().get().over()) {
                AtBalance.Line line = at.nowProperty().get().line();
                at.enter(line.weighs() ? at.loadWantedG() + " g" : "");
            }
        });
        Stagehand.pulse();
    }

    private void openMeasured() {
        weighAll(openBalance());
        Stagehand.ui(() -> window.desk().finishWeighing());
        Stagehand.until("the batch", () -> window.desk().madeProperty().get().isPresent());
        MadeBatch made = Stagehand.onUi(() -> window.desk().madeProperty().get().orElseThrow());
        Stagehand.until("a look", () -> made.seenProperty().get() != null);
        Stagehand.ui(() -> {
            List<MadeBatch.Entry> entries = new ArrayList<>();
            for (Point p : made.points())
                entries.add(new MadeBatch.Entry(
                        p.wavelengthNm(), p.quantity(), Double.toString(p.wantedPerCm() * 1.09), "2 %"));
            made.measured("time-resolved fit", "bench instrument", entries);
        });
        Stagehand.until("a verdict", () -> made.seenProperty().get().verdict().isPresent());
        Stagehand.ui(made::correct);
        Stagehand.until("a correction", () -> made.correctionProperty().get().isPresent());
    }

    private List<Node> stops() {
        return eyes.all(n -> n.isFocusTraversable() && !n.isDisabled());
    }

    private Node focused() {
        return Stagehand.onUi(() -> window.stage().getScene().getFocusOwner());
    }

    /** Tab, with no wait for a picture of it. */
    private void tab() {
        Stagehand.ui(() -> Event.fireEvent(
                window.stage().getScene().getFocusOwner(),
                new KeyEvent(KeyEvent.KEY_PRESSED, "\t", "\t", KeyCode.TAB, false, false, false, false)));
    }

    @ParameterizedTest
    @EnumSource
    void tabReachesEverythingShowsWhereItIsAndEverythingHasAName(View view) {
        view.open(this);
        Stagehand.pulse();
        List<Node> stops = stops();
        assertFalse(stops.isEmpty(), "nothing takes the focus");
        for (Node n : stops) assertFalse(Eyes.name(n).isBlank(), view + ": " + n + " has no name for a screen reader");

        Set<Node> reached = new LinkedHashSet<>();
        List<String> hidden = new ArrayList<>();
        Node before = focused();
        assertTrue(before != null && before.isVisible(), "the view opens without the focus anywhere");
        assertFalse(Eyes.name(before).startsWith("put this away"), view + " opens with the focus on a notice");
        Node first = before;
        int steps = 0;
        do {
            Node now = focused();
            reached.add(now);
            if (!Stagehand.onUi(() -> ringShows(now)))
                hidden.add(Eyes.name(now) + " (" + now.getClass().getSimpleName() + ")");
            tab();
        } while (focused() != first && ++steps < 2 * stops.size());
        assertEquals(List.of(), hidden, view + ": no ring shows that these have the focus");
        List<String> missed = stops.stream()
                .filter(n -> !reached.contains(n) && !inGroup(n, reached))
                .map(n -> Eyes.name(n) + " " + n)
                .toList();
        assertEquals(List.of(), missed, view + ": Tab does not come to these");
    }

    /** Tab may come to one button of a group, the arrows to the others. */
    private static boolean inGroup(Node n, Set<Node> reached) {
        return n instanceof RadioButton b
                && reached.stream()
                        .anyMatch(r -> r instanceof RadioButton o && o.getToggleGroup() == b.getToggleGroup());
    }

    /** Whether a node, or the box around it, has more of the rings' colour with the focus than without. */
    private boolean ringShows(Node n) {
        for (Node seen : new Node[] {n, n.getParent()}) {
            int with = tealIn(seen);
            n.getScene().getRoot().requestFocus();
            int without = tealIn(seen);
            n.requestFocus();
            if (with > without) return true;
        }
        return false;
    }

    /** How many pixels of a node have the colour that rings have. */
    private int tealIn(Node n) {
        WritableImage image = n.snapshot(null, null);
        int w = (int) image.getWidth();
        int h = (int) image.getHeight();
        int[] pixels = new int[w * h];
        image.getPixelReader().getPixels(0, 0, w, h, PixelFormat.getIntArgbInstance(), pixels, 0, w);
        Color teal = Color.web(window.look().palette().teal());
        int count = 0;
        for (int p : pixels)
            if (Math.abs((p >> 16 & 255) - 255 * teal.getRed()) < 40
                    && Math.abs((p >> 8 & 255) - 255 * teal.getGreen()) < 40
                    && Math.abs((p & 255) - 255 * teal.getBlue()) < 40) count++;
        return count;
    }

    /** Whoever walks through the shelf by keys stays where they are when an ingredient is chosen. */
    @Test
    void choosingOnTheShelfKeepsTheFocus() {
        openOwnShelf();
        Node name = eyes.button("Carbon black powder");
        Stagehand.ui(name::requestFocus);
        hand.press(KeyCode.ENTER);
        assertEquals(
                "carbon-black-powder",
                Stagehand.onUi(() -> window.desk()
                        .shelfRoom()
                        .chosenProperty()
                        .get()
                        .orElseThrow()
                        .id()));
        assertEquals("Carbon black powder", Eyes.name(focused()));
        hand.press(KeyCode.TAB);
        hand.press(KeyCode.SPACE);
        assertTrue(Stagehand.onUi(
                () -> !window.desk().shelfRoom().comparedProperty().get().isEmpty()));
    }

    @Test
    void theFocusComesBackToWhereTheDeskWasLeft() {
        open();
        Node field = Stagehand.onUi(() -> window.brief().wantedField(760, Point.Quantity.MUA));
        Stagehand.ui(field::requestFocus);
        hand.press(KeyCode.CONTROL, KeyCode.L);
        hand.press(KeyCode.ESCAPE);
        assertEquals(field, focused());
        hand.press(KeyCode.F1);
        hand.press(KeyCode.ESCAPE);
        assertEquals(field, focused());
    }

    @Test
    void f6WalksThroughThePlacesInTheOrderOfTheWork() {
        open();
        List<Node> places = Stagehand.onUi(() -> window.places());
        Stagehand.ui(() -> window.brief().focusFirst());
        for (int k = 1; k <= places.size(); k++) {
            hand.press(KeyCode.F6);
            Node in = places.get(k % places.size());
            assertTrue(inside(focused(), in), "F6 does not come to place " + k % places.size());
        }
        hand.press(KeyCode.SHIFT, KeyCode.F6);
        assertTrue(inside(focused(), places.get(places.size() - 1)));
    }

    private static boolean inside(Node n, Node place) {
        for (Node at = n; at != null; at = at.getParent()) if (at == place) return true;
        return false;
    }

    /** Tab scrolls what it comes to into view. */
    @Test
    void whatHasTheFocusIsNeverScrolledAway() {
        open();
        Stagehand.ui(() -> window.look().scaleProperty().set(1.6));
        Stagehand.pulse();
        Stagehand.ui(() -> window.brief().focusFirst());
        Node first = focused();
        int stops = 0;
        do {
            tab();
            Node now = focused();
            boolean seen = Stagehand.onUi(() -> {
                Bounds b = now.localToScene(now.getBoundsInLocal());
                return now instanceof ScrollPane
                        || b.getMinX() < window.stage().getScene().getWidth() - 4
                                && b.getMaxX() > 4
                                && b.getMinY() < window.stage().getScene().getHeight() - 4
                                && b.getMaxY() > 4;
            });
            assertTrue(seen, Eyes.name(now) + " has the focus and lies outside the window");
        } while (focused() != first && ++stops < 150);
    }
}
