package org.hazewright.cli;

import java.io.PrintWriter;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.Callable;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Brief;
import org.hazewright.brief.SearchLimits;
import org.hazewright.brief.Target;
import org.hazewright.files.BriefWriter;
import org.hazewright.files.CoefficientTable;
import org.hazewright.files.SafeFile;
import org.hazewright.optics.Figures;
import org.hazewright.optics.Refusal;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** Somebody's table of wanted values to a brief. */
@Command(
        name = "targets",
        description = {
            "Reads wanted values from a CSV file or a workbook, shows how they are understood, and writes a brief of them with --out.",
            "Example: hazewright targets wanted.csv --base water --batch-ml 500 --out bath.brief.toml"
        })
final class TargetsCommand implements Callable<Integer> {
    @Mixin
    private Shared shared;

    @Spec
    private CommandSpec spec;

    @Parameters(
            paramLabel = "TABLE",
            description = "Wavelength, µa, µs', tolerances where there are any; per cm or per mm.")
    private Path table;

    @Option(names = "--table-unit", paramLabel = "cm|mm", description = "Unit of a table whose headings name none.")
    private Shared.Units tableUnit;

    @Option(names = "--base", paramLabel = "BASE", description = "Base of the phantom (default: ${DEFAULT-VALUE}).")
    private String base = "water";

    @Option(names = "--batch-ml", paramLabel = "ML", description = "How much to make (default: ${DEFAULT-VALUE}).")
    private double batchMl = 250;

    @Option(
            names = "--tolerance",
            paramLabel = "MUA,MUSP",
            split = ",",
            description = "Half-widths of values that state none, as shares (default: 0.05,0.05).")
    private double[] tolerance = {0.05, 0.05};

    @Option(names = "--out", paramLabel = "FILE", description = "Brief to write: NAME.brief.toml.")
    private Path out;

    @Override
    public Integer call() {
        if (tolerance.length != 2)
            throw new Refusal("--tolerance takes two shares with a comma between, as in 0.05,0.05.");
        PrintWriter print = spec.commandLine().getOut();
        CoefficientTable read = BatchCommand.coefficients(table, tableUnit);
        List<Target> targets = read.targets(tolerance[0], tolerance[1]);
        for (String line : read.understood()) print.println("  " + line);
        TextTable shown = new TextTable("  ", "rlrl");
        for (Target t : targets) {
            t.muaPerCm()
                    .ifPresent(v ->
                            shown.row(Figures.plain(t.wavelengthNm()), "µa", value(v, t.muaTolerancePerCm()), "/cm"));
            t.muspPerCm()
                    .ifPresent(v ->
                            shown.row(Figures.plain(t.wavelengthNm()), "µs'", value(v, t.muspTolerancePerCm()), "/cm"));
        }
        shown.print(print);
        if (out == null) {
            print.println("Nothing was written; say --out NAME.brief.toml to make a brief of it.");
            return Hazewright.DONE;
        }
        shared.shelf().require(base);
        String name = out.getFileName().toString().replaceAll("\\.brief\\.toml$|\\.toml$", "");
        Brief brief = new Brief(
                name,
                name,
                List.of(base),
                batchMl,
                0,
                22,
                targets,
                List.of(),
                SearchLimits.USUAL,
                Balance.USUAL,
                Optional.empty(),
                Optional.empty());
        BriefWriter.write(out, brief, List.of(), () -> null, SafeFile.Overwrite.KEEP_PREVIOUS);
        if (!shared.quiet) print.println("Written: " + out);
        return Hazewright.DONE;
    }

    private static String value(double v, double tolerance) {
        return Figures.withUncertainty(v, tolerance);
    }
}
