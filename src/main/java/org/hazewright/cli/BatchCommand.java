package org.hazewright.cli;

import java.nio.file.Path;
import java.time.LocalDate;
import java.util.Locale;
import org.hazewright.files.CoefficientTable;
import org.hazewright.optics.Refusal;
import org.hazewright.sheet.FirstPage;
import picocli.CommandLine.Command;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.ParameterException;
import picocli.CommandLine.Spec;

/** One making of a recipe, recorded in its own file and in the logbook. */
@Command(
        name = "batch",
        description =
                "One making of a recipe: opened, weighed, measured, shown; recorded in the logbook workbook and exported from it.",
        synopsisSubcommandLabel = "COMMAND",
        subcommands = {
            BatchOpenCommand.class,
            BatchWeighCommand.class,
            BatchMeasureCommand.class,
            BatchShowCommand.class,
            BatchExportCommand.class,
        })
final class BatchCommand implements Runnable {
    @Spec
    private CommandSpec spec;

    @Option(names = "--help", usageHelp = true, description = "Show this help and end.")
    @SuppressWarnings("unused") // the parser asks it
    private boolean help;

    @Override
    public void run() {
        throw new ParameterException(
                spec.commandLine(), "Say what to do with it: open, weigh, measure, show or export.");
    }

    static LocalDate day(String text, String option) {
        if (text == null) return LocalDate.now();
        try {
            return LocalDate.parse(text);
        } catch (java.time.format.DateTimeParseException e) {
            throw new Refusal(option + " is \"" + text + "\"; a day is written 2026-03-02.");
        }
    }

    static boolean isWorkbook(Path file) {
        return file.toString().toLowerCase(Locale.ROOT).endsWith(".xlsx");
    }

    /** A table of coefficients out of a CSV file or a workbook's first page. */
    static CoefficientTable coefficients(Path file, Shared.Units unit) {
        String said = unit == null ? null : unit.name().toLowerCase(Locale.ROOT);
        return isWorkbook(file)
                ? CoefficientTable.of(file.toString(), FirstPage.cells(file), said)
                : CoefficientTable.read(file, said);
    }
}
