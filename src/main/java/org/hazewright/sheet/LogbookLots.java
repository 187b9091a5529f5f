package org.hazewright.sheet;

import java.time.LocalDate;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;

/** The lots of a logbook's batches: where each was used, and how measured values stand to predicted ones where it was in. */
final class LogbookLots {
    static final String LOT = "ingredient and lot";
    static final List<String> COLUMNS = List.of(
            LOT,
            "batches",
            "first used",
            "last used",
            "values",
            "mean of " + LogbookEntry.MUA_RATIO,
            "mean of " + LogbookEntry.MUSP_RATIO);

    private LogbookLots() {}

    private static final class Sum {
        int batches;
        LocalDate first;
        LocalDate last;
        int values;
        final double[] sum = new double[2];
        final int[] count = new int[2];
    }

    /** Rows by lot, from the rows of batches and of values. */
    static List<Map<String, Object>> of(List<Map<String, Object>> batches, List<Map<String, Object>> values) {
        Map<String, Sum> sums = new TreeMap<>();
        for (Map<String, Object> b : batches)
            for (String lot : lots(b)) {
                Sum s = sums.computeIfAbsent(lot, l -> new Sum());
                s.batches++;
                if (!(b.get(LogbookEntry.DATE) instanceof LocalDate day)) continue;
                if (s.first == null || day.isBefore(s.first)) s.first = day;
                if (s.last == null || day.isAfter(s.last)) s.last = day;
            }
        for (Map<String, Object> v : values)
            for (String lot : lots(v)) {
                Sum s = sums.get(lot);
                if (s == null) continue;
                s.values++;
                String[] ratios = {LogbookEntry.MUA_RATIO, LogbookEntry.MUSP_RATIO};
                for (int k = 0; k < 2; k++)
                    if (v.get(ratios[k]) instanceof Double ratio) {
                        s.sum[k] += ratio;
                        s.count[k]++;
                    }
            }
        return sums.entrySet().stream().map(e -> row(e.getKey(), e.getValue())).toList();
    }

    private static Map<String, Object> row(String lot, Sum s) {
        Map<String, Object> row = new LinkedHashMap<>();
        row.put(LOT, lot);
        row.put("batches", (double) s.batches);
        if (s.first != null) {
            row.put("first used", s.first);
            row.put("last used", s.last);
        }
        row.put("values", (double) s.values);
        for (int k = 0; k < 2; k++) if (s.count[k] > 0) row.put(COLUMNS.get(5 + k), s.sum[k] / s.count[k]);
        return row;
    }

    private static String[] lots(Map<String, Object> row) {
        Object lots = row.get(LogbookEntry.LOTS);
        return lots == null || lots.toString().isBlank()
                ? new String[0]
                : lots.toString().split(LogbookEntry.BETWEEN);
    }
}
