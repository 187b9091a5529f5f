package org.hazewright.cli;

import java.io.PrintWriter;
import java.nio.file.Path;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.concurrent.Callable;
import org.hazewright.bench.Answer;
import org.hazewright.bench.Answering;
import org.hazewright.bench.Warnings;
import org.hazewright.brief.Brief;
import org.hazewright.files.BriefReader;
import org.hazewright.files.RecipeWriter;
import org.hazewright.files.SafeFile;
import org.hazewright.files.WriteFailure;
import org.hazewright.optics.Refusal;
import org.hazewright.reading.HaemoglobinEquivalent;
import org.hazewright.sheet.InstrumentReadings;
import org.hazewright.sheet.RecipeSheet;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.ParentCommand;
import picocli.CommandLine.Spec;

/** From briefs to grams: prints each recipe and writes it as a file and a sheet. */
@Command(
        name = "design",
        description = {
            "Finds the best recipe for a brief, prints it, and writes the recipe and its sheet.",
            "Several briefs are worked side by side; one that fails does not stop the rest.",
            "Example: hazewright design recipes-demo/wrist-bath.brief.toml --out out"
        })
final class DesignCommand implements Callable<Integer> {
    @Mixin
    private Shared shared;

    @Spec
    private CommandSpec spec;

    @ParentCommand
    private Hazewright program;

    @Parameters(arity = "1..*", paramLabel = "BRIEF", description = "What is wanted: NAME.brief.toml, one or several.")
    private List<Path> briefs;

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
            throw new Refusal("--alternatives is " + alternatives + "; it must be a whole number from 0 to 10.");
        RecipeSheet.getReady();
        PrintWriter text = spec.commandLine().getOut();
        PrintWriter err = spec.commandLine().getErr();
        LongWork work = new LongWork(err, shared.quiet || shared.json, program.interruption);
        LocalDate today = LocalDate.now();
        if (briefs.size() == 1) return print(done(briefs.get(0), work, today), today, text);
        refuseSameResults();
        List<Outcome> outcomes =
                briefs.parallelStream().map(b -> outcome(b, work, today)).toList();
        return shared.json ? printTogether(outcomes, text, err) : printEach(outcomes, today, text, err);
    }

    /** A brief answered, with the files that were written. */
    private record Done(Answer answer, Optional<HaemoglobinEquivalent> blood, List<Path> written) {
        int status() {
            return answer.meets() ? Hazewright.DONE : Hazewright.MISSES;
        }
    }

    /** What became of one of several briefs: done, or the problem that ended it. */
    private record Outcome(Path brief, Done done, Exception problem) {}

    private Done done(Path brief, LongWork work, LocalDate today) {
        Brief wanted = BriefReader.read(brief, shared.tissueSpectra());
        Answer answer = answer(wanted, work);
        Optional<HaemoglobinEquivalent> blood = InstrumentReadings.haemoglobin(answer, shared.tissueSpectra());
        return new Done(answer, blood, write(answer, today, folder(brief)));
    }

    /** A brief that names its bottles needs only those; when it is refused, the whole shelf says best what would mend it. */
    private Answer answer(Brief wanted, LongWork work) {
        try {
            return Answering.to(wanted, shared.shelfFor(wanted), alternatives, work::stop, work::progress);
        } catch (Refusal refusal) {
            if (wanted.limits().use().isEmpty()) throw refusal;
            return Answering.to(wanted, shared.shelf(), alternatives, work::stop, work::progress);
        }
    }

    private Outcome outcome(Path brief, LongWork work, LocalDate today) {
        try {
            return new Outcome(brief, done(brief, work, today), null);
        } catch (RuntimeException problem) {
            return new Outcome(brief, null, problem);
        }
    }

    private Path folder(Path brief) {
        return out != null ? out : brief.toAbsolutePath().getParent();
    }

    private void refuseSameResults() {
        Map<Path, Path> taken = new LinkedHashMap<>();
        for (Path brief : briefs) {
            Path result = folder(brief)
                    .resolve(BriefReader.nameOf(brief))
                    .toAbsolutePath()
                    .normalize();
            Path before = taken.put(result, brief);
            if (before != null)
                throw new Refusal("The briefs " + before + " and " + brief
                        + " would write the same files; give each its own name, or leave --out away.");
        }
    }

    private int printEach(List<Outcome> outcomes, LocalDate today, PrintWriter text, PrintWriter err) {
        int status = Hazewright.DONE;
        boolean first = true;
        for (Outcome o : outcomes) {
            int one;
            if (o.problem != null) one = Hazewright.status(named(o), err);
            else {
                if (!first) text.print("\n────────────────────────────────────────\n\n");
                first = false;
                one = print(o.done, today, text);
            }
            status = Hazewright.worse(status, one);
        }
        return status;
    }

    /** A refusal that does not name its file itself is told with the file's name. */
    private static Exception named(Outcome o) {
        boolean bare = o.problem instanceof Refusal
                && !o.problem.getMessage().contains(o.brief.getFileName().toString());
        return bare ? new Refusal(o.brief + ": " + o.problem.getMessage()) : o.problem;
    }

    private static int printTogether(List<Outcome> outcomes, PrintWriter text, PrintWriter err) {
        int status = Hazewright.DONE;
        List<Map<String, Object>> results = new ArrayList<>();
        for (Outcome o : outcomes) {
            if (o.problem == null) {
                results.add(Json.object()
                        .with("brief", o.brief.toString())
                        .withAll(DesignJson.of(o.done.answer, o.done.blood))
                        .fields());
                status = Hazewright.worse(status, o.done.status());
                continue;
            }
            int one = Hazewright.status(named(o), err);
            status = Hazewright.worse(status, one);
            results.add(Json.object()
                    .with("brief", o.brief.toString())
                    .with("format", 1)
                    .with(
                            "status",
                            o.problem instanceof WriteFailure
                                    ? "unwritable"
                                    : one == Hazewright.REFUSED ? "refused" : "fault")
                    .with("message", o.problem.getMessage())
                    .fields());
        }
        Json.object().with("format", 1).with("results", results).print(text);
        return status;
    }

    private int print(Done done, LocalDate today, PrintWriter text) {
        if (shared.json) DesignJson.of(done.answer, done.blood).print(text);
        else {
            new DesignText(done.answer, done.blood, shared.units, text).print(Warnings.of(done.answer.recipe(), today));
            if (!shared.quiet) done.written.forEach(p -> text.println("Written: " + p));
        }
        return done.status();
    }

    private List<Path> write(Answer answer, LocalDate today, Path folder) {
        String name = answer.brief().name();
        List<Path> written = new ArrayList<>();
        Path recipe = folder.resolve(name + ".recipe.toml");
        RecipeWriter.write(recipe, answer.recipe(), SafeFile.Overwrite.KEEP_PREVIOUS);
        written.add(recipe);
        Path sheet = folder.resolve(name + ".xlsx");
        SafeFile.write(
                sheet, RecipeSheet.write(answer, today, shared.tissueSpectra()), SafeFile.Overwrite.KEEP_PREVIOUS);
        written.add(sheet);
        return written;
    }
}
