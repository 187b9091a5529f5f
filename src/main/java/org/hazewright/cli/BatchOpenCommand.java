package org.hazewright.cli;

import java.io.PrintWriter;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.concurrent.Callable;
import java.util.stream.Stream;
import org.hazewright.batch.Batch;
import org.hazewright.brief.Brief;
import org.hazewright.files.BriefReader;
import org.hazewright.files.FileNames;
import org.hazewright.files.RecipeReader;
import org.hazewright.mixture.Recipe;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Shelf;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** Makes a batch of a recipe. */
@Command(
        name = "open",
        description = {
            "Opens a batch of a recipe: NAME-DAY.batch.toml, nothing weighed yet.",
            "Example: hazewright batch open out/wrist-bath.recipe.toml --who \"optics bench\""
        })
final class BatchOpenCommand implements Callable<Integer> {
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
        LocalDate day = BatchCommand.day(on, "--on");
        String name = name();
        Path in = folder != null
                ? folder
                : Optional.ofNullable(recipe.getParent()).orElse(Path.of(""));
        String chosen = id != null ? id : free(in, name + "-" + day);
        if (!chosen.matches("[\\p{L}\\p{N}][\\p{L}\\p{N}._ -]{0,79}"))
            throw new Refusal(
                    "--id is \"" + chosen + "\"; use letters, digits, dots, hyphens, underscores and blanks.");
        if (!FileNames.everywhere(chosen))
            throw new Refusal("--id is \"" + chosen
                    + "\", which is no name for a file on every system: some keep it for a device, or take no dot or blank at"
                    + " the end. Choose another.");
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
