package org.hazewright.bench;

import java.nio.file.Path;
import java.util.concurrent.TimeUnit;
import org.hazewright.brief.Series;
import org.hazewright.files.SeriesReader;
import org.hazewright.files.ShelfReader;
import org.hazewright.shelf.Shelf;
import org.openjdk.jmh.annotations.Benchmark;
import org.openjdk.jmh.annotations.BenchmarkMode;
import org.openjdk.jmh.annotations.Fork;
import org.openjdk.jmh.annotations.Measurement;
import org.openjdk.jmh.annotations.Mode;
import org.openjdk.jmh.annotations.OutputTimeUnit;
import org.openjdk.jmh.annotations.Scope;
import org.openjdk.jmh.annotations.State;
import org.openjdk.jmh.annotations.Warmup;

/** The demo grid of 32 blocks with shared stocks: wanted below 1 s. */
@State(Scope.Benchmark)
@BenchmarkMode(Mode.AverageTime)
@OutputTimeUnit(TimeUnit.MILLISECONDS)
@Fork(1)
@Warmup(iterations = 3, time = 1)
@Measurement(iterations = 5, time = 1)
public class SeriesBenchmark {
    private final Shelf shelf = ShelfReader.readShipped();
    private final Series grid = read("oximeter-set");
    private final Series titration = read("wrist-titration");

    private static Series read(String name) {
        return SeriesReader.read(Path.of("recipes-demo", name + ".brief.toml"), () -> null);
    }

    @Benchmark
    public SeriesPlan grid() {
        return SeriesPlan.of(grid, shelf);
    }

    @Benchmark
    public TitrationPlan titration() {
        return TitrationPlan.of(titration, shelf);
    }
}
