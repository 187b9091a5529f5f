package org.hazewright.learning;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.function.Function;
import java.util.function.Predicate;
import java.util.stream.Collectors;

/** What a person should know of a fitted dilution series, gathered over wavelengths into one plain sentence a finding. */
final class DilutionWarnings {
    private DilutionWarnings() {}

    static List<String> of(DilutionFit fit) {
        List<String> out = new ArrayList<>();
        List<Extinction> all = fit.wavelengths();
        gather(
                out,
                all,
                true,
                e -> e.line().scattersMoreThanStated(),
                Comparator.comparingDouble(e -> e.line().residualScale()),
                e -> "readings scatter more than their stated uncertainties, up to "
                        + Rounded.number(e.line().residualScale())
                        + " times; the uncertainty of the result was enlarged by that");
        gather(
                out,
                all,
                true,
                e -> !e.line().interceptIsZero(),
                Comparator.comparingDouble(
                        e -> Math.abs(e.line().intercept()) / e.line().uIntercept()),
                e -> "the line misses zero at no concentration, at most by "
                        + Rounded.number(e.line().intercept()) + " ± "
                        + Rounded.number(e.line().uIntercept())
                        + " 1/cm: blank and cell are not alike. The slope is used, so a constant offset does no harm");
        gather(
                out,
                all,
                true,
                Extinction::bends,
                Comparator.comparingDouble(e -> -e.linearity().orElseThrow().pValue()),
                e -> {
                    Linearity l = e.linearity().orElseThrow();
                    return "the line bends, most clearly by " + Rounded.number(l.bend()) + " 1/cm at "
                            + Rounded.plain(e.wavelengthNm()) + " nm (F-test, probability "
                            + Rounded.probability(l.pValue()) + "): "
                            + (l.bend() < 0
                                    ? "the thick end reads too clear, by scattered or stray light. Dilute further"
                                    : "check the dilutions");
                });
        gather(
                out,
                all,
                false,
                e -> e.linearity().isEmpty(),
                Comparator.comparingDouble(Extinction::wavelengthNm),
                e -> "there are too few dilutions to test whether the line is straight; take at least 4");
        gather(
                out,
                all,
                false,
                e -> e.largestScatteringDepth() > DilutionSeries.SCATTERING_DEPTH_WARNED,
                Comparator.comparingDouble(Extinction::largestScatteringDepth),
                e -> "the scattering depth reaches " + Rounded.number(e.largestScatteringDepth()) + ", above "
                        + Rounded.number(DilutionSeries.SCATTERING_DEPTH_WARNED)
                        + ": part of the scattered light is read as transmitted and the extinction comes out low");
        gather(
                out,
                all,
                false,
                e -> e.largestAbsorbance() > DilutionSeries.ABSORBANCE_WARNED,
                Comparator.comparingDouble(Extinction::largestAbsorbance),
                e -> "the absorbance reaches " + Rounded.number(e.largestAbsorbance()) + ", above "
                        + Rounded.number(DilutionSeries.ABSORBANCE_WARNED) + ", where stray light counts");
        outliers(out, all);
        if (all.size() == 1)
            out.add("With one wavelength, errors of the dilutions cannot be told from errors of the readings.");
        return out;
    }

    private static void gather(
            List<String> out,
            List<Extinction> all,
            boolean test,
            Predicate<Extinction> found,
            Comparator<Extinction> by,
            Function<Extinction, String> sentence) {
        List<Extinction> hits = all.stream().filter(found).toList();
        if (hits.isEmpty()) return;
        Extinction worst = hits.stream().max(by).orElseThrow();
        boolean chance = test && all.size() >= 5 && hits.size() <= Math.max(1, all.size() / 10);
        out.add("At " + where(hits, all) + " " + sentence.apply(worst) + "."
                + (chance ? " One wavelength in twenty does so by chance." : ""));
    }

    /** One sentence a dilution, however many wavelengths show it. */
    private static void outliers(List<String> out, List<Extinction> all) {
        Map<Double, List<Extinction>> at = new LinkedHashMap<>();
        Map<Double, Double> largestChange = new LinkedHashMap<>();
        for (Extinction e : all)
            for (StraightLine.FitPoint p : e.line().points()) {
                if (!p.outlier()) continue;
                List<Extinction> list = at.computeIfAbsent(p.x(), c -> new ArrayList<>());
                if (!list.contains(e)) list.add(e);
                double change = p.slopeWithout() / e.line().slope() - 1;
                largestChange.merge(p.x(), change, (a, b) -> Math.abs(a) >= Math.abs(b) ? a : b);
            }
        at.forEach((c, list) ->
                out.add("The dilution of " + Rounded.number(c) + " g/mL lies off the line of the others at "
                        + where(list, all) + "; it was kept. Without it the extinction would change by up to "
                        + Rounded.percent(largestChange.get(c)) + "."));
    }

    private static String where(List<Extinction> hits, List<Extinction> all) {
        if (hits.size() == all.size() && all.size() > 1) return "all wavelengths";
        String list =
                hits.stream().limit(4).map(e -> Rounded.plain(e.wavelengthNm())).collect(Collectors.joining(", "));
        if (hits.size() > 4) return hits.size() + " of " + all.size() + " wavelengths (" + list + ", …)";
        return list + " nm";
    }
}
