package org.hazewright.cli;

import java.io.PrintWriter;
import java.nio.file.Path;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import java.util.TreeSet;
import java.util.concurrent.Callable;
import java.util.function.Predicate;
import org.hazewright.files.FileRefusal;
import org.hazewright.files.ShelfReader;
import org.hazewright.mixture.MassSpecific;
import org.hazewright.optics.Figures;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Absorption;
import org.hazewright.shelf.BlendPart;
import org.hazewright.shelf.Conflict;
import org.hazewright.shelf.Family;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Inspection;
import org.hazewright.shelf.Material;
import org.hazewright.shelf.Part;
import org.hazewright.shelf.Scattering;
import org.hazewright.shelf.Shelf;
import picocli.CommandLine;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** What is on the shelf. */
@Command(
        name = "ingredients",
        description = "Lists the shelf, shows one ingredient with its figures and sources, or checks every file.",
        subcommands = {
            IngredientsCommand.ListCommand.class,
            IngredientsCommand.ShowCommand.class,
            IngredientsCommand.CheckCommand.class
        })
final class IngredientsCommand implements Callable<Integer> {
    @Mixin
    @SuppressWarnings("unused") // its options are taken before a subcommand too
    private Shared shared;

    @Spec
    private CommandSpec spec;

    @Override
    public Integer call() {
        throw new CommandLine.ParameterException(
                spec.commandLine(), "Say what to do with the ingredients: list, show or check.");
    }

    private static String families(Ingredient i) {
        return String.join(
                ", ", i.families().stream().map(Family::word).sorted().toList());
    }

    /** One line an ingredient or material. */
    @Command(name = "list", description = "Lists the shelf, one line an ingredient or material.")
    static final class ListCommand implements Callable<Integer> {
        @Mixin
        private Shared shared;

        @Spec
        private CommandSpec spec;

        @Override
        public Integer call() {
            Shelf shelf = shared.shelf();
            PrintWriter out = spec.commandLine().getOut();
            if (shared.json) {
                List<Map<String, Object>> rows = new ArrayList<>();
                for (Ingredient i : shelf.ingredients()) rows.add(row(i).fields());
                Json.object()
                        .with("shelf", shelf.place())
                        .with("ingredients", rows)
                        .print(out);
                return Hazewright.DONE;
            }
            Set<String> madeInto = madeIntoBases(shelf);
            for (Part part : Part.values())
                group(
                        part.word() + "s",
                        part == Part.BASE ? "family" : "mixes into",
                        shelf,
                        i -> i.part() == part && !madeInto.contains(i.id()),
                        out);
            group("parts of bases, and powders to make them", "mixes into", shelf, i -> madeInto.contains(i.id()), out);
            out.println("materials of particles and hosts");
            TextTable materials = new TextTable("  ", "lll").row("id", "name", "basis");
            for (Material m : shelf.materials())
                materials.row(m.id(), m.name(), m.source().basis().word());
            materials.print(out);
            out.println();
            out.println(shelf.ingredients().size() + " ingredients and "
                    + shelf.materials().size() + " materials on the shelf " + shelf.place()
                    + ". One of them: hazewright ingredients show ID. Basis: what stands behind the weakest figure.");
            return Hazewright.DONE;
        }

        /** What is no base itself and stands in the blend of one. */
        private static Set<String> madeIntoBases(Shelf shelf) {
            Set<String> found = new TreeSet<>();
            for (Ingredient base : shelf.ingredients())
                for (BlendPart p : base.blend())
                    if (shelf.require(p.ingredient()).part() == Part.MODIFIER) found.add(p.ingredient());
            return found;
        }

        private static void group(
                String heading, String family, Shelf shelf, Predicate<Ingredient> which, PrintWriter out) {
            List<Ingredient> of = shelf.ingredients().stream().filter(which).toList();
            if (of.isEmpty()) return;
            out.println(heading);
            TextTable table = new TextTable("  ", "llll").row("id", "name", family, "basis");
            for (Ingredient i : of)
                table.row(i.id(), i.name(), families(i), i.source().basis().word());
            table.print(out);
            out.println();
        }

        private static Json row(Ingredient i) {
            return Json.object()
                    .with("id", i.id())
                    .with("name", i.name())
                    .with("part", i.part().word())
                    .with(
                            "families",
                            i.families().stream().map(Family::word).sorted().toList())
                    .with("basis", i.source().basis().word());
        }
    }

    /** One ingredient with its figures and sources. */
    @Command(
            name = "show",
            description =
                    "Shows one ingredient: figures, sources, handling and cautions; or a material's refractive index.")
    static final class ShowCommand implements Callable<Integer> {
        @Mixin
        private Shared shared;

        @Spec
        private CommandSpec spec;

        @Parameters(paramLabel = "ID", description = "Id of the ingredient or material, as in the list.")
        private String id;

