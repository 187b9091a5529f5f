package org.hazewright.cli;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import org.hazewright.bench.Answer;
import org.hazewright.brief.Brief;
import org.hazewright.brief.Point;
import org.hazewright.brief.Target;
import org.hazewright.design.Score;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;
import org.hazewright.reading.HaemoglobinEquivalent;

/** An answer as the JSON document of {@code design --json}; coefficients always in 1/cm. */
final class DesignJson {
    private DesignJson() {}

    /** {@code blood} is what the recipe comes to as blood, for a tissue-like brief. */
    static Json of(Answer answer, Optional<HaemoglobinEquivalent> blood) {
        Json json = of(answer);
        blood.ifPresent(h -> json.with(
                "haemoglobin_equivalent",
                Json.object()
                        .with("haemoglobin_umol_per_l", h.umolPerL())
                        .with("u_haemoglobin_umol_per_l", h.uUmolPerL())
                        .with("saturation", h.saturation())
                        .with("u_saturation", h.uSaturation())));
        return json;
    }

    private static Json of(Answer answer) {
        Brief brief = answer.brief();
        Recipe recipe = answer.recipe();
        List<Map<String, Object>> exactItems = new ArrayList<>();
        answer.exact()
                .concentrationGPerMl()
                .forEach((i, c) -> exactItems.add(Json.object()
                        .with("ingredient", i.id())
                        .with("concentration_g_per_ml", c)
                        .fields()));
        List<Map<String, Object>> alternatives = new ArrayList<>();
        for (Answer.Alternative a : answer.alternatives())
            alternatives.add(Json.object()
                    .with("why", a.why())
                    .with("base", a.recipe().base().id())
                    .with("items", items(a.recipe()))
                    .with("stocks", stocks(a.recipe()))
                    .with("score", score(a.score()))
                    .with("worst_miss", a.worstMiss())
                    .with("chance_within_tolerance", a.chance())
                    .with("weighings", a.weighings())
                    .with("cost", a.cost())
                    .fields());
        return Json.object()
                .with("format", 1)
                .with("status", answer.meets() ? "meets" : "misses")
                .with("title", brief.title())
                .with("batch_ml", brief.volumeMl())
                .with("base", recipe.base().id())
                .with("items", items(recipe))
                .with("stocks", stocks(recipe))
                .with("score", score(answer.score()))
                .with(
                        "exact",
                        Json.object()
                                .with("total", answer.exact().score().total())
                                .with("bias", answer.exact().score().bias())
                                .with("items", exactItems))
                .with("worst_miss", answer.worstMiss())
                .with("best_possible_worst_miss", answer.bestPossibleWorstMiss())
                .with("chance_within_tolerance", answer.chance())
                .with("predicted", predicted(answer))
                .with("alternatives", alternatives)
                .with("limits", answer.limits())
                .with("left_out", answer.leftOut())
                .with(
                        "search",
                        Json.object()
                                .with("sets_admissible", answer.search().admissible())
                                .with("sets_solved", answer.search().solved())
                                .with("sets_cut", answer.search().cut())
                                .with("proven", answer.search().proven()));
    }

    private static Json score(Score score) {
        return Json.object()
                .with("total", score.total())
                .with("bias", score.bias())
                .with("ingredient", score.ingredient())
                .with("weighing", score.weighing());
    }

    static List<Map<String, Object>> items(Recipe recipe) {
        double volume = org.hazewright.mixture.Mixture.of(recipe).volumeMl();
        List<Map<String, Object>> items = new ArrayList<>();
        for (Item item : recipe.items()) {
            double ofIngredient = item.stock().isEmpty()
                    ? item.massG()
                    : item.massG() * recipe.contentPerG(item.stock().get()).getOrDefault(item.ingredient(), 0.0);
            items.add(Json.object()
                    .with("ingredient", item.ingredient().id())
                    .with("lot", lot(item))
                    .with("mass_g", item.massG())
                    .with("concentration_g_per_ml", ofIngredient / volume)
                    .with("from_stock", item.stock().orElse(null))
                    .fields());
        }
        return items;
    }

    private static String lot(Item item) {
        return item.lot().or(() -> item.ingredient().lot().map(l -> l.number())).orElse(null);
    }

    static List<Map<String, Object>> stocks(Recipe recipe) {
        return stocks(recipe.stocks());
    }

    static List<Map<String, Object>> stocks(List<Stock> all) {
        List<Map<String, Object>> stocks = new ArrayList<>();
        for (Stock s : all)
            stocks.add(Json.object()
                    .with("id", s.id())
                    .with("ingredient", s.ingredient().id())
                    .with("from_stock", s.from().orElse(null))
                    .with("ingredient_g", s.ingredientG())
                    .with("diluent", s.diluent().id())
                    .with("diluent_g", s.diluentG())
                    .with("ratio", s.ratio())
                    .fields());
        return stocks;
    }

    /** One row a wavelength; a quantity that the brief does not want is predicted all the same, without a miss. */
    private static List<Map<String, Object>> predicted(Answer answer) {
        List<Map<String, Object>> rows = new ArrayList<>();
        double[] nm = answer.brief().wavelengthsNm();
        double[] uMua = answer.budget().uMuaPerCm();
        double[] uMusp = answer.budget().uMuspPerCm();
        for (Target target : answer.brief().targets()) {
            var at = answer.mixture().at(target.wavelengthNm());
            int j = java.util.Arrays.binarySearch(nm, target.wavelengthNm());
            rows.add(Json.object()
                    .with("wavelength_nm", target.wavelengthNm())
                    .with("mua_per_cm", at.muaPerCm())
                    .with("musp_per_cm", at.muspPerCm())
                    .with("u_mua_per_cm", uMua[j])
                    .with("u_musp_per_cm", uMusp[j])
                    .with("mua_miss", miss(answer, target.wavelengthNm(), Point.Quantity.MUA))
                    .with("musp_miss", miss(answer, target.wavelengthNm(), Point.Quantity.MUSP))
                    .fields());
        }
        return rows;
    }

    private static Double miss(Answer answer, double nm, Point.Quantity quantity) {
        for (Answer.Predicted p : answer.predicted())
            if (p.point().wavelengthNm() == nm && p.point().quantity() == quantity) return p.miss();
        return null;
    }
}
