package org.hazewright.cli;

import java.io.PrintWriter;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.concurrent.Callable;
import java.util.stream.Stream;
import org.hazewright.bench.Batch;
import org.hazewright.bench.Grams;
import org.hazewright.bench.Heating;
import org.hazewright.bench.Measurement;
import org.hazewright.bench.Replan;
import org.hazewright.bench.Weighing;
import org.hazewright.brief.Brief;
import org.hazewright.files.BatchReader;
import org.hazewright.files.BatchTable;
import org.hazewright.files.BriefReader;
import org.hazewright.files.CoefficientTable;
import org.hazewright.files.FileNames;
import org.hazewright.files.RecipeReader;
import org.hazewright.files.SafeFile;
import org.hazewright.learning.MeasuredValue;
import org.hazewright.learning.Method;
import org.hazewright.learning.Quantity;
import org.hazewright.mixture.Recipe;
import org.hazewright.optics.Figures;
import org.hazewright.optics.Refusal;
import org.hazewright.sheet.FilledIn;
import org.hazewright.sheet.FirstPage;
import org.hazewright.shelf.Shelf;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.ParameterException;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** One making of a recipe, recorded in its own file and in the logbook. */
@Command(
        name = "batch",
        description = "One making of a recipe: opened, weighed, measured, shown; recorded in the logbook workbook.",
        synopsisSubcommandLabel = "COMMAND",
        subcommands = {
            BatchCommand.Open.class,
            BatchCommand.Weigh.class,
            BatchCommand.Measure.class,
            BatchCommand.Show.class,
        })
final class BatchCommand implements Runnable {
    @Spec
    private CommandSpec spec;

    @Option(names = "--help", usageHelp = true, description = "Show this help and end.")
    @SuppressWarnings("unused") // the parser asks it
    private boolean help;

