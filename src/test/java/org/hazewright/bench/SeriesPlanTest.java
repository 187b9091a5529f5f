package org.hazewright.bench;

import static org.junit.jupiter.api.Assertions.assertEquals;
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
import org.hazewright.brief.SearchLimits;
import org.hazewright.brief.Series;
import org.hazewright.brief.Target;
import org.hazewright.files.ShelfReader;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Stock;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Shelf;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

class SeriesPlanTest {
    private static final Shelf SHELF = ShelfReader.readShipped();

    /** Random rows at two wavelengths, as a person might ask for them. */
    private static Series series(long seed, String base, int count) {
        SplittableRandom random = new SplittableRandom(seed);
        List<Brief> phantoms = new ArrayList<>();
        double batchMl = Math.rint(random.nextDouble(50, 600));
        for (int k = 0; k < count; k++) {
            double musp = random.nextDouble(5, 20);
            double mua = random.nextDouble(0.05, 0.5);
            phantoms.add(brief(
                    "s-" + (k + 1),
                    base,
                    batchMl,
                    List.of(target(690, mua, musp, 0.08), target(830, 0.9 * mua, 0.8 * musp, 0.08)),
                    List.of("ink-demo", "nigrosin-demo", "dye-blue-demo", "lipid-emulsion-20"),
                    2));
        }
        return new Series("s", "Rows", phantoms, Optional.empty());
    }

    private static Target target(double nm, double mua, double musp, double share) {
        return new Target(nm, OptionalDouble.of(mua), OptionalDouble.of(musp), share * mua, share * musp, 1);
    }

    private static Brief brief(
            String name, String base, double batchMl, List<Target> targets, List<String> use, int absorbers) {
        return new Brief(
                name,
                "Rows, " + name,
                List.of(base),
                batchMl,
                0.05,
                22,
                targets,
                List.of(),
                new SearchLimits(use, List.of(), absorbers, 1, 0, 0),
                Balance.USUAL,
                Optional.empty(),
                Optional.empty());
    }

    @ParameterizedTest
    @ValueSource(longs = {1, 2, 3, 4})
    void totalsAreSumsOfRowsAndStocksCoverTheirDraws(long seed) {
        SeriesPlan plan = SeriesPlan.of(series(seed, seed % 2 == 0 ? "water" : "gelatin-10", 6), SHELF);
        Map<Ingredient, Double> sums = new HashMap<>();
        Map<String, Double> drawn = new HashMap<>();
        for (SeriesPlan.Phantom p : plan.phantoms())
            for (Item i : p.recipe().items()) {
                if (i.stock().isPresent()) drawn.merge(i.stock().get(), i.massG(), Double::sum);
                else sums.merge(i.ingredient(), i.massG(), Double::sum);
            }
        for (Stock s : plan.stocks()) {
            if (s.from().isPresent()) drawn.merge(s.from().get(), s.ingredientG(), Double::sum);
            else sums.merge(s.ingredient(), s.ingredientG(), Double::sum);
            sums.merge(s.diluent(), s.diluentG(), Double::sum);
        }
        assertEquals(sums.keySet(), plan.buyG().keySet());
        plan.buyG().forEach((i, g) -> assertEquals(sums.get(i), g, 1e-9, i.id()));
        assertEquals(plan.stocks().size(), drawn.size(), "every stock is drawn from");
        for (Leftover l : plan.leftovers()) {
            assertEquals(drawn.get(l.stock()), l.usedG(), 1e-9);
            assertTrue(l.madeG() >= 1.099 * l.usedG(), "a tenth to spare: " + l);
        }
        double table = plan.columns().stream().mapToDouble(plan::sumG).sum();
        double recipes = plan.phantoms().stream()
                .mapToDouble(p ->
                        p.recipe().items().stream().mapToDouble(Item::massG).sum())
                .sum();
        assertEquals(recipes, table, 1e-9, "the weighing table leaves nothing out");
    }

    @ParameterizedTest
    @ValueSource(longs = {1, 2, 3, 4})
    void everyPhantomIsItsVolumeOnTheBalance(long seed) {
        Series series = series(seed, "water", 5);
        for (SeriesPlan.Phantom p : SeriesPlan.of(series, SHELF).phantoms()) {
            assertEquals(p.brief().volumeMl(), Mixture.of(p.recipe()).volumeMl(), 0.002, "base rounded to a milligram");
            for (Item i : p.recipe().items()) {
                assertEquals(Math.rint(i.massG() * 1000), i.massG() * 1000, 1e-6);
                assertTrue(i.massG() >= 0.020, i.label() + " can be weighed");
            }
        }
    }

    /** What it says of one phantom is what the one-brief model says of that recipe. */
    @Test
    void chancesAndPredictionsAreThoseOfTheRecipes() {
        for (SeriesPlan.Phantom p : SeriesPlan.of(series(5, "water", 4), SHELF).phantoms())
            for (Answer.Predicted x : p.outlook().predicted()) {
                var at = Mixture.of(p.recipe()).at(x.point().wavelengthNm());
                double mu = x.point().quantity().sign().equals("µa") ? at.muaPerCm() : at.muspPerCm();
                assertEquals(mu, x.perCm(), 1e-9 * mu);
            }
    }

    /** One list of bottles, although a phantom alone would take another: inside its tolerance it follows the set. */
    @Test
    void oneListOfBottles() {
        Series series = series(6, "water", 8);
        SeriesPlan plan = SeriesPlan.of(series, SHELF);
        assertTrue(plan.ingredients().size() <= 3, "two absorbers and a scatterer at most: " + plan.ingredients());
        assertTrue(
                plan.notes().get(0).startsWith("One list of bottles"),
                plan.notes().get(0));
    }

    /**
     * A phantom that the common bottles cannot meet gets its own, and the notes say so. The red dye hardly absorbs at 670 nm and
     * the blue one absorbs there as at 550 nm: no single dye can give both kinds.
     */
    @Test
    void anOddPhantomGetsItsOwnBottles() {
        List<String> use = List.of("dye-red-demo", "dye-blue-demo", "lipid-emulsion-20");
        List<Brief> phantoms = new ArrayList<>();
        for (int k = 0; k < 4; k++)
            phantoms.add(brief(
                    "o-" + k,
                    "water",
                    200,
                    List.of(
                            target(550, 1 + k, 12, 0.05),
                            new Target(670, OptionalDouble.of(0.005), OptionalDouble.empty(), 0.02, 0, 1)),
                    use,
                    1));
        phantoms.add(brief(
                "o-odd",
                "water",
                200,
                List.of(
                        target(550, 0.231, 12, 0.05),
                        new Target(670, OptionalDouble.of(0.265), OptionalDouble.empty(), 0.013, 0, 1)),
                use,
                1));
        SeriesPlan plan = SeriesPlan.of(new Series("o", "Odd", phantoms, Optional.empty()), SHELF);
        assertTrue(plan.meets(), plan.notes().toString());
        assertTrue(
                plan.notes().stream().anyMatch(n -> n.startsWith("odd cannot be met with these bottles")),
                plan.notes().toString());
        for (SeriesPlan.Phantom p : plan.phantoms())
            assertEquals(
                    p.name().equals("odd"),
                    p.recipe().items().stream()
                            .anyMatch(i -> i.ingredient().id().equals("dye-blue-demo")),
                    p.name());
    }
}
