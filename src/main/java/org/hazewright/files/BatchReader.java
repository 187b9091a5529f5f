package org.hazewright.files;

import java.nio.file.Path;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;
import org.hazewright.batch.Batch;
import org.hazewright.batch.Heating;
import org.hazewright.batch.Measurement;
import org.hazewright.brief.Balance;
import org.hazewright.brief.Target;
import org.hazewright.learning.MeasuredValue;
import org.hazewright.learning.Method;
import org.hazewright.learning.Quantity;
import org.hazewright.mixture.Item;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Recipe;
import org.hazewright.shelf.Shelf;

/**
 * A batch file, {@code NAME.batch.toml}, to a {@link Batch}: a recipe file with what was weighed and measured beside the plan.
 *
 * <p>Beyond a recipe's keys: {@code id} (else the file's name), {@code who}, {@code when}, {@code notes}, {@code batch_ml}, {@code [[target]]}
 * and {@code [balance]} as in a brief, {@code [heating]}, {@code [[measured]]} with {@code [[measured.value]]}; in a stock {@code
 * ingredient_weighed_g} and {@code diluent_weighed_g}; in an item {@code weighed_g} and {@code correction}. Grams that have no plan are their own.
 */
public final class BatchReader {
    static final List<String> KEYS = List.of(
            "id",
            "who",
            "when",
            "notes",
            "recipe",
            "batch_ml",
            "target",
            "tolerance",
            "balance",
            "heating",
            "measured");

    private final TomlPage page;
    private final Shelf shelf;
    private final String fileId;

    private BatchReader(TomlPage page, Shelf shelf, String fileId) {
        this.page = page;
        this.shelf = shelf;
        this.fileId = fileId;
    }

    public static Batch read(Path file, Shelf shelf) {
        TomlPage page = TomlPage.read(file);
        if (!RecipeReader.isBatch(file))
            throw page.at()
                    .refusal(
                            "This is not a batch: its name does not end in .batch.toml. Make one of a recipe with: hazewright"
                                    + " batch open RECIPE");
        if (!page.has("when"))
            throw page.at().refusal("The key when is missing; give the day of making: when = 2026-03-02");
        return new BatchReader(page, shelf, nameOf(file)).batch();
    }

    /** What was made, of a batch file that may lack its date. */
    static Recipe asMade(Path file, Shelf shelf) {
        TomlPage page = TomlPage.read(file);
        Batch batch = new BatchReader(page, shelf, nameOf(file)).batch();
        return page.at().of(batch::asMade);
    }

    static String nameOf(Path file) {
        String name = file.getFileName().toString();
        return name.length() > 11 ? name.substring(0, name.length() - 11) : name;
    }

    private Batch batch() {
        Recipe plan = RecipeReader.planned(page, shelf);
        List<OptionalDouble> grams = new ArrayList<>();
        for (TomlPage stock : page.tables("stock")) {
            grams.add(stock.maybePositive("ingredient_weighed_g"));
            grams.add(stock.maybePositive("diluent_weighed_g"));
        }
        List<Integer> corrections = new ArrayList<>();
        int before = 0;
        for (TomlPage item : page.tables("item")) {
            grams.add(item.maybeNotNegative("weighed_g"));
            int c = item.whole("correction", 0, 1000, 0);
            if (c < before || c > before + 1 || corrections.isEmpty() && c > 0)
                throw item.refusal(
                        "correction",
                        "correction is " + c + " after " + before
                                + "; items of the recipe come first, then those of correction 1, then of 2.");
            before = c;
            corrections.add(c);
        }
        Tolerance tolerance = Tolerance.read(page);
        List<Target> targets = TargetReader.read(page, Optional.empty(), () -> null, tolerance);
        Balance balance = page.table("balance").map(BriefReader::balance).orElse(Balance.USUAL);
        double volume = page.has("batch_ml") ? page.positive("batch_ml") : ownVolumeMl(plan, corrections);
        LocalDate on = page.date("when").orElse(LocalDate.EPOCH);
        List<Measurement> measured = new ArrayList<>();
        for (TomlPage m : page.tables("measured")) measured.add(measurement(m, on, before));
        return page.at()
                .of(() -> new Batch(
                        page.text("id", fileId),
                        plan,
                        grams,
                        corrections,
                        volume,
                        targets,
                        balance,
                        page.text("who", ""),
                        on,
                        page.table("heating").map(BatchReader::heating),
                        measured,
                        page.texts("notes")));
    }

    private static double ownVolumeMl(Recipe plan, List<Integer> corrections) {
        List<Item> own = new ArrayList<>();
        for (int k = 0; k < corrections.size(); k++)
            if (corrections.get(k) == 0) own.add(plan.items().get(k));
        return Mixture.of(new Recipe(
                        plan.title(),
                        plan.base(),
                        plan.temperatureC(),
                        plan.weighingUncertaintyG(),
                        plan.briefSha256(),
                        plan.stocks(),
                        own))
                .volumeMl();
    }

    private static Heating heating(TomlPage t) {
        t.refuseUnknown("vessel_before_g", "vessel_after_g", "water_back_g");
        double before = t.positive("vessel_before_g");
        double after = t.positive("vessel_after_g");
        double back = t.has("water_back_g") ? t.notNegative("water_back_g") : 0;
        return t.at().of(() -> new Heating(before, after, back));
    }

    private static Measurement measurement(TomlPage t, LocalDate made, int corrections) {
        t.refuseUnknown(
                "when",
                "method",
                "instrument",
                "correction",
                "mua_scale_uncertainty",
                "musp_scale_uncertainty",
                "value");
        LocalDate on = t.date("when").orElse(made);
        String name = t.text("method");
        double ua = t.within("mua_scale_uncertainty", 0, 1, 0);
        double us = t.within("musp_scale_uncertainty", 0, 1, 0);
        int correction = t.whole("correction", 0, corrections, corrections);
        List<MeasuredValue> values = new ArrayList<>();
        for (TomlPage v : t.tables("value")) {
            v.refuseUnknown("wavelength_nm", "mua_per_cm", "u_mua_per_cm", "musp_per_cm", "u_musp_per_cm");
            int before = values.size();
            value(v, Quantity.ABSORPTION, "mua_per_cm").ifPresent(values::add);
            value(v, Quantity.SCATTERING, "musp_per_cm").ifPresent(values::add);
            if (values.size() == before)
                throw v.at().refusal(
                                "This measured value gives neither mua_per_cm nor musp_per_cm; give at least one.");
        }
        return t.at().of(() ->
                new Measurement(on, new Method(name, ua, us), t.text("instrument", ""), correction, values));
    }

    private static Optional<MeasuredValue> value(TomlPage v, Quantity quantity, String key) {
        if (!v.has(key)) {
            if (v.has("u_" + key)) throw v.refusal("u_" + key, "u_" + key + " is given without " + key + ".");
            return Optional.empty();
        }
        double nm = v.positive("wavelength_nm");
        double perCm = v.number(key);
        if (!v.has("u_" + key))
            throw v.refusal(
                    key,
                    key + " comes without its standard uncertainty; add u_" + key
                            + ", the scatter of repeated readings at the least.");
        double u = v.positive("u_" + key);
        return Optional.of(v.holding(key, () -> new MeasuredValue(quantity, nm, perCm, u)));
    }
}
