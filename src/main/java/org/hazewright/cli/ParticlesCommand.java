package org.hazewright.cli;

import java.io.PrintWriter;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.concurrent.Callable;
import org.hazewright.files.SizeTable;
import org.hazewright.files.SphereTable;
import org.hazewright.optics.ConstantIndex;
import org.hazewright.optics.Crowding;
import org.hazewright.optics.Efficiencies;
import org.hazewright.optics.Figures;
import org.hazewright.optics.Mie;
import org.hazewright.optics.ParticleOptics;
import org.hazewright.optics.Population;
import org.hazewright.optics.RefractiveIndex;
import org.hazewright.optics.Refusal;
import org.hazewright.optics.SizeDistribution;
import org.hazewright.shelf.Shelf;
import picocli.CommandLine.Command;
import picocli.CommandLine.Mixin;
import picocli.CommandLine.Model.CommandSpec;
import picocli.CommandLine.Option;
import picocli.CommandLine.Parameters;
import picocli.CommandLine.Spec;

/** What a particle or a population does to light, by Mie theory. */
@Command(
        name = "particles",
        description = {
            "Shows what spheres of a material do to light in a host, or one sphere by its size parameter.",
            "Example: hazewright particles polystyrene --in water --diameter-nm 1000 --at 633,800",
            "Example: hazewright particles --size-parameter 10 --index 1.5"
        })
final class ParticlesCommand implements Callable<Integer> {
    /** Relative error of an average over sizes that goes without saying. */
    private static final double WANTED = 1e-6;

    @Mixin
    private Shared shared;

    @Spec
    private CommandSpec spec;

    @Parameters(
            arity = "0..1",
            paramLabel = "MATERIAL",
            description = "Material of the particles, by id: see ingredients list.")
    private String material;

    @Option(names = "--in", paramLabel = "HOST", description = "Material around them by id, or its index as a number.")
    private String host;

    @Option(names = "--diameter-nm", paramLabel = "D", description = "All of one diameter.")
    private Double diameterNm;

    @Option(
            names = "--lognormal-nm",
            paramLabel = "MEDIAN,GSD",
            hideParamSyntax = true,
            split = ",",
            description = "Number median diameter and geometric standard deviation.")
    private double[] lognormal;

    @Option(
            names = "--sizes",
            paramLabel = "FILE.csv",
            description = "Sizing table: from_nm, to_nm, weight (by number).")
    private Path sizes;

    @Option(
            names = "--at",
            paramLabel = "NM,NM,…",
            hideParamSyntax = true,
            split = ",",
            description = "Wavelengths in nm, with commas between.")
    private double[] at;

    @Option(
            names = "--volume-fraction",
            paramLabel = "F",
            description = "Their share of the volume (default: ${DEFAULT-VALUE}).")
    private double volumeFraction = 0.01;

    @Option(
            names = "--crowding",
            paramLabel = "none|percus-yevick",
            description = "Whether neighbours scatter together (default: ${DEFAULT-VALUE}).")
    private String crowding = "none";

    @Option(names = "--temperature-c", paramLabel = "T", description = "Temperature in °C (default: ${DEFAULT-VALUE}).")
    private double temperatureC = 22;

    @Option(names = "--size-parameter", paramLabel = "X", description = "One sphere: x = π D n_host/λ.")
    private Double sizeParameter;

    @Option(
            names = "--index",
            paramLabel = "N,K",
            hideParamSyntax = true,
            split = ",",
            description = "Its index relative to the host, n + ik; N alone does not absorb.")
    private double[] index;

    @Option(
            names = "--table",
            paramLabel = "FILE.csv",
            description =
                    "Many spheres: size_parameter, index, absorption_index; prints the same with q_ext, q_sca, g.")
    private Path table;

    @Override
    public Integer call() {
        PrintWriter out = spec.commandLine().getOut();
        if (table != null) tableOfSpheres(out);
        else if (sizeParameter != null || index != null) oneSphere(out);
        else population(out);
        return Hazewright.DONE;
    }

    private void oneSphere(PrintWriter out) {
        if (sizeParameter == null || index == null)
            throw new Refusal("One sphere needs both --size-parameter X and --index N or N,K.");
        if (index.length > 2) throw new Refusal("--index takes N or N,K; " + index.length + " numbers were given.");
        double k = index.length == 2 ? index[1] : 0;
        Efficiencies e = Mie.sphere(sizeParameter, index[0], k);
        if (shared.json)
            Json.object()
                    .with("size_parameter", sizeParameter)
                    .with("index", index[0])
                    .with("absorption_index", k)
                    .with("q_ext", e.qExt())
                    .with("q_sca", e.qSca())
                    .with("q_abs", e.qAbs())
                    .with("g", e.g())
                    .print(out);
        else
            new TextTable("", "ll")
                    .row("q_ext", digits17(e.qExt()))
                    .row("q_sca", digits17(e.qSca()))
                    .row("q_abs", digits17(e.qAbs()))
                    .row("g", digits17(e.g()))
                    .print(out);
    }

