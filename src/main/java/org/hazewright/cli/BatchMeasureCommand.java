package org.hazewright.cli;

import java.io.PrintWriter;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.OptionalDouble;
import java.util.concurrent.Callable;
import org.hazewright.batch.Batch;
import org.hazewright.batch.Measurement;
import org.hazewright.batch.Unweighed;
import org.hazewright.files.BatchReader;
import org.hazewright.files.CoefficientTable;
import org.hazewright.learning.MeasuredValue;
import org.hazewright.learning.Method;
import org.hazewright.learning.Quantity;
import org.hazewright.optics.Figures;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Shelf;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** Records what was measured. */
@Command(
        name = "measure",
        description = {
            "Records measured µa and µs' with their standard uncertainties, and says whether they agree.",
            "Example: hazewright batch measure bath-07.batch.toml --from measured.csv --method \"time-resolved fit\"",
            "Example: hazewright batch measure bath-07.batch.toml --method \"slab fit\" --value 690,0.101,0.002,9.9,0.2"
        })
final class BatchMeasureCommand implements Callable<Integer> {
    @Mixin
    private Shared shared;

    @Mixin
    private Recording recording;

    @Spec
    private CommandSpec spec;

    @Parameters(paramLabel = "BATCH", description = "NAME.batch.toml.")
    private Path file;

    @Option(
            names = "--from",
            paramLabel = "TABLE",
            description = "CSV file or workbook: wavelength, µa, µs', uncertainties.")
    private Path from;

    @Option(
            names = "--value",
            paramLabel = "NM,MUA,U,MUSP,U",
            description = "Values in 1/cm at one wavelength; leave empty what was not measured: 690,0.101,0.002,,")
    private List<String> values = List.of();

    @Option(names = "--table-unit", paramLabel = "cm|mm", description = "Unit of a table whose headings name none.")
    private Shared.Units tableUnit;

    @Option(
            names = "--u",
            paramLabel = "SHARE",
            description = "Standard uncertainty of values that state none, as a share.")
    private Double share;

    @Option(names = "--method", paramLabel = "WORDS", required = true, description = "How it was measured.")
    private String method;

    @Option(names = "--instrument", paramLabel = "WORDS", description = "Which instrument, in your words.")
    private String instrument = "";

    @Option(
            names = "--scale",
            paramLabel = "UMUA,UMUSP",
            split = ",",
            description = "Standard uncertainty of the method's scale of µa and of µs', as shares (default: 0,0).")
    private double[] scale = {0, 0};

    @Option(names = "--on", paramLabel = "DAY", description = "Day of measuring (default: today).")
    private String on;

    @Option(names = "--show-only", description = "Show how the table is understood, and change nothing.")
    private boolean showOnly;

    @Override
    public Integer call() {
        PrintWriter out = spec.commandLine().getOut();
        PrintWriter err = spec.commandLine().getErr();
        if (scale.length != 2) throw new Refusal("--scale takes two shares with a comma between, as in 0.03,0.02.");
        if (from == null && values.isEmpty())
            throw new Refusal("Say what was measured: --from TABLE, or --value NM,MUA,U,MUSP,U.");
        Shelf shelf = shared.shelf();
        Batch batch = BatchReader.read(file, shelf);
        List<MeasuredValue> measured = new ArrayList<>();
        if (from != null) {
            CoefficientTable table = BatchCommand.coefficients(from, tableUnit);
            measured.addAll(table.measured(share == null ? OptionalDouble.empty() : OptionalDouble.of(share)));
            if (!shared.json && !shared.quiet) shown(table, measured, out);
            if (showOnly) return Hazewright.DONE;
        }
        for (String v : values) measured.addAll(typed(v));
        Measurement m = new Measurement(
                BatchCommand.day(on, "--on"),
                new Method(method, scale[0], scale[1]),
                instrument,
                batch.correctionCount(),
                measured);
        Batch now = batch.withMeasured(m);
        BatchText text = new BatchText(now, shared.units, out);
        text.verdict(now.measured().get(now.measured().size() - 1));
        int status = recording.save(file, now, shared, out, err);
        if (shared.json) BatchJson.of(now).print(out);
        else {
            text.print();
            text.lots(shelf);
        }
        for (String gap : Unweighed.of(now)) err.println("hazewright: " + gap);
        return status;
    }

    private static void shown(CoefficientTable table, List<MeasuredValue> measured, PrintWriter out) {
        for (String line : table.understood()) out.println("  " + line);
        TextTable shown = new TextTable("  ", "rlrl");
        for (MeasuredValue v : measured)
            shown.row(
                    Figures.plain(v.wavelengthNm()),
                    v.quantity() == Quantity.ABSORPTION ? "µa" : "µs'",
                    Figures.withUncertainty(v.perCm(), v.uPerCm()),
                    "/cm");
        shown.print(out);
    }

    private static List<MeasuredValue> typed(String v) {
        String[] parts = v.split(",", -1);
        if (parts.length != 5)
            throw new Refusal("--value is \"" + v + "\"; it takes five entries with commas between, NM,MUA,U,MUSP,U, of"
                    + " which a pair may be empty: 690,0.101,0.002,,");
        double nm = number(parts[0], v);
        List<MeasuredValue> list = new ArrayList<>();
        for (int k = 0; k < 2; k++) {
            String value = parts[1 + 2 * k].strip();
            String u = parts[2 + 2 * k].strip();
            if (value.isEmpty() && u.isEmpty()) continue;
            list.add(new MeasuredValue(
                    k == 0 ? Quantity.ABSORPTION : Quantity.SCATTERING, nm, number(value, v), number(u, v)));
        }
        if (list.isEmpty()) throw new Refusal("--value \"" + v + "\" gives neither µa nor µs'.");
        return list;
    }

    private static double number(String s, String all) {
        try {
            return Double.parseDouble(s.strip());
        } catch (NumberFormatException e) {
            throw new Refusal("--value \"" + all + "\" holds \"" + s + "\" where a number must stand.");
        }
    }
}
