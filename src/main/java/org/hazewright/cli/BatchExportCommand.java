package org.hazewright.cli;

import java.io.PrintWriter;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.concurrent.Callable;
import org.hazewright.files.CsvText;
import org.hazewright.optics.Refusal;
import org.hazewright.sheet.LogbookTables;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** A logbook's tables as CSV. */
@Command(
        name = "export",
        description = {
            "Writes a logbook as CSV, a file a table: batches, measured values, lots, each with the columns that you added, and"
                    + " the pages that you added. A file that is there already is kept as ….previous.",
            "Example: hazewright batch export made/logbook.xlsx --out tables"
        })
final class BatchExportCommand implements Callable<Integer> {
    @Mixin
    private Shared shared;

    @Spec
    private CommandSpec spec;

    @Parameters(paramLabel = "LOGBOOK", description = "The workbook that gathers the batches.")
    private Path logbook;

    @Option(names = "--out", paramLabel = "DIR", description = "Folder for the tables (default: beside the logbook).")
    private Path folder;

    @Override
    public Integer call() {
        if (!Files.exists(logbook))
            throw new Refusal("There is no logbook " + logbook
                    + "; name the workbook that batch open wrote, usually logbook.xlsx beside the batches.");
        if (logbook.getFileName() == null || !BatchCommand.isWorkbook(logbook))
            throw new Refusal(
                    logbook + " is not a logbook; name the workbook that gathers the batches, usually logbook.xlsx"
                            + " (a single batch goes out with: hazewright batch show BATCH --csv FILE).");
        LogbookTables.Content content = LogbookTables.of(logbook);
        String stem = logbook.getFileName().toString().replaceFirst("(?i)[.]xlsx$", "");
        Map<Path, String> files = new LinkedHashMap<>();
        for (LogbookTables.Table table : content.tables()) {
            CsvText csv = new CsvText();
            table.rows().forEach(csv::row);
            String name = stem + "-" + table.name() + ".csv";
            files.put(folder != null ? folder.resolve(name) : logbook.resolveSibling(name), csv.toString());
        }
        List<String> written = new ArrayList<>();
        PrintWriter out = spec.commandLine().getOut();
        files.forEach((file, text) -> {
            String kept = ExportedFile.write(file, text);
            written.add(file.toString());
            if (!shared.json && !shared.quiet) out.println("Written: " + file + kept);
        });
        if (shared.json)
            Json.object().with("format", 1).with("written", written).print(out);
        if (!content.waiting().isEmpty())
            spec.commandLine()
                    .getErr()
                    .println("hazewright: " + content.waiting().size()
                            + (content.waiting().size() == 1 ? " record waits" : " records wait")
                            + " beside the logbook and " + (content.waiting().size() == 1 ? "is" : "are")
                            + " not in these tables; they go into it with the next batch that is recorded.");
        return Hazewright.DONE;
    }
}
