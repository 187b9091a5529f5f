package org.hazewright.desk.model;

import java.nio.file.Path;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.function.UnaryOperator;
import javafx.beans.property.ReadOnlyBooleanProperty;
import javafx.beans.property.ReadOnlyObjectProperty;
import javafx.beans.property.ReadOnlyObjectWrapper;
import org.hazewright.batch.Batch;
import org.hazewright.batch.Correcting;
import org.hazewright.batch.Correction;
import org.hazewright.batch.Heating;
import org.hazewright.batch.Learned;
import org.hazewright.batch.Measurement;
import org.hazewright.bench.Answer;
import org.hazewright.brief.Brief;
import org.hazewright.brief.Point;
import org.hazewright.files.BatchWriter;
import org.hazewright.files.CoefficientTable;
import org.hazewright.files.LotWriter;
import org.hazewright.files.SafeFile;
import org.hazewright.learning.Factor;
import org.hazewright.learning.Factors;
import org.hazewright.learning.LotUpdate;
import org.hazewright.learning.MeasuredBatch;
import org.hazewright.learning.MeasuredValue;
import org.hazewright.learning.Method;
import org.hazewright.learning.NewLot;
import org.hazewright.learning.Quantity;
import org.hazewright.learning.Verdict;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Sweep;
import org.hazewright.optics.Refusal;
import org.hazewright.sheet.FirstPage;
import org.hazewright.sheet.Logbook;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Lot;
import org.hazewright.shelf.Source;

/**
 * A batch that was made: where it lands, what was measured of it, what that says of the bottles, and what would put it right.
 *
 * <p>Every change is written to the batch's file and to the logbook beside it; it can be taken back.
 */
public final class MadeBatch {
    private static final double WANTED_CHANCE = 0.9;

    /** A measured value as it was typed: value and standard uncertainty in 1/cm, either may be blank. */
    public record Entry(double wavelengthNm, Point.Quantity quantity, String value, String u) {}

    /**
     * What is now believed of a bottle's figure over what its file says, with its standard uncertainty before and after.
     *
     * @param ingredient whose figure it is
     */
    public record Belief(String ingredient, String words, double factor, double uBefore, double uAfter) {}

    /** All that follows from the batch as it stands. */
    public record Seen(
            List<Answer.Predicted> landing,
            double chance,
            Optional<Verdict> verdict,
            List<Belief> beliefs,
            Factors after) {}

    private final Desk desk;
    private final Path file;
    private final Edits<Batch> edits;
    private final Work.Lane seeing;
    private final Work.Lane writing;
    private final Work.Lane correcting;
    private final Work.Lane reading;
    private final ReadOnlyObjectWrapper<Seen> seen = new ReadOnlyObjectWrapper<>();
    private final ReadOnlyObjectWrapper<Optional<Correction>> correction =
            new ReadOnlyObjectWrapper<>(Optional.empty());
    private final ReadOnlyObjectWrapper<String> complaint = new ReadOnlyObjectWrapper<>("");

    MadeBatch(Desk desk, Path file, Batch batch) {
        this.desk = desk;
        this.file = file;
        edits = new Edits<>(batch);
        seeing = desk.work().lane(Work.Haste.INTERRUPT);
        writing = desk.work().lane(Work.Haste.FINISH);
        correcting = desk.work().lane(Work.Haste.INTERRUPT);
        reading = desk.work().lane(Work.Haste.INTERRUPT);
        edits.nowProperty().addListener((p, before, now) -> {
            correction.set(Optional.empty());
            look();
            write();
        });
        look();
    }

    public ReadOnlyObjectProperty<Batch> batchProperty() {
        return edits.nowProperty();
    }

    public Edits<Batch> edits() {
        return edits;
    }

    public Path file() {
        return file;
    }

    /** Null before the first look. */
    public ReadOnlyObjectProperty<Seen> seenProperty() {
        return seen.getReadOnlyProperty();
    }

    public ReadOnlyObjectProperty<Optional<Correction>> correctionProperty() {
        return correction.getReadOnlyProperty();
    }

    public ReadOnlyBooleanProperty correctingProperty() {
        return correcting.busyProperty();
    }

    /** What went wrong with the last deed, in words. */
    public ReadOnlyObjectProperty<String> complaintProperty() {
        return complaint.getReadOnlyProperty();
    }

