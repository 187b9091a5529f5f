package org.hazewright.desk;

import java.nio.file.Path;
import java.util.Optional;
import java.util.OptionalInt;
import java.util.function.Consumer;
import javafx.application.Application;
import javafx.application.Platform;
import javafx.stage.Stage;
import org.hazewright.desk.look.Look;
import org.hazewright.desk.model.Desk;
import org.hazewright.desk.model.Remembered;
import org.hazewright.desk.model.Work;
import org.hazewright.optics.Refusal;

/** Opens the window and comes back when it is closed. */
public final class Opening {
    /** The desk waits here for the toolkit: both begin at once, and the search runs while the toolkit starts. */
    private static Desk desk;

    private static final String NO_DISPLAY =
            "There is no display to open the window on. Start it on a desktop, or work with the commands: hazewright --help lists them.";

    private static Work work;
    private static Waiting ui;
    private static Consumer<Window> watcher = window -> {};

    private Opening() {}

    /** Works from the shelf of a folder, or with nothing from that of the program; begins with a file, or the demo. Gives the exit status. */
    public static int open(Optional<Path> shelfFolder, Optional<Path> first) {
        Remembered remembered = Remembered.in(Remembered.usualFolder(), Remembered.usualWorkFolder());
        double windowPx = remembered.number("window.width", 0) * remembered.number("window.height", 0);
        OptionalInt elsewhere = OwnMachine.run(shelfFolder, first, windowPx);
        if (elsewhere.isPresent()) return elsewhere.getAsInt();
        try {
            open(shelfFolder, first, remembered);
        } catch (UnsupportedOperationException none) {
            throw new Refusal(NO_DISPLAY);
        }
        return 0;
    }

    static void open(Optional<Path> shelfFolder, Optional<Path> first, Remembered remembered) {
        ui = new Waiting();
        work = Work.threaded(ui);
        desk = new Desk(work, shelfFolder.or(() -> kept(remembered)), remembered);
        desk.begin(first);
        Application.launch(Program.class);
    }

    /** The shelf that a person made their own. */
    private static Optional<Path> kept(Remembered remembered) {
        String folder = remembered.text("shelf", "");
        return folder.isEmpty()
                ? Optional.empty()
                : Optional.of(Path.of(folder)).filter(java.nio.file.Files::isDirectory);
    }

    /** Shows the window to someone when it opens: for measuring. */
    static void watch(Consumer<Window> who) {
        watcher = who;
    }

    /** The interface thread, which is not there yet at first: what comes early waits for it. */
    private static final class Waiting implements java.util.concurrent.Executor {
        private final java.util.List<Runnable> early = new java.util.ArrayList<>();
        private boolean there;

        @Override
        public void execute(Runnable run) {
            synchronized (this) {
                if (!there) {
                    early.add(run);
                    return;
                }
            }
            Platform.runLater(run);
        }

        /** Called on the interface thread. */
        void begin() {
            java.util.List<Runnable> waiting;
            synchronized (this) {
                there = true;
                waiting = java.util.List.copyOf(early);
                early.clear();
            }
            waiting.forEach(Runnable::run);
        }
    }

    /** The toolkit's side of the program. */
    public static final class Program extends Application {
        @Override
        public void start(Stage stage) {
            Window window = new Window(stage, desk, new Look(), Optional.empty());
            window.opensOutside(
                    path -> getHostServices().showDocument(path.toUri().toString()));
            ui.begin();
            window.show();
            watcher.accept(window);
        }

        @Override
        public void stop() {
            work.close();
        }
    }
}
