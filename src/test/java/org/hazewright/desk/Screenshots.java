package org.hazewright.desk;

import java.awt.image.BufferedImage;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import javafx.application.Platform;
import javafx.geometry.Rectangle2D;
import javafx.scene.Node;
import javafx.scene.Scene;
import javafx.scene.SnapshotParameters;
import javafx.scene.control.ScrollPane;
import javafx.scene.image.PixelFormat;
import javafx.scene.image.WritableImage;
import javax.imageio.ImageIO;
import org.hazewright.brief.Point;
import org.hazewright.desk.look.Palette;
import org.hazewright.desk.model.AtBalance;
import org.hazewright.desk.model.MadeBatch;
import org.hazewright.files.BriefReader;
import org.hazewright.files.BriefWriter;
import org.hazewright.files.SafeFile;
import org.hazewright.files.TissueSpectra;

/**
 * Makes pictures of every view in both themes, at 1280 × 720 and 1920 × 1080 px, at 3840 × 2160, and at 1440 × 900 with letters half as
 * large again: see DEVELOPERS.md for the command. With a word such as {@code 1280} or {@code large} only that size is made.
 */
public final class Screenshots {
    private record Size(String name, double w, double h, double letters) {}

    private static final List<Size> SIZES = List.of(
            new Size("1280", 1280, 720, 1),
            new Size("1920", 1920, 1080, 1),
            new Size("3840", 3840, 2160, 1),
            new Size("large", 1440, 900, 1.5));

    /** How much of a picture is copied at once, px. */
    private static final int STRIP = 240;

    /** Memory for a window without a display, that draws in software, and its picture; found by trying. */
    private static final double BYTES_A_PIXEL = 32;

    private final Path out;
    private final Size size;

    private Screenshots(Path out, Size size) {
        this.out = out;
        this.size = size;
    }

    public static void main(String[] args) throws IOException {
        Path out = Path.of("target/screenshots");
        Files.createDirectories(out);
        List<String> wanted = List.of(args);
        try {
            for (Size size : SIZES) {
                if (!wanted.isEmpty() && !wanted.contains(size.name())) continue;
                if (size.w() * size.h() * BYTES_A_PIXEL > Runtime.getRuntime().maxMemory())
                    System.out.println("Left out: " + size.name() + " needs more memory, -Dmemory=400m");
                else new Screenshots(out, size).all();
            }
        } finally {
            Platform.exit();
        }
    }

    private void all() throws IOException {
        work();
        forms();
        trouble();
        noShelf();
    }

    private Window open(Optional<Path> file) throws IOException {
        Window window = Stagehand.open(
                Files.createTempDirectory("memory"), size.w(), size.h(), file, Optional.of(new PlannedChooser()));
        Stagehand.ui(() -> window.look().scaleProperty().set(size.letters()));
        Stagehand.untilSettled(window);
        return window;
    }

    private static void close(Window window) {
        Stagehand.ui(() -> window.stage().close());
    }

