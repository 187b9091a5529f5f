package org.hazewright.bench;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.function.UnaryOperator;
import org.hazewright.brief.Brief;
import org.hazewright.mixture.Cause;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Uncertainty;

/**
 * The one figure that would raise the chance most if it were known twice as well.
 *
 * <p>Tried are the absorption and scattering of the ingredients, and the balance, where they carry at least {@value #LEAST_SHARE}
 * of the variance in units of tolerance, at most {@value #TRIED} of them, largest first: its standard uncertainty is halved and
 * the Monte Carlo drawn again with the same seed, so that nothing else differs.
 *
 * @param what for a person: "the scattering of lipid-emulsion-20"
 * @param chance with what is known now
 * @param then with that one uncertainty halved
 */
public record BetterKnown(String what, double chance, double then) {
    private static final double LEAST_SHARE = 0.03;
    private static final int TRIED = 3;

    /** Empty when nothing single raises the chance by a draw in a hundred. */
    public static Optional<BetterKnown> of(Brief brief, Recipe recipe, int draws) {
        Outlook now = Outlook.of(brief, recipe, draws);
        List<Trial> trials = trials(now);
        return trials.stream()
                .limit(TRIED)
                .map(t -> new BetterKnown(
                        t.what,
                        now.chance(),
                        Outlook.of(brief, t.halved.apply(recipe), draws).chance()))
                .filter(b -> b.then - b.chance >= 0.01)
                .max(java.util.Comparator.comparingDouble(BetterKnown::then));
    }

    private record Trial(String what, double share, UnaryOperator<Recipe> halved) {}

    private static List<Trial> trials(Outlook now) {
        List<Trial> trials = new ArrayList<>();
        double balance = 0;
        for (Outlook.CauseShare c : now.causes()) {
            if (c.kind() == Cause.Kind.WEIGHING || c.kind() == Cause.Kind.STOCK) balance += c.share();
            boolean absorption = c.kind() == Cause.Kind.ABSORPTION;
            if (c.share() < LEAST_SHARE || !absorption && c.kind() != Cause.Kind.SCATTERING) continue;
            String word = absorption ? "absorption" : "scattering";
            String id = c.name().substring(0, c.name().length() - word.length() - 1);
            trials.add(new Trial(
                    "the " + word + " of " + id,
                    c.share(),
                    recipe -> with(recipe, i -> i.id().equals(id) ? halved(i, absorption) : i)));
        }
        if (balance >= LEAST_SHARE) trials.add(new Trial("the balance's load", balance, BetterKnown::onABetterBalance));
        trials.sort(java.util.Comparator.comparingDouble(Trial::share).reversed());
        return trials;
    }

    private static Recipe onABetterBalance(Recipe r) {
        return new Recipe(
                r.title(),
                r.base(),
                r.temperatureC(),
                r.weighingUncertaintyG() / 2,
                r.briefSha256(),
                r.stocks(),
                r.items());
    }

    private static Ingredient halved(Ingredient i, boolean absorption) {
        Uncertainty u = i.uncertainty();
        return i.withUncertainty(new Uncertainty(
                absorption ? u.absorption() / 2 : u.absorption(),
                absorption ? u.scattering() : u.scattering() / 2,
                u.correlation()));
    }

    private static Recipe with(Recipe r, UnaryOperator<Ingredient> other) {
        List<Stock> stocks = r.stocks().stream()
                .map(s -> new Stock(
                        s.id(),
                        other.apply(s.ingredient()),
                        s.lot(),
                        s.ingredientG(),
                        other.apply(s.diluent()),
                        s.diluentG(),
                        s.from()))
                .toList();
        List<Item> items = r.items().stream()
                .map(i -> new Item(other.apply(i.ingredient()), i.stock(), i.lot(), i.massG()))
                .toList();
        return new Recipe(
                r.title(),
                other.apply(r.base()),
                r.temperatureC(),
                r.weighingUncertaintyG(),
                r.briefSha256(),
                stocks,
                items);
    }
}
