package org.hazewright.cli;

import java.io.PrintWriter;
import java.nio.file.Path;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.concurrent.Callable;
import org.hazewright.bench.Batch;
import org.hazewright.bench.Measurement;
import org.hazewright.files.BatchReader;
import org.hazewright.files.DilutionReader;
import org.hazewright.files.LotWriter;
import org.hazewright.files.SafeFile;
import org.hazewright.learning.DilutionFit;
import org.hazewright.learning.DilutionSeries;
import org.hazewright.learning.Drift;
import org.hazewright.learning.Extinction;
import org.hazewright.learning.Factor;
import org.hazewright.learning.Factors;
import org.hazewright.learning.LotFlag;
import org.hazewright.learning.LotUpdate;
import org.hazewright.learning.MeasuredBatch;
import org.hazewright.learning.NewLot;
import org.hazewright.learning.Quantity;
import org.hazewright.mixture.Mixture;
import org.hazewright.optics.Figures;
import org.hazewright.optics.Refusal;
import org.hazewright.picture.SeriesPicture;
import org.hazewright.sheet.FirstPage;
import org.hazewright.shelf.Absorption;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Lot;
import org.hazewright.shelf.Part;
import org.hazewright.shelf.Shelf;
import org.hazewright.shelf.Source;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.ParameterException;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** What a measurement makes of a bottle. */
@Command(
        name = "lot",
        description = "A lot file from a dilution series, or from measured batches.",
        synopsisSubcommandLabel = "COMMAND",
        subcommands = {LotCommand.Fit.class, LotCommand.Update.class})
final class LotCommand implements Runnable {
    @Spec
    private CommandSpec spec;

    @Option(names = "--help", usageHelp = true, description = "Show this help and end.")
    @SuppressWarnings("unused") // the parser asks it
    private boolean help;

    @Override
    public void run() {
        throw new ParameterException(spec.commandLine(), "Say what to do: fit or update.");
    }

    private static Path folder(Path out, Shared shared) {
        if (out != null) return out;
        if (shared.shelfFolder() != null) return shared.shelfFolder();
        throw new Refusal(
                "The shelf that comes with the program cannot be written to; say --out DIR, or --ingredients with a"
                        + " shelf of your own.");
    }

    /** The number of a lot whose file is written anew. */
    private static Lot lot(Ingredient of, String number) {
        Optional<Lot> old = of.lot();
        return new Lot(
                of.kind(), number, old.flatMap(Lot::received), old.flatMap(Lot::opened), old.flatMap(Lot::expires));
    }

    /** A dilution series to a lot file. */
    @Command(
            name = "fit",
            description = {
                "Fits a dilution series, read in collimated transmission or as absorbance, and writes a lot file with a picture.",
                "Columns: concentration_g_per_ml or mass_fraction, path_mm, wavelength_nm, transmission or absorbance, and u.",
                "Example: hazewright lot fit ink-series.csv --of ink-demo --number 03 --out ingredients"
            })
    static final class Fit implements Callable<Integer> {
        @Mixin
        private Shared shared;

        @Spec
        private CommandSpec spec;

        @Parameters(paramLabel = "SERIES", description = "CSV file or workbook with one row a reading.")
        private Path series;

        @Option(names = "--of", paramLabel = "INGREDIENT", required = true, description = "What was diluted.")
        private String of;

        @Option(names = "--number", paramLabel = "NUMBER", required = true, description = "Number of the lot.")
        private String number;

        @Option(names = "--diluent", paramLabel = "INGREDIENT", description = "In what (default: ${DEFAULT-VALUE}).")
        private String diluent = "water";

        @Option(
                names = "--albedo",
                paramLabel = "SHARE",
                description = "Share of the extinction that is scattering (default: the ingredient's; a scatterer: 1).")
        private Double albedo;

        @Option(
                names = "--u-albedo",
                paramLabel = "U",
                description = "Its standard uncertainty (default: ${DEFAULT-VALUE}).")
        private double uAlbedo = 0.02;

        @Option(
                names = "--u-common",
                paramLabel = "SHARE",
                description =
                        "Uncertainty that all dilutions share: their stock, the cell (default: ${DEFAULT-VALUE}).")
        private double uCommon = 0.005;

        @Option(names = "--on", paramLabel = "DAY", description = "Day of the series (default: today).")
        private String on;

        @Option(names = "--out", paramLabel = "DIR", description = "Folder of the shelf (default: the shelf in use).")
        private Path out;

