package org.hazewright.bench;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Brief;
import org.hazewright.brief.SearchLimits;
import org.hazewright.brief.StockInHand;
import org.hazewright.brief.Target;
import org.hazewright.files.ShelfReader;
import org.hazewright.mixture.Item;
import org.hazewright.shelf.Shelf;
import org.junit.jupiter.api.Test;

class FollowingTest {
    private static final Shelf SHELF = ShelfReader.readShipped();

    private static Brief brief(double mua, List<StockInHand> stocks) {
        return new Brief(
                "bath",
                "Bath",
                List.of("water"),
                1000,
                0,
                22,
                List.of(new Target(800, OptionalDouble.of(mua), OptionalDouble.of(10), 0.05 * mua, 0.5, 1)),
                List.of(),
                new SearchLimits(List.of("ink-demo", "lipid-emulsion-20"), List.of(), 1, 1, 0, 0),
                new Balance(0.001, 0.001, 0.020, 1200),
                stocks,
                Optional.empty(),
                Optional.empty());
    }

    private static StockInHand ink(String diluent) {
        return new StockInHand("ink-of-monday", Optional.of("ink-demo"), Optional.empty(), 1, diluent, 99);
    }

    private static double miss(List<Answer.Predicted> predicted) {
        return predicted.stream().mapToDouble(p -> Math.abs(p.miss())).max().orElseThrow();
    }

    @Test
    void aStockInHandIsDrawnFromWhileFollowingToo() {
        List<StockInHand> monday = List.of(ink("water"));
        Brief before = brief(0.10, monday);
        Answer answer = Answering.to(before, SHELF, 0);
        List<String> labels = answer.recipe().items().stream().map(Item::label).toList();
        assertTrue(labels.contains("ink-of-monday"), labels.toString());
        Following follower = new Following(before, answer.recipe(), SHELF);
        Brief moved = brief(0.13, monday);
        assertTrue(follower.suits(moved));
        Outlook followed = follower.to(moved, 0);
        assertEquals(labels, followed.recipe().items().stream().map(Item::label).toList());
        assertEquals(miss(Answering.to(moved, SHELF, 0).predicted()), miss(followed.predicted()), 0.05);
    }

    @Test
    void aStockInAStrangerDiluentIsLeftToTheSearch() {
        Brief before = brief(0.10, List.of());
        Following follower =
                new Following(before, Answering.to(before, SHELF, 0).recipe(), SHELF);
        assertFalse(follower.suits(brief(0.13, List.of(ink("phosphate-buffered-saline")))));
        assertTrue(follower.suits(brief(0.13, List.of(ink("water")))));
    }

    /** Editing leaves out nothing but draws: the same grams, predictions and sentences as the settled answer. */
    @Test
    void whileEditingTheRecipeIsTheSettledOne() {
        Brief b = brief(0.10, List.of());
        Answer quick = Answering.whileEditing(b, SHELF, () -> false);
        Answer settled = Answering.to(b, SHELF, 0);
        assertEquals(settled.recipe().items(), quick.recipe().items());
        assertEquals(settled.limits(), quick.limits());
        assertEquals(settled.score(), quick.score());
        assertEquals(settled.chance(), quick.chance(), 0.033, "four standard errors of 4 000 draws");
    }
}
