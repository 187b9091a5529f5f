package org.hazewright.cli;

import java.io.PrintWriter;
import java.nio.file.Path;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.concurrent.Callable;
import org.hazewright.files.DilutionReader;
import org.hazewright.files.LotWriter;
import org.hazewright.files.SafeFile;
import org.hazewright.learning.DilutionFit;
import org.hazewright.learning.DilutionSeries;
import org.hazewright.learning.Extinction;
import org.hazewright.learning.NewLot;
import org.hazewright.mixture.Mixture;
import org.hazewright.optics.Figures;
import org.hazewright.optics.Refusal;
import org.hazewright.picture.SeriesPicture;
import org.hazewright.sheet.FirstPage;
import org.hazewright.shelf.Absorption;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Part;
import org.hazewright.shelf.Shelf;
import org.hazewright.shelf.Source;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** A dilution series to a lot file. */
@Command(
        name = "fit",
        description = {
            "Fits a dilution series, read in collimated transmission or as absorbance, and writes a lot file with a picture beside it.",
            "Columns: concentration_g_per_ml or mass_fraction, path_mm, wavelength_nm, transmission or absorbance, and u.",
            "Example: hazewright lot fit ink-series.csv --of ink-demo --number 03 --out ingredients"
        })
final class LotFitCommand implements Callable<Integer> {
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
            description = "Uncertainty that all dilutions share: their stock, the cell (default: ${DEFAULT-VALUE}).")
    private double uCommon = 0.005;

    @Option(names = "--on", paramLabel = "DAY", description = "Day of the series (default: today).")
    private String on;

    @Option(names = "--out", paramLabel = "DIR", description = "Folder of the shelf (default: the shelf in use).")
    private Path out;

    @Override
    public Integer call() {
        Shelf shelf = shared.shelf();
        Ingredient parent = shelf.require(of);
        if (!LotWriter.canBeLot(parent)) throw new Refusal(of + " is a base; lots are fitted of what is added to one.");
        Ingredient water = shelf.require(diluent);
        boolean scatterer =
                parent.part() == Part.SCATTERER && parent.scattering().isPresent();
        double share = albedo != null
                ? albedo
                : scatterer ? 1 : parent.absorption().map(Absorption::albedo).orElse(0.0);
        double uShare = share == 0 || share == 1 ? 0 : uAlbedo;
        DilutionReader.About about = new DilutionReader.About(parent, water.densityGPerMl(), share, uShare, uCommon);
        DilutionSeries read = BatchCommand.isWorkbook(series)
                ? DilutionReader.read(FirstPage.table(series), about)
                : DilutionReader.read(series, about);
        DilutionFit fit = read.fit();
        LocalDate day = BatchCommand.day(on, "--on");
        Source source = new Source(
                Source.Basis.MEASURED,
                "Dilution series " + series.getFileName() + " in " + diluent + " of " + day
                        + ", fitted with the shelf's " + of + ".");
        NewLot fresh = new NewLot(LotWriter.id(parent.kind(), number), LotCommand.lot(parent, number), source);
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
        Path folder = LotCommand.folder(out, shared);
        List<Path> written = new ArrayList<>(LotWriter.write(folder, lot, fit.warnings()));
        System.setProperty("java.awt.headless", "true");
        Path picture = folder.resolve(lot.id() + "-series.png");
        SafeFile.write(picture, SeriesPicture.png(fit), SafeFile.Overwrite.KEEP_PREVIOUS);
        written.add(picture);
        print(fit, strength, written);
        return Hazewright.DONE;
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
