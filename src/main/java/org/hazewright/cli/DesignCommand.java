package org.hazewright.cli;

import java.io.PrintWriter;
import java.nio.file.Path;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.List;
import java.util.concurrent.Callable;
import org.hazewright.bench.Answer;
import org.hazewright.bench.Answering;
import org.hazewright.bench.Warnings;
import org.hazewright.brief.Brief;
import org.hazewright.files.BriefReader;
import org.hazewright.files.RecipeWriter;
import org.hazewright.files.SafeFile;
import org.hazewright.sheet.RecipeSheet;
import org.hazewright.shelf.Shelf;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** From a brief to grams: prints the recipe and writes it as a file and a sheet. */
@Command(
        name = "design",
        description = {
            "Finds the best recipe for a brief, prints it, and writes NAME.recipe.toml and NAME.xlsx.",
            "Example: hazewright design recipes-demo/wrist-bath.brief.toml --out out"
        })
final class DesignCommand implements Callable<Integer> {
    @Mixin
    private Shared shared;

    @Spec
    private CommandSpec spec;

    @Parameters(paramLabel = "BRIEF", description = "What is wanted: NAME.brief.toml.")
    private Path brief;

    @Option(names = "--out", paramLabel = "DIR", description = "Folder for the results (default: beside the brief).")
    private Path out;

    @Option(
            names = "--alternatives",
            paramLabel = "N",
            description = "Other recipes to show, 0 to 10 (default: ${DEFAULT-VALUE}).")
    private int alternatives = 3;

    @Override
    public Integer call() {
        if (alternatives < 0 || alternatives > 10)
            throw new org.hazewright.optics.Refusal(
                    "--alternatives is " + alternatives + "; it must be a whole number from 0 to 10.");
        RecipeSheet.getReady();
        PrintWriter text = spec.commandLine().getOut();
        Shelf shelf = shared.shelf();
        Brief wanted = BriefReader.read(brief, shared.tissueSpectra());
        Answer answer = Answering.to(wanted, shelf, alternatives);
        LocalDate today = LocalDate.now();
        Path folder = out != null ? out : brief.toAbsolutePath().getParent();
        List<Path> written = write(answer, today, folder);
        if (shared.json) DesignJson.of(answer).print(text);
        else {
            new DesignText(answer, shared.units, text).print(Warnings.of(answer.recipe(), today));
            if (!shared.quiet) written.forEach(p -> text.println("Written: " + p));
        }
        return answer.meets() ? Hazewright.DONE : Hazewright.MISSES;
    }

    private static List<Path> write(Answer answer, LocalDate today, Path folder) {
        String name = answer.brief().name();
        List<Path> written = new ArrayList<>();
        Path recipe = folder.resolve(name + ".recipe.toml");
        RecipeWriter.write(recipe, answer.recipe(), SafeFile.Overwrite.KEEP_PREVIOUS);
        written.add(recipe);
        Path sheet = folder.resolve(name + ".xlsx");
        SafeFile.write(sheet, RecipeSheet.write(answer, today), SafeFile.Overwrite.KEEP_PREVIOUS);
        written.add(sheet);
        return written;
    }
}
