package org.hazewright.desk.model;

import java.nio.file.Path;
import java.time.LocalDate;
import java.time.format.DateTimeParseException;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import java.util.TreeSet;
import java.util.function.Supplier;
import java.util.stream.DoubleStream;
import javafx.beans.property.ReadOnlyObjectProperty;
import javafx.beans.property.ReadOnlyObjectWrapper;
import javafx.beans.property.SimpleStringProperty;
import javafx.beans.property.StringProperty;
import org.hazewright.files.IngredientWriter;
import org.hazewright.files.LotWriter;
import org.hazewright.learning.NewLot;
import org.hazewright.mixture.MassSpecific;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Form;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Inspection;
import org.hazewright.shelf.Lot;
import org.hazewright.shelf.Part;
import org.hazewright.shelf.Shelf;
import org.hazewright.shelf.Source;
import org.hazewright.shelf.Uncertainty;

/** The shelf as it is looked through: found by name, compared by spectrum, checked, and added to. */
public final class ShelfRoom {
    /** Host index that particles are compared in: that of water at 589 nm. */
    private static final double HOST = 1.333;

    private static final double STEP_NM = 5;

    /** One ingredient's mass-specific coefficients over wavelength, cm²/g; shorter where its figures end. */
    public record Line(Ingredient ingredient, double[] nm, double[] kappaA, double[] kappaMusp) {}

    private final Desk desk;
    private final Work.Lane computing;
    private final Work.Lane checking;
    private final Work.Lane writing;
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
        writing = desk.work().lane(Work.Haste.FINISH);
        desk.shelfProperty().addListener((p, before, now) -> {
            doubts.set(Optional.empty());
            chosen.set(chosen.get().flatMap(i -> now.shelf().flatMap(s -> s.find(i.id()))));
            compute();
        });
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

    /** Whether files can be added: the shelf of the program is not written into. */
    public boolean own() {
        return desk.shelfProperty().get().folder().isPresent();
    }

    /** Copies the shelf of the program to a folder and works from there. */
    public void makeOwn(Path folder) {
        writing.request(
                (stop, progress) -> {
                    IngredientWriter.copyShippedTo(folder);
                    return folder;
                },
                made -> {
                    desk.remembered().keep("shelf", made.toString());
                    desk.useShelf(Optional.of(made));
                    desk.notices().tell(Notice.told("shelf", "This is now your own shelf: " + made + "."));
                },
                failure -> desk.notices().tell(Notice.wrong("shelf", Papers.words(failure))));
    }

    /** What is typed into the form of a new ingredient. */
    public record Entry(
            String id,
            String name,
            Part part,
            Set<org.hazewright.shelf.Family> families,
            Form form,
            String density,
            String price,
            Source.Basis basis,
            String citation,
            String uAbsorption,
            String uScattering,
            Optional<Path> table,
            IngredientWriter.Basis tableBasis,
            String albedo,
            String musp,
            String atNm,
            String exponent) {}

    /** Adds an ingredient to the shelf; what is wrong with the form, in words. */
    public Optional<String> add(Entry f) {
        try {
            IngredientWriter.Plain plain = plain(f);
            write(
                    () -> IngredientWriter.write(
                            desk.shelfProperty().get().folder().orElseThrow(), plain),
                    plain.id());
            return Optional.empty();
        } catch (Refusal refusal) {
            return Optional.of(refusal.getMessage());
        }
    }

