package org.hazewright.cli;

import java.io.PrintWriter;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Locale;
import java.util.Optional;
import java.util.TreeSet;
import java.util.concurrent.Callable;
import java.util.stream.Collectors;
import org.hazewright.brief.Tissue;
import org.hazewright.files.Casting;
import org.hazewright.files.RecipeReader;
import org.hazewright.files.SafeFile;
import org.hazewright.files.SetUpReader;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Recipe;
import org.hazewright.optics.Figures;
import org.hazewright.optics.Refusal;
import org.hazewright.picture.ReadingPicture;
import org.hazewright.reading.Adapted;
import org.hazewright.reading.Body;
import org.hazewright.reading.Foreseen;
import org.hazewright.reading.Foresight;
import org.hazewright.reading.Phantom;
import org.hazewright.reading.SetUp;
import org.hazewright.sheet.InstrumentReadings;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.ParentCommand;
import picocli.CommandLine.Spec;

/** What instruments will show on a recipe, a batch as made, or a medium of given coefficients. */
@Command(
        name = "readings",
        description = {
            "Foresees what instruments will show on a recipe, a batch or a medium of given coefficients.",
            "Reflectance at distances, slopes, modulated and pulsed light, slabs, collimated beams, oximeters; each names its model.",
            "Example: hazewright readings out/wrist-bath.recipe.toml --setup two-distance-probe",
            "Example: hazewright readings --medium mua_per_cm=0.1,musp_per_cm=10,g=0.8,n=1.4 --setup slab-10-mm"
        })
final class ReadingsCommand implements Callable<Integer> {
    @Mixin
    private Shared shared;

    @Spec
    private CommandSpec spec;

    @ParentCommand
    private Hazewright program;

    @Parameters(arity = "0..1", paramLabel = "RECIPE", description = "NAME.recipe.toml or NAME.batch.toml.")
    private Path recipe;

    @Option(
            names = "--medium",
            paramLabel = "NAME=VALUE,…",
            description =
                    "In place of a recipe: mua_per_cm, musp_per_cm, g and n; u_mua_per_cm and u_musp_per_cm if known.")
    private String medium;

    @Option(
            names = "--setup",
            paramLabel = "SETUP",
            description = "NAME.setup.toml or the name of one that comes with the program; several times for several"
                    + " (default: all that come with it and whose wavelengths the recipe covers).")
    private List<String> setUps = List.of();

    @Option(
            names = "--at",
            paramLabel = "NM",
            split = ",",
            description = "Wavelengths in nm in place of the set-ups' own, with commas between.")
    private double[] at;

    @Option(
            names = "--thickness-mm",
            paramLabel = "T",
            description = "Thickness of the phantom in place of the mould's or the set-up's; not for cuvettes.")
    private Double thicknessMm;

    @Option(
            names = "--brief",
            paramLabel = "BRIEF",
            description =
                    "Brief whose mould the phantom is cast in (default: the one beside the recipe that it answers).")
    private Path brief;

    @Option(names = "--picture", paramLabel = "FILE", description = "Draw the readings, as .png or .svg.")
    private Path picture;

    @Option(names = "--list", description = "List the set-ups that come with the program, and end.")
    private boolean list;

    @Option(names = "--show", paramLabel = "NAME", description = "Print one of them as a file to begin with, and end.")
    private String show;

    @Override
    public Integer call() {
        PrintWriter out = spec.commandLine().getOut();
        if (list) list(out);
        else if (show != null) out.print(SetUpReader.shippedText(show));
        else foresee(out);
        return Hazewright.DONE;
    }

    private void list(PrintWriter out) {
        TextTable table = new TextTable("", "lll");
        for (String name : SetUpReader.shipped()) {
            SetUp s = SetUpReader.readShipped(name);
            String nm = s.wavelengthsNm().stream().map(Figures::plain).collect(Collectors.joining(", "));
            table.row(name, s.title(), nm + " nm");
        }
        table.print(out);
    }

    private void foresee(PrintWriter out) {
        if ((recipe == null) == (medium == null))
            throw new Refusal(
                    "Name a recipe or batch, or give --medium, one of the two; --list shows the set-ups that come with the program.");
        refuseOtherPictures();
        Recipe made = recipe == null ? null : RecipeReader.read(recipe, shared.shelf());
        Phantom phantom = phantom(made);
        List<SetUp> wanted = wanted(phantom);
        LongWork work = new LongWork(
                "Following photon packets",
                spec.commandLine().getErr(),
                shared.quiet || shared.json,
                program.interruption);
        List<Foreseen> foreseen = new ArrayList<>();
        List<List<Double>> every = new ArrayList<>();
        for (int i = 0; i < wanted.size(); i++) {
            SetUp s = wanted.get(i);
            boolean once = !phantom.isRecipe() && s.kind() != SetUp.Kind.OXIMETER;
            int done = i;
            Foresight running = Foresight.of(phantom::medium)
                    .watched(share -> work.progress((done + share) / wanted.size()), work::stop);
            one(phantom, once ? Adapted.atWavelengths(s, s.wavelengthsNm().subList(0, 1)) : s, running)
                    .ifPresent(f -> {
                        foreseen.add(f);
                        every.add(once ? s.wavelengthsNm() : List.of());
                    });
        }
        if (program.interruption.asked() && !shared.quiet)
            spec.commandLine()
                    .getErr()
                    .println(
                            "Stopped: fewer packets were followed than asked for; the uncertainties are of those that were.");
        if (shared.json) ReadingsJson.of(foreseen, every).print(out);
        else text(made, phantom, foreseen, out);
        if (picture != null) draw(made, foreseen, out);
    }

