package org.hazewright.search;

import java.util.ArrayList;
import java.util.List;
import java.util.Random;
import java.util.concurrent.TimeUnit;
import org.hazewright.search.SetProblem.Candidate;
import org.hazewright.search.SetProblem.Group;
import org.hazewright.search.SetProblem.Limits;
import org.hazewright.search.SetProblem.Point;
import org.openjdk.jmh.annotations.Benchmark;
import org.openjdk.jmh.annotations.BenchmarkMode;
import org.openjdk.jmh.annotations.Fork;
import org.openjdk.jmh.annotations.Measurement;
import org.openjdk.jmh.annotations.Mode;
import org.openjdk.jmh.annotations.OutputTimeUnit;
import org.openjdk.jmh.annotations.Param;
import org.openjdk.jmh.annotations.Scope;
import org.openjdk.jmh.annotations.Setup;
import org.openjdk.jmh.annotations.State;
import org.openjdk.jmh.annotations.Warmup;

/**
 * How long the whole search takes on one thread, ten runners-up and the proof of the worst miss included, the layout of the
 * problem too.
 *
 * <p>The shelf is made up: two thirds absorbers with two bands between 550 and 1000 nm, the rest scatterers with power laws, all
 * thinning a watery base. The brief asks for what four of them give, rippled by 2 %: "easy" with tolerances of 8 %, "tight"
 * with 3 %, "hopeless" with 3 % and less absorption at the last wavelength than the base has.
 */
@State(Scope.Benchmark)
@BenchmarkMode(Mode.AverageTime)
@OutputTimeUnit(TimeUnit.MILLISECONDS)
@Fork(1)
@Warmup(iterations = 4, time = 2)
@Measurement(iterations = 4, time = 2)
public class SearchBenchmark {
    @Param({"easy", "tight", "hopeless"})
    public String brief;

    @Param({"4", "20"})
    public int wavelengths;

    private SetProblem thirty;
    private SetProblem twelve;
    private SetProblem sixty;

    @Setup
    public void lay() {
        thirty = shelf(30, wavelengths, 4, brief);
        twelve = shelf(12, 5, 4, brief);
        sixty = shelf(60, wavelengths, 6, brief);
    }

    @Benchmark
    public SetResult thirtyUpToFour() {
        return new SetSearch(thirty).run(10);
    }

    @Benchmark
    public SetResult twelveAtFiveWavelengths() {
        return new SetSearch(twelve).run(10);
    }

    /** 56 049 058 sets; mostly cut. */
    @Benchmark
    @Warmup(iterations = 1, time = 1)
    @Measurement(iterations = 2, time = 1)
    public SetResult sixtyUpToSix() {
        return new SetSearch(sixty).run(10);
    }

    /** A made-up shelf and brief. */
    static SetProblem shelf(int candidates, int wavelengths, int together, String brief) {
        return shelf(candidates, wavelengths, together, brief, 20260101);
    }

    static SetProblem shelf(int candidates, int wavelengths, int together, String brief, long seed) {
        Random random = new Random(seed);
        double[] nm = new double[wavelengths];
        for (int k = 0; k < wavelengths; k++) nm[k] = wavelengths == 1 ? 800 : 620 + 360.0 * k / (wavelengths - 1);
        int m = 2 * wavelengths;
        double[] base = new double[m];
        for (int k = 0; k < wavelengths; k++)
            base[k] = 0.004 + 0.45 * band(nm[k], 975, 28) + 0.03 * band(nm[k], 740, 12);
        double[][] effect = new double[candidates][m];
        double[] volume = new double[candidates];
        double[] strength = new double[candidates];
        for (int i = 0; i < candidates; i++) {
            strength[i] = Math.exp(3 * random.nextGaussian());
            double c1 = 550 + 450 * random.nextDouble();
            double w1 = 15 + 80 * random.nextDouble();
            double c2 = 550 + 450 * random.nextDouble();
            double w2 = 15 + 120 * random.nextDouble();
            double share = random.nextDouble();
            double floor = random.nextInt(4) == 0 ? 0.5 : 0.02;
            double power = 0.2 + 2 * random.nextDouble();
            volume[i] = absorbs(i) ? 1 / (0.8 + random.nextDouble()) : 1 / (0.9 + 0.3 * random.nextDouble());
            for (int k = 0; k < wavelengths; k++) {
                double bands = floor + share * band(nm[k], c1, w1) + (1 - share) * band(nm[k], c2, w2);
                effect[i][k] = strength[i] * (absorbs(i) ? bands : 0.01);
                if (absorbs(i)) effect[i][wavelengths + k] = floor > 0.1 ? 0.05 * strength[i] : 0;
                else effect[i][wavelengths + k] = 60 * strength[i] * Math.pow(nm[k] / 700, -power);
            }
        }
        double[] target = base.clone();
        for (int picked = 0; picked < 4; picked++) {
            int i = 3 * random.nextInt(candidates / 3) + (picked == 3 ? 2 : picked % 2);
            double amount = (absorbs(i) ? 0.15 : 0.16) * (0.3 + random.nextDouble()) / strength[i];
            for (int j = 0; j < m; j++) target[j] += amount * effect[i][j];
        }
        double relative = brief.equals("easy") ? 0.08 : 0.03;
        for (int k = 0; k < wavelengths; k++) {
            target[k] *= 1 + 0.02 * Math.sin(nm[k] / 15);
            target[wavelengths + k] *= 1 + 0.02 * Math.cos(nm[k] / 40);
        }
        if (brief.equals("hopeless")) target[wavelengths - 1] = 0.2 * base[wavelengths - 1];
        List<Point> points = new ArrayList<>();
        for (int j = 0; j < m; j++) points.add(new Point(target[j] - base[j], relative * target[j], 1));
        List<Candidate> list = new ArrayList<>();
        for (int i = 0; i < candidates; i++) {
            double[] a = effect[i];
            double d = 0;
            double q = 0;
            for (int j = 0; j < m; j++) {
                double u = absorbs(i) ? 0.03 : 0.02;
                d += Math.pow(a[j] * u / points.get(j).halfWidth(), 2);
                q += Math.pow(a[j] * 2e-4 / strength[i] / points.get(j).halfWidth(), 2);
                a[j] -= volume[i] * base[j];
            }
            list.add(new Candidate(
                    a,
                    d,
                    q,
                    absorbs(i) ? Double.POSITIVE_INFINITY : 0.25,
                    volume[i],
                    absorbs(i) ? Group.ABSORBER : Group.SCATTERER));
        }
        return new SetProblem(points, list, new Limits(together, together, together, together, 0.5, List.of()));
    }

    private static boolean absorbs(int candidate) {
        return candidate % 3 != 2;
    }

    private static double band(double nm, double centre, double width) {
        double x = (nm - centre) / width;
        return Math.exp(-0.5 * x * x);
    }
}
