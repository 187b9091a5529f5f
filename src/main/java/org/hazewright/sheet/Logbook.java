package org.hazewright.sheet;

import java.io.ByteArrayOutputStream;
import java.io.IOException;
import java.io.UncheckedIOException;
import java.nio.channels.FileChannel;
import java.nio.channels.FileLock;
import java.nio.channels.OverlappingFileLockException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.nio.file.StandardOpenOption;
import java.nio.file.attribute.FileTime;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.Optional;
import java.util.stream.Stream;
import org.apache.poi.ss.usermodel.Cell;
import org.apache.poi.ss.usermodel.CellType;
import org.apache.poi.ss.util.CellReference;
import org.apache.poi.xssf.usermodel.XSSFSheet;
import org.apache.poi.xssf.usermodel.XSSFWorkbook;
import org.hazewright.batch.Batch;
import org.hazewright.files.SafeFile;
import org.hazewright.optics.Refusal;

/**
 * The workbook that gathers all batches: a row a batch, a row a measured value, the lots, and charts of measured over predicted.
 *
 * <p>It is rewritten whole into a new file that takes the old one's place at once, the version before kept beside it, so it can be killed at
 * any moment. While a spreadsheet program has it open (its lock file lies beside it, or the system holds the file) nothing is written into it: the record
 * is kept in a small workbook beside it and taken over the next time. What people added stays; see {@link LogbookTable}.
 */
public final class Logbook {
    private static final long PATIENCE_MS = 10_000;

    private Logbook() {}

    /**
     * Where a record went.
     *
     * @param kept the file that holds the record now
     * @param waiting why it is not in the logbook yet; empty when it is
     * @param merged records of before that were taken over as well
     * @param cutOff half-written files of programs that were killed, removed now
     */
    public record Recorded(Path kept, Optional<String> waiting, int merged, int cutOff) {
        /** What was found of before, for a person; empty when there was nothing. */
        public String found() {
            List<String> found = new ArrayList<>();
            if (merged > 0) found.add("with " + merged + " that waited beside it");
            if (cutOff > 0)
                found.add((cutOff == 1 ? "a write" : cutOff + " writes")
                        + " of it had been cut off before; what was half-written is removed, the logbook was whole");
            return String.join("; ", found);
        }
    }

    /** Records a batch; {@code batchFile} is its own file. The record is on disk when this returns. */
    public static Recorded record(Path logbook, Batch batch, Path batchFile) {
        Path beside = logbook.toAbsolutePath().getParent();
        Path file = batchFile.toAbsolutePath();
        String shown = beside != null && file.startsWith(beside)
                ? beside.relativize(file).toString()
                : file.toString();
        return record(logbook, LogbookEntry.of(batch, shown));
    }

    static synchronized Recorded record(Path logbook, LogbookEntry entry) {
        Path pending = pendingFor(logbook, entry);
        Optional<String> open = openElsewhere(logbook);
        if (open.isPresent()) return keep(logbook, pending, entry, open.get());
        try (FileChannel channel =
                FileChannel.open(lockFile(logbook), StandardOpenOption.CREATE, StandardOpenOption.WRITE)) {
            FileLock lock = locked(channel);
            if (lock == null)
                return keep(logbook, pending, entry, "another command has been writing it for ten seconds");
            try {
                return append(logbook, pending, entry);
            } finally {
                lock.release();
            }
        } catch (IOException e) {
            return keep(
                    logbook,
                    pending,
                    entry,
                    "its folder or its lock file, ." + logbook.getFileName() + ".lock, cannot be used");
        }
    }

    private static Recorded append(Path logbook, Path pending, LogbookEntry entry) throws IOException {
        int cutOff = sweepLeftovers(logbook);
        for (int attempt = 0; attempt < 3; attempt++) {
            Stamp before = Stamp.of(logbook);
            List<Path> waiting = waiting(logbook);
            byte[] bytes;
            try (XSSFWorkbook workbook =
                    before == null ? LogbookPages.create() : SafeWorkbook.open(logbook, SafeWorkbook.LOGBOOK)) {
                requireFormat(workbook, logbook);
                Tables tables = new Tables(workbook, logbook);
                for (Path p : waiting) if (!p.equals(pending)) merge(p, tables);
                tables.put(entry);
                tables.finish();
                ByteArrayOutputStream out = new ByteArrayOutputStream(1 << 16);
                workbook.write(out);
                bytes = out.toByteArray();
            } catch (Refusal damaged) {
                return keep(logbook, pending, entry, "it cannot be used: " + damaged.getMessage());
            }
            Optional<String> open = openElsewhere(logbook);
            if (open.isPresent()) return keep(logbook, pending, entry, open.get());
            Stamp now = Stamp.of(logbook);
            if (before == null ? now != null : !before.equals(now))
                continue; // somebody saved it meanwhile: read it again
            SafeFile.write(logbook, bytes, SafeFile.Overwrite.KEEP_PREVIOUS);
            int merged = 0;
            for (Path p : waiting) {
                Files.deleteIfExists(p);
                if (!p.equals(pending)) merged++;
            }
            return new Recorded(logbook, Optional.empty(), merged, cutOff);
        }
        return keep(logbook, pending, entry, "somebody else keeps saving it");
    }

