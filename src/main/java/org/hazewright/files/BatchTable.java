package org.hazewright.files;

import java.util.List;
import java.util.OptionalDouble;
import org.hazewright.batch.Batch;
import org.hazewright.batch.Measurement;
import org.hazewright.bench.Weighing;
import org.hazewright.brief.Point;
import org.hazewright.learning.MeasuredValue;
import org.hazewright.mixture.Coefficients;
import org.hazewright.mixture.Mixture;

/**
 * A batch as one CSV table: a row a weighing and a row a value, told apart by the first column. Coefficients are in 1/cm.
 */
public final class BatchTable {
    private final CsvText out = new CsvText();

    private BatchTable() {}

    public static String text(Batch batch) {
        BatchTable t = new BatchTable();
        t.all(batch);
        return t.out.toString();
    }

    private void all(Batch b) {
        row(
                "row",
                "batch",
                "date",
                "number",
                "what",
                "planned_g",
                "weighed_g",
                "wavelength_nm",
                "quantity",
                "wanted_per_cm",
                "predicted_per_cm",
                "measured_per_cm",
                "u_measured_per_cm",
                "method");
        List<Weighing> all = b.weighings();
        for (int n = 0; n < all.size(); n++) {
            OptionalDouble g = b.weighedG().get(n);
            row(
                    "weighing",
                    b.id(),
                    b.on(),
                    n + 1,
                    all.get(n).label(),
                    all.get(n).massG(),
                    g.isPresent() ? g.getAsDouble() : "",
                    "",
                    "",
                    "",
                    "",
                    "",
                    "",
                    "");
        }
        Mixture made = Mixture.of(b.asMade());
        b.brief().ifPresent(brief -> {
            for (Point p : brief.points())
                row(
                        "target",
                        b.id(),
                        b.on(),
                        "",
                        "",
                        "",
                        "",
                        p.wavelengthNm(),
                        word(p.quantity() == Point.Quantity.MUSP),
                        p.wantedPerCm(),
                        value(made, p.wavelengthNm(), p.quantity() == Point.Quantity.MUSP),
                        "",
                        "",
                        "");
        });
        for (Measurement m : b.measured()) {
            Mixture then = Mixture.of(b.asMade(m.correction()));
            for (MeasuredValue v : m.values()) {
                boolean scattering = v.quantity() == org.hazewright.learning.Quantity.SCATTERING;
                row(
                        "measured",
                        b.id(),
                        m.on(),
                        "",
                        "",
                        "",
                        "",
                        v.wavelengthNm(),
                        word(scattering),
                        "",
                        value(then, v.wavelengthNm(), scattering),
                        v.perCm(),
                        v.uPerCm(),
                        m.method().name());
            }
        }
    }

    private static String word(boolean scattering) {
        return scattering ? "musp" : "mua";
    }

    private static double value(Mixture m, double nm, boolean scattering) {
        Coefficients c = m.at(nm);
        return scattering ? c.muspPerCm() : c.muaPerCm();
    }

    private void row(Object... cells) {
        out.row(List.of(cells));
    }
}
