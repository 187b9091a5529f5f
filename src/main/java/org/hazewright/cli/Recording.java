package org.hazewright.cli;

import java.io.PrintWriter;
import java.nio.file.Path;
import org.hazewright.batch.Batch;
import org.hazewright.files.BatchWriter;
import org.hazewright.files.SafeFile;
import org.hazewright.sheet.Logbook;
import picocli.CommandLine.Option;

/** Where a batch is written: its own file first, then the logbook. */
final class Recording {
    @Option(
            names = "--logbook",
            paramLabel = "FILE",
            description = "Workbook that gathers the batches (default: logbook.xlsx beside the batch).")
    private Path logbook;

    @Option(names = "--no-logbook", description = "Write the batch's own file only.")
    private boolean none;

    /** Status of the command: done, or unwritable when the logbook has to wait. */
    int save(Path file, Batch batch, Shared shared, PrintWriter out, PrintWriter err) {
        BatchWriter.write(file, batch, SafeFile.Overwrite.KEEP_PREVIOUS);
        if (!shared.json && !shared.quiet) out.println("Written: " + file);
        if (none) return Hazewright.DONE;
        Path book = logbook != null ? logbook : file.resolveSibling("logbook.xlsx");
        Logbook.Recorded recorded = Logbook.record(book, batch, file);
        if (recorded.waiting().isPresent()) {
            err.println("hazewright: The batch itself is written. "
                    + recorded.waiting().get());
            return Hazewright.UNWRITABLE;
        }
        if (!shared.json && !shared.quiet)
            out.println("Recorded: " + book + (recorded.found().isEmpty() ? "" : " (" + recorded.found() + ")"));
        return Hazewright.DONE;
    }
}
