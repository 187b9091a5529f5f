package org.hazewright.cli;

import java.util.ArrayList;
import java.util.Arrays;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;
import org.hazewright.bench.Answer;
import org.hazewright.bench.Outlook;
import org.hazewright.bench.SeriesPlan;
import org.hazewright.brief.Point;
import org.hazewright.shelf.Ingredient;

/** A set of phantoms as the JSON document of {@code series --json}; coefficients always in 1/cm. */
final class SeriesJson {
    private SeriesJson() {}

    static Json of(SeriesPlan plan) {
        List<Map<String, Object>> phantoms = new ArrayList<>();
        for (SeriesPlan.Phantom p : plan.phantoms())
            phantoms.add(Json.object()
                    .with("name", p.name())
                    .with("status", p.meets() ? "meets" : "misses")
                    .with("items", DesignJson.items(p.recipe()))
                    .with("worst_miss", p.outlook().worstMiss())
                    .with("chance_within_tolerance", p.outlook().chance())
                    .with("predicted", predicted(p.outlook()))
                    .fields());
        return Json.object()
                .with("format", 1)
                .with("status", plan.meets() ? "meets" : "misses")
                .with("title", plan.series().title())
                .with("batch_ml", plan.phantoms().get(0).brief().volumeMl())
                .with("base", plan.base().id())
                .with("ingredients", List.copyOf(plan.ingredients()))
                .with("stocks", DesignJson.stocks(plan.stocks()))
                .with("buy", buy(plan.buyG()))
                .with("phantoms", phantoms)
                .with("expected_to_land", plan.expectedToLand())
                .with("notes", plan.notes())
                .with("left_out", plan.leftOut())
                .with("proven", plan.proven());
    }

    static List<Map<String, Object>> buy(Map<Ingredient, Double> buyG) {
        List<Map<String, Object>> buy = new ArrayList<>();
        buyG.forEach((i, g) -> buy.add(
                Json.object().with("ingredient", i.id()).with("mass_g", g).fields()));
        return buy;
    }

    /** One row a wavelength, with what is wanted there. */
    static List<Map<String, Object>> predicted(Outlook outlook) {
        double[] nm = outlook.budget().wavelengthsNm();
        double[] uMua = outlook.budget().uMuaPerCm();
        double[] uMusp = outlook.budget().uMuspPerCm();
        Map<Double, Json> rows = new TreeMap<>();
        for (Answer.Predicted p : outlook.predicted()) {
            Point point = p.point();
            int j = Arrays.binarySearch(nm, point.wavelengthNm());
            boolean scattering = point.quantity() == Point.Quantity.MUSP;
            String name = scattering ? "musp" : "mua";
            rows.computeIfAbsent(point.wavelengthNm(), at -> Json.object().with("wavelength_nm", at))
                    .with(name + "_per_cm", p.perCm())
                    .with("u_" + name + "_per_cm", (scattering ? uMusp : uMua)[j])
                    .with(name + "_miss", p.miss());
        }
        return rows.values().stream().map(Json::fields).toList();
    }
}