    private record Stamp(FileTime changed, long size) {
        static Stamp of(Path file) throws IOException {
            return Files.exists(file) ? new Stamp(Files.getLastModifiedTime(file), Files.size(file)) : null;
        }
    }

    static final class Tables {
        private final XSSFWorkbook workbook;
        final LogbookTable batches;
        final LogbookTable values;
        final LogbookTable lots;

        Tables(XSSFWorkbook workbook, Path file) {
            this.workbook = workbook;
            batches = LogbookTable.find(
                    workbook, file, LogbookPages.BATCHES, LogbookEntry.BATCH_COLUMNS, LogbookEntry.BATCH);
            values = LogbookTable.find(
                    workbook, file, LogbookPages.VALUES, LogbookEntry.VALUE_COLUMNS, LogbookEntry.KEY);
            lots = LogbookTable.find(workbook, file, LogbookPages.LOTS, LogbookLots.COLUMNS, LogbookLots.LOT);
        }

        void put(LogbookEntry entry) {
            batches.put(entry.batch());
            entry.values().forEach(values::put);
        }

        void finish() {
            List<Map<String, Object>> used = LogbookLots.of(
                    batches.all(List.of(LogbookEntry.DATE, LogbookEntry.LOTS)),
                    values.all(List.of(LogbookEntry.LOTS, LogbookEntry.MUA_RATIO, LogbookEntry.MUSP_RATIO)));
            used.forEach(lots::put);
            for (String lot : lots.keys()) // of a lot that was written down wrongly once, only the name is left
            if (used.stream().noneMatch(row -> row.get(LogbookLots.LOT).equals(lot)))
                    lots.clear(lot, LogbookLots.COLUMNS.subList(1, LogbookLots.COLUMNS.size()));
            LogbookCharts.follow(sheetOf(workbook, LogbookPages.CHARTS), values, lots);
        }
    }

    /** Rows of a waiting record, columns of ours only. */
    private static void merge(Path waiting, Tables tables) throws IOException {
        try (XSSFWorkbook small = SafeWorkbook.open(waiting, SafeWorkbook.SHEET)) {
            requireFormat(small, waiting);
            Tables from = new Tables(small, waiting);
            from.batches.all().forEach(tables.batches::put);
            from.values.all().forEach(tables.values::put);
        }
    }

    static void requireFormat(XSSFWorkbook workbook, Path file) {
        CellReference at = Names.cell(workbook, LogbookPages.FORMAT_NAME);
        XSSFSheet sheet = at == null ? null : workbook.getSheet(at.getSheetName());
        Cell cell = sheet == null || sheet.getRow(at.getRow()) == null
                ? null
                : sheet.getRow(at.getRow()).getCell(at.getCol());
        if (cell == null || cell.getCellType() != CellType.NUMERIC)
            throw SafeWorkbook.refusal(
                    file, "This is a workbook but not a logbook of this program; name another file with --logbook.");
        if (cell.getNumericCellValue() != LogbookPages.FORMAT)
            throw SafeWorkbook.refusal(
                    file,
                    "The logbook has the format " + cell.getNumericCellValue() + " and this program writes format "
                            + LogbookPages.FORMAT + "; another version of the program made it.");
    }

    static XSSFSheet sheetOf(XSSFWorkbook workbook, String name) {
        CellReference at = Names.cell(workbook, name);
        return at == null ? null : workbook.getSheet(at.getSheetName());
    }

