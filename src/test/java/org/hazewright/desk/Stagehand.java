package org.hazewright.desk;

import java.nio.file.Path;
import java.util.Optional;
import java.util.concurrent.Callable;
import java.util.concurrent.CountDownLatch;
import java.util.concurrent.FutureTask;
import java.util.concurrent.TimeUnit;
import java.util.function.BooleanSupplier;
import javafx.application.Platform;
import javafx.stage.Stage;
import org.hazewright.desk.look.Look;
import org.hazewright.desk.model.Desk;
import org.hazewright.desk.model.Remembered;
import org.hazewright.desk.model.Work;
import org.hazewright.desk.parts.Chooser;

/** Opens real windows for tests and pictures, and waits for what happens in them. */
final class Stagehand {
    private static boolean started;

    private Stagehand() {}

    static synchronized void startToolkit() {
        if (started) return;
        if (System.getProperty("headless.geometry") == null) System.setProperty("headless.geometry", "3840x2160-32");
        CountDownLatch up = new CountDownLatch(1);
        Platform.startup(up::countDown);
        try {
            if (!up.await(30, TimeUnit.SECONDS)) throw new IllegalStateException("The toolkit did not start.");
        } catch (InterruptedException e) {
            throw new IllegalStateException(e);
        }
        Platform.setImplicitExit(false);
        started = true;
    }

    /** Runs on the interface thread and gives what it gives. */
    static <T> T onUi(Callable<T> run) {
        FutureTask<T> task = new FutureTask<>(run);
        if (Platform.isFxApplicationThread()) task.run();
        else Platform.runLater(task);
        try {
            return task.get(120, TimeUnit.SECONDS);
        } catch (Exception e) {
            throw new IllegalStateException(e);
        }
    }

    static void ui(Runnable run) {
        onUi(() -> {
            run.run();
            return null;
        });
    }

    /** Waits until something holds on the interface thread. */
    static void until(String what, BooleanSupplier holds) {
        long end = System.nanoTime() + TimeUnit.SECONDS.toNanos(180);
        while (!onUi(holds::getAsBoolean)) {
            if (System.nanoTime() > end) throw new IllegalStateException("It did not come to this: " + what);
            try {
                Thread.sleep(10);
            } catch (InterruptedException e) {
                throw new IllegalStateException(e);
            }
        }
    }

    /** A window of so many px on the shelf of the program, with a memory of its own. */
    static Window open(Path memory, double w, double h, Optional<Path> file, Optional<Chooser> chooser) {
        return open(memory, w, h, Optional.empty(), file, chooser);
    }

    /** The same on the shelf of a folder, with nothing to choose files with. */
    static Window openOn(Path memory, double w, double h, Path shelf) {
        return open(memory, w, h, Optional.of(shelf), Optional.empty(), Optional.of(new PlannedChooser()));
    }

    private static Window open(
            Path memory, double w, double h, Optional<Path> shelf, Optional<Path> file, Optional<Chooser> chooser) {
        startToolkit();
        return onUi(() -> {
            Desk desk =
                    new Desk(Work.threaded(Platform::runLater), shelf, Remembered.in(memory, memory.resolve("work")));
            Window window = new Window(new Stage(), desk, new Look(), chooser);
            window.stage().setWidth(w);
            window.stage().setHeight(h);
            desk.begin(file);
            window.show();
            return window;
        });
    }

    /** Waits until the recipe, its curves and the other ways are there. */
    static void untilSettled(Window window) {
        until("a settled recipe", () -> {
            var s = window.desk().solving();
            boolean has =
                    s.shownProperty().get() != null || s.problemProperty().get().isPresent();
            return has
                    && !s.searchingProperty().get()
                    && !s.lookingForWaysProperty().get()
                    && (s.curvesProperty().get() != null
                            || s.problemProperty().get().isPresent())
                    && (s.shownProperty().get() == null
                            || !s.shownProperty().get().following());
        });
        pulse();
    }

    /** Lets the window be laid out and drawn. */
    static void pulse() {
        for (int k = 0; k < 3; k++) {
            CountDownLatch drawn = new CountDownLatch(1);
            Platform.runLater(() -> {
                Platform.requestNextPulse();
                Platform.runLater(drawn::countDown);
            });
            try {
                drawn.await(5, TimeUnit.SECONDS);
                Thread.sleep(40);
            } catch (InterruptedException e) {
                throw new IllegalStateException(e);
            }
        }
    }
}
