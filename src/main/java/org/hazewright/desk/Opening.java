package org.hazewright.desk;

import java.nio.file.Path;
import java.util.Optional;
import javafx.application.Application;
import javafx.application.Platform;
import javafx.stage.Stage;
import org.hazewright.desk.look.Look;
import org.hazewright.desk.model.Desk;
import org.hazewright.desk.model.Remembered;
import org.hazewright.desk.model.Work;

/** Opens the window and comes back when it is closed. */
public final class Opening {
    private static Optional<Path> shelf = Optional.empty();
    private static Optional<Path> file = Optional.empty();

    private Opening() {}

    /** Works from the shelf of a folder, or with nothing from that of the program; begins with a file, or the demo. */
    public static void open(Optional<Path> shelfFolder, Optional<Path> first) {
        shelf = shelfFolder;
        file = first;
        Application.launch(Program.class);
    }

    /** The toolkit's side of the program. */
    public static final class Program extends Application {
        private Work work;

        @Override
        public void start(Stage stage) {
            work = Work.threaded(Platform::runLater);
            Desk desk = new Desk(work, shelf, Remembered.in(Remembered.usualFolder(), Remembered.usualWorkFolder()));
            desk.begin(file);
            new Window(stage, desk, new Look(), Optional.empty()).show();
        }

        @Override
        public void stop() {
            work.close();
        }
    }
}