    /** The way of the work: desk, balance, batch, logbook. */
    private void work() throws IOException {
        Window window = open(Optional.empty());
        Stagehand.until(
                "readings", () -> window.desk().foreseeing().foreseenProperty().get() != null);
        shoot(window, "desk");
        Stagehand.ui(() -> new Eyes(window)
                .all(n -> n instanceof org.hazewright.desk.parts.Hint)
                .forEach(n -> ((org.hazewright.desk.parts.Hint) n).putAway()));
        scroll(window, 1);
        shoot(window, "desk-below");
        Stagehand.ui(() -> window.desk().standAtBalance());
        Stagehand.until(
                "the balance", () -> window.desk().weighingProperty().get().isPresent());
        AtBalance at =
                Stagehand.onUi(() -> window.desk().weighingProperty().get().orElseThrow());
        balance(window, at, "task");
        Stagehand.ui(() -> {
            while (!at.nowProperty().get().line().name().startsWith("Lipid")) {
                AtBalance.Line line = at.nowProperty().get().line();
                at.enter(line.weighs() ? Double.toString(at.loadWantedG() * 1.004) + " g" : "");
            }
        });
        Stagehand.ui(() -> window.balance().field().setText("15.502 g"));
        Stagehand.until("a band", () -> at.bandProperty().get().isPresent());
        balance(window, at, "weigh");
        Stagehand.ui(() -> {
            String over = Double.toString(at.loadWantedG() * 1.3) + " g";
            at.enter(over);
            at.enter(over); // said twice, it counts
            while (!at.nowProperty().get().line().weighs()) at.enter("");
            window.balance().field().clear();
        });
        Stagehand.until("a band", () -> at.bandProperty().get().isPresent());
        balance(window, at, "poured-over");
        Stagehand.ui(() -> {
            while (!at.nowProperty().get().over()) {
                AtBalance.Line line = at.nowProperty().get().line();
                at.enter(line.weighs() ? Double.toString(at.loadWantedG()) + " g" : "");
            }
        });
        balance(window, at, "over");
        Stagehand.ui(() -> window.desk().finishWeighing());
        Stagehand.until("the batch", () -> window.desk().madeProperty().get().isPresent());
        MadeBatch made = Stagehand.onUi(() -> window.desk().madeProperty().get().orElseThrow());
        Stagehand.until("a look", () -> made.seenProperty().get() != null);
        shoot(window, "batch");
        Stagehand.ui(() -> {
            List<MadeBatch.Entry> entries = new ArrayList<>();
            made.points()
                    .forEach(p -> entries.add(new MadeBatch.Entry(
                            p.wavelengthNm(), p.quantity(), Double.toString(p.wantedPerCm() * 1.09), "2 %")));
            made.measured("time-resolved fit", "bench instrument", entries);
        });
        Stagehand.until("a verdict", () -> made.seenProperty().get().verdict().isPresent());
        Stagehand.ui(made::correct);
        Stagehand.until("a correction", () -> made.correctionProperty().get().isPresent());
        shoot(window, "batch-measured");
        scroll(window, 1);
        shoot(window, "batch-below");
        Stagehand.ui(() -> {
            window.desk().leaveBatch();
            window.openLogbook();
        });
        Stagehand.until(
                "the logbook",
                () -> window.desk().logbookRoom().pagesProperty().get().isPresent());
        shoot(window, "logbook");
        close(window);
    }

    /** The shelf, its forms, the panels of the brief, and the keys. */
    private void forms() throws IOException {
        Window window = open(Optional.empty());
        Eyes eyes = new Eyes(window);
        Stagehand.ui(() -> {
            var room = window.desk().shelfRoom();
            for (String id :
                    List.of("ink-demo", "dye-blue-demo", "lipid-emulsion-20", "water", "microspheres-polystyrene-1000"))
                room.compare(id, true);
            room.choose(
                    window.desk().shelfProperty().get().shelf().orElseThrow().require("lipid-emulsion-20"));
            room.favourite("lipid-emulsion-20", true);
            window.openShelf();
        });
        Stagehand.until(
                "spectra", () -> window.desk().shelfRoom().linesProperty().get().size() == 5);
        shoot(window, "shelf");
        Path own = Files.createTempDirectory("shelf").resolve("own");
        Stagehand.ui(() -> window.desk().adding().makeOwn(own));
        Stagehand.until("a shelf of one's own", () -> window.desk().adding().own());
        Stagehand.untilSettled(window);
        Stagehand.ui(() -> window.desk()
                .shelfRoom()
                .choose(window.desk()
                        .shelfProperty()
                        .get()
                        .shelf()
                        .orElseThrow()
                        .require("lipid-emulsion-20")));
        Stagehand.pulse();
        Stagehand.ui(() -> eyes.button("add a lot of it").fire());
        Stagehand.pulse();
        scroll(window, 1);
        shoot(window, "shelf-lot");
        Stagehand.ui(() -> eyes.button("add an ingredient").fire());
        Stagehand.pulse();
        scroll(window, 0);
        Stagehand.ui(() -> eyes.button("Put it on the shelf").fire());
        shoot(window, "shelf-ingredient");
        Stagehand.ui(() -> window.closeShelf());
        for (String panel : List.of("for moulds", "to 220 g", "none made yet"))
            Stagehand.ui(() -> eyes.button(panel).fire());
        shoot(window, "panels");
        Stagehand.ui(window::openKeys);
        shoot(window, "keys");
        close(window);
    }

