package org.hazewright.desk.look;

import java.util.Locale;
import javafx.beans.binding.Bindings;
import javafx.beans.property.DoubleProperty;
import javafx.beans.property.ObjectProperty;
import javafx.beans.property.ReadOnlyDoubleProperty;
import javafx.beans.property.ReadOnlyDoubleWrapper;
import javafx.beans.property.SimpleDoubleProperty;
import javafx.beans.property.SimpleObjectProperty;
import javafx.scene.Parent;
import javafx.scene.Scene;
import javafx.scene.layout.Region;

/**
 * The look that a scene follows: its palette and the size of its letters, from which every other size is taken.
 *
 * <p>Letters grow with the window, from 12.5 px at 1280 × 720 to 26 px at 3840 × 2160, times what the person chose.
 */
public final class Look {
    private static final double LETTER_PX = 13;
    private static final double LEAST_PX = 12.5;
    private static final double MOST_PX = 40;

    private final ObjectProperty<Palette> palette = new SimpleObjectProperty<>(Palette.LIGHT);
    private final DoubleProperty scale = new SimpleDoubleProperty(1);
    private final ReadOnlyDoubleWrapper em = new ReadOnlyDoubleWrapper(LETTER_PX);

    public ObjectProperty<Palette> paletteProperty() {
        return palette;
    }

    public Palette palette() {
        return palette.get();
    }

    /** What the person chose, 0.8 to 2. */
    public DoubleProperty scaleProperty() {
        return scale;
    }

    /** The size of plain letters, px. */
    public ReadOnlyDoubleProperty emProperty() {
        return em.getReadOnlyProperty();
    }

    public double em() {
        return em.get();
    }

    public void larger(boolean yes) {
        double next = scale.get() * (yes ? 1.1 : 1 / 1.1);
        scale.set(Math.max(0.8, Math.min(2, Math.rint(next * 100) / 100)));
    }

    /** Gives a view the largest letters, up to those of the window, at which it is so many of them wide and high. */
    public void fit(Region view, double wideEm, double highEm) {
        view.styleProperty()
                .bind(Bindings.createStringBinding(
                        () -> {
                            double room = Math.min(view.getWidth() / wideEm, view.getHeight() / highEm);
                            double px = room > 0 ? Math.min(em.get(), room) : em.get();
                            return String.format(Locale.ROOT, "-fx-font-size:%.1fpx;", Math.floor(2 * px) / 2);
                        },
                        view.widthProperty(),
                        view.heightProperty(),
                        em));
    }

    /** Dresses a scene and keeps it dressed. */
    public void dress(Scene scene) {
        scene.getStylesheets().add(Look.class.getResource("desk.css").toExternalForm());
        em.bind(Bindings.createDoubleBinding(
                () -> {
                    double room = Math.min(scene.getWidth() / 1440, scene.getHeight() / 880);
                    double px = LETTER_PX * Math.max(LEAST_PX / LETTER_PX, room) * scale.get();
                    return Math.rint(2 * Math.min(MOST_PX, px)) / 2;
                },
                scene.widthProperty(),
                scene.heightProperty(),
                scale));
        Parent root = scene.getRoot();
        Runnable wear = () -> {
            root.setStyle(palette.get().css() + String.format(Locale.ROOT, "-fx-font-size:%.1fpx;", em.get()));
            scene.setFill(javafx.scene.paint.Color.web(palette.get().milk()));
        };
        palette.addListener((p, before, now) -> wear.run());
        em.addListener((p, before, now) -> wear.run());
        wear.run();
    }
}
