package org.hazewright.cli;

import java.io.PrintWriter;
import java.nio.file.Path;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.List;
import java.util.concurrent.Callable;
import org.hazewright.bench.SeriesPlan;
import org.hazewright.bench.TitrationPlan;
import org.hazewright.brief.Series;
import org.hazewright.files.RecipeWriter;
import org.hazewright.files.SafeFile;
import org.hazewright.files.SeriesReader;
import org.hazewright.mixture.Recipe;
import org.hazewright.sheet.RecipeSheet;
import org.hazewright.sheet.SeriesSheet;
import org.hazewright.sheet.TitrationSheet;
import org.hazewright.shelf.Shelf;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.ParentCommand;
import picocli.CommandLine.Spec;

/** A whole set of phantoms from one brief: shared stocks, one weighing table, what to buy; or a titration in one vessel. */
@Command(
        name = "series",
        description = {
            "Plans a set of phantoms with one list of bottles and shared stocks, or a titration in one vessel.",
            "Prints it, and writes NAME.series.xlsx and one recipe for each phantom.",
            "Example: hazewright series recipes-demo/oximeter-set.brief.toml --out out"
        })
final class SeriesCommand implements Callable<Integer> {
    @Mixin
    private Shared shared;

    @Spec
    private CommandSpec spec;

    @ParentCommand
    private Hazewright program;

    @Parameters(paramLabel = "BRIEF", description = "What is wanted: a grid, rows of phantoms, or a titration.")
    private Path brief;

    @Option(names = "--out", paramLabel = "DIR", description = "Folder for the results (default: beside the brief).")
    private Path out;

    @Override
    public Integer call() {
        PrintWriter text = spec.commandLine().getOut();
        RecipeSheet.getReady();
        Shelf shelf = shared.shelf();
        Series series = SeriesReader.read(brief, shared.tissueSpectra());
        LongWork work = new LongWork(spec.commandLine().getErr(), shared.quiet || shared.json, program.interruption);
        LocalDate today = LocalDate.now();
        Path folder = out != null ? out : brief.toAbsolutePath().getParent();
        return series.titration().isPresent()
                ? titration(TitrationPlan.of(series, shelf, work::stop, work::progress), today, folder, text)
                : set(SeriesPlan.of(series, shelf, work::stop, work::progress), today, folder, text);
    }

    private int set(SeriesPlan plan, LocalDate today, Path folder, PrintWriter text) {
        List<Path> written = new ArrayList<>();
        for (SeriesPlan.Phantom p : plan.phantoms()) write(p.brief().name(), p.recipe(), folder, written);
        sheet(plan.series().name(), SeriesSheet.write(plan, today), folder, written);
        if (shared.json) SeriesJson.of(plan).print(text);
        else {
            new SeriesText(plan, shared.units, text).print(today);
            if (!shared.quiet) told(written, text);
        }
        return plan.meets() ? Hazewright.DONE : Hazewright.MISSES;
    }

    private int titration(TitrationPlan plan, LocalDate today, Path folder, PrintWriter text) {
        List<Path> written = new ArrayList<>();
        String name = plan.series().name();
        write(name + "-bath", plan.start(), folder, written);
        write(name + "-titrant", plan.titrant(), folder, written);
        sheet(name, TitrationSheet.write(plan, today), folder, written);
        if (shared.json) TitrationText.json(plan).print(text);
        else {
            new TitrationText(plan, shared.units, text).print(today);
            if (!shared.quiet) told(written, text);
        }
        return plan.meets() ? Hazewright.DONE : Hazewright.MISSES;
    }

    private static void write(String name, Recipe recipe, Path folder, List<Path> written) {
        Path file = folder.resolve(name + ".recipe.toml");
        RecipeWriter.write(file, recipe, SafeFile.Overwrite.KEEP_PREVIOUS);
        written.add(file);
    }

    private static void sheet(String name, byte[] workbook, Path folder, List<Path> written) {
        Path file = folder.resolve(name + ".series.xlsx");
        SafeFile.write(file, workbook, SafeFile.Overwrite.KEEP_PREVIOUS);
        written.add(file);
    }

    private static void told(List<Path> written, PrintWriter text) {
        Path last = written.get(written.size() - 1);
        int recipes = written.size() - 1;
        if (recipes > 4)
            text.println("Written: " + recipes + " recipes, " + written.get(0) + " to "
                    + written.get(recipes - 1).getFileName());
        else written.subList(0, recipes).forEach(p -> text.println("Written: " + p));
        text.println("Written: " + last);
    }
}
