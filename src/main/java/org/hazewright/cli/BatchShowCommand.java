package org.hazewright.cli;

import java.io.PrintWriter;
import java.nio.file.Path;
import java.util.concurrent.Callable;
import org.hazewright.batch.Batch;
import org.hazewright.batch.LotWatch;
import org.hazewright.files.BatchReader;
import org.hazewright.files.BatchTable;
import org.hazewright.shelf.Shelf;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** Shows a batch. */
@Command(
        name = "show",
        description = {
            "Shows what was weighed, where it lands, what was measured, and whether the two agree.",
            "Example: hazewright batch show bath-07.batch.toml --csv bath-07.csv"
        })
final class BatchShowCommand implements Callable<Integer> {
    @Mixin
    private Shared shared;

    @Spec
    private CommandSpec spec;

    @Parameters(paramLabel = "BATCH", description = "NAME.batch.toml.")
    private Path file;

    @Option(names = "--csv", paramLabel = "FILE", description = "Also write weighings and values as a table.")
    private Path csv;

    @Override
    public Integer call() {
        PrintWriter out = spec.commandLine().getOut();
        Shelf shelf = shared.shelf();
        Batch batch = BatchReader.read(file, shelf);
        String kept = csv == null ? "" : ExportedFile.write(csv, BatchTable.text(batch));
        if (shared.json)
            BatchJson.of(batch).with("minds", LotWatch.of(batch, shelf)).print(out);
        else {
            BatchText text = new BatchText(batch, shared.units, out);
            text.print();
            text.lots(shelf);
        }
        if (csv != null && !shared.json && !shared.quiet) out.println("Written: " + csv + kept);
        return Hazewright.DONE;
    }
}
