package org.hazewright.cli;

import java.io.PrintWriter;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.concurrent.Callable;
import org.hazewright.batch.Batch;
import org.hazewright.batch.Correcting;
import org.hazewright.batch.Correction;
import org.hazewright.bench.Grams;
import org.hazewright.files.BatchReader;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Stock;
import org.hazewright.optics.Figures;
import org.hazewright.shelf.Shelf;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** What to add to a batch that missed. */
@Command(
        name = "correct",
        description = {
            "Says what to add to a batch so that it lands, with the least added volume; nothing can be taken out.",
            "Example: hazewright correct bath-07.batch.toml --chance 0.9 --capacity-ml 1200 --record"
        })
final class CorrectCommand implements Callable<Integer> {
    @Mixin
    private Shared shared;

    @Mixin
    private Recording recording;

    @Spec
    private CommandSpec spec;

    @Parameters(paramLabel = "BATCH", description = "NAME.batch.toml, all of it weighed.")
    private Path file;

    @Option(
            names = "--chance",
            paramLabel = "SHARE",
            description = "Wanted chance of landing inside every tolerance, 0 to 1 (default: ${DEFAULT-VALUE}).")
    private double chance = 0.9;

    @Option(
            names = "--capacity-ml",
            paramLabel = "ML",
            description = "What the vessel holds (default: half as much again as is in it).")
    private Double capacityMl;

    @Option(names = "--record", description = "Put the correction into the batch as weighings still to be made.")
    private boolean record;

    @Override
    public Integer call() {
        PrintWriter out = spec.commandLine().getOut();
        PrintWriter err = spec.commandLine().getErr();
        Shelf shelf = shared.shelf();
        Batch batch = BatchReader.read(file, shelf);
        double capacity = capacityMl != null
                ? capacityMl
                : 1.5 * Mixture.of(batch.asMade()).volumeMl();
        Correction c = Correcting.of(batch, shelf, chance, capacity);
        Batch now = batch;
        int status = Hazewright.DONE;
        if (record && c.outcome() == Correction.Outcome.ADD) now = batch.withCorrection(c.stocks(), c.items());
        if (shared.json) json(c).print(out);
        else text(now, c, out);
        if (now != batch) status = recording.save(file, now, shared, out, err);
        return status == Hazewright.DONE && c.outcome() == Correction.Outcome.START_AGAIN ? Hazewright.MISSES : status;
    }

    private void text(Batch batch, Correction c, PrintWriter out) {
        out.println("Batch " + batch.id() + ": as it stands it lands inside every tolerance "
                + DesignText.times(c.now().chance()) + " in 100.");
        out.println(c.reason());
        BatchText text = new BatchText(batch, shared.units, out);
        if (c.outcome() == Correction.Outcome.START_AGAIN)
            out.println(
                    "Start again. A new batch takes " + Grams.plain(c.newBatch().massG()) + " g in "
                            + c.newBatch().weighings() + " weighings, " + cost(c.newBatch()) + ", and lands "
                            + DesignText.times(c.newBatch().chance()) + " in 100.");
        if (c.items().isEmpty()) {
            text.table(c.now().predicted());
            return;
        }
        out.println();
        out.println(c.outcome() == Correction.Outcome.ADD ? "Add" : "The best that adding can do");
        TextTable table = new TextTable("  ", "lrl");
        for (Stock s : c.stocks())
            table.row(
                    "make " + s.id(),
                    Grams.shown(s.ingredientG(), batch.balance()),
                    s.from().orElse(s.ingredient().id()) + " + " + Grams.shown(s.diluentG(), batch.balance()) + " "
                            + s.diluent().id());
        for (Item i : c.items())
            table.row(
                    i.label(),
                    Grams.shown(i.massG(), batch.balance()),
                    i.stock().isPresent() ? i.ingredient().name() : "");
        table.print(out);
        out.println("  " + Figures.significant(c.addedMl(), 3) + " mL more, " + Figures.significant(c.volumeMl(), 5)
                + " mL in all; then it lands inside every tolerance "
                + DesignText.times(c.then().chance()) + " in 100.");
        text.table(c.then().predicted());
        for (String note : c.notes()) out.println("Mind: " + note);
    }

    private static String cost(Correction.Fresh fresh) {
        String none = String.join(", ", fresh.unpriced());
        if (!(fresh.cost() > 0)) return "of unknown price (the shelf has none for " + none + ")";
        return "about " + Figures.significant(fresh.cost(), 3) + " in the shelf's prices"
                + (none.isEmpty() ? "" : " (no price for " + none + ")");
    }

    private static Json json(Correction c) {
        List<Map<String, Object>> items = new ArrayList<>();
        for (Item i : c.items())
            items.add(Json.object()
                    .with("ingredient", i.ingredient().id())
                    .with("from_stock", i.stock().orElse(null))
                    .with("mass_g", i.massG())
                    .fields());
        return Json.object()
                .with("format", 1)
                .with(
                        "outcome",
                        c.outcome().name().toLowerCase(java.util.Locale.ROOT).replace('_', '-'))
                .with("reason", c.reason())
                .with("items", items)
                .with("added_ml", c.addedMl())
                .with("volume_ml", c.volumeMl())
                .with("chance_now", c.now().chance())
                .with("chance_then", c.then().chance())
                .with("now", BatchJson.predicted(c.now().predicted()))
                .with("then", BatchJson.predicted(c.then().predicted()))
                .with("notes", c.notes())
                .with(
                        "new_batch",
                        Json.object()
                                .with("mass_g", c.newBatch().massG())
                                .with("weighings", c.newBatch().weighings())
                                .with("cost", c.newBatch().cost())
                                .with("unpriced", c.newBatch().unpriced())
                                .with("chance", c.newBatch().chance()));
    }
}