    private static IngredientWriter.Plain plain(Entry f) {
        if (f.name().isBlank()) throw new Refusal("Give the ingredient a name.");
        Optional<IngredientWriter.Table> table = f.table().map(path -> {
            double[][] columns = IngredientWriter.twoColumns(path);
            double albedo = f.albedo().isBlank() ? 0 : share("the share that is scattering", f.albedo());
            return new IngredientWriter.Table(f.tableBasis(), columns[0], columns[1], albedo, 0.8);
        });
        Optional<IngredientWriter.PowerLaw> law = f.musp().isBlank()
                ? Optional.empty()
                : Optional.of(new IngredientWriter.PowerLaw(
                        number("µs′", f.musp()), number("at nm", f.atNm()), number("exponent", f.exponent()), 0.8));
        return new IngredientWriter.Plain(
                f.id().strip(),
                f.name().strip(),
                f.part(),
                f.families(),
                f.form(),
                number("density", f.density()),
                f.price().isBlank() ? OptionalDouble.empty() : OptionalDouble.of(number("price", f.price())),
                new Source(f.basis(), f.citation()),
                new Uncertainty(
                        share("uncertainty of absorption", f.uAbsorption()),
                        share("uncertainty of scattering", f.uScattering())),
                table,
                law);
    }

    private static double number(String what, String text) {
        try {
            return Typed.number(text);
        } catch (Refusal refusal) {
            throw new Refusal(Words.capital(what) + ": " + refusal.getMessage());
        }
    }

    private static double share(String what, String text) {
        try {
            return text.isBlank() ? 0 : Typed.percent(text);
        } catch (Refusal refusal) {
            throw new Refusal(Words.capital(what) + ": " + refusal.getMessage());
        }
    }

    /** Adds a lot of an ingredient with its own dates and uncertainties; its figures begin as its ingredient's. */
    public Optional<String> addLot(
            Ingredient parent, String number, String received, String expires, String uAbsorption, String uScattering) {
        try {
            if (number.isBlank()) throw new Refusal("Give the lot its number, as it stands on the bottle.");
            if (!LotWriter.canBeLot(parent)) throw new Refusal("Bases and blends have no lots here.");
            Lot lot = new Lot(parent.kind(), number.strip(), day(received), Optional.empty(), day(expires));
            Source source = new Source(Source.Basis.MEMORY, "Figures as of " + parent.id() + "; not measured yet.");
            Uncertainty u = new Uncertainty(
                    uAbsorption.isBlank() ? parent.uncertainty().absorption() : share("absorption", uAbsorption),
                    uScattering.isBlank() ? parent.uncertainty().scattering() : share("scattering", uScattering));
            Ingredient made = new NewLot(LotWriter.id(parent.kind(), number.strip()), lot, source).of(parent, u);
            write(() -> LotWriter.write(desk.shelfProperty().get().folder().orElseThrow(), made, List.of()), made.id());
            return Optional.empty();
        } catch (Refusal refusal) {
            return Optional.of(refusal.getMessage());
        }
    }

    /** Writes a lot whose figures a measured batch taught. */
    public Optional<String> addLearned(Ingredient parent, NewLot lot, org.hazewright.learning.Factors after) {
        try {
            Ingredient made = lot.learned(parent, after);
            write(() -> LotWriter.write(desk.shelfProperty().get().folder().orElseThrow(), made, List.of()), made.id());
            return Optional.empty();
        } catch (Refusal refusal) {
            return Optional.of(refusal.getMessage());
        }
    }

    private static Optional<LocalDate> day(String text) {
        if (text.isBlank()) return Optional.empty();
        try {
            return Optional.of(LocalDate.parse(text.strip()));
        } catch (DateTimeParseException e) {
            throw new Refusal("“" + text.strip() + "” is not a day; write it like 2026-03-31.");
        }
    }

    private void write(Supplier<List<Path>> writer, String id) {
        if (!own()) throw new Refusal("The shelf of the program is not written into; make a shelf of your own first.");
        writing.request(
                (stop, progress) -> writer.get(),
                files -> {
                    desk.readShelfAgain();
                    desk.notices()
                            .tell(Notice.told(
                                    "shelf",
                                    "On the shelf: " + id + " (" + files.get(0).getFileName() + ")."));
                },
                failure -> desk.notices().tell(Notice.wrong("shelf", Papers.words(failure))));
    }
}
