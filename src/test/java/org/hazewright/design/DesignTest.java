package org.hazewright.design;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import org.apache.commons.math3.optim.InitialGuess;
import org.apache.commons.math3.optim.MaxEval;
import org.apache.commons.math3.optim.nonlinear.scalar.GoalType;
import org.apache.commons.math3.optim.nonlinear.scalar.ObjectiveFunction;
import org.apache.commons.math3.optim.nonlinear.scalar.noderiv.NelderMeadSimplex;
import org.apache.commons.math3.optim.nonlinear.scalar.noderiv.SimplexOptimizer;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Brief;
import org.hazewright.brief.Point;
import org.hazewright.brief.SearchLimits;
import org.hazewright.brief.Target;
import org.hazewright.files.ShelfReader;
import org.hazewright.mixture.Coefficients;
import org.hazewright.mixture.Mixture;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Shelf;
import org.junit.jupiter.api.Test;

/** From a brief to amounts on the shipped shelf: judged against the full model and an independent optimiser. */
class DesignTest {
    private static final Shelf SHELF = ShelfReader.readShipped();

    private static Target target(double nm, double mua, double musp, double tolerance) {
        return new Target(nm, OptionalDouble.of(mua), OptionalDouble.of(musp), tolerance * mua, tolerance * musp, 1);
    }

    private static Brief brief(List<String> bases, SearchLimits limits, Target... targets) {
        return new Brief(
                "test",
                "Test",
                bases,
                1000,
                0,
                22,
                List.of(targets),
                List.of(),
                limits,
                new Balance(0.0001, 0.0001, 0.001, 2000),
                Optional.empty(),
                Optional.empty());
    }

    private static SearchLimits use(int absorbers, int modifiers, String... ids) {
        return new SearchLimits(List.of(ids), List.of(), absorbers, 1, modifiers, 0);
    }

    /** J without its weighing part, on the full model, base displaced: written here from the definition, apart from the program's. */
    private static double score(Brief brief, String base, List<Ingredient> members, double[] c) {
        Map<Ingredient, Double> grams = new LinkedHashMap<>();
        double added = 0;
        for (int k = 0; k < c.length; k++) {
            if (c[k] < 0) return 1e6 * (1 - c[k]);
            added += c[k] / members.get(k).densityGPerMl();
        }
        Ingredient b = SHELF.require(base);
        grams.put(b, 1000 * (1 - added) * b.densityGPerMl());
        for (int k = 0; k < c.length; k++) grams.put(members.get(k), 1000 * c[k]);
        Mixture mixture = new Mixture(grams, 22);
        double j = 0;
        for (Point p : brief.points()) {
            Coefficients at = mixture.at(p.wavelengthNm());
            boolean absorption = p.quantity() == Point.Quantity.MUA;
            double miss = ((absorption ? at.muaPerCm() : at.muspPerCm()) - p.wantedPerCm()) / p.tolerancePerCm();
            j += p.weight() * miss * miss;
            for (Coefficients.Share s : at.shares()) {
                if (!members.contains(s.ingredient())) continue;
                double u = absorption
                        ? s.muaPerCm() * s.ingredient().uncertainty().absorption()
                        : s.muspPerCm() * s.ingredient().uncertainty().scattering();
                j += p.weight() * (u / p.tolerancePerCm()) * (u / p.tolerancePerCm());
            }
        }
        return j;
    }

    @Test
    void agreesWithAnIndependentOptimiserOnTheFullModel() {
        Brief brief = brief(
                List.of("water"),
                use(1, 0, "ink-demo", "lipid-emulsion-20"),
                target(690, 0.1, 22, 0.10),
                target(830, 0.09, 20, 0.10));
        Option found = new Design(brief, SHELF).find(true).best();
        List<Ingredient> members = new ArrayList<>(found.concentrationGPerMl().keySet());
        assertEquals(2, members.size());
        double[] c =
                members.stream().mapToDouble(found.concentrationGPerMl()::get).toArray();
        double[] scale = c.clone();
        // Nelder & Mead, Comput. J. 7, 308 (1965), as Commons Math has it, from a start 20 % off
        double[] best = new SimplexOptimizer(1e-13, 1e-13)
                .optimize(
                        new MaxEval(4000),
                        GoalType.MINIMIZE,
                        new InitialGuess(new double[] {1.2, 0.8}),
                        new NelderMeadSimplex(2, 0.1),
                        new ObjectiveFunction(x ->
                                score(brief, "water", members, new double[] {x[0] * scale[0], x[1] * scale[1]})))
                .getPoint();
        double theirs = score(brief, "water", members, new double[] {best[0] * scale[0], best[1] * scale[1]});
        double ours = score(brief, "water", members, c);
        assertEquals(found.score().bias() + found.score().ingredient(), ours, 1e-6 * ours, "the score is what it says");
        // crowding is strong at 22 /cm; D c² holds κ at the answer while the independent score lets it move, hence not
        // less than 1e-4
        assertEquals(theirs, ours, 1e-4 * theirs);
    }

