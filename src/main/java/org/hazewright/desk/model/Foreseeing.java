package org.hazewright.desk.model;

import java.util.Optional;
import javafx.beans.property.BooleanProperty;
import javafx.beans.property.ReadOnlyObjectProperty;
import javafx.beans.property.ReadOnlyObjectWrapper;
import javafx.beans.property.SimpleBooleanProperty;
import org.hazewright.bench.Outlook;
import org.hazewright.optics.Refusal;

/** Keeps {@link Foreseen} up with the recipe while its place is open. */
public final class Foreseeing {
    /** While a recipe follows a drag the readings follow more slowly: they are pictures, and the processor has more urgent work. */
    private static final long BETWEEN_MS = 150;

    private final Desk desk;
    private final Work.Lane lane;
    private final BooleanProperty open = new SimpleBooleanProperty(false);
    private final ReadOnlyObjectWrapper<Foreseen> foreseen = new ReadOnlyObjectWrapper<>();
    private final ReadOnlyObjectWrapper<String> trouble = new ReadOnlyObjectWrapper<>("");
    private Foreseen.Asked asked;

    Foreseeing(Desk desk) {
        this.desk = desk;
        lane = desk.work().lane(Work.Haste.FINISH);
        Remembered r = desk.remembered();
        asked = new Foreseen.Asked(
                clamped(r.number("readings.nm", 830), 200, 3000),
                clamped(r.number("readings.mm", 30), 0.5, 200),
                clamped(r.number("readings.slab", 20), 0.1, 1000));
        desk.solving().shownProperty().addListener((p, before, now) -> look());
        open.addListener((p, was, is) -> look());
    }

    private static double clamped(double v, double low, double high) {
        return Math.max(low, Math.min(high, v));
    }

    /** Whether someone is looking; nothing is computed otherwise. */
    public BooleanProperty openProperty() {
        return open;
    }

    /** Null before the first. */
    public ReadOnlyObjectProperty<Foreseen> foreseenProperty() {
        return foreseen.getReadOnlyProperty();
    }

    public ReadOnlyObjectProperty<String> troubleProperty() {
        return trouble.getReadOnlyProperty();
    }

    public Foreseen.Asked asked() {
        return asked;
    }

    public Optional<String> nm(String text) {
        return ask(() -> new Foreseen.Asked(Typed.number(text, "nm"), asked.distanceMm(), asked.thicknessMm()));
    }

    public Optional<String> distance(String text) {
        return ask(() -> new Foreseen.Asked(asked.nm(), Typed.number(text, "mm"), asked.thicknessMm()));
    }

    public Optional<String> thickness(String text) {
        return ask(() -> new Foreseen.Asked(asked.nm(), asked.distanceMm(), Typed.number(text, "mm")));
    }

    private Optional<String> ask(java.util.function.Supplier<Foreseen.Asked> making) {
        try {
            asked = making.get();
            desk.remembered().keep("readings.nm", Double.toString(asked.nm()));
            desk.remembered().keep("readings.mm", Double.toString(asked.distanceMm()));
            desk.remembered().keep("readings.slab", Double.toString(asked.thicknessMm()));
            look();
            return Optional.empty();
        } catch (Refusal refusal) {
            return Optional.of(refusal.getMessage());
        }
    }

    private void look() {
        Shown shown = desk.solving().shownProperty().get();
        if (!open.get() || shown == null) return;
        Outlook o = shown.outlook();
        Foreseen.Asked what = asked;
        lane.requestAfter(
                shown.following() ? BETWEEN_MS : 0,
                (stop, progress) -> Foreseen.of(o, what, desk.spectra(), stop),
                found -> {
                    foreseen.set(found);
                    trouble.set("");
                },
                failure -> trouble.set(Papers.words(failure)));
    }
}
