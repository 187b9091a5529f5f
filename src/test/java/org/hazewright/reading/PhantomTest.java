package org.hazewright.reading;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Optional;
import java.util.Random;
import org.hazewright.files.ShelfReader;
import org.hazewright.files.TissueSpectra;
import org.hazewright.mixture.Budget;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Recipe;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Shelf;
import org.hazewright.transport.Medium;
import org.junit.jupiter.api.Test;

class PhantomTest {
    private static final Shelf SHELF = ShelfReader.readShipped();
    private static final double[] NM = {690, 830};

    private static Item item(String id, double g) {
        Ingredient i = SHELF.ingredients().stream()
                .filter(x -> x.id().equals(id))
                .findFirst()
                .orElseThrow();
        return new Item(i, Optional.empty(), Optional.empty(), g);
    }

    private static Recipe bath(double inkG, double dyeG) {
        List<Item> items = List.of(
                item("water", 950), item("lipid-emulsion-20", 43), item("ink-demo", inkG), item("dye-blue-demo", dyeG));
        return new Recipe("Bath", items.get(0).ingredient(), 22, 0.001, Optional.empty(), List.of(), items);
    }

    private static SetUp oximeter() {
        return SetUp.of("Oximeter", SetUp.Kind.OXIMETER)
                .wavelengthsNm(List.of(690.0, 830.0))
                .done();
    }

    private static List<Reading> read(Phantom phantom, SetUp setUp) {
        var tables = TissueSpectra.shipped();
        return phantom.read(
                setUp,
                Foresight.of(phantom::medium).with(phantom.oximeter(tables.oxyEpsilon(), tables.deoxyEpsilon())));
    }

    @Test
    void mediumAndSpreadAreTheRecipes() {
        Recipe bath = bath(0.015, 0.2);
        Phantom phantom = Phantom.of(bath, null);
        var c = Mixture.of(bath).at(690);
        assertEquals(new Medium(c.muaPerCm(), c.muspPerCm(), c.g(), c.boundaryIndex()), phantom.medium(690));
        Budget budget = Budget.of(bath, NM, Double.MAX_VALUE);
        assertEquals(budget.uMuaPerCm()[1], phantom.spread(830).uMuaPerCm(), 1e-12);
        assertEquals(budget.uMuspPerCm()[1], phantom.spread(830).uMuspPerCm(), 1e-12);
    }

    /** Of a mixture of water and ink, the base's share is what water does in it: its table times its volume share. */
    @Test
    void theBaseIsWhatTheBaseAbsorbs() {
        Phantom phantom = Phantom.of(bath(0.015, 0), null);
        double water = TissueSpectra.shipped().waterMua().at(830);
        double share = (950 / item("water", 1).ingredient().densityGPerMl())
                / Mixture.of(bath(0.015, 0)).volumeMl();
        assertEquals(water * share, phantom.basePerCm(830), 1e-3 * water);
    }

    /** Uncertainty of a saturation against a draw of all causes of the budget, each once per draw and common to both colours. */
    @Test
    void causesStayCommonToAllWavelengths() {
        Recipe bath = bath(0.012, 0.4);
        Phantom phantom = Phantom.of(bath, null);
        List<Reading> readings = read(phantom, oximeter());
        var tables = TissueSpectra.shipped();
        Oximeter oximeter = phantom.oximeter(tables.oxyEpsilon(), tables.deoxyEpsilon());
        Budget budget = Budget.of(bath, NM, Double.MAX_VALUE);
        Random random = new Random(5);
        int draws = 4000;
        double[] sum = new double[2];
        double[] squares = new double[2];
        for (int d = 0; d < draws; d++) {
            double[] mua = {phantom.medium(690).muaPerCm(), phantom.medium(830).muaPerCm()};
            for (var cause : budget.causes()) {
                double k = random.nextGaussian();
                for (int j = 0; j < 2; j++) mua[j] += k * cause.muaPerCm()[j];
            }
            Oximeter.Answer a = oximeter.read(NM, mua, new double[2]);
            double[] seen = {a.saturation(), a.haemoglobinUmolPerL()};
            for (int q = 0; q < 2; q++) {
                sum[q] += seen[q];
                squares[q] += seen[q] * seen[q];
            }
        }
        for (int q = 0; q < 2; q++) {
            double u = Math.sqrt(squares[q] / draws - Math.pow(sum[q] / draws, 2));
            assertEquals(u, readings.get(q).u(), 0.06 * u, "5 standard errors of the draw's spread");
        }
    }

    @Test
    void aBodyGivesItsThicknessToWhatIsPutOnIt() {
        Phantom phantom = Phantom.of(bath(0.015, 0), Body.box(80, 20, 60));
        SetUp slab = SetUp.of("Slab", SetUp.Kind.SLAB)
                .wavelengthsNm(List.of(690.0))
                .thicknessMm(10.0)
                .done();
        SetUp cuvette = SetUp.of("Cuvette", SetUp.Kind.COLLIMATED)
                .wavelengthsNm(List.of(690.0))
                .thicknessMm(1.0)
                .done();
        assertEquals(20, phantom.placed(slab).thicknessMm());
        assertEquals(1, phantom.placed(cuvette).thicknessMm(), "a sample of it, not the block");
        assertEquals(30, phantom.body().orElseThrow().wallMm());
        assertEquals(10, Phantom.of(bath(0.015, 0), null).placed(slab).thicknessMm());
        assertEquals(new Body(12, 25), Body.cylinder(50, 12));
        assertThrows(Refusal.class, () -> Body.slab(0));
    }

    @Test
    void wallsThatMatterAreToldAndFarOnesAreNot() {
        SetUp probe = SetUp.of("Probe", SetUp.Kind.REFLECTANCE)
                .wavelengthsNm(List.of(690.0))
                .distancesMm(List.of(20.0))
                .model(SetUp.ModelChoice.DIFFUSION)
                .done();
        String near = read(Phantom.of(bath(0.015, 0), Body.cylinder(30, 50)), probe)
                .get(0)
                .note();
        assertTrue(near.contains("side wall"), near);
        assertEquals(
                null,
                read(Phantom.of(bath(0.015, 0), Body.cylinder(300, 50)), probe)
                        .get(0)
                        .note());
    }

    @Test
    void aWavelengthThatAnIngredientDoesNotReach() {
        SetUp far = Adapted.atWavelengths(oximeter(), List.of(690.0, 2500.0));
        assertTrue(Phantom.of(bath(0.015, 0), null).gap(far).orElseThrow().contains("2500"));
        assertEquals(Optional.empty(), Phantom.of(bath(0.015, 0), null).gap(oximeter()));
    }
}
