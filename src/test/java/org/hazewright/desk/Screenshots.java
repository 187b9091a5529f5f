package org.hazewright.desk;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import javafx.application.Platform;
import javafx.scene.image.WritableImage;
import org.hazewright.brief.Point;
import org.hazewright.desk.look.Palette;
import org.hazewright.desk.model.AtBalance;
import org.hazewright.desk.model.MadeBatch;
import org.hazewright.files.BriefReader;
import org.hazewright.files.BriefWriter;
import org.hazewright.files.SafeFile;
import org.hazewright.files.TissueSpectra;

/** Makes pictures of every view at two sizes in both themes: see DEVELOPERS.md for the command. */
public final class Screenshots {
    private final Path out;

    private Screenshots(Path out) {
        this.out = out;
    }

    public static void main(String[] args) throws IOException {
        Path out = Path.of(args.length > 0 ? args[0] : "target/screenshots");
        Files.createDirectories(out);
        Screenshots s = new Screenshots(out);
        double[][] sizes = args.length > 1 && args[1].equals("4k")
                ? new double[][] {{3840, 2160}}
                : new double[][] {{1280, 720}, {1920, 1080}};
        try {
            for (double[] size : sizes) s.size(size[0], size[1]);
        } finally {
            Platform.exit();
        }
    }

    private void size(double w, double h) throws IOException {
        Path memory = Files.createTempDirectory("memory");
        Window window = Stagehand.open(memory, w, h, Optional.empty(), Optional.empty());
        Stagehand.untilSettled(window);
        Stagehand.until(
                "readings", () -> window.desk().foreseeing().foreseenProperty().get() != null);
        for (Palette p : new Palette[] {Palette.LIGHT, Palette.DARK}) {
            Stagehand.ui(() -> window.look().paletteProperty().set(p));
            shoot(window, "desk", p, w);
        }
        Stagehand.ui(() -> {
            var room = window.desk().shelfRoom();
            for (String id :
                    List.of("ink-demo", "dye-blue-demo", "lipid-emulsion-20", "water", "microspheres-polystyrene-1000"))
                room.compare(id, true);
            room.choose(
                    window.desk().shelfProperty().get().shelf().orElseThrow().require("lipid-emulsion-20"));
            window.openShelf();
        });
        Stagehand.until(
                "spectra", () -> window.desk().shelfRoom().linesProperty().get().size() == 5);
        for (Palette p : new Palette[] {Palette.LIGHT, Palette.DARK}) {
            Stagehand.ui(() -> window.look().paletteProperty().set(p));
            shoot(window, "shelf", p, w);
        }
        Stagehand.ui(window::closeShelf);
        Stagehand.ui(() -> window.desk().standAtBalance());
        Stagehand.until(
                "the balance", () -> window.desk().weighingProperty().get().isPresent());
        AtBalance at =
                Stagehand.onUi(() -> window.desk().weighingProperty().get().orElseThrow());
        balance(window, w, at, "task");
        Stagehand.ui(() -> {
            while (!at.nowProperty().get().line().name().startsWith("Lipid")) {
                AtBalance.Line line = at.nowProperty().get().line();
                at.enter(line.weighs() ? Double.toString(at.loadWantedG() * 1.004) + " g" : "");
            }
        });
        Stagehand.ui(() -> window.balance().field().setText("15.502 g"));
        Stagehand.until(
                "an outlook",
                () -> at.outlookProperty().get() != null
                        && at.bandProperty().get().isPresent());
        balance(window, w, at, "weigh");
        Stagehand.ui(() -> {
            while (!at.nowProperty().get().over()) {
                AtBalance.Line line = at.nowProperty().get().line();
                at.enter(line.weighs() ? Double.toString(at.loadWantedG()) + " g" : "");
            }
        });
        balance(window, w, at, "over");
        Stagehand.ui(() -> window.desk().finishWeighing());
        Stagehand.until("the batch", () -> window.desk().madeProperty().get().isPresent());
        MadeBatch made = Stagehand.onUi(() -> window.desk().madeProperty().get().orElseThrow());
        Stagehand.until("a look", () -> made.seenProperty().get() != null);
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
        for (Palette p : new Palette[] {Palette.LIGHT, Palette.DARK}) {
            Stagehand.ui(() -> window.look().paletteProperty().set(p));
            shoot(window, "batch", p, w);
        }
        Stagehand.ui(() -> {
            window.desk().leaveBatch();
            window.openLogbook();
        });
        Stagehand.until(
                "the logbook",
                () -> window.desk().logbookRoom().pagesProperty().get().isPresent());
        for (Palette p : new Palette[] {Palette.LIGHT, Palette.DARK}) {
            Stagehand.ui(() -> window.look().paletteProperty().set(p));
            shoot(window, "logbook", p, w);
        }
        Stagehand.ui(() -> window.stage().close());
        trouble(w, h);
    }

    /** A brief that no recipe meets, a field that is wrong, a panel that is open. */
    private void trouble(double w, double h) throws IOException {
        Path memory = Files.createTempDirectory("memory");
        Path file = memory.resolve("window.brief.toml");
        BriefWriter.write(
                file,
                BriefReader.readShipped("clear-window"),
                List.of(),
                TissueSpectra.of(null),
                SafeFile.Overwrite.NEVER);
        Window window = Stagehand.open(memory, w, h, Optional.of(file), Optional.empty());
        Stagehand.untilSettled(window);
        Stagehand.ui(() -> {
            var field = window.brief().wantedField(760, Point.Quantity.MUA);
            field.requestFocus();
            field.setText("0.1x");
            field.fireEvent(new javafx.event.ActionEvent());
            window.brief().openTissue();
        });
        for (Palette p : new Palette[] {Palette.LIGHT, Palette.DARK}) {
            Stagehand.ui(() -> window.look().paletteProperty().set(p));
            shoot(window, "misses", p, w);
        }
        Stagehand.ui(() -> window.stage().close());
    }

    private void balance(Window window, double w, AtBalance at, String what) throws IOException {
        Stagehand.until("an outlook", () -> at.outlookProperty().get() != null);
        for (Palette p : new Palette[] {Palette.LIGHT, Palette.DARK}) {
            Stagehand.ui(() -> window.look().paletteProperty().set(p));
            shoot(window, "balance-" + what, p, w);
        }
    }

    private void shoot(Window window, String name, Palette p, double w) throws IOException {
        Stagehand.pulse();
        byte[] png = Stagehand.onUi(() -> {
            WritableImage image = window.stage().getScene().snapshot(null);
            return Pictures.bytes(image);
        });
        Files.write(out.resolve(name + "-" + (int) w + (p.dark() ? "-dark" : "-light") + ".png"), png);
    }
}