    @Override
    public void run() {
        throw new ParameterException(spec.commandLine(), "Say what to do with it: open, weigh, measure or show.");
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

    /** Makes a batch of a recipe. */
    @Command(
            name = "open",
            description = {
                "Opens a batch of a recipe: NAME-DAY.batch.toml, nothing weighed yet.",
                "Example: hazewright batch open out/wrist-bath.recipe.toml --who \"optics bench\""
            })
    static final class Open implements Callable<Integer> {
        @Mixin
        private Shared shared;

        @Mixin
        private Recording recording;

        @Spec
        private CommandSpec spec;

        @Parameters(paramLabel = "RECIPE", description = "NAME.recipe.toml.")
        private Path recipe;

        @Option(
                names = "--brief",
                paramLabel = "BRIEF",
                description = "What was wanted (default: the brief beside the recipe that it answers).")
        private Path brief;

        @Option(names = "--id", paramLabel = "ID", description = "Names the batch for good (default: NAME-DAY).")
        private String id;

        @Option(names = "--who", paramLabel = "NAME", description = "Who makes it.")
        private String who = "";

        @Option(names = "--on", paramLabel = "DAY", description = "Day of making (default: today).")
        private String on;

        @Option(names = "--out", paramLabel = "DIR", description = "Folder for the batch (default: beside the recipe).")
        private Path folder;

        @Override
        public Integer call() {
            PrintWriter out = spec.commandLine().getOut();
            PrintWriter err = spec.commandLine().getErr();
            Shelf shelf = shared.shelf();
            if (RecipeReader.isBatch(recipe))
                throw new Refusal(recipe + " is a batch already; open a recipe, or go on with: hazewright batch weigh");
            Recipe plan = RecipeReader.read(recipe, shelf);
            Optional<Brief> wanted = wanted(plan);
            LocalDate day = day(on, "--on");
            String name = name();
            Path in = folder != null ? folder : recipe.toAbsolutePath().getParent();
            String chosen = id != null ? id : free(in, name + "-" + day);
            if (!chosen.matches("[\\p{L}\\p{N}][\\p{L}\\p{N}._ -]{0,79}"))
                throw new Refusal(
                        "--id is \"" + chosen + "\"; use letters, digits, dots, hyphens, underscores and blanks.");
            if (!FileNames.everywhere(chosen))
                throw new Refusal(
                        "--id is \"" + chosen + "\", which is no name for a file on every system: some keep it for a"
                                + " device, or take no dot or blank at the end. Choose another.");
            Path file = in.resolve(chosen + ".batch.toml");
            if (Files.exists(file))
                throw new Refusal(
                        file + " is there already; choose another --id, or go on with: hazewright batch weigh " + file);
            Batch batch = Batch.open(chosen, plan, wanted, who, day);
            if (wanted.isEmpty() && !shared.quiet)
                err.println(
                        "hazewright: no brief beside the recipe answers to it, so the batch does not know what is wanted; give it"
                                + " with --brief.");
            int status = recording.save(file, batch, shared, out, err);
            if (shared.json) BatchJson.of(batch).print(out);
            else new BatchText(batch, shared.units, out).weighings();
            return status;
        }

        private String name() {
            String n = recipe.getFileName().toString();
            for (String ending : new String[] {".recipe.toml", ".toml"})
                if (n.endsWith(ending)) return n.substring(0, n.length() - ending.length());
            return n;
        }

        private static String free(Path folder, String wish) {
            if (Files.notExists(folder.resolve(wish + ".batch.toml"))) return wish;
            int k = 2;
            while (Files.exists(folder.resolve(wish + "-" + k + ".batch.toml"))) k++;
            return wish + "-" + k;
        }

        private Optional<Brief> wanted(Recipe plan) {
            if (brief != null) return Optional.of(BriefReader.read(brief, shared.tissueSpectra()));
            if (plan.briefSha256().isEmpty()) return Optional.empty();
            Path beside = recipe.toAbsolutePath().getParent();
            List<Path> briefs = new ArrayList<>();
            try (Stream<Path> all = Files.list(beside)) {
                all.filter(p -> p.toString().endsWith(".brief.toml")).sorted().forEach(briefs::add);
            } catch (java.io.IOException e) {
                return Optional.empty();
            }
            for (Path p : briefs)
                try {
                    Brief b = BriefReader.read(p, shared.tissueSpectra());
                    if (b.sha256().equals(plan.briefSha256())) return Optional.of(b);
                } catch (Refusal notThisOne) {
                    continue;
                }
            return Optional.empty();
        }
    }

    /** Records grams as weighed. */
    @Command(
            name = "weigh",
            description = {
                "Records grams as weighed, one by one or from the filled-in sheet; later steps are planned anew to suit.",
                "Example: hazewright batch weigh bath-07.batch.toml --item 2 --grams 41.32",
                "Example: hazewright batch weigh bath-07.batch.toml --from wrist-bath.xlsx",
                "Example: hazewright batch weigh bath-07.batch.toml --vessel 512.3,498.1 --water-back 14.0"
            })
    static final class Weigh implements Callable<Integer> {
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
                if (!isWorkbook(from))
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

    /** Records what was measured. */
    @Command(
            name = "measure",
            description = {
                "Records measured µa and µs' with their standard uncertainties, and says whether they agree.",
                "Example: hazewright batch measure bath-07.batch.toml --from measured.csv --method \"time-resolved fit\"",
                "Example: hazewright batch measure bath-07.batch.toml --method \"slab fit\" --value 690,0.101,0.002,9.9,0.2"
            })
    static final class Measure implements Callable<Integer> {
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
                CoefficientTable table = coefficients(from, tableUnit);
                measured.addAll(table.measured(share == null ? OptionalDouble.empty() : OptionalDouble.of(share)));
                if (!shared.json && !shared.quiet) shown(table, measured, out);
                if (showOnly) return Hazewright.DONE;
            }
            for (String v : values) measured.addAll(typed(v));
            Measurement m = new Measurement(
                    day(on, "--on"),
                    new Method(method, scale[0], scale[1]),
                    instrument,
                    batch.correctionCount(),
                    measured);
            Batch now = batch.withMeasured(m);
            BatchText text = new BatchText(now, shared.units, out);
            text.verdict(m);
            int status = recording.save(file, now, shared, out, err);
            if (shared.json) BatchJson.of(now).print(out);
            else text.print();
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
                throw new Refusal(
                        "--value is \"" + v + "\"; it takes five entries with commas between, NM,MUA,U,MUSP,U, of"
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

    /** Shows a batch. */
    @Command(
            name = "show",
            description = {
                "Shows what was weighed, where it lands, what was measured, and whether the two agree.",
                "Example: hazewright batch show bath-07.batch.toml --csv bath-07.csv"
            })
    static final class Show implements Callable<Integer> {
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
            Batch batch = BatchReader.read(file, shared.shelf());
            if (csv != null) SafeFile.write(csv, BatchTable.text(batch), SafeFile.Overwrite.KEEP_PREVIOUS);
            if (shared.json) BatchJson.of(batch).print(out);
            else new BatchText(batch, shared.units, out).print();
            if (csv != null && !shared.json && !shared.quiet) out.println("Written: " + csv);
            return Hazewright.DONE;
        }
    }
}
