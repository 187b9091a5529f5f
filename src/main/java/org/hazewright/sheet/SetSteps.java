package org.hazewright.sheet;

import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import org.hazewright.bench.Grams;
import org.hazewright.bench.Step;
import org.hazewright.bench.Steps;
import org.hazewright.brief.Balance;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;

/** Steps that hold for every phantom of a set: in place of grams they name the column of the weighing table. */
final class SetSteps {
    private SetSteps() {}

    /** The steps that make the stocks, with their grams. */
    static List<Step> stocks(Recipe anyOfThem, List<Stock> stocks, Balance balance) {
        if (stocks.isEmpty()) return List.of();
        return Steps.of(with(anyOfThem, stocks), balance, List.of()).stream()
                .filter(s -> s.stage() == Step.Stage.STOCKS)
                .toList();
    }

    /** The steps of one phantom, its stocks made. */
    static List<Step> phantom(Recipe fullest, Balance balance) {
        String together = Grams.plain(Mixture.of(fullest).massG()) + " g more";
        List<Step> steps = new ArrayList<>();
        for (Step s : Steps.of(fullest, balance, List.of())) {
            if (s.stage() == Step.Stage.STOCKS) continue;
            String text = s.text().replace(together, "the grams of the column together more");
            if (s.weighing().isPresent()) {
                int loads = text.indexOf(" It takes ");
                if (loads > 0) text = text.substring(0, loads);
                text = text.replace(
                        Grams.shown(s.weighing().get().massG(), balance) + " of ",
                        "the grams of column " + s.weighing().get().label() + ": ");
            }
            steps.add(new Step(
                    s.stage(),
                    text,
                    s.weighing(),
                    List.of(),
                    Optional.empty(),
                    OptionalDouble.empty(),
                    s.temperatureC(),
                    s.minutes(),
                    s.handling(),
                    s.cautions()));
        }
        return steps;
    }

    /** The steps of one recipe with its grams, its stocks made. */
    static List<Step> madeStocks(Recipe recipe, Balance balance) {
        return Steps.of(recipe, balance, List.of()).stream()
                .filter(s -> s.stage() != Step.Stage.STOCKS)
                .toList();
    }

    private static Recipe with(Recipe recipe, List<Stock> stocks) {
        return new Recipe(
                recipe.title(),
                recipe.base(),
                recipe.temperatureC(),
                recipe.weighingUncertaintyG(),
                recipe.briefSha256(),
                stocks,
                recipe.items());
    }
}