    private static Recorded keep(Path logbook, Path pending, LogbookEntry entry, String why) {
        try (XSSFWorkbook small = LogbookPages.create()) {
            Tables tables = new Tables(small, pending);
            tables.put(entry);
            ByteArrayOutputStream out = new ByteArrayOutputStream(1 << 15);
            small.write(out);
            SafeFile.write(pending, out.toByteArray(), SafeFile.Overwrite.REPLACE);
        } catch (IOException e) {
            throw new UncheckedIOException("The record could not be put together.", e);
        }
        return new Recorded(
                pending,
                Optional.of("The logbook " + logbook + " was not changed: " + why
                        + (why.endsWith(".") ? "" : ".") + " The record is kept in " + pending
                        + " and goes into the logbook with the next one."),
                0,
                0);
    }

    // Files beside the logbook.

    private static Path pendingFor(Path logbook, LogbookEntry entry) {
        String own = entry.batch().get(LogbookEntry.BATCH).toString();
        String id = own.replaceAll("[^A-Za-z0-9._-]", "_");
        if (!id.equals(own))
            id += "-" + Integer.toHexString(own.hashCode()); // two names may differ in such letters only
        return logbook.resolveSibling(stem(logbook) + ".waiting." + id + ".xlsx");
    }

    private static String stem(Path logbook) {
        String name = logbook.getFileName().toString();
        return name.endsWith(".xlsx") ? name.substring(0, name.length() - 5) : name;
    }

    static List<Path> waiting(Path logbook) throws IOException {
        Path folder = logbook.toAbsolutePath().getParent();
        List<Path> found = new ArrayList<>();
        if (!Files.isDirectory(folder)) return found;
        try (Stream<Path> all = Files.list(folder)) {
            all.filter(p -> p.getFileName().toString().startsWith(stem(logbook) + ".waiting.")
                            && p.getFileName().toString().endsWith(".xlsx"))
                    .sorted()
                    .forEach(p -> found.add(logbook.resolveSibling(p.getFileName())));
        }
        return found;
    }

    private static Path lockFile(Path logbook) throws IOException {
        Files.createDirectories(logbook.toAbsolutePath().getParent());
        return logbook.resolveSibling("." + logbook.getFileName() + ".lock");
    }

    /** Half-written files of commands that were killed; only who holds the lock makes such files. */
    private static int sweepLeftovers(Path logbook) throws IOException {
        String start = "." + logbook.getFileName() + ".";
        int swept = 0;
        try (Stream<Path> all = Files.list(logbook.toAbsolutePath().getParent())) {
            for (Path p : all.filter(f -> f.getFileName().toString().startsWith(start)
                            && f.getFileName().toString().endsWith(".part"))
                    .toList()) if (Files.deleteIfExists(p)) swept++;
        }
        return swept;
    }

    private static FileLock locked(FileChannel channel) throws IOException {
        long end = System.nanoTime() + PATIENCE_MS * 1_000_000;
        while (true) {
            try {
                FileLock lock = channel.tryLock();
                if (lock != null) return lock;
            } catch (OverlappingFileLockException inThisProgram) {
                // waits like for any other
            }
            if (System.nanoTime() > end) return null;
            try {
                Thread.sleep(50);
            } catch (InterruptedException e) {
                Thread.currentThread().interrupt();
                return null;
            }
        }
    }

    /** Why the logbook may not be written now: the lock files that spreadsheet programs lay beside it, or the system's own lock. */
    private static Optional<String> openElsewhere(Path logbook) {
        String name = logbook.getFileName().toString();
        String[] locks = {"~$" + name, ".~lock." + name + "#"};
        for (String lock : locks) {
            Path file = logbook.resolveSibling(lock);
            if (Files.exists(file))
                return Optional.of("it is open in a spreadsheet program (" + file.getFileName()
                        + " lies beside it; if nobody has it open, delete that file)");
        }
        if (!Files.exists(logbook)) return Optional.empty();
        if (!Files.isWritable(logbook)) return Optional.of("it is write-protected");
        try (FileChannel channel = FileChannel.open(logbook, StandardOpenOption.READ, StandardOpenOption.WRITE)) {
            FileLock lock = channel.tryLock();
            if (lock == null) return Optional.of("another program holds it");
            lock.release();
            return Optional.empty();
        } catch (OverlappingFileLockException | IOException e) {
            return Optional.of("another program holds it");
        }
    }

    /** The rows of a logbook's batches, by column; for tests and for export. */
    public static List<Map<String, Object>> batches(Path logbook) {
        try (XSSFWorkbook workbook = SafeWorkbook.open(logbook, SafeWorkbook.LOGBOOK)) {
            requireFormat(workbook, logbook);
            return new Tables(workbook, logbook).batches.all();
        } catch (IOException e) {
            throw SafeWorkbook.refusal(logbook, "The workbook could not be closed again (" + e.getMessage() + ").");
        }
    }
}
