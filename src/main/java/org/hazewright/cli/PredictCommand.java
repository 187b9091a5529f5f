package org.hazewright.cli;

import java.io.PrintWriter;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.concurrent.Callable;
import org.hazewright.files.RecipeReader;
import org.hazewright.files.RecipeTable;
import org.hazewright.files.SafeFile;
import org.hazewright.mixture.Budget;
import org.hazewright.mixture.Coefficients;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Recipe;
import org.hazewright.optics.Figures;
import org.hazewright.optics.Refusal;
import org.hazewright.picture.SpectraPicture;
import org.hazewright.shelf.Shelf;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** From grams to coefficients: what a recipe or a batch does to light. */
@Command(
        name = "predict",
        description = {
            "Shows µa, µs', µs, g and n of a recipe or batch with their standard uncertainties.",
            "Example: hazewright predict out/wrist-bath.recipe.toml --from 600 --to 900 --step 50"
        })
final class PredictCommand implements Callable<Integer> {
    @Mixin
    private Shared shared;

    @Spec
    private CommandSpec spec;

    @Parameters(paramLabel = "RECIPE", description = "NAME.recipe.toml or NAME.batch.toml.")
    private Path recipe;

    @Option(
            names = "--at",
            paramLabel = "NM,NM,…",
            hideParamSyntax = true,
            split = ",",
            description = "Wavelengths in nm, with commas between.")
    private double[] at;

    @Option(names = "--from", paramLabel = "NM", description = "First wavelength in nm of a range.")
    private Double from;

    @Option(names = "--to", paramLabel = "NM", description = "Last wavelength in nm of a range.")
    private Double to;

    @Option(names = "--step", paramLabel = "NM", description = "Step of the range in nm (default: ${DEFAULT-VALUE}).")
    private double step = 10;

    @Option(
            names = "--picture",
            paramLabel = "FILE",
            description = "Draw both spectra with their 95 %% band and each ingredient's share, as .png or .svg.")
    private Path picture;

    @Option(names = "--csv", paramLabel = "FILE", description = "Also write these rows as a table, in 1/cm.")
    private Path csv;

    @Option(names = "--grams-csv", paramLabel = "FILE", description = "Also write what is weighed as a table.")
    private Path gramsCsv;

    @Override
    public Integer call() {
        Shelf shelf = shared.shelf();
        Recipe made = RecipeReader.read(recipe, shelf);
        Mixture mixture = Mixture.of(made);
        double[] nm = Wavelengths.of(at, from, to, step, mixture);
        double capacity = Double.MAX_VALUE;
        Budget budget = Budget.of(made, nm, capacity);
        double[] uMua = budget.uMuaPerCm();
        double[] uMusp = budget.uMuspPerCm();
        PrintWriter out = spec.commandLine().getOut();
        if (shared.json) json(mixture, nm, uMua, uMusp).print(out);
        else text(made, mixture, nm, uMua, uMusp, out);
        if (picture != null) draw(made, mixture, out);
        if (csv != null) table(csv, RecipeTable.coefficients(mixture, nm, uMua, uMusp), out);
        if (gramsCsv != null) table(gramsCsv, RecipeTable.grams(made, mixture), out);
        return Hazewright.DONE;
    }

    private void table(Path file, String text, PrintWriter out) {
        String kept = ExportedFile.write(file, text);
        if (!shared.json && !shared.quiet) out.println("Written: " + file + kept);
    }

    /** The picture always shows a range: the one asked for, or all that the ingredients share, every 5 nm. */
    private void draw(Recipe made, Mixture mixture, PrintWriter out) {
        double[] range = from != null
                ? Wavelengths.of(null, from, to, Math.min(step, 5), mixture)
                : Wavelengths.covered(mixture, 5);
        SafeFile.write(
                picture,
                SpectraPicture.of(
                        made, range, picture.getFileName().toString(), shared.units.of(1), shared.units.sign()),
                SafeFile.Overwrite.KEEP_PREVIOUS);
        if (!shared.json && !shared.quiet) out.println("Written: " + picture);
    }

