package org.hazewright.cli;

import java.io.PrintWriter;
import java.nio.file.Path;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.concurrent.Callable;
import org.hazewright.batch.Batch;
import org.hazewright.batch.Measurement;
import org.hazewright.files.BatchReader;
import org.hazewright.files.LotWriter;
import org.hazewright.learning.Drift;
import org.hazewright.learning.Factor;
import org.hazewright.learning.Factors;
import org.hazewright.learning.LotFlag;
import org.hazewright.learning.LotUpdate;
import org.hazewright.learning.MeasuredBatch;
import org.hazewright.learning.NewLot;
import org.hazewright.learning.Quantity;
import org.hazewright.optics.Figures;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Lot;
import org.hazewright.shelf.Shelf;
import org.hazewright.shelf.Source;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** Measured batches to lot files. */
@Command(
        name = "update",
        description = {
            "Learns from measured batches what is in the bottles, and writes a lot file for each bottle that they say something of.",
            "Example: hazewright lot update bath-07.batch.toml bath-08.batch.toml --out ingredients"
        })
final class LotUpdateCommand implements Callable<Integer> {
    @Mixin
    private Shared shared;

    @Spec
    private CommandSpec spec;

    @Parameters(paramLabel = "BATCH", arity = "1..*", description = "Measured batches.")
    private List<Path> files;

    @Option(names = "--of", paramLabel = "INGREDIENT", description = "Only this bottle, by the id of its ingredient.")
    private List<String> of = List.of();

    @Option(
            names = "--number",
            paramLabel = "NUMBER",
            description =
                    "Number of the new lot; with one --of (default: the old number and the day of the last measurement).")
    private String number;

    @Option(names = "--anyway", description = "Write lot files although the measurements are hard to believe.")
    private boolean anyway;

    @Option(names = "--out", paramLabel = "DIR", description = "Folder of the shelf (default: the shelf in use).")
    private Path out;

    @Override
    public Integer call() {
        if (number != null && of.size() != 1)
            throw new Refusal("--number names one lot; say which bottle with one --of.");
        Shelf shelf = shared.shelf();
        List<MeasuredBatch> batches = new ArrayList<>();
        for (Path file : files) {
            Batch b = BatchReader.read(file, shelf);
            if (b.measured().isEmpty())
                throw new Refusal(file + " holds no measured values; record them with: hazewright batch measure");
            for (Measurement m : b.measured()) batches.add(b.measuredBatch(m));
        }
        batches.sort(Comparator.comparing(MeasuredBatch::on));
        Factors known = Factors.none();
        Map<Factor, List<Drift.Estimate>> history = new LinkedHashMap<>();
        for (MeasuredBatch b : batches) {
            known = LotUpdate.of(known, b).after();
            for (Ingredient i : b.mixture().massesG().keySet())
                for (Quantity q : Quantity.values()) {
                    Factor f = Factor.of(i, q);
                    if (known.u(f) > 0 && known.mean(f) > 0)
                        history.computeIfAbsent(f, x -> new ArrayList<>()).add(Drift.Estimate.of(b.on(), known, f));
                }
        }
        LotUpdate update = LotUpdate.of(Factors.none(), batches);
        List<Drift> drifts = new ArrayList<>();
        history.forEach((f, list) -> {
            if (list.size() > 2) drifts.add(Drift.of(f, list));
        });
        return write(update, batches, drifts);
    }

