package org.hazewright.sheet;

import java.util.Arrays;
import java.util.stream.DoubleStream;
import java.util.stream.IntStream;
import org.hazewright.bench.Answer;
import org.hazewright.brief.Brief;
import org.hazewright.mixture.Budget;
import org.hazewright.mixture.Coefficients;
import org.hazewright.mixture.Mixture;
import org.hazewright.optics.RefractiveIndex;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Scattering;

/**
 * A recipe's predicted spectra: µa and µs' in 1/cm with their standard uncertainties, from 400 to 1100 nm or as far as every
 * ingredient's figures reach, wider where targets lie outside.
 */
record Curves(double[] nm, double[] muaPerCm, double[] muspPerCm, double[] uMuaPerCm, double[] uMuspPerCm) {
    private static final double FROM_NM = 400;
    private static final double TO_NM = 1100;
    private static final double STEP_NM = 10;

    static Curves of(Answer answer) {
        double[] nm = grid(answer.mixture(), answer.brief());
        Mixture mixture = answer.mixture();
        Coefficients[] at = IntStream.range(0, nm.length)
                .parallel()
                .mapToObj(j -> mixture.at(nm[j]))
                .toArray(Coefficients[]::new);
        Budget budget = Budget.of(answer.recipe(), nm, answer.brief().balance().capacityG());
        return new Curves(
                nm,
                Arrays.stream(at).mapToDouble(Coefficients::muaPerCm).toArray(),
                Arrays.stream(at).mapToDouble(Coefficients::muspPerCm).toArray(),
                budget.uMuaPerCm(),
                budget.uMuspPerCm());
    }

    /** Every 10 nm of the shared range, its ends and the targets. */
    static double[] grid(Mixture mixture, Brief brief) {
        double[] wanted = brief.wavelengthsNm();
        double from = Math.min(FROM_NM, wanted[0]);
        double to = Math.max(TO_NM, wanted[wanted.length - 1]);
        for (var entry : mixture.massesG().entrySet()) {
            if (entry.getValue() == 0) continue;
            Ingredient i = entry.getKey();
            double[] range = {from, to};
            i.absorption()
                    .ifPresent(a -> narrow(range, a.table().fromNm(), a.table().toNm()));
            i.scattering().ifPresent(s -> narrow(range, s.fromNm(), s.toNm()));
            if (i.scattering().orElse(null) instanceof Scattering.MieParticles mie)
                narrow(range, mie.particle().index());
            i.index().ifPresent(m -> narrow(range, m.index()));
            from = range[0];
            to = range[1];
        }
        double low = Math.min(from, wanted[0]);
        double high = Math.max(to, wanted[wanted.length - 1]);
        DoubleStream steps = IntStream.rangeClosed((int) Math.ceil(low / STEP_NM), (int) Math.floor(high / STEP_NM))
                .mapToDouble(k -> k * STEP_NM);
        return DoubleStream.concat(DoubleStream.concat(steps, DoubleStream.of(low, high)), Arrays.stream(wanted))
                .sorted()
                .distinct()
                .toArray();
    }

    private static void narrow(double[] range, RefractiveIndex index) {
        narrow(range, index.fromNm(), index.toNm());
    }

    private static void narrow(double[] range, double from, double to) {
        range[0] = Math.max(range[0], from);
        range[1] = Math.min(range[1], to);
    }
}