        @Override
        public Integer call() {
            Shelf shelf = shared.shelf();
            PrintWriter out = spec.commandLine().getOut();
            Optional<Material> material =
                    shelf.materials().stream().filter(m -> m.id().equals(id)).findFirst();
            if (shelf.find(id).isEmpty() && material.isPresent()) {
                MaterialText.print(material.get(), shared.json, out);
                return Hazewright.DONE;
            }
            Ingredient i = shelf.require(id);
            if (shared.json) json(i).print(out);
            else text(i, shelf, out);
            return Hazewright.DONE;
        }

        private static double[] grid(Ingredient i) {
            return java.util.stream.IntStream.rangeClosed(4, 11)
                    .mapToDouble(k -> 100.0 * k)
                    .filter(nm -> covers(i, nm))
                    .toArray();
        }

        private static boolean covers(Ingredient i, double nm) {
            try {
                MassSpecific.requireFigures(i, nm, 22);
                return true;
            } catch (Refusal outside) {
                return false;
            }
        }

        private static Json json(Ingredient i) {
            List<Map<String, Object>> rows = new ArrayList<>();
            if (!i.isBlend())
                for (double nm : grid(i)) {
                    MassSpecific k = MassSpecific.of(i, nm, 22, 1.33, 0);
                    rows.add(Json.object()
                            .with("wavelength_nm", nm)
                            .with("mua_cm2_per_g", k.kappaA())
                            .with("mus_cm2_per_g", k.kappaMus())
                            .with("musp_cm2_per_g", k.kappaMusp())
                            .fields());
                }
            Map<String, Object> blend = new LinkedHashMap<>();
            for (BlendPart p : i.blend()) blend.put(p.ingredient(), p.massFraction());
            return Json.object()
                    .with("id", i.id())
                    .with("name", i.name())
                    .with("part", i.part().word())
                    .with(
                            "families",
                            i.families().stream().map(Family::word).sorted().toList())
                    .with("form", i.form().word())
                    .with("density_g_per_ml", i.isBlend() ? null : i.densityGPerMl())
                    .with("blend", blend)
                    .with("basis", i.source().basis().word())
                    .with("citation", i.source().citation())
                    .with("u_absorption", i.uncertainty().absorption())
                    .with("u_scattering", i.uncertainty().scattering())
                    .with("coefficients_in_n_1_33", rows)
                    .with("handling", i.handling())
                    .with("cautions", i.cautions());
        }

        private static void text(Ingredient i, Shelf shelf, PrintWriter out) {
            out.println(i.name());
            out.println(i.id() + ": "
                    + (i.part() == Part.BASE
                            ? "base of the family " + families(i)
                            : i.part().word() + ", " + i.form().word() + ", mixes into " + families(i)));
            i.lot()
                    .ifPresent(l -> out.println("lot " + l.number() + " of " + l.of()
                            + l.expires().map(d -> ", good until " + d).orElse("")));
            out.println();
            TextTable facts = new TextTable("  ", "ll");
            facts.row(
                    "density",
                    Figures.significant(i.isBlend() ? shelf.densityGPerMl(i) : i.densityGPerMl(), 4) + " g/mL"
                            + (i.isBlend() ? ", from its parts" : ""));
            for (BlendPart p : i.blend())
                facts.row("blend", Figures.plain(100 * p.massFraction()) + " % " + p.ingredient() + " by mass");
            i.index().ifPresent(m -> facts.row("index", "that of " + m.id() + MaterialText.near589(m)));
            i.maxGPerMl().ifPresent(v -> facts.row("at most", Figures.plain(v) + " g per mL of phantom"));
            i.pricePerG().ifPresent(v -> facts.row("price", Figures.plain(v) + " per g"));
            i.absorption()
                    .ifPresent(a -> facts.row(
                            "absorption",
                            absorption(a) + "; known to "
                                    + percent(i.uncertainty().absorption())));
            i.scattering()
                    .ifPresent(s -> facts.row(
                            "scattering",
                            scattering(s) + "; known to "
                                    + percent(i.uncertainty().scattering())));
            facts.row("basis", i.source().basis().word());
            facts.print(out);
            if (!i.isBlend()) coefficients(i, out);
            List<String> sources = new ArrayList<>(List.of(i.source().citation()));
            i.index()
                    .ifPresent(m ->
                            sources.add("Index of " + m.id() + ": " + m.source().citation()));
            i.scattering().ifPresent(s -> {
                if (s instanceof Scattering.MieParticles mie)
                    sources.add("Index of " + mie.particle().id() + ": "
                            + mie.particle().source().citation());
            });
            list("Sources", sources, out);
            list("Handling", i.handling(), out);
            List<String> conflicts = new ArrayList<>();
            for (Conflict c : i.conflicts())
                conflicts.add(c.with() + ": " + c.why() + (c.refuse() ? " Never joined." : ""));
            list("Not with", conflicts, out);
            list("Cautions", i.cautions(), out);
        }

        private static String percent(double u) {
            return Figures.significant(100 * u, 2) + " %";
        }