    private void tableOfSpheres(PrintWriter out) {
        SphereTable rows = SphereTable.read(table);
        double[] x = rows.sizeParameter();
        double[] n = rows.index();
        double[] k = rows.absorptionIndex();
        out.println("size_parameter,index,absorption_index,q_ext,q_sca,g");
        for (int i = 0; i < rows.rows(); i++) {
            Efficiencies e = Mie.sphere(x[i], n[i], k[i]);
            out.println(String.join(
                    ",",
                    Double.toString(x[i]),
                    Double.toString(n[i]),
                    Double.toString(k[i]),
                    digits17(e.qExt()),
                    digits17(e.qSca()),
                    digits17(e.g())));
        }
    }

    private static String digits17(double v) {
        return String.format(java.util.Locale.ROOT, "%.16e", v);
    }

    private void population(PrintWriter out) {
        if (material == null || host == null || at == null)
            throw new Refusal("Say which particles, in what and where: MATERIAL --in HOST --diameter-nm D --at NM,NM;"
                    + " or one sphere by --size-parameter X --index N.");
        Shelf shelf = shared.shelf();
        RefractiveIndex particle = shelf.requireMaterial(material).index();
        RefractiveIndex around = host(shelf);
        Population population = new Population(distribution());
        Crowding model = crowding();
        Refusal.within("--volume-fraction", volumeFraction, 0, 1);
        List<Map<String, Object>> rows = new ArrayList<>();
        double worst = 0;
        TextTable text = new TextTable("  ", "rrrrrr");
        String unit = " " + shared.units.sign();
        text.row("nm", "host n", "µs" + unit, "µs'" + unit, "µa" + unit, "g");
        for (double nm : at) {
            Refusal.positive("--at wavelength in nm", nm);
            double n = around.at(nm, temperatureC).n();
            ParticleOptics p =
                    population.perVolumeFraction(particle.at(nm, temperatureC), n, nm, volumeFraction, model);
            worst = Math.max(
                    worst,
                    population.average(particle.at(nm, temperatureC), n, nm).relativeError());
            double mus = p.musPerCm() * volumeFraction;
            double musp = p.muspPerCm() * volumeFraction;
            double mua = p.muaPerCm() * volumeFraction;
            rows.add(Json.object()
                    .with("wavelength_nm", nm)
                    .with("host_n", n)
                    .with("mus_per_cm", mus)
                    .with("musp_per_cm", musp)
                    .with("mua_per_cm", mua)
                    .with("g", p.g())
                    .fields());
            text.row(
                    Figures.plain(nm),
                    Figures.fixed(n, 5),
                    Figures.significant(shared.units.of(mus), 6),
                    Figures.significant(shared.units.of(musp), 6),
                    Figures.significant(shared.units.of(mua), 5),
                    Figures.fixed(p.g(), 5));
        }
        if (shared.json) {
            Json.object().with("rows", rows).print(out);
            return;
        }
        out.println(shelf.requireMaterial(material).name() + " in " + host + ", volume fraction "
                + Figures.plain(volumeFraction) + ", crowding " + crowding);
        text.print(out);
        if (worst > WANTED && !shared.quiet)
            out.println("  Averages over sizes are known to " + Figures.significant(100 * worst, 1)
                    + " % only: these spheres have resonances too narrow for more.");
    }

    private RefractiveIndex host(Shelf shelf) {
        try {
            return new ConstantIndex("the host", Double.parseDouble(host), 0, 1, 1e6);
        } catch (NumberFormatException notANumber) {
            return shelf.requireMaterial(host).index();
        }
    }

    private SizeDistribution distribution() {
        int given = (diameterNm != null ? 1 : 0) + (lognormal != null ? 1 : 0) + (sizes != null ? 1 : 0);
        if (given != 1)
            throw new Refusal("Give the size once: --diameter-nm D, --lognormal-nm MEDIAN,GSD or --sizes FILE.csv.");
        if (diameterNm != null) return new SizeDistribution.Single(diameterNm);
        if (sizes != null) return SizeTable.read(sizes);
        if (lognormal.length != 2)
            throw new Refusal("--lognormal-nm takes a median and a geometric standard deviation, as in 200,1.5; "
                    + lognormal.length + " numbers were given.");
        return new SizeDistribution.LogNormal(lognormal[0], lognormal[1]);
    }

    private Crowding crowding() {
        return switch (crowding) {
            case "none" -> new Crowding.None();
            case "percus-yevick" -> new Crowding.PercusYevick();
            default -> throw new Refusal("--crowding is \"" + crowding + "\"; it must be none or percus-yevick.");
        };
    }
}
