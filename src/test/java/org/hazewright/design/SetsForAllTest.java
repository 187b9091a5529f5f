package org.hazewright.design;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.Random;
import java.util.Set;
import java.util.TreeSet;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Brief;
import org.hazewright.brief.SearchLimits;
import org.hazewright.brief.Target;
import org.hazewright.files.ShelfReader;
import org.hazewright.search.ConvexProgramme;
import org.hazewright.search.SetSearch;
import org.hazewright.search.SetSolution;
import org.hazewright.shelf.Shelf;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** The ranking of sets for a whole series, with its cuts, against every admissible set solved for every phantom without any. */
class SetsForAllTest {
    private static final Shelf SHELF = ShelfReader.readShipped();
    private static final List<String> USE = List.of(
            "ink-demo",
            "nigrosin-demo",
            "dye-blue-demo",
            "nir-dye-demo-780",
            "nir-dye-demo-850",
            "copper-sulphate-solution",
            "lipid-emulsion-10",
            "lipid-emulsion-20",
            "microspheres-polystyrene-1000");

    /** Six phantoms with coloured absorptions; tolerances from wide to too narrow. */
    private static List<CommonSet.Cell> cells(long seed) {
        Random random = new Random(seed);
        double tolerance = new double[] {0.25, 0.08, 0.02}[(int) (seed % 3)];
        double slope = 0.6 * random.nextDouble();
        List<CommonSet.Cell> cells = new ArrayList<>();
        for (int k = 0; k < 6; k++) {
            double mua = 0.06 + 0.06 * k;
            List<Target> targets = new ArrayList<>();
            for (double nm : new double[] {690, 760, 830}) {
                double a = mua * (1 - slope * (nm - 690) / 140) * (1 + 0.05 * random.nextGaussian());
                double s = 9 * Math.pow(nm / 760, -1.1);
                targets.add(
                        new Target(nm, OptionalDouble.of(a), OptionalDouble.of(s), tolerance * a, tolerance * s, 1));
            }
            Brief brief = new Brief(
                    "set-" + k,
                    "Set " + k,
                    List.of("water"),
                    500,
                    0,
                    22,
                    targets,
                    List.of(),
                    new SearchLimits(USE, List.of(), 2, 1, 0, 0),
                    Balance.USUAL,
                    Optional.empty(),
                    Optional.empty());
            Candidates candidates = Candidates.of(brief, SHELF, "water");
            BriefColumns columns = new BriefColumns(brief, SHELF, candidates);
            SetSearch search = new SetSearch(columns.everything());
            cells.add(new CommonSet.Cell(brief, candidates, columns, search.problem(), search, search.run(8)));
        }
        return cells;
    }

    private record Ranked(Set<String> ids, int meeting, double score) {}

    private static List<Ranked> everySet(List<CommonSet.Cell> cells) {
        List<String> ids = cells.get(0).ids();
        List<Ranked> all = new ArrayList<>();
        for (int mask = 0; mask < 1 << ids.size(); mask++) {
            int[] set = new int[Integer.bitCount(mask)];
            for (int i = 0, at = 0; i < ids.size(); i++) if ((mask >> i & 1) == 1) set[at++] = i;
            if (!cells.get(0).problem().admits(set)) continue;
            int meeting = 0;
            double score = 0;
            for (CommonSet.Cell c : cells) {
                SetSolution s = c.search().solve(set, true);
                if (s.status() == ConvexProgramme.Status.INFEASIBLE)
                    s = c.search().solve(set, false);
                else meeting++;
                score += s.bias() + s.ingredient();
                for (double a : s.amounts()) if (a > 0) score += 0.01;
            }
            Set<String> named = new TreeSet<>();
            for (int i : set) named.add(ids.get(i));
            all.add(new Ranked(named, meeting, score));
        }
        all.sort(Comparator.comparingInt((Ranked r) -> -r.meeting).thenComparingDouble(Ranked::score));
        return all;
    }

    @ParameterizedTest
    @ValueSource(longs = {0, 1, 2, 3, 4, 5})
    void theBestKeptAreTheBestOfAll(long seed) {
        List<CommonSet.Cell> cells = cells(seed);
        List<Ranked> all = everySet(cells);
        Set<String> poor = all.get(all.size() - 1).ids;
        for (List<Set<String>> likely : List.of(List.<Set<String>>of(), List.of(poor))) {
            SetsForAll ranking = new SetsForAll(cells, () -> false);
            List<SetsForAll.Screened> best = ranking.best(likely);
            assertTrue(ranking.exhausted);
            assertEquals(all.size(), ranking.compared);
            for (int k = 0; k < SetsForAll.KEPT; k++) {
                assertEquals(all.get(k).meeting, best.get(k).meeting(), "seed " + seed + ", place " + k);
                assertEquals(all.get(k).score, best.get(k).score(), 1e-9 * all.get(k).score);
            }
            assertEquals(all.get(0).ids, best.get(0).ids());
        }
    }

    @ParameterizedTest
    @ValueSource(longs = {1})
    void whatWasStoppedIsNotCalledTheBestOfAll(long seed) {
        SetsForAll ranking = new SetsForAll(cells(seed), () -> true);
        assertFalse(ranking.best(List.of(Set.of("ink-demo"))).isEmpty());
        assertFalse(ranking.exhausted);
        assertEquals(1, ranking.compared);
    }
}