        private static String absorption(Absorption a) {
            return a.table().name() + ", " + Figures.plain(a.table().fromNm()) + " to "
                    + Figures.plain(a.table().toNm()) + " nm"
                    + (a.albedo() > 0 ? ", " + percent(a.albedo()) + " of it scattering" : "");
        }

        private static String scattering(Scattering s) {
            String range = ", " + Figures.plain(s.fromNm()) + " to " + Figures.plain(s.toNm()) + " nm";
            if (s instanceof Scattering.MieParticles m)
                return "Mie, " + m.particle().name() + ", " + percent(m.volumeFraction()) + " by volume"
                        + (m.magnitude() == 1 ? "" : ", magnitude " + Figures.plain(m.magnitude()) + " of Mie")
                        + (m.absorptionMagnitude() == 1
                                ? ""
                                : ", own absorption " + Figures.plain(m.absorptionMagnitude()) + " of Mie")
                        + range;
            return (s instanceof Scattering.PowerLaw ? "power law" : "table") + range;
        }

        private static void coefficients(Ingredient i, PrintWriter out) {
            double[] nm = grid(i);
            if (nm.length == 0 || (i.absorption().isEmpty() && i.scattering().isEmpty())) return;
            out.println();
            boolean scatters = i.scattering().isPresent()
                    || i.absorption().map(a -> a.albedo() > 0).orElse(false);
            out.println("  Per g in a mL of phantom, cm²/g"
                    + (i.scattering().isPresent() ? " (particles alone in n = 1.33, 22 °C)" : ""));
            TextTable table = new TextTable("  ", scatters ? "rrrrr" : "rr");
            if (scatters) table.row("nm", "µa", "µs'", "µs", "g");
            else table.row("nm", "µa");
            for (double x : nm) {
                MassSpecific k = MassSpecific.of(i, x, 22, 1.33, 0);
                if (!scatters) {
                    table.row(Figures.plain(x), Figures.significant(k.kappaA(), 4));
                    continue;
                }
                table.row(
                        Figures.plain(x),
                        Figures.significant(k.kappaA(), 4),
                        Figures.significant(k.kappaMusp(), 4),
                        Figures.significant(k.kappaMus(), 4),
                        k.kappaMus() > 0 ? Figures.fixed(1 - k.kappaMusp() / k.kappaMus(), 3) : "");
            }
            table.print(out);
        }

        private static void list(String title, List<String> sentences, PrintWriter out) {
            List<String> said = sentences.stream().filter(s -> !s.isBlank()).toList();
            if (said.isEmpty()) return;
            out.println();
            out.println(title);
            said.forEach(s -> out.println("  - " + s));
        }
    }

    /** Every file of the shelf, proven or blamed. */
    @Command(
            name = "check",
            description = {
                "Reads every file of the shelf and says what is wrong or looks wrong.",
                "Exit status 2 when a file cannot be used; doubts alone are no error."
            })
    static final class CheckCommand implements Callable<Integer> {
        @Mixin
        private Shared shared;

        @Spec
        private CommandSpec spec;

        @Parameters(arity = "0..1", paramLabel = "DIR", description = "Shelf to check (default: the one in use).")
        private Path folder;

        @Override
        public Integer call() {
            if (folder != null) shared.ingredients = folder;
            ShelfReader.Lenient reading = shared.lenientShelf();
            List<Inspection.Doubt> doubts = Inspection.of(reading.shelf(), LocalDate.now());
            PrintWriter out = spec.commandLine().getOut();
            int usable = reading.shelf().ingredients().size();
            if (shared.json) {
                Json.object()
                        .with("shelf", reading.shelf().place())
                        .with("usable", usable)
                        .with(
                                "problems",
                                reading.refusals().stream()
                                        .map(FileRefusal::getMessage)
                                        .toList())
                        .with(
                                "doubts",
                                doubts.stream()
                                        .map(d -> Json.object()
                                                .with("ingredient", d.ingredient())
                                                .with("doubt", d.sentence())
                                                .fields())
                                        .toList())
                        .print(out);
            } else {
                reading.refusals().forEach(p -> out.println(p.getMessage()));
                if (!reading.refusals().isEmpty()) out.println();
                if (!shared.quiet)
                    doubts.forEach(d -> out.println("look again at " + d.ingredient() + ": " + d.sentence()));
                if (!doubts.isEmpty() && !shared.quiet) out.println();
                out.println(usable + " ingredients and "
                        + reading.shelf().materials().size() + " materials read from "
                        + reading.shelf().place() + "; " + reading.refusals().size()
                        + (reading.refusals().size() == 1
                                ? " file that cannot be used, "
                                : " files that cannot be used, ")
                        + doubts.size() + (doubts.size() == 1 ? " doubt." : " doubts."));
            }
            return reading.refusals().isEmpty() ? Hazewright.DONE : Hazewright.REFUSED;
        }
    }
}
