package org.hazewright.desk.model;

import java.time.LocalDate;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.Set;
import java.util.TreeSet;
import java.util.stream.DoubleStream;
import javafx.beans.property.ReadOnlyObjectProperty;
import javafx.beans.property.ReadOnlyObjectWrapper;
import javafx.beans.property.SimpleStringProperty;
import javafx.beans.property.StringProperty;
import org.hazewright.mixture.MassSpecific;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Inspection;
import org.hazewright.shelf.Part;
import org.hazewright.shelf.Shelf;

/** The shelf as it is looked through: found by name, compared by spectrum, and checked. */
public final class ShelfRoom {
    /** Host index that particles are compared in: that of water at 589 nm. */
    private static final double HOST = 1.333;

    private static final double STEP_NM = 5;

    /** One ingredient's mass-specific coefficients over wavelength, cm²/g; shorter where its figures end. */
    public record Line(Ingredient ingredient, double[] nm, double[] kappaA, double[] kappaMusp) {}

    private final Desk desk;
    private final Work.Lane computing;
    private final Work.Lane checking;
    private final StringProperty find = new SimpleStringProperty("");
    private final ReadOnlyObjectWrapper<Set<String>> compared = new ReadOnlyObjectWrapper<>(Set.of());
    private final ReadOnlyObjectWrapper<Optional<Ingredient>> chosen = new ReadOnlyObjectWrapper<>(Optional.empty());
    private final ReadOnlyObjectWrapper<List<Line>> lines = new ReadOnlyObjectWrapper<>(List.of());
    private final ReadOnlyObjectWrapper<Optional<List<Inspection.Doubt>>> doubts =
            new ReadOnlyObjectWrapper<>(Optional.empty());

    ShelfRoom(Desk desk) {
        this.desk = desk;
        computing = desk.work().lane(Work.Haste.INTERRUPT);
        checking = desk.work().lane(Work.Haste.INTERRUPT);
        desk.shelfProperty().addListener((p, before, now) -> {
            doubts.set(Optional.empty());
            chosen.set(chosen.get().flatMap(i -> now.shelf().flatMap(s -> s.find(i.id()))));
            compute();
        });
    }

    /** The shelf that is looked through. */
    public ReadOnlyObjectProperty<ShelfState> shelfProperty() {
        return desk.shelfProperty();
    }

    public StringProperty findProperty() {
        return find;
    }

    /** Ids of the ingredients whose spectra are drawn. */
    public ReadOnlyObjectProperty<Set<String>> comparedProperty() {
        return compared.getReadOnlyProperty();
    }

    public ReadOnlyObjectProperty<Optional<Ingredient>> chosenProperty() {
        return chosen.getReadOnlyProperty();
    }

    public ReadOnlyObjectProperty<List<Line>> linesProperty() {
        return lines.getReadOnlyProperty();
    }

    /** What a check found; empty before the first. */
    public ReadOnlyObjectProperty<Optional<List<Inspection.Doubt>>> doubtsProperty() {
        return doubts.getReadOnlyProperty();
    }

    /** Ingredients of a part whose name or id holds what is sought, favourites first. */
    public List<Ingredient> found(Part part) {
        String sought = find.get().strip().toLowerCase(Locale.ROOT);
        List<String> favourites = desk.remembered().favourites();
        return desk.shelfProperty().get().shelf().stream()
                .flatMap(s -> s.ingredients().stream())
                .filter(i -> i.part() == part)
                .filter(i -> (i.name() + " " + i.id()).toLowerCase(Locale.ROOT).contains(sought))
                .sorted(Comparator.comparing((Ingredient i) -> !favourites.contains(i.id()))
                        .thenComparing(Words::shortName))
                .toList();
    }

    public void choose(Ingredient i) {
        chosen.set(Optional.of(i));
    }

    /** Draws an ingredient's spectrum with the others, or takes it out. */
    public void compare(String id, boolean yes) {
        Set<String> ids = new TreeSet<>(compared.get());
        if (yes) ids.add(id);
        else ids.remove(id);
        compared.set(ids);
        compute();
    }

    private void compute() {
        Optional<Shelf> shelf = desk.shelfProperty().get().shelf();
        if (shelf.isEmpty()) {
            lines.set(List.of());
            return;
        }
        List<Ingredient> wanted = compared.get().stream()
                .flatMap(id -> shelf.get().find(id).stream())
                .filter(i -> !i.isBlend())
                .toList();
        computing.request(
                (stop, progress) -> {
                    List<Line> all = new ArrayList<>();
                    for (Ingredient i : wanted) {
                        if (stop.getAsBoolean()) break;
                        all.add(line(i));
                    }
                    return all;
                },
                lines::set,
                failure -> desk.notices().tell(Notice.wrong("shelf", Papers.words(failure))));
    }

    private static Line line(Ingredient i) {
        double[] nm = DoubleStream.iterate(Curves.FROM_NM, x -> x <= Curves.TO_NM, x -> x + STEP_NM)
                .filter(x -> reaches(i, x))
                .toArray();
        double[] a = new double[nm.length];
        double[] s = new double[nm.length];
        for (int k = 0; k < nm.length; k++) {
            MassSpecific m = MassSpecific.of(i, nm[k], 22, HOST, 0);
            a[k] = m.kappaA();
            s[k] = m.kappaMusp();
        }
        return new Line(i, nm, a, s);
    }

    private static boolean reaches(Ingredient i, double nm) {
        try {
            MassSpecific.requireFigures(i, nm, 22);
            return true;
        } catch (Refusal outside) {
            return false;
        }
    }

    /** Looks for figures that are allowed and still look wrong. */
    public void check() {
        Optional<Shelf> shelf = desk.shelfProperty().get().shelf();
        if (shelf.isEmpty()) return;
        checking.request(
                (stop, progress) -> Inspection.of(shelf.get(), LocalDate.now()),
                found -> doubts.set(Optional.of(found)),
                failure -> desk.notices().tell(Notice.wrong("shelf", Papers.words(failure))));
    }

    public boolean favourite(String id) {
        return desk.remembered().favourites().contains(id);
    }

    public void favourite(String id, boolean is) {
        desk.remembered().favourite(id, is);
    }

    /** Grams in hand as they were typed; empty when nobody said. */
    public String inHand(String id) {
        Double g = desk.remembered().inHandG().get(id);
        return g == null ? "" : org.hazewright.optics.Figures.plain(g);
    }

    public Optional<String> inHand(String id, String text) {
        try {
            Optional<Double> grams = text.isBlank() ? Optional.empty() : Optional.of(Typed.number(text, "g"));
            if (grams.isPresent() && grams.get() < 0) throw new Refusal("Grams in hand are 0 or more.");
            desk.remembered().inHandG(id, grams);
            return Optional.empty();
        } catch (Refusal refusal) {
            return Optional.of(refusal.getMessage());
        }
    }
}