        @Override
        public Integer call() {
            Shelf shelf = shared.shelf();
            Ingredient parent = shelf.require(of);
            if (!LotWriter.canBeLot(parent))
                throw new Refusal(of + " is a base; lots are fitted of what is added to one.");
            Ingredient water = shelf.require(diluent);
            boolean scatterer =
                    parent.part() == Part.SCATTERER && parent.scattering().isPresent();
            double share = albedo != null
                    ? albedo
                    : scatterer
                            ? 1
                            : parent.absorption().map(Absorption::albedo).orElse(0.0);
            double uShare = share == 0 || share == 1 ? 0 : uAlbedo;
            DilutionReader.About about =
                    new DilutionReader.About(parent, water.densityGPerMl(), share, uShare, uCommon);
            DilutionSeries read = BatchCommand.isWorkbook(series)
                    ? DilutionReader.read(FirstPage.table(series), about)
                    : DilutionReader.read(series, about);
            DilutionFit fit = read.fit();
            LocalDate day = BatchCommand.day(on, "--on");
            Source source = new Source(
                    Source.Basis.MEASURED,
                    "Dilution series " + series.getFileName() + " in " + diluent + " of " + day
                            + ", fitted with the shelf's " + of + ".");
            NewLot fresh = new NewLot(LotWriter.id(parent.kind(), number), lot(parent, number), source);
            Ingredient lot;
            String strength;
            if (scatterer) {
                double n = new Mixture(Map.of(water, 1.0), 22)
                        .hostIndex(fit.wavelengths().get(0).wavelengthNm());
                DilutionFit.Magnitude m = fit.magnitudeOf(parent, n, 22);
                lot = fresh.scatterer(parent, m);
                strength = "Measured over modelled: " + Figures.withUncertainty(m.ratio(), m.u()) + "; the shape "
                        + (m.pValue() < 0.05 ? "does NOT agree" : "agrees") + " (χ² "
                        + Figures.significant(m.chiSquared(), 3)
                        + " of " + m.degreesOfFreedom() + ").";
            } else {
                lot = fresh.absorber(
                        parent, fit, parent.absorption().map(Absorption::g).orElse(0.0));
                strength = "Relative standard uncertainty " + Figures.significant(100 * fit.relativeU(), 2)
                        + " %, of which " + Figures.significant(100 * fit.shared(), 2) + " % from the dilutions.";
            }
            Path folder = folder(out, shared);
            List<Path> written = new ArrayList<>(LotWriter.write(folder, lot, fit.warnings()));
            System.setProperty("java.awt.headless", "true");
            Path picture = series.resolveSibling(name(series) + ".png");
            SafeFile.write(picture, SeriesPicture.png(fit), SafeFile.Overwrite.KEEP_PREVIOUS);
            written.add(picture);
            print(fit, strength, written);
            return Hazewright.DONE;
        }

        private static String name(Path file) {
            String n = file.getFileName().toString();
            int dot = n.lastIndexOf('.');
            return dot > 0 ? n.substring(0, dot) : n;
        }

        private void print(DilutionFit fit, String strength, List<Path> written) {
            PrintWriter print = spec.commandLine().getOut();
            if (shared.json) {
                List<Map<String, Object>> rows = new ArrayList<>();
                for (Extinction e : fit.wavelengths())
                    rows.add(Json.object()
                            .with("wavelength_nm", e.wavelengthNm())
                            .with("extinction_cm2_per_g", e.cm2PerG())
                            .with("u_cm2_per_g", e.uCm2PerG())
                            .with("intercept_per_cm", e.line().intercept())
                            .with("u_intercept_per_cm", e.line().uIntercept())
                            .with("chi_squared", e.line().chiSquared())
                            .with("bends", e.bends())
                            .fields());
                Json.object()
                        .with("format", 1)
                        .with("rows", rows)
                        .with("relative_u", fit.relativeU())
                        .with("warnings", fit.warnings())
                        .with("written", written.stream().map(Path::toString).toList())
                        .print(print);
                return;
            }
            TextTable table = new TextTable("  ", "rrrrl");
            table.row("nm", "extinction cm²/g", "intercept /cm", "readings", "straight");
            for (Extinction e : fit.wavelengths())
                table.row(
                        Figures.plain(e.wavelengthNm()),
                        Figures.withUncertainty(e.cm2PerG(), e.uCm2PerG()),
                        Figures.withUncertainty(e.line().intercept(), e.line().uIntercept()),
                        Integer.toString(e.readings().size()),
                        e.linearity().isEmpty() ? "not tested" : e.bends() ? "BENDS" : "yes");
            table.print(print);
            print.println("  " + strength);
            for (String warning : fit.warnings()) print.println("Mind: " + warning);
            if (!shared.quiet) written.forEach(p -> print.println("Written: " + p));
        }
    }

    /** Measured batches to lot files. */
    @Command(
            name = "update",
            description = {
                "Learns from measured batches what is in the bottles, and writes a lot file for each bottle that they say something of.",
                "Example: hazewright lot update bath-07.batch.toml bath-08.batch.toml --out ingredients"
            })
    static final class Update implements Callable<Integer> {
        @Mixin
        private Shared shared;

        @Spec
        private CommandSpec spec;

        @Parameters(paramLabel = "BATCH", arity = "1..*", description = "Measured batches.")
        private List<Path> files;

        @Option(
                names = "--of",
                paramLabel = "INGREDIENT",
                description = "Only this bottle, by the id of its ingredient.")
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
            Path folder = folder(out, shared);
            List<Path> written = new ArrayList<>();
            List<String> flags = new ArrayList<>();
            for (Ingredient i : bottles) {
                LotFlag.of(i, last, drifts).forEach(f -> flags.add(f.sentence()));
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
                NewLot lot = new NewLot(LotWriter.id(i.kind(), fresh), lot(i, fresh), source);
                written.addAll(LotWriter.write(folder, lot.learned(i, update.after()), flags(flags, i)));
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

        private static List<String> flags(List<String> flags, Ingredient i) {
            return flags.stream().filter(f -> f.startsWith(i.id())).toList();
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
}
