package org.hazewright.bench;

import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.LinkedHashSet;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.Set;
import org.hazewright.brief.Balance;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Ingredient;

/**
 * Doses put together to a recipe of grams that the balance can show.
 *
 * <p>Doses are rounded first; then the base fills what they leave of the volume, V = Σ m_i/ρ_i, less what of its own liquid the
 * stocks brought; then its parts are rounded. So the finished volume is the wanted one to within the rounding of the base alone.
 */
final class Assembly {
    /** Most of the base's liquid that may come in through stocks: the rest is needed to dissolve and disperse in. */
    private static final double MOST_LIQUID_FROM_STOCKS = 0.5;

    private final Contents contents;
    private final Balance balance;
    private final Map<Ingredient, Double> partOf; // mass fractions of the base
    private final double baseDensityGPerMl;

    Assembly(Contents contents, Balance balance) {
        this.contents = contents;
        this.balance = balance;
        this.partOf = contents.shelf().partsOf(contents.base());
        this.baseDensityGPerMl = contents.shelf().densityGPerMl(contents.base());
    }

    /**
     * The recipe of these doses, the rounded grams of dose k moved by {@code steps[k]} last digits; empty when the stocks bring
     * more liquid than the base can spare. A dose that rounds to 0 g is left out.
     */
    Optional<Recipe> recipe(List<Dose> doses, int[] steps) {
        Map<Ingredient, Double> brought = new LinkedHashMap<>();
        List<WeighingOrder.Entry<Item>> entries = new ArrayList<>();
        Map<Ingredient, Double> extra = new LinkedHashMap<>();
        Set<Stock> stocks = new LinkedHashSet<>();
        double leftMl = contents.volumeMl();
        for (int k = 0; k < doses.size(); k++) {
            Dose dose = doses.get(k);
            Ingredient i = dose.ingredient();
            double g = balance.rounded(balance.rounded(dose.weighedG()) + steps[k] * balance.readabilityG());
            if (!(g > 0)) continue;
            double neatG = g / dose.dilution();
            leftMl -= neatG / i.densityGPerMl();
            leftMl -= takeDiluents(dose, g, brought);
            stocks.addAll(dose.chain());
            if (dose.isNeat() && partOf.containsKey(i)) extra.merge(i, g, Double::sum);
            else entries.add(entry(dose, g));
        }
        if (!(leftMl > 0)) return Optional.empty();
        double baseG = leftMl * baseDensityGPerMl;
        for (var part : partOf.entrySet()) {
            Ingredient i = part.getKey();
            double whole = baseG * part.getValue();
            double stockG = brought.getOrDefault(i, 0.0);
            if (stockG > MOST_LIQUID_FROM_STOCKS * whole) return Optional.empty();
            double g = balance.rounded(whole - stockG + extra.getOrDefault(i, 0.0));
            if (g > 0)
                entries.add(new WeighingOrder.Entry<>(
                        new Item(i, Optional.empty(), WeighingOrder.lotOf(i), g), i, true, g));
        }
        return Optional.of(new Recipe(
                contents.title(),
                contents.base(),
                contents.temperatureC(),
                balance.standardUncertaintyG(),
                contents.briefSha256(),
                List.copyOf(stocks),
                WeighingOrder.sorted(entries, contents.base(), partOf)));
    }

    private WeighingOrder.Entry<Item> entry(Dose dose, double g) {
        Ingredient i = dose.ingredient();
        Item item = dose.isNeat()
                ? new Item(i, Optional.empty(), WeighingOrder.lotOf(i), g)
                : Item.ofStock(dose.chain().get(dose.chain().size() - 1), g);
        return new WeighingOrder.Entry<>(item, i, false, g);
    }

    /**
     * Books the diluents in {@code aliquotG} of a dose's last stock: the base's own on {@code brought}, of any other the
     * millilitres are returned.
     */
    private double takeDiluents(Dose dose, double aliquotG, Map<Ingredient, Double> brought) {
        double strangeMl = 0;
        double g = aliquotG;
        for (int k = dose.chain().size() - 1; k >= 0; k--) {
            Stock s = dose.chain().get(k);
            double diluentG = g * s.diluentG() / s.totalG();
            if (partOf.containsKey(s.diluent())) brought.merge(s.diluent(), diluentG, Double::sum);
            else strangeMl += diluentG / s.diluent().densityGPerMl();
            g -= diluentG;
        }
        return strangeMl;
    }

    /** As {@link #recipe(List, int[])}, or a refusal. */
    Recipe require(List<Dose> doses) {
        return recipe(doses, new int[doses.size()])
                .orElseThrow(() -> new Refusal("The stocks for \"" + contents.title() + "\" bring more "
                        + contents.shelf()
                                .liquidOf(contents.base())
                                .map(Ingredient::name)
                                .orElse("liquid")
                        + " than the base can spare; make a larger batch or use a finer balance."));
    }
}