    private static Json json(Mixture mixture, double[] nm, double[] uMua, double[] uMusp) {
        List<Map<String, Object>> rows = new ArrayList<>();
        for (int j = 0; j < nm.length; j++) {
            Coefficients c = mixture.at(nm[j]);
            rows.add(Json.object()
                    .with("wavelength_nm", nm[j])
                    .with("mua_per_cm", c.muaPerCm())
                    .with("musp_per_cm", c.muspPerCm())
                    .with("mus_per_cm", c.musPerCm())
                    .with("g", c.g())
                    .with("n", c.boundaryIndex())
                    .with("u_mua_per_cm", uMua[j])
                    .with("u_musp_per_cm", uMusp[j])
                    .fields());
        }
        return Json.object()
                .with("volume_ml", mixture.volumeMl())
                .with("density_g_per_ml", mixture.densityGPerMl())
                .with("rows", rows);
    }

    private void text(Recipe made, Mixture mixture, double[] nm, double[] uMua, double[] uMusp, PrintWriter out) {
        out.println(made.title());
        out.println(made.base().name() + ", " + Figures.significant(mixture.volumeMl(), 5) + " mL, "
                + Figures.significant(mixture.densityGPerMl(), 4) + " g/mL, at " + Figures.plain(mixture.temperatureC())
                + " °C");
        out.println();
        TextTable table = new TextTable("  ", "rrrrrr");
        String unit = " " + shared.units.sign();
        table.row("nm", "µa" + unit, "µs'" + unit, "µs" + unit, "g", "n");
        for (int j = 0; j < nm.length; j++) {
            Coefficients c = mixture.at(nm[j]);
            table.row(
                    Figures.plain(nm[j]),
                    Figures.withUncertainty(shared.units.of(c.muaPerCm()), shared.units.of(uMua[j])),
                    Figures.withUncertainty(shared.units.of(c.muspPerCm()), shared.units.of(uMusp[j])),
                    Figures.significant(shared.units.of(c.musPerCm()), 4),
                    Figures.fixed(c.g(), 4),
                    Figures.fixed(c.boundaryIndex(), 4));
        }
        table.print(out);
        out.println("  ±: standard uncertainty (k = 1)");
    }

    /** The wavelengths that were asked for, or the range that every ingredient covers, every 50 nm. */
    static final class Wavelengths {
        private static final int MOST = 5000;

        private Wavelengths() {}

        static double[] of(double[] at, Double from, Double to, double step, Mixture mixture) {
            if (at != null && (from != null || to != null))
                throw new Refusal("Give either --at, or --from and --to, not both.");
            if (at != null) {
                for (double nm : at) Refusal.positive("--at wavelength in nm", nm);
                return at;
            }
            if (from == null && to == null) return covered(mixture, 50);
            if (from == null || to == null)
                throw new Refusal("A range needs both --from and --to, in nm; " + (from == null ? "--from" : "--to")
                        + " is missing.");
            Refusal.positive("--from in nm", from);
            Refusal.positive("--to in nm", to);
            Refusal.positive("--step in nm", step);
            if (to < from) throw new Refusal("--to is " + to + " nm, below --from, " + from + " nm.");
            double count = Math.floor((to - from) / step + 1e-9) + 1;
            if (count > MOST)
                throw new Refusal("That range has " + (long) count + " wavelengths; at most " + MOST + ".");
            double[] nm = new double[(int) count];
            for (int j = 0; j < nm.length; j++) nm[j] = from + j * step;
            return nm;
        }

        private static double[] covered(Mixture mixture, double step) {
            double[] nm = java.util.stream.IntStream.rangeClosed((int) (400 / step), (int) (1100 / step))
                    .mapToDouble(k -> step * k)
                    .filter(x -> {
                        try {
                            mixture.requireFigures(x);
                            return true;
                        } catch (Refusal outside) {
                            return false;
                        }
                    })
                    .toArray();
            if (nm.length == 0)
                throw new Refusal("The ingredients of this recipe share no wavelength between 400 and 1100 nm;"
                        + " say which with --at.");
            return nm;
        }
    }
}
