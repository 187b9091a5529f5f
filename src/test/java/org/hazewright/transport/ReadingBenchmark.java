package org.hazewright.transport;

import java.util.concurrent.TimeUnit;
import org.openjdk.jmh.annotations.Benchmark;
import org.openjdk.jmh.annotations.BenchmarkMode;
import org.openjdk.jmh.annotations.Fork;
import org.openjdk.jmh.annotations.Measurement;
import org.openjdk.jmh.annotations.Mode;
import org.openjdk.jmh.annotations.OutputTimeUnit;
import org.openjdk.jmh.annotations.Param;
import org.openjdk.jmh.annotations.Scope;
import org.openjdk.jmh.annotations.State;
import org.openjdk.jmh.annotations.Warmup;

/** Diffusion readings of 100 distances or 1000 times (each under 1 ms), and totals of a slab by transport (under 3 ms). */
@State(Scope.Thread)
@BenchmarkMode(Mode.AverageTime)
@OutputTimeUnit(TimeUnit.MILLISECONDS)
@Warmup(iterations = 3, time = 1)
@Measurement(iterations = 5, time = 1)
@Fork(1)
public class ReadingBenchmark {
    private static final int DISTANCES = 100;

    /** µs' 10 /cm; new coefficients at each call, so that nothing is remembered from the last. */
    private double mua = 0.1;

    private Medium next(double g) {
        mua = mua > 0.2 ? 0.1 : mua + 1e-6;
        return new Medium(mua, 10, g, 1.4);
    }

    private Diffusion diffusion(Double thickness) {
        return new Diffusion(next(0.8), 1, thickness, Convention.DEFAULT);
    }

    private static double mm(int i) {
        return 1 + 0.4 * i;
    }

    private static double steady(Diffusion d) {
        SteadySignal s = new SteadySignal(d);
        double sum = 0;
        for (int i = 0; i < DISTANCES; i++) sum += s.reflectancePerMm2(mm(i));
        return sum;
    }

    @Benchmark
    public double steadySemiInfinite() {
        return steady(diffusion(null));
    }

    @Benchmark
    public double steadySlab() {
        return steady(diffusion(20.0));
    }

    private static double modulated(Diffusion d) {
        FrequencySignal f = new FrequencySignal(d, 100);
        double sum = 0;
        for (int i = 0; i < DISTANCES; i++)
            sum += f.modulation(mm(i), Side.REFLECTANCE) + f.phaseDeg(mm(i), Side.REFLECTANCE);
        return sum;
    }

    @Benchmark
    public double modulatedSemiInfinite() {
        return modulated(diffusion(null));
    }

    @Benchmark
    public double modulatedSlab() {
        return modulated(diffusion(20.0));
    }

    @Benchmark
    public double momentsSemiInfinite() {
        TimeMoments m = new TimeMoments(diffusion(null), Side.REFLECTANCE);
        double sum = 0;
        for (int i = 0; i < DISTANCES; i++) sum += m.meanPs(mm(i)) + m.variancePs2(mm(i));
        return sum;
    }

    @Benchmark
    public double momentsSlab() {
        TimeMoments m = new TimeMoments(diffusion(20.0), Side.REFLECTANCE);
        double sum = 0;
        for (int i = 0; i < DISTANCES; i++) sum += m.meanPs(mm(i));
        return sum;
    }

    private static final TimeAxis AXIS = new TimeAxis(0, 4995, 5);
    private static final Response RESPONSE = response();

    private static Response response() {
        double[] t = new double[120];
        double[] y = new double[120];
        for (int i = 0; i < t.length; i++) {
            t[i] = -150 + 5 * i;
            y[i] = 1000 * Math.exp(-0.5 * Math.pow(t[i] / 50, 2)) + Math.exp(-Math.max(0, t[i]) / 100);
        }
        return new Response(t, y);
    }

    @Benchmark
    public TimeCurve curveSemiInfinite() {
        TimeSignal t = new TimeSignal(diffusion(null));
        return TimeCurve.seen(x -> t.perMm2PerPs(30, x, Side.REFLECTANCE), AXIS, RESPONSE)
                .ofCounts(1e6);
    }

    @Benchmark
    public TimeCurve curveSlab() {
        TimeSignal t = new TimeSignal(diffusion(20.0));
        return TimeCurve.seen(x -> t.perMm2PerPs(30, x, Side.REFLECTANCE), AXIS, RESPONSE)
                .ofCounts(1e6);
    }

    /** The slab of 10 mm to 1e−5 at three sharpnesses of scattering. */
    @State(Scope.Thread)
    public static class Sharpness {
        @Param({"0.7", "0.9", "0.95"})
        double g;
    }

    @Benchmark
    public SlabLight slabByAddingAndDoubling(Sharpness s) {
        return AddingDoubling.slab(next(s.g), 1, 10);
    }
}
