package org.hazewright.files;

import java.nio.file.Path;
import java.util.List;
import java.util.OptionalDouble;
import java.util.TreeMap;
import java.util.stream.Collectors;
import org.hazewright.batch.Batch;
import org.hazewright.batch.Measurement;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Target;
import org.hazewright.learning.MeasuredValue;
import org.hazewright.learning.Quantity;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Stock;

/** A batch as a file that a person can read at the balance and that {@link BatchReader} reads back equal. */
public final class BatchWriter {
    private final StringBuilder out = new StringBuilder();

    private BatchWriter() {}

    public static void write(Path file, Batch batch, SafeFile.Overwrite policy) {
        SafeFile.write(file, text(batch), policy);
    }

    public static String text(Batch batch) {
        BatchWriter w = new BatchWriter();
        w.all(batch);
        return w.out.toString();
    }

    private void all(Batch b) {
        line("format = 1");
        text("id", b.id());
        text("title", b.plan().title());
        text("base", b.plan().base().id());
        number("temperature_c", b.plan().temperatureC());
        number("balance_standard_uncertainty_g", b.plan().weighingUncertaintyG());
        b.plan().briefSha256().ifPresent(sha -> text("brief_sha256", sha));
        number("batch_ml", b.volumeMl());
        line("when = " + b.on());
        if (!b.who().isBlank()) text("who", b.who());
        if (!b.notes().isEmpty())
            line("notes = " + b.notes().stream().map(TomlText::text).collect(Collectors.joining(", ", "[", "]")));
        for (int k = 0; k < b.plan().stocks().size(); k++)
            stock(
                    b.plan().stocks().get(k),
                    b.weighedG().get(2 * k),
                    b.weighedG().get(2 * k + 1));
        int first = 2 * b.plan().stocks().size();
        for (int k = 0; k < b.plan().items().size(); k++)
            item(
                    b.plan().items().get(k),
                    b.weighedG().get(first + k),
                    b.corrections().get(k));
        b.heating().ifPresent(h -> {
            head("[heating]");
            number("vessel_before_g", h.vesselBeforeG());
            number("vessel_after_g", h.vesselAfterG());
            number("water_back_g", h.waterBackG());
        });
        b.measured().forEach(this::measurement);
        b.targets().forEach(this::target);
        balance(b.balance());
    }

    private void stock(Stock s, OptionalDouble substance, OptionalDouble diluent) {
        head("[[stock]]");
        text("id", s.id());
        if (s.from().isPresent()) text("stock", s.from().get());
        else named("ingredient", s.ingredient().id(), s.ingredient().name());
        s.lot().ifPresent(lot -> text("lot", lot));
        number("ingredient_g", s.ingredientG());
        substance.ifPresent(g -> number("ingredient_weighed_g", g));
        text("diluent", s.diluent().id());
        number("diluent_g", s.diluentG());
        diluent.ifPresent(g -> number("diluent_weighed_g", g));
    }

    private void item(Item i, OptionalDouble weighed, int correction) {
        head("[[item]]");
        if (i.stock().isPresent()) text("stock", i.stock().get());
        else named("ingredient", i.ingredient().id(), i.ingredient().name());
        i.lot().ifPresent(lot -> text("lot", lot));
        number("mass_g", i.massG());
        weighed.ifPresent(g -> number("weighed_g", g));
        if (correction > 0) line("correction = " + correction);
    }

    private void measurement(Measurement m) {
        head("[[measured]]");
        line("when = " + m.on());
        text("method", m.method().name());
        if (!m.instrument().isBlank()) text("instrument", m.instrument());
        line("correction = " + m.correction());
        number("mua_scale_uncertainty", m.method().uMuaScale());
        number("musp_scale_uncertainty", m.method().uMuspScale());
        TreeMap<Double, List<MeasuredValue>> byNm =
                new TreeMap<>(m.values().stream().collect(Collectors.groupingBy(MeasuredValue::wavelengthNm)));
        byNm.forEach((nm, values) -> {
            head("[[measured.value]]");
            number("wavelength_nm", nm);
            for (MeasuredValue v : values) {
                String key = v.quantity() == Quantity.ABSORPTION ? "mua_per_cm" : "musp_per_cm";
                number(key, v.perCm());
                number("u_" + key, v.uPerCm());
            }
        });
    }

    private void target(Target t) {
        head("[[target]]");
        number("wavelength_nm", t.wavelengthNm());
        t.muaPerCm().ifPresent(v -> {
            number("mua_per_cm", v);
            number("mua_tolerance_per_cm", t.muaTolerancePerCm());
        });
        t.muspPerCm().ifPresent(v -> {
            number("musp_per_cm", v);
            number("musp_tolerance_per_cm", t.muspTolerancePerCm());
        });
        if (t.weight() != 1) number("weight", t.weight());
    }

    private void balance(Balance b) {
        head("[balance]");
        number("readability_g", b.readabilityG());
        number("standard_uncertainty_g", b.standardUncertaintyG());
        number("smallest_load_g", b.smallestLoadG());
        number("capacity_g", b.capacityG());
    }

    private void head(String text) {
        line("");
        line(text);
    }

    private void named(String key, String id, String name) {
        line(key + " = " + TomlText.text(id) + "    " + TomlText.comment(name));
    }

    private void text(String key, String value) {
        line(key + " = " + TomlText.text(value));
    }

    private void number(String key, double v) {
        line(key + " = " + TomlText.number(v));
    }

    private void line(String text) {
        out.append(text).append('\n');
    }
}
