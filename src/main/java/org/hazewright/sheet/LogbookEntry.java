package org.hazewright.sheet;

import java.time.LocalDate;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;
import java.util.TreeSet;
import java.util.stream.Collectors;
import org.hazewright.batch.Batch;
import org.hazewright.batch.Learned;
import org.hazewright.batch.Measurement;
import org.hazewright.bench.Answer;
import org.hazewright.bench.Outlook;
import org.hazewright.brief.Point;
import org.hazewright.learning.Factors;
import org.hazewright.learning.MeasuredValue;
import org.hazewright.learning.Quantity;
import org.hazewright.learning.Verdict;
import org.hazewright.mixture.Budget;
import org.hazewright.mixture.Mixture;
import org.hazewright.mixture.Recipe;
import org.hazewright.mixture.Stock;
import org.hazewright.mixture.Sweep;
import org.hazewright.optics.Figures;
import org.hazewright.shelf.Ingredient;

/**
 * One batch as the logbook holds it: a row of its own, a row for every wanted or measured number, and the lots that went in.
 *
 * <p>Rows are cells by the name of their column: text, a {@link Double} or a {@link LocalDate}. Coefficients are in 1/cm.
 */
record LogbookEntry(Map<String, Object> batch, List<Map<String, Object>> values) {
    static final String BATCH = "batch";
    static final String DATE = "date";
    static final String LOTS = "lots";
    static final String KEY = "key";
    static final String MUA_RATIO = "measured / predicted, µa";
    static final String MUSP_RATIO = "measured / predicted, µs'";

    /** Between the lots of a cell. */
    static final String BETWEEN = "; ";

    static final List<String> BATCH_COLUMNS = List.of(
            BATCH,
            DATE,
            "title",
            "base",
            "who",
            "state",
            "wanted",
            "predicted as made",
            "measured",
            "worst miss",
            "chance in 100",
            "verdict",
            LOTS,
            "corrections",
            "volume mL",
            "notes",
            "file");
    static final List<String> VALUE_COLUMNS = List.of(
            BATCH,
            DATE,
            "nm",
            "quantity",
            "wanted",
            "± tolerance",
            "predicted",
            "± u predicted",
            "measured",
            "± u measured",
            MUA_RATIO,
            MUSP_RATIO,
            "method",
            LOTS,
            KEY);

    /** {@code file} is where the batch's own file is, as the logbook should name it. */
    static LogbookEntry of(Batch batch, String file) {
        Map<String, Object> row = new LinkedHashMap<>();
        Recipe made = batch.asMade();
        String lots = batch.weighedCount() == 0 ? "" : lots(made);
        row.put(BATCH, batch.id());
        row.put(DATE, batch.on());
        row.put("title", batch.plan().title());
        row.put("base", batch.plan().base().id());
        row.put("who", batch.who());
        row.put("state", state(batch));
        row.put("wanted", wanted(batch));
        row.put("volume mL", Mixture.of(made).volumeMl());
        row.put(LOTS, lots);
        row.put("corrections", (double) batch.correctionCount());
        row.put("notes", String.join(BETWEEN, batch.notes()));
        row.put("file", file);
        batch.brief().ifPresent(brief -> {
            Outlook outlook = Outlook.of(brief, made, 0);
            row.put("predicted as made", words(outlook.predicted()));
            Sweep sweep = Sweep.of(Mixture.of(made), brief.wavelengthsNm());
            Learned.Landing landing = Learned.of(batch)
                    .landing(made, brief.points(), sweep, batch.balance().capacityG());
            row.put("worst miss", landing.worstMiss());
            row.put("chance in 100", Math.rint(1000 * landing.chance()) / 10);
        });
        List<Map<String, Object>> values = new ArrayList<>();
        if (!batch.measured().isEmpty()) {
            Measurement last = batch.measured().get(batch.measured().size() - 1);
            row.put("measured", measuredWords(last));
            row.put(
                    "verdict",
                    Verdict.of(Factors.none(), batch.measuredBatch(last)).sentence());
        }
        for (int m = 0; m < batch.measured().size(); m++) measured(batch, m, lots, values);
        return new LogbookEntry(row, values);
    }

    private static String state(Batch batch) {
        if (!batch.complete()) return batch.weighedCount() == 0 ? "planned" : "being weighed";
        boolean current = batch.measured().stream().anyMatch(m -> m.correction() == batch.correctionCount());
        String corrected = batch.correctionCount() > 0 ? "corrected" : "weighed";
        return current ? corrected + ", measured" : corrected;
    }