    /** Rows that can be measured: the targets, or where there are none nothing. */
    public List<Point> points() {
        return edits.now().brief().map(Brief::points).orElse(List.of());
    }

    private void look() {
        Batch batch = edits.now();
        seeing.request((stop, progress) -> see(batch), seen::set, failure -> complaint.set(Papers.words(failure)));
    }

    private static Seen see(Batch batch) {
        List<Answer.Predicted> landing = List.of();
        double chance = Double.NaN;
        if (batch.brief().isPresent()) {
            Brief brief = batch.brief().get();
            Sweep sweep = Sweep.of(Mixture.of(batch.asMade()), brief.wavelengthsNm());
            Learned.Landing l = Learned.of(batch)
                    .landing(
                            batch.asMade(),
                            brief.points(),
                            sweep,
                            batch.balance().capacityG());
            landing = l.predicted();
            chance = l.chance();
        }
        if (batch.measured().isEmpty()) return new Seen(landing, chance, Optional.empty(), List.of(), Factors.none());
        Measurement last = batch.measured().get(batch.measured().size() - 1);
        MeasuredBatch measured = batch.measuredBatch(last);
        Verdict verdict = Verdict.of(Factors.none(), measured);
        LotUpdate update = LotUpdate.of(Factors.none(), measured);
        List<Belief> beliefs = new ArrayList<>();
        for (Factor f : update.after().factors()) {
            double before = update.before().u(f);
            double after = update.after().u(f);
            if (f.kind() == Factor.Kind.METHOD || !(before > 0) || after > 0.9 * before) continue;
            beliefs.add(new Belief(
                    f.name(),
                    Words.named(f.words(), batch.plan()),
                    update.after().mean(f),
                    before,
                    after));
        }
        return new Seen(landing, chance, Optional.of(verdict), beliefs, update.after());
    }

    private Optional<String> attempt(String what, UnaryOperator<Batch> edit) {
        try {
            edits.edit(edit.apply(edits.now()), what, "");
            complaint.set("");
            return Optional.empty();
        } catch (Refusal refusal) {
            complaint.set(refusal.getMessage());
            return Optional.of(refusal.getMessage());
        }
    }

    public Optional<String> who(String name) {
        desk.remembered().keep("who", name.strip());
        return attempt("who made it", b -> b.madeBy(name.strip(), b.on()));
    }

    public Optional<String> note(String text) {
        return attempt("a note", b -> b.withNote(text.strip()));
    }

    /** Vessel before and after heating and water given back, in g, as typed. */
    public Optional<String> heating(String before, String after, String back) {
        return attempt("heating", b -> {
            Batch changed = b.withHeating(new Heating(
                    Typed.number(before, "g"), Typed.number(after, "g"), back.isBlank() ? 0 : Typed.number(back, "g")));
            changed.asMade();
            return changed;
        });
    }

    /** Takes measured values; entries without a value are left out. */
    public Optional<String> measured(String method, String instrument, List<Entry> entries) {
        return attempt("measured values", b -> {
            List<MeasuredValue> values = new ArrayList<>();
            for (Entry e : entries) {
                if (e.value().isBlank()) continue;
                String where = Words.sign(e.quantity()) + " at " + org.hazewright.optics.Figures.plain(e.wavelengthNm())
                        + " nm";
                if (e.u().isBlank())
                    throw new Refusal(
                            "Say how well " + where + " is known: its standard uncertainty, or a share such as 3 %.");
                double v = number(where, e.value());
                double u = e.u().strip().endsWith("%") ? Typed.percent(e.u()) * v : number(where, e.u());
                values.add(new MeasuredValue(
                        e.quantity() == Point.Quantity.MUA ? Quantity.ABSORPTION : Quantity.SCATTERING,
                        e.wavelengthNm(),
                        v,
                        u));
            }
            if (values.isEmpty()) throw new Refusal("Type at least one measured value.");
            String how = method.isBlank() ? "measured" : method.strip();
            return b.withMeasured(new Measurement(
                    LocalDate.now(), new Method(how, 0, 0), instrument.strip(), b.correctionCount(), values));
        });
    }

