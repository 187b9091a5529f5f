package org.hazewright.mixture;

import java.util.List;
import java.util.Optional;
import java.util.concurrent.TimeUnit;
import org.hazewright.shelf.Ingredient;
import org.openjdk.jmh.annotations.Benchmark;
import org.openjdk.jmh.annotations.BenchmarkMode;
import org.openjdk.jmh.annotations.Fork;
import org.openjdk.jmh.annotations.Measurement;
import org.openjdk.jmh.annotations.Mode;
import org.openjdk.jmh.annotations.OutputTimeUnit;
import org.openjdk.jmh.annotations.Scope;
import org.openjdk.jmh.annotations.State;
import org.openjdk.jmh.annotations.Warmup;

/** 100 000 draws of a five-ingredient recipe, one of them dosed from a stock, at five wavelengths: wanted below 200 ms on two cores. */
@State(Scope.Benchmark)
@BenchmarkMode(Mode.AverageTime)
@OutputTimeUnit(TimeUnit.MILLISECONDS)
@Fork(1)
@Warmup(iterations = 3, time = 1)
@Measurement(iterations = 5, time = 1)
public class DrawsBenchmark {
    private static final double[] NM = {690, 730, 770, 810, 840};
    private final Recipe recipe = recipe();

    private static Recipe recipe() {
        Ingredient water = DemoIngredients.water(0.01);
        Ingredient ink = DemoIngredients.ink(0.05);
        Stock stock = new Stock("ink-1-100", ink, Optional.empty(), 1, water, 99, Optional.empty());
        return new Recipe(
                "demo",
                water,
                22,
                0.001,
                Optional.empty(),
                List.of(stock),
                List.of(
                        Item.neat(water, 420),
                        Item.neat(DemoIngredients.emulsion(0.03), 25),
                        Item.neat(DemoIngredients.dye("red-demo", 8, 2, 0.05), 3),
                        Item.neat(DemoIngredients.dye("blue-demo", 1, 6, 0.05), 2),
                        Item.ofStock(stock, 0.7)));
    }

    @Benchmark
    public Draws draws() {
        return Draws.of(recipe, NM, 220, 100_000, 1);
    }

    /** With all that the sheet shows of them. */
    @Benchmark
    public double drawsAndIntervals() {
        Draws d = Draws.of(recipe, NM, 220, 100_000, 1);
        double sum = 0;
        for (int j = 0; j < NM.length; j++)
            for (int q = 0; q < 2; q++) {
                double[] i = d.interval95(q == 1, j);
                sum += i[1] - i[0] + d.standardUncertainty(q == 1, j);
            }
        return sum;
    }
}
