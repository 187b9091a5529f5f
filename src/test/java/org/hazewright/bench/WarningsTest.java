package org.hazewright.bench;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.time.LocalDate;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;
import org.hazewright.shelf.Family;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Part;
import org.junit.jupiter.api.Test;

class WarningsTest {
    private static final LocalDate DAY = LocalDate.of(2031, 5, 4);

    private static Recipe recipe(Ingredient base, Ingredient... ingredients) {
        List<Item> items = new ArrayList<>();
        for (Ingredient i : ingredients) items.add(Item.neat(i, 1));
        return new Recipe("Test", base, 22, 0.001, Optional.empty(), List.of(), items);
    }

    private static List<Warning> of(Warning.Kind kind, Recipe recipe) {
        return Warnings.of(recipe, DAY).stream().filter(w -> w.kind() == kind).toList();
    }

    @Test
    void aConflictIsFoundWhicheverSideNamesIt() {
        // Azide names the ink; the ink does not name azide, whatever the order they are weighed in.
        for (Recipe r : List.of(
                recipe(Bottles.WATER, Bottles.WATER, Bottles.INK, Bottles.AZIDE),
                recipe(Bottles.WATER, Bottles.WATER, Bottles.AZIDE, Bottles.INK))) {
            List<Warning> found = of(Warning.Kind.CONFLICT, r);
            assertEquals(1, found.size());
            assertEquals(
                    java.util.Set.of("ink", "sodium-azide"),
                    java.util.Set.copyOf(found.get(0).ingredients()));
            assertTrue(found.get(0).text().contains("an invented quarrel"));
        }
        assertTrue(of(Warning.Kind.CONFLICT, recipe(Bottles.WATER, Bottles.WATER, Bottles.INK))
                .isEmpty());
    }

    @Test
    void aPlainWordFindsWhatIsCalledSo() {
        List<Warning> found = of(Warning.Kind.FORBIDDEN, recipe(Bottles.WATER, Bottles.AZIDE, Bottles.BLOOD));
        assertEquals(1, found.size(), "\"blood\" stands in the other's name, not in its id");
        assertTrue(found.get(0).text().contains("must not be put together"));
        Ingredient bloodless = new Bottles.Builder("bloodless", "Bloodless tea", Part.ABSORBER, Family.LIQUID).build();
        assertTrue(of(Warning.Kind.FORBIDDEN, recipe(Bottles.WATER, Bottles.AZIDE, bloodless))
                .isEmpty());
    }

    @Test
    void aLotQuarrelsLikeWhatItIsALotOf() {
        Ingredient lot = Bottles.lotOf(Bottles.INK, "L7", DAY.plusDays(1));
        assertEquals(
                1,
                of(Warning.Kind.CONFLICT, recipe(Bottles.WATER, Bottles.AZIDE, lot))
                        .size());
    }

    @Test
    void aDiluentCountsAsPresent() {
        Ingredient shy = new Bottles.Builder("shy", "Shy dye", Part.ABSORBER, Family.SILICONE)
                .conflict("water", "it bleaches", false)
                .build();
        Stock stock = new Stock("shy-1-10", shy, Optional.empty(), 1, Bottles.WATER, 9, Optional.empty());
        Recipe r = new Recipe(
                "Test",
                Bottles.PART_A,
                22,
                0.001,
                Optional.empty(),
                List.of(stock),
                List.of(Item.neat(Bottles.PART_A, 10), Item.ofStock(stock, 1)));
        assertEquals(1, of(Warning.Kind.CONFLICT, r).size());
    }

    @Test
    void aLotPastItsDateIsTold() {
        assertTrue(of(Warning.Kind.EXPIRED, recipe(Bottles.WATER, Bottles.lotOf(Bottles.INK, "L7", DAY)))
                .isEmpty());
        Recipe late = recipe(Bottles.WATER, Bottles.lotOf(Bottles.INK, "L7", DAY.minusDays(1)));
        assertTrue(of(Warning.Kind.EXPIRED, late).get(0).text().contains("2031-05-03"));
    }

    @Test
    void aDriftingLotIsTold() {
        Ingredient ink = Bottles.lotOf(Bottles.INK, "L7", DAY);
        assertTrue(of(Warning.Kind.DRIFTING, recipe(Bottles.WATER, ink)).isEmpty());
        Ingredient moving =
                Bottles.lotOf(Bottles.INK, ink.lot().orElseThrow().drifting("absorption of it drifts: 3 % up."));
        String told =
                of(Warning.Kind.DRIFTING, recipe(Bottles.WATER, moving)).get(0).text();
        assertTrue(told.contains("lot L7") && told.endsWith("drifts: 3 % up."), told);
    }

    @Test
    void hazardsOfPowderAzideBloodHardenerAndHeatAreTold() {
        List<String> gel = texts(recipe(Bottles.GELATIN, Bottles.WATER, Bottles.AZIDE, Bottles.GELATIN_POWDER));
        assertTrue(gel.stream().anyMatch(t -> t.startsWith("Dust (Sodium azide; Gelatin powder)")), gel.toString());
        assertTrue(gel.stream().anyMatch(t -> t.startsWith("Azide")));
        assertTrue(gel.stream().anyMatch(t -> t.startsWith("Heating")));
        assertFalse(gel.stream().anyMatch(t -> t.startsWith("Uncured")));
        assertTrue(texts(recipe(Bottles.WATER, Bottles.WATER, Bottles.BLOOD)).stream()
                .anyMatch(t -> t.startsWith("Blood")));
        assertTrue(texts(recipe(Bottles.SILICONE, Bottles.PART_A, Bottles.PART_B)).stream()
                .anyMatch(t -> t.startsWith("Uncured parts (Silicone, two parts)")));
        Ingredient hard = new Bottles.Builder("hardener-x", "Isocyanate hardener", Part.MODIFIER, Family.RESIN).build();
        assertTrue(
                texts(recipe(Bottles.RESIN, Bottles.RESIN_A, hard)).stream().anyMatch(t -> t.startsWith("Isocyanate")));
        assertEquals(List.of(), texts(recipe(Bottles.WATER, Bottles.WATER, Bottles.INK)));
    }

    @Test
    void whatSettlesAndWhatNoTemperatureSuitsIsTold() {
        assertEquals(
                1,
                of(Warning.Kind.SETTLING, recipe(Bottles.GELATIN, Bottles.WATER, Bottles.TITANIA))
                        .size());
        // Emulsion goes in below 40 °C; the agar of the tests must stay above 42 °C, the gelatin above 32 °C.
        assertEquals(
                1,
                of(Warning.Kind.TEMPERATURE, recipe(Bottles.AGAR, Bottles.WATER, Bottles.EMULSION))
                        .size());
        assertTrue(of(Warning.Kind.TEMPERATURE, recipe(Bottles.GELATIN, Bottles.WATER, Bottles.EMULSION))
                .isEmpty());
    }

    private static List<String> texts(Recipe recipe) {
        return of(Warning.Kind.HAZARD, recipe).stream().map(Warning::text).toList();
    }
}
