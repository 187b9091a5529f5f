package org.hazewright.bench;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.stream.Stream;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Point;
import org.hazewright.mixture.Coefficients;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Recipe;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.MethodSource;

/** Every effect and every end of a band against the full model of a recipe that is really weighed so. */
class SensitivityTest {
    private static final Balance BALANCE = new Balance(0.0001, 0.0002, 0.010, 220);

    static Stream<Contents> contents() {
        return Stream.of(
                Bottles.contents(Bottles.WATER, 100, Bottles.INK, 2e-5, Bottles.EMULSION, 0.05),
                Bottles.contents(Bottles.GELATIN, 300, Bottles.INK, 1e-8, Bottles.EMULSION, 0.15, Bottles.AZIDE, 2e-4),
                Bottles.contents(Bottles.SILICONE, 60, Bottles.TITANIA, 1e-3, Bottles.CARBON, 2e-4),
                Bottles.contents(Bottles.RESIN, 250, Bottles.TITANIA, 1e-5));
    }

    private static double[] misses(Recipe recipe, List<Point> points) {
        Coefficients at = Mixture.of(recipe).at(780);
        return points.stream()
                .mapToDouble(p -> p.miss(p.quantity() == Point.Quantity.MUA ? at.muaPerCm() : at.muspPerCm()))
                .toArray();
    }

    /** Half-widths so that the plan lies inside, near the edge, or outside of them. */
    private static List<Point> shifted(List<Point> points, double miss) {
        return points.stream()
                .map(p -> new Point(
                        p.quantity(), 780, p.wantedPerCm() - miss * p.tolerancePerCm(), p.tolerancePerCm(), 1))
                .toList();
    }

    @ParameterizedTest
    @MethodSource("contents")
    void oneMorePerCentAndOneMoreMilligramAreWhatTheModelSays(Contents contents) {
        Recipe recipe = Bottles.plan(contents, BALANCE).recipe();
        List<Point> points = Bottles.points(contents, 0.05);
        double[] planned = misses(recipe, points);
        for (Sensitivity s : Sensitivity.of(recipe, BALANCE, points)) {
            double[] percent =
                    misses(s.weighing().changed(recipe, 1.01 * s.weighing().massG()), points);
            double[] mg = misses(s.weighing().changed(recipe, s.weighing().massG() + 0.001), points);
            for (int j = 0; j < planned.length; j++) {
                Sensitivity.Effect e = s.effects().get(j);
                assertEquals(percent[j] - planned[j], e.perPercentMiss(), 1e-9);
                assertEquals(mg[j] - planned[j], e.perMgMiss(), 1e-9);
                assertEquals(e.perMgMiss() * points.get(j).tolerancePerCm(), e.perMgPerCm(), 1e-12);
                assertEquals(e.perPercentMiss() * points.get(j).tolerancePerCm(), e.perPercentPerCm(), 1e-12);
            }
        }
    }

    @ParameterizedTest
    @MethodSource("contents")
    void insideItsBandAWeighingDoesNoHarmAndBeyondItDoes(Contents contents) {
        Recipe recipe = Bottles.plan(contents, BALANCE).recipe();
        for (double miss : new double[] {0, 0.9, -0.95, 1.5, -3}) {
            List<Point> points = shifted(Bottles.points(contents, 0.05), miss);
            double[] planned = misses(recipe, points);
            for (Sensitivity s : Sensitivity.of(recipe, BALANCE, points)) {
                Weighing w = s.weighing();
                double digit = BALANCE.readabilityG();
                assertTrue(s.lowG() <= w.massG() - digit * 0.999 || s.lowG() == 0, w.toString());
                assertTrue(s.highG() >= w.massG() + digit * 0.999, w.toString());
                double widest = contents.base().id().equals("silicone")
                                || contents.base().id().equals("resin")
                        ? ofBase(w) ? 0.02 : 0.05
                        : 0.05;
                for (int side : new int[] {-1, 1}) {
                    double end = side > 0 ? s.highG() : s.lowG();
                    boolean onlyADigit = Math.abs(end - w.massG()) < 1.5 * digit;
                    boolean capped = Math.abs(end - w.massG()) > widest * w.massG() - 2 * digit;
                    if (!onlyADigit)
                        assertTrue(harmless(planned, misses(w.changed(recipe, end), points)), w + " at " + end);
                    double beyond = end + side * 2 * digit;
                    if (!capped && beyond > 0)
                        assertTrue(!harmless(planned, misses(w.changed(recipe, beyond), points)), w + " at " + beyond);
                }
            }
        }
    }

    private static boolean ofBase(Weighing w) {
        return w.role() == Weighing.Role.ITEM
                && List.of("silicone-a", "silicone-b", "resin-a", "resin-b").contains(w.label());
    }

    private static boolean harmless(double[] planned, double[] off) {
        for (int j = 0; j < planned.length; j++) {
            if (Math.abs(off[j] - planned[j]) > 0.25 + 1e-9) return false;
            if (Math.abs(planned[j]) <= 1 && Math.abs(off[j]) > 1 + 1e-9) return false;
        }
        return true;
    }
}
