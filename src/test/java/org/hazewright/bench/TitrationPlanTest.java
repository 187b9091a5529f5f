package org.hazewright.bench;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.OptionalDouble;
import java.util.SplittableRandom;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Brief;
import org.hazewright.brief.Point;
import org.hazewright.brief.SearchLimits;
import org.hazewright.brief.Series;
import org.hazewright.brief.Target;
import org.hazewright.brief.Titration;
import org.hazewright.files.ShelfReader;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Shelf;
import org.hazewright.shelf.Uncertainty;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class TitrationPlanTest {
    private static final Shelf SHELF = ShelfReader.readShipped();
    private static final double[] MUA = {0.05, 0.10, 0.15, 0.20, 0.25};

    private static Series series(String base, double[] mua, Titration titration, double balanceU) {
        return series(base, mua, titration, balanceU, 0.05);
    }

    private static Series series(String base, double[] mua, Titration titration, double balanceU, double tolerance) {
        List<Brief> phantoms = new ArrayList<>();
        for (int k = 0; k < mua.length; k++)
            phantoms.add(new Brief(
                    "t-" + (k + 1),
                    "Titration, " + (k + 1),
                    List.of(base),
                    1000,
                    0,
                    22,
                    List.of(new Target(
                            800,
                            OptionalDouble.of(mua[k]),
                            OptionalDouble.of(10),
                            tolerance * mua[k],
                            12 * tolerance,
                            1)),
                    List.of(),
                    new SearchLimits(List.of("ink-demo", "lipid-emulsion-20"), List.of(), 1, 1, 0, 0),
                    new Balance(0.001, balanceU, 0.020, 620),
                    Optional.empty(),
                    Optional.empty()));
        return new Series("t", "Titration", phantoms, Optional.of(titration));
    }

    private static TitrationPlan plan(Titration titration) {
        return TitrationPlan.of(series("water", MUA, titration, 0.001), SHELF);
    }

    private static double value(TitrationPlan.Step s, int point) {
        return s.predicted().get(point).perCm();
    }

    @Test
    void muspStaysWithATitrantThatCarriesIt() {
        TitrationPlan plan = plan(new Titration(true, 20, 0.5));
        double first = value(plan.steps().get(0), 1);
        for (TitrationPlan.Step s : plan.steps()) {
            assertEquals(first, value(s, 1), 1e-3 * first, s.name());
            assertTrue(s.meets(), s.name());
        }
    }

    /** Without scatterer in the titrant the bath is thinned: µs' of the emulsion falls as volume grows; the ink adds its own. */
    @Test
    void muspFallsWithoutIt() {
        TitrationPlan plan = plan(new Titration(false, 0, 0));
        Ingredient emulsion = SHELF.require("lipid-emulsion-20");
        double emulsionG = plan.start().massesG().get(emulsion);
        Vessel end = new Vessel(plan.start().massesG())
                .plus(Vessel.perG(plan.titrant().massesG()), plan.titrantUsedG());
        assertEquals(emulsionG, end.massesG().get(emulsion), 1e-9, "no emulsion was added");
        TitrationPlan.Step last = plan.steps().get(plan.steps().size() - 1);
        assertEquals(end.volumeMl(), last.contentMl(), 1e-6);
        double thinned = emulsionG / end.volumeMl() * 1000 / emulsionG;
        assertTrue(thinned < 0.99 && last.contentMl() > 1010, "it grows by more than a per cent");
        Mixture all = new Mixture(end.massesG(), 22);
        assertEquals(all.at(800).muspPerCm(), value(last, 1), 1e-9);
    }

    @ParameterizedTest
    @ValueSource(booleans = {true, false})
    void volumesAddAndAliquotsAreTakenOff(boolean keep) {
        TitrationPlan plan = plan(new Titration(keep, 25, 0));
        Mixture titrant = Mixture.of(plan.titrant());
        double volume = Mixture.of(plan.start()).volumeMl();
        for (TitrationPlan.Step s : plan.steps().subList(1, plan.steps().size())) {
            volume += s.addG() / titrant.densityGPerMl() - 25;
            assertEquals(volume, s.contentMl(), 1e-6 * volume);
        }
        assertTrue(plan.titrantUsedG() < titrant.massG(), "there is enough titrant");
    }

    @Test
    void whatIsBoughtIsWhatIsWeighed() {
        TitrationPlan plan = plan(new Titration(true, 0, 0.5));
        Map<String, Double> sums = new HashMap<>();
        for (Recipe r : List.of(plan.start(), plan.titrant()))
            for (Item i : r.items())
                if (i.stock().isEmpty()) sums.merge(i.ingredient().id(), i.massG(), Double::sum);
        for (Stock s : plan.stocks()) {
            if (s.from().isEmpty()) sums.merge(s.ingredient().id(), s.ingredientG(), Double::sum);
            sums.merge(s.diluent().id(), s.diluentG(), Double::sum);
        }
        sums.merge("water", 0.5 * (MUA.length - 1), Double::sum);
        plan.buyG().forEach((i, g) -> assertEquals(sums.remove(i.id()), g, 1e-9, i.id()));
        assertTrue(sums.isEmpty(), sums.toString());
        plan.leftovers().forEach(l -> assertTrue(l.leftG() > 0, l.toString()));
    }

    /**
     * The uncertainty of each step against the titration made 40 000 times on paper, on a coarse balance so that weighing matters:
     * loads, coefficients, densities and volumes drawn here, by this test's own arithmetic. Standard error of a standard deviation
     * of so many draws is 0.35 %; 3 % leaves room for what is not linear. Chances are shares of the same draws, each step's own and
     * that of all; 0.02 is four standard errors of the plan's 10 000 draws.
     */
    @ParameterizedTest
    @ValueSource(booleans = {false, true})
    void uncertaintyIsThatOfManyTitrations(boolean figuresKnown) {
        Titration titration = new Titration(true, 20, 0.5);
        TitrationPlan plan =
                TitrationPlan.of(series("water", MUA, titration, 0.03, 0.03), figuresKnown ? wellKnown() : SHELF);
        SplittableRandom random = new SplittableRandom(7);
        int count = 40_000;
        int steps = plan.steps().size();
        double[][] sum = new double[steps][2];
        double[][] squares = new double[steps][2];
        int[] landed = new int[steps];
        int together = 0;
        List<Map<Ingredient, double[]>> kappa = kappa(plan);
        for (int n = 0; n < count; n++) {
            double[][] mu = draw(plan, random, kappa);
            int now = 0;
            for (int k = 0; k < steps; k++) {
                boolean inside = true;
                for (int q = 0; q < 2; q++) {
                    sum[k][q] += mu[k][q];
                    squares[k][q] += mu[k][q] * mu[k][q];
                    Point p = plan.steps().get(k).predicted().get(q).point();
                    inside &= Math.abs(mu[k][q] - p.wantedPerCm()) <= p.tolerancePerCm();
                }
                if (inside) landed[k]++;
                now += inside ? 1 : 0;
            }
            if (now == steps) together++;
        }
        boolean telling = false;
        for (int k = 0; k < steps; k++) {
            double share = (double) landed[k] / count;
            telling |= share > 0.1 && share < 0.9;
            assertEquals(share, plan.steps().get(k).chance(), 0.02, "chance of step " + k);
        }
        assertTrue(telling || figuresKnown, "at least one chance is far from 0 and 1");
        assertEquals((double) together / count, plan.chanceOfAll(), 0.02, "chance of all");
        for (int k = 0; k < steps; k++)
            for (int q = 0; q < 2; q++) {
                double mean = sum[k][q] / count;
                double u = Math.sqrt(squares[k][q] / count - mean * mean);
                assertEquals(u, plan.steps().get(k).predicted().get(q).uPerCm(), 0.03 * u, "step " + k + ", " + q);
            }
    }

    /** The same bottles with their coefficients known, so that the balance is what matters. */
    private static Shelf wellKnown() {
        return new Shelf(
                "known",
                SHELF.ingredients().stream()
                        .map(i -> i.withUncertainty(new Uncertainty(0, 0)))
                        .toList(),
                SHELF.materials());
    }

    private static List<Map<Ingredient, double[]>> kappa(TitrationPlan plan) {
        List<Map<Ingredient, double[]>> all = new ArrayList<>();
        Map<Ingredient, Double> titrant = plan.titrant().massesG();
        double titrantG =
                plan.titrant().items().stream().mapToDouble(Item::massG).sum();
        Map<Ingredient, Double> now = new HashMap<>(plan.start().massesG());
        for (TitrationPlan.Step s : plan.steps()) {
            double volume = new Mixture(now, 22).volumeMl();
            now.replaceAll((i, g) -> g * (1 - s.takenOutMl() / volume));
            titrant.forEach((i, g) -> now.merge(i, g / titrantG * s.addG(), Double::sum));
            Mixture mixture = new Mixture(now, 22);
            Map<Ingredient, double[]> k = new HashMap<>();
            mixture.at(800).shares().forEach(share -> {
                double c = mixture.concentrationGPerMl(share.ingredient());
                k.put(share.ingredient(), new double[] {share.muaPerCm() / c, share.muspPerCm() / c});
            });
            all.add(k);
        }
        return all;
    }

    private static double[][] draw(TitrationPlan plan, SplittableRandom random, List<Map<Ingredient, double[]>> kappa) {
        Balance balance = plan.balance();
        java.util.function.DoubleUnaryOperator weighed =
                g -> g + balance.standardUncertaintyG() * Math.sqrt(balance.loads(g)) * random.nextGaussian();
        Map<String, Map<Ingredient, Double>> stocks = new HashMap<>();
        for (Stock s : plan.stocks()) {
            double g = weighed.applyAsDouble(s.ingredientG());
            double d = weighed.applyAsDouble(s.diluentG());
            Map<Ingredient, Double> content = new HashMap<>();
            Map<Ingredient, Double> in =
                    s.from().isPresent() ? stocks.get(s.from().get()) : Map.of(s.ingredient(), 1.0);
            in.forEach((i, share) -> content.merge(i, share * g / (g + d), Double::sum));
            content.merge(s.diluent(), d / (g + d), Double::sum);
            stocks.put(s.id(), content);
        }
        Map<Ingredient, Double> vessel = mixed(plan.start(), stocks, weighed);
        Map<Ingredient, Double> titrant = mixed(plan.titrant(), stocks, weighed);
        double titrantG = titrant.values().stream().mapToDouble(x -> x).sum();
        Map<Ingredient, Double> density = new HashMap<>();
        Map<Ingredient, double[]> factor = new HashMap<>();
        for (Ingredient i : vessel.keySet()) {
            density.put(i, i.densityGPerMl() * (1 + 0.001 * random.nextGaussian()));
            factor.put(i, new double[] {
                1 + i.uncertainty().absorption() * random.nextGaussian(),
                1 + i.uncertainty().scattering() * random.nextGaussian()
            });
        }
        double measured = 1 + 0.001 * random.nextGaussian();
        Ingredient water = plan.base();
        double[][] mu = new double[plan.steps().size()][2];
        for (int k = 0; k < mu.length; k++) {
            TitrationPlan.Step s = plan.steps().get(k);
            if (k > 0) {
                double volume = volume(vessel, null);
                vessel.replaceAll((i, g) -> g * (1 - s.takenOutMl() / volume));
                vessel.merge(water, weighed.applyAsDouble(s.waterBackG()) - s.waterBackG(), Double::sum);
                double added = weighed.applyAsDouble(s.addG());
                titrant.forEach((i, g) -> vessel.merge(i, g / titrantG * added, Double::sum));
            }
            double volume = volume(vessel, density) * measured;
            for (var e : vessel.entrySet())
                for (int q = 0; q < 2; q++)
                    mu[k][q] += e.getValue() * kappa.get(k).get(e.getKey())[q] * factor.get(e.getKey())[q] / volume;
        }
        return mu;
    }

    private static Map<Ingredient, Double> mixed(
            Recipe r, Map<String, Map<Ingredient, Double>> stocks, java.util.function.DoubleUnaryOperator weighed) {
        Map<Ingredient, Double> masses = new HashMap<>();
        for (Item i : r.items()) {
            double g = weighed.applyAsDouble(i.massG());
            if (i.stock().isEmpty()) masses.merge(i.ingredient(), g, Double::sum);
            else stocks.get(i.stock().get()).forEach((x, share) -> masses.merge(x, share * g, Double::sum));
        }
        return masses;
    }

    private static double volume(Map<Ingredient, Double> masses, Map<Ingredient, Double> density) {
        double volume = 0;
        for (var e : masses.entrySet())
            volume += e.getValue() / (density == null ? e.getKey().densityGPerMl() : density.get(e.getKey()));
        return volume;
    }

    @Test
    void whatCannotBeTitratedIsRefused() {
        Titration plain = new Titration(true, 0, 0);
        Refusal gel =
                assertThrows(Refusal.class, () -> TitrationPlan.of(series("gelatin-10", MUA, plain, 0.001), SHELF));
        assertTrue(gel.getMessage().contains("stays liquid"), gel.getMessage());
        Refusal falling = assertThrows(
                Refusal.class, () -> TitrationPlan.of(series("water", new double[] {0.2, 0.1}, plain, 0.001), SHELF));
        assertTrue(falling.getMessage().contains("from less to more"), falling.getMessage());
        Titration small = new Titration(true, 0, 0, OptionalDouble.of(1005));
        Refusal vessel = assertThrows(Refusal.class, () -> TitrationPlan.of(series("water", MUA, small, 0.001), SHELF));
        assertTrue(vessel.getMessage().contains("the vessel holds 1005 mL"), vessel.getMessage());
    }
}
