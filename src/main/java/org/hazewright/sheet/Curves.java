package org.hazewright.sheet;

import java.util.Arrays;
import java.util.Map;
import java.util.stream.DoubleStream;
import java.util.stream.IntStream;
import org.hazewright.bench.Answer;
import org.hazewright.mixture.Budget;
import org.hazewright.mixture.Sweep;
import org.hazewright.shelf.Ingredient;

/**
 * A recipe's predicted spectra: µa and µs' in 1/cm with their standard uncertainties, every 10 nm from 400 to 1100 nm as far as
 * every ingredient's figures reach, and at the targets, wherever they lie.
 */
record Curves(double[] nm, double[] muaPerCm, double[] muspPerCm, double[] uMuaPerCm, double[] uMuspPerCm) {
    private static final int FROM_NM = 400;
    private static final int TO_NM = 1100;
    private static final int STEP_NM = 10;

    static Curves of(Answer answer) {
        double[] wanted = answer.brief().wavelengthsNm();
        int from = Math.min(FROM_NM, (int) Math.ceil(wanted[0] / STEP_NM) * STEP_NM);
        int to = Math.max(TO_NM, (int) Math.floor(wanted[wanted.length - 1] / STEP_NM) * STEP_NM);
        double[] grid = DoubleStream.concat(
                        IntStream.rangeClosed(from / STEP_NM, to / STEP_NM).mapToDouble(k -> k * STEP_NM),
                        Arrays.stream(wanted))
                .sorted()
                .distinct()
                .toArray();
        Sweep sweep = Sweep.within(answer.mixture(), grid, (nm, why) -> {});
        Budget budget =
                Budget.of(answer.recipe(), sweep, answer.brief().balance().capacityG());
        Map<Ingredient, Double> masses = answer.mixture().massesG();
        return new Curves(
                sweep.wavelengthsNm(),
                sweep.muaPerCm(masses),
                sweep.muspPerCm(masses),
                budget.uMuaPerCm(),
                budget.uMuspPerCm());
    }
}
