package org.hazewright.sheet;

import java.util.List;
import java.util.concurrent.TimeUnit;
import org.hazewright.bench.Answer;
import org.openjdk.jmh.annotations.Benchmark;
import org.openjdk.jmh.annotations.BenchmarkMode;
import org.openjdk.jmh.annotations.Fork;
import org.openjdk.jmh.annotations.Measurement;
import org.openjdk.jmh.annotations.Mode;
import org.openjdk.jmh.annotations.OutputTimeUnit;
import org.openjdk.jmh.annotations.Scope;
import org.openjdk.jmh.annotations.State;
import org.openjdk.jmh.annotations.Warmup;

/** How long a sheet takes to write: warm, and as the first of a process. */
@State(Scope.Benchmark)
@OutputTimeUnit(TimeUnit.MILLISECONDS)
public class RecipeSheetBenchmark {
    private final Answer answer = Answers.gelatin();

    @Benchmark
    @BenchmarkMode(Mode.AverageTime)
    @Fork(1)
    @Warmup(iterations = 3, time = 2)
    @Measurement(iterations = 3, time = 2)
    public byte[] warm() {
        return RecipeSheet.write(answer, List.of(), List.of());
    }

    @Benchmark
    @BenchmarkMode(Mode.SingleShotTime)
    @Fork(3)
    @Warmup(iterations = 0)
    @Measurement(iterations = 1)
    public byte[] first() {
        return RecipeSheet.write(answer, List.of(), List.of());
    }

    @Benchmark
    @BenchmarkMode(Mode.SingleShotTime)
    @Fork(3)
    @Warmup(iterations = 0)
    @Measurement(iterations = 1)
    public byte[] firstWhenReady(Ready ready) {
        return RecipeSheet.write(answer, List.of(), List.of());
    }

    /** The library loaded before the clock starts. */
    @State(Scope.Benchmark)
    public static class Ready {
        public Ready() {
            Readiness.load();
        }
    }
}