    @Test
    void everyNeighbourIsWorse() {
        Brief brief = brief(
                List.of("water"),
                use(2, 0, "ink-demo", "dye-blue-demo", "lipid-emulsion-20"),
                target(690, 0.12, 9, 0.10),
                target(760, 0.11, 8.2, 0.10),
                target(830, 0.10, 7.4, 0.10));
        Option found = new Design(brief, SHELF).find(true).best();
        assertTrue(found.meets());
        List<Ingredient> members = new ArrayList<>(found.concentrationGPerMl().keySet());
        double[] c =
                members.stream().mapToDouble(found.concentrationGPerMl()::get).toArray();
        double here = score(brief, "water", members, c);
        for (int k = 0; k < c.length; k++)
            for (double factor : new double[] {0.98, 1.02}) {
                double[] moved = c.clone();
                moved[k] *= factor;
                assertTrue(
                        score(brief, "water", members, moved) > here,
                        members.get(k).id() + " times " + factor);
            }
    }

    @Test
    void aModifierThatMovesTheHostIndexIsFollowed() {
        Brief brief = brief(
                List.of("water"),
                new SearchLimits(List.of("ink-demo", "lipid-emulsion-20", "sucrose"), List.of(), 1, 1, 1, 0),
                target(760, 0.10, 8, 0.2),
                target(970, 0.33, 6, 0.2));
        Option found = new Design(brief, SHELF).find(true).best();
        assertTrue(
                found.ids().contains("sucrose"),
                "water absorbs 0.48 /cm at 970 nm and must be displaced: " + found.ids());
        assertTrue(found.meets(), "worst miss " + found.worstMiss());
        double n = found.mixture().hostIndex(760);
        assertTrue(n > 1.35, "the host index is that of the sugar solution, " + n);
    }

    @Test
    void aBaseAboveTheTargetIsNamed() {
        Brief brief = brief(List.of("water"), use(1, 0, "ink-demo", "lipid-emulsion-20"), target(970, 0.30, 6, 0.05));
        Finding finding = new Design(brief, SHELF).find(true);
        assertFalse(finding.best().meets());
        assertTrue(finding.bestPossibleWorstMiss() > 1);
        assertTrue(
                finding.limits().stream()
                        .anyMatch(s -> s.contains("The base alone already absorbs 0.480 /cm at 970 nm")),
                finding.limits().toString());
    }

    @Test
    void ofTwoBasesTheBetterIsTaken() {
        Brief brief = brief(
                List.of("water", "heavy-water"),
                use(1, 0, "ink-demo", "lipid-emulsion-20"),
                target(970, 0.30, 6, 0.05));
        Finding finding = new Design(brief, SHELF).find(true);
        assertEquals("heavy-water", finding.best().base().id(), "it absorbs far less than water at 970 nm");
        assertTrue(finding.best().meets());
    }

    @Test
    void aThirdAbsorberIsPromisedOnlyWhenItHelps() {
        SearchLimits one = use(1, 0, "ink-demo", "nir-dye-demo-850", "lipid-emulsion-20");
        Target[] targets = {target(690, 0.05, 10, 0.05), target(850, 0.20, 8, 0.05)};
        Finding finding = new Design(brief(List.of("water"), one, targets), SHELF).find(true);
        assertTrue(finding.bestPossibleWorstMiss() > 1);
        String promise = finding.limits().stream()
                .filter(s -> s.startsWith("With a second absorber"))
                .findFirst()
                .orElseThrow(() -> new AssertionError(finding.limits()));
        double promised = Double.parseDouble(promise.replaceAll(".* to ([0-9.]+) half-widths.*", "$1"));
        SearchLimits two = use(2, 0, "ink-demo", "nir-dye-demo-850", "lipid-emulsion-20");
        double kept = new Design(brief(List.of("water"), two, targets), SHELF)
                .find(true)
                .bestPossibleWorstMiss();
        assertEquals(promised, kept, 0.01 + 0.03 * kept, promise);
    }

    @Test
    void whatCannotTakePartIsRefusedOrLeftOutWithAReason() {
        Brief silicone = brief(List.of("pdms"), use(1, 0, "ink-demo", "tio2-rutile"), target(690, 0.1, 8, 0.1));
        assertThrows(Refusal.class, () -> new Design(silicone, SHELF).find(true));
        Brief all = brief(List.of("water"), SearchLimits.USUAL, target(900, 0.1, 8, 0.1));
        Finding finding = new Design(all, SHELF).find(true);
        assertTrue(
                finding.leftOut().get("ink-published-bottle").contains("842.5"),
                finding.leftOut().toString());
    }
}