    /** A set-up that nobody named and that has nothing to say here is left out; one that was named is refused. */
    private Optional<Foreseen> one(Phantom phantom, SetUp setUp, Foresight running) {
        try {
            boolean blood = setUp.kind() == SetUp.Kind.OXIMETER;
            return Optional.of(Foreseen.of(phantom, setUp, blood ? withTables(phantom, running) : running));
        } catch (Refusal refused) {
            if (!setUps.isEmpty()) throw refused;
            leftOut(setUp, refused.getMessage());
            return Optional.empty();
        }
    }

    private Foresight withTables(Phantom phantom, Foresight running) {
        Tissue.Spectra tables = shared.tissueSpectra().get();
        return running.with(phantom.oximeter(tables.oxyEpsilon(), tables.deoxyEpsilon()));
    }

    private void leftOut(SetUp setUp, String why) {
        if (!shared.quiet) spec.commandLine().getErr().println("Left out: " + setUp.title() + ". " + why);
    }

    private Phantom phantom(Recipe made) {
        Body body = thicknessMm != null ? Body.slab(thicknessMm) : null;
        if (made == null) {
            MediumOption given = MediumOption.of(medium);
            return Phantom.of(given.medium(), given.spread(), body);
        }
        Optional<Casting> casting = brief != null ? Optional.of(Casting.read(brief)) : Casting.beside(recipe, made);
        if (brief != null && !casting.get().isOf(made) && !shared.quiet)
            spec.commandLine()
                    .getErr()
                    .println(
                            "The recipe was not made for " + brief + " as it is now; its mould is taken all the same.");
        Body mould = casting.flatMap(c -> c.moulds().stream().findFirst())
                .map(InstrumentReadings::body)
                .orElse(null);
        if (body != null && mould != null) body = new Body(body.thicknessMm(), mould.wallMm());
        return Phantom.of(made, body != null ? body : mould);
    }

    private List<SetUp> wanted(Phantom phantom) {
        List<SetUp> wanted = new ArrayList<>();
        boolean all = setUps.isEmpty();
        for (String name : all ? SetUpReader.shipped() : setUps) {
            SetUp s = all ? SetUpReader.readShipped(name) : SetUpReader.named(name);
            if (all && !phantom.isRecipe() && s.kind() == SetUp.Kind.OXIMETER) continue;
            if (at != null
                    && all
                    && s.kind() == SetUp.Kind.OXIMETER
                    && distinct(at).size() < 2) continue;
            if (at != null) s = Adapted.atWavelengths(s, distinct(at));
            Optional<String> gap = phantom.gap(s);
            if (gap.isPresent() && !all)
                throw new Refusal("The set-up \"" + s.title() + "\" cannot be foreseen: " + gap.get());
            if (gap.isPresent()) leftOut(s, gap.get());
            else wanted.add(s);
        }
        if (wanted.isEmpty())
            throw new Refusal(
                    "No set-up that comes with the program has wavelengths which this recipe's ingredients reach;"
                            + " name wavelengths with --at, or a set-up of your own with --setup.");
        return wanted;
    }

    private static List<Double> distinct(double[] nm) {
        return Arrays.stream(nm).distinct().boxed().toList();
    }

    private void text(Recipe made, Phantom phantom, List<Foreseen> foreseen, PrintWriter out) {
        if (made == null) out.println("A medium of given coefficients");
        else {
            out.println(made.title());
            out.println(made.base().name() + ", "
                    + Figures.significant(Mixture.of(made).volumeMl(), 5) + " mL, at "
                    + Figures.plain(made.temperatureC()) + " °C" + mould(phantom));
        }
        out.println();
        TreeSet<Double> nm = new TreeSet<>();
        foreseen.forEach(f -> nm.addAll(f.setUp().wavelengthsNm()));
        ReadingsText text = new ReadingsText(phantom, shared.units, out);
        text.medium(List.copyOf(nm));
        foreseen.forEach(text::print);
        if (!shared.quiet) text.legend(!foreseen.stream().allMatch(Foreseen::trusted));
    }

    private static String mould(Phantom phantom) {
        return phantom.body()
                .map(b -> ", " + Figures.plain(b.thicknessMm()) + " mm thick"
                        + (Double.isInfinite(b.wallMm())
                                ? ""
                                : ", nearest side wall " + Figures.plain(b.wallMm()) + " mm from the middle"))
                .orElse("");
    }

    private void refuseOtherPictures() {
        if (picture == null) return;
        String name = picture.toString().toLowerCase(Locale.ROOT);
        if (!name.endsWith(".png") && !name.endsWith(".svg"))
            throw new Refusal("A picture is written as .png or .svg; \"" + picture + "\" ends with neither.");
    }

    private void draw(Recipe made, List<Foreseen> foreseen, PrintWriter out) {
        String title = made == null ? "A medium of given coefficients" : made.title();
        SafeFile.write(
                picture,
                ReadingPicture.of(
                        title, foreseen, made == null, picture.getFileName().toString()),
                SafeFile.Overwrite.KEEP_PREVIOUS);
        if (!shared.json && !shared.quiet) out.println("Written: " + picture);
    }
}