    private static String wanted(Batch batch) {
        return batch.brief()
                .map(b -> b.points().stream()
                        .map(p -> p.quantity().sign() + "(" + Figures.plain(p.wavelengthNm()) + ") "
                                + Figures.significant(p.wantedPerCm(), 4))
                        .collect(Collectors.joining("\n")))
                .orElse("");
    }

    private static String words(List<Answer.Predicted> predicted) {
        return predicted.stream()
                .map(p -> p.point().quantity().sign() + "("
                        + Figures.plain(p.point().wavelengthNm()) + ") "
                        + Figures.withUncertainty(p.perCm(), p.uPerCm()))
                .collect(Collectors.joining("\n"));
    }

    private static String measuredWords(Measurement m) {
        return m.values().stream()
                .map(v -> v.quantity().sign() + "(" + Figures.plain(v.wavelengthNm()) + ") "
                        + Figures.withUncertainty(v.perCm(), v.uPerCm()))
                .collect(Collectors.joining("\n"));
    }

    private static void measured(Batch batch, int number, String lots, List<Map<String, Object>> values) {
        Measurement m = batch.measured().get(number);
        Recipe made = batch.asMade(m.correction());
        double[] nm = m.values().stream()
                .mapToDouble(MeasuredValue::wavelengthNm)
                .sorted()
                .distinct()
                .toArray();
        Sweep sweep = Sweep.of(Mixture.of(made), nm);
        double[] mua = sweep.muaPerCm(made.massesG());
        double[] musp = sweep.muspPerCm(made.massesG());
        Budget budget = Budget.of(made, sweep, batch.balance().capacityG());
        double[] uMua = budget.uMuaPerCm();
        double[] uMusp = budget.uMuspPerCm();
        for (MeasuredValue v : m.values()) {
            int at = java.util.Arrays.binarySearch(nm, v.wavelengthNm());
            boolean scattering = v.quantity() == Quantity.SCATTERING;
            double predicted = (scattering ? musp : mua)[at];
            Map<String, Object> row = new LinkedHashMap<>();
            row.put(BATCH, batch.id());
            row.put(DATE, m.on());
            row.put("nm", v.wavelengthNm());
            row.put("quantity", v.quantity().sign());
            batch.brief()
                    .ifPresent(b -> b.points().stream()
                            .filter(p -> p.wavelengthNm() == v.wavelengthNm()
                                    && (p.quantity() == Point.Quantity.MUSP) == scattering)
                            .findFirst()
                            .ifPresent(p -> {
                                row.put("wanted", p.wantedPerCm());
                                row.put("± tolerance", p.tolerancePerCm());
                            }));
            row.put("predicted", predicted);
            row.put("± u predicted", (scattering ? uMusp : uMua)[at]);
            row.put("measured", v.perCm());
            row.put("± u measured", v.uPerCm());
            row.put(scattering ? MUSP_RATIO : MUA_RATIO, v.perCm() / predicted);
            row.put("method", m.method().name());
            row.put(LOTS, lots);
            row.put(
                    KEY,
                    batch.id() + " / " + (number + 1) + " / " + Figures.plain(v.wavelengthNm()) + " / "
                            + v.quantity().word());
            values.add(row);
        }
    }

    /** "ink-demo 02; lipid-emulsion-20 L07": every absorber's and scatterer's lot, or — where none was written down. */
    private static String lots(Recipe made) {
        Map<String, TreeSet<String>> numbers = new TreeMap<>();
        made.items().forEach(i -> note(numbers, i.ingredient(), i.lot().orElse("")));
        for (Stock s : made.stocks()) note(numbers, s.ingredient(), s.lot().orElse(""));
        return numbers.entrySet().stream()
                .flatMap(e -> e.getValue().stream().map(lot -> e.getKey() + " " + lot))
                .collect(Collectors.joining(BETWEEN));
    }

    private static void note(Map<String, TreeSet<String>> numbers, Ingredient i, String typed) {
        boolean colours =
                i.part() == org.hazewright.shelf.Part.ABSORBER || i.part() == org.hazewright.shelf.Part.SCATTERER;
        String lot = typed.isEmpty() ? i.lot().map(l -> l.number()).orElse("") : typed;
        if (!colours && lot.isEmpty()) return;
        TreeSet<String> known = numbers.computeIfAbsent(i.kind(), k -> new TreeSet<>());
        if (!lot.isEmpty()) known.remove("—");
        if (!lot.isEmpty() || known.isEmpty()) known.add(lot.isEmpty() ? "—" : lot);
    }
}
