package org.hazewright.cli;

import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import org.hazewright.reading.Foreseen;
import org.hazewright.reading.Reading;

/** Readings as the JSON document that other programs read. */
final class ReadingsJson {
    private ReadingsJson() {}

    /** {@code every}: a medium without wavelength was read once; its readings are told at each wavelength of the set-up. */
    static Json of(List<Foreseen> foreseen, List<List<Double>> every) {
        List<Map<String, Object>> all = new ArrayList<>();
        for (int i = 0; i < foreseen.size(); i++) {
            List<Reading> readings = foreseen.get(i).readings();
            for (double nm : every.get(i)) for (Reading r : readings) all.add(row(r, nm));
            if (every.get(i).isEmpty()) for (Reading r : readings) all.add(row(r, r.wavelengthNm()));
        }
        return Json.object().with("readings", all);
    }

    private static Map<String, Object> row(Reading r, Double nm) {
        Json row = Json.object()
                .with("setup", r.setUp())
                .with("kind", r.kind().word())
                .with("wavelength_nm", nm)
                .with("distance_mm", r.distanceMm())
                .with("quantity", r.quantity().word());
        if (r.curve() == null) row.with("value", r.value()).with("u", r.u()).with("unit", r.unit());
        else
            row.with("x", r.curve().x())
                    .with("x_unit", r.curve().xUnit())
                    .with("y", r.curve().y())
                    .with("y_unit", r.curve().yUnit())
                    .with("u", r.curve().u());
        return row.with("model", r.model())
                .with("inside_range", r.insideRange())
                .with("note", r.note())
                .fields();
    }
}
