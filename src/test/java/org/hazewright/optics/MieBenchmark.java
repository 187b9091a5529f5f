package org.hazewright.optics;

import java.io.IOException;
import java.net.URL;
import java.net.URLClassLoader;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;
import java.util.concurrent.TimeUnit;
import org.openjdk.jmh.annotations.Benchmark;
import org.openjdk.jmh.annotations.BenchmarkMode;
import org.openjdk.jmh.annotations.Fork;
import org.openjdk.jmh.annotations.Measurement;
import org.openjdk.jmh.annotations.Mode;
import org.openjdk.jmh.annotations.OutputTimeUnit;
import org.openjdk.jmh.annotations.Scope;
import org.openjdk.jmh.annotations.State;
import org.openjdk.jmh.annotations.Warmup;
import org.openjdk.jmh.results.RunResult;
import org.openjdk.jmh.runner.Runner;
import org.openjdk.jmh.runner.RunnerException;
import org.openjdk.jmh.runner.options.Options;
import org.openjdk.jmh.runner.options.OptionsBuilder;
import org.openjdk.jmh.runner.options.VerboseMode;

/**
 * Spheres and a whole emulsion spectrum beside a plain C program of the same equations, {@code src/test/c/mie_peer.c}.
 *
 * <p>One pass is 200 radii, log-spaced over a factor of 300, at 100 wavelengths from 400 to 1100 nm: 20 000 pairs of index and size
 * parameter. The spectrum is a log-normal emulsion (median 195 nm, GSD 1.465, as the shelf's 20 % emulsion) in water at 71 wavelengths to a relative error of 1e-6,
 * nothing remembered from pass to pass; the C program takes 200 radii per wavelength, whatever error that gives. {@link #main} builds the C
 * program with {@code gcc -O3 -march=native}, runs it before and after, and prints both times and their ratio. On an idle machine.
 */
@State(Scope.Thread)
@BenchmarkMode(Mode.AverageTime)
@OutputTimeUnit(TimeUnit.MICROSECONDS)
@Warmup(iterations = 4, time = 500, timeUnit = TimeUnit.MILLISECONDS)
@Measurement(iterations = 5, time = 400, timeUnit = TimeUnit.MILLISECONDS)
@Fork(1)
public class MieBenchmark {
    private static final int PAIRS = 20_000;

    private final double[] small = sizes(30);
    private final double[] large = sizes(500);
    private final double[] qSca = new double[PAIRS];
    private final double[] qAbs = new double[PAIRS];
    private final double[] g = new double[PAIRS];
    private int passes;

    private static double[] sizes(double largest) {
        double[] x = new double[PAIRS];
        for (int i = 0; i < PAIRS; i++)
            x[i] = largest * 400 / (400 + 700 * (i / 200) / 99.0) * Math.pow(300, -(i % 200) / 199.0);
        return x;
    }

    private double[] solve(double[] x, double n, double k) {
        double[] ns = new double[PAIRS];
        double[] ks = new double[PAIRS];
        java.util.Arrays.fill(ns, n);
        java.util.Arrays.fill(ks, k);
        Mie.spheres(x, ns, ks, qSca, qAbs, g);
        return qSca;
    }

    @Benchmark
    public double[] clear30() {
        return solve(small, 1.2, 0);
    }

    @Benchmark
    public double[] absorbing30() {
        return solve(small, 1.5, 0.1);
    }

    @Benchmark
    public double[] clear500() {
        return solve(large, 1.2, 0);
    }

    @Benchmark
    public double[] absorbing500() {
        return solve(large, 1.5, 0.1);
    }

    /** Warmed for longer: it runs through more code, which the compiler takes some five seconds to settle. */
    @Benchmark
    @Warmup(iterations = 8, time = 1)
    @Measurement(iterations = 6, time = 1)
    public List<ParticleOptics> spectrum() {
        // a median that was never asked for before, so nothing is remembered
        double median = 195 * (1 + 1e-12 * ++passes);
        return emulsion(new Population(new SizeDistribution.LogNormal(median, 1.465)));
    }

    static List<ParticleOptics> emulsion(Population droplets) {
        List<Index> oil = new ArrayList<>();
        double[] water = new double[71];
        double[] nm = new double[71];
        for (int i = 0; i < 71; i++) {
            nm[i] = 400 + 10 * i;
            double tail = 1.154e4 / (nm[i] * nm[i]) - 1.132e9 / Math.pow(nm[i], 4);
            oil.add(Index.real(1.451 + tail));
            water[i] = 1.311 + tail;
        }
        return droplets.spectrum(oil, water, nm);
    }

    /** Runs both programs and prints what they took; {@code arguments} are not read. */
    public static void main(String[] arguments) throws IOException, InterruptedException, RunnerException {
        forkWithThisClasspath();
        Path program = Files.createTempFile("mie", "");
        Process gcc = new ProcessBuilder(
                        "gcc", "-O3", "-march=native", "-o", program.toString(), "src/test/c/mie_peer.c", "-lm")
                .inheritIO()
                .start();
        if (gcc.waitFor() != 0) throw new IOException("gcc could not build src/test/c/mie_peer.c");
        Map<String, Double> before = peer(program);
        Options options = new OptionsBuilder()
                .include(MieBenchmark.class.getName() + "\\.")
                .verbosity(VerboseMode.SILENT)
                .build();
        Map<String, Double> ours = new LinkedHashMap<>();
        for (RunResult result : new Runner(options).run())
            ours.put(
                    result.getPrimaryResult().getLabel(),
                    result.getPrimaryResult().getScore());
        Map<String, Double> after = peer(program);
        Files.delete(program);
        System.out.printf(Locale.ROOT, "%-14s%12s%12s%12s%10s%n", "", "C before", "C after", "this", "C/this");
        for (String name : before.keySet()) {
            boolean whole = name.equals("spectrum");
            double mine = whole ? ours.get(name) : ours.get(name) * 1000 / PAIRS;
            System.out.printf(
                    Locale.ROOT,
                    "%-14s%12.1f%12.1f%12.1f%10.2f  %s%n",
                    name,
                    before.get(name),
                    after.get(name),
                    mine,
                    (before.get(name) + after.get(name)) / 2 / mine,
                    whole ? "µs" : "ns per sphere");
        }
    }

    /** What the C program prints: a name and a time in each line that it marks with {@code =}. */
    private static Map<String, Double> peer(Path program) throws IOException, InterruptedException {
        Process run = new ProcessBuilder(program.toString()).start();
        Map<String, Double> times = new LinkedHashMap<>();
        for (String line : new String(run.getInputStream().readAllBytes(), StandardCharsets.UTF_8).split("\n"))
            if (line.contains("="))
                times.put(
                        line.split("=")[0].trim(),
                        Double.parseDouble(line.split("=")[1].trim().split(" ")[0]));
        if (run.waitFor() != 0 || times.size() != 5) throw new IOException("the C program failed");
        return times;
    }

    /** Forked benchmarks take the class path from a property that a build tool does not set for what it runs within itself. */
    private static void forkWithThisClasspath() {
        if (MieBenchmark.class.getClassLoader() instanceof URLClassLoader loader) {
            List<String> places = new ArrayList<>();
            for (URL url : loader.getURLs())
                places.add(Path.of(java.net.URI.create(url.toString())).toString());
            System.setProperty("java.class.path", String.join(java.io.File.pathSeparator, places));
        }
    }
}
