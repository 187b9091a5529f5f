package org.hazewright.bench;

import java.util.Collections;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.hazewright.mixture.Stock;
import org.hazewright.optics.Refusal;
import org.hazewright.shelf.Ingredient;
import org.hazewright.shelf.Shelf;

/**
 * What the finished phantom is to hold, before anybody thinks of the balance.
 *
 * @param concentrationGPerMl of everything but the base, g per mL of finished phantom; zeros are dropped
 * @param volumeMl finished volume, extra share included
 * @param inHand stocks that are made already, an earlier step of a series before the later one; they may be drawn from and cost
 *     no weighing
 */
public record Contents(
        String title,
        Shelf shelf,
        Ingredient base,
        Map<Ingredient, Double> concentrationGPerMl,
        double volumeMl,
        double temperatureC,
        Optional<String> briefSha256,
        List<Stock> inHand) {

    public Contents {
        Refusal.positive("Volume to make in mL", volumeMl);
        Map<Ingredient, Double> present = new LinkedHashMap<>();
        double added = 0;
        for (var entry : concentrationGPerMl.entrySet()) {
            Ingredient i = entry.getKey();
            double c = Refusal.notNegative("Concentration of " + i.id() + " in g/mL", entry.getValue());
            if (c == 0) continue;
            if (i.isBlend())
                throw new Refusal("The blend " + i.id() + " cannot be added to a base as one thing; add its parts.");
            present.put(i, c);
            added += c / i.densityGPerMl();
        }
        if (!(added < 1))
            throw new Refusal(
                    "What is added takes " + Grams.plain(100 * added) + " % of the volume, which leaves no room for "
                            + base.name() + "; ask for less, or take a more concentrated ingredient.");
        concentrationGPerMl = Collections.unmodifiableMap(present);
        inHand = List.copyOf(inHand);
    }

    public Contents(
            String title,
            Shelf shelf,
            Ingredient base,
            Map<Ingredient, Double> concentrationGPerMl,
            double volumeMl,
            double temperatureC,
            Optional<String> briefSha256) {
        this(title, shelf, base, concentrationGPerMl, volumeMl, temperatureC, briefSha256, List.of());
    }

    /** Grams of an ingredient that the phantom is to hold; 0 for what is not in it. */
    public double massG(Ingredient i) {
        return concentrationGPerMl.getOrDefault(i, 0.0) * volumeMl;
    }

    /** The same contents with these stocks at hand. */
    public Contents withStocks(List<Stock> stocks) {
        return new Contents(title, shelf, base, concentrationGPerMl, volumeMl, temperatureC, briefSha256, stocks);
    }
}
