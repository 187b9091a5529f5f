package org.hazewright.cli;

import java.io.PrintWriter;
import java.nio.file.Path;
import java.util.List;
import java.util.concurrent.Callable;
import org.hazewright.batch.Batch;
import org.hazewright.batch.Heating;
import org.hazewright.batch.Replan;
import org.hazewright.bench.Grams;
import org.hazewright.bench.Weighing;
import org.hazewright.files.BatchReader;
import org.hazewright.optics.Refusal;
import org.hazewright.sheet.FilledIn;
import org.hazewright.shelf.Shelf;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** Records grams as weighed. */
@Command(
        name = "weigh",
        description = {
            "Records grams as weighed, one by one or from the filled-in sheet; later steps are planned anew to suit.",
            "Example: hazewright batch weigh bath-07.batch.toml --item 2 --grams 41.32",
            "Example: hazewright batch weigh bath-07.batch.toml --from wrist-bath.xlsx",
            "Example: hazewright batch weigh bath-07.batch.toml --vessel 512.3,498.1 --water-back 14.0"
        })
final class BatchWeighCommand implements Callable<Integer> {
    @Mixin
    private Shared shared;

    @Mixin
    private Recording recording;

    @Spec
    private CommandSpec spec;

    @Parameters(paramLabel = "BATCH", description = "NAME.batch.toml.")
    private Path file;

    @Option(
            names = "--item",
            paramLabel = "N",
            description = "Number of the weighing, as batch show and the sheet have it.")
    private List<Integer> items = List.of();

    @Option(names = "--grams", paramLabel = "G", description = "Grams as weighed, one for each --item.")
    private List<Double> grams = List.of();

    @Option(
            names = "--lot",
            paramLabel = "N=NUMBER",
            split = ",",
            description = "Lot of the bottle at a weighing: --lot 4=L07.")
    private java.util.Map<Integer, String> lots = java.util.Map.of();

    @Option(names = "--from", paramLabel = "SHEET", description = "The recipe's sheet, filled in.")
    private Path from;

    @Option(
            names = "--vessel",
            paramLabel = "BEFORE,AFTER",
            split = ",",
            description = "Vessel with its contents before and after heating, in g.")
    private double[] vessel;

    @Option(
            names = "--water-back",
            paramLabel = "G",
            description = "Water given back after heating, in g (default: 0).")
    private double waterBack;

    @Option(names = "--keep-plan", description = "Leave the steps still to come as they were planned.")
    private boolean keepPlan;

    @Override
    public Integer call() {
        PrintWriter out = spec.commandLine().getOut();
        PrintWriter err = spec.commandLine().getErr();
        if (items.size() != grams.size())
            throw new Refusal("--item is given " + items.size() + " times and --grams " + grams.size()
                    + " times; each --item has its --grams.");
        if (items.isEmpty() && from == null && vessel == null && lots.isEmpty())
            throw new Refusal(
                    "Say what was weighed: --item N --grams G, --from SHEET.xlsx, --vessel BEFORE,AFTER, or --lot N=NUMBER.");
        Shelf shelf = shared.shelf();
        Batch before = BatchReader.read(file, shelf);
        Batch batch = before;
        if (from != null) {
            if (!BatchCommand.isWorkbook(from))
                throw new Refusal("--from is " + from + "; the filled-in sheet is a workbook (.xlsx).");
            FilledIn sheet = FilledIn.read(from);
            batch = sheet.into(batch, from);
            if (!shared.quiet) for (String note : sheet.notes()) err.println("hazewright: " + note);
            if (sheet.weighedG().isEmpty() && items.isEmpty())
                throw new Refusal("No grams are filled in on the sheet " + from + ".");
        }
        for (int k = 0; k < items.size(); k++) batch = batch.withWeighed(items.get(k) - 1, grams.get(k));
        for (var lot : lots.entrySet()) batch = batch.withLot(lot.getKey() - 1, lot.getValue());
        if (vessel != null) {
            if (vessel.length != 2)
                throw new Refusal(
                        "--vessel takes two weights, before and after heating, with a comma between: 512.3,498.1");
            batch = batch.withHeating(new Heating(vessel[0], vessel[1], waterBack));
        } else if (waterBack != 0) throw new Refusal("--water-back goes with --vessel BEFORE,AFTER.");
        batch.asMade();
        Batch planned = keepPlan ? batch : batch.replanned(shelf);
        int status = recording.save(file, planned, shared, out, err);
        if (shared.json) {
            BatchJson.of(planned).print(out);
            return status;
        }
        if (!shared.quiet) moved(batch, planned, shelf, out);
        BatchText text = new BatchText(planned, shared.units, out);
        text.weighings();
        text.landing(planned.asMade());
        text.lots(shelf);
        return status;
    }

    private static void moved(Batch before, Batch now, Shelf shelf, PrintWriter out) {
        List<Weighing> old = before.weighings();
        List<Weighing> fresh = now.weighings();
        for (int n = 0; n < old.size(); n++)
            if (!now.weighed(n) && old.get(n).massG() != fresh.get(n).massG())
                out.println("Planned anew: " + fresh.get(n).label() + " "
                        + Grams.shown(fresh.get(n).massG(), now.balance()) + " in place of "
                        + Grams.shown(old.get(n).massG(), now.balance()) + ".");
        now.brief()
                .flatMap(b -> new Replan(b, now.plan(), shelf).moreBaseG(now.asMade()))
                .ifPresent(g -> out.println("No tolerance is lost if " + Grams.shown(g, now.balance()) + " more "
                        + now.plan().base().id() + " goes in; hazewright correct plans it."));
    }
}
