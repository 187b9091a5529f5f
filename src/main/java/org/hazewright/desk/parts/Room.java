package org.hazewright.desk.parts;

import java.util.Locale;
import javafx.scene.control.ScrollPane;
import javafx.scene.layout.Region;

/** Room for places side by side: fills the window, and scrolls where letters have outgrown it. */
public final class Room extends ScrollPane {

    /** The least size of what is inside is given in letters, so that it grows with them. */
    public Room(Region inside, double leastWideEm, double leastHighEm) {
        super(inside);
        inside.setStyle(
                String.format(Locale.ROOT, "-fx-min-width: %.1fem; -fx-min-height: %.1fem;", leastWideEm, leastHighEm));
        setFitToWidth(true);
        setFitToHeight(true);
        setFocusTraversable(false);
    }
}
