package org.hazewright.sheet;

import java.io.IOException;
import java.io.OutputStream;
import java.nio.file.Files;
import java.nio.file.Path;
import java.time.LocalDate;
import java.util.ArrayList;
import java.util.LinkedHashMap;
import java.util.List;
import java.util.Map;
import java.util.concurrent.TimeUnit;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;
import org.openjdk.jmh.annotations.Benchmark;
import org.openjdk.jmh.annotations.BenchmarkMode;
import org.openjdk.jmh.annotations.Fork;
import org.openjdk.jmh.annotations.Measurement;
import org.openjdk.jmh.annotations.Mode;
import org.openjdk.jmh.annotations.OutputTimeUnit;
import org.openjdk.jmh.annotations.Scope;
import org.openjdk.jmh.annotations.Setup;
import org.openjdk.jmh.annotations.State;
import org.openjdk.jmh.annotations.Warmup;

/** Appending to a logbook of 1000 batches with four values each, and reading filled-in sheets back, one and 200 of them. */
@State(Scope.Benchmark)
@BenchmarkMode(Mode.AverageTime)
@OutputTimeUnit(TimeUnit.MILLISECONDS)
@Fork(value = 1, jvmArgs = "-Xmx512m")
@Warmup(iterations = 3, time = 3)
@Measurement(iterations = 3, time = 3)
public class LogbookBenchmark {
    private Path logbook;
    private Path sheet;
    private final List<Path> sheets = new ArrayList<>();

    @Setup
    public void setup() throws IOException {
        Path folder = Files.createTempDirectory("logbook");
        logbook = folder.resolve("logbook.xlsx");
        try (XSSFWorkbook w = LogbookPages.create()) {
            LogbookTable batches =
                    LogbookTable.find(w, logbook, LogbookPages.BATCHES, LogbookEntry.BATCH_COLUMNS, LogbookEntry.BATCH);
            LogbookTable values =
                    LogbookTable.find(w, logbook, LogbookPages.VALUES, LogbookEntry.VALUE_COLUMNS, LogbookEntry.KEY);
            for (int n = 0; n < 1000; n++) {
                LogbookEntry e = entry("batch-" + n);
                batches.put(e.batch());
                e.values().forEach(values::put);
            }
            try (OutputStream out = Files.newOutputStream(logbook)) {
                w.write(out);
            }
        }
        sheet = folder.resolve("sheet.xlsx");
        Filled filled = Filled.of(Answers.gelatin());
        for (int n = 0; n < filled.weighed().size(); n++) filled.weigh(n, 1 + n);
        for (int n = 0; n < filled.weighed().size(); n++)
            filled.weigh(
                    n,
                    Filled.beside(filled.weighed().get(n), FillInPlan.PLANNED).getNumericCellValue());
        try (OutputStream out = Files.newOutputStream(sheet)) {
            filled.workbook.write(out);
        }
        for (int n = 0; n < 200; n++) sheets.add(Files.copy(sheet, folder.resolve("sheet-" + n + ".xlsx")));
    }

    private static LogbookEntry entry(String id) {
        Map<String, Object> row = new LinkedHashMap<>();
        for (String c : LogbookEntry.BATCH_COLUMNS) row.put(c, "some text of the usual length");
        row.put(LogbookEntry.BATCH, id);
        row.put(LogbookEntry.DATE, LocalDate.of(2026, 3, 1));
        row.put(LogbookEntry.LOTS, "ink-demo K3; lipid-emulsion-20 L07");
        List<Map<String, Object>> values = new ArrayList<>();
        for (int k = 0; k < 4; k++) {
            Map<String, Object> v = new LinkedHashMap<>();
            for (String c : LogbookEntry.VALUE_COLUMNS) v.put(c, 1.01);
            v.put(LogbookEntry.BATCH, id);
            v.put(LogbookEntry.DATE, LocalDate.of(2026, 3, 1));
            v.put(LogbookEntry.LOTS, "ink-demo K3; lipid-emulsion-20 L07");
            v.put(LogbookEntry.KEY, id + " / " + k);
            values.add(v);
        }
        return new LogbookEntry(row, values);
    }

    @Benchmark
    public Logbook.Recorded append() {
        return Logbook.record(logbook, entry("the-next"));
    }

    @Benchmark
    public FilledIn readBack() {
        return FilledIn.read(sheet);
    }

    /** One job of 200 sheets in a process that has read none before, within 512 MB. */
    @Benchmark
    @BenchmarkMode(Mode.SingleShotTime)
    @Warmup(iterations = 0)
    @Measurement(iterations = 1)
    public int readBack200() {
        int grams = 0;
        for (Path s : sheets) grams += FilledIn.read(s).weighedG().size();
        return grams;
    }
}
