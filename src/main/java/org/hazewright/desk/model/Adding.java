package org.hazewright.desk.model;

import java.nio.file.Path;
import java.time.LocalDate;
import java.time.format.DateTimeParseException;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Set;
import java.util.function.Supplier;
import javafx.beans.property.ReadOnlyObjectProperty;
import javafx.beans.property.ReadOnlyObjectWrapper;
import org.hazewright.files.DilutionReader;
import org.hazewright.files.IngredientWriter;
import org.hazewright.files.LotWriter;
import org.hazewright.learning.DilutionFit;
import org.hazewright.learning.Factors;
import org.hazewright.learning.NewLot;
import org.hazewright.mixture.Mixture;
import org.hazewright.optics.Figures;
import org.hazewright.optics.Refusal;
import org.hazewright.sheet.FirstPage;
import org.hazewright.shelf.Absorption;
import org.hazewright.shelf.Family;
import org.hazewright.shelf.Form;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Lot;
import org.hazewright.shelf.Part;
import org.hazewright.shelf.Shelf;
import org.hazewright.shelf.Source;
import org.hazewright.shelf.Uncertainty;

/** What comes onto a shelf of one's own: an ingredient by form or table, a lot by form, by a dilution series, or by what a batch taught. */
public final class Adding {
    private static final String DILUENT = "water";

    /** Uncertainty that all dilutions of a series share, their stock and the cell; that of a known share of scattering. As the command has them. */
    private static final double U_COMMON = 0.005;

    private static final double U_ALBEDO = 0.02;

    private final Desk desk;
    private final Work.Lane writing;
    private final Work.Lane fitting;
    private final ReadOnlyObjectWrapper<Optional<Fitted>> fitted = new ReadOnlyObjectWrapper<>(Optional.empty());

    Adding(Desk desk) {
        this.desk = desk;
        writing = desk.work().lane(Work.Haste.FINISH);
        fitting = desk.work().lane(Work.Haste.INTERRUPT);
    }

    /**
     * A lot as a dilution series makes it, not yet on the shelf.
     *
     * @param says what the fit found, in sentences
     * @param minds what is to be minded of it
     */
    public record Fitted(Ingredient parent, Ingredient lot, List<String> says, List<String> minds) {
        public Fitted {
            says = List.copyOf(says);
            minds = List.copyOf(minds);
        }
    }

    /** The series that was fitted last; empty before, and after it went onto the shelf. */
    public ReadOnlyObjectProperty<Optional<Fitted>> fittedProperty() {
        return fitted.getReadOnlyProperty();
    }

    /** Fits a dilution series in water, a table or a workbook, to a lot of an ingredient; {@code wrong} is told what is wrong with it. */
    public void fit(Ingredient parent, String number, Path series, java.util.function.Consumer<String> wrong) {
        fitted.set(Optional.empty());
        if (number.isBlank()) {
            wrong.accept("Give the lot its number first, as it stands on the bottle.");
            return;
        }
        Shelf on = desk.shelfProperty().get().shelf().orElseThrow();
        fitting.request(
                (stop, progress) -> fit(parent, number.strip(), series, on),
                found -> fitted.set(Optional.of(found)),
                failure -> wrong.accept(Papers.words(failure)));
    }

    private static Fitted fit(Ingredient parent, String number, Path series, Shelf on) {
        Ingredient water = on.require(DILUENT);
        boolean scatterer =
                parent.part() == Part.SCATTERER && parent.scattering().isPresent();
        double share =
                scatterer ? 1 : parent.absorption().map(Absorption::albedo).orElse(0.0);
        DilutionReader.About about = new DilutionReader.About(
                parent, water.densityGPerMl(), share, share == 0 || share == 1 ? 0 : U_ALBEDO, U_COMMON);
        boolean workbook = series.toString().toLowerCase(Locale.ROOT).endsWith(".xlsx");
        DilutionFit fit = (workbook
                        ? DilutionReader.read(FirstPage.table(series), about)
                        : DilutionReader.read(series, about))
                .fit();
        Source source = new Source(
                Source.Basis.MEASURED,
                "Dilution series " + series.getFileName() + " in " + DILUENT + ", fitted on " + LocalDate.now()
                        + " with the shelf's " + parent.id() + ".");
        Lot lot = new Lot(parent.kind(), number, Optional.empty(), Optional.empty(), Optional.empty());
        NewLot fresh = new NewLot(LotWriter.id(parent.kind(), number), lot, source);
        List<String> says = new ArrayList<>();
        says.add(fit.wavelengths().size() + (fit.wavelengths().size() == 1 ? " wavelength" : " wavelengths") + " from "
                + series.getFileName() + ".");
        Ingredient made;
        if (scatterer) {
            double n = new Mixture(java.util.Map.of(water, 1.0), 22)
                    .hostIndex(fit.wavelengths().get(0).wavelengthNm());
            DilutionFit.Magnitude m = fit.magnitudeOf(parent, n, 22);
            made = fresh.scatterer(parent, m);
            says.add("It scatters " + Figures.withUncertainty(m.ratio(), m.u()) + " times as much as the shelf's.");
        } else {
            made = fresh.absorber(
                    parent, fit, parent.absorption().map(Absorption::g).orElse(0.0));
            says.add("Known to " + Figures.significant(100 * fit.relativeU(), 2) + " % (k = 1).");
        }
        return new Fitted(parent, made, says, fit.warnings());
    }

    /** Writes the lot that was fitted last; what is wrong, in words. */
    public Optional<String> addFitted() {
        Optional<Fitted> last = fitted.get();
        if (last.isEmpty()) return Optional.of("Choose a dilution series first.");
        try {
            Fitted f = last.get();
            write(
                    () -> LotWriter.write(desk.shelfProperty().get().folder().orElseThrow(), f.lot(), f.minds()),
                    f.lot().id());
            fitted.set(Optional.empty());
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
            Set<Family> families,
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
    public Optional<String> addLearned(Ingredient parent, NewLot lot, Factors after) {
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