    private int write(LotUpdate update, List<MeasuredBatch> batches, List<Drift> drifts) {
        PrintWriter print = spec.commandLine().getOut();
        LocalDate last = batches.get(batches.size() - 1).on();
        List<Ingredient> bottles = bottles(batches);
        TextTable table = new TextTable("  ", "lrrrr");
        table.row("bottle", "absorption", "was ±", "scattering", "was ±");
        for (Ingredient i : bottles)
            table.row(
                    i.id(),
                    factor(update, i, Quantity.ABSORPTION),
                    Figures.significant(i.uncertainty().absorption(), 2),
                    factor(update, i, Quantity.SCATTERING),
                    Figures.significant(i.uncertainty().scattering(), 2));
        if (!shared.json) {
            print.println("Measured over filed, from " + update.rows().size() + " values of " + batches.size()
                    + (batches.size() == 1 ? " measurement" : " measurements") + " (χ² "
                    + Figures.significant(update.chiSquared(), 3) + ", probability "
                    + Figures.significant(update.pValue(), 2) + ")");
            table.print(print);
        }
        if (update.surprising() && !anyway)
            throw new Refusal("These measurements are hard to believe with the files as they are (probability "
                    + Figures.significant(update.pValue(), 2)
                    + "), so no lot was written. Look at the verdict of each batch (hazewright batch show); if the bottles are to"
                    + " blame, say --anyway.");
        Path folder = LotCommand.folder(out, shared);
        List<Path> written = new ArrayList<>();
        List<String> flags = new ArrayList<>();
        for (Ingredient i : bottles) {
            List<LotFlag> found = LotFlag.of(i, last, drifts);
            found.forEach(f -> flags.add(f.sentence()));
            String old = i.lot().map(l -> l.number() + "-").orElse("");
            String fresh = number != null ? number : old + last;
            Source source = new Source(
                    Source.Basis.MEASURED,
                    "Learned from "
                            + String.join(
                                    ", ",
                                    batches.stream()
                                            .map(MeasuredBatch::name)
                                            .distinct()
                                            .toList())
                            + " up to " + last
                            + ", beginning at the figures of " + i.id() + ".");
            Lot which = LotCommand.lot(i, fresh);
            for (LotFlag f : found) if (f.kind() == LotFlag.Kind.DRIFTING) which = which.drifting(f.sentence());
            NewLot lot = new NewLot(LotWriter.id(i.kind(), fresh), which, source);
            written.addAll(LotWriter.write(folder, lot.learned(i, update.after()), notes(found)));
        }
        String tied = tied(update.after(), bottles);
        if (shared.json)
            Json.object()
                    .with("format", 1)
                    .with("chi_squared", update.chiSquared())
                    .with("probability", update.pValue())
                    .with("flags", flags)
                    .with("written", written.stream().map(Path::toString).toList())
                    .print(print);
        else {
            flags.forEach(f -> print.println("Mind: " + f));
            if (!tied.isEmpty()) print.println("Mind: " + tied);
            if (!shared.quiet) written.forEach(p -> print.println("Written: " + p));
        }
        return Hazewright.DONE;
    }

    private static List<String> notes(List<LotFlag> flags) {
        return flags.stream().map(LotFlag::sentence).toList();
    }

    private static String factor(LotUpdate update, Ingredient i, Quantity q) {
        Factor f = Factor.of(i, q);
        double u = update.after().u(f);
        return u == 0 ? "—" : Figures.withUncertainty(update.after().mean(f), u);
    }

    /** Bottles that the batches say something of: their uncertainty falls by a hundredth or more. */
    private List<Ingredient> bottles(List<MeasuredBatch> batches) {
        LotUpdate update = LotUpdate.of(Factors.none(), batches);
        List<Ingredient> found = new ArrayList<>();
        for (MeasuredBatch b : batches)
            for (Ingredient i : b.mixture().massesG().keySet()) {
                if (found.contains(i) || !LotWriter.canBeLot(i)) continue;
                if (!of.isEmpty() && !of.contains(i.id()) && !of.contains(i.kind())) continue;
                boolean tighter = false;
                for (Quantity q : Quantity.values()) {
                    Factor f = Factor.of(i, q);
                    tighter |= update.after().u(f) < 0.99 * update.before().u(f);
                }
                if (tighter) found.add(i);
            }
        if (found.isEmpty())
            throw new Refusal(
                    "These batches say nothing new of " + (of.isEmpty() ? "any bottle" : String.join(", ", of))
                            + ": their values are less certain than the files. Measure better, or more often.");
        return found;
    }

    /** What is lost between files: a correlation of two bottles has no file to stand in. */
    private static String tied(Factors after, List<Ingredient> bottles) {
        double most = 0;
        String sentence = "";
        for (Ingredient i : bottles)
            for (Ingredient k : bottles)
                for (Quantity q : Quantity.values()) {
                    if (i.id().compareTo(k.id()) >= 0) continue;
                    double r = after.correlation(Factor.of(i, q), Factor.of(k, q));
                    if (Math.abs(r) <= Math.max(0.3, Math.abs(most))) continue;
                    most = r;
                    sentence = "The measurements tie the " + q.word() + " of " + i.id() + " and " + k.id()
                            + " together (correlation " + Figures.significant(r, 2)
                            + "); a lot's file keeps its own uncertainties and their correlation only, so what the two add"
                            + " together is known better than the next design will count.";
                }
        return sentence;
    }
}