    /** Takes measured values from a table, CSV or the first page of a workbook; values must state their uncertainty. */
    public void measuredFrom(Path table, String method, String instrument) {
        String how = method.isBlank() ? "measured" : method.strip();
        reading.request(
                (stop, progress) -> {
                    boolean workbook = table.toString().toLowerCase(Locale.ROOT).endsWith(".xlsx");
                    CoefficientTable read = workbook
                            ? CoefficientTable.of(table.toString(), FirstPage.cells(table), null)
                            : CoefficientTable.read(table, null);
                    return read.measured(OptionalDouble.empty());
                },
                values -> attempt(
                        "measured values",
                        b -> b.withMeasured(new Measurement(
                                LocalDate.now(),
                                new Method(how, 0, 0),
                                instrument.strip(),
                                b.correctionCount(),
                                values))),
                failure -> complaint.set(Papers.words(failure)));
    }

    /** Whether a bottle's new figures can be kept as a lot of their own. */
    public boolean canLearn(String ingredient) {
        return parent(ingredient).filter(LotWriter::canBeLot).isPresent();
    }

    private Optional<Ingredient> parent(String id) {
        return edits.now().asMade().massesG().keySet().stream()
                .filter(i -> i.id().equals(id))
                .findFirst();
    }

    /** Keeps what the batch taught of a bottle as a lot on the shelf. */
    public Optional<String> learn(String ingredient, String number) {
        if (number.isBlank()) return Optional.of("Type the number that stands on the bottle.");
        Ingredient bottle = parent(ingredient).orElseThrow();
        Measurement m = edits.now().measured().get(edits.now().measured().size() - 1);
        NewLot lot = new NewLot(
                LotWriter.id(bottle.kind(), number.strip()),
                new Lot(bottle.kind(), number.strip(), Optional.empty(), Optional.empty(), Optional.empty()),
                new Source(
                        Source.Basis.MEASURED,
                        "Learned from batch " + edits.now().id() + ", "
                                + m.method().name() + " of " + m.on() + "."));
        return desk.adding().addLearned(bottle, lot, seen.get().after());
    }

    private static double number(String where, String text) {
        try {
            return Typed.number(text, "/cm", "1/cm");
        } catch (Refusal refusal) {
            throw new Refusal(Words.capital(where) + ": " + refusal.getMessage());
        }
    }

    /** Looks for the least addition that makes the batch land; the vessel holds half as much again as is in it. */
    public void correct() {
        Batch batch = edits.now();
        var shelf = desk.shelfProperty().get().shelf();
        if (shelf.isEmpty()) return;
        correcting.request(
                (stop, progress) -> Correcting.of(
                        batch,
                        shelf.get(),
                        WANTED_CHANCE,
                        1.5 * Mixture.of(batch.asMade()).volumeMl()),
                found -> correction.set(Optional.of(found)),
                failure -> complaint.set(Papers.words(failure)));
    }

    /** Goes to the balance with the correction that was found. */
    public void weighCorrection() {
        correction
                .get()
                .filter(c -> c.outcome() == Correction.Outcome.ADD)
                .ifPresent(c -> desk.weighCorrection(file, edits.now().withCorrection(c.stocks(), c.items())));
    }

    private void write() {
        Batch batch = edits.now();
        writing.request(
                (stop, progress) -> {
                    BatchWriter.write(file, batch, SafeFile.Overwrite.KEEP_PREVIOUS);
                    return Logbook.record(logbook(file), batch, file);
                },
                recorded -> tell(desk, recorded),
                failure -> complaint.set(Papers.words(failure)));
    }

    /** The logbook that a batch's file is recorded in: the one beside it. */
    public static Path logbook(Path batchFile) {
        return batchFile.toAbsolutePath().resolveSibling("logbook.xlsx");
    }

    static void tell(Desk desk, Logbook.Recorded recorded) {
        desk.notices()
                .tell(recorded.waiting()
                        .map(why -> Notice.wrong("logbook", "The batch is written; the logbook has to wait. " + why))
                        .orElse(new Notice(
                                Notice.Kind.TOLD,
                                "logbook",
                                "Recorded in the logbook, " + recorded.kept()
                                        + (recorded.found().isEmpty() ? "" : " (" + recorded.found() + ")") + ".",
                                desk.showing(recorded.kept()))));
    }
}