    /** A brief that no recipe meets, a field that is wrong, the composition open. */
    private void trouble() throws IOException {
        Path file = Files.createTempDirectory("briefs").resolve("window.brief.toml");
        BriefWriter.write(
                file,
                BriefReader.readShipped("clear-window"),
                List.of(),
                TissueSpectra.of(null),
                SafeFile.Overwrite.NEVER);
        Window window = open(Optional.of(file));
        Stagehand.ui(() -> {
            var field = window.brief().wantedField(760, Point.Quantity.MUA);
            field.requestFocus();
            field.setText("0.1x");
            field.fireEvent(new javafx.event.ActionEvent());
            window.brief().openTissue();
            window.drop(List.of(file.resolveSibling("holiday.mp3").toFile()));
        });
        shoot(window, "misses");
        close(window);
    }

    /** A shelf with nothing on it, and one that cannot be read. */
    private void noShelf() throws IOException {
        Path empty = Files.createTempDirectory("empty-shelf");
        Window window = Stagehand.openOn(Files.createTempDirectory("memory"), size.w(), size.h(), empty);
        Stagehand.ui(() -> window.look().scaleProperty().set(size.letters()));
        Stagehand.until(
                "words", () -> window.desk().shelfProperty().get().problem().isPresent());
        shoot(window, "shelf-empty");
        Files.writeString(empty.resolve("ink.toml"), "format = 1\nid = \"ink\nname = 3\n");
        Files.writeString(empty.resolve("dye.toml"), "format = 1\nid = \"dye\"\nnmae = \"Dye\"\n");
        Stagehand.ui(() -> window.desk().readShelfAgain());
        Stagehand.until(
                "words", () -> !window.desk().shelfProperty().get().refused().isEmpty());
        shoot(window, "shelf-broken");
        close(window);
    }

    /** Moves every scrolled place to a share of its way. */
    private static void scroll(Window window, double to) {
        Stagehand.pulse();
        for (Node n : new Eyes(window).all(n -> n instanceof ScrollPane))
            Stagehand.ui(() -> ((ScrollPane) n).setVvalue(to));
    }

    private void balance(Window window, AtBalance at, String what) throws IOException {
        Stagehand.until("an outlook", () -> at.outlookProperty().get() != null);
        shoot(window, "balance-" + what);
    }

    /** Copies a strip of the scene: a whole one of 4K would not fit into the window's memory twice. */
    private static void strip(Scene scene, int from, BufferedImage picture) {
        int w = picture.getWidth();
        int h = Math.min(STRIP, picture.getHeight() - from);
        SnapshotParameters part = new SnapshotParameters();
        part.setViewport(new Rectangle2D(0, from, w, h));
        int[] pixels = new int[w * h];
        scene.getRoot()
                .snapshot(part, new WritableImage(w, h))
                .getPixelReader()
                .getPixels(0, 0, w, h, PixelFormat.getIntArgbInstance(), pixels, 0, w);
        picture.setRGB(0, from, w, h, pixels, 0, w);
    }

    private void shoot(Window window, String name) throws IOException {
        for (Palette p : new Palette[] {Palette.LIGHT, Palette.DARK}) {
            Stagehand.ui(() -> window.look().paletteProperty().set(p));
            Stagehand.pulse();
            BufferedImage picture = new BufferedImage((int) size.w(), (int) size.h(), BufferedImage.TYPE_INT_RGB);
            for (int y = 0; y < size.h(); y += STRIP) {
                int from = y;
                Stagehand.ui(() -> strip(window.stage().getScene(), from, picture));
            }
            String file = name + "-" + size.name() + (p.dark() ? "-dark" : "-light") + ".png";
            ImageIO.write(picture, "png", out.resolve(file).toFile());
        }
        Stagehand.ui(() -> window.look().paletteProperty().set(Palette.LIGHT));
    }
}
