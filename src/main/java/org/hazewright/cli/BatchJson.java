package org.hazewright.cli;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import org.hazewright.batch.Batch;
import org.hazewright.batch.Learned;
import org.hazewright.batch.Measurement;
import org.hazewright.bench.Answer;
import org.hazewright.bench.Weighing;
import org.hazewright.brief.Point;
import org.hazewright.learning.Factors;
import org.hazewright.learning.Quantity;
import org.hazewright.learning.Verdict;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Sweep;

/** A batch as one JSON document; coefficients in 1/cm. */
final class BatchJson {
    private BatchJson() {}

    static Json of(Batch batch) {
        Recipe made = batch.asMade();
        List<Map<String, Object>> weighings = new ArrayList<>();
        List<Weighing> all = batch.weighings();
        for (int n = 0; n < all.size(); n++)
            weighings.add(Json.object()
                    .with("item", n + 1)
                    .with("what", all.get(n).label())
                    .with("into_stock", all.get(n).into().orElse(null))
                    .with("planned_g", all.get(n).massG())
                    .with(
                            "weighed_g",
                            batch.weighed(n) ? batch.weighedG().get(n).getAsDouble() : null)
                    .fields());
        Json json = Json.object()
                .with("format", 1)
                .with("id", batch.id())
                .with("title", batch.plan().title())
                .with("when", batch.on().toString())
                .with("who", batch.who())
                .with("volume_ml", Mixture.of(made).volumeMl())
                .with("corrections", batch.correctionCount())
                .with("weighings", weighings);
        batch.brief().ifPresent(brief -> {
            Learned.Landing landing = Learned.of(batch)
                    .landing(
                            made,
                            brief.points(),
                            Sweep.of(Mixture.of(made), brief.wavelengthsNm()),
                            batch.balance().capacityG());
            json.with("chance_within_tolerance", landing.chance()).with("as_made", predicted(landing.predicted()));
        });
        List<Map<String, Object>> measured = new ArrayList<>();
        for (Measurement m : batch.measured()) {
            Verdict v = Verdict.of(Factors.none(), batch.measuredBatch(m));
            List<Map<String, Object>> rows = new ArrayList<>();
            v.rows()
                    .forEach(r -> rows.add(Json.object()
                            .with("wavelength_nm", r.value().wavelengthNm())
                            .with("quantity", r.value().quantity() == Quantity.ABSORPTION ? "mua" : "musp")
                            .with("measured_per_cm", r.value().perCm())
                            .with("u_measured_per_cm", r.value().uPerCm())
                            .with("predicted_per_cm", r.predictedPerCm())
                            .with("u_predicted_per_cm", r.uPredictedPerCm())
                            .fields()));
            measured.add(Json.object()
                    .with("when", m.on().toString())
                    .with("method", m.method().name())
                    .with("correction", m.correction())
                    .with(
                            "verdict",
                            v.outcome()
                                    .name()
                                    .toLowerCase(java.util.Locale.ROOT)
                                    .replace('_', '-'))
                    .with("sentence", v.sentence())
                    .with("values", rows)
                    .fields());
        }
        return json.with("measured", measured);
    }

    static List<Map<String, Object>> predicted(List<Answer.Predicted> predicted) {
        List<Map<String, Object>> rows = new ArrayList<>();
        for (Answer.Predicted p : predicted)
            rows.add(Json.object()
                    .with("wavelength_nm", p.point().wavelengthNm())
                    .with("quantity", p.point().quantity() == Point.Quantity.MUA ? "mua" : "musp")
                    .with("wanted_per_cm", p.point().wantedPerCm())
                    .with("tolerance_per_cm", p.point().tolerancePerCm())
                    .with("value_per_cm", p.perCm())
                    .with("u_per_cm", p.uPerCm())
                    .with("miss", p.miss())
                    .fields());
        return rows;
    }
}
